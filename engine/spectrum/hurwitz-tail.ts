import { fixedFromRatio, numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  type FixedComplex,
  logComplex,
  multiplyComplex,
  oneComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { Rational } from '../exact/rational';
import { bernoulliNumber } from '../functions/bernoulli';
import { type FarPoint, farPoint, listBits, scaledBernoulli } from '../functions/euler-maclaurin';
import { factorial } from '../functions/factorial';

/** A value and its error in units of the working precision. */
export interface Partial {
  readonly value: FixedComplex;
  readonly error: number;
}

/**
 * sum_k c_k zeta'(-k, W) at a far point W, all k in one pass (Euler-Maclaurin, DLMF 25.11.28 differentiated, 2.10(i)):
 * W^-k zeta'(-k, W) = W/(k+1) (log W - 1/(k+1)) - log W/2 + sum_j B_2j/(2j)! T_j W^(1-2j), for 2j-1 <= k with
 * T_j = (-k)_(2j-1) (sum_{i < 2j-1} 1/(i-k) - log W), beyond T_j = (-1)^k k! (2j-2-k)!. The logarithm, the powers of W
 * and the terms (2j-2)! B_2j/(2j)! W^(1-2j) are shared by all k.
 * Error: the last term over cos(arg W/2)^(2j-k), and three units a term and product, times |c_k W^k|.
 */
export function hurwitzTail(coefficients: readonly FixedComplex[], at: FixedComplex, bits: number): Partial {
  const point = farPoint(at, bits);
  const logarithm = logComplex(at, bits);
  let power = oneComplex(bits);
  const scaled = coefficients.map((c, k) => {
    if (k > 0) power = multiplyComplex(power, at, bits);
    return multiplyComplex(c, power, bits);
  });
  const weights = scaled.map((c) => numberFromFixed(absoluteComplex(c) + 1n, bits));
  const { sums, error: slip } = sharedSeries(point, weights);
  const size = 2 ** point.log2Size;
  let value = zeroComplex;
  // One unit for the weighted remainders.
  let error = 1;
  scaled.forEach((c, k) => {
    const lead = addComplex(leadingPart(point, k, logarithm), sums[k] as FixedComplex);
    value = addComplex(value, multiplyComplex(c, lead, bits));
    const height = numberFromFixed(absoluteComplex(lead), bits) + 1;
    const weight = weights[k] as number;
    error += (size ** k + 4 * (k + 1) * weight) * height + weight * (slip + 4 * (k + 4) * (height + 1)) + 2;
  });
  return { value, error };
}

/** The part of W^-k zeta'(-k, W) that holds log W. */
function leadingPart({ bits, at }: FarPoint, k: number, logarithm: FixedComplex): FixedComplex {
  const lead = divide(subtractComplex(logarithm, divide(oneComplex(bits), k + 1)), k + 1);
  let value = subtractComplex(multiplyComplex(at, lead, bits), divide(logarithm, 2));
  if (k === 0) return value;
  const inverse = divideComplex(oneComplex(bits), at, bits);
  const square = multiplyComplex(inverse, inverse, bits);
  let power = inverse;
  let rising = Rational.one;
  let harmonic = Rational.zero;
  for (let j = 1, next = 0; 2 * j - 1 <= k; j++) {
    for (; next < 2 * j - 1; next++) {
      rising = rising.mul(Rational.of(next - k));
      harmonic = harmonic.add(Rational.of(1, next - k));
    }
    const { numerator, denominator } = bernoulliNumber(2 * j)
      .mul(rising)
      .div(factorial(2 * j));
    const constant = { re: fixedFromRatio(harmonic.numerator, harmonic.denominator, bits), im: 0n };
    const term = multiplyComplex(power, subtractComplex(constant, logarithm), bits);
    value = addComplex(value, { re: (term.re * numerator) / denominator, im: (term.im * numerator) / denominator });
    power = multiplyComplex(power, square, bits);
  }
  return value;
}

/**
 * (-1)^k k! sum_{2j-1 > k} B_2j/(2j)! (2j-2-k)! W^(1-2j) for every k with a weight. The term of k is that of 0 times
 * k!/((2j-2) ... (2j-1-k)) <= 1. Stops when the remainders, weighted, are below one unit. The error is that of each sum.
 */
function sharedSeries(point: FarPoint, weights: readonly number[]): { sums: FixedComplex[]; error: number } {
  const { bits, step, log2Secant } = point;
  const shift = BigInt(point.stepBits);
  const wide = listBits(bits);
  const list = scaledBernoulli(wide);
  const listShift = BigInt(wide);
  // zeta(2j) - 1 < 2^(1 - 2j) is below the last place beyond the list.
  const beyond = 2n << listShift;
  let re = (point.at.re * step.re - point.at.im * step.im) >> shift;
  let im = (point.at.re * step.im + point.at.im * step.re) >> shift;
  const sums = weights.map(() => zeroComplex);
  const log2Weights = weights.map((w) => Math.log2(w + 1) + Math.log2(weights.length));
  const slope = -2 * (point.log2Size + Math.log2(2 * Math.PI));
  // 2 zeta(2j) < 2^2.
  let log2Term = slope + point.log2Size + 2;
  let smallest = Number.POSITIVE_INFINITY;
  for (let j = 1; ; j++) {
    const factor = list[j - 1] ?? (j % 2 === 0 ? -beyond : beyond);
    let part = { re: (re * factor) >> listShift, im: im === 0n ? 0n : (im * factor) >> listShift };
    let remainder = Number.NEGATIVE_INFINITY;
    let weighted = Number.NEGATIVE_INFINITY;
    let log2Part = log2Term;
    for (let k = 0; k < weights.length; k++) {
      if (k > 0) {
        if (2 * j - 1 <= k) {
          // A later term still starts the series of this k.
          weighted = Number.POSITIVE_INFINITY;
          break;
        }
        part = ratio(part, k, 2 * j - 1 - k);
        log2Part += Math.log2(k / (2 * j - 1 - k));
      }
      const sum = sums[k] as FixedComplex;
      sums[k] = k % 2 === 0 ? addComplex(sum, part) : subtractComplex(sum, part);
      const rest = log2Part + (2 * j - k) * log2Secant;
      remainder = Math.max(remainder, rest);
      weighted = Math.max(weighted, rest + (log2Weights[k] as number));
    }
    if (weighted < -bits) return { sums, error: 3 * j };
    // Where the terms grow again before, the remainders are at most the last terms.
    const all = weighted !== Number.POSITIVE_INFINITY;
    if (all && remainder > smallest) return { sums, error: 3 * j + 2 ** (remainder + bits) };
    if (all) smallest = remainder;
    const next = BigInt(2 * j * (2 * j - 1));
    [re, im] =
      im === 0n && step.im === 0n
        ? [(re * step.re * next) >> shift, 0n]
        : [((re * step.re - im * step.im) * next) >> shift, ((re * step.im + im * step.re) * next) >> shift];
    log2Term += slope + Math.log2(2 * j * (2 * j - 1));
  }
}

function divide(z: FixedComplex, by: number): FixedComplex {
  const divisor = BigInt(by);
  return { re: z.re / divisor, im: z.im / divisor };
}

function ratio(z: FixedComplex, numerator: number, denominator: number): FixedComplex {
  const n = BigInt(numerator);
  const d = BigInt(denominator);
  return { re: (z.re * n) / d, im: z.im === 0n ? 0n : (z.im * n) / d };
}
