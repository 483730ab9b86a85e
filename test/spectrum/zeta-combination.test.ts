// Each term by itself (DLMF 25.11.28, tested with mpmath in test/functions) against all of them in one pass.
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { type FixedComplex, logComplex, multiplyComplex } from '../../engine/arithmetic/fixed-complex';
import { farPoint } from '../../engine/functions/euler-maclaurin';
import { scaledHurwitz } from '../../engine/functions/hurwitz-derivative';
import { zetaCombination } from '../../engine/spectrum/zeta-combination';

const BITS = 160;

test('sums of zeta functions in one pass are the sums of the single ones, within the error stated', () => {
  fc.assert(
    fc.property(
      fc.integer({ min: 32, max: 70 }),
      fc.integer({ min: -2, max: 2 }),
      fc.array(fc.tuple(fc.integer({ min: -99, max: 99 }), fc.integer({ min: -9, max: 9 })), {
        minLength: 1,
        maxLength: 80,
      }),
      (at, first, sizes) => {
        const w = { re: BigInt(at) << BigInt(BITS), im: 0n };
        const point = farPoint(w, BITS);
        const logarithm = logComplex(w, BITS);
        // They fall by a quarter each, as the coefficients of an eigenvalue do.
        const coefficients = sizes.map(([re, im], k): FixedComplex => {
          const down = BigInt(2 * k);
          return { re: (BigInt(re) << BigInt(BITS)) >> down, im: (BigInt(im) << BigInt(BITS)) >> down };
        });
        const found = zetaCombination(point, coefficients, first, logarithm);
        let re = 0n;
        let im = 0n;
        let slip = 0;
        for (const [k, a] of coefficients.entries()) {
          const single = scaledHurwitz(point, first + k, logarithm, 8);
          const product = multiplyComplex(a, single.value, BITS);
          re += product.re;
          im += product.im;
          slip += 2 + 128 * Number(single.error);
        }
        const gap = Math.hypot(Number(found.value.re - re), Number(found.value.im - im));
        expect(gap).toBeLessThanOrEqual(found.error + slip);
        // And the error stated is of some use.
        expect(found.error).toBeLessThan(2 ** 40);
      },
    ),
  );
});
