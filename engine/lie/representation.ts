import { Rational } from '../exact/rational';
import { countWeights, dominantCharacter } from './character';
import { evaluate } from './evaluate';
import { allowsLabels, type Group } from './group';
import { cubicAnomaly, dimension, dynkinIndices, realityOf } from './invariants';
import { orbitShape, WeightOrbit, weightKey } from './orbit';
import { type Refusal, refusal } from './refusal';
import { parseExpression } from './representation-grammar';
import { newBudget } from './tensor-product';
import { collect, conjugateTerms, type Term, term } from './terms';
import { notInGlobalForm } from './words';

/** Distinct weights a representation may have where its weights are to be listed. */
export const WEIGHT_LIMIT = 300_000;
/** How a representation relates to its conjugate; 'mixed' is self-conjugate but neither real nor pseudoreal. */
export type RepresentationReality = 'real' | 'pseudoreal' | 'complex' | 'mixed';

/** A finite-dimensional representation: a sum of irreducible ones. Immutable. */
export class Representation {
  readonly group: Group;
  readonly irreps: readonly Term[];
  private orbitList: readonly WeightOrbit[] | undefined;

  constructor(group: Group, irreps: readonly Term[]) {
    this.group = group;
    this.irreps = irreps;
  }

  get isIrreducible(): boolean {
    return this.irreps.length === 1 && this.irreps[0]?.multiplicity === 1;
  }

  get isTrivial(): boolean {
    return this.irreps.every(({ labels, charge }) => charge.isZero() && labels.every((label) => label === 0));
  }

  /** Equal for equal representations of the same group. */
  get key(): string {
    return this.irreps
      .map((one) => `${one.multiplicity}*${weightKey(one.labels, one.charge)}`)
      .sort()
      .join('+');
  }

  get dimension(): bigint {
    return this.sum(({ labels }) => dimension(this.group.system, labels));
  }

  /** Second-order index I2 with respect to each simple part (fundamental of SU(n): 1, adjoint: 2 h_dual). */
  get indices(): readonly bigint[] {
    return this.group.simple.map((_, part) =>
      this.sum(({ labels }) => dynkinIndices(this.group.system, labels)[part] as bigint),
    );
  }

  /**
   * I2 of a group with one simple part; the sum of squared charges for U(1). For SO(4) and Spin(4) the common value of
   * both parts, null where they differ.
   */
  get index(): Rational | null {
    if (this.group.isAbelian) {
      return this.irreps.reduce(
        (sum, one) => sum.add(one.charge.mul(one.charge).mul(Rational.of(one.multiplicity))),
        Rational.zero,
      );
    }
    const [first, ...others] = this.indices;
    return others.every((other) => other === first) ? Rational.of(first as bigint) : null;
  }

  /** Cubic anomaly of the SU(n) part, fundamental = 1; null where there is no cubic invariant. */
  get cubic(): bigint | null {
    if (cubicAnomaly(this.group.system, this.group.system.rho) === null) return null;
    return this.sum(({ labels }) => cubicAnomaly(this.group.system, labels) ?? 0n);
  }

  get reality(): RepresentationReality {
    if (!this.isSelfConjugate) return 'complex';
    if (this.allows('pseudoreal')) return 'real';
    return this.allows('real') ? 'pseudoreal' : 'mixed';
  }

  /** Whether half-hypermultiplets may carry it: whether it has a quaternionic structure. */
  get isQuaternionic(): boolean {
    return this.isSelfConjugate && this.allows('real');
  }

  get isSelfConjugate(): boolean {
    return this.key === this.conjugate().key;
  }

  conjugate(): Representation {
    return new Representation(this.group, conjugateTerms(this.group, this.irreps));
  }

  /** Number of distinct weights. */
  get weightCount(): number {
    return this.orbits().reduce((sum, orbit) => sum + orbit.size, 0);
  }

  /**
   * Whether orbits() and weightCount can be asked for: at most `limit` weights in all (counted once per summand), and
   * few enough dominant ones. Always true for what parseRepresentation returned under that limit.
   */
  hasWeightsWithin(limit: number): boolean {
    let left = limit;
    return this.irreps.every(({ labels }) => {
      const weights = countWeights(this.group.system, labels, left);
      left -= weights ?? 0;
      return weights !== null;
    });
  }

  /** All Weyl orbits with their multiplicities, by decreasing length of the weight within each summand. */
  orbits(): readonly WeightOrbit[] {
    this.orbitList ??= this.findOrbits();
    return this.orbitList;
  }

  private findOrbits(): WeightOrbit[] {
    const { system } = this.group;
    const weights = this.irreps.flatMap(({ labels, charge, multiplicity }) => {
      const character = dominantCharacter(system, labels);
      if (!character) throw new Error('The number of weights was not checked before.');
      return Array.from({ length: character.count }, (_, k) =>
        term(
          [...character.labels.subarray(k * system.rank, (k + 1) * system.rank)],
          charge,
          multiplicity * (character.multiplicities[k] as number),
        ),
      );
    });
    return collect(weights).map(
      (one) => new WeightOrbit(orbitShape(this.group, one.labels, one.charge), one.multiplicity),
    );
  }

  /** Self-conjugate irreducible parts of the given reality occur an even number of times. */
  private allows(odd: 'real' | 'pseudoreal'): boolean {
    return this.irreps.every(
      ({ labels, charge, multiplicity }) =>
        multiplicity % 2 === 0 || !charge.isZero() || realityOf(this.group.system, labels) !== odd,
    );
  }

  private sum(value: (one: Term) => bigint): bigint {
    return this.irreps.reduce((total, one) => total + BigInt(one.multiplicity) * value(one), 0n);
  }
}

export type RepresentationResult =
  | { readonly kind: 'representation'; readonly representation: Representation }
  | Refusal;

// Pure memoisation by group and text: a keystroke elsewhere in the notebook costs nothing here.
const results = new WeakMap<Group, Map<string, RepresentationResult>>();
const RESULTS_KEPT = 500;

/**
 * Reads a cell of the charge table or the right side of a representation request. With `weightLimit` a representation
 * with more distinct weights is refused; with an infinite one only labels and powers are bounded.
 */
export function parseRepresentation(group: Group, text: string, weightLimit = WEIGHT_LIMIT): RepresentationResult {
  let kept = results.get(group);
  if (!kept) {
    kept = new Map();
    results.set(group, kept);
  }
  const key = `${weightLimit} ${text}`;
  const known = kept.get(key);
  if (known) return known;
  const result = read(group, text.trim(), weightLimit);
  if (kept.size >= RESULTS_KEPT) kept.clear();
  kept.set(key, result);
  return result;
}

function read(group: Group, text: string, weightLimit: number): RepresentationResult {
  const parsed = parseExpression(text, group.isAbelian);
  if (parsed.kind === 'refusal') return parsed;
  const found = evaluate(group, parsed.expression, newBudget());
  // Parts of a product may be representations of the cover only; the whole has to be one of the group.
  const refused = 'kind' in found ? undefined : found.find(({ labels }) => !allowsLabels(group, labels));
  const terms = refused === undefined ? found : notInGlobalForm(group, text);
  if ('kind' in terms) return terms;
  const representation = new Representation(group, collect(terms));
  if (weightLimit < Number.POSITIVE_INFINITY && !representation.hasWeightsWithin(weightLimit)) {
    const why = `It has more than ${weightLimit} distinct weights, and each takes a special function.`;
    return refusal(
      'too-many-weights',
      `'${text}' of ${group.name} is too large.`,
      why,
      'Take a smaller representation.',
    );
  }
  return { kind: 'representation', representation };
}
