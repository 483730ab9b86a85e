import type { Form } from '../exact/form';
import { binomialCoefficients, polynomialIn } from './polynomial';
import type { Tower, TowerFactor } from './tower';

/**
 * multiplicity times the tower of all w.n + shift, n >= 0, one period for each entry: log det is -multiplicity
 * log Gamma_N(shift|periods).
 */
export interface BarnesTerm {
  readonly place: number;
  /** Sorted by key; a period repeated k times stands for a multiplicity binomial(n + k - 1, k - 1). */
  readonly periods: readonly Form[];
  readonly shift: Form;
  readonly multiplicity: Form;
}

/** A linear form of a tower in several indices, without exponent and power, in Barnes terms. */
export function barnesTerms(tower: Tower, factor: TowerFactor & { kind: 'linear' }): BarnesTerm[] {
  return binomialBasis(tower.degeneracy, tower.indices).map(({ orders, coefficient }) => ({
    place: tower.place,
    periods: sortedPeriods(factor.periods.flatMap((w, i) => Array.from({ length: (orders[i] ?? 0) + 1 }, () => w))),
    shift: factor.constant,
    multiplicity: coefficient,
  }));
}

export function sortedPeriods(periods: readonly Form[]): Form[] {
  return [...periods].sort((a, b) => (a.key < b.key ? -1 : a.key > b.key ? 1 : 0));
}

export function periodsKey(periods: readonly Form[]): string {
  return periods.map(({ key }) => key).join(' ; ');
}

/** D(j) = sum of coefficient times product of binomial(j_i + orders_i, orders_i). */
function binomialBasis(
  degeneracy: Form,
  indices: readonly string[],
): { readonly orders: readonly number[]; readonly coefficient: Form }[] {
  const [first, ...rest] = indices;
  if (first === undefined) return degeneracy.isZero() ? [] : [{ orders: [], coefficient: degeneracy }];
  return binomialCoefficients(polynomialIn(degeneracy, first) ?? []).flatMap((q, order) =>
    binomialBasis(q, rest).map(({ orders, coefficient }) => ({ orders: [order, ...orders], coefficient })),
  );
}
