import { bitLength, shiftRounded } from '../arithmetic/fixed';
import { piFixed } from '../arithmetic/fixed-constants';
import { sinCosFixed } from '../arithmetic/fixed-trig';
import type { DoubleSineFrame } from './double-sine-frame';
import type { ContourHeight } from './double-sine-heights';

/**
 * Real coefficients a_n of a power series in e^theta, theta = factor x, stored as a_n 2^(scale n): the sum runs in z = e^theta 2^-scale
 * with |z| <= 1/2, so that rounding errors do not grow and numbers are no longer than they need be. a_0 = 0: the first pole is n = 1.
 */
export interface ScaledSeries {
  readonly coefficients: readonly bigint[];
  readonly scale: number;
  /** theta / x, with the frame's constantBits. */
  readonly factor: bigint;
}

/** Double poles of rational b^2: their terms carry one series times x and one by itself. */
export interface DoublePoleSeries {
  readonly timesX: ScaledSeries;
  readonly plain: ScaledSeries;
}

/** Fraction bits while tables are built: small divisors enter squared, and up to 2^16 rounding errors add. */
export function buildingBits(frame: DoubleSineFrame): number {
  return frame.constantBits - 48;
}

/** One lattice y = pi n period of poles below a contour; every n divisible by `skip` (where not 0) is a double pole. */
export interface LatticeOfPoles {
  readonly period: bigint;
  readonly approx: number;
  readonly count: number;
  readonly skip: number;
}

export function latticesBelow(
  frame: DoubleSineFrame,
  contour: ContourHeight,
): readonly [LatticeOfPoles, LatticeOfPoles] {
  const { small, large, smallApprox, largeApprox, resonance } = frame;
  return [
    { period: small, approx: smallApprox, count: contour.belowSmall, skip: resonance?.q ?? 0 },
    { period: large, approx: largeApprox, count: contour.belowLarge, skip: resonance?.p ?? 0 },
  ];
}

/** 2 pi period with the frame's constantBits. */
export function twoPiTimes(frame: DoubleSineFrame, period: bigint): bigint {
  return (piFixed(frame.constantBits) * period) >> BigInt(frame.constantBits - 1);
}

/**
 * (-1)^n / (n sin(pi n beta^2)), n = 1 ... count, with buildingBits; null at double poles. Empty when every pole is double.
 * The sines come from one rotation repeated: n roundings, made at most 2^(2 guard) times larger by the division.
 */
export function alternatingCosecants(frame: DoubleSineFrame, lattice: LatticeOfPoles): (bigint | null)[] {
  const { period, count, skip } = lattice;
  if (skip === 1) return [];
  const bits = buildingBits(frame);
  const shift = BigInt(bits);
  const square = shiftRounded(period * period, 2 * frame.constantBits - bits);
  const { sin, cos } = sinCosFixed((piFixed(bits) * square) >> shift, bits);
  const one = 1n << (2n * shift);
  const list: (bigint | null)[] = [];
  let c = cos;
  let s = sin;
  for (let n = 1; n <= count; n++) {
    list.push(skip > 0 && n % skip === 0 ? null : one / (s * BigInt(n % 2 === 0 ? n : -n)));
    const next = (c * cos - s * sin) >> shift;
    s = (s * cos + c * sin) >> shift;
    c = next;
  }
  return list;
}

/** A number at least 0 and at least log2 of every |value| (fixed point with the frame's precision). */
export function log2LargestOf(frame: DoubleSineFrame, lists: readonly (readonly bigint[])[]): number {
  let bits = 0n;
  for (const list of lists) {
    for (const value of list) bits |= value < 0n ? -value : value;
  }
  return Math.max(0, bitLength(bits) - frame.precision);
}
