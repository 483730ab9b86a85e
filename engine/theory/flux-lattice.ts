import { Rational } from '../exact/rational';
import type { Group } from '../lie/group';

/**
 * Whether a vector of printed coordinates lies on the cocharacter lattice: whether every weight of the group takes an
 * integer on it, as fluxes have to.
 */
export function isCocharacter({ cocharacters }: Group, vector: readonly Rational[]): boolean {
  // Elimination on the columns (basis | vector); the lattice is spanned by the basis, so that a solution is unique.
  const rows = vector.map((entry, i) => [...cocharacters.map((basis) => basis[i] ?? Rational.zero), entry]);
  const rank = cocharacters.length;
  for (let k = 0; k < rank; k++) {
    const pivot = rows.findIndex((row, i) => i >= k && !(row[k] as Rational).isZero());
    if (pivot < 0) return false;
    [rows[k], rows[pivot]] = [rows[pivot] as Rational[], rows[k] as Rational[]];
    const lead = rows[k] as Rational[];
    const scale = lead[k] as Rational;
    rows[k] = lead.map((entry) => entry.div(scale));
    rows.forEach((row, i) => {
      const factor = row[k] as Rational;
      if (i === k || factor.isZero()) return;
      rows[i] = row.map((entry, j) => entry.sub(factor.mul((rows[k] as Rational[])[j] as Rational)));
    });
  }
  return rows.every((row, i) => (i < rank ? (row[rank] as Rational).isInteger() : (row[rank] as Rational).isZero()));
}
