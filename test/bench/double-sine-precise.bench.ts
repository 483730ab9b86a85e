import Decimal from 'decimal.js';
import { integerSqrt } from '../../engine/arithmetic/fixed';
import type { FixedComplex } from '../../engine/arithmetic/fixed-complex';
import { doubleSineFrame } from '../../engine/functions/double-sine-frame';
import { buildNearTable } from '../../engine/functions/double-sine-near-table';
import type { ExactPeriod } from '../../engine/functions/double-sine-period';
import { logDoubleSine } from '../../engine/functions/double-sine-precise';
import fixture from '../fixtures/functions/double-sine-precise.json' with { type: 'json' };
import type { ComparisonRow } from './timing';
import { calibration, log10Difference, runPython, timeInTurns } from './timing';

/** b = 2^(1/4): irrational, no double poles. */
const PERIOD: ExactPeriod = {
  square: null,
  value: (bits) => integerSqrt(integerSqrt(2n << BigInt(4 * bits))),
  approx: 2 ** 0.25,
};

const ROUNDS = 5;

/** mpmath's quadrature is run live up to these digits: 200 take six seconds and more. */
const LIVE_DIGITS = [15, 50] as const;
const PYTHON_PATIENCE = 60_000;

/**
 * mpmath 1.2.1 with gmpy, one call of quad in microseconds, measured by `QUADRATURE` below beside the calibration loop of timing.ts on an
 * idle two-core machine; used (scaled) where Python is missing, and for 200 digits.
 */
const RECORDED = {
  calibration: 304,
  quadrature: [
    { digits: 15, microseconds: 57_000 },
    { digits: 50, microseconds: 480_000 },
    { digits: 200, microseconds: 5_700_000 },
  ],
};

/** log s_b(0.3 + 0.2i) by quadrature on R + i pi b/2, no cancellation; log s_b(x) = -log s_b(-x) brings Re x below 0. */
const QUADRATURE = `
import time, mpmath as mp
for digits in DIGITS:
    bits = int(digits * 3.3219281) + 8
    mp.mp.dps = digits
    i, b = mp.mpc(0, 1), mp.root(2, 4)
    x = -mp.mpc(mp.ldexp(mp.nint(mp.ldexp(mp.mpf('0.3'), bits)), -bits), mp.ldexp(mp.nint(mp.ldexp(mp.mpf('0.2'), bits)), -bits))
    a = mp.pi / b / 2
    def integrand(u):
        w = mp.mpc(u, a)
        return mp.exp(-2 * i * x * w) / (4 * w * mp.sinh(b * w) * mp.sinh(w / b))
    def value():
        line = mp.quad(integrand, [-mp.inf, 0, mp.inf])
        return -(-i * mp.pi * x ** 2 / 2 - i * mp.pi * (b ** 2 + b ** -2) / 24 + line)
    start = time.process_time()
    v = value()
    passed = (time.process_time() - start) * 1e6
    mp.mp.prec += 60
    print(digits, passed, int(mp.nint(mp.ldexp(v.real, bits + 40))), int(mp.nint(mp.ldexp(v.imag, bits + 40))))
`;

function integer(text: string | undefined): bigint {
  if (text === undefined) throw new Error('missing number');
  return text.startsWith('-') ? -BigInt(`0x${text.slice(1)}`) : BigInt(`0x${text}`);
}

interface Reference {
  readonly bits: number;
  readonly x: FixedComplex;
  /** With the fixture's extra bits. */
  readonly log: FixedComplex;
}

/** The fixture's value at 0.3 + 0.2i. */
function referenceFor(digits: number): Reference {
  const row = fixture.rows.find((r) => r.b === 'b = 2^(1/4)' && r.digits === digits && r.where === 'inside');
  if (row === undefined) throw new Error(`no reference for ${digits} digits`);
  return {
    bits: row.bits,
    x: { re: integer(row.x[0]), im: integer(row.x[1]) },
    log: { re: integer(row.log[0]), im: integer(row.log[1]) },
  };
}

function worstError(value: FixedComplex, reference: Reference): number {
  const bits = reference.bits + fixture.extra;
  return Math.max(log10Difference(value.re, reference.log.re, bits), log10Difference(value.im, reference.log.im, bits));
}

interface QuadratureResult {
  readonly digits: number;
  readonly microseconds: number;
  readonly value: FixedComplex;
}

function askMpmath(): QuadratureResult[] {
  const output = runPython(QUADRATURE.replace('DIGITS', JSON.stringify(LIVE_DIGITS)), PYTHON_PATIENCE);
  return (output ?? '')
    .split('\n')
    .filter((line) => line !== '')
    .map((line) => {
      const [digits = '', microseconds = '', re = '0', im = '0'] = line.split(' ');
      return { digits: Number(digits), microseconds: Number(microseconds), value: { re: BigInt(re), im: BigInt(im) } };
    });
}

/**
 * log s_b at real x in decimal.js by the plain midpoint rule, sum_k w_k sin((2k+1) x h) - pi^2 x/(2h) with 2 pi/h = L/(pi b_min) + 1 and
 * no residues: what the same library user would write. The weights are made beforehand; a call is one Clenshaw sum.
 */
function decimalMidpoint(digits: number): (x: Decimal) => Decimal {
  const Exact = Decimal.clone({ precision: digits + 6 });
  const pi = Exact.acos(-1);
  const b = new Exact(2).pow(0.25);
  const inverse = new Exact(1).div(b);
  const q = b.plus(inverse);
  const length = digits * Math.LN10 + 3;
  const h = new Exact(2 * Math.PI).div(length / (Math.PI * 2 ** -0.25) + 1);
  const weights: Decimal[] = [];
  for (let k = 0; k < length / (q.toNumber() * h.toNumber()); k++) {
    const t = h.times(2 * k + 1).div(2);
    const bottom = new Exact(1)
      .minus(b.times(t).times(-2).exp())
      .times(new Exact(1).minus(inverse.times(t).times(-2).exp()))
      .times(2 * k + 1);
    weights.push(q.times(t).neg().exp().times(4).div(bottom));
  }
  const linear = pi.times(pi).div(h.times(2));
  return (x) => {
    const angle = x.times(h);
    const twice = angle.times(2).cos().times(2);
    let [sum, before] = [new Exact(0), new Exact(0)];
    for (let k = weights.length - 1; k >= 0; k--) {
      [sum, before] = [
        twice
          .times(sum)
          .minus(before)
          .plus(weights[k] as Decimal),
        sum,
      ];
    }
    // Sine series: sin(angle) (B_0 + B_1); log s_b = -i { ... }.
    return linear.times(x).minus(angle.sin().times(sum.plus(before)));
  };
}

/** Ours against mpmath's quadrature (complex x) and against decimal.js (real x), with the accuracy reached. */
export function run(): ComparisonRow[] {
  const speed = calibration() / RECORDED.calibration;
  const live = askMpmath();
  const rows: ComparisonRow[] = [];
  for (const digits of [15, 50, 200, 1000]) {
    const reference = referenceFor(digits);
    const { x, bits } = reference;
    const log = logDoubleSine(x, PERIOD, bits);
    if (log.kind !== 'value') throw new Error(log.kind);
    const up = BigInt(fixture.extra);
    const log10Error = worstError({ re: log.re << up, im: log.im << up }, reference);
    const [own = Number.NaN] = timeInTurns([() => logDoubleSine(x, PERIOD, bits)], ROUNDS);
    const measured = live.find((result) => result.digits === digits);
    const recorded = RECORDED.quadrature.find((entry) => entry.digits === digits);
    const time = measured?.microseconds ?? (recorded === undefined ? null : recorded.microseconds * speed);
    rows.push({
      name: 'log s_b, complex x',
      digits,
      microseconds: own,
      peer: 'mpmath quad',
      peerMicroseconds: time,
      ratio: time === null ? null : time / own,
      peerTime: measured !== undefined ? 'live' : recorded !== undefined ? 'recorded' : 'none',
      log10Error,
      peerLog10Error: measured === undefined ? null : worstError(measured.value, reference),
    });
    const table = () => {
      const frame = doubleSineFrame(PERIOD, bits);
      return frame === null ? null : buildNearTable(frame, frame.q / 4, 1);
    };
    const [building = Number.NaN] = timeInTurns([table], digits > 200 ? 1 : ROUNDS);
    rows.push({
      name: 'table of one b',
      digits,
      microseconds: building,
      peer: 'none',
      peerMicroseconds: null,
      ratio: null,
      peerTime: 'none',
      log10Error: null,
      peerLog10Error: null,
    });
    if (digits <= 50) rows.push(againstDecimal(digits, x.re, bits));
  }
  return rows;
}

function againstDecimal(digits: number, re: bigint, bits: number): ComparisonRow {
  const midpoint = decimalMidpoint(digits);
  const Wide = Decimal.clone({ precision: digits + 30 });
  const x = new Wide(re.toString()).div(new Wide(2).pow(bits));
  const ours = () => logDoubleSine({ re, im: 0n }, PERIOD, bits);
  const [own = Number.NaN, peer = Number.NaN] = timeInTurns([ours, () => midpoint(x)], ROUNDS);
  const log = ours();
  if (log.kind !== 'value') throw new Error(log.kind);
  // The reference is our own value at 60 more bits, itself checked against mpmath in the tests.
  const fine = logDoubleSine({ re: re << 60n, im: 0n }, PERIOD, bits + 60);
  if (fine.kind !== 'value') throw new Error(fine.kind);
  const scale = new Wide(2).pow(bits + 60);
  const decimal = BigInt(new Wide(midpoint(x).toString()).times(scale).toFixed(0));
  return {
    name: 'log s_b, real x',
    digits,
    microseconds: own,
    peer: 'decimal.js midpoint rule',
    peerMicroseconds: peer,
    ratio: peer / own,
    peerTime: 'live',
    log10Error: log10Difference(log.im << 60n, fine.im, bits + 60),
    peerLog10Error: log10Difference(decimal, fine.im, bits + 60),
  };
}
