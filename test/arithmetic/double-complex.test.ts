import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { DoubleComplex } from '../../engine/arithmetic/double-complex';
import * as doubles from '../../engine/arithmetic/double-complex';
import { bitLength, fixedFromNumber, integerSqrt, numberFromFixed } from '../../engine/arithmetic/fixed';
import type { FixedComplex } from '../../engine/arithmetic/fixed-complex';
import * as fixed from '../../engine/arithmetic/fixed-complex';

// Reference: the fixed point functions, which are checked against mpmath in fixed-elementary.test.ts, at 400 bits.
const BITS = 400;
const ONE = fixed.oneComplex(BITS);

const part = fc.oneof(
  fc.double({ min: -8, max: 8, noNaN: true }),
  fc.double({ min: -1e-3, max: 1e-3, noNaN: true }).map((x) => (Math.abs(x) < 1e-40 ? 0 : x)),
  fc.constant(0),
);
const point = fc.record({ re: part, im: part }).map(({ re, im }) => {
  const clean = (x: number) => (Math.abs(x) < 1e-40 ? 0 : x);
  return { re: clean(re), im: clean(im) };
});

const up = (z: DoubleComplex): FixedComplex => ({ re: fixedFromNumber(z.re, BITS), im: fixedFromNumber(z.im, BITS) });
const down = (z: FixedComplex): DoubleComplex => ({ re: numberFromFixed(z.re, BITS), im: numberFromFixed(z.im, BITS) });

const unary: Record<string, [(z: DoubleComplex) => DoubleComplex, (z: FixedComplex) => FixedComplex]> = {
  exp: [doubles.exp, (z) => fixed.expComplex(z, BITS)],
  expm1: [doubles.expm1, (z) => fixed.subtractComplex(fixed.expComplex(z, BITS), ONE)],
  log: [doubles.log, (z) => fixed.logComplex(z, BITS)],
  log1p: [doubles.log1p, (z) => fixed.logComplex(fixed.addComplex(z, ONE), BITS)],
  sqrt: [doubles.sqrt, (z) => fixed.sqrtComplex(z, BITS)],
  sin: [doubles.sin, (z) => fixed.sinCosComplex(z, BITS).sin],
  cos: [doubles.cos, (z) => fixed.sinCosComplex(z, BITS).cos],
  sinh: [doubles.sinh, (z) => fixed.sinhCoshComplex(z, BITS).sinh],
  cosh: [doubles.cosh, (z) => fixed.sinhCoshComplex(z, BITS).cosh],
};

function close(value: DoubleComplex, reference: DoubleComplex, ulps: number): void {
  const error = Math.hypot(value.re - reference.re, value.im - reference.im);
  expect(error).toBeLessThanOrEqual(ulps * 2 ** -52 * Math.hypot(reference.re, reference.im));
}

describe('complex functions in doubles are right to a few ulps of the modulus', () => {
  test.each(Object.entries(unary))('%s', (name, [inDoubles, inFixed]) => {
    fc.assert(
      fc.property(point, (z) => {
        const isLog = name.startsWith('log');
        const inside = name === 'log1p' ? { re: z.re + 1, im: z.im } : z;
        fc.pre(!isLog || (Math.hypot(inside.re, inside.im) > 1e-3 && inside.im !== 0));
        close(inDoubles(z), down(inFixed(up(z))), 8);
      }),
    );
  });

  test('divide and multiply', () => {
    fc.assert(
      fc.property(point, point, (a, b) => {
        close(doubles.multiply(a, b), down(fixed.multiplyComplex(up(a), up(b), BITS)), 4);
        fc.pre(b.re !== 0 || b.im !== 0);
        close(doubles.divide(a, b), down(fixed.divideComplex(up(a), up(b), BITS)), 8);
      }),
    );
  });
});

describe('integers behind the fixed point numbers', () => {
  const integer = fc.tuple(fc.bigInt(0n, 1n << 64n), fc.integer({ min: 0, max: 2500 })).map(([a, s]) => a << BigInt(s));

  test('bitLength and integerSqrt by their definitions', () => {
    fc.assert(
      fc.property(integer, fc.integer({ min: -1, max: 1 }), (a, step) => {
        const n = a + BigInt(step) > 0n ? a + BigInt(step) : 1n;
        const length = bitLength(n);
        expect(n >> BigInt(length - 1)).toBe(1n);
        const root = integerSqrt(n);
        expect(root * root <= n && n < (root + 1n) * (root + 1n)).toBe(true);
      }),
    );
    expect(bitLength(0n)).toBe(0);
    expect(bitLength(2n ** 200n - 1n)).toBe(200);
  });

  test('doubles go to fixed point and back unchanged', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (x) => {
        expect(numberFromFixed(fixedFromNumber(x, 1074), 1074)).toBe(x === 0 ? 0 : x);
      }),
    );
    expect(fixedFromNumber(0.75, 1)).toBe(2n);
    expect(fixedFromNumber(-0.3, 10)).toBe(-307n);
  });
});
