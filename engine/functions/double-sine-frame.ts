import { bitLength, numberFromFixed } from '../arithmetic/fixed';
import type { ContourHeight } from './double-sine-heights';
import { contourHeights } from './double-sine-heights';
import type { ExactPeriod } from './double-sine-period';
import { orderedPeriods, reducedSquare } from './double-sine-period';

/** What log s_b needs of b and of the precision before any table: periods, resonance, guard bits, contours. */
export interface DoubleSineFrame {
  /** Fraction bits of arguments and results. */
  readonly bits: number;
  /** Fraction bits inside. */
  readonly precision: number;
  /** Fraction bits of the constants below: small divisors enter tables squared, and arguments up to 2^40 multiply them. */
  readonly constantBits: number;
  readonly small: bigint;
  readonly large: bigint;
  readonly smallApprox: number;
  readonly largeApprox: number;
  /** Q = b + 1/b. */
  readonly q: number;
  /** Discretisation and truncation aim at e^-length. */
  readonly length: number;
  /** small^2 = p/q where the poles in reach contain double ones (n small = m large at q | n, p | m); else null. */
  readonly resonance: { readonly p: number; readonly q: number } | null;
  /** log2 of the largest 1/|n sin(pi n beta^2)| over both lattices, at least 0. */
  readonly guard: number;
  /** Contours up to twice the height the near formula needs: the far formula needs as much. */
  readonly contours: readonly ContourHeight[];
}

/** Truncation and discretisation errors stay this many bits below an ulp of the result. */
const TARGET_GUARD = 12;

/** Rounding: log2 of the constant in `roundingBound` of double-sine-core.ts, and 8 bits to push it below the last ulp. */
const ROUNDING_GUARD = 24;

/** Closeness of b^2 to a rational number that is followed by more bits; beyond it the case counts as not resolved. */
const LARGEST_GUARD = 1 << 13;

/** The frame, or null where b^2 lies so near a rational number (2^-8192) that the small divisors cannot be resolved. */
export function doubleSineFrame(b: ExactPeriod, bits: number): DoubleSineFrame | null {
  const rough = orderedPeriods(b, 64);
  const smallApprox = Math.min(1, numberFromFixed(rough.small, 64));
  const largeApprox = Math.max(1, numberFromFixed(rough.large, 64));
  const q = smallApprox + largeApprox;
  const length = (bits + TARGET_GUARD) * Math.LN2;
  const contours = contourHeights((2 * length) / q, smallApprox, largeApprox);
  const highest = contours[contours.length - 1] as ContourHeight;
  const square = reducedSquare(b);
  const resonance =
    square !== null && square.q <= BigInt(highest.belowSmall) ? { p: Number(square.p), q: Number(square.q) } : null;
  const guard = smallDivisorGuard(b, highest, resonance);
  if (guard === null) return null;
  // W_0 grows like Q^2 (see the table); 18 bits less than full digits, so that the elementary functions fit into the same digits.
  const needed = bits + ROUNDING_GUARD + guard + 2 * Math.ceil(Math.log2(q));
  const precision = 64 * Math.ceil((needed + 18) / 64) - 18;
  const constantBits = precision + 2 * guard + 2 * Math.ceil(Math.log2(q)) + 80;
  const { small, large } = orderedPeriods(b, constantBits);
  return {
    bits,
    precision,
    constantBits,
    small,
    large,
    smallApprox,
    largeApprox,
    q,
    length,
    resonance,
    guard,
    contours,
  };
}

/**
 * ceil log2 max 1/|n sin(pi n beta^2)| over the poles below the highest contour that are not double: |sin(pi y)| >= 2 dist(y, Z).
 * Null beyond LARGEST_GUARD.
 */
function smallDivisorGuard(
  b: ExactPeriod,
  highest: ContourHeight,
  resonance: DoubleSineFrame['resonance'],
): number | null {
  for (let bits = 128; bits <= 2 * LARGEST_GUARD; bits *= 4) {
    const { small, large } = orderedPeriods(b, bits);
    const shift = BigInt(bits);
    const inSmall = largestDivisor((small * small) >> shift, highest.belowSmall, resonance?.q ?? 0, bits);
    const inLarge = largestDivisor((large * large) >> shift, highest.belowLarge, resonance?.p ?? 0, bits);
    const guard = Math.max(inSmall, inLarge);
    // The distances are known to 2^-bits times n and the size of beta: trust them down to half of the bits.
    if (guard < bits / 2) return Math.max(0, guard);
  }
  return null;
}

function largestDivisor(square: bigint, count: number, skip: number, bits: number): number {
  const half = 1n << BigInt(bits - 1);
  let largest = 0;
  for (let n = 1, angle = square; n <= count; n++, angle += square) {
    if (skip !== 0 && n % skip === 0) continue;
    const fraction = BigInt.asUintN(bits, angle);
    const distance = fraction > half ? (half << 1n) - fraction : fraction;
    largest = Math.max(largest, bits - bitLength(distance) - Math.floor(Math.log2(n)));
  }
  return largest;
}
