// Source: mpmath, test/fixtures/spectra/generate.py; laws: DLMF 25.11.3 and 25.11.14 differentiated.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { integerPowerComplex, logComplex, multiplyComplex } from '../../engine/arithmetic/fixed-complex';
import { hurwitzZetaDerivative } from '../../engine/functions/hurwitz-derivative';
import fixture from '../fixtures/spectra/mpmath.json';
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
});
