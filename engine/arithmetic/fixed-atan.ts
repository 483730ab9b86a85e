import { absolute, bitLength, numberFromFixed, shiftRounded } from './fixed';
import { piFixed } from './fixed-constants';
import { sinCosWorking } from './fixed-trig';
import { LONG_BITS, workingBits } from './fixed-working';

/** Bits of the first guess from Math.atan2. */
const SEED_BITS = 48;

/** atan u for |u| < 1/4; error below terms + 1 ulps. */
function inverseTangentSmall(u: bigint, working: number): bigint {
  const shift = BigInt(working);
  const square = -(u * u) >> shift;
  let power = u;
  let sum = u;
  for (let odd = 3n; ; odd += 2n) {
    power = (power * square) >> shift;
    if (power === 0n || power === -1n) return sum;
    sum += power / odd;
  }
}

/**
 * Argument of x + i y, both with the same `working` fraction bits and max(|x|, |y|) in [1/2, 2); error below 2^6 working ulps:
 * 3 for the cuts of x and y (next to at least 1/2), 21 for the rotation, 2 for its product, 1 for the quotient, 1 a term of the
 * series and 1, of at most 10.
 * A first guess (doubles, or this function at a third of the bits) is rotated away; the rest is atan of a small quotient.
 */
function argumentWorking(y: bigint, x: bigint, working: number): bigint {
  let guess: bigint;
  if (working <= LONG_BITS) {
    const rough = Math.atan2(numberFromFixed(y, working), numberFromFixed(x, working));
    guess = BigInt(Math.round(rough * 2 ** SEED_BITS)) << BigInt(working - SEED_BITS);
  } else {
    const third = workingBits(Math.ceil(working / 3));
    const drop = BigInt(working - third);
    guess = argumentWorking(y >> drop, x >> drop, third) << drop;
  }
  const { sin, cos } = sinCosWorking(guess, working);
  const along = (x * cos + y * sin) >> BigInt(working);
  const across = y * cos - x * sin;
  return guess + inverseTangentSmall(across / along, working);
}

/**
 * Argument of x + i y in (-pi, pi], `bits` fraction bits; x and y share any fraction bits and are not both 0. |error| <= 1 ulp.
 * On the negative real axis (y = 0) the value is +pi.
 */
export function atan2Fixed(y: bigint, x: bigint, bits: number): bigint {
  if (y === 0n) {
    if (x === 0n) throw new RangeError('argument of zero');
    return x > 0n ? 0n : piFixed(bits);
  }
  const working = workingBits(bits);
  const size = absolute(x) > absolute(y) ? x : y;
  const drop = bitLength(size) - working;
  const cut = (value: bigint) => (drop > 0 ? value >> BigInt(drop) : value << BigInt(-drop));
  return shiftRounded(argumentWorking(cut(y), cut(x), working), working - bits);
}

/** atan x in (-pi/2, pi/2), both with `bits` fraction bits; |error| <= 1 ulp. */
export function atanFixed(x: bigint, bits: number): bigint {
  return atan2Fixed(x, 1n << BigInt(bits), bits);
}
