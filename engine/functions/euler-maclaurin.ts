import type { DoubleComplex } from '../arithmetic/double-complex';
import { numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  type FixedComplex,
  scaleComplex,
  squareComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { memoiseBounded } from '../arithmetic/memo';
import { evenBernoulliNumbers } from './bernoulli';

/** A value in fixed point and an upper bound of its error in units of the last place. */
export interface Estimate {
  readonly value: FixedComplex;
  readonly error: bigint;
}

/** A point W in the right half plane from which Euler-Maclaurin series in 1/W are summed. */
export interface FarPoint {
  readonly bits: number;
  readonly at: FixedComplex;
  /** 1/(2 pi W)^2 with `stepBits` fraction bits, as many as make it right to `bits` significant bits. */
  readonly step: FixedComplex;
  readonly stepBits: number;
  readonly log2Size: number;
  /** log2 of 1/cos(arg W / 2): the growth of the remainder off the real axis. */
  readonly log2Secant: number;
}

export function farPoint(at: FixedComplex, bits: number): FarPoint {
  const re = numberFromFixed(at.re, bits);
  const size = numberFromFixed(absoluteComplex(at), bits);
  const log2Size = Math.log2(size);
  const stepBits = bits + Math.ceil(2 * (log2Size + 3));
  const twoPi = piFixed(bits + 8);
  const circle = { re: (at.re * twoPi) >> BigInt(bits + 7), im: (at.im * twoPi) >> BigInt(bits + 7) };
  const square = squareComplex(circle, bits);
  const norm = square.re * square.re + square.im * square.im;
  const scale = BigInt(bits + stepBits);
  return {
    bits,
    at,
    step: { re: (square.re << scale) / norm, im: -(square.im << scale) / norm },
    stepBits,
    log2Size,
    log2Secant: -Math.log2(Math.sqrt((1 + re / size) / 2)),
  };
}

/**
 * Number of unit steps that bring `a` far enough for series with `bits` bits: |W| cos(arg W/2) >= 0.14 bits + 8 + order.
 * The smallest term of the series is about exp(-2 pi |W| cos(arg W/2)), so 0.11 bits would be the least; the rest
 * shortens the series.
 */
export function stepsToFarPoint(a: DoubleComplex, order: number, bits: number): number {
  return stepsToReach(a, 0.14 * bits + 8 + order);
}

/** The least number of unit steps after which |W| cos(arg W/2) >= reach and Re W >= 1. */
export function stepsToReach(a: DoubleComplex, reach: number): number {
  const far = (steps: number): boolean => {
    const re = a.re + steps;
    const size = Math.hypot(re, a.im);
    return re >= 1 && size * Math.sqrt((1 + re / size) / 2) >= reach;
  };
  // Re W = reach always suffices, and the condition is monotonic beyond Re W = 1.
  let low = Math.max(0, Math.ceil(1 - a.re));
  if (far(low)) return low;
  let high = Math.max(low, Math.ceil(reach - a.re));
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (far(middle)) high = middle;
    else low = middle;
  }
  return high;
}

/** Lists are made for whole multiples of this many bits, so that close precisions share one. */
const LIST_STEP = 64;

export function listBits(bits: number): number {
  return LIST_STEP * Math.ceil(bits / LIST_STEP);
}

/**
 * (2 pi)^(2j) B_2j/(2j)! for j = 1, 2, ..., that is +-2 zeta(2j), with `bits` fraction bits; error <= 2 units each.
 * Long enough for every series at a far point of that precision.
 */
export const scaledBernoulli = memoiseBounded(16, (bits: number): readonly bigint[] => {
  const count = Math.ceil(0.2 * bits) + 16;
  const working = bits + 64;
  const square = (4n * piFixed(working) * piFixed(working)) >> BigInt(working);
  let power = 1n << BigInt(working);
  let factorial = 1n;
  return evenBernoulliNumbers(count)
    .slice(0, count)
    .map((number, index) => {
      const two = BigInt(2 * index + 2);
      power = (power * square) >> BigInt(working);
      factorial *= two * (two - 1n);
      return ((power * number.numerator) / (number.denominator * factorial)) >> 64n;
    });
});

/**
 * sum_{j >= first} B_2j/(2j)! G_j W^(1-2j), where G_(j+1)/G_j = (2j + below)(2j + below + 1) and `start` is the first
 * term with (2 pi)^(-2 first) in place of its Bernoulli number. `weight` is log2 of what the sum will be multiplied
 * with: the series stops when the remainder times that is below one unit. Error: the remainder, at most the last term
 * over cos(arg W/2)^(2j + below + 1), and three units a term.
 */
export function bernoulliTail(
  point: FarPoint,
  first: number,
  below: number,
  start: FixedComplex,
  weight: number,
): Estimate {
  const { bits, step } = point;
  const shift = BigInt(point.stepBits);
  const list = scaledBernoulli(listBits(bits));
  // zeta(2j) - 1 < 2^(1 - 2j) is below the last place beyond the list.
  const beyond = 2n << BigInt(listBits(bits));
  let term = start;
  let sum = zeroComplex;
  let log2Term = Math.log2(numberFromFixed(absoluteComplex(start) + 1n, bits)) + 1;
  let smallest = Number.POSITIVE_INFINITY;
  const slope = -2 * (point.log2Size + Math.log2(2 * Math.PI));
  for (let j = first; ; j++) {
    sum = addComplex(sum, scaleComplex(term, list[j - 1] ?? (j % 2 === 0 ? -beyond : beyond), listBits(bits)));
    const ratio = (2 * j + below) * (2 * j + below + 1);
    // Where the sum is finite (2j + below < 0) what is left is bounded by the term itself, which the cosine must not reduce.
    const secants = Math.max(0, 2 * j + below + 1);
    const remainder = ratio === 0 ? Number.NEGATIVE_INFINITY : log2Term + secants * point.log2Secant;
    if (remainder + weight < -bits || remainder > smallest) {
      return { value: sum, error: BigInt(3 * (j - first + 1)) + ulpsOf(Math.min(remainder, smallest), bits) };
    }
    smallest = Math.min(smallest, remainder);
    const factor = BigInt(ratio);
    term = {
      re: ((term.re * step.re - term.im * step.im) * factor) >> shift,
      im: ((term.re * step.im + term.im * step.re) * factor) >> shift,
    };
    log2Term += slope + Math.log2(Math.abs(ratio));
  }
}

/** 2^exponent in units of 2^-bits, rounded up. */
export function ulpsOf(exponent: number, bits: number): bigint {
  const scaled = exponent + bits;
  if (scaled < 0) return 1n;
  const whole = Math.floor(scaled);
  return (BigInt(Math.ceil(2 ** (scaled - whole) * 1024)) << BigInt(whole)) / 1024n + 1n;
}
