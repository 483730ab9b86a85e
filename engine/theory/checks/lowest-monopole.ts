import type { CoulombBranch } from './coulomb-branch';
import { weightSums } from './gauge-weights';
import type { Growth } from './growth';

export interface Monopole {
  readonly flux: readonly number[];
  /** Its R-charge times the scale of the growth. */
  readonly value: number;
  /** False where more fluxes than could be tried may have a smaller R-charge. */
  readonly complete: boolean;
}

/** Fluxes to try: some milliseconds. */
const FLUX_LIMIT = 20_000;

/**
 * The bare monopole operator of smallest R-charge over all dominant fluxes but zero. Where all rays have positive
 * R-charge, a flux with less than the best ray lies in a box: it is a positive combination of rays, whose R-charges
 * add up. Otherwise the lowest ray, multiples of which have no lower bound.
 */
export function lowestMonopole(branch: CoulombBranch, growth: Growth): Monopole | null {
  const values = branch.rays.map(({ point, sums }) => growth.monopole(point, sums));
  const first = values.reduce((best, value, k) => (value < (values[best] as number) ? k : best), 0);
  const lowest = branch.rays[first];
  if (lowest === undefined) return null;
  let best = { flux: lowest.point, value: values[first] as number };
  if (!(best.value > 0)) return { ...best, complete: true };
  const ranges = boxOf(branch, values, best.value);
  const count = ranges.reduce((product, { from, to }) => product * (to - from + 1), 1);
  if (!(count <= FLUX_LIMIT)) return { ...best, complete: false };
  for (const flux of fluxesIn(branch, ranges)) {
    const value = growth.monopole(
      flux,
      branch.matter.map(({ weights }) => weightSums(weights, flux)),
    );
    if (value < best.value) best = { flux, value };
  }
  return { ...best, complete: true };
}

interface Range {
  readonly from: number;
  readonly to: number;
}

/** Bounds of the walls' values on all fluxes whose R-charge is below `limit`. */
function boxOf(branch: CoulombBranch, values: readonly number[], limit: number): Range[] {
  return branch.chamber.walls.map((wall) => {
    const slopes = branch.rays.map(({ point }, k) => (limit * dot(wall, point)) / (values[k] as number));
    return { from: Math.ceil(Math.min(0, ...slopes) - SLACK), to: Math.floor(Math.max(0, ...slopes) + SLACK) };
  });
}

/** Against rounding in the quotients. */
const SLACK = 1e-9;

/** The lattice vectors but zero whose values on the walls lie in the ranges. */
function* fluxesIn({ chamber: { walls, edges } }: CoulombBranch, ranges: readonly Range[]): Generator<number[]> {
  const levels = ranges.map(({ from }) => from);
  const steps = edges.map((edge, k) => dot(walls[k] as readonly number[], edge));
  for (;;) {
    const flux = edges.reduce<number[]>(
      (sum, edge, k) =>
        sum.map((entry, i) => entry + ((levels[k] as number) * (edge[i] as number)) / (steps[k] as number)),
      new Array<number>(edges.length).fill(0),
    );
    const integers = flux.map(Math.round);
    const onLattice = flux.every((entry, i) => Math.abs(entry - (integers[i] as number)) < SLACK);
    if (onLattice && integers.some((entry) => entry !== 0)) yield integers;
    let place = 0;
    while (place < levels.length && levels[place] === ranges[place]?.to) {
      levels[place] = ranges[place]?.from ?? 0;
      place++;
    }
    if (place === levels.length) return;
    levels[place] = (levels[place] as number) + 1;
  }
}

function dot(a: readonly number[], b: readonly number[]): number {
  return a.reduce((sum, entry, k) => sum + entry * (b[k] as number), 0);
}
