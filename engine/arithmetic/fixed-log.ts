import { bitLength, numberFromFixed, shiftRounded } from './fixed';
import { ln2Fixed } from './fixed-constants';
import { exponentialOnGrid, exponentialWorking, gridBits } from './fixed-exp';
import { type ShortSeries, shortSeries, sumShortSeries } from './fixed-short-series';
import { LONG_BITS, workingBits } from './fixed-working';
import { memoiseBounded } from './memo';

interface LogarithmTables {
  /** Bits of the first guess: those of the grid of exponentials, or a third of the working bits. */
  readonly seed: number;
  readonly cells: number;
  readonly ln2: bigint;
  readonly ln2Wide: bigint;
  readonly one: bigint;
  readonly shift: bigint;
  readonly seedShift: bigint;
  /** log(1 + d)/d for |d| < 2^-(bits of the guess), up to its error. */
  readonly series: ShortSeries;
}

/** 44 more bits of ln 2 keep exponents up to 2^40 below one working ulp. */
const EXPONENT_BITS = 44;

const logarithmTables = memoiseBounded(24, (working: number): LogarithmTables => {
  const long = working > LONG_BITS;
  const seed = long ? workingBits(Math.ceil(working / 3)) : gridBits(working);
  // A long guess errs by 2^6 of its ulps; one on the grid by half of its step, 1 + 2^-20 times, and z by as much.
  const reduction = long ? seed - 8 : seed;
  return {
    seed,
    cells: 2 ** Math.min(seed, 52),
    ln2: ln2Fixed(working),
    ln2Wide: ln2Fixed(working + EXPONENT_BITS),
    one: 1n << BigInt(working),
    shift: BigInt(working),
    seedShift: BigInt(working - seed),
    series: shortSeries(working, reduction, (n) => (n % 2 === 0 ? BigInt(n + 1) : BigInt(-n - 1))),
  };
});

/**
 * log m for m in [1, 2], `working` fraction bits: log m = ln 2 - r + log z, z = m e^r/2 next to 1, with r next to ln(2/m) from
 * a double on the grid where e^r is a product of table entries, or from this function at a third of the bits.
 * Error below 2^6 working ulps: e^r, next to 2/m, errs by 10, a long one by 27; m e^r by 24 + 3 m + 1 <= 31, z by 16; the
 * series by 4 times d and 1; ln 2 by 1; r is exact.
 */
function logarithmWorking(m: bigint, working: number): bigint {
  const { seed, cells, ln2, one, shift, seedShift, series } = logarithmTables(working);
  let r: bigint;
  let exponential: bigint;
  if (working <= LONG_BITS) {
    const guess = Math.LN2 - Math.log(Number(m >> BigInt(working - 62)) * 2 ** -62);
    const cell = Math.max(0, Math.round(guess * cells));
    r = BigInt(cell) << seedShift;
    exponential = exponentialOnGrid(cell, working);
  } else {
    const y = logarithmWorking(m >> seedShift, seed) << seedShift;
    r = y > ln2 ? 0n : ln2 - y;
    exponential = exponentialWorking(r, working);
  }
  const d = ((m * exponential) >> (shift + 1n)) - one;
  return ln2 - r + ((d * sumShortSeries(series, d, numberFromFixed(d, working))) >> shift);
}

/** log(value / 2^scale) with `bits` fraction bits for an integer value > 0; |error| <= 1 ulp. */
export function logScaled(value: bigint, scale: number, bits: number): bigint {
  if (value <= 0n) throw new RangeError('logarithm of a number that is not positive');
  const working = workingBits(bits);
  const length = bitLength(value);
  const exponent = length - 1 - scale;
  const drop = length - 1 - working;
  const m = drop > 0 ? value >> BigInt(drop) : value << BigInt(-drop);
  const logarithm = logarithmWorking(m, working);
  if (exponent === 0) return shiftRounded(logarithm, working - bits);
  const whole = (BigInt(exponent) * logarithmTables(working).ln2Wide) >> BigInt(EXPONENT_BITS);
  return shiftRounded(whole + logarithm, working - bits);
}

/** log x for x > 0, both with `bits` fraction bits; |error| <= 1 ulp. */
export function logFixed(x: bigint, bits: number): bigint {
  return logScaled(x, bits, bits);
}

/** log(1 + x) for x > -1, both with `bits` fraction bits; |error| <= 1 ulp. */
export function log1pFixed(x: bigint, bits: number): bigint {
  return logScaled((1n << BigInt(bits)) + x, bits, bits);
}
