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

/**
 * Squared distances l^2 - z^2 up to this many units of 2^-(bits + further) count as none, where z has `bits` bits, |z| is
 * about `size` and a unit in each part of z is not known.
 */
export function closestSquare(size: number, further: number): bigint {
  return BigInt(Math.ceil(8 * size) + 1) << BigInt(further);
}

/**
 * Error in units from one unit in each part of the argument, for a derivative bounded by `slope` there, and from rounding:
 * within sqrt(2) of at least 4 units around a point next to a zero the derivative grows by less than 1.55.
 */
export function argumentShare(slope: number): bigint {
  return BigInt(Math.ceil(2.2 * slope)) + 3n;
}
