import {
  addDecayingSeries,
  addPairs,
  addSinhSeries,
  decayingSeries,
  farPairs,
  nearPairs,
  sinhSeries,
} from './double-sine-poles-double';
import { type DoubleSineTables, doubleSineTables } from './double-sine-tables-double';
import type { DoubleKernel } from './special-function';

/**
 * log s_b(x) in doubles on arrays, s_b(x) = prod_{m,n>=0} (m b + n/b + Q/2 - i x)/(m b + n/b + Q/2 + i x), Q = b + 1/b,
 * for real b > 0 and complex x.
 *
 * Branch: the logarithm that vanishes at 0 and is analytic off the two half lines x = i y, |y| >= Q/2; on them the
 * limit from Re x > 0, whose imaginary part is an exact multiple of pi.
 * Poles i (Q/2 + m b + n/b) give +Infinity, zeros -i (Q/2 + m b + n/b) give -Infinity, when x is one within a few units
 * in the last place.
 *
 * Method: |Re x| > Q/4 by the residue series; else shifts by the periods to |Im x| <= Q/4 and the midpoint rule with
 * the residues of the nearest poles (`DoubleSineTables`). Everything is reduced to Re x >= 0, Im x >= 0 by
 * log s_b(-x) = -log s_b(x) and log s_b(-conj x) = conj log s_b(x).
 * Error: below 4e-15 of max(1, |log s_b|, |x d log s_b/dx|), the last being what one rounding of x does near poles and
 * zeros; measured against mpmath (test/fixtures/functions/double-sine.py) for b from 0.02 to 50.
 */
export function doubleSineKernel(b: number): DoubleKernel {
  const tables = doubleSineTables(b);
  const value = new Float64Array(2);
  return {
    addLog: (xRe, xIm, power, outRe, outIm) => {
      for (let k = 0; k < xRe.length; k++) {
        logDoubleSineDouble(tables, xRe[k] as number, xIm === null ? 0 : (xIm[k] as number), value);
        outRe[k] = (outRe[k] as number) + power * (value[0] as number);
        outIm[k] = (outIm[k] as number) + power * (value[1] as number);
      }
    },
  };
}

/** log s_b(re + i im), written to out[0] + i out[1]; see `doubleSineKernel`. */
export function logDoubleSineDouble(tables: DoubleSineTables, re: number, im: number, out: Float64Array): void {
  if (im === 0) {
    const phase = realPhase(tables, Math.abs(re));
    out[0] = 0;
    out[1] = re < 0 ? -phase : phase;
    return;
  }
  firstQuadrant(tables, Math.abs(re), Math.abs(im), out);
  if (im < 0) out[0] = -(out[0] as number);
  if (re < 0) out[1] = -(out[1] as number);
}

/** Im log s_b(x) for real x >= 0; the real part is zero. */
function realPhase(tables: DoubleSineTables, x: number): number {
  const { small, large, reach, step, near, far } = tables;
  if (x > reach) {
    const series =
      decayingSeries(2 * Math.PI * small * x, far.small) + decayingSeries(2 * Math.PI * large * x, far.large);
    return (Math.PI / 2) * (x * x + tables.constant) + series + farPairs(x, small, large, far);
  }
  const weights = tables.weights;
  const twoCos = 2 * Math.cos(2 * x * step);
  let first = 0;
  let second = 0;
  // For real x the weights alone must be negligible, not w_k e^{Q t_k/2}: half the nodes do.
  for (let k = (weights.length + 3) >> 1; k >= 0; k--) {
    const next = (weights[k] as number) + twoCos * first - second;
    second = first;
    first = next;
  }
  return (
    tables.linear * x -
    Math.sin(x * step) * (first + second) -
    sinhSeries(2 * Math.PI * small * x, near.small) -
    sinhSeries(2 * Math.PI * large * x, near.large) -
    nearPairs(x, small, large, near)
  );
}

/** log s_b(a + i c) for a >= 0, c > 0, written to `out`. */
function firstQuadrant(tables: DoubleSineTables, a: number, c: number, out: Float64Array): void {
  if (a > tables.reach) complexFar(tables, a, c, out);
  else if (c <= tables.q / 4) complexNear(tables, a, c, out);
  else complexShifted(tables, a, c, out);
  // On the imaginary axis s_b is real.
  if (a === 0) out[1] = Math.PI * Math.round((out[1] as number) / Math.PI);
}

/** |Re x| <= Q/4, Im x > Q/4: by the larger period to the nearest point, which may change the half plane, then by the smaller. */
function complexShifted(tables: DoubleSineTables, a: number, c: number, out: Float64Array): void {
  const { small, large, q } = tables;
  const longSteps = Math.round(c / large);
  const lowered = longSteps === 0 ? c : c - longSteps * large;
  const rest = Math.abs(lowered);
  const shortSteps = rest > q / 4 ? Math.ceil((rest - q / 4) / small) : 0;
  complexNear(tables, a, rest - shortSteps * small, out);
  if (shortSteps > 0) divideByCosh(small, shortSteps, a, rest, out);
  if (lowered < 0) out[0] = -(out[0] as number);
  if (longSteps > 0) divideByCosh(large, longSteps, a, c, out);
}

/** |Re x| <= Q/4 and |Im x| <= Q/4. */
function complexNear(tables: DoubleSineTables, a: number, c: number, out: Float64Array): void {
  const { small, large, q, step, near, weights } = tables;
  const growth = Math.expm1(c * step);
  const inverse = 1 / (growth + 1);
  const sinh = 0.5 * (growth + growth * inverse);
  const cosh = 1 + 0.5 * growth * growth * inverse;
  const sin = Math.sin(a * step);
  const cos = Math.cos(a * step);
  const sineRe = sin * cosh;
  const sineIm = cos * sinh;
  // 2 cos 2z = 2 - 4 sin^2 z.
  const twoRe = 2 - 4 * (sineRe * sineRe - sineIm * sineIm);
  const twoIm = -8 * sineRe * sineIm;
  const decay = (q - 2 * Math.abs(c)) * step;
  let firstRe = 0;
  let firstIm = 0;
  let secondRe = 0;
  let secondIm = 0;
  for (let k = Math.min(weights.length, Math.ceil(40 / decay)) - 1; k >= 0; k--) {
    const nextRe = (weights[k] as number) + twoRe * firstRe - twoIm * firstIm - secondRe;
    const nextIm = twoRe * firstIm + twoIm * firstRe - secondIm;
    secondRe = firstRe;
    secondIm = firstIm;
    firstRe = nextRe;
    firstIm = nextIm;
  }
  firstRe += secondRe;
  firstIm += secondIm;
  out[0] = sineRe * firstRe - sineIm * firstIm - tables.linear * a;
  out[1] = sineRe * firstIm + sineIm * firstRe - tables.linear * c;
  addSinhSeries(2 * Math.PI * small * a, 2 * Math.PI * small * c, near.small, out);
  addSinhSeries(2 * Math.PI * large * a, 2 * Math.PI * large * c, near.large, out);
  addPairs(a, c, small, large, near, 1, out);
  timesI(-1, out);
}

/** Re x > Q/4, any Im x. */
function complexFar(tables: DoubleSineTables, a: number, c: number, out: Float64Array): void {
  const { small, large, far } = tables;
  out[0] = (Math.PI / 2) * ((a - c) * (a + c) + tables.constant);
  out[1] = Math.PI * a * c;
  addDecayingSeries(2 * Math.PI * small * a, 2 * Math.PI * small * c, far.small, out);
  addDecayingSeries(2 * Math.PI * large * a, 2 * Math.PI * large * c, far.large, out);
  addPairs(a, c, small, large, far, -1, out);
  timesI(1, out);
}

function timesI(sign: 1 | -1, out: Float64Array): void {
  const re = out[0] as number;
  out[0] = -sign * (out[1] as number);
  out[1] = sign * re;
}

/** Factors of a shift multiplied before one logarithm is taken; the phase is computed afresh for each block. */
const SHIFT_BLOCK = 16;

/** Distance from a pole that counts as none, relative to |x|: the roundings of b, Q/2 and x. */
const POLE_WIDTH = 8 * 2 ** -53;

/** out -= sum_{j<count} log 2cosh(pi p (x - i p (j + 1/2))) at x = a + i c; out[0] = +Infinity where a factor vanishes. */
function divideByCosh(p: number, count: number, a: number, c: number, out: Float64Array): void {
  // 2cosh w = e^w (1 + z), z = e^{-2w} = decay e^{-2 pi i turns}, turns = p (c - p (j + 1/2)).
  const decay = Math.exp(-2 * Math.PI * p * a);
  const decayLess = Math.expm1(-2 * Math.PI * p * a);
  const stepTurns = fraction(p * p);
  const stepCos = Math.cos(2 * Math.PI * stepTurns);
  const stepSin = Math.sin(2 * Math.PI * stepTurns);
  const width = 2 * Math.PI * p * POLE_WIDTH * (a + c);
  let re = -count * Math.PI * p * a;
  let im = -count * Math.PI * p * (c - 0.5 * p * count);
  for (let start = 0; start < count; start += SHIFT_BLOCK) {
    const end = Math.min(count, start + SHIFT_BLOCK);
    const turns = fraction(p * (c - p * (start + 0.5)));
    let cos = Math.cos(2 * Math.PI * turns);
    let sin = -Math.sin(2 * Math.PI * turns);
    let productRe = 1;
    let productIm = 0;
    let winding = 0;
    for (let j = start; j < end; j++) {
      let factorRe = 1 + decay * cos;
      let factorIm = decay * sin;
      if (factorRe < 0.2 && Math.abs(factorIm) < 0.2) {
        // Near a zero of cosh the angle is measured from it, or the subtraction would lose its digits.
        const offset = fraction(p * (c - p * (j + 0.5)) - 0.5);
        const half = Math.sin(Math.PI * offset);
        factorRe = 2 * half * half * decay - decayLess;
        factorIm = decay * Math.sin(2 * Math.PI * offset);
        if (Math.abs(factorRe) + Math.abs(factorIm) <= width) {
          out[0] = Number.POSITIVE_INFINITY;
          return;
        }
      }
      const turnedRe = productRe * factorRe - productIm * factorIm;
      const turnedIm = productRe * factorIm + productIm * factorRe;
      // Each factor has its argument in [-pi/2, pi/2]: count the crossings of the negative real axis.
      if (factorIm > 0 && productIm >= 0 && turnedIm < 0) winding++;
      else if (factorIm < 0 && productIm < 0 && turnedIm >= 0) winding--;
      productRe = turnedRe;
      productIm = turnedIm;
      const nextCos = cos * stepCos - sin * stepSin;
      sin = sin * stepCos + cos * stepSin;
      cos = nextCos;
    }
    re -= 0.5 * Math.log(productRe * productRe + productIm * productIm);
    im -= Math.atan2(productIm, productRe) + 2 * Math.PI * winding;
  }
  out[0] = (out[0] as number) + re;
  out[1] = (out[1] as number) + im;
}

/** x minus the nearest integer. */
function fraction(x: number): number {
  return x - Math.round(x);
}
