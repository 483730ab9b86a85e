import Decimal from 'decimal.js';
import { fixedFromRatio } from '../../engine/arithmetic/fixed';
import { expComplex, logComplex } from '../../engine/arithmetic/fixed-complex';
import { expFixed } from '../../engine/arithmetic/fixed-exp';
import { logFixed } from '../../engine/arithmetic/fixed-log';
import { sinCosFixed } from '../../engine/arithmetic/fixed-trig';
import { compare } from './functions.bench';
import { arbPeer, EXTRA, mpmathPeer, type Peer } from './peers';
import type { ComparisonRow } from './timing';
import { log10Difference, timeInTurns } from './timing';

const DIGITS = [15, 50, 200, 1000] as const;
const ROUNDS = 15;

/** Arguments, one after the other in every timing: neither short nor special, with all digits. */
const NUMERATORS = Array.from({ length: 16 }, (_, k) => 1234567n + 7919n * BigInt(k));
const DENOMINATOR = 987654n;
const IMAGINARY = 7654321n;

/** A function here, in decimal.js (null where it has none or refuses), in mpmath and in Arb. */
interface Case {
  readonly name: string;
  readonly ours: (x: bigint, y: bigint, bits: number) => unknown;
  /** The part that is checked. */
  readonly value: (x: bigint, y: bigint, bits: number) => bigint;
  readonly decimal: ((x: Decimal) => readonly Decimal[] | null) | null;
  readonly python: string;
  readonly arb: string | null;
}

const CASES: readonly Case[] = [
  { name: 'multiply', ours: multiply, value: multiply, decimal: (x) => [x.times(x)], python: 'x * x', arb: null },
  {
    name: 'exp',
    ours: (x, _, bits) => expFixed(x, bits),
    value: (x, _, bits) => expFixed(x, bits),
    decimal: (x) => [x.exp()],
    python: 'mp.exp(x)',
    arb: 'exp',
  },
  {
    name: 'log',
    ours: (x, _, bits) => logFixed(x, bits),
    value: (x, _, bits) => logFixed(x, bits),
    decimal: (x) => [x.ln()],
    python: 'mp.log(x)',
    arb: 'log',
  },
  {
    name: 'sin and cos',
    ours: (x, _, bits) => sinCosFixed(x, bits),
    value: (x, _, bits) => sinCosFixed(x, bits).sin,
    // decimal.js stores pi to 1025 digits and refuses trigonometric functions that need more.
    decimal: (x) => (x.sd() > 900 ? null : [x.sin(), x.cos()]),
    python: 'mp.cos_sin(x)[1]',
    arb: null,
  },
  {
    name: 'complex exp',
    ours: (re, im, bits) => expComplex({ re, im }, bits),
    value: (re, im, bits) => expComplex({ re, im }, bits).re,
    decimal: null,
    python: 'mp.re(mp.exp(z))',
    arb: null,
  },
  {
    name: 'complex log',
    ours: (re, im, bits) => logComplex({ re, im }, bits),
    value: (re, im, bits) => logComplex({ re, im }, bits).re,
    decimal: null,
    python: 'mp.re(mp.log(z))',
    arb: null,
  },
];

function multiply(x: bigint, _: bigint, bits: number): bigint {
  return (x * x) >> BigInt(bits);
}

function bitsFor(digits: number): number {
  return Math.ceil(digits * Math.log2(10)) + 4;
}

/** The next of a list at every call. */
function inTurn<Item>(items: readonly Item[]): () => Item {
  let at = 0;
  return () => items[at++ % items.length] as Item;
}

/**
 * Elementary functions on BigInt fixed point: against decimal.js at equal digits (alternating batches), and against mpmath
 * and Arb where they are there. Errors of decimal.js are taken from our own values at 60 more bits, which the tests hold
 * against mpmath; all others from the peer with more digits.
 */
export function run(): ComparisonRow[] {
  return DIGITS.flatMap((digits) => CASES.flatMap((one) => rowsOf(one, digits)));
}

function rowsOf({ name, ours, value, decimal, python, arb }: Case, digits: number): ComparisonRow[] {
  const bits = bitsFor(digits);
  const y = fixedFromRatio(IMAGINARY, DENOMINATOR, bits);
  const xs = NUMERATORS.map((numerator) => fixedFromRatio(numerator, DENOMINATOR, bits));
  const first = xs[0] as bigint;
  const next = inTurn(xs);
  const task = (): unknown => ours(next(), y, bits);
  const rows: ComparisonRow[] = [];
  const Exact = Decimal.clone({ precision: digits });
  const decimals = NUMERATORS.map((numerator) => new Exact(numerator.toString()).div(DENOMINATOR.toString()));
  const nextDecimal = inTurn(decimals);
  const sample = decimals[0] as Decimal;
  if (decimal !== null && decimal(sample) !== null) {
    const [own = Number.NaN, peer = Number.NaN] = timeInTurns([task, () => decimal(nextDecimal())], ROUNDS);
    // The argument that decimal.js was given, which is exact in more digits than it has.
    const fine = bits + 60;
    const Wide = Decimal.clone({ precision: 2 * digits + 60 });
    const scaled = (x: Decimal): bigint => BigInt(new Wide(x).times(new Wide(2).pow(fine)).toFixed(0));
    const reference = value(scaled(sample), 0n, fine);
    const found = scaled(decimal(sample)?.[0] as Decimal);
    const oursAtIt = value(first, 0n, bits) << 60n;
    rows.push({
      name,
      digits,
      microseconds: own,
      peer: 'decimal.js',
      peerMicroseconds: peer,
      ratio: peer / own,
      log10Error: log10Difference(oursAtIt, value(first << 60n, 0n, fine), fine),
      peerLog10Error: log10Difference(found, reference, fine),
    });
  }
  const prelude = `import mpmath as mp
mp.mp.prec = ${2 * bits}
x = mp.ldexp(mp.mpf(${first}), -${bits})
z = mp.mpc(x, mp.ldexp(mp.mpf(${y}), -${bits}))`;
  const peers: Peer[] = [mpmathPeer('mpmath', prelude, python)];
  if (arb !== null) peers.push(arbPeer('Arb', arb, () => ({ re: first, im: 0n })));
  const checked = { re: value(first, y, bits) << BigInt(EXTRA), im: 0n };
  return [...rows, ...compare(name, digits, bits, task, checked, peers)];
}
