/**
 * True when -a is a sum of non-negative multiples of the periods up to `width`. Every period but the smallest is
 * counted up, so the work is the product of |a|/period over those.
 */
export function isLatticePoint(a: number, periods: readonly number[], width: number): boolean {
  const [first, ...rest] = periods;
  if (first === undefined) return Math.abs(a) <= width;
  if (rest.length === 0) {
    const count = Math.round(-a / first);
    return count >= 0 && Math.abs(a + count * first) <= width;
  }
  for (let at = a; at <= width; at += first) if (isLatticePoint(at, rest, width)) return true;
  return false;
}
