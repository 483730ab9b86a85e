import {
  type CentreCharacter,
  cartanMatrix,
  centreCharacters,
  conjugationPermutation,
  relativeRootNorms,
  type SimpleType,
  typeName,
} from './simple-type';

/**
 * A root system, possibly a sum of several simple ones (SO(4)), with every inner product reduced to integers.
 *
 * Weights are lists of Dynkin labels a_i = <w, alpha_i^vee>. The inner product is the basic form: long roots of each
 * simple part have norm 2. `scaledHalfNorms[i]` = scale (alpha_i, alpha_i)/2 is an integer, hence
 * (w, sum c_i alpha_i) = sum a_i c_i scaledHalfNorms[i] / scale.
 */
export interface RootSystem {
  readonly name: string;
  readonly types: readonly SimpleType[];
  readonly rank: number;
  readonly cartan: readonly (readonly number[])[];
  readonly scale: number;
  readonly scaledHalfNorms: readonly number[];
  /** Sorted by height; the order of the nodes of the parts is kept. */
  readonly positiveRoots: readonly Root[];
  /** (w, v) = sum gram[i][j] w_i v_j / gramDenominator. */
  readonly gram: readonly (readonly number[])[];
  readonly gramDenominator: number;
  readonly detCartan: number;
  readonly exponents: readonly number[];
  readonly weylOrder: bigint;
  /** Labels of the Weyl vector: all ones. */
  readonly rho: readonly number[];
  readonly centre: readonly CentreCharacter[];
  /** Entry i of the labels of the conjugate is entry conjugation[i] of the labels. */
  readonly conjugation: readonly number[];
  /** Neighbours of node i as pairs (j, C_ij), flat, for reflections. */
  readonly neighbours: readonly Int32Array[];
}

export interface Root {
  readonly labels: readonly number[];
  /** Coefficients on the simple roots. */
  readonly coordinates: readonly number[];
}

/** What only a simple root system has. */
export interface SimpleRootSystem extends RootSystem {
  readonly type: SimpleType;
  readonly dimension: number;
  readonly highestRoot: readonly number[];
  /** Coefficients of the highest root on the simple roots. */
  readonly marks: readonly number[];
  readonly coxeter: number;
  readonly dualCoxeter: number;
}

// Pure memoisation, keyed by the type.
const simpleSystems = new Map<string, SimpleRootSystem>();
const sums = new Map<string, RootSystem>();

/** The root system of a simple type; always the same object for the same type. */
export function rootSystem(type: SimpleType): SimpleRootSystem {
  const name = typeName(type);
  const known = simpleSystems.get(name);
  if (known) return known;
  const system = buildSimple(type);
  simpleSystems.set(name, system);
  return system;
}

/** The orthogonal sum of simple root systems; labels are concatenated in the given order. */
export function rootSystemSum(types: readonly SimpleType[]): RootSystem {
  if (types.length === 1) return rootSystem(types[0] as SimpleType);
  const name = types.map(typeName).join('+');
  const known = sums.get(name);
  if (known) return known;
  const system = build(types);
  sums.set(name, system);
  return system;
}

function buildSimple(type: SimpleType): SimpleRootSystem {
  const system = build([type]);
  const highest = system.positiveRoots.at(-1) as Root;
  const marks = highest.coordinates;
  const longest = Math.max(...system.scaledHalfNorms);
  const comarks = marks.map((mark, i) => (mark * (system.scaledHalfNorms[i] as number)) / longest);
  return {
    ...system,
    type,
    dimension: system.rank + 2 * system.positiveRoots.length,
    highestRoot: highest.labels,
    marks,
    coxeter: 1 + sum(marks),
    dualCoxeter: 1 + sum(comarks),
  };
}

function build(types: readonly SimpleType[]): RootSystem {
  const rank = sum(types.map((type) => type.rank));
  const cartan = Array.from({ length: rank }, () => new Array<number>(rank).fill(0));
  const centre: CentreCharacter[] = [];
  const conjugation: number[] = [];
  const longestNorms = types.map((type) => Math.max(...relativeRootNorms(type)));
  // Each simple part scales by 1, 2 or 3 to make its half norms integers; one common scale serves all parts.
  const scale = longestNorms.reduce((least, norm) => (least % norm === 0 ? least : least * norm), 1);
  const scaledHalfNorms: number[] = [];
  let offset = 0;
  types.forEach((type, part) => {
    cartanMatrix(type).forEach((row, i) => {
      row.forEach((entry, j) => {
        (cartan[offset + i] as number[])[offset + j] = entry;
      });
    });
    for (const { modulus, coefficients } of centreCharacters(type)) {
      const padded = new Array<number>(rank).fill(0);
      padded.splice(offset, type.rank, ...coefficients);
      centre.push({ modulus, coefficients: padded });
    }
    const start = offset;
    conjugation.push(...conjugationPermutation(type).map((i) => start + i));
    scaledHalfNorms.push(...relativeRootNorms(type).map((norm) => (norm * scale) / (longestNorms[part] as number)));
    offset += type.rank;
  });
  const positiveRoots = findPositiveRoots(cartan);
  const exponents = exponentsFromHeights(positiveRoots.map((root) => sum(root.coordinates)));
  const { adjugate, determinant } = adjugateMatrix(cartan);
  return {
    name: types.map(typeName).join('+'),
    types,
    rank,
    cartan,
    scale,
    scaledHalfNorms,
    positiveRoots,
    // (omega_i, omega_j) = (C^-1)_ij (alpha_j, alpha_j)/2.
    gram: adjugate.map((row) => row.map((entry, j) => entry * (scaledHalfNorms[j] as number))),
    gramDenominator: determinant * scale,
    detCartan: determinant,
    exponents,
    weylOrder: exponents.reduce((product, e) => product * BigInt(e + 1), 1n),
    rho: new Array<number>(rank).fill(1),
    centre,
    conjugation,
    neighbours: cartan.map((row, i) =>
      Int32Array.from(row.flatMap((entry, j) => (j === i || !entry ? [] : [j, entry]))),
    ),
  };
}

/**
 * Level by level in height: beta + alpha_i is a root exactly when the alpha_i-string through beta continues, i.e.
 * when p - <beta, alpha_i^vee> > 0 with p the number of steps the string goes down from beta.
 */
function findPositiveRoots(cartan: readonly (readonly number[])[]): Root[] {
  const rank = cartan.length;
  let level: Root[] = cartan.map((row, i) => ({
    labels: row,
    coordinates: row.map((_, j) => (i === j ? 1 : 0)),
  }));
  const roots: Root[] = [];
  const known = new Set<string>();
  while (level.length > 0) {
    for (const root of level) known.add(root.coordinates.join());
    roots.push(...level);
    const next = new Map<string, Root>();
    for (const root of level) {
      for (let i = 0; i < rank; i++) {
        const step = (k: number): number[] => root.coordinates.map((c, j) => (i === j ? c + k : c));
        let down = 0;
        while (known.has(step(-down - 1).join())) down++;
        if (down - (root.labels[i] as number) <= 0) continue;
        const coordinates = step(1);
        const labels = root.labels.map((label, j) => label + ((cartan[i] as number[])[j] as number));
        next.set(coordinates.join(), { labels, coordinates });
      }
    }
    level = [...next.values()];
  }
  return roots;
}

/**
 * Exponents as the partition dual to the numbers of positive roots of each height (Kostant, Amer. J. Math. 81 (1959)
 * 973); valid for any closed set of roots spanned by simple roots, so for stabilisers in the Weyl group, too.
 */
export function exponentsFromHeights(heights: readonly number[]): number[] {
  const count: number[] = [];
  for (const height of heights) count[height] = (count[height] ?? 0) + 1;
  const exponents: number[] = [];
  for (let height = 1; height < count.length; height++) {
    const ending = (count[height] ?? 0) - (count[height + 1] ?? 0);
    for (let i = 0; i < ending; i++) exponents.push(height);
  }
  return exponents;
}

/** Adjugate and determinant of a small integer matrix by cofactors of fraction-free elimination. */
function adjugateMatrix(matrix: readonly (readonly number[])[]): { adjugate: number[][]; determinant: number } {
  const n = matrix.length;
  const minor = (row: number, column: number): number =>
    integerDeterminant(matrix.filter((_, i) => i !== row).map((entries) => entries.filter((_, j) => j !== column)));
  const adjugate = Array.from({ length: n }, (_, i) =>
    Array.from({ length: n }, (_unused, j) => ((i + j) % 2 === 0 ? 1 : -1) * minor(j, i) + 0),
  );
  return { adjugate, determinant: integerDeterminant(matrix) };
}

/** Bareiss elimination; exact for the sizes and entries used here, whose minors are far below 2^53. */
export function integerDeterminant(matrix: readonly (readonly number[])[]): number {
  const n = matrix.length;
  const m = matrix.map((row) => [...row]);
  let previous = 1;
  let sign = 1;
  for (let k = 0; k < n - 1; k++) {
    const pivotRow = m.findIndex((row, i) => i >= k && row[k] !== 0);
    if (pivotRow < 0) return 0;
    if (pivotRow !== k) {
      [m[k], m[pivotRow]] = [m[pivotRow] as number[], m[k] as number[]];
      sign = -sign;
    }
    const top = m[k] as number[];
    const pivot = top[k] as number;
    for (let i = k + 1; i < n; i++) {
      const row = m[i] as number[];
      for (let j = k + 1; j < n; j++) {
        row[j] = ((row[j] as number) * pivot - (row[k] as number) * (top[j] as number)) / previous;
      }
    }
    previous = pivot;
  }
  return n === 0 ? 1 : sign * ((m[n - 1] as number[])[n - 1] as number);
}

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0);
}
