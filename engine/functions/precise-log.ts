import { absoluteComplex, type FixedComplex } from '../arithmetic/fixed-complex';

/** Arguments are known to one unit in each part; closer to a zero or pole than this many units nothing can be said. */
const INDISTINCT = 4n;

/** True when a quantity of which each part is known to one unit may be zero. */
export function isIndistinct(distance: FixedComplex): boolean {
  return absoluteComplex(distance) < INDISTINCT;
}

/**
 * Error in units of 2^-bits that one unit in each part of `distance` (a number with `bits` fraction bits) makes in its
 * logarithm: at most 2 sqrt(2)/|distance| as long as |distance| is at least 4 units.
 */
export function argumentError(distance: FixedComplex, bits: number): bigint {
  return (3n << BigInt(bits)) / absoluteComplex(distance) + 1n;
}
