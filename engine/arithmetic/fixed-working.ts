/** Guard bits of the elementary functions: their own rounding stays below 2^6 working ulps, see each function. */
const KERNEL_GUARD = 10;

/**
 * Working precision of the elementary functions for a result with `bits` fraction bits.
 * It fills whole 64-bit digits (with room for values below 16), so close precisions share tables and no digit is wasted.
 */
export function workingBits(bits: number): number {
  return 64 * Math.ceil((bits + KERNEL_GUARD + 4) / 64) - 4;
}

/** Above this working precision sums run by rectangular splitting, and tables have fewer entries. */
export const LONG_BITS = 1000;

/** Bits of one table chunk: an argument below 1 is split into three chunks and a rest below 2^-(3 chunk). */
export function chunkBits(working: number): number {
  return working > LONG_BITS ? 6 : 8;
}

/**
 * The same for the exponential: its single numbers (not pairs) make larger tables worth their time, up to a millisecond for
 * 3 2^10 products.
 */
export function exponentialChunk(working: number): number {
  return working > LONG_BITS ? 8 : 10;
}

/** One term of a power series with rational coefficients, prepared for summation from the highest power down. */
interface SeriesStep {
  /** Divide the sum so far by this before adding the term; 0n: no division. */
  readonly divisor: bigint;
  readonly coefficient: bigint;
}

/** sum_k coefficient_k y^k, coefficients as integers over common denominators, blocks of `block` powers. */
export interface SeriesPlan {
  readonly block: number;
  readonly steps: readonly SeriesStep[];
}

/** Coefficients stay below 2^60, so that BigInt products with them and divisions by them take one digit. */
const SMALL = 1n << 58n;

/**
 * Plan for sum_{k < terms} sign^k y^k / (r_1 ... r_k) with small integers r_k = ratio(k).
 * Rectangular splitting (Paterson and Stockmeyer 1973; Smith 1989): about 2 sqrt(terms) long products, the rest one digit each.
 */
export function planSeries(terms: number, sign: 1n | -1n, ratio: (k: number) => bigint): SeriesPlan {
  const steps: SeriesStep[] = [];
  let coefficient = 1n;
  for (let k = terms - 1; k >= 0; k--) {
    let divisor = 0n;
    if (k < terms - 1) {
      const grown = coefficient * ratio(k + 1);
      if (grown < SMALL) {
        coefficient = grown;
      } else {
        divisor = grown;
        coefficient = 1n;
      }
    }
    steps.push({ divisor, coefficient: sign < 0n && k % 2 === 1 ? -coefficient : coefficient });
  }
  // One last division brings the whole sum to denominator 1: coefficient(k = 0) = r_1 ... r_j of the lowest group.
  steps.push({ divisor: coefficient, coefficient: 0n });
  return { block: Math.max(1, Math.ceil(Math.sqrt(terms))), steps };
}

/** Powers y^0 .. y^block with `bits` fraction bits; y^0 is 1. */
export function planPowers(y: bigint, block: number, bits: number): bigint[] {
  const shift = BigInt(bits);
  const powers = [1n << shift, y];
  for (let i = 2; i <= block; i++)
    powers.push(((powers[i >> 1] as bigint) * (powers[(i + 1) >> 1] as bigint)) >> shift);
  return powers;
}

/**
 * Value of the plan at y (0 <= y < 2^-12) given its powers; error below 6 ulps: y^k, k >= 2, errs by less than 2 and enters with
 * 1/(r_1 ... r_k) <= 1/2, 1/6, ... (below 2 in all); the last division 1; what earlier divisions and steps cut carries a later
 * division or a factor y^block (below 1).
 */
export function sumPlan(plan: SeriesPlan, powers: readonly bigint[], bits: number): bigint {
  const { block, steps } = plan;
  const shift = BigInt(bits);
  const step = powers[block] as bigint;
  const terms = steps.length - 1;
  let sum = 0n;
  for (let i = 0; i < terms; i++) {
    const { divisor, coefficient } = steps[i] as SeriesStep;
    const place = (terms - 1 - i) % block;
    if (place === block - 1 && i > 0) sum = (sum * step) >> shift;
    if (divisor !== 0n) sum /= divisor;
    sum += coefficient * (powers[place] as bigint);
  }
  return sum / (steps[terms] as SeriesStep).divisor;
}

/** Number of Taylor terms of exp at an argument below 2^-reduction: stops when reduction n + log2 n! > bits. */
export function exponentialTerms(bits: number, reduction: number): number {
  let n = 0;
  for (let reached = 0; reached <= bits + 2; n++) reached += reduction + Math.log2(n + 1);
  return n;
}
