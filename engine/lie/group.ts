import { Rational } from '../exact/rational';
import { cellMeasure } from './cell-measure';
import {
  type CoordinateBlock,
  dot,
  type ExceptionalName,
  exceptionalLayout,
  type Layout,
  orthogonalLayout,
  simpleCoroots,
  specialUnitaryLayout,
  symplecticLayout,
  unitaryLayout,
  type WeightMap,
  weightMap,
} from './coordinates';
import { type Quotient, quotientLattice, quotientNode } from './quotient';
import { type Refusal, refusal } from './refusal';
import { type RootSystem, rootSystemSum } from './root-system';
import { MAXIMAL_RANK, type SimpleType } from './simple-type';

export type Family = 'U' | 'SU' | 'SO' | 'Spin' | 'USp' | ExceptionalName;

/** coordinate = sum of coefficient times other coordinates. */
export interface DependentCoordinate {
  readonly coordinate: number;
  readonly terms: readonly { readonly coordinate: number; readonly coefficient: Rational }[];
}

/**
 * A compact connected group with the Cartan coordinates s_0, s_1, .. in which it is printed. Weights are linear
 * functions of these coordinates.
 */
export interface Group {
  /** Normalised, e.g. `SU(3)`. */
  readonly name: string;
  readonly latex: string;
  readonly family: Family;
  /** The n of SU(n), SO(n), USp(n) as written; absent for exceptional groups. */
  readonly size: number | null;
  readonly simple: readonly SimpleType[];
  /** All simple parts together; Dynkin labels are concatenated in the order of `simple`. */
  readonly system: RootSystem;
  /** Number of U(1) factors: 1 for U(n) and SO(2), else 0. */
  readonly abelianRank: 0 | 1;
  readonly isAbelian: boolean;
  /** Rank of the group, U(1) included: the number of independent coordinates. */
  readonly rank: number;
  readonly dimension: number;
  readonly weylOrder: bigint;
  readonly coordinateCount: number;
  readonly blocks: readonly CoordinateBlock[];
  /** Coordinates that are set by themselves, in order. */
  readonly independent: readonly number[];
  readonly dependent: readonly DependentCoordinate[];
  readonly simpleRoots: readonly (readonly number[])[];
  readonly simpleCoroots: readonly (readonly Rational[])[];
  readonly weightMap: WeightMap;
  /** The basic form, long roots of norm 2, is basicScale times the sum of the squares of all printed coordinates. */
  readonly basicScale: Rational;
  /**
   * The form that multiplies the level: levelScale times the sum of the squares of all printed coordinates. It equals
   * the basic form except for SO(3) and Spin(3), where it is twice that (SO(3)_k = SU(2)_{2k}).
   */
  readonly levelScale: Rational;
  /** The level's form as a symmetric matrix in the independent coordinates. */
  readonly quadraticForm: readonly (readonly Rational[])[];
  /** Basis of the cocharacter lattice in printed coordinates. */
  readonly cocharacters: readonly (readonly Rational[])[];
  /** What was divided by a subgroup of the centre; null for a group written without one. */
  readonly quotient: Quotient | null;
  /** The measure of unit cocharacter cells is unitMeasure times the product of d(independent coordinate). */
  readonly unitMeasure: Rational;
}

const EXCEPTIONAL: readonly ExceptionalName[] = ['G2', 'F4', 'E6', 'E7', 'E8'];
const KNOWN = 'U(n), SU(n), SO(n), Spin(n), USp(2n), G2, F4, E6, E7 or E8';

export type GroupResult = { readonly kind: 'group'; readonly group: Group } | Refusal;

// Pure memoisation, keyed by the normalised name.
const results = new Map<string, GroupResult>();

/**
 * Reads `U(2)`, `SU(3)`, `SO(5)`, `Spin(8)`, `USp(4)`, `G2`, .., `E8`; SO(2) is U(1) under another name. `SU(4)/Z2` is
 * a quotient by a subgroup of the centre.
 */
export function parseGroup(text: string): GroupResult {
  const name = text.replace(/\s+/g, '');
  const known = results.get(name);
  if (known) return known;
  const result = readGroup(name);
  if (result.kind === 'group') results.set(name, result);
  return result;
}

function readGroup(name: string): GroupResult {
  const divided = /^(.+)\/Z_?(\d{1,3})$/.exec(name);
  if (divided) {
    const cover = parseGroup(divided[1] as string);
    return cover.kind === 'refusal' ? cover : makeQuotient(cover.group, Number(divided[2]));
  }
  const exceptional = EXCEPTIONAL.find((candidate) => candidate === name);
  if (exceptional) return makeGroup(exceptional, null, exceptionalLayout(exceptional));
  const match = /^(U|SU|SO|Spin|USp|Sp|O)\((\d{1,6})\)$/.exec(name);
  if (!match) {
    return refusal(
      'group-unknown',
      `'${name}' is not a group known here.`,
      'Names are read exactly.',
      `Write ${KNOWN}.`,
    );
  }
  const size = Number(match[2]);
  const tooLarge = (rank: number): Refusal | null =>
    rank <= MAXIMAL_RANK
      ? null
      : refusal(
          'group-too-large',
          `${name} has a simple factor of rank ${rank}.`,
          `Simple factors are limited to rank ${MAXIMAL_RANK}: U(9), SU(9), SO(17), Spin(17), USp(16).`,
          'Choose a smaller group.',
        );
  const trivial = (instead: string): Refusal =>
    refusal(
      'group-trivial',
      `${name} is not a gauge or flavour group here.`,
      'It has no Cartan coordinate of its own.',
      instead,
    );
  switch (match[1]) {
    case 'U':
      if (size < 1) return trivial('Write U(1) or larger.');
      return tooLarge(size - 1) ?? makeGroup('U', size, unitaryLayout(size));
    case 'SU':
      if (size < 2) return trivial('Write U(1), SU(2) or larger.');
      return tooLarge(size - 1) ?? makeGroup('SU', size, specialUnitaryLayout(size));
    case 'SO':
      if (size < 2) return trivial('Write SO(2) or larger.');
      if (size === 2) return makeGroup('SO', 2, unitaryLayout(1));
      return tooLarge(Math.floor(size / 2)) ?? makeGroup('SO', size, orthogonalLayout(size));
    case 'Spin':
      if (size === 2) {
        const why = 'Spin(2) is a double cover of SO(2) and itself a U(1).';
        return refusal('group-ambiguous', 'Spin(2) is not written as such.', why, 'Write U(1), with its own charges.');
      }
      if (size < 3) return trivial('Write Spin(3) or larger.');
      return tooLarge(Math.floor(size / 2)) ?? makeGroup('Spin', size, orthogonalLayout(size));
    case 'USp':
      if (size % 2 === 1 || size < 2) {
        const why = 'The number in USp(2n) is the dimension of the fundamental, which is even.';
        return refusal('group-unknown', `${name} does not exist.`, why, `Write USp(${2 * size}) or USp(${size + 1}).`);
      }
      return tooLarge(size / 2) ?? makeGroup('USp', size, symplecticLayout(size / 2));
    case 'Sp': {
      const why = 'Authors mean either the group of rank n or the one of 2n by 2n matrices.';
      const readings = size % 2 === 0 && size > 0 ? `USp(${size}) or USp(${2 * size})` : `USp(${2 * size})`;
      return refusal(
        'group-ambiguous',
        `Which group is ${name}?`,
        why,
        `Write ${readings}: the dimension of the fundamental.`,
      );
    }
    default: {
      const why =
        'O(n) is not connected: its partition function needs a second sum over Wilson lines, which is not offered.';
      return refusal('group-unknown', `${name} is not offered.`, why, `Write SO(${size}) or Spin(${size}).`);
    }
  }
}

function makeGroup(family: Family, size: number | null, layout: Layout): GroupResult {
  const name = size === null ? family : `${family}(${size})`;
  const system = rootSystemSum(layout.types);
  const count = layout.blocks.reduce((total, block) => total + block.size, 0);
  const dependent = layout.blocks
    .filter((block) => block.kind === 'traceless')
    .map(({ offset, size: width }) => ({
      coordinate: offset + width - 1,
      terms: Array.from({ length: width - 1 }, (_, i) => ({ coordinate: offset + i, coefficient: Rational.of(-1) })),
    }));
  const bound = new Set(dependent.map((relation) => relation.coordinate));
  const independent = Array.from({ length: count }, (_, i) => i).filter((i) => !bound.has(i));
  const abelianRank = family === 'U' || layout.types.length === 0 ? 1 : 0;
  const coroots = simpleCoroots(layout);
  const cocharacters = family === 'U' || family === 'SO' ? standardBasis(count) : coroots;
  const levelScale = system.name === 'A1' && (family === 'SO' || family === 'Spin') ? Rational.one : layout.basicScale;
  const group: Group = {
    name,
    latex: size === null ? `${family.charAt(0)}_${family.charAt(1)}` : `\\mathrm{${family}}(${size})`,
    family,
    size,
    simple: layout.types,
    system,
    abelianRank,
    isAbelian: layout.types.length === 0,
    rank: independent.length,
    dimension: 2 * system.positiveRoots.length + independent.length,
    weylOrder: system.weylOrder,
    coordinateCount: count,
    blocks: layout.blocks,
    independent,
    dependent,
    simpleRoots: layout.simpleRoots,
    simpleCoroots: coroots,
    weightMap: weightMap(layout),
    basicScale: layout.basicScale,
    levelScale,
    quadraticForm: formMatrix(count, independent, dependent, levelScale),
    cocharacters,
    quotient: null,
    unitMeasure: cellMeasure(cocharacters, independent),
  };
  return { kind: 'group', group };
}

function makeQuotient(cover: Group, order: number): GroupResult {
  const node = quotientNode(cover, order);
  if (typeof node !== 'number') return node;
  const { cocharacters, levelDivisor } = quotientLattice(cover, node, order);
  const group: Group = {
    ...cover,
    name: `${cover.name}/Z${order}`,
    latex: `${cover.latex}/\\mathbb{Z}_{${order}}`,
    cocharacters,
    quotient: { cover: cover.name, order, levelDivisor },
    unitMeasure: cellMeasure(cocharacters, cover.independent),
  };
  return { kind: 'group', group };
}

function standardBasis(size: number): Rational[][] {
  return Array.from({ length: size }, (_, i) =>
    Array.from({ length: size }, (_unused, j) => (i === j ? Rational.one : Rational.zero)),
  );
}

function formMatrix(
  count: number,
  independent: readonly number[],
  dependent: readonly DependentCoordinate[],
  scale: Rational,
): Rational[][] {
  // Rows of the embedding: every printed coordinate as a linear function of the independent ones.
  const embedding = Array.from({ length: count }, (_, coordinate) => {
    const relation = dependent.find((candidate) => candidate.coordinate === coordinate);
    const terms = relation ? relation.terms : [{ coordinate, coefficient: Rational.one }];
    return independent.map((i) => terms.find((term) => term.coordinate === i)?.coefficient ?? Rational.zero);
  });
  return independent.map((_, a) =>
    independent.map((_unused, b) =>
      embedding.reduce((sum, row) => sum.add((row[a] as Rational).mul(row[b] as Rational)), Rational.zero).mul(scale),
    ),
  );
}

/** Dynkin labels of a linear function of the printed coordinates. */
export function labelsOf(group: Group, vector: readonly Rational[]): Rational[] {
  return group.simpleCoroots.map((coroot) => dot(coroot, vector));
}

/** Whether the global form of the group allows a highest weight: it must be integral on the cocharacter lattice. */
export function allowsLabels(group: Group, labels: readonly number[]): boolean {
  // All others are simply connected, or U(n), whose weights are integers by construction.
  if (group.family !== 'SO' && group.quotient === null) return true;
  const { denominator, rows } = group.weightMap;
  const entries = Array.from({ length: group.coordinateCount }, (_, i) =>
    labels.reduce((sum, label, k) => sum + label * ((rows[k] as readonly number[])[i] as number), 0),
  );
  return group.cocharacters.every((x) =>
    x
      .reduce((sum, value, i) => sum.add(value.mul(Rational.of(entries[i] as number, denominator))), Rational.zero)
      .isInteger(),
  );
}
