import { describe, expect, test } from 'vitest';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { Form } from '../../engine/exact/form';
import { complexDoubleSineKernel } from '../../engine/functions/double-sine-complex-double';
import { doubleSineKernel } from '../../engine/functions/double-sine-double';
import { logDoubleSineByProduct } from '../../engine/functions/double-sine-product';
import { sharedParameter } from '../../engine/functions/shared-parameter';
import type { Complex, ExactParameter } from '../../engine/functions/special-function';
import { functions } from '../../engine/functions/table';
import { exactParameter, fixedComplex, parameterOfDouble } from './fixed-text';
import { kernelValue } from './kernel-value';
import { mismatch } from './law-checks';
import { complexOfDoubles } from './random-points';

const PERIODS: readonly Complex[] = [
  { re: 0.9, im: 0.3 },
  { re: 1.2, im: -0.2 },
  { re: 1.1, im: 0.05 },
  { re: 0.6, im: 0.4 },
];

const POINTS: readonly (readonly [number, number])[] = [
  [0.3, 0.2],
  [-0.7, 0.4],
  [1.5, -0.1],
  [0.2, 1.3],
  [-0.4, -2.1],
  [9, 0.3],
  [-25, 0.1],
];

describe('log s_b in doubles for complex b', () => {
  // The q-products (Faddeev, Kashaev, Volkov 2001, hep-th/0006156) share nothing with the midpoint rule.
  test.each(PERIODS)('b = $re + $im i agrees with the q-products', (b) => {
    const kernel = complexDoubleSineKernel(b);
    const bits = 120;
    for (const [re, im] of POINTS) {
      const product = logDoubleSineByProduct(
        fixedComplex(re, im, bits),
        { value: (n) => fixedComplex(b.re, b.im, n), approx: b },
        bits,
      );
      if (product?.kind !== 'value') throw new Error('no value');
      const wanted = { re: numberFromFixed(product.re, bits), im: numberFromFixed(product.im, bits) };
      const scale = Math.max(1, Math.hypot(wanted.re, wanted.im), 10 * Math.hypot(re, im));
      expect(mismatch(kernelValue(kernel, re, im), wanted) / scale, `${re} + ${im} i`).toBeLessThan(2e-14);
    }
  });

  test('nearly real b joins the kernel for real b', () => {
    for (const [re, im] of POINTS.slice(0, 5)) {
      const near = kernelValue(complexDoubleSineKernel({ re: 1.3, im: 1e-15 }), re, im);
      expect(mismatch(near, kernelValue(doubleSineKernel(1.3), re, im))).toBeLessThan(2e-13);
    }
  });

  test('poles and zeros', () => {
    const b = { re: 0.9, im: 0.3 };
    const norm = b.re ** 2 + b.im ** 2;
    // i Q/2 + i b, Q = b + 1/b.
    const half = { re: (b.re + b.re / norm) / 2, im: (b.im - b.im / norm) / 2 };
    const pole = { re: -(half.im + b.im), im: half.re + b.re };
    const kernel = complexDoubleSineKernel(b);
    expect(kernelValue(kernel, pole.re, pole.im).re).toBe(Number.POSITIVE_INFINITY);
    expect(kernelValue(kernel, -pole.re, -pole.im).re).toBe(Number.NEGATIVE_INFINITY);
    expect(kernelValue(kernel, pole.re + 1e-8, pole.im).re).toBeLessThan(25);
  });
});

describe('precise tier', () => {
  test('a fresh parameter object finds the tables of an equal one', () => {
    const bits = 700;
    const x = fixedComplex(0.3, 0.2, bits);
    const parameter = (): ExactParameter => exactParameter(Form.call('sqrt', Form.number(3)));
    const first = functions.doubleSine.precise(x, [parameter()], bits);
    const one = sharedParameter(parameter(), bits);
    expect(sharedParameter(parameter(), bits)).toBe(one);
    expect(sharedParameter(parameterOfDouble(1.5), bits)).not.toBe(one);
    expect(functions.doubleSine.precise(x, [parameter()], bits)).toEqual(first);
  });

  test('far out at complex b there is a value or a refusal, never an exception', () => {
    const bits = 70;
    const kinds = [0.3, 1, 4].flatMap((re) =>
      [1, 30, 300, 3000].flatMap((size) =>
        [0, 1, 2, 3, 4, 5].map((turn) => {
          const x = fixedComplex(size * Math.cos(turn), size * Math.sin(turn), bits);
          return functions.doubleSine.precise(x, [complexOfDoubles(re, re / 3)], bits).kind;
        }),
      ),
    );
    expect(new Set(kinds)).toEqual(new Set(['value', 'unreachable']));
  });
});
