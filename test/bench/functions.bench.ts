import { fixedFromNumber } from '../../engine/arithmetic/fixed';
import type { FixedComplex } from '../../engine/arithmetic/fixed-complex';
import { ARRAY, ARRAYS, PRECISE, PRELUDE } from './functions-cases';
import type { ComparisonRow } from './timing';
import { calibration, log10Difference, runPython, timeInTurns } from './timing';

const DIGITS = [50, 200] as const;
const ROUNDS = 3;
const PYTHON_PATIENCE = 180_000;
/** Bits by which references are finer. */
const EXTRA = 40;

/**
 * Microseconds a call with mpmath 1.2.1 on gmpy beside the calibration loop of timing.ts, measured by the same program on a
 * two-core machine; used (scaled) where Python is missing.
 */
const RECORDED: { readonly calibration: number; readonly times: Readonly<Record<string, number>> } = {
  calibration: 300,
  times: {
    'log s_b, 10,000 real x, b = 2^(1/4)|15': 6.1e4,
    'log s_b, 10,000 real x, b = 1|15': 7.0e4,
    'log s_b, 10,000 complex x, b = 2^(1/4)|15': 2.6e4,
    'log Gamma, 10,000 complex z|15': 57,
    'log Upsilon_b, 10,000 x on the axis, b = 1|15': 8.7e4,
    'log S_3, 10,000 x on the axis, round|15': 5.7e4,
    'log Gamma|50': 104,
    'log Gamma|200': 840,
    'log s_b, real x|50': 2.65e5,
    'log Upsilon_b, on the axis|50': 1.9e5,
    'log S_3, round, on the axis|50': 4.6e5,
    'log S_3, periods 1, sqrt 2, 2|50': 4.3e5,
    'dilogarithm|50': 1.5e3,
    'dilogarithm|200': 8.7e3,
    'zeta(s, a), complex s|50': 2.5e3,
    'zeta(s, a), complex s|200': 2.3e4,
    'log Gamma_2(z | 1, 1)|50': 2.9e3,
    'log Gamma_2(z | 1, 1)|200': 2.0e4,
  },
};

interface PeerResult {
  readonly microseconds: number;
  /** The value with EXTRA more bits. */
  readonly value: FixedComplex;
}

function bitsFor(digits: number): number {
  return Math.ceil(digits * Math.log2(10)) + 8;
}

function keyOf(name: string, digits: number): string {
  return `${name}|${digits}`;
}

/** Times and values of mpmath by key; values at the same digits and 20 more, for the accuracy of both. */
function askMpmath(): Map<string, { readonly own: PeerResult; readonly reference: FixedComplex }> {
  const jobs = [
    ...PRECISE.flatMap(({ name, python, live }) =>
      DIGITS.filter((digits) => digits <= live).map((digits) => [keyOf(name, digits), digits, bitsFor(digits), python]),
    ),
    ...ARRAYS.map(({ name, python }) => [keyOf(name, 15), 15, bitsFor(15), python]),
  ];
  const output = runPython(
    `${PRELUDE}
for key, digits, bits, text in ${JSON.stringify(jobs)}:
    f = eval('lambda: ' + text)
    mp.mp.dps = digits
    own, passed = f(), clock(f)
    mp.mp.dps = digits + 20
    reference = f()
    mp.mp.prec += 100
    numbers = [int(mp.nint(mp.ldexp(part(v), bits + ${EXTRA}))) for v in (own, reference) for part in (mp.re, mp.im)]
    print(key, passed, *numbers, sep='\\t')
`,
    PYTHON_PATIENCE,
  );
  const results = new Map<string, { readonly own: PeerResult; readonly reference: FixedComplex }>();
  for (const line of (output ?? '').split('\n').filter((text) => text !== '')) {
    const [key = '', time = '', ...numbers] = line.split('\t');
    const [a, b, c, d] = numbers.map(BigInt) as [bigint, bigint, bigint, bigint];
    results.set(key, { own: { microseconds: Number(time), value: { re: a, im: b } }, reference: { re: c, im: d } });
  }
  return results;
}

function worst(a: FixedComplex, b: FixedComplex, bits: number): number {
  return Math.max(log10Difference(a.re, b.re, bits), log10Difference(a.im, b.im, bits));
}

/** Every function in doubles on arrays of 10,000 (microseconds a value) and to 50 and 200 digits, against mpmath. */
export function run(): ComparisonRow[] {
  const speed = calibration() / RECORDED.calibration;
  const live = askMpmath();
  const row = (
    name: string,
    digits: number,
    own: number,
    peer: string,
    ours: FixedComplex,
    bits: number,
  ): ComparisonRow => {
    const measured = live.get(keyOf(name, digits));
    const recorded = RECORDED.times[keyOf(name, digits)];
    const time = measured?.own.microseconds ?? (recorded === undefined ? null : recorded * speed);
    return {
      name,
      digits,
      microseconds: own,
      peer,
      peerMicroseconds: time,
      ratio: time === null ? null : time / own,
      peerTime: measured ? 'live' : time === null ? 'none' : 'recorded',
      log10Error: measured ? worst(ours, measured.reference, bits + EXTRA) : null,
      peerLog10Error: measured ? worst(measured.own.value, measured.reference, bits + EXTRA) : null,
    };
  };
  const arrays = ARRAYS.map(({ name, kernel, re, im }) => {
    const made = kernel();
    const xRe = Float64Array.from({ length: ARRAY }, (_, k) => re(k));
    const xIm = im === null ? null : Float64Array.from({ length: ARRAY }, (_, k) => im(k));
    const task = (): number => {
      const outRe = new Float64Array(ARRAY);
      made.addLog(xRe, xIm, 1, outRe, new Float64Array(ARRAY));
      return outRe[0] as number;
    };
    const [passed = Number.NaN] = timeInTurns([task], ROUNDS);
    const outRe = new Float64Array(ARRAY);
    const outIm = new Float64Array(ARRAY);
    made.addLog(xRe, xIm, 1, outRe, outIm);
    const bits = bitsFor(15);
    const ours = { re: fixedOf(outRe[ARRAY - 1] as number, bits), im: fixedOf(outIm[ARRAY - 1] as number, bits) };
    return row(name, 15, passed / ARRAY, 'mpmath', ours, bits);
  });
  const precise = PRECISE.flatMap(({ name, peer, compute }) =>
    DIGITS.map((digits) => {
      const bits = bitsFor(digits);
      const ours = compute(bits);
      const [own = Number.NaN] = timeInTurns([() => compute(bits)], ROUNDS);
      const up = BigInt(EXTRA);
      return row(name, digits, own, peer, { re: ours.re << up, im: ours.im << up }, bits);
    }),
  );
  return [...arrays, ...precise];
}

/** A double with bits + EXTRA fraction bits. */
function fixedOf(x: number, bits: number): bigint {
  return fixedFromNumber(x, bits + EXTRA);
}
