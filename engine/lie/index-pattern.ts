import { Rational } from '../exact/rational';
import type { CoordinateBlock } from './coordinates';

/**
 * A set of weights as it is written on paper: a product over indices, with relations among them, of a linear
 * combination of coordinates with signs. `i<j, terms s_i - s_j` are the positive roots of SU(n).
 */
export interface IndexPattern {
  readonly indices: readonly PatternIndex[];
  readonly relations: readonly PatternRelation[];
  readonly terms: readonly PatternTerm[];
  /** Which choices of the signs of terms with sign 'either' occur, by the number of minus signs. */
  readonly signs: 'none' | 'all' | 'even' | 'odd';
  /** Number of weights. */
  readonly size: number;
}

/** An index running over the coordinates offset .. offset + range - 1 (counted from 0). */
export interface PatternIndex {
  readonly name: string;
  readonly offset: number;
  readonly range: number;
}

/** '<': the indices increase in the given order. '≠': they are pairwise different. */
export interface PatternRelation {
  readonly kind: '<' | '≠';
  readonly indices: readonly string[];
}

export type PatternTerm = {
  readonly coefficient: Rational;
  readonly sign: 'fixed' | 'either';
} & (
  | { readonly kind: 'index'; readonly index: string }
  | { readonly kind: 'coordinate'; readonly coordinate: number }
  /** The sum of the coordinates offset .. offset + range - 1. */
  | { readonly kind: 'sum'; readonly offset: number; readonly range: number }
);

/** Weights row by row in printed coordinates: entry = vectors[row * width + coordinate] / denominator. */
export interface WeightVectors {
  readonly denominator: number;
  readonly vectors: Int32Array;
  readonly width: number;
}

const NAMES = ['i', 'j', 'k', 'l', 'm', 'n', 'p', 'q', 'r'];
/** A U(n) weight whose commonest entry occurs this often is printed with the sum of all coordinates. */
const ENTRIES_FOR_SUM = 4;

interface Draft {
  indices: PatternIndex[];
  relations: PatternRelation[];
  terms: PatternTerm[];
  signs: IndexPattern['signs'];
}

/**
 * The orbit of a vector under the printed subgroup's Weyl group, as a pattern. With `half` only one of each pair
 * w, -w is kept; the orbit must then be closed under negation and not be zero.
 */
export function patternOf(
  blocks: readonly CoordinateBlock[],
  vector: ArrayLike<number>,
  denominator: number,
  half: boolean,
): IndexPattern {
  const draft: Draft = { indices: [], relations: [], terms: [], signs: 'none' };
  let toHalve = half;
  let size = half ? 1 / 2 : 1;
  for (const block of blocks) {
    const values = Array.from({ length: block.size }, (_, i) => vector[block.offset + i] as number);
    size *= blockOrbitSize(block, values);
    const before = draft.terms.length;
    if (block.kind === 'signed' || block.kind === 'even-signed') addSigned(draft, block, values, denominator, toHalve);
    else addPermuted(draft, block, values, denominator, toHalve);
    // Negation acts on all blocks at once, so halving the first one that moves is enough.
    if (draft.terms.length > before) toHalve = false;
  }
  return { ...draft, size };
}

/** Positions of equal values, in decreasing order of the value, without `skipped`. */
function groups(values: readonly number[], skipped: number): { value: number; count: number }[] {
  const counts = new Map<number, number>();
  for (const value of values) if (value !== skipped) counts.set(value, (counts.get(value) ?? 0) + 1);
  return [...counts].map(([value, count]) => ({ value, count })).sort((a, b) => b.value - a.value);
}

function addIndices(draft: Draft, offset: number, range: number, count: number): string[] {
  const names = NAMES.slice(draft.indices.length, draft.indices.length + count);
  draft.indices.push(...names.map((name) => ({ name, offset, range })));
  if (count > 1) draft.relations.push({ kind: '<', indices: names });
  return names;
}

function addPermuted(
  draft: Draft,
  { kind, offset, size }: CoordinateBlock,
  values: readonly number[],
  denominator: number,
  half: boolean,
): void {
  let base = 0;
  if (kind === 'free') {
    const common = values.reduce((best, value) => (count(values, value) > count(values, best) ? value : best), 0);
    const times = count(values, common);
    if (common !== 0 && size > 1 && (times === size || times >= ENTRIES_FOR_SUM)) {
      base = common;
      const coefficient = Rational.of(base, denominator);
      draft.terms.push({ kind: 'sum', offset, range: size, coefficient, sign: 'fixed' });
    }
  }
  const parts = groups(values, base);
  // Negation exchanges the value v with pair - v up to a shift that vanishes on the coordinates.
  const pair = Math.max(...values) + Math.min(...values);
  const [top] = parts;
  if (size === 1 || (half && top && parts.length === 1 && pair === top.value)) {
    // Two values in equal numbers, one of them zero: fix the last coordinate to carry the other one.
    if (!top) return;
    const coefficient = Rational.of(top.value, denominator);
    const others = addIndices(draft, offset, size - 1, top.count - 1);
    if (others.length > 0) draft.terms.push(...others.map((index) => indexTerm(index, coefficient, 'fixed')));
    draft.terms.push({ kind: 'coordinate', coordinate: offset + size - 1, coefficient, sign: 'fixed' });
    return;
  }
  const firsts = new Map<number, string>();
  const all: string[] = [];
  for (const { value, count: times } of parts) {
    const names = addIndices(draft, offset, size, times);
    firsts.set(value, names[0] as string);
    all.push(...names);
    const coefficient = Rational.of(value - base, denominator);
    draft.terms.push(...names.map((index) => indexTerm(index, coefficient, 'fixed')));
  }
  if (half && parts.length > 0) {
    const larger = parts.find(({ value }) => 2 * value > pair && firsts.has(pair - value));
    if (!larger) throw new Error('The orbit to halve is not symmetric.');
    const indices = [firsts.get(larger.value) as string, firsts.get(pair - larger.value) as string];
    draft.relations.push({ kind: '<', indices });
    if (all.length === 2) return;
  }
  if (parts.length > 1) draft.relations.push({ kind: '≠', indices: all });
}

function addSigned(
  draft: Draft,
  { kind, offset, size }: CoordinateBlock,
  values: readonly number[],
  denominator: number,
  half: boolean,
): void {
  const parts = groups(values.map(Math.abs), 0);
  const all: string[] = [];
  let sign: PatternTerm['sign'] = half ? 'fixed' : 'either';
  for (const { value, count: times } of parts) {
    const coefficient = Rational.of(value, denominator);
    const names = times === size ? [] : addIndices(draft, offset, size, times);
    all.push(...names);
    for (let i = 0; i < times; i++) {
      const index = names[i];
      draft.terms.push(
        index === undefined
          ? { kind: 'coordinate', coordinate: offset + i, coefficient, sign }
          : indexTerm(index, coefficient, sign),
      );
      sign = 'either';
    }
  }
  if (parts.length > 1) draft.relations.push({ kind: '≠', indices: all });
  if (parts.length === 0) return;
  const full = values.every((value) => value !== 0);
  if (kind === 'even-signed' && full)
    draft.signs = values.filter((value) => value < 0).length % 2 === 0 ? 'even' : 'odd';
  else if (draft.terms.some((term) => term.sign === 'either')) draft.signs = 'all';
}

function indexTerm(index: string, coefficient: Rational, sign: PatternTerm['sign']): PatternTerm {
  return { kind: 'index', index, coefficient, sign };
}

function count(values: readonly number[], wanted: number): number {
  return values.reduce((total, value) => (value === wanted ? total + 1 : total), 0);
}

/** Sign choices of a pattern as bit masks over its terms: a set bit is a minus sign. */
function signMasks(draft: Pick<IndexPattern, 'terms' | 'signs'>): number[] {
  const free = draft.terms.flatMap((term, i) => (term.sign === 'either' ? [1 << i] : []));
  return Array.from({ length: 1 << free.length }, (_, choice) => choice)
    .filter((choice) => {
      if (draft.signs === 'all' || draft.signs === 'none') return true;
      const minus = free.filter((_bit, i) => (choice >> i) & 1).length;
      return (minus % 2 === 0) === (draft.signs === 'even');
    })
    .map((choice) => free.reduce((mask, bit, i) => ((choice >> i) & 1 ? mask | bit : mask), 0));
}

/** Calls visit with every admissible choice of index values (coordinates, in the order of the indices). */
function forEachChoice(pattern: Pick<IndexPattern, 'indices' | 'relations'>, visit: (at: Int32Array) => void): void {
  const { indices, relations } = pattern;
  const position = new Map(indices.map(({ name }, i) => [name, i]));
  // For each index: earlier indices it must differ from, exceed, or stay below.
  const different: number[][] = indices.map(() => []);
  const above: number[][] = indices.map(() => []);
  const below: number[][] = indices.map(() => []);
  for (const { kind, indices: names } of relations) {
    const related = names.map((name) => position.get(name) as number);
    for (let a = 0; a < related.length; a++) {
      for (let b = a + 1; b < related.length; b++) {
        const [first, second] = [related[a] as number, related[b] as number];
        if (kind === '≠') (different[Math.max(first, second)] as number[]).push(Math.min(first, second));
        else if (first < second) (above[second] as number[]).push(first);
        else (below[first] as number[]).push(second);
      }
    }
  }
  const at = new Int32Array(indices.length);
  const assign = (depth: number): void => {
    const index = indices[depth];
    if (!index) {
      visit(at);
      return;
    }
    for (let value = index.offset; value < index.offset + index.range; value++) {
      if ((different[depth] as number[]).some((other) => at[other] === value)) continue;
      if ((above[depth] as number[]).some((other) => (at[other] as number) >= value)) continue;
      if ((below[depth] as number[]).some((other) => (at[other] as number) <= value)) continue;
      at[depth] = value;
      assign(depth + 1);
    }
  };
  assign(0);
}

/** Number of images of the values under the permutations and sign changes of a block. */
function blockOrbitSize({ kind, size }: CoordinateBlock, values: readonly number[]): number {
  const signed = kind === 'signed' || kind === 'even-signed';
  const classes = signed ? values.map(Math.abs) : values;
  let images = factorial(size);
  for (const value of new Set(classes)) images /= factorial(count(classes, value));
  const zeros = count(values, 0);
  if (!signed) return images;
  return images * 2 ** (size - zeros - (kind === 'even-signed' && zeros === 0 ? 1 : 0));
}

function factorial(n: number): number {
  return n < 2 ? 1 : n * factorial(n - 1);
}

/** The weights a pattern stands for, `width` coordinates each. */
export function expandPattern(pattern: IndexPattern, width: number): WeightVectors {
  const denominator = pattern.terms.reduce((least, { coefficient }) => lcm(least, Number(coefficient.denominator)), 1);
  const entries = pattern.terms.map(({ coefficient }) => Number(coefficient.mul(Rational.of(denominator)).numerator));
  const position = new Map(pattern.indices.map(({ name }, i) => [name, i]));
  const masks = signMasks(pattern);
  const vectors = new Int32Array(pattern.size * width);
  let row = 0;
  forEachChoice(pattern, (at) => {
    for (const mask of masks) {
      pattern.terms.forEach((term, i) => {
        const entry = (mask >> i) & 1 ? -(entries[i] as number) : (entries[i] as number);
        const first =
          term.kind === 'index'
            ? (at[position.get(term.index) as number] as number)
            : term.kind === 'coordinate'
              ? term.coordinate
              : term.offset;
        const range = term.kind === 'sum' ? term.range : 1;
        for (let c = first; c < first + range; c++) {
          vectors[row * width + c] = (vectors[row * width + c] as number) + entry;
        }
      });
      row++;
    }
  });
  return { denominator, vectors, width };
}

function lcm(a: number, b: number): number {
  let [x, y] = [a, b];
  while (y !== 0) [x, y] = [y, x % y];
  return (a / x) * b;
}
