import { absolute, bitLength, shiftRounded } from './fixed';
import { atan2Fixed } from './fixed-atan';
import { absoluteComplex, expComplexScaled, logModulus } from './fixed-complex';

/**
 * A complex number known up to an error: |true - (re + i im) 2^-bits| <= error 2^-bits. `bits` may be any integer, so a ball holds
 * numbers of any size. The error is an upper bound and never rounded down. In this module `precision` is the number of significant
 * bits kept in the larger part of a result; every operation encloses the exact result for every point of its operands.
 */
export interface Ball {
  readonly re: bigint;
  readonly im: bigint;
  readonly bits: number;
  readonly error: bigint;
}

export function exactBall(re: bigint, im = 0n, bits = 0): Ball {
  return { re, im, bits, error: 0n };
}

/** numerator / denominator, denominator > 0. */
export function ballFromRatio(numerator: bigint, denominator: bigint, precision: number): Ball {
  const bits = precision + bitLength(denominator) - bitLength(numerator) + 1;
  const wide = bits >= 0 ? numerator << BigInt(bits) : numerator;
  const divisor = bits >= 0 ? denominator : denominator << BigInt(-bits);
  return { re: wide / divisor, im: 0n, bits, error: wide % divisor === 0n ? 0n : 1n };
}

/** Upper bound of |a| including the error, in ulps of a. */
export function magnitudeAbove(a: Ball): bigint {
  return absoluteComplex(a) + 1n + a.error;
}

/** Lower bound of |a| including the error, in ulps of a; 0 when the ball holds 0. */
export function magnitudeBelow(a: Ball): bigint {
  const below = absoluteComplex(a) - a.error;
  return below > 0n ? below : 0n;
}

/** True when 0 lies in the ball. */
export function ballHoldsZero(a: Ball): boolean {
  return a.re * a.re + a.im * a.im <= a.error * a.error;
}

/** value / 2^count rounded up, count >= 0, value >= 0. */
function shiftUp(value: bigint, count: number): bigint {
  return -(-value >> BigInt(count));
}

/** The ball with another count of fraction bits; dropping bits adds the rounding to the error. */
export function rescaleBall(a: Ball, bits: number): Ball {
  const drop = a.bits - bits;
  if (drop <= 0) {
    const up = BigInt(-drop);
    return { re: a.re << up, im: a.im << up, bits, error: a.error << up };
  }
  const mask = (1n << BigInt(drop)) - 1n;
  const exact = ((a.re | a.im) & mask) === 0n;
  return {
    re: shiftRounded(a.re, drop),
    im: shiftRounded(a.im, drop),
    bits,
    error: shiftUp(a.error, drop) + (exact ? 0n : 1n),
  };
}

/** Keeps `precision` significant bits of the larger part (or of the error, where that is larger). */
export function roundBall(a: Ball, precision: number): Ball {
  const size = bitLength(absolute(a.re) | absolute(a.im) | a.error);
  return size <= precision ? a : rescaleBall(a, a.bits - (size - precision));
}

export function negateBall(a: Ball): Ball {
  return { ...a, re: -a.re, im: -a.im };
}

export function conjugateBall(a: Ball): Ball {
  return { ...a, im: -a.im };
}

export function addBalls(a: Ball, b: Ball, precision: number): Ball {
  // The smaller operand may lie far below the last bit kept: drop its digits first, so that no huge shift is formed.
  const top = Math.max(topBit(a), topBit(b));
  const finest = precision + 4 - top;
  const bits = Math.min(Math.max(a.bits, b.bits), Math.max(finest, Math.min(a.bits, b.bits)));
  const x = rescaleBall(a, bits);
  const y = rescaleBall(b, bits);
  return roundBall({ re: x.re + y.re, im: x.im + y.im, bits, error: x.error + y.error }, precision);
}

/** Exponent of the leading bit of value and error: |a| < 2^topBit(a) a part. */
function topBit(a: Ball): number {
  const length = bitLength(absolute(a.re) | absolute(a.im) | a.error);
  return length === 0 ? Number.NEGATIVE_INFINITY : length - a.bits;
}

export function subtractBalls(a: Ball, b: Ball, precision: number): Ball {
  return addBalls(a, negateBall(b), precision);
}

export function multiplyBalls(a: Ball, b: Ball, precision: number): Ball {
  const exact = a.error === 0n && b.error === 0n;
  const error = exact
    ? 0n
    : (absoluteComplex(a) + 1n) * b.error + (absoluteComplex(b) + 1n) * a.error + a.error * b.error;
  return roundBall(
    { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re, bits: a.bits + b.bits, error },
    precision,
  );
}

/** a b for an integer b. */
export function multiplyBallByInteger(a: Ball, factor: bigint, precision: number): Ball {
  return roundBall(
    { re: a.re * factor, im: a.im * factor, bits: a.bits, error: a.error * absolute(factor) },
    precision,
  );
}

/** a 2^exponent, exact. */
export function shiftBall(a: Ball, exponent: number): Ball {
  return { ...a, bits: a.bits - exponent };
}

/** a / b; null when b holds 0. */
export function divideBalls(a: Ball, b: Ball, precision: number): Ball | null {
  const below = magnitudeBelow(b);
  if (below === 0n) return null;
  const size = bitLength(absolute(a.re) | absolute(a.im) | a.error);
  const up = Math.max(0, precision + 4 + bitLength(below) - size);
  const wide = BigInt(up);
  const norm = b.re * b.re + b.im * b.im;
  const re = ((a.re * b.re + a.im * b.im) << wide) / norm;
  const im = ((a.im * b.re - a.re * b.im) << wide) / norm;
  // |a'/b' - a/b| <= (da + |a/b| db) / |b'|, with |a/b| at most |q| + 2 ulps of the quotient q just found.
  const spread = (a.error << wide) + (absoluteComplex({ re, im }) + 3n) * b.error;
  const error = spread / below + (spread === 0n ? 0n : 1n) + 2n;
  return roundBall({ re, im, bits: a.bits - b.bits + up, error }, precision);
}

/** Largest radius of the argument for which exp is attempted. */
const EXP_RADIUS_LIMIT = 64;

/** e^a; null when the error of the exponent exceeds 64 or its real part 2^40: nothing is then known about the value. */
export function expBall(a: Ball, precision: number): Ball | null {
  if (topBit(a) > 40) return null;
  const bits = precision + 4;
  const z = rescaleBall(a, bits);
  const { mantissa, exponent } = expComplexScaled(z, bits);
  // |e^d - 1| <= e^|d| - 1, and |mantissa| < 2^(bits + 1) + 3.
  const growth = exponentialGrowth(z.error, bits);
  if (growth === null) return null;
  return roundBall({ re: mantissa.re, im: mantissa.im, bits: bits - exponent, error: 2n * growth + 5n }, precision);
}

/** Upper bound of e^d - 1 in ulps for d = error ulps; null when d is above the limit. */
function exponentialGrowth(error: bigint, bits: number): bigint | null {
  const half = 1n << BigInt(bits - 1);
  // e^d - 1 <= d + d^2 for d <= 1/2.
  if (error <= half) return error + shiftUp(error * error, bits) + 1n;
  const radius = Number(shiftUp(error, bits));
  if (radius > EXP_RADIUS_LIMIT) return null;
  return BigInt(Math.ceil(Math.expm1(radius) * (1 + 1e-12))) << BigInt(bits);
}

/**
 * Principal logarithm; null when the ball holds 0 or touches the negative real axis (unless it is an exact number there, where the
 * imaginary part is +pi).
 */
export function logBall(a: Ball, precision: number): Ball | null {
  const below = magnitudeBelow(a);
  if (below === 0n) return null;
  const crossesCut = a.re < 0n && absolute(a.im) <= a.error;
  if (crossesCut && !(a.im === 0n && a.error === 0n)) return null;
  const bits = precision + 4;
  const re = logModulus(a, a.bits, bits);
  const im = atan2Fixed(a.im, a.re, bits);
  const spread = a.error === 0n ? 0n : (a.error << BigInt(bits)) / below + 1n;
  return roundBall({ re, im, bits, error: spread + 2n }, precision);
}

/** a^n for any integer n; null when n < 0 and the ball holds 0. */
export function integerPowerBall(a: Ball, n: number, precision: number): Ball | null {
  const guarded = precision + 2 * bitLength(BigInt(Math.abs(n))) + 4;
  let result: Ball = exactBall(1n);
  let base = a;
  for (let left = Math.abs(n); left > 0; left = Math.floor(left / 2)) {
    if (left % 2 === 1) result = multiplyBalls(result, base, guarded);
    if (left > 1) base = multiplyBalls(base, base, guarded);
  }
  return n < 0 ? divideBalls(exactBall(1n), result, precision) : roundBall(result, precision);
}
