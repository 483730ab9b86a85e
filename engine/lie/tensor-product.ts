import { Rational } from '../exact/rational';
import { dominantCharacter } from './character';
import type { Group } from './group';
import { dimension } from './invariants';
import { LabelIndex } from './label-index';
import { weightKey } from './orbit';
import { type Refusal, refusal } from './refusal';
import { collect, type Term, term, trivialTerm } from './terms';
import { makeDominant, orbitLabels } from './weyl';

/**
 * Number of weight additions a product of representations may take: about a second in a browser. It bounds tensor
 * products and powers alike.
 */
const ADDITIONS_ALLOWED = 2_000_000;

/** The weights of a sum of representations: label rows of whole orbits, each with a charge and a multiplicity. */
interface WeightRows {
  readonly rows: Int16Array;
  readonly charge: Rational;
  readonly multiplicity: number;
}

/** Counts the additions left; shared by all steps of one request. */
export interface Budget {
  left: number;
}

export function newBudget(): Budget {
  return { left: ADDITIONS_ALLOWED };
}

function weightCount(group: Group, terms: readonly Term[], limit: number): number | null {
  let count = 0;
  for (const { labels } of terms) {
    const character = dominantCharacter(group.system, labels, limit - count);
    if (!character) return null;
    count += character.weights;
  }
  return count;
}

function weightRows(group: Group, terms: readonly Term[]): WeightRows[] {
  const { rank } = group.system;
  return terms.flatMap(({ labels, charge, multiplicity }) => {
    const character = dominantCharacter(group.system, labels);
    if (!character) throw new Error('The weights were counted before.');
    return Array.from({ length: character.count }, (_, k) => ({
      rows: orbitLabels(group.system, character.labels.subarray(k * rank, (k + 1) * rank)),
      charge,
      multiplicity: multiplicity * (character.multiplicities[k] as number),
    }));
  });
}

/**
 * The (virtual) product of a sum of irreducible representations with the character sum over weights of e^{stretch w}:
 * every weight is added to lambda + rho and reflected into the dominant chamber, with the sign of the reflection
 * (Klimyk, AMS Transl. 76 (1968) 63; for virtual factors Brauer, C. R. Acad. Sci. Paris 204 (1937) 1784).
 */
function addWeights(group: Group, terms: readonly Term[], weights: readonly WeightRows[], stretch: number): Term[] {
  const { rank } = group.system;
  const moved = new Int32Array(rank);
  const byCharge = new Map<string, { charge: Rational; found: LabelIndex; counts: number[] }>();
  for (const { labels, charge, multiplicity } of terms) {
    for (const { rows, charge: added, multiplicity: copies } of weights) {
      const total = charge.add(added.mul(Rational.of(stretch)));
      let sums = byCharge.get(total.toString());
      if (!sums) {
        sums = { charge: total, found: new LabelIndex(rank), counts: [] };
        byCharge.set(total.toString(), sums);
      }
      const { found, counts } = sums;
      // Without a simple part there is one empty row.
      for (let start = 0; start === 0 || start < rows.length; start += Math.max(rank, 1)) {
        for (let i = 0; i < rank; i++) moved[i] = (labels[i] as number) + 1 + stretch * (rows[start + i] as number);
        const sign = makeDominant(group.system, moved) % 2 === 0 ? 1 : -1;
        // On a wall of the chamber the contributions cancel.
        if (moved.includes(0)) continue;
        const place = found.add(moved);
        counts[place] = (counts[place] ?? 0) + sign * multiplicity * copies;
      }
    }
  }
  return [...byCharge.values()].flatMap(({ charge, found, counts }) =>
    counts.flatMap((count, place) => {
      if (count === 0) return [];
      const dominant = Array.from(found.rows.subarray(place * rank, (place + 1) * rank), (label) => label - 1);
      return [term(dominant, charge, count)];
    }),
  );
}

function tooLarge(): Refusal {
  return refusal(
    'product-too-large',
    'The product of these representations is too large to decompose.',
    `It would take more than ${ADDITIONS_ALLOWED / 1_000_000} million additions of weights.`,
    'Take smaller representations or a lower power.',
  );
}

/** Decomposition of the product of two sums of irreducible representations. */
export function tensorProduct(
  group: Group,
  left: readonly Term[],
  right: readonly Term[],
  budget: Budget,
): readonly Term[] | Refusal {
  const size = (terms: readonly Term[]): bigint =>
    terms.reduce((sum, { labels }) => sum + dimension(group.system, labels), 0n);
  const [large, small] = size(left) >= size(right) ? [left, right] : [right, left];
  const count = weightCount(group, small, budget.left / large.length);
  if (count === null) return tooLarge();
  budget.left -= count * large.length;
  return byDimension(group, addWeights(group, large, weightRows(group, small), 1));
}

/**
 * Symmetric or antisymmetric power by Newton's identity k h_k = sum_i psi^i h_{k-i} (signs (-1)^{i-1} for the
 * antisymmetric one), where the Adams operation psi^i stretches weights by i; all in the basis of irreducible
 * representations, so that no large character is formed.
 */
export function tensorPower(
  group: Group,
  kind: 'sym' | 'alt',
  power: number,
  terms: readonly Term[],
  budget: Budget,
): readonly Term[] | Refusal {
  const count = weightCount(group, terms, budget.left);
  if (count === null) return tooLarge();
  const weights = weightRows(group, terms);
  const powers: (readonly Term[])[] = [[trivialTerm(group)]];
  for (let k = 1; k <= power; k++) {
    const sums: Term[] = [];
    for (let i = 1; i <= k; i++) {
      const lower = powers[k - i] as readonly Term[];
      budget.left -= count * lower.length;
      if (budget.left < 0) return tooLarge();
      const sign = kind === 'alt' && i % 2 === 0 ? -1 : 1;
      for (const one of addWeights(group, lower, weights, i))
        sums.push({ ...one, multiplicity: sign * one.multiplicity });
    }
    powers.push(collect(sums).map((one) => ({ ...one, multiplicity: one.multiplicity / k })));
  }
  return byDimension(group, powers[power] as readonly Term[]);
}

/** Largest dimension first; equal ones by labels, then charge, so that the order never depends on the route. */
export function byDimension(group: Group, terms: readonly Term[]): Term[] {
  return terms
    .map((one) => ({ one, size: dimension(group.system, one.labels), key: weightKey(one.labels, one.charge) }))
    .sort((a, b) => (a.size === b.size ? (a.key < b.key ? 1 : -1) : a.size < b.size ? 1 : -1))
    .map(({ one }) => one);
}
