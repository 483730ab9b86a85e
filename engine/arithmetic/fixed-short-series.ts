import { bitLength } from './fixed';

/** One step of Horner's rule from the power n + 1 to n, with fewer bits the higher n is. */
interface ShortStep {
  /** The coefficient of y^n with the bits of this step. */
  readonly coefficient: bigint;
  /** Bits of the sum that comes from step n + 1. */
  readonly shift: bigint;
  /** Bits that this step goes without, as a number for comparing and as a big integer. */
  readonly drop: number;
  readonly down: bigint;
}

/** A power series with coefficients 1/d_n for integers d_n, prepared for arguments |y| < 2^-reduction. */
export interface ShortSeries {
  /** From the highest power down to the power 0. */
  readonly steps: readonly ShortStep[];
  /** The coefficients beyond those of the steps, as doubles. */
  readonly tail: readonly number[];
  /** 2^tailBits; the tail is rounded to tailBits fraction bits, so that it is an exact double below 2^53. */
  readonly tailScale: number;
}

/** Terms of the tail: they fall by 2^-reduction, at most 2^-20, each. */
const TAIL_TERMS = 4;
/** Denominators up to 2^900 keep the scale of the tail a double. */
const LARGEST_LOG2 = 900;

/** Whole digits of big integers that the power n may go without: its error carries y^n < 2^(-reduction n), 6 bits to spare. */
function droppedBits(n: number, reduction: number): number {
  return 64 * Math.floor(Math.max(0, reduction * n - 6) / 64);
}

/**
 * Denominators are given by their place; |d_n| >= 1 must not fall. From the power k on where 2^(-reduction k)/d_k 2^-52 is
 * below half a working ulp, the rest of the series is right with its bracket in doubles: each of its roundings is 2^-53
 * relative, those of the higher terms carry y, and y is known to 2^-52 there.
 */
export function shortSeries(working: number, reduction: number, denominator: (n: number) => bigint): ShortSeries {
  const log2 = (n: number): number => bitLength(denominator(n)) - 1;
  let first = 1;
  while (reduction * first + log2(first) + 52 < working + 1) first++;
  const tailBits = 52 + Math.min(log2(first), LARGEST_LOG2);
  const steps: ShortStep[] = [];
  for (let n = 0; n < first; n++) {
    const drop = droppedBits(n, reduction);
    const shift = n + 1 < first ? working - droppedBits(n + 1, reduction) : tailBits;
    const coefficient = (1n << BigInt(working - drop)) / denominator(n);
    steps.unshift({ coefficient, shift: BigInt(shift), drop, down: BigInt(drop) });
  }
  const tail = Array.from({ length: TAIL_TERMS }, (_, k) => 1 / Number(denominator(first + k)));
  return { steps, tail, tailScale: 2 ** tailBits };
}

/**
 * The series at |y| < 2^-reduction, `rough` the same to 2^-52. Error below 4 ulps: 1 for the last shift, 1/2 for the tail;
 * step n errs by 3 of its units (shift, coefficient, cut of y), which y^n makes 3/64 ulp or less, for at most 50 steps.
 */
export function sumShortSeries({ steps, tail, tailScale }: ShortSeries, y: bigint, rough: number): bigint {
  let bracket = 0;
  for (let k = tail.length - 1; k >= 0; k--) bracket = bracket * rough + (tail[k] as number);
  let sum = BigInt(Math.round(bracket * tailScale));
  let short = y;
  let dropped = 0;
  for (let k = 0; k < steps.length; k++) {
    const { coefficient, shift, drop, down } = steps[k] as ShortStep;
    if (drop !== dropped) {
      short = drop === 0 ? y : y >> down;
      dropped = drop;
    }
    sum = coefficient + ((short * sum) >> shift);
  }
  return sum;
}
