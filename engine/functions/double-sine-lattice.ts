import type { ExactPeriod } from './double-sine-period';
import { orderedPeriods, reducedSquare } from './double-sine-period';

/** Where a point of the imaginary axis stands to the lattice Q/2 + m b + n/b, m, n >= 0 (poles above, zeros below the real axis). */
export type LatticePlace =
  | { readonly kind: 'off' }
  | { readonly kind: 'on'; readonly order: number }
  | { readonly kind: 'indistinct' };

/**
 * Compares y = Im x >= 0 (`bits` fraction bits) with the lattice to one ulp. Lattice points within an ulp that coincide exactly (decided
 * by the integers of b^2 = p/q) make one point of that order; different ones cannot be told apart at this precision.
 */
export function placeOnLattice(y: bigint, b: ExactPeriod, bits: number): LatticePlace {
  const guard = 16;
  const { small, large } = orderedPeriods(b, bits + guard);
  const ulp = 1n << BigInt(guard);
  const from = (y << BigInt(guard)) - ((small + large) >> 1n);
  const found: { m: bigint; n: bigint }[] = [];
  for (let n = 0n, left = from; left >= -ulp - ulp; n++, left -= large) {
    // m next to left / small.
    const m = left < 0n ? 0n : (2n * left + small) / (2n * small);
    const distance = left - m * small;
    // One ulp, and 2^-8 ulp for the constants.
    if ((distance < 0n ? -distance : distance) <= ulp + (ulp >> 8n)) found.push({ m, n });
  }
  const first = found[0];
  if (first === undefined) return { kind: 'off' };
  const square = reducedSquare(b);
  for (const { m, n } of found) {
    // (m - m') small + (n - n') large = 0 exactly when (m - m') p + (n - n') q = 0.
    const same =
      square === null ? m === first.m && n === first.n : (m - first.m) * square.p + (n - first.n) * square.q === 0n;
    if (!same) return { kind: 'indistinct' };
  }
  return { kind: 'on', order: found.length };
}
