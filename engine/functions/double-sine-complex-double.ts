import {
  absolute,
  add,
  type DoubleComplex,
  divide,
  exp,
  log1p,
  multiply,
  scale,
  sinh,
  subtract,
} from '../arithmetic/double-complex';
import type { Complex, DoubleKernel } from './special-function';

/** log(1/eps) with a margin of 3. */
const DEPTH = 40;

/** Tables for one complex b. */
interface Tables {
  /** Periods: |small| <= 1 <= |large|. */
  readonly small: DoubleComplex;
  readonly large: DoubleComplex;
  /** Re Q, Q = b + 1/b. */
  readonly width: number;
  readonly step: number;
  readonly weights: readonly DoubleComplex[];
  /** (b^2 + b^-2)/12. */
  readonly constant: DoubleComplex;
}

/**
 * log s_b(x) in doubles for complex b with Re b > 0 and complex x, continued analytically in b from b > 0 (see
 * `doubleSineKernel`). Im b^2 may have any size, zero too; the quick kernel for real b is another.
 *
 * Method: shifts by the periods to |Im x| <= Re Q/4, then the midpoint rule without residues,
 *   log s_b(x) = -i { sum_k w_k sin((2k+1) x h) - pi^2 x/(2h) },  w_k = h/(2 t_k sinh(b t_k) sinh(t_k/b)),
 * up to |Re x| where the limit (i pi/2)(x^2 + (b^2 + b^-2)/12) is exact to rounding. The logarithm is one of the right
 * number: its imaginary part may be off by multiples of 2 pi after shifts.
 * Error: below 6e-14 of max(1, |log s_b|, |x d log s_b/dx|); some hundred nodes a value, a few microseconds.
 */
export function complexDoubleSineKernel(b: Complex): DoubleKernel {
  const inverse = divide({ re: 1, im: 0 }, b);
  const [small, large] = absolute(b) <= 1 ? [b, inverse] : [inverse, b];
  const width = small.re + large.re;
  const nearest = Math.min(small.re, large.re);
  // Beyond this |Re x| both e^{-2 pi b x} and e^{-2 pi x/b} are negligible in the strip.
  const slope = Math.max(Math.abs(small.im), Math.abs(large.im)) * (width / 4);
  const reach = (DEPTH / (2 * Math.PI) + slope) / nearest;
  const step = (2 * Math.PI) / (DEPTH / (Math.PI * nearest) + 2 * reach);
  const count = Math.ceil(DEPTH / ((width / 2) * step)) + 2;
  const weights = Array.from({ length: count }, (_, k) => {
    const t = (k + 0.5) * step;
    const below = multiply(sinh(scale(small, t)), sinh(scale(large, t)));
    return divide({ re: step / (2 * t), im: 0 }, below);
  });
  const constant = scale(add(multiply(small, small), multiply(large, large)), 1 / 12);
  const tables: Tables = { small, large, width, step, weights, constant };
  return {
    addLog: (xRe, xIm, power, outRe, outIm) => {
      for (let k = 0; k < xRe.length; k++) {
        const x = { re: xRe[k] as number, im: xIm === null ? 0 : (xIm[k] as number) };
        // s_b(x) s_b(-x) = 1: to Im x >= 0.
        const turned = x.im < 0;
        const value = upperHalf(tables, turned ? { re: -x.re, im: -x.im } : x, reach);
        outRe[k] = (outRe[k] as number) + (turned ? -power : power) * value.re;
        outIm[k] = (outIm[k] as number) + (turned ? -power : power) * value.im;
      }
    },
  };
}

/** Distance from a pole that counts as none, relative to |x|. */
const POLE_WIDTH = 16 * 2 ** -53;

/** Longest chain of shifts; an argument so far up has no value here. */
const MAXIMAL_SHIFTS = 10_000;

function upperHalf(tables: Tables, x: DoubleComplex, reach: number): DoubleComplex {
  let at = x;
  let sum: DoubleComplex = { re: 0, im: 0 };
  for (let count = 0; at.im > tables.width / 4; count++) {
    if (count > MAXIMAL_SHIFTS) return { re: Number.NaN, im: Number.NaN };
    // s_b(x) = s_b(x - i p)/(2 cosh pi p (x - i p/2)); the larger period as long as it does not overshoot.
    const p = at.im > tables.large.re ? tables.large : tables.small;
    const middle = { re: at.re + p.im / 2, im: at.im - p.re / 2 };
    const w = scale(multiply(p, middle), Math.PI);
    const right = w.re >= 0 ? w : { re: -w.re, im: -w.im };
    const cosh = log1p(exp(scale(right, -2)));
    if (Math.exp(cosh.re) <= 2 * Math.PI * absolute(p) * POLE_WIDTH * absolute(x)) {
      return { re: Number.POSITIVE_INFINITY, im: 0 };
    }
    sum = subtract(sum, add(right, cosh));
    at = { re: at.re + p.im, im: at.im - p.re };
  }
  return add(sum, inStrip(tables, at, reach));
}

/** |Im x| <= Re Q/4. */
function inStrip(tables: Tables, x: DoubleComplex, reach: number): DoubleComplex {
  const square = add(multiply(x, x), tables.constant);
  if (Math.abs(x.re) >= reach) {
    const size = (x.re > 0 ? Math.PI : -Math.PI) / 2;
    return { re: -size * square.im, im: size * square.re };
  }
  // Clenshaw for the odd sines: sin(z) (B_0 + B_1), 2 cos 2z = 2 - 4 sin^2 z, z = x h.
  const z = scale(x, tables.step);
  const sine = { re: Math.sin(z.re) * Math.cosh(z.im), im: Math.cos(z.re) * Math.sinh(z.im) };
  const factor = subtract({ re: 2, im: 0 }, scale(multiply(sine, sine), 4));
  let first: DoubleComplex = { re: 0, im: 0 };
  let second: DoubleComplex = { re: 0, im: 0 };
  const { weights } = tables;
  for (let k = weights.length - 1; k >= 0; k--) {
    const next = subtract(add(weights[k] as DoubleComplex, multiply(factor, first)), second);
    second = first;
    first = next;
  }
  const sum = subtract(multiply(sine, add(first, second)), scale(x, Math.PI ** 2 / (2 * tables.step)));
  return { re: sum.im, im: -sum.re };
}
