import { type DoubleComplex, multiply } from '../arithmetic/double-complex';
import { numberFromFixed } from '../arithmetic/fixed';
import { isLatticePoint } from './lattice-double';
import { logGammaDouble } from './log-gamma-double';
import { zetaInteger } from './riemann-zeta-precise';
import type { DoubleKernel } from './special-function';
import { UPSILON_DEPTH, type UpsilonTables, upsilonTables } from './upsilon-tables-double';

/**
 * log Upsilon_b(x) in doubles on arrays for real b > 0 and complex x, Upsilon_b(Q/2) = 1:
 *   log Upsilon_b(Q/2 + z) = int_0^oo dt/t [z^2 e^{-2t} - sinh^2(zt)/(sinh bt sinh t/b)], |Re z| < Q/2.
 *
 * Branch: real on 0 < x < Q and analytic off the real axis outside. Zeros -(m b + n/b) and Q + m b + n/b give -Infinity
 * when x is one within 8 units of 2^-53.
 * Method: |Im z| below `reach` by shifts to |Re z| <= Q/4 and the midpoint rule on the half line with its end point
 * correction (Euler-Maclaurin, DLMF 2.10), a polynomial in z^2:
 *   log Upsilon = -sum_k w_k (cosh((2k+1) z h) - 1) + z^2 log(2/h) + sum_i e_i z^{2i};
 * beyond it by the asymptotic series of the double Gamma function,
 *   log Upsilon = z^2 log(-iz) - (3/2) z^2 - ((b^2+b^-2)/12) log(-iz) + K - sum_{m>=2} d_m (2m-3)!/(2 (2z)^{2m-2}), Im z > 0,
 * sum d_m t^{2m} = t^2/(sinh bt sinh t/b), with K from the first formula. No pole is used: all b are alike.
 * Error: below 1.2e-14 of max(1, |log Upsilon|, |x d log Upsilon/dx|) for b between 1/4 and 4, 3e-14 between 1/20 and 20; measured against mpmath
 * (test/fixtures/functions/upsilon.py).
 */
export function upsilonKernel(b: number): DoubleKernel {
  const tables = upsilonTables(b);
  const value = new Float64Array(2);
  const gamma = new Float64Array(2);
  const constant = farConstant(tables);
  return {
    addLog: (xRe, xIm, power, outRe, outIm) => {
      for (let k = 0; k < xRe.length; k++) {
        const re = xRe[k] as number;
        const im = xIm === null ? 0 : (xIm[k] as number);
        // Upsilon(Q - x) = Upsilon(x): to Re x <= Q/2; then conjugation to Im x >= 0.
        const mirrored = re > tables.q / 2;
        const a = mirrored ? tables.q - re : re;
        const c = Math.abs(im);
        if (c >= tables.reach) far(tables, a - tables.q / 2, c, constant, value);
        else near(tables, a, c, ZERO_WIDTH * (Math.abs(re) + c), gamma, value);
        outRe[k] = (outRe[k] as number) + power * (value[0] as number);
        outIm[k] = (outIm[k] as number) + (mirrored === im > 0 ? -power : power) * (value[1] as number);
      }
    },
  };
}

/** K of the asymptotic series above: minus the logarithm of the zeta-regularised product at Q/2. */
export function upsilonConstant(b: number): number {
  return farConstant(upsilonTables(b));
}

/** Where both formulas serve they agree. */
function farConstant(tables: UpsilonTables): number {
  const value = new Float64Array(2);
  onStrip(tables, 0, tables.reach, value);
  const joined = value[0] as number;
  far(tables, 0, tables.reach, 0, value);
  return joined - (value[0] as number);
}

const ZERO_WIDTH = 8 * 2 ** -53;

/** log Upsilon(a + i c) for a <= Q/2, 0 <= c < reach. */
function near(
  tables: UpsilonTables,
  a: number,
  c: number,
  width: number,
  gamma: Float64Array,
  out: Float64Array,
): void {
  const { small, large, q } = tables;
  if (c <= width && a <= width && isLatticePoint(a, [large, small], width)) {
    out[0] = Number.NEGATIVE_INFINITY;
    out[1] = 0;
    return;
  }
  let re = 0;
  let im = 0;
  let restRe = 0;
  let restIm = 0;
  let at = a;
  let height = c;
  let conjugated = false;
  let start = a;
  let started = 0;
  let count = 0;
  // By the larger period out of Re x <= 0, by the smaller one to Re x >= Q/4.
  // Gamma(u)/Gamma(1 - u) p = [Gamma(1 + u)/Gamma(1 - u)]/x with u = px: where u is small the x are multiplied out, since up to
  // a hundred logarithms would each round at their own size.
  let factor: DoubleComplex = { re: 1, im: 0 };
  while (at < q / 4) {
    const period = at <= 0 ? large : small;
    const log = Math.log(period);
    const u = period * at;
    const v = period * height;
    let shiftRe = -2 * u * log;
    let shiftIm = -2 * v * log;
    if (at > 0 && u * u + v * v < SERIES_REACH ** 2) {
      const quotient = logGammaQuotient({ re: u, im: v });
      shiftRe += quotient.re;
      shiftIm += quotient.im;
      factor = multiply(factor, { re: at, im: height });
      shiftIm -= Math.atan2(height, at);
    } else {
      logGammaDouble(u, v, gamma);
      shiftRe += log + (gamma[0] as number);
      shiftIm += gamma[1] as number;
      logGammaDouble(1 - u, -v, gamma);
      shiftRe -= gamma[0] as number;
      shiftIm -= gamma[1] as number;
    }
    if (conjugated) shiftIm = -shiftIm;
    // The parts rounded off (Neumaier's summation): the shifts may cancel to a hundredth of their sum.
    const nextRe = re - shiftRe;
    restRe += Math.abs(re) >= Math.abs(shiftRe) ? re - nextRe - shiftRe : -shiftRe - nextRe + re;
    re = nextRe;
    const nextIm = im - shiftIm;
    restIm += Math.abs(im) >= Math.abs(shiftIm) ? im - nextIm - shiftIm : -shiftIm - nextIm + im;
    im = nextIm;
    // From one start, so that additions of the smaller period do not add up their rounding.
    count = period === started ? count + 1 : 1;
    if (count === 1) start = at;
    started = period;
    const next = start + count * period;
    if (next > q / 2) {
      // The mirror image Q - x has the opposite imaginary part; the conjugate is taken back to the upper half plane. Q is
      // the sum of the periods: what is small stays exact.
      at = count === 1 ? (period === large ? small : large) - start : q - next;
      conjugated = !conjugated;
      height = c;
      started = 0;
    } else at = next;
  }
  re += Math.log(Math.hypot(factor.re, factor.im));
  const offset = at - q / 2;
  onStrip(tables, Math.abs(offset) < 4 * 2 ** -53 * q ? 0 : offset, height, out);
  out[0] = (out[0] as number) + re + restRe;
  out[1] = (conjugated ? -(out[1] as number) : (out[1] as number)) + im + restIm;
}

/** Euler's constant (DLMF 5.2.3). */
const EULER = 0.5772156649015329;
/** |u| up to which the series of `logGammaQuotient` serves. */
const SERIES_REACH = 0.5;
/** -2 gamma, -2 zeta(3)/3, -2 zeta(5)/5, ...: 0.5^{2k} falls below 1e-17 at k = 28. */
const QUOTIENT: readonly number[] = Array.from({ length: 28 }, (_, k) =>
  k === 0 ? -2 * EULER : (-2 * numberFromFixed(zetaInteger(2 * k + 1, 64), 64)) / (2 * k + 1),
);

/** log Gamma(1 + u) - log Gamma(1 - u) = -2 gamma u - 2 sum zeta(2k + 1) u^{2k+1}/(2k + 1) (DLMF 5.7.3). */
function logGammaQuotient(u: DoubleComplex): DoubleComplex {
  const square = multiply(u, u);
  let sum: DoubleComplex = { re: 0, im: 0 };
  for (let k = QUOTIENT.length - 1; k >= 0; k--) {
    const product = multiply(sum, square);
    sum = { re: product.re + (QUOTIENT[k] as number), im: product.im };
  }
  return multiply(u, sum);
}

/** Nodes summed apart, so that hundreds of small terms do not each round at the size of the whole sum. */
const BLOCK = 12;

/** log Upsilon(Q/2 + a + i c), |a| <= Q/4, by the midpoint rule. */
function onStrip(tables: UpsilonTables, a: number, c: number, out: Float64Array): void {
  const { q, step, weights, polynomial } = tables;
  const count = Math.min(weights.length, Math.ceil(UPSILON_DEPTH / (step * (q - 2 * Math.abs(a)))));
  if (a === 0 || c === 0) {
    // z^2 is real, and so is everything else.
    const square = a === 0 ? -c * c : a * a;
    const half = a === 0 ? Math.sin((c * step) / 2) : Math.sinh((a * step) / 2);
    const whole = a === 0 ? Math.sin(c * step) : Math.sinh(a * step);
    const sign = a === 0 ? -1 : 1;
    const kappa = sign * 4 * whole * whole;
    let value = sign * 2 * half * half;
    let difference = 0;
    let sum = 0;
    for (let start = 0; start < count; start += BLOCK) {
      let part = 0;
      for (let k = start; k < Math.min(count, start + BLOCK); k++) {
        part += (weights[k] as number) * value;
        difference += kappa * (value + 1);
        value += difference;
      }
      sum += part;
    }
    let tail = 0;
    for (let i = polynomial.length - 1; i >= 0; i--) tail = (tail + (polynomial[i] as number)) * square;
    out[0] = tail - sum;
    out[1] = 0;
    return;
  }
  // 2 sinh^2(zh/2) = cosh(zh) - 1 and 4 sinh^2(zh) = 2 cosh(2zh) - 2.
  const halfSinh = Math.sinh((a * step) / 2);
  const halfSin = Math.sin((c * step) / 2);
  let valueRe = 2 * (halfSinh * halfSinh - halfSin * halfSin - 2 * halfSinh * halfSinh * halfSin * halfSin);
  let valueIm = Math.sinh(a * step) * Math.sin(c * step);
  const sinh = Math.sinh(a * step);
  const sin = Math.sin(c * step);
  const kappaRe = 4 * (sinh * sinh - sin * sin - 2 * sinh * sinh * sin * sin);
  const kappaIm = 2 * Math.sinh(2 * a * step) * Math.sin(2 * c * step);
  let differenceRe = 0;
  let differenceIm = 0;
  let sumRe = 0;
  let sumIm = 0;
  for (let start = 0; start < count; start += BLOCK) {
    let partRe = 0;
    let partIm = 0;
    for (let k = start; k < Math.min(count, start + BLOCK); k++) {
      const weight = weights[k] as number;
      partRe += weight * valueRe;
      partIm += weight * valueIm;
      differenceRe += kappaRe * (valueRe + 1) - kappaIm * valueIm;
      differenceIm += kappaRe * valueIm + kappaIm * (valueRe + 1);
      valueRe += differenceRe;
      valueIm += differenceIm;
    }
    sumRe += partRe;
    sumIm += partIm;
  }
  const squareRe = (a - c) * (a + c);
  const squareIm = 2 * a * c;
  let tailRe = 0;
  let tailIm = 0;
  for (let i = polynomial.length - 1; i >= 0; i--) {
    const shifted = tailRe + (polynomial[i] as number);
    tailRe = shifted * squareRe - tailIm * squareIm;
    tailIm = shifted * squareIm + tailIm * squareRe;
  }
  out[0] = tailRe - sumRe;
  out[1] = tailIm - sumIm;
}

/** log Upsilon(Q/2 + a + i c) for c >= reach. */
function far(tables: UpsilonTables, a: number, c: number, constant: number, out: Float64Array): void {
  const { asymptotic, logarithmic } = tables;
  const norm = a * a + c * c;
  const squareRe = (a - c) * (a + c);
  const squareIm = 2 * a * c;
  const inverseRe = squareRe / (norm * norm);
  const inverseIm = -squareIm / (norm * norm);
  let tailRe = 0;
  let tailIm = 0;
  for (let m = asymptotic.length - 1; m >= 0; m--) {
    const shifted = tailRe + (asymptotic[m] as number);
    tailRe = shifted * inverseRe - tailIm * inverseIm;
    tailIm = shifted * inverseIm + tailIm * inverseRe;
  }
  // log(-iz).
  const logRe = 0.5 * Math.log(norm);
  const logIm = -Math.atan2(a, c);
  out[0] = squareRe * (logRe - 1.5) - squareIm * logIm - logarithmic * logRe + constant + tailRe;
  out[1] = squareRe * logIm + squareIm * (logRe - 1.5) - logarithmic * logIm + tailIm;
}
