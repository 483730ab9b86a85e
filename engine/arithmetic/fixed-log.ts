import { bitLength, shiftRounded } from './fixed';
import { ln2Fixed } from './fixed-constants';
import { exponentialWorking } from './fixed-exp';
import { LONG_BITS, workingBits } from './fixed-working';

/** Bits of the first guess from Math.log. */
const SEED_BITS = 48;

/** 2 atanh(u) for |u| < 1/4; error below terms + 1 ulps. */
function twiceInverseTanh(u: bigint, working: number): bigint {
  const shift = BigInt(working);
  const square = (u * u) >> shift;
  let power = u;
  let sum = u;
  for (let odd = 3n; ; odd += 2n) {
    power = (power * square) >> shift;
    if (power === 0n || power === -1n) return 2n * sum;
    sum += power / odd;
  }
}

/**
 * log m for m in [1, 2], `working` fraction bits; error below 2^6 working ulps. The exponential, next to 2/m here, errs by 27
 * and the cut of ln 2 by 2/m: 2 z by 24 + 3 m + 3 <= 34 units next to 2, u by a quarter of that and 1, twice its series by
 * 20 and 2 a term, of which there are at most 10; y is exact.
 * A first guess y (a double, or this function at a third of the bits) is improved by log m = y + 2 atanh((z - 1)/(z + 1)), z = m e^-y.
 */
function logarithmWorking(m: bigint, working: number): bigint {
  let y: bigint;
  if (working <= LONG_BITS) {
    const guess = Math.log(Number(m >> BigInt(working - 62)) * 2 ** -62);
    y = BigInt(Math.round(guess * 2 ** SEED_BITS)) << BigInt(working - SEED_BITS);
  } else {
    const third = workingBits(Math.ceil(working / 3));
    y = logarithmWorking(m >> BigInt(working - third), third) << BigInt(working - third);
  }
  const ln2 = ln2Fixed(working);
  // e^-y = e^(ln2 - y) / 2, so that the argument of the exponential is in [0, 1).
  if (y > ln2) y = ln2;
  const twiceZ = (m * exponentialWorking(ln2 - y, working)) >> BigInt(working);
  const two = 1n << BigInt(working + 1);
  const u = ((twiceZ - two) << BigInt(working)) / (twiceZ + two);
  return y + twiceInverseTanh(u, working);
}

/** log(value / 2^scale) with `bits` fraction bits for an integer value > 0; |error| <= 1 ulp. */
export function logScaled(value: bigint, scale: number, bits: number): bigint {
  if (value <= 0n) throw new RangeError('logarithm of a number that is not positive');
  const working = workingBits(bits);
  const length = bitLength(value);
  const exponent = length - 1 - scale;
  const drop = length - 1 - working;
  const m = drop > 0 ? value >> BigInt(drop) : value << BigInt(-drop);
  // 44 more bits of ln 2 keep exponents up to 2^40 below one working ulp.
  const whole = exponent === 0 ? 0n : (BigInt(exponent) * ln2Fixed(working + 44)) >> 44n;
  return shiftRounded(whole + logarithmWorking(m, working), working - bits);
}

/** log x for x > 0, both with `bits` fraction bits; |error| <= 1 ulp. */
export function logFixed(x: bigint, bits: number): bigint {
  return logScaled(x, bits, bits);
}

/** log(1 + x) for x > -1, both with `bits` fraction bits; |error| <= 1 ulp. */
export function log1pFixed(x: bigint, bits: number): bigint {
  return logScaled((1n << BigInt(bits)) + x, bits, bits);
}
