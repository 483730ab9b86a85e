import Decimal from 'decimal.js';
import { fixedFromRatio } from '../../engine/arithmetic/fixed';
import { expComplex, logComplex } from '../../engine/arithmetic/fixed-complex';
import { expFixed } from '../../engine/arithmetic/fixed-exp';
import { logFixed } from '../../engine/arithmetic/fixed-log';
import { sinCosFixed } from '../../engine/arithmetic/fixed-trig';
import type { ComparisonRow } from './timing';
import { log10Difference, median, runPython, timeInTurns } from './timing';

const DIGITS = [15, 50, 200, 1000] as const;
const ROUNDS = 5;
const PYTHON_PATIENCE = 60_000;
/** Bits by which references are finer. */
const EXTRA = 40;

/** The real argument of every function: neither short nor special. */
const NUMERATOR = 1234567n;
const DENOMINATOR = 987654n;
const IMAGINARY = 7654321n;

/** A function here, in decimal.js (null where it has none or refuses), and in mpmath. */
interface Case {
  readonly name: string;
  readonly ours: (x: bigint, y: bigint, bits: number) => unknown;
  /** The part that is checked. */
  readonly value: (x: bigint, y: bigint, bits: number) => bigint;
  readonly decimal: ((x: Decimal) => Decimal | null) | null;
  readonly python: string;
}

const CASES: readonly Case[] = [
  { name: 'multiply', ours: multiply, value: multiply, decimal: (x) => x.times(x), python: 'x * x' },
  {
    name: 'exp',
    ours: (x, _, bits) => expFixed(x, bits),
    value: (x, _, bits) => expFixed(x, bits),
    decimal: (x) => x.exp(),
    python: 'mp.exp(x)',
  },
  {
    name: 'log',
    ours: (x, _, bits) => logFixed(x, bits),
    value: (x, _, bits) => logFixed(x, bits),
    decimal: (x) => x.ln(),
    python: 'mp.log(x)',
  },
  {
    name: 'sin and cos',
    ours: (x, _, bits) => sinCosFixed(x, bits),
    value: (x, _, bits) => sinCosFixed(x, bits).sin,
    // decimal.js stores pi to 1025 digits and refuses trigonometric functions that need more.
    decimal: (x) => (x.sd() > 900 ? null : x.sin().plus(x.cos())),
    python: 'mp.cos_sin(x)',
  },
  {
    name: 'complex exp',
    ours: (re, im, bits) => expComplex({ re, im }, bits),
    value: (re, im, bits) => expComplex({ re, im }, bits).re,
    decimal: null,
    python: 'mp.exp(z)',
  },
  {
    name: 'complex log',
    ours: (re, im, bits) => logComplex({ re, im }, bits),
    value: (re, im, bits) => logComplex({ re, im }, bits).re,
    decimal: null,
    python: 'mp.log(z)',
  },
];

function multiply(x: bigint, _: bigint, bits: number): bigint {
  return (x * x) >> BigInt(bits);
}

function bitsFor(digits: number): number {
  return Math.ceil(digits * Math.log2(10)) + 4;
}

interface PythonTime {
  readonly microseconds: number;
  /** The checked value with EXTRA more bits. */
  readonly value: bigint;
}

/** Times and values from mpmath, in the order digits x cases; null without it. */
function askMpmath(): PythonTime[] | null {
  const program = `
import time, mpmath as mp
def clock(f):
    count = 1
    while True:
        start = time.process_time()
        for _ in range(count): f()
        passed = time.process_time() - start
        if passed > 0.008: return passed / count * 1e6
        count *= 2
for digits, bits in ${JSON.stringify(DIGITS.map((digits) => [digits, bitsFor(digits)]))}:
    for text in ${JSON.stringify(CASES.map(({ python }) => python))}:
        f = eval('lambda x, z: ' + text)
        def arguments(extra):
            mp.mp.prec = bits + extra
            x = mp.mpf(${NUMERATOR}) / ${DENOMINATOR}
            return x, mp.mpc(x, mp.mpf(${IMAGINARY}) / ${DENOMINATOR})
        x, z = arguments(${EXTRA + 40})
        x = mp.ldexp(mp.nint(mp.ldexp(x, bits)), -bits)
        z = mp.mpc(x, mp.ldexp(mp.nint(mp.ldexp(z.imag, bits)), -bits))
        value = f(x, z)
        if isinstance(value, tuple): value = value[1]
        exact = int(mp.nint(mp.ldexp(mp.re(value), bits + ${EXTRA})))
        x, z = arguments(0)
        print(clock(lambda: f(x, z)), exact)
`;
  const output = runPython(program, PYTHON_PATIENCE);
  if (output === null) return null;
  return output
    .trim()
    .split('\n')
    .map((line) => {
      const [time = '', value = ''] = line.split(' ');
      return { microseconds: Number(time), value: BigInt(value) };
    });
}

/**
 * Elementary functions on BigInt fixed point against decimal.js (same run, alternating batches) and, where Python has it, mpmath
 * (same run, alternating rounds); errors against mpmath at 80 more bits.
 */
export function run(): ComparisonRow[] {
  const pythonRounds = Array.from({ length: 2 }, askMpmath);
  const rows: ComparisonRow[] = [];
  DIGITS.forEach((digits, d) => {
    const bits = bitsFor(digits);
    const x = fixedFromRatio(NUMERATOR, DENOMINATOR, bits);
    const y = fixedFromRatio(IMAGINARY, DENOMINATOR, bits);
    const Exact = Decimal.clone({ precision: digits });
    const decimalX = new Exact(NUMERATOR.toString()).div(DENOMINATOR.toString());
    CASES.forEach(({ name, ours, value, decimal }, c) => {
      const tasks: (() => unknown)[] = [() => ours(x, y, bits)];
      const hasDecimal = decimal !== null && decimal(decimalX) !== null;
      if (hasDecimal) tasks.push(() => decimal(decimalX));
      const [own = Number.NaN, peer = null] = timeInTurns(tasks, ROUNDS);
      const python = pythonRounds.flatMap((round) => round?.[d * CASES.length + c] ?? []);
      const reference = python[0]?.value;
      const error =
        reference === undefined ? null : log10Difference(value(x, y, bits) << BigInt(EXTRA), reference, bits + EXTRA);
      const row = { name, digits, microseconds: own, log10Error: error, peerLog10Error: null };
      if (hasDecimal) rows.push({ ...row, ...against('decimal.js', own, peer) });
      const mpmath = python.length === 0 ? null : median(python.map(({ microseconds }) => microseconds));
      rows.push({ ...row, ...against('mpmath', own, mpmath) });
    });
  });
  return rows;
}

function against(peer: string, own: number, time: number | null) {
  return {
    peer,
    peerMicroseconds: time,
    ratio: time === null ? null : time / own,
    peerTime: time === null ? ('none' as const) : ('live' as const),
  };
}
