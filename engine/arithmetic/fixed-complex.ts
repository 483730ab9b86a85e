import { integerSqrt, shiftRounded } from './fixed';
import { atan2Fixed } from './fixed-atan';
import { expScaled } from './fixed-exp';
import { logScaled } from './fixed-log';
import { sinCosFixed } from './fixed-trig';

/** The complex number (re + i im) / 2^bits; the count of fraction bits goes beside it as an argument. */
export interface FixedComplex {
  readonly re: bigint;
  readonly im: bigint;
}

/** (re + i im) / 2^bits * 2^exponent. */
export interface ScaledFixedComplex {
  readonly mantissa: FixedComplex;
  readonly exponent: number;
}

export const zeroComplex: FixedComplex = { re: 0n, im: 0n };

export function oneComplex(bits: number): FixedComplex {
  return { re: 1n << BigInt(bits), im: 0n };
}

export function addComplex(a: FixedComplex, b: FixedComplex): FixedComplex {
  return { re: a.re + b.re, im: a.im + b.im };
}

export function subtractComplex(a: FixedComplex, b: FixedComplex): FixedComplex {
  return { re: a.re - b.re, im: a.im - b.im };
}

export function negateComplex(a: FixedComplex): FixedComplex {
  return { re: -a.re, im: -a.im };
}

export function conjugateComplex(a: FixedComplex): FixedComplex {
  return { re: a.re, im: -a.im };
}

/** i a. */
export function timesI(a: FixedComplex): FixedComplex {
  return { re: -a.im, im: a.re };
}

/** Product, each part rounded downwards: error below 1 ulp a part. */
export function multiplyComplex(a: FixedComplex, b: FixedComplex, bits: number): FixedComplex {
  const shift = BigInt(bits);
  return { re: (a.re * b.re - a.im * b.im) >> shift, im: (a.re * b.im + a.im * b.re) >> shift };
}

/** Square, error below 1 ulp a part. */
export function squareComplex(a: FixedComplex, bits: number): FixedComplex {
  return { re: ((a.re + a.im) * (a.re - a.im)) >> BigInt(bits), im: (a.re * a.im) >> BigInt(bits - 1) };
}

/** Product with a real fixed point number, error below 1 ulp a part. */
export function scaleComplex(a: FixedComplex, factor: bigint, bits: number): FixedComplex {
  const shift = BigInt(bits);
  return { re: (a.re * factor) >> shift, im: (a.im * factor) >> shift };
}

/** Quotient, error below 1 ulp a part; the divisor must not be 0. */
export function divideComplex(a: FixedComplex, b: FixedComplex, bits: number): FixedComplex {
  const norm = b.re * b.re + b.im * b.im;
  const shift = BigInt(bits);
  return {
    re: ((a.re * b.re + a.im * b.im) << shift) / norm,
    im: ((a.im * b.re - a.re * b.im) << shift) / norm,
  };
}

/** |a| rounded downwards, error below 1 ulp. */
export function absoluteComplex(a: FixedComplex): bigint {
  if (a.im === 0n) return a.re < 0n ? -a.re : a.re;
  if (a.re === 0n) return a.im < 0n ? -a.im : a.im;
  return integerSqrt(a.re * a.re + a.im * a.im);
}

/** e^z with |mantissa| in [1, 2] up to rounding; error below 3 ulps of the mantissa. Domain |Re z| < 2^40. */
export function expComplexScaled(z: FixedComplex, bits: number): ScaledFixedComplex {
  const { mantissa, exponent } = expScaled(z.re, bits);
  if (z.im === 0n) return { mantissa: { re: mantissa, im: 0n }, exponent };
  const { sin, cos } = sinCosFixed(z.im, bits);
  const shift = BigInt(bits);
  return { mantissa: { re: (mantissa * cos) >> shift, im: (mantissa * sin) >> shift }, exponent };
}

/** e^z; |error| <= 4 max(1, |e^z|) ulps. */
export function expComplex(z: FixedComplex, bits: number): FixedComplex {
  const { mantissa, exponent } = expComplexScaled(z, bits);
  return { re: shiftRounded(mantissa.re, -exponent), im: shiftRounded(mantissa.im, -exponent) };
}

/** log |z| with `bits` fraction bits for z != 0 with `scale` fraction bits; |error| <= 1 ulp. */
export function logModulus(z: FixedComplex, scale: number, bits: number): bigint {
  return shiftRounded(logScaled(z.re * z.re + z.im * z.im, 2 * scale, bits + 1), 2);
}

/** Principal logarithm of z != 0: imaginary part in (-pi, pi], +pi on the negative real axis. |error| <= 1 ulp a part. */
export function logComplex(z: FixedComplex, bits: number): FixedComplex {
  return { re: logModulus(z, bits, bits), im: atan2Fixed(z.im, z.re, bits) };
}

/** Principal square root (real part >= 0; on the negative real axis the positive imaginary root); |error| <= 2 ulps a part. */
export function sqrtComplex(z: FixedComplex, bits: number): FixedComplex {
  if (z.re === 0n && z.im === 0n) return zeroComplex;
  // Four more bits and sqrt((|z| + |re|)/2): no cancellation; the other part is im / (2 larger).
  const guarded = bits + 4;
  const re = z.re << 4n;
  const im = z.im << 4n;
  const size = absoluteComplex({ re: re << BigInt(guarded), im: im << BigInt(guarded) });
  const larger = integerSqrt((size + ((re < 0n ? -re : re) << BigInt(guarded))) >> 1n);
  if (larger === 0n) return zeroComplex;
  const smaller = (im << BigInt(guarded - 1)) / larger;
  if (re >= 0n) return { re: shiftRounded(larger, 4), im: shiftRounded(smaller, 4) };
  const sign = im < 0n ? -1n : 1n;
  return { re: shiftRounded(sign * smaller, 4), im: shiftRounded(sign * larger, 4) };
}

/** z^n by squaring for an integer n >= 0; relative error below 3 n 2^-bits / min(1, |z|^n). */
export function integerPowerComplex(z: FixedComplex, n: number, bits: number): FixedComplex {
  let result = oneComplex(bits);
  let base = z;
  for (let left = n; left > 0; left = Math.floor(left / 2)) {
    if (left % 2 === 1) result = multiplyComplex(result, base, bits);
    if (left > 1) base = squareComplex(base, bits);
  }
  return result;
}

/** Principal power z^w = exp(w log z), z != 0; |error| <= (6 + 2 |w|) max(1, |z^w|) ulps. */
export function powComplex(z: FixedComplex, w: FixedComplex, bits: number): FixedComplex {
  return expComplex(multiplyComplex(w, logComplex(z, bits), bits), bits);
}

/** sin z and cos z; |error| <= 4 cosh(Im z) ulps each. */
export function sinCosComplex(
  z: FixedComplex,
  bits: number,
): { readonly sin: FixedComplex; readonly cos: FixedComplex } {
  const { sinh, cosh } = sinhCoshComplex({ re: -z.im, im: z.re }, bits);
  // sin z = -i sinh(iz), cos z = cosh(iz).
  return { sin: { re: sinh.im, im: -sinh.re }, cos: cosh };
}

/** sinh z and cosh z; |error| <= 4 cosh(Re z) ulps each. */
export function sinhCoshComplex(
  z: FixedComplex,
  bits: number,
): { readonly sinh: FixedComplex; readonly cosh: FixedComplex } {
  const guarded = bits + 4;
  const size = z.re < 0n ? -z.re : z.re;
  const { mantissa, exponent } = expScaled(size << 4n, guarded);
  const grown = mantissa << BigInt(exponent);
  const decayed = (1n << BigInt(2 * guarded)) / grown;
  const { sin, cos } = sinCosFixed(z.im << 4n, guarded);
  const half = BigInt(guarded + 5);
  const cosh = grown + decayed;
  const sinh = z.re < 0n ? decayed - grown : grown - decayed;
  return {
    sinh: { re: (sinh * cos) >> half, im: (cosh * sin) >> half },
    cosh: { re: (cosh * cos) >> half, im: (sinh * sin) >> half },
  };
}
