import { logDoubleSineDouble } from './double-sine-double';
import { isLatticePoint } from './lattice-double';
import type { DoubleKernel } from './special-function';
import { TRIPLE_SINE_DEPTH, type TripleSineTables, tripleSineTables } from './triple-sine-tables-double';

/**
 * log S_3(x | w1, w2, w3) in doubles on arrays for real positive periods and complex x,
 * S_3 = prod_{n>=0} (n.w + x)(n.w + |w| - x), zeta-regularised.
 *
 * Branch: real on 0 < x < |w| and analytic off the real axis outside. Zeros -n.w and |w| + n.w give -Infinity when x is
 * one within 8 units of 2^-53.
 * Method, z = x - |w|/2: the midpoint rule for
 *   log S_3 = -(1/4) { h sum_k g(t_k) - (1/2)[c4 pi^4/(3 h^3) + c2 pi^2/h] }, g(t) = cosh(2zt)/(t prod sinh(w_i t)),
 * with the double and quadruple poles of g at 0 taken out of every term, so that the large constants never appear:
 *   log S_3 = -(1/4) { sum_k W_k (cosh(2zt_k) - 1 - 2 z^2 t_k^2) + constant + quadratic z^2 }.
 * Shifts S_3(x + w_i) = S_3(x)/S_2(x | w_j, w_k) bring Re x into the middle half; beyond `reach` the limit
 * -(i pi/6) (z^3 - (w1^2+w2^2+w3^2) z/4)/(w1 w2 w3), Im z > 0, is exact to rounding. No pole is used: rational ratios
 * of the periods are nothing special.
 * Error: below 4e-15 of max(1, |log S_3|, |x d log S_3/dx|); measured against mpmath
 * (test/fixtures/functions/triple-sine.py).
 */
export function tripleSineKernel(w1: number, w2: number, w3: number): DoubleKernel {
  const tables = tripleSineTables(w1, w2, w3);
  const value = new Float64Array(2);
  const double = new Float64Array(2);
  return {
    addLog: (xRe, xIm, power, outRe, outIm) => {
      for (let k = 0; k < xRe.length; k++) {
        const re = xRe[k] as number;
        const im = xIm === null ? 0 : (xIm[k] as number);
        // S_3(|w| - x) = S_3(x): to Re x <= |w|/2; then conjugation to Im x >= 0.
        const mirrored = re > tables.total / 2;
        const a = mirrored ? tables.total - re : re;
        const c = Math.abs(im);
        if (c >= tables.reach) far(tables, a - tables.total / 2, c, value);
        else near(tables, a, c, ZERO_WIDTH * (Math.abs(re) + c), double, value);
        outRe[k] = (outRe[k] as number) + power * (value[0] as number);
        outIm[k] = (outIm[k] as number) + (mirrored === im > 0 ? -power : power) * (value[1] as number);
      }
    },
  };
}

const ZERO_WIDTH = 8 * 2 ** -53;

/** log S_3(a + i c) for a <= |w|/2, 0 <= c < reach. */
function near(
  tables: TripleSineTables,
  a: number,
  c: number,
  width: number,
  double: Float64Array,
  out: Float64Array,
): void {
  const { periods, total } = tables;
  if (c <= width && a <= width && isLatticePoint(a, periods, width)) {
    out[0] = Number.NEGATIVE_INFINITY;
    out[1] = 0;
    return;
  }
  let re = 0;
  let im = 0;
  let at = a;
  let conjugated = false;
  // By the largest period out of Re x <= 0, by the smallest to Re x >= |w|/4: the poles of S_2 are then out of the way.
  while (at < total / 4) {
    const index = at <= 0 ? 0 : 2;
    twoPeriodSine(tables.doubles[index] as TwoPeriods, at, c, double);
    re += double[0] as number;
    im += conjugated ? -(double[1] as number) : (double[1] as number);
    at += periods[index];
    if (at > total / 2) {
      at = total - at;
      conjugated = !conjugated;
    }
  }
  const offset = at - total / 2;
  onStrip(tables, Math.abs(offset) < 4 * 2 ** -53 * total ? 0 : offset, c, out);
  out[0] = (out[0] as number) + re;
  out[1] = (conjugated ? -(out[1] as number) : (out[1] as number)) + im;
}

type TwoPeriods = TripleSineTables['doubles'][number];

/** log S_2(a + i c | u, v) = log s_b(i ((a + i c)/sqrt(uv) - Q/2)), written to `out`. */
function twoPeriodSine({ larger, smaller, scale, tables }: TwoPeriods, a: number, c: number, out: Float64Array): void {
  if (a * a + c * c > 0.25 * smaller * smaller) {
    logDoubleSineDouble(tables, -c / scale, a / scale - tables.q / 2, out);
    return;
  }
  // Next to the zero at 0 the difference would lose digits: S_2(x) = 2 sin(pi x/v) S_2(x + u).
  logDoubleSineDouble(tables, -c / scale, (a + larger) / scale - tables.q / 2, out);
  const [x, y] = [(Math.PI * a) / smaller, (Math.PI * c) / smaller];
  const re = 2 * Math.sin(x) * Math.cosh(y);
  const im = 2 * Math.cos(x) * Math.sinh(y);
  out[0] = (out[0] as number) + Math.log(Math.hypot(re, im));
  out[1] = (out[1] as number) + Math.atan2(im, re);
}

/** log S_3(|w|/2 + a + i c), |a| <= |w|/4, by the midpoint rule. */
function onStrip(tables: TripleSineTables, a: number, c: number, out: Float64Array): void {
  const { total, step, weights } = tables;
  const count = Math.min(weights.length, Math.ceil(TRIPLE_SINE_DEPTH / (step * (total - 2 * Math.abs(a)))));
  const squareRe = (a - c) * (a + c);
  const squareIm = 2 * a * c;
  if (squareIm === 0) {
    out[0] = -0.25 * (realSum(weights, count, squareRe * step * step) + tables.constant + tables.quadratic * squareRe);
    out[1] = 0;
    return;
  }
  complexSum(weights, count, squareRe * step * step, squareIm * step * step, out);
  out[0] = -0.25 * ((out[0] as number) + tables.constant + tables.quadratic * squareRe);
  out[1] = -0.25 * ((out[1] as number) + tables.quadratic * squareIm);
}

/**
 * sum_k W_k C_k, C_k = cosh((2k+1) y) - 1 - (2k+1)^2 u/2, u = y^2 real, by the second difference
 * C_{k+1} - 2 C_k + C_{k-1} = kappa (C_k + (2k+1)^2 u/2) + e, kappa = 4 sinh^2 y, e = kappa - 4u.
 */
function realSum(weights: Float64Array, count: number, u: number): number {
  let value = 0;
  let excess = 0;
  for (let j = COSH.length - 1; j >= 0; j--) {
    value = value * u + (COSH[j] as number);
    excess = excess * u + (SINH_SQUARE[j] as number);
  }
  value *= u * u;
  excess *= u * u;
  const kappa = 4 * u + excess;
  let difference = 0;
  let sum = 0;
  for (let k = 0; k < count; k++) {
    const odd = 2 * k + 1;
    sum += (weights[k] as number) * value;
    difference += kappa * (value + 0.5 * odd * odd * u) + excess;
    value += difference;
  }
  return sum;
}

/** The same for complex u = uRe + i uIm. */
function complexSum(weights: Float64Array, count: number, uRe: number, uIm: number, out: Float64Array): void {
  const squareRe = uRe * uRe - uIm * uIm;
  const squareIm = 2 * uRe * uIm;
  let seriesRe = 0;
  let seriesIm = 0;
  let sinhRe = 0;
  let sinhIm = 0;
  for (let j = COSH.length - 1; j >= 0; j--) {
    const nextRe = seriesRe * uRe - seriesIm * uIm + (COSH[j] as number);
    seriesIm = seriesRe * uIm + seriesIm * uRe;
    seriesRe = nextRe;
    const nextSinh = sinhRe * uRe - sinhIm * uIm + (SINH_SQUARE[j] as number);
    sinhIm = sinhRe * uIm + sinhIm * uRe;
    sinhRe = nextSinh;
  }
  let valueRe = seriesRe * squareRe - seriesIm * squareIm;
  let valueIm = seriesRe * squareIm + seriesIm * squareRe;
  const excessRe = sinhRe * squareRe - sinhIm * squareIm;
  const excessIm = sinhRe * squareIm + sinhIm * squareRe;
  const kappaRe = 4 * uRe + excessRe;
  const kappaIm = 4 * uIm + excessIm;
  let differenceRe = 0;
  let differenceIm = 0;
  let sumRe = 0;
  let sumIm = 0;
  for (let k = 0; k < count; k++) {
    const weight = weights[k] as number;
    const half = 0.5 * (2 * k + 1) * (2 * k + 1);
    sumRe += weight * valueRe;
    sumIm += weight * valueIm;
    const coshRe = valueRe + half * uRe;
    const coshIm = valueIm + half * uIm;
    differenceRe += kappaRe * coshRe - kappaIm * coshIm + excessRe;
    differenceIm += kappaRe * coshIm + kappaIm * coshRe + excessIm;
    valueRe += differenceRe;
    valueIm += differenceIm;
  }
  out[0] = sumRe;
  out[1] = sumIm;
}

/** The limit Im z -> +infinity at z = a + i c. */
function far(tables: TripleSineTables, a: number, c: number, out: Float64Array): void {
  const { cubic, linear } = tables;
  const re = a * (a * a - 3 * c * c - linear);
  const im = c * (3 * a * a - c * c - linear);
  out[0] = (Math.PI / 6) * cubic * im;
  out[1] = (-Math.PI / 6) * cubic * re;
}

/** 1/(2j)! and 2^{2j+1}/(2j)! for j = 2, 3, ...: cosh y - 1 - y^2/2 and 4 sinh^2 y - 4 y^2 in powers of y^2, |y| < 1.6. */
const COSH: readonly number[] = Array.from({ length: 14 }, (_, k) => 1 / factorial(2 * k + 4));
const SINH_SQUARE: readonly number[] = COSH.map((value, k) => value * 2 ** (2 * k + 5));

function factorial(n: number): number {
  return n <= 1 ? 1 : n * factorial(n - 1);
}
