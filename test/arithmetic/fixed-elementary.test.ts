import { describe, expect, test } from 'vitest';
import { shiftRounded } from '../../engine/arithmetic/fixed';
import { atan2Fixed, atanFixed } from '../../engine/arithmetic/fixed-atan';
import type { FixedComplex } from '../../engine/arithmetic/fixed-complex';
import {
  divideComplex,
  expComplex,
  logComplex,
  multiplyComplex,
  powComplex,
  sinCosComplex,
  sinhCoshComplex,
  sqrtComplex,
} from '../../engine/arithmetic/fixed-complex';
import { ln2Fixed, piFixed } from '../../engine/arithmetic/fixed-constants';
import { expFixed, sinhCoshFixed, tanhFixed } from '../../engine/arithmetic/fixed-exp';
import { logFixed } from '../../engine/arithmetic/fixed-log';
import { cotFixed, sinCosFixed, tanFixed } from '../../engine/arithmetic/fixed-trig';
import fixture from '../fixtures/arithmetic/elementary.json' with { type: 'json' };

// Reference: mpmath with 40 more bits, see the generator beside the data.
const EXTRA = fixture.extra;

function integer(text: string): bigint {
  return text.startsWith('-') ? -BigInt(`0x${text.slice(1)}`) : BigInt(`0x${text}`);
}

/** |value - reference| in ulps of the value. */
function errorInUlps(value: bigint, reference: bigint): number {
  return Math.abs(Number((value << BigInt(EXTRA)) - reference)) / 2 ** EXTRA;
}

type Evaluate = (a: bigint[], bits: number) => bigint[];
/** Claimed bound in ulps from the reference values (as doubles) and the arguments (as doubles). */
type Bound = (values: number[], x: number[]) => number;

const pair = (a: bigint[], at = 0): FixedComplex => ({ re: a[at] ?? 0n, im: a[at + 1] ?? 0n });
const parts = (z: FixedComplex): bigint[] => [z.re, z.im];
const size = (v: number[]) => Math.max(1, Math.hypot(...v));

const functions: Record<string, { evaluate: Evaluate; bound: Bound }> = {
  exp: { evaluate: ([x = 0n], p) => [expFixed(x, p)], bound: (v) => size(v) },
  sinCos: {
    evaluate: ([x = 0n], p) => {
      const { sin, cos } = sinCosFixed(x, p);
      return [sin, cos];
    },
    bound: () => 1,
  },
  tan: { evaluate: ([x = 0n], p) => [tanFixed(x, p)], bound: ([v = 0]) => Math.max(1, v * v) },
  cot: { evaluate: ([x = 0n], p) => [cotFixed(x, p)], bound: ([v = 0]) => Math.max(1, v * v) },
  sinhCosh: {
    evaluate: ([x = 0n], p) => {
      const { sinh, cosh } = sinhCoshFixed(x, p);
      return [sinh, cosh];
    },
    bound: ([, cosh = 1]) => cosh,
  },
  tanh: { evaluate: ([x = 0n], p) => [tanhFixed(x, p)], bound: () => 1 },
  log: { evaluate: ([x = 0n], p) => [logFixed(x, p)], bound: () => 1 },
  atan2: { evaluate: ([y = 0n, x = 0n], p) => [atan2Fixed(y, x, p)], bound: () => 1 },
  atan: { evaluate: ([x = 0n], p) => [atanFixed(x, p)], bound: () => 1 },
  logComplex: { evaluate: (a, p) => parts(logComplex(pair(a), p)), bound: () => 1 },
  sqrtComplex: { evaluate: (a, p) => parts(sqrtComplex(pair(a), p)), bound: () => 2 },
  divideComplex: { evaluate: (a, p) => parts(divideComplex(pair(a), pair(a, 2), p)), bound: () => 1 },
  multiplyComplex: { evaluate: (a, p) => parts(multiplyComplex(pair(a), pair(a, 2), p)), bound: () => 1 },
  powComplex: {
    evaluate: (a, p) => parts(powComplex(pair(a), pair(a, 2), p)),
    bound: (v, [, , u = 0, w = 0]) => (6 + 2 * Math.hypot(u, w)) * size(v),
  },
  expComplex: { evaluate: (a, p) => parts(expComplex(pair(a), p)), bound: (v) => 4 * size(v) },
  sinComplex: {
    evaluate: (a, p) => parts(sinCosComplex(pair(a), p).sin),
    bound: (_, [, y = 0]) => 4 * Math.cosh(y),
  },
  cosComplex: {
    evaluate: (a, p) => parts(sinCosComplex(pair(a), p).cos),
    bound: (_, [, y = 0]) => 4 * Math.cosh(y),
  },
  sinhComplex: {
    evaluate: (a, p) => parts(sinhCoshComplex(pair(a), p).sinh),
    bound: (_, [x = 0]) => 4 * Math.cosh(x),
  },
  coshComplex: {
    evaluate: (a, p) => parts(sinhCoshComplex(pair(a), p).cosh),
    bound: (_, [x = 0]) => 4 * Math.cosh(x),
  },
};

function double(value: bigint, bits: number): number {
  return Number(shiftRounded(value, bits - 60)) * 2 ** -60;
}

describe('elementary functions keep their stated error against mpmath', () => {
  test.each(Object.entries(functions))('%s', (name, { evaluate, bound }) => {
    const rows = fixture.rows.filter((row) => row.function === name);
    expect(rows.length).toBeGreaterThan(60);
    for (const row of rows) {
      const argumentsFixed = row.arguments.map(integer);
      const references = row.values.map(integer);
      const values = evaluate(argumentsFixed, row.bits);
      const allowed = bound(
        references.map((r) => double(r, row.bits + EXTRA)),
        argumentsFixed.map((x) => double(x, row.bits)),
      );
      references.forEach((reference, i) => {
        const error = errorInUlps(values[i] as bigint, reference);
        expect(error, `${name} bits ${row.bits} arguments ${row.arguments.join(' ')}`).toBeLessThanOrEqual(allowed);
      });
    }
  });
});

test.each(fixture.constants)('pi and ln 2 to $bits bits', ({ bits, pi, ln2 }) => {
  expect(errorInUlps(piFixed(bits), integer(pi))).toBeLessThanOrEqual(1);
  expect(errorInUlps(ln2Fixed(bits), integer(ln2))).toBeLessThanOrEqual(1);
});

test('branch conventions on the axes', () => {
  const one = 1n << 100n;
  expect(atan2Fixed(0n, -one, 100)).toBe(piFixed(100));
  expect(atan2Fixed(0n, one, 100)).toBe(0n);
  expect(logComplex({ re: -one, im: 0n }, 100)).toEqual({ re: 0n, im: piFixed(100) });
  expect(sqrtComplex({ re: -4n * one, im: 0n }, 100)).toEqual({ re: 0n, im: 2n * one });
  expect(() => atan2Fixed(0n, 0n, 100)).toThrow(RangeError);
  expect(() => logFixed(0n, 100)).toThrow(RangeError);
  expect(() => cotFixed(0n, 100)).toThrow(RangeError);
});
