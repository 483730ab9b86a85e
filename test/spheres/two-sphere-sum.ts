import { Form } from '../../engine/exact/form';
import { s2 } from '../../engine/spheres/s2';
import type { Theory } from '../../engine/theory/theory';
import { complexProgram, grid, type Point, productOf, valuesAt } from './evaluate';

/** A complex number in doubles. */
export interface Complex {
  readonly re: number;
  readonly im: number;
}

export const times = (a: Complex, b: Complex): Complex => ({
  re: a.re * b.re - a.im * b.im,
  im: a.re * b.im + a.im * b.re,
});

export const plus = (a: Complex, b: Complex): Complex => ({ re: a.re + b.re, im: a.im + b.im });

/** A node of the contour of one flux: the place, and the integrand there times the measure d sigma/2 pi. */
export interface Node {
  readonly sigma: Complex;
  readonly flux: number;
  readonly value: Complex;
}

export interface Sum {
  readonly fluxes: number;
  readonly reach: number;
  readonly step: number;
  /** 1 for xi > 0; -1 closes the contour above, for xi < 0. */
  readonly side?: 1 | -1;
}

/**
 * The integrand of a U(1) theory along sigma = x - i (sqrt(1 + x^2) - 1) - (2/5) i |n| for xi > 0: the tilt makes it
 * fall off exponentially in x and n, the poles of chirals of positive charge stay below. For xi < 0 the mirror image.
 */
export function nodes(theory: Theory, point: Point, { fluxes, reach, step, side = 1 }: Sum): Node[] {
  const x = grid(reach, step);
  const product = productOf(s2, theory, 'integrand');
  const result: Node[] = [];
  for (let flux = -fluxes; flux <= fluxes; flux++) {
    const values = valuesAt(s2, theory, { ...point, flux: Form.number(flux) });
    const y = x.map((t) => -side * (Math.sqrt(1 + t * t) - 1 + 0.4 * Math.abs(flux)));
    const { re, im } = complexProgram(product, ['sigma'], values).at([x], [y]);
    x.forEach((t, k) => {
      const value = { re: re[k] as number, im: im[k] as number };
      const measure = { re: step / (2 * Math.PI), im: (-side * t * step) / Math.sqrt(1 + t * t) / (2 * Math.PI) };
      result.push({ sigma: { re: t, im: y[k] as number }, flux, value: times(value, measure) });
    });
  }
  return result;
}

/** Sum over fluxes of the integral of (sigma + i n/2)^j (sigma - i n/2)^k times the integrand. */
export function moment(list: readonly Node[], j = 0, k = 0): Complex {
  return list.reduce(
    (sum, { sigma, flux, value }) => {
      let term = value;
      for (let count = 0; count < j; count++) term = times(term, { re: sigma.re, im: sigma.im + flux / 2 });
      for (let count = 0; count < k; count++) term = times(term, { re: sigma.re, im: sigma.im - flux / 2 });
      return plus(sum, term);
    },
    { re: 0, im: 0 },
  );
}
