import { absolute, bitLength, numberFromFixed, shiftRounded } from './fixed';
import { piFixed } from './fixed-constants';
import { type ShortSeries, shortSeries, sumShortSeries } from './fixed-short-series';
import { angleGridBits, sinCosOnGrid, sinCosWorking } from './fixed-trig';
import { LONG_BITS, workingBits } from './fixed-working';
import { memoiseBounded } from './memo';

interface ArgumentTables {
  /** Bits of the first guess: those of the grid of angles, or a third of the working bits. */
  readonly seed: number;
  readonly cells: number;
  readonly shift: bigint;
  readonly seedShift: bigint;
  /** atan(u)/u in u^2, for |u| up to the error of the guess. */
  readonly series: ShortSeries;
}

const argumentTables = memoiseBounded(24, (working: number): ArgumentTables => {
  const long = working > LONG_BITS;
  const seed = long ? workingBits(Math.ceil(working / 3)) : angleGridBits(working);
  // A long guess errs by 2^6 of its ulps and 3 for its arguments; one on the grid by half of its step and some 2^-50.
  const reduction = 2 * (long ? seed - 8 : seed);
  return {
    seed,
    cells: 2 ** Math.min(seed, 52),
    shift: BigInt(working),
    seedShift: BigInt(working - seed),
    series: shortSeries(working, reduction, (n) => BigInt(n % 2 === 0 ? 2 * n + 1 : -2 * n - 1)),
  };
});

/**
 * Argument of x + i y for 0 <= y <= x, both with the same `working` fraction bits and x in [1/2, 2); error below 2^6 working
 * ulps: 3 for the cuts of x and y, 21 for the rotation (8 on the grid), 2 for its product, 1 for the quotient, and of the
 * series 4 for itself times u and 2 for its products.
 * A first guess (a double on the grid where sine and cosine are products of table entries, or this function at a third of
 * the bits) is rotated away; the rest is atan of a small quotient.
 */
function argumentWorking(y: bigint, x: bigint, working: number): bigint {
  const { seed, cells, shift, seedShift, series } = argumentTables(working);
  let guess: bigint;
  let rotation: { readonly sin: bigint; readonly cos: bigint };
  if (working <= LONG_BITS) {
    const rough = Math.atan2(numberFromFixed(y, working), numberFromFixed(x, working));
    const cell = Math.round(rough * cells);
    guess = BigInt(cell) << seedShift;
    rotation = sinCosOnGrid(cell, working);
  } else {
    guess = argumentWorking(y >> seedShift, x >> seedShift, seed) << seedShift;
    rotation = sinCosWorking(guess, working);
  }
  const { sin, cos } = rotation;
  const along = (x * cos + y * sin) >> shift;
  const u = (y * cos - x * sin) / along;
  const square = (u * u) >> shift;
  return guess + ((u * sumShortSeries(series, square, numberFromFixed(square, working))) >> shift);
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
  const [along, across] = [absolute(x), absolute(y)];
  const steep = across > along;
  const drop = bitLength(steep ? across : along) - working;
  const cut = (value: bigint) => (drop > 0 ? value >> BigInt(drop) : value << BigInt(-drop));
  let angle = steep
    ? (piFixed(working) >> 1n) - argumentWorking(cut(along), cut(across), working)
    : argumentWorking(cut(across), cut(along), working);
  if (x < 0n) angle = piFixed(working) - angle;
  return shiftRounded(y < 0n ? -angle : angle, working - bits);
}

/** atan x in (-pi/2, pi/2), both with `bits` fraction bits; |error| <= 1 ulp. */
export function atanFixed(x: bigint, bits: number): bigint {
  return atan2Fixed(x, 1n << BigInt(bits), bits);
}
