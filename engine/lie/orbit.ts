import type { Rational } from '../exact/rational';
import type { CoordinateBlock } from './coordinates';
import type { Group } from './group';
import { expandPattern, type IndexPattern, patternOf, type WeightVectors } from './index-pattern';
import { conjugateLabels, orbitLabels, orbitSize } from './weyl';

/**
 * One Weyl orbit of weights of a group, with the number of times each of its weights occurs in a representation.
 * Immutable; weights are enumerated when first asked for.
 */
export class WeightOrbit {
  readonly multiplicity: number;
  private readonly shape: OrbitShape;

  constructor(shape: OrbitShape, multiplicity: number) {
    this.shape = shape;
    this.multiplicity = multiplicity;
  }

  /** Dynkin labels of the dominant weight, simple parts one after the other. */
  get dominant(): readonly number[] {
    return this.shape.labels;
  }

  /** Charge under the U(1) of U(n) (the sum of the entries of the weight) or of U(1); zero for other groups. */
  get charge(): Rational {
    return this.shape.charge;
  }

  /** Equal for equal orbits of the same group, different for different ones. */
  get key(): string {
    return this.shape.key;
  }

  /** Key of the orbit of the negatives. */
  get conjugateKey(): string {
    return this.shape.conjugateKey;
  }

  get selfConjugate(): boolean {
    return this.shape.key === this.shape.conjugateKey;
  }

  get isZero(): boolean {
    return this.shape.isZero;
  }

  /** Number of weights. */
  get size(): number {
    return this.shape.size;
  }

  conjugate(): WeightOrbit {
    if (this.selfConjugate) return this;
    const { group, labels, charge } = this.shape;
    return new WeightOrbit(orbitShape(group, conjugateLabels(group.system, labels), charge.neg()), this.multiplicity);
  }

  /** All weights in printed coordinates, the dominant one first. */
  vectors(): WeightVectors {
    return this.shape.vectors();
  }

  /** One of each pair w, -w. Throws unless the orbit is its own conjugate and not zero. */
  halfVectors(): WeightVectors {
    return joinVectors(this.halfPatterns(), this.shape.group.coordinateCount);
  }

  /** The orbit on paper: one pattern for a classical group, one per orbit of the printed subgroup for E, F, G. */
  patterns(): readonly IndexPattern[] {
    return this.shape.patterns();
  }

  /** The same with one of each pair w, -w. Throws unless the orbit is its own conjugate and not zero. */
  halfPatterns(): readonly IndexPattern[] {
    if (!this.selfConjugate || this.isZero) throw new Error(`The orbit ${this.key} has no half.`);
    return this.shape.halfPatterns();
  }
}

export interface OrbitShape {
  readonly group: Group;
  readonly labels: readonly number[];
  readonly charge: Rational;
  readonly key: string;
  readonly conjugateKey: string;
  readonly isZero: boolean;
  readonly size: number;
  readonly vectors: () => WeightVectors;
  readonly patterns: () => readonly IndexPattern[];
  readonly halfPatterns: () => readonly IndexPattern[];
}

/** Name of an irreducible highest weight or of an orbit within one group. */
export function weightKey(labels: readonly number[], charge: Rational): string {
  return charge.isZero() ? labels.join() : `${labels.join()};${charge.toString()}`;
}

// Pure memoisation by group and key, so that products compare and enumerate the same orbit once.
const shapes = new WeakMap<Group, Map<string, OrbitShape>>();
const SHAPES_KEPT = 3000;
/** Larger orbits are enumerated anew each time rather than kept in memory. */
const WEIGHTS_KEPT = 20_000;

export function orbitShape(group: Group, labels: readonly number[], charge: Rational): OrbitShape {
  let kept = shapes.get(group);
  if (!kept) {
    kept = new Map();
    shapes.set(group, kept);
  }
  const key = weightKey(labels, charge);
  const known = kept.get(key);
  if (known) return known;
  const size = orbitSize(group.system, labels);
  const vectors = remember(() => orbitVectors(group, labels, charge), size <= WEIGHTS_KEPT);
  const representatives = remember(() => printedRepresentatives(group, labels, charge, vectors));
  const patternsOf = (half: boolean): readonly IndexPattern[] => {
    const { denominator, rows } = representatives();
    return half
      ? halfPatterns(group, rows, denominator)
      : rows.map((v) => patternOf(group.blocks, v, denominator, false));
  };
  const shape: OrbitShape = {
    group,
    labels,
    charge,
    key,
    conjugateKey: weightKey(conjugateLabels(group.system, labels), charge.neg()),
    isZero: charge.isZero() && labels.every((label) => label === 0),
    size,
    vectors,
    patterns: remember(() => patternsOf(false)),
    halfPatterns: remember(() => patternsOf(true)),
  };
  if (kept.size >= SHAPES_KEPT) kept.clear();
  kept.set(key, shape);
  return shape;
}

function remember<T>(compute: () => T, keep = true): () => T {
  let value: T | undefined;
  return () => {
    if (value !== undefined) return value;
    const computed = compute();
    if (keep) value = computed;
    return computed;
  };
}

function orbitVectors(group: Group, labels: readonly number[], charge: Rational): WeightVectors {
  return printedVectors(group, orbitLabels(group.system, labels), charge);
}

/** Label rows in printed coordinates. In traceless blocks the entries are shifted to the shortest notation. */
export function printedVectors(group: Group, rows: ArrayLike<number>, charge: Rational): WeightVectors {
  const { rank } = group.system;
  const width = group.coordinateCount;
  if (rank === 0) {
    const vectors = Int32Array.of(Number(charge.numerator));
    return { denominator: Number(charge.denominator), vectors, width };
  }
  const map = Int32Array.from(group.weightMap.rows.flat());
  const count = rows.length / rank;
  const vectors = new Int32Array(count * width);
  for (let row = 0; row < count; row++) {
    for (let k = 0; k < rank; k++) {
      const label = rows[row * rank + k] as number;
      if (label === 0) continue;
      for (let i = 0; i < width; i++) {
        vectors[row * width + i] = (vectors[row * width + i] as number) + label * (map[k * width + i] as number);
      }
    }
    for (const block of group.blocks) {
      if (block.kind === 'traceless') shiftBlock(vectors, row * width + block.offset, block.size);
      else if (block.kind === 'free')
        addCharge(vectors, row * width + block.offset, block.size, Number(charge.numerator));
    }
  }
  return { denominator: group.weightMap.denominator, vectors, width };
}

/** Adds the multiple of (1,..,1) that makes the sum of the entries equal to the charge. */
function addCharge(vectors: Int32Array, start: number, size: number, charge: number): void {
  let sum = 0;
  for (let i = start; i < start + size; i++) sum += vectors[i] as number;
  const shift = (charge - sum) / size;
  for (let i = start; i < start + size; i++) vectors[i] = (vectors[i] as number) + shift;
}

/**
 * Subtracts a multiple of (1,..,1) so that the weight reads shortest: the centre of a symmetric set of entries where it
 * is an entry; else the commonest entry, among several the one leaving the smallest absolute sum, then the one that
 * makes a set of positive skewness positive.
 */
function shiftBlock(vectors: Int32Array, start: number, size: number): void {
  const values = [...vectors.subarray(start, start + size)].sort((a, b) => a - b);
  const [least, greatest] = [values[0] as number, values[size - 1] as number];
  const symmetric = values.every((value, i) => value + (values[size - 1 - i] as number) === least + greatest);
  let shift = (least + greatest) / 2;
  if (!symmetric || !values.includes(shift)) {
    const mean = values.reduce((sum, value) => sum + value, 0) / size;
    const skewness = symmetric ? 0 : values.reduce((sum, value) => sum + (value - mean) ** 3, 0);
    const candidates = [...new Set(skewness >= 0 ? values : values.toReversed())];
    const score = (candidate: number): number => {
      const frequency = values.filter((value) => value === candidate).length;
      const absolute = values.reduce((sum, value) => sum + Math.abs(value - candidate), 0);
      // Frequency decides first; the absolute sum stays below 2^20 for the labels allowed here.
      return frequency * 2 ** 20 - absolute;
    };
    shift = candidates.reduce((best, candidate) => (score(candidate) > score(best) ? candidate : best));
  }
  for (let i = start; i < start + size; i++) vectors[i] = (vectors[i] as number) - shift;
}

/** One vector for each orbit of the printed subgroup: the one in its own dominant chamber, shortest first. */
function printedRepresentatives(
  group: Group,
  labels: readonly number[],
  charge: Rational,
  vectors: () => WeightVectors,
): { denominator: number; rows: Int32Array[] } {
  const exceptional = group.size === null;
  const { denominator, vectors: all, width } = exceptional ? vectors() : printedVectors(group, labels, charge);
  const rows: Int32Array[] = [];
  for (let start = 0; start < all.length; start += width) {
    const row = all.subarray(start, start + width);
    if (!exceptional || group.blocks.every((block) => isDominant(row, block))) rows.push(row.slice());
  }
  const terms = (row: Int32Array): number => row.filter((entry) => entry !== 0).length;
  rows.sort((a, b) => terms(a) - terms(b) || total(b) - total(a));
  return { denominator, rows };
}

function isDominant(row: Int32Array, { kind, offset, size }: CoordinateBlock): boolean {
  for (let i = offset; i + 1 < offset + size; i++) if ((row[i] as number) < (row[i + 1] as number)) return false;
  return kind !== 'signed' || (row[offset + size - 1] as number) >= 0;
}

function total(row: Int32Array): number {
  return row.reduce((sum, entry) => sum + entry, 0);
}

/** Halves orbits of the printed subgroup that are their own negatives, and keeps one of each other pair. */
function halfPatterns(group: Group, rows: readonly Int32Array[], denominator: number): IndexPattern[] {
  const done = new Set<string>();
  return rows.flatMap((row) => {
    if (done.has(row.join())) return [];
    const negative = negativeRepresentative(group, row);
    done.add(negative.join());
    return [patternOf(group.blocks, row, denominator, negative.join() === row.join())];
  });
}

/** The dominant vector of the printed subgroup's orbit that holds -row. */
function negativeRepresentative(group: Group, row: Int32Array): Int32Array {
  if (group.size !== null) return row;
  const negative = row.slice();
  for (const { kind, offset, size } of group.blocks) {
    if (kind === 'signed') continue;
    negative.subarray(offset, offset + size).set(
      row
        .slice(offset, offset + size)
        .reverse()
        .map((entry) => -entry),
    );
    shiftBlock(negative, offset, size);
  }
  return negative;
}

function joinVectors(patterns: readonly IndexPattern[], width: number): WeightVectors {
  const parts = patterns.map((pattern) => expandPattern(pattern, width));
  const denominator = parts.reduce((largest, part) => Math.max(largest, part.denominator), 1);
  const vectors = new Int32Array(parts.reduce((length, part) => length + part.vectors.length, 0));
  let start = 0;
  for (const part of parts) {
    // Denominators are 1 or 2, so the largest is a multiple of each.
    vectors.set(
      part.vectors.map((entry) => (entry * denominator) / part.denominator),
      start,
    );
    start += part.vectors.length;
  }
  return { denominator, vectors, width };
}
