import fc from 'fast-check';
import { expect, test } from 'vitest';
import { Gaussian } from '../../engine/exact/gaussian';
import { Rational } from '../../engine/exact/rational';
import { anyGaussian } from './forms';

/** The matrix [[re, -im], [im, re]]: matrices multiply and add as Gaussian numbers do, by another formula. */
function matrix({ re, im }: Gaussian): Rational[][] {
  return [
    [re, im.neg()],
    [im, re],
  ];
}

function product(a: Rational[][], b: Rational[][]): string[][] {
  return a.map((row) =>
    [0, 1].map((j) =>
      row.reduce((sum, entry, k) => sum.add(entry.mul(b[k]?.[j] as Rational)), Rational.zero).toString(),
    ),
  );
}

const printed = (a: Rational[][]) => a.map((row) => row.map((entry) => entry.toString()));

test('products are products of matrices', () => {
  fc.assert(
    fc.property(anyGaussian, anyGaussian, (a, b) => {
      expect(printed(matrix(a.mul(b)))).toEqual(product(matrix(a), matrix(b)));
    }),
  );
});

test('field laws', () => {
  fc.assert(
    fc.property(anyGaussian, anyGaussian, anyGaussian, (a, b, c) => {
      expect(a.mul(b).equals(b.mul(a))).toBe(true);
      expect(a.mul(b.add(c)).equals(a.mul(b).add(a.mul(c)))).toBe(true);
      expect(a.mul(b.mul(c)).equals(a.mul(b).mul(c))).toBe(true);
      expect(a.add(a.neg()).isZero()).toBe(true);
      if (!a.isZero()) expect(a.mul(a.inverse()).equals(Gaussian.one)).toBe(true);
    }),
  );
  expect(Gaussian.i.mul(Gaussian.i).equals(Gaussian.of(-1))).toBe(true);
  expect(() => Gaussian.zero.inverse()).toThrow(RangeError);
});

test('conjugation is an automorphism of order two', () => {
  fc.assert(
    fc.property(anyGaussian, anyGaussian, (a, b) => {
      expect(a.conjugate().conjugate().equals(a)).toBe(true);
      expect(a.mul(b).conjugate().equals(a.conjugate().mul(b.conjugate()))).toBe(true);
      expect(a.add(b).conjugate().equals(a.conjugate().add(b.conjugate()))).toBe(true);
      expect(a.mul(a.conjugate()).isReal()).toBe(true);
    }),
  );
});

test('powers are repeated products', () => {
  fc.assert(
    fc.property(anyGaussian, fc.integer({ min: 0, max: 12 }), (a, n) => {
      const expected = Array.from({ length: n }, () => a).reduce((x, y) => x.mul(y), Gaussian.one);
      expect(a.pow(n).equals(expected)).toBe(true);
      if (!a.isZero()) expect(a.pow(-n).mul(expected).equals(Gaussian.one)).toBe(true);
    }),
  );
});

test('unequal numbers have unequal names', () => {
  fc.assert(
    fc.property(anyGaussian, anyGaussian, (a, b) => {
      expect(a.toString() === b.toString()).toBe(a.equals(b));
    }),
  );
});
