// Source: mpmath, test/fixtures/spectra/generate.py; laws: DLMF 25.11.3 and 25.11.14 differentiated.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  type FixedComplex,
  integerPowerComplex,
  logComplex,
  multiplyComplex,
  subtractComplex,
  zeroComplex,
} from '../../engine/arithmetic/fixed-complex';
import { hurwitzZetaDerivative } from '../../engine/functions/hurwitz-derivative';
import { powerWeightedLogarithms } from '../../engine/functions/weighted-logarithms';
import fixture from '../fixtures/spectra/mpmath.json';
import { arbitraryFixed } from './arbitrary-fixed';
import { decimalFixed } from './decimal-fixed';

const BITS = 120;

describe("zeta'(-k, a)", () => {
  test.each(fixture.hurwitz.map((row) => [row.k, row.re, row.im, row] as const))(
    'k = %s, a = (%s + %s i)/128',
    (k, re, im, row) => {
      const a = { re: BigInt(re) << BigInt(BITS - 7), im: BigInt(im) << BigInt(BITS - 7) };
      const { value, error } = hurwitzZetaDerivative(k, a, BITS);
      const size = Math.max(Math.abs(Number(row.value.re)), Math.abs(Number(row.value.im)), 1);
      // 40 printed digits, and the stated error.
      const allowed = numberFromFixed(error, BITS) + size * 1e-38;
      expect(Math.abs(numberFromFixed(value.re - decimalFixed(row.value.re, BITS), BITS))).toBeLessThanOrEqual(allowed);
      expect(Math.abs(numberFromFixed(value.im - decimalFixed(row.value.im, BITS), BITS))).toBeLessThanOrEqual(allowed);
    },
  );

  test('differs from one step on by a^k log a, at any precision', () => {
    const part = fc.integer({ min: -3000, max: 3000 });
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 9 }), part, part, fc.integer({ min: 40, max: 400 }), (k, x, y, bits) => {
        fc.pre(y !== 0 || x > 0);
        const a = { re: (BigInt(x) << BigInt(bits)) >> 6n, im: (BigInt(y) << BigInt(bits)) >> 6n };
        const here = hurwitzZetaDerivative(k, a, bits);
        const next = hurwitzZetaDerivative(k, { re: a.re + (1n << BigInt(bits)), im: a.im }, bits);
        // The difference at a finer precision, so that its own rounding does not count.
        const fine = bits + 80;
        const exact = { re: a.re << 80n, im: a.im << 80n };
        const term = multiplyComplex(integerPowerComplex(exact, k, fine), logComplex(exact, fine), fine);
        const gap = (p: bigint, q: bigint, r: bigint) => Number(p - q + (r >> 80n));
        const allowed = Number(here.error + next.error) + 2;
        expect(Math.abs(gap(here.value.re, next.value.re, term.re))).toBeLessThanOrEqual(allowed);
        expect(Math.abs(gap(here.value.im, next.value.im, term.im))).toBeLessThanOrEqual(allowed);
      }),
      { numRuns: 25 },
    );
  });

  test('errs by no more than stated: the same point with twice the bits', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 7 }),
        arbitraryFixed(-12, 30),
        arbitraryFixed(-20, 20),
        fc.integer({ min: 60, max: 220 }),
        (k, re, im, bits) => {
          const a = { re: re(bits), im: im(bits) };
          if (a.re <= 0n && a.im === 0n && BigInt.asUintN(bits, a.re) === 0n) return;
          const lift = (z: FixedComplex): FixedComplex => ({ re: z.re << BigInt(bits), im: z.im << BigInt(bits) });
          const coarse = hurwitzZetaDerivative(k, a, bits);
          const fine = hurwitzZetaDerivative(k, lift(a), 2 * bits);
          const gap = absoluteComplex(subtractComplex(lift(coarse.value), fine.value));
          expect(gap).toBeLessThanOrEqual((coarse.error << BigInt(bits)) + fine.error);
        },
      ),
      { numRuns: 60 },
    );
  });

  test('logarithms weighted by powers: products and single terms agree', () => {
    const bits = 150;
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 4 }),
        fc.integer({ min: 0, max: 30 }),
        arbitraryFixed(-12, 30),
        arbitraryFixed(-20, 20),
        (k, steps, re, im) => {
          const a = { re: re(bits), im: im(bits) };
          const points = Array.from({ length: steps }, (_, n) => ({
            re: a.re + (BigInt(n) << BigInt(bits)),
            im: a.im,
          }));
          if (points.some((z) => z.re === 0n && z.im === 0n)) return;
          const { value, error } = powerWeightedLogarithms(a, steps, k, bits);
          const fine = bits + 100;
          let sum = zeroComplex;
          for (const point of points) {
            const z = { re: point.re << 100n, im: point.im << 100n };
            const term = multiplyComplex(integerPowerComplex(z, k, fine), logComplex(z, fine), fine);
            sum = addComplex(sum, term);
          }
          const gap = absoluteComplex(subtractComplex({ re: value.re << 100n, im: value.im << 100n }, sum));
          expect(gap >> 100n).toBeLessThanOrEqual(error);
        },
      ),
    );
  });
});
