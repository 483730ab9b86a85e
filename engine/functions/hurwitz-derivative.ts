import { fixedFromRatio, numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  type FixedComplex,
  integerPowerComplex,
  logComplex,
  multiplyComplex,
  oneComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { Rational } from '../exact/rational';
import { bernoulliNumber } from './bernoulli';
import { bernoulliTail, type Estimate, type FarPoint, farPoint, stepsToFarPoint, ulpsOf } from './euler-maclaurin';
import { factorial } from './factorial';
import { halfLogTwoPi, logGammaByShifts } from './log-gamma-precise';
import { canWeigh, powerWeightedLogarithms } from './weighted-logarithms';

/**
 * W^-k zeta'(-k, W) at a far point, k >= 0, with log W given: Euler-Maclaurin (DLMF 25.11.28 differentiated, 2.10(i)).
 * In units of W^k: W/(k+1) (log W - 1/(k+1)) - log W/2 + sum_j B_2j/(2j)! T_j W^(1-2j), where for 2j-1 <= k
 * T_j = (-k)_(2j-1) (sum_{i < 2j-1} 1/(i-k) - log W), and beyond T_j = (-1)^k k! (2j-2-k)!.
 * `weight`: log2 of what the value will be multiplied with; the error is stated for the value itself.
 */
export function scaledHurwitzDerivative(point: FarPoint, k: number, logarithm: FixedComplex, weight: number): Estimate {
  const { bits, at } = point;
  const unit = oneComplex(bits);
  const first = Math.floor((k + 1) / 2) + 1;
  const lead = divideByInteger(subtractComplex(logarithm, divideByInteger(unit, k + 1)), k + 1);
  let value = subtractComplex(multiplyComplex(at, lead, bits), divideByInteger(logarithm, 2));
  const inverse = divideComplex(unit, at, bits);
  const square = multiplyComplex(inverse, inverse, bits);
  let power = inverse;
  let rising = Rational.one;
  let harmonic = Rational.zero;
  let next = 0;
  for (let j = 1; j < first; j++) {
    for (; next < 2 * j - 1; next++) {
      rising = rising.mul(Rational.of(next - k));
      harmonic = harmonic.add(Rational.of(1, next - k));
    }
    const factor = bernoulliNumber(2 * j)
      .mul(rising)
      .div(factorial(2 * j));
    const bracket = subtractComplex({ re: fixed(harmonic, bits), im: 0n }, logarithm);
    value = addComplex(value, timesRational(multiplyComplex(power, bracket, bits), factor));
    power = multiplyComplex(power, square, bits);
  }
  const constant = factorial(k)
    .mul(factorial(2 * first - 2 - k))
    .mul(Rational.of(k % 2 === 0 ? 1 : -1));
  const start = timesRational(overTwoPi(power, 2 * first, bits), constant);
  const tail = bernoulliTail(point, first, -1 - k, start, weight);
  const size = numberFromFixed(absoluteComplex(value), bits);
  return {
    value: addComplex(value, tail.value),
    error: tail.error + ulpsOf(Math.log2(4 * (k + 4) * (size + 2)) - bits, bits),
  };
}

/** z/(2 pi)^n. */
function overTwoPi(z: FixedComplex, n: number, bits: number): FixedComplex {
  const circle = integerPowerComplex({ re: 2n * piFixed(bits), im: 0n }, n, bits);
  return { re: (z.re << BigInt(bits)) / circle.re, im: (z.im << BigInt(bits)) / circle.re };
}

/**
 * W^s zeta(s, W) at a far point for an integer s (DLMF 25.11.28): W/(s-1) + 1/2 + sum_j B_2j/(2j)! (s)_(2j-1) W^(1-2j);
 * finite sums for s <= 0. At s = 1 the finite part of W zeta, -W psi(W) (DLMF 5.11.2), with log W given.
 */
export function scaledHurwitz(point: FarPoint, s: number, logarithm: FixedComplex, weight: number): Estimate {
  const { bits, at } = point;
  const lead = s === 1 ? negative(multiplyComplex(at, logarithm, bits)) : divideByInteger(at, s - 1);
  const value = addComplex(lead, divideByInteger(oneComplex(bits), 2));
  const size = numberFromFixed(absoluteComplex(lead), bits);
  const rounding = ulpsOf(Math.log2(4 * (size + 2)) - bits, bits);
  if (s === 0) return { value, error: rounding };
  const start = overTwoPi(divideComplex({ re: BigInt(s) << BigInt(bits), im: 0n }, at, bits), 2, bits);
  const tail = bernoulliTail(point, 1, s - 1, start, weight);
  return { value: addComplex(value, tail.value), error: tail.error + rounding };
}

/**
 * zeta'(-k, a) = d/ds zeta(s, a) at s = -k for an integer k >= 0 and any complex a that is not 0, -1, -2, ..., with
 * `bits` fraction bits; the imaginary part is that of the continuation along Re a -> +infinity, with principal
 * logarithms (DLMF 25.11.18 for k = 0). Method: shift to a far point, Euler-Maclaurin there. The error
 * does not include that of `a`. For k = 0 it is log Gamma(a) - log(2 pi)/2. Domain: a may need |Re a| steps; negative real parts beyond -10^5 take seconds.
 */
export function hurwitzZetaDerivative(k: number, a: FixedComplex, bits: number): Estimate {
  if (k === 0) {
    const { value, error } = logGammaByShifts(a, bits);
    return { value: { re: value.re - halfLogTwoPi(bits), im: value.im }, error: error + 1n };
  }
  const approximate = { re: numberFromFixed(a.re, bits), im: numberFromFixed(a.im, bits) };
  const steps = stepsToFarPoint(approximate, k, bits);
  const size = Math.hypot(approximate.re + steps, approximate.im) + Math.abs(approximate.re) + 2;
  // Sums of size^(k+1) log size cancel down to the result.
  const guard = Math.ceil((k + 1) * Math.log2(size) + Math.log2(Math.log2(size) + 4)) + 16;
  const working = bits + guard;
  const exact = { re: a.re << BigInt(guard), im: a.im << BigInt(guard) };
  const below = canWeigh(steps, k)
    ? powerWeightedLogarithms(exact, steps, k, working)
    : singleLogarithms(exact, steps, k, working);
  const z = { re: exact.re + (BigInt(steps) << BigInt(working)), im: exact.im };
  const point = farPoint(z, working);
  const power = integerPowerComplex(z, k, working);
  const weight = k * point.log2Size;
  const tail = scaledHurwitzDerivative(point, k, logComplex(z, working), weight);
  const total = subtractComplex(multiplyComplex(power, tail.value, working), below.value);
  // The power errs by 3 k |z|^(k-1) units, next to a tail of |z| log |z|.
  const powerError = ulpsOf(
    Math.log2(4 * (k + 1) * (Math.log2(size) + 4)) + weight + Math.log2(size) - working,
    working,
  );
  const rounding = (tail.error << BigInt(Math.ceil(weight) + 1)) + below.error + powerError;
  return {
    value: { re: total.re >> BigInt(guard), im: total.im >> BigInt(guard) },
    error: (rounding >> BigInt(guard)) + 2n,
  };
}

/** The same sum as powerWeightedLogarithms, term by term. */
function singleLogarithms(a: FixedComplex, steps: number, k: number, bits: number): Estimate {
  let value = zeroComplex;
  let error = 0;
  let z = a;
  for (let n = 0; n < steps; n++) {
    const power = integerPowerComplex(z, k, bits);
    const log = logComplex(z, bits);
    value = addComplex(value, multiplyComplex(power, log, bits));
    const size = numberFromFixed(absoluteComplex(z), bits) + 1;
    // The power errs by 3 k max(1, |z|^k) units, the logarithm by 1.5.
    error += 3 * (k + 1) * size ** k * (numberFromFixed(absoluteComplex(log), bits) + 1) + 1.5;
    z = { re: z.re + (1n << BigInt(bits)), im: z.im };
  }
  return { value, error: BigInt(Math.ceil(error)) };
}

function negative(z: FixedComplex): FixedComplex {
  return { re: -z.re, im: -z.im };
}

/** Quotient by an integer that is not 0, rounded towards zero. */
function divideByInteger(z: FixedComplex, by: number): FixedComplex {
  return { re: z.re / BigInt(by), im: z.im / BigInt(by) };
}

function timesRational(z: FixedComplex, factor: Rational): FixedComplex {
  return {
    re: (z.re * factor.numerator) / factor.denominator,
    im: (z.im * factor.numerator) / factor.denominator,
  };
}

function fixed(value: Rational, bits: number): bigint {
  return fixedFromRatio(value.numerator, value.denominator, bits);
}
