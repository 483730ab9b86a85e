/**
 * Simple complex Lie algebras: names, Cartan matrices, centres.
 *
 * Nodes are numbered as by Bourbaki (Lie groups and Lie algebras, ch. VI, plates I-IX): B_n has its short root last,
 * C_n its long root last, D_n forks at node n-2, E_n is the chain 1-3-4-5-6(-7-8) with node 2 on node 4,
 * F4 has long roots 1 and 2, G2 the short root first. C[i][j] = <alpha_i, alpha_j^vee>, so that row i holds the
 * Dynkin labels of alpha_i.
 */

export type Series = 'A' | 'B' | 'C' | 'D' | 'E' | 'F' | 'G';

export interface SimpleType {
  readonly series: Series;
  readonly rank: number;
}

/** Largest rank of a simple factor this engine works with; the exceptional types end there, too. */
export const MAXIMAL_RANK = 8;

const SMALLEST_RANK: Readonly<Record<Series, number>> = { A: 1, B: 2, C: 2, D: 4, E: 6, F: 4, G: 2 };
const LARGEST_RANK: Readonly<Record<Series, number>> = {
  A: MAXIMAL_RANK,
  B: MAXIMAL_RANK,
  C: MAXIMAL_RANK,
  D: MAXIMAL_RANK,
  E: 8,
  F: 4,
  G: 2,
};

/** Whether the type is one of A1-A8, B2-B8, C2-C8, D4-D8, E6, E7, E8, F4, G2: each algebra once. */
export function isSimpleType({ series, rank }: SimpleType): boolean {
  return Number.isInteger(rank) && rank >= SMALLEST_RANK[series] && rank <= LARGEST_RANK[series];
}

export function allSimpleTypes(): SimpleType[] {
  const series: Series[] = ['A', 'B', 'C', 'D', 'E', 'F', 'G'];
  return series.flatMap((name) =>
    Array.from({ length: MAXIMAL_RANK }, (_, i) => ({ series: name, rank: i + 1 })).filter(isSimpleType),
  );
}

export function typeName({ series, rank }: SimpleType): string {
  return `${series}${rank}`;
}

/** Bonds of the Dynkin diagram as [i, j, C_ij, C_ji], nodes from 0. */
function bonds({ series, rank }: SimpleType): [number, number, number, number][] {
  const chain = (nodes: number[]): [number, number, number, number][] =>
    nodes.slice(1).map((node, i) => [nodes[i] as number, node, -1, -1]);
  const line = Array.from({ length: rank }, (_, i) => i);
  switch (series) {
    case 'A':
      return chain(line);
    case 'B':
      return [...chain(line.slice(0, -1)), [rank - 2, rank - 1, -2, -1]];
    case 'C':
      return [...chain(line.slice(0, -1)), [rank - 2, rank - 1, -1, -2]];
    case 'D':
      return [...chain(line.slice(0, -1)), [rank - 3, rank - 1, -1, -1]];
    case 'E':
      return [...chain([0, ...line.slice(2)]), [1, 3, -1, -1]];
    case 'F':
      return [
        [0, 1, -1, -1],
        [1, 2, -2, -1],
        [2, 3, -1, -1],
      ];
    case 'G':
      return [[0, 1, -1, -3]];
  }
}

export function cartanMatrix(type: SimpleType): number[][] {
  const matrix = Array.from({ length: type.rank }, (_, i) =>
    Array.from({ length: type.rank }, (_unused, j) => (i === j ? 2 : 0)),
  );
  for (const [i, j, forward, backward] of bonds(type)) {
    (matrix[i] as number[])[j] = forward;
    (matrix[j] as number[])[i] = backward;
  }
  return matrix;
}

/**
 * Squared lengths of the simple roots in units of the shortest: 1 (short) or 2, 3 (long); all 1 when simply laced.
 */
export function relativeRootNorms({ series, rank }: SimpleType): number[] {
  const norms = new Array<number>(rank).fill(1);
  if (series === 'B') return norms.map((_, i) => (i < rank - 1 ? 2 : 1));
  if (series === 'C') return norms.map((_, i) => (i < rank - 1 ? 1 : 2));
  if (series === 'F') return [2, 2, 1, 1];
  if (series === 'G') return [1, 3];
  return norms;
}

/** A character of the centre: Dynkin labels -> sum of coefficients times labels, modulo the order. */
export interface CentreCharacter {
  readonly modulus: number;
  readonly coefficients: readonly number[];
}

/**
 * Generators of the characters of the centre of the simply connected group; they vanish on the roots and together
 * tell weights apart exactly up to the root lattice (Lemire, Patera, J. Math. Phys. 21 (1980) 2026 for A..E).
 */
export function centreCharacters({ series, rank: n }: SimpleType): CentreCharacter[] {
  const line = Array.from({ length: n }, (_, i) => i);
  const odd = (i: number): number => (i % 2 === 0 ? 1 : 0);
  switch (series) {
    case 'A':
      return [{ modulus: n + 1, coefficients: line.map((i) => i + 1) }];
    case 'B':
      return [{ modulus: 2, coefficients: line.map((i) => (i === n - 1 ? 1 : 0)) }];
    case 'C':
      return [{ modulus: 2, coefficients: line.map(odd) }];
    case 'D':
      if (n % 2 === 1) {
        return [{ modulus: 4, coefficients: line.map((i) => (i < n - 2 ? 2 * odd(i) : i === n - 2 ? n - 2 : n)) }];
      }
      return [
        { modulus: 2, coefficients: line.map((i) => (i < n - 2 ? 0 : 1)) },
        { modulus: 2, coefficients: line.map((i) => (i < n - 2 ? odd(i) : i === n - 2 ? (n - 2) / 2 : n / 2)) },
      ];
    case 'E':
      if (n === 6) return [{ modulus: 3, coefficients: [1, 0, -1, 0, 1, -1] }];
      if (n === 7) return [{ modulus: 2, coefficients: [0, 1, 0, 0, 1, 0, 1] }];
      return [];
    case 'F':
    case 'G':
      return [];
  }
}

/**
 * The node permutation of minus the longest Weyl element: entry i of the conjugate's labels is entry perm[i] of the
 * labels. A_n reverses, D_odd swaps the last two, E6 swaps 1-6 and 3-5, all others fix every node.
 */
export function conjugationPermutation({ series, rank }: SimpleType): number[] {
  const line = Array.from({ length: rank }, (_, i) => i);
  if (series === 'A') return line.reverse();
  if (series === 'D' && rank % 2 === 1) return [...line.slice(0, -2), rank - 1, rank - 2];
  if (series === 'E' && rank === 6) return [5, 1, 4, 3, 2, 0];
  return line;
}
