import type { Theory, TheoryGroup } from '../theory';
import type { BranchRay, CoulombBranch } from './coulomb-branch';
import { hasCubicTrace } from './cubic-level';
import { valueAt } from './gauge-weights';
import { cocharacterLattice } from './lattice';
import { levelValue } from './matter';

/**
 * The cubic part of the prepotential of a five-dimensional theory at infinite coupling,
 * F(n) = (kappa/6) Tr n^3 + (1/12) (sum_roots |a(n)|^3 - sum_hypers sum_w |w(n)|^3), by its Hessian
 * H_n = kappa Tr(n . .) + (1/2) (sum_roots |a(n)| a a - sum_hypers sum_w |w(n)| w w): F(n) = H_n(n, n)/6, and H_n is
 * linear in n on each cone of the Coulomb branch, so that it is known from the rays.
 */
export function hessian(theory: Theory, branch: CoulombBranch, { point }: BranchRay): number[][] {
  const { rank } = branch;
  const matrix = Array.from({ length: rank }, () => new Array<number>(rank).fill(0));
  const add = (rows: ArrayLike<number>, start: number, at: number, size: number, factor: number): void => {
    for (let k = 0; k < size; k++) {
      const row = matrix[at + k] as number[];
      const left = factor * (rows[start + k] as number);
      if (left === 0) continue;
      for (let l = 0; l < size; l++) row[at + l] = (row[at + l] as number) + left * (rows[start + l] as number);
    }
  };
  let offset = 0;
  for (const { group, index } of branch.groups) {
    const lattice = cocharacterLattice(group);
    const own = point.slice(offset, offset + lattice.rank);
    // One of each pair of roots, the pair counted with the factor 1/2; the adjoint hyper of N = 2 cancels them.
    for (const root of theory.supersymmetry === 2 ? [] : lattice.positiveRoots)
      add(root, 0, offset, lattice.rank, Math.abs(valueAt(root, 0, own, lattice.rank)));
    const owner = theory.groups[index] as TheoryGroup;
    const level = levelValue(theory, owner.level).toNumber();
    if (level !== 0 && hasCubicTrace(owner)) addTrace(matrix, offset, owner, own, level);
    offset += lattice.rank;
  }
  for (const { weights, copies } of branch.matter) {
    // Copies count chirals: two a hyper, one a half-hyper.
    const factor = -copies / (4 * weights.unit ** 3);
    for (let row = 0; row < weights.multiplicities.length; row++) {
      const value = Math.abs(valueAt(weights.rows, row * rank, point, rank)) * (weights.multiplicities[row] as number);
      if (value !== 0) add(weights.rows, row * rank, 0, rank, factor * value);
    }
  }
  return matrix;
}

/** kappa Tr(n x y) on the lattice basis. */
function addTrace(
  matrix: number[][],
  offset: number,
  { group }: TheoryGroup,
  own: readonly number[],
  level: number,
): void {
  const basis = group.cocharacters.map((x) => x.map((entry) => entry.toNumber()));
  for (let i = 0; i < group.coordinateCount; i++) {
    const coordinate = own.reduce((sum, entry, k) => sum + entry * (basis[k]?.[i] as number), 0);
    basis.forEach((x, k) => {
      const row = matrix[offset + k] as number[];
      basis.forEach((y, l) => {
        row[offset + l] = (row[offset + l] as number) + level * coordinate * (x[i] as number) * (y[i] as number);
      });
    });
  }
}

/** H(x, y). */
export function form(matrix: readonly (readonly number[])[], x: readonly number[], y: readonly number[]): number {
  return matrix.reduce((sum, row, k) => sum + (x[k] as number) * valueAt(row, 0, y, y.length), 0);
}

/** Relative to the largest entry; entries are integers or small fractions, and so are the pivots. */
const TOLERANCE = 1e-9;

/** Whether a symmetric matrix has no negative eigenvalue: elimination with diagonal pivots. */
export function isPositive(matrix: readonly (readonly number[])[]): boolean {
  const work = matrix.map((row) => [...row]);
  const zero = TOLERANCE * Math.max(1, ...matrix.flat().map(Math.abs));
  const left = new Set(work.keys());
  while (left.size > 0) {
    let pivot = -1;
    for (const k of left) {
      const value = work[k]?.[k] as number;
      if (value < -zero) return false;
      if (pivot < 0 || value > (work[pivot]?.[pivot] as number)) pivot = k;
    }
    const top = work[pivot] as number[];
    const size = top[pivot] as number;
    // All diagonal entries left vanish: then the rest has to vanish, too.
    if (size <= zero) return [...left].every((k) => [...left].every((l) => Math.abs(work[k]?.[l] as number) <= zero));
    left.delete(pivot);
    for (const k of left) {
      const row = work[k] as number[];
      const factor = (row[pivot] as number) / size;
      for (const l of left) row[l] = (row[l] as number) - factor * (top[l] as number);
    }
  }
  return true;
}
