/**
 * Fixed point on BigInt: the integer n with `bits` fraction bits stands for n / 2^bits; one ulp is 2^-bits.
 * Precision is always an argument. Errors are stated in ulps of the result and do not include the errors of the inputs.
 */

/** value / 2^count rounded to the nearest integer, halves upwards; a negative count shifts left (exact). */
export function shiftRounded(value: bigint, count: number): bigint {
  if (count <= 0) return count === 0 ? value : value << BigInt(-count);
  return ((value >> BigInt(count - 1)) + 1n) >> 1n;
}

/** The same number with another count of fraction bits; error <= 1/2 ulp when bits are dropped, else exact. */
export function rescaleFixed(value: bigint, fromBits: number, toBits: number): bigint {
  return shiftRounded(value, fromBits - toBits);
}

/** Product rounded downwards: 0 <= exact - result < 1 ulp. */
export function multiplyFixed(a: bigint, b: bigint, bits: number): bigint {
  return (a * b) >> BigInt(bits);
}

/** Quotient rounded towards zero: |error| < 1 ulp. The divisor must not be 0. */
export function divideFixed(a: bigint, b: bigint, bits: number): bigint {
  return (a << BigInt(bits)) / b;
}

/** Square root of a >= 0 rounded downwards: 0 <= exact - result < 1 ulp. */
export function sqrtFixed(a: bigint, bits: number): bigint {
  return integerSqrt(a << BigInt(bits));
}

/** Nearest fixed point number to numerator / denominator (denominator > 0): |error| <= 1/2 ulp. */
export function fixedFromRatio(numerator: bigint, denominator: bigint, bits: number): bigint {
  const twice =
    bits >= 0 ? (numerator << BigInt(bits + 1)) / denominator : numerator / (denominator << BigInt(-bits - 1));
  // `/` cuts towards zero; one extra bit then rounds half away from zero.
  return twice >= 0n ? (twice + 1n) >> 1n : -((1n - twice) >> 1n);
}

/** Nearest fixed point number to a finite double: |error| <= 1/2 ulp, exact when bits >= 1074. */
export function fixedFromNumber(x: number, bits: number): bigint {
  if (x === 0) return 0n;
  // Bring the 53-bit significand to an integer by exact powers of two (two steps, so that no power overflows).
  const exponent = Math.max(Math.floor(Math.log2(Math.abs(x))), -1074);
  const up = 53 - exponent;
  const half = Math.trunc(up / 2);
  const scaled = x * 2 ** half * 2 ** (up - half);
  return shiftRounded(BigInt(scaled), up - bits);
}

/** 2^-k for |k| <= 500 at place k + 500: the power of two is dearer than the rest of the conversion. */
const POWERS = Float64Array.from({ length: 1001 }, (_, k) => 2 ** (500 - k));

/** Double next to value / 2^bits, relative error <= 2^-52; overflows to an infinity and underflows to 0 like a double. */
export function numberFromFixed(value: bigint, bits: number): number {
  if (bits >= -500 && bits <= 500) {
    const direct = Number(value);
    if (Number.isFinite(direct)) return direct * (POWERS[bits + 500] as number);
  }
  if (value === 0n) return 0;
  const drop = bitLength(value) - 64;
  const top = Number(drop > 0 ? value >> BigInt(drop) : value);
  return scaleByPowerOfTwo(top, Math.max(drop, 0) - bits);
}

/** x 2^exponent without intermediate overflow. */
export function scaleByPowerOfTwo(x: number, exponent: number): number {
  let result = x;
  let left = Math.max(-2200, Math.min(2200, exponent));
  while (left > 1000) {
    result *= 2 ** 1000;
    left -= 1000;
  }
  while (left < -1000) {
    result *= 2 ** -1000;
    left += 1000;
  }
  return result * 2 ** left;
}

/** Number of binary digits of |value|; 0 for 0. */
export function bitLength(value: bigint): number {
  if (value === 0n) return 0;
  const size = value < 0n ? -value : value;
  const close = Number(size);
  if (Number.isFinite(close)) {
    let top = Math.floor(Math.log2(close));
    if (2 ** top > close) top -= 1;
    // Number() may have rounded up to the next power of two.
    if (2 ** top === close && top > 52 && size < 1n << BigInt(top)) top -= 1;
    return top + 1;
  }
  const hex = size.toString(16);
  return 4 * hex.length - (Math.clz32(Number.parseInt(hex.charAt(0), 16)) - 28);
}

/** An upper bound of log2 of |value|/2^bits, less than 1 too large, for numbers of any size; that of one unit for 0. */
export function log2Above(value: bigint, bits: number): number {
  return Math.max(1, bitLength(value)) - bits;
}

export function absolute(value: bigint): bigint {
  return value < 0n ? -value : value;
}

/** Floor of the square root of n >= 0 (Newton's iteration from above, started at double the digits each time). */
export function integerSqrt(n: bigint): bigint {
  if (n < 0n) throw new RangeError('integerSqrt of a negative number');
  if (n < 1n << 52n) return BigInt(Math.floor(Math.sqrt(Number(n))));
  const length = bitLength(n);
  let root: bigint;
  if (length <= 104) {
    root = BigInt(Math.ceil(Math.sqrt(Number(n)))) + 1n;
  } else {
    // The root of the top half of the digits is right to half of the wanted digits.
    const drop = BigInt(length >> 2);
    root = (integerSqrt(n >> (2n * drop)) + 1n) << drop;
  }
  for (;;) {
    const next = (root + n / root) >> 1n;
    if (next >= root) return root;
    root = next;
  }
}
