import { Rational } from '../../exact/rational';
import type { Group } from '../../lie/group';
import type { WeightVectors } from '../../lie/index-pattern';
import type { WeightOrbit } from '../../lie/orbit';
import { commonDivisor, leastMultiple } from './integers';

/**
 * The cocharacter lattice of a group in its basis `group.cocharacters`, with integers only: directions of the Coulomb
 * branch are integer vectors z, weights take integers on them.
 */
export interface CocharacterLattice {
  readonly rank: number;
  /** Simple roots, and for each U(1) one more function, row by row; together a basis of functions. */
  readonly walls: readonly (readonly number[])[];
  /** How many of the walls are simple roots; the others bound nothing. */
  readonly simple: number;
  /** The primitive vectors dual to the walls. */
  readonly edges: readonly (readonly number[])[];
  readonly positiveRoots: readonly (readonly number[])[];
  /** Sum of the positive roots. */
  readonly rootSum: readonly number[];
  /** The form that multiplies the level, and the trace, on the basis. */
  readonly form: readonly (readonly Rational[])[];
  readonly trace: readonly Rational[];
}

// Pure memoisation, by group and orbit; groups are shared by all theories.
const lattices = new WeakMap<Group, CocharacterLattice>();

export function cocharacterLattice(group: Group): CocharacterLattice {
  const known = lattices.get(group);
  if (known) return known;
  const { cocharacters, levelScale } = group;
  const rank = cocharacters.length;
  const doubled = Int32Array.from(group.simpleRoots.flat().map((entry) => 2 * entry));
  const roots = onLattice(group, { denominator: 2, vectors: doubled, width: group.coordinateCount }, 1);
  const walls = Array.from({ length: group.simpleRoots.length }, (_, i) => [
    ...roots.subarray(i * rank, (i + 1) * rank),
  ]);
  // U(n) and U(1): the last coordinate splits the chamber, which otherwise contains a line.
  if (group.abelianRank > 0) walls.push(Array.from({ length: rank }, (_, k) => (k === rank - 1 ? 1 : 0)));
  const positiveRoots = group.system.positiveRoots.map(({ coordinates }) =>
    Array.from({ length: rank }, (_, k) => coordinates.reduce((sum, c, i) => sum + c * (walls[i]?.[k] as number), 0)),
  );
  const lattice: CocharacterLattice = {
    rank,
    walls,
    simple: group.simpleRoots.length,
    edges: dualVectors(walls),
    positiveRoots,
    rootSum: Array.from({ length: rank }, (_, k) => positiveRoots.reduce((sum, root) => sum + (root[k] as number), 0)),
    form: cocharacters.map((x) => cocharacters.map((y) => pairing(x, y).mul(levelScale))),
    trace: cocharacters.map((x) => x.reduce((sum, entry) => sum.add(entry), Rational.zero)),
  };
  lattices.set(group, lattice);
  return lattice;
}

function pairing(x: readonly Rational[], y: readonly Rational[]): Rational {
  return x.reduce((sum, entry, i) => sum.add(entry.mul(y[i] as Rational)), Rational.zero);
}

/** Columns of the inverse matrix, each made a primitive integer vector. */
function dualVectors(rows: readonly (readonly number[])[]): number[][] {
  const n = rows.length;
  const work = rows.map((row, i) => [
    ...row.map((entry) => Rational.of(entry)),
    ...rows.map((_, j) => (i === j ? Rational.one : Rational.zero)),
  ]);
  for (let k = 0; k < n; k++) {
    const pivotRow = work.findIndex((row, i) => i >= k && !(row[k] as Rational).isZero());
    [work[k], work[pivotRow]] = [work[pivotRow] as Rational[], work[k] as Rational[]];
    const pivot = (work[k] as Rational[])[k] as Rational;
    const top = (work[k] as Rational[]).map((entry) => entry.div(pivot));
    work[k] = top;
    for (let i = 0; i < n; i++) {
      const factor = (work[i] as Rational[])[k] as Rational;
      if (i === k || factor.isZero()) continue;
      work[i] = (work[i] as Rational[]).map((entry, j) => entry.sub(factor.mul(top[j] as Rational)));
    }
  }
  return rows.map((_, column) => primitive(work.map((row) => row[n + column] as Rational)));
}

function primitive(vector: readonly Rational[]): number[] {
  const denominator = vector.reduce((least, { denominator: d }) => leastMultiple(least, d), 1n);
  const integers = vector.map((entry) => Number((entry.numerator * denominator) / entry.denominator));
  const divisor = integers.reduce(commonDivisor, 0);
  return integers.map((entry) => entry / divisor);
}

const orbits = new WeakMap<Group, Map<string, Int32Array>>();
const ORBITS_KEPT = 300;

/** The weights of an orbit on the lattice basis times `unit`, row by row. `unit` clears the denominators of charges. */
export function orbitOnLattice(group: Group, orbit: WeightOrbit, unit: number): Int32Array {
  let kept = orbits.get(group);
  if (!kept) {
    kept = new Map();
    orbits.set(group, kept);
  }
  const key = `${unit} ${orbit.key}`;
  const known = kept.get(key);
  if (known) return known;
  const values = onLattice(group, orbit.vectors(), unit);
  if (kept.size >= ORBITS_KEPT) kept.clear();
  kept.set(key, values);
  return values;
}

/** Vectors in printed coordinates, evaluated on the basis of the lattice, times `unit`. */
function onLattice(group: Group, { denominator, vectors, width }: WeightVectors, unit: number): Int32Array {
  const { cocharacters } = group;
  const rank = cocharacters.length;
  const scale = Number(cocharacters.flat().reduce((least, { denominator: d }) => leastMultiple(least, d), 1n));
  const basis = cocharacters.map((x) =>
    x.map((entry) => Number(entry.numerator) * (scale / Number(entry.denominator))),
  );
  const count = vectors.length / width;
  const values = new Int32Array(count * rank);
  for (let row = 0; row < count; row++) {
    for (let k = 0; k < rank; k++) {
      const x = basis[k] as number[];
      let sum = 0;
      for (let i = 0; i < width; i++) sum += (vectors[row * width + i] as number) * (x[i] as number);
      values[row * rank + k] = (sum * unit) / (scale * denominator);
    }
  }
  return values;
}

/** A lattice vector in printed coordinates. */
export function printedVector(group: Group, z: readonly number[]): Rational[] {
  return Array.from({ length: group.coordinateCount }, (_, i) =>
    group.cocharacters.reduce(
      (sum, x, k) => sum.add((x[i] as Rational).mul(Rational.of(Math.round(z[k] as number)))),
      Rational.zero,
    ),
  );
}
