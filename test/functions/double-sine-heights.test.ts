import { describe, expect, test } from 'vitest';
import { shiftRounded } from '../../engine/arithmetic/fixed';
import type { CoreValue } from '../../engine/functions/double-sine-core';
import { farLogarithm, nearLogarithm } from '../../engine/functions/double-sine-core';
import { contourHeights } from '../../engine/functions/double-sine-heights';
import { doubleSineTables } from '../../engine/functions/double-sine-tables';
import { period, periods } from './double-sine-periods';

/*
 * The bound of the discretisation error is put to the test where it is large: poles above a low contour are dropped on purpose, and the
 * distance from the full value must stay below the bound, without the bound being idle.
 */
const BITS = 100;

function distance(a: CoreValue, b: CoreValue, precision: number): number {
  const re = Number(shiftRounded(a.value.re - b.value.re, precision - BITS - 20)) * 2 ** -20;
  const im = Number(shiftRounded(a.value.im - b.value.im, precision - BITS - 20)) * 2 ** -20;
  return Math.hypot(re, im);
}

describe('dropping poles above a contour costs no more than the bound', () => {
  test.each(Object.keys(periods))('%s', (name) => {
    const tables = doubleSineTables(period(name), BITS);
    if (tables === null) throw new Error('no tables');
    const { frame } = tables;
    const quarter = frame.q / 4;
    const ratios: number[] = [];
    for (const [re, im] of [
      [0.1 * quarter, 0.3 * quarter],
      [0.9 * quarter, quarter],
      [0.5 * quarter, 0],
      [1.3 * quarter, 0.8 * quarter],
    ] as const) {
      const x = {
        re: BigInt(Math.round(re * 2 ** 40)) << BigInt(frame.precision - 40),
        im: BigInt(Math.round(im * 2 ** 40)) << BigInt(frame.precision - 40),
      };
      const approx = { re, im };
      const near = tables.near(quarter, 1);
      const far = tables.far();
      const inside = re <= quarter;
      const full = inside ? nearLogarithm(frame, near, x, approx) : farLogarithm(frame, far, x, approx);
      const last = inside ? near.contour : far.contour;
      for (let contour = 0; contour < last; contour++) {
        const cut = inside
          ? nearLogarithm(frame, { ...near, contour }, x, approx)
          : farLogarithm(frame, { ...far, contour }, x, approx);
        const error = distance(full, cut, frame.precision);
        const bound = cut.error + full.error;
        expect(error, `contour ${contour}, x = ${re} + ${im} i`).toBeLessThanOrEqual(bound);
        if (bound > 1000) ratios.push(bound / error);
      }
    }
    ratios.sort((a, b) => a - b);
    expect(ratios.length).toBeGreaterThan(10);
    // Typically within a factor of some tens: oscillating residues can cancel, so not each time.
    expect(ratios[Math.floor(ratios.length / 2)]).toBeLessThan(100);
  });
});

test('contours stay away from both lattices and count the poles below', () => {
  for (const [small, large] of [
    [1, 1],
    [0.99999, 1.00001],
    [0.3, 10 / 3],
    [0.05, 20],
  ] as const) {
    for (const { height, belowSmall, belowLarge } of contourHeights(80, small, large)) {
      const fraction = (y: number) => Math.abs(y - Math.round(y));
      expect(fraction(height / (Math.PI * small))).toBeGreaterThan(0.05);
      expect(belowSmall).toBe(Math.floor(height / (Math.PI * small)));
      expect(belowLarge).toBe(Math.floor(height / (Math.PI * large)));
    }
  }
});
