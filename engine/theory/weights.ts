import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import type { WeightVectors } from '../lie/index-pattern';
import type { WeightOrbit } from '../lie/orbit';
import type { Representation } from '../lie/representation';
import { parseRepresentation } from '../lie/representation';
import type { Weight, WeightRows, WeightSet } from '../product/factor';
import type { Theory, TheoryGroup } from './theory';

/** One group's share in a set of weights: an orbit of its Weyl group, or the opposite one. */
export interface WeightPart {
  /** Index into the theory's groups. */
  readonly group: number;
  readonly orbit: WeightOrbit;
}

/** A set of weights that a factor runs over, with the number of times it occurs; null is the zero weight. */
export interface WeightedSet {
  readonly weights: TheoryWeights | null;
  readonly multiplicity: number;
}

/**
 * The product of one Weyl orbit for each group that acts: all sums of one weight from each part. Parts with the zero
 * weight are left out, so that a set with no parts does not occur.
 */
export class TheoryWeights implements WeightSet {
  readonly key: string;
  readonly oppositeKey: string;
  readonly size: number;
  readonly parts: readonly WeightPart[];
  private readonly groups: readonly TheoryGroup[];

  constructor(groups: readonly TheoryGroup[], parts: readonly WeightPart[]) {
    this.groups = groups;
    this.parts = parts;
    this.key = parts.map(({ group, orbit }) => `${group}:${orbit.key}`).join(' ');
    this.oppositeKey = parts.map(({ group, orbit }) => `${group}:${orbit.conjugateKey}`).join(' ');
    this.size = parts.reduce((product, { orbit }) => product * orbit.size, 1);
  }

  opposite(): this {
    const parts = this.parts.map(({ group, orbit }) => ({ group, orbit: orbit.conjugate() }));
    return new TheoryWeights(this.groups, parts) as this;
  }

  weights(): readonly Weight[] {
    return this.sums(false);
  }

  half(): readonly Weight[] {
    return this.sums(true);
  }

  rows(half: boolean): WeightRows {
    const groups = this.parts.map(({ group }) => this.groups[group] as TheoryGroup);
    const names = groups.flatMap(independentNames);
    let rows: number[][] = [[]];
    this.parts.forEach(({ orbit }, k) => {
      const own = independentRows(groups[k] as TheoryGroup, orbit, half && k === 0);
      rows = rows.flatMap((row) => own.map((more) => [...row, ...more]));
    });
    const fluxes = groups.flatMap((group) =>
      independentNames(group).map((name) => (group.role === 'gauge' ? fluxOf(group, name) : null)),
    );
    return { names, fluxes, rows: Float64Array.from(rows.flat()) };
  }

  /** With `half`, the first part gives one of each pair, which leaves one of each pair of sums. */
  private sums(half: boolean): readonly Weight[] {
    let sums: Weight[] = [{ position: Form.zero, flux: Form.zero }];
    this.parts.forEach(({ group, orbit }, k) => {
      const forms = orbitForms(this.groups[group] as TheoryGroup, orbit, half && k === 0);
      sums = sums.flatMap((sum) =>
        forms.map((form) => ({ position: sum.position.add(form.position), flux: sum.flux.add(form.flux) })),
      );
    });
    return sums;
  }
}

/** The flux that goes with a coordinate. */
function fluxOf({ coordinates, fluxes }: TheoryGroup, coordinate: string): string {
  return fluxes[coordinates.indexOf(coordinate)] ?? coordinate;
}

function independentNames({ coordinates, dependent }: TheoryGroup): string[] {
  return coordinates.filter((name) => !dependent.has(name));
}

/** Weights of an orbit on the independent coordinates: what a dependent one contributes is spread over the others. */
function independentRows(group: TheoryGroup, orbit: WeightOrbit, half: boolean): number[][] {
  const { denominator, vectors, width } = half ? orbit.halfVectors() : orbit.vectors();
  const { independent, dependent } = group.group;
  return Array.from({ length: vectors.length / width }, (_, row) => {
    const entry = (k: number): number => (vectors[row * width + k] as number) / denominator;
    return independent.map((coordinate) =>
      dependent.reduce((sum, { coordinate: bound, terms }) => {
        const share = terms.find((term) => term.coordinate === coordinate)?.coefficient.toNumber() ?? 0;
        return sum + share * entry(bound);
      }, entry(coordinate)),
    );
  });
}

function orbitForms(group: TheoryGroup, orbit: WeightOrbit, half: boolean): readonly Weight[] {
  return weightForms(group, half ? orbit.halfVectors() : orbit.vectors());
}

/** Weights of one group in printed coordinates as linear forms on its positions and fluxes. */
export function weightForms(group: TheoryGroup, { denominator, vectors, width }: WeightVectors): readonly Weight[] {
  const positions = group.coordinates.map((name) => group.dependent.get(name) ?? Form.symbol(name));
  const fluxes = positions.map((form) => form.substitute((name) => Form.symbol(fluxOf(group, name))));
  return Array.from({ length: vectors.length / width }, (_, row) => {
    const entries = Array.from(vectors.subarray(row * width, (row + 1) * width));
    const combine = (forms: readonly Form[]): Form =>
      Form.sum(entries.flatMap((n, k) => (n === 0 ? [] : [(forms[k] as Form).scale(Rational.of(n, denominator))])));
    return { position: combine(positions), flux: group.role === 'gauge' ? combine(fluxes) : Form.zero };
  });
}

/** The weights of a multiplet, one set for each choice of an orbit in every group. */
export function matterWeights(
  groups: readonly TheoryGroup[],
  representations: readonly Representation[],
): readonly WeightedSet[] {
  let choices: { parts: WeightPart[]; multiplicity: number }[] = [{ parts: [], multiplicity: 1 }];
  representations.forEach((representation, group) => {
    choices = choices.flatMap(({ parts, multiplicity }) =>
      representation.orbits().map((orbit) => ({
        parts: orbit.isZero ? parts : [...parts, { group, orbit }],
        multiplicity: multiplicity * orbit.multiplicity,
      })),
    );
  });
  return choices.map(({ parts, multiplicity }) => ({
    weights: parts.length === 0 ? null : new TheoryWeights(groups, parts),
    multiplicity,
  }));
}

/** The roots of one gauge group, an orbit for each length and simple factor. */
export function rootWeights(theory: Theory, index: number): readonly { readonly weights: TheoryWeights }[] {
  const group = theory.groups[index] as TheoryGroup;
  const adjoint = parseRepresentation(group.group, 'adj');
  if (adjoint.kind !== 'representation') return [];
  return adjoint.representation
    .orbits()
    .filter((orbit) => !orbit.isZero)
    .map((orbit) => ({ weights: new TheoryWeights(theory.groups, [{ group: index, orbit }]) }));
}
