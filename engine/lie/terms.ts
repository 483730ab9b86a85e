import { Rational } from '../exact/rational';
import type { Group } from './group';
import { weightKey } from './orbit';
import { conjugateLabels } from './weyl';

/** An irreducible representation, named by its highest weight, and how often it occurs in a sum. */
export interface Term {
  /** Dynkin labels, simple parts one after the other. */
  readonly labels: readonly number[];
  /** Charge under the U(1) of U(n), where it is the sum of the entries of the highest weight, or of U(1); else zero. */
  readonly charge: Rational;
  readonly multiplicity: number;
}

export function term(labels: readonly number[], charge = Rational.zero, multiplicity = 1): Term {
  return { labels, charge, multiplicity };
}

export function trivialTerm(group: Group): Term {
  return term(group.system.rho.map(() => 0));
}

/** Equal highest weights added up, zero multiplicities dropped, in order of first occurrence. */
export function collect(terms: readonly Term[]): Term[] {
  const sums = new Map<string, Term>();
  for (const one of terms) {
    const key = weightKey(one.labels, one.charge);
    const known = sums.get(key);
    sums.set(key, known ? { ...one, multiplicity: known.multiplicity + one.multiplicity } : one);
  }
  return [...sums.values()].filter(({ multiplicity }) => multiplicity !== 0);
}

export function conjugateTerms(group: Group, terms: readonly Term[]): Term[] {
  return terms.map(({ labels, charge, multiplicity }) =>
    term(conjugateLabels(group.system, labels), charge.neg(), multiplicity),
  );
}

/** Highest weight (l_1, .., l_n) of U(n) as labels and charge. */
export function unitaryTerm(entries: readonly number[]): Term {
  const labels = entries.slice(1).map((entry, i) => (entries[i] as number) - entry);
  return term(labels, Rational.of(entries.reduce((sum, entry) => sum + entry, 0)));
}

/** Inverse of unitaryTerm. */
export function unitaryWeight({ labels, charge }: Term): number[] {
  const partial: number[] = [0];
  for (const label of [...labels].reverse()) partial.unshift((partial[0] as number) + label);
  const last = (Number(charge.numerator) - partial.reduce((sum, entry) => sum + entry, 0)) / partial.length;
  return partial.map((entry) => entry + last);
}
