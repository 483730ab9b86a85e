import type { Form } from '../exact/form';
import { Rational } from '../exact/rational';

/**
 * Integers k_i with difference = sum_i k_i periods_i, where that holds identically in all symbols; null where it does
 * not. If the periods are linearly dependent over the rationals, only multiples of one period are recognised.
 */
export function latticeOffset(difference: Form, periods: readonly Form[]): readonly number[] | null {
  if (difference.isZero()) return periods.map(() => 0);
  const solved = solve(difference, periods);
  if (solved !== null) return solved.every((k) => k.isInteger()) ? solved.map((k) => Number(k.numerator)) : null;
  for (const [place, w] of periods.entries()) {
    const ratio = difference.div(w).toRational();
    if (ratio?.isInteger()) return periods.map((_, i) => (i === place ? Number(ratio.numerator) : 0));
  }
  return null;
}

/** Rational solution by elimination over the monomials; null where there is none or more than one. */
function solve(difference: Form, periods: readonly Form[]): Rational[] | null {
  const keys = new Set<string>();
  const vectors = [...periods, difference].map((form) => coordinates(form, keys));
  const rows = [...keys].map((key) => vectors.map((v) => v.get(key) ?? Rational.zero));
  const unknowns = periods.length;
  let done = 0;
  for (let column = 0; column < unknowns; column++) {
    const pivot = rows.findIndex((row, k) => k >= done && !(row[column] as Rational).isZero());
    if (pivot < 0) return null;
    const [lead] = rows.splice(pivot, 1) as [Rational[]];
    const inverse = Rational.one.div(lead[column] as Rational);
    const scaled = lead.map((c) => c.mul(inverse));
    rows.forEach((row, k) => {
      const factor = row[column] as Rational;
      if (!factor.isZero()) rows[k] = row.map((c, i) => c.sub(factor.mul(scaled[i] as Rational)));
    });
    rows.splice(done, 0, scaled);
    done++;
  }
  const consistent = rows.slice(done).every((row) => (row[unknowns] as Rational).isZero());
  return consistent ? rows.slice(0, unknowns).map((row) => row[unknowns] as Rational) : null;
}

/** Real and imaginary coefficient of every monomial. */
function coordinates(form: Form, keys: Set<string>): Map<string, Rational> {
  const result = new Map<string, Rational>();
  for (const { coefficient, factors } of form.terms) {
    const monomial = factors.map(({ atom, power }) => `${atom.key}^${power}`).join('*');
    for (const [part, value] of [
      ['re', coefficient.re],
      ['im', coefficient.im],
    ] as const) {
      if (value.isZero()) continue;
      keys.add(`${part} ${monomial}`);
      result.set(`${part} ${monomial}`, value);
    }
  }
  return result;
}
