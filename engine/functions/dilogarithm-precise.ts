import { shiftRounded } from '../arithmetic/fixed';
import type { FixedComplex } from '../arithmetic/fixed-complex';
import { logComplex, multiplyComplex, squareComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { powerSum } from '../arithmetic/fixed-series';
import { memoiseBounded } from '../arithmetic/memo';
import { evenBernoulliNumbers } from './bernoulli';

/**
 * Guard bits. In units of the guarded precision: u errs by 1.5 (its logarithm), u^2/4 by 2.5, powerSum by 10 (|u^2/4| <= 0.4,
 * coefficients below 1/36), u times it by 14 with |u| <= 1.26, so the series by 18; a product of logarithms by 1.5 times
 * their sum and 1.5, where one is at most log 2^4096 and the other then below 1: 4300 in all, and the inverse of z brings
 * as much, but not at the same z. With 2^12 units to an ulp this is below 1.2, rounding included 2.
 */
const GUARD = 12;

/** 4^j B_2j/(2j+1)!, j >= 1, and 0 at j = 0; |B_2j|/(2j)! <= 4 (2 pi)^(-2j), so they fall by 0.1 a term. */
const coefficients = memoiseBounded(16, (bits: number): readonly bigint[] => {
  const list = [0n];
  const count = Math.ceil(bits / Math.log2(Math.PI ** 2)) + 2;
  const bernoulli = evenBernoulliNumbers(count);
  let factorial = 1n;
  for (let j = 1; j <= count; j++) {
    factorial *= BigInt(2 * j) * BigInt(2 * j + 1);
    const number = bernoulli[j - 1];
    if (number === undefined) break;
    list.push((number.numerator << BigInt(bits + 2 * j)) / (number.denominator * factorial));
  }
  return list;
});

/** Li2 for |z| <= 1, Re z <= 1/2: u = -log(1 - z), Li2 = u - u^2/4 + sum_j B_2j u^(2j+1)/(2j+1)!, |u| <= 1.26. */
function dilogarithmNearZero(z: FixedComplex, bits: number): FixedComplex {
  const log = logComplex({ re: (1n << BigInt(bits)) - z.re, im: -z.im }, bits);
  const u = { re: -log.re, im: -log.im };
  const square = squareComplex(u, bits);
  const quarter = { re: square.re >> 2n, im: square.im >> 2n };
  const list = coefficients(bits);
  const tail = multiplyComplex(u, powerSum(list, list.length, quarter, bits), bits);
  return { re: u.re - quarter.re + tail.re, im: u.im - quarter.im + tail.im };
}

/**
 * Dilogarithm Li2(z) = sum z^n/n^2 (DLMF 25.12.1), principal branch cut along [1, oo), where the value is that from below (Im z -> -0).
 * Any z with `bits` fraction bits, |z| < 2^bits; |error| <= 2 ulps, not counting that of z.
 * Method: inversion (DLMF 25.12.4) for |z| > 1, reflection (25.12.6) for Re z > 1/2, then the series in u = -log(1 - z) with
 * Bernoulli numbers ('t Hooft and Veltman 1979, Nucl. Phys. B153, appendix A).
 */
export function dilogarithmFixed(z: FixedComplex, bits: number): FixedComplex {
  const working = bits + GUARD;
  const up = BigInt(GUARD);
  const value = dilogarithm({ re: z.re << up, im: z.im << up }, working);
  return { re: shiftRounded(value.re, GUARD), im: shiftRounded(value.im, GUARD) };
}

function dilogarithm(z: FixedComplex, bits: number): FixedComplex {
  const one = 1n << BigInt(bits);
  const norm = z.re * z.re + z.im * z.im;
  const pi = piFixed(bits);
  const sixth = (pi * pi) / (6n << BigInt(bits));
  if (norm > one * one) {
    // Li2(z) = -pi^2/6 - log^2(-z)/2 - Li2(1/z).
    const inverse = { re: (z.re << BigInt(2 * bits)) / norm, im: (-z.im << BigInt(2 * bits)) / norm };
    const log = logComplex({ re: -z.re, im: -z.im }, bits);
    const square = squareComplex(log, bits);
    const rest = dilogarithm(inverse, bits);
    return { re: -sixth - (square.re >> 1n) - rest.re, im: -(square.im >> 1n) - rest.im };
  }
  if (2n * z.re > one) {
    const other = { re: one - z.re, im: -z.im };
    if (other.re === 0n && other.im === 0n) return { re: sixth, im: 0n };
    // Li2(z) = pi^2/6 - log z log(1 - z) - Li2(1 - z).
    const product = multiplyComplex(logComplex(z, bits), logComplex(other, bits), bits);
    const rest = dilogarithmNearZero(other, bits);
    return { re: sixth - product.re - rest.re, im: -product.im - rest.im };
  }
  return dilogarithmNearZero(z, bits);
}
