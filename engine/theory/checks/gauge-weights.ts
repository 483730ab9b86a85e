import type { Group } from '../../lie/group';
import type { Representation } from '../../lie/representation';
import type { Theory } from '../theory';
import { leastMultiple } from './integers';
import { cocharacterLattice, orbitOnLattice } from './lattice';

export type GaugeFactors = readonly { readonly group: Group; readonly index: number }[];

/** The weights of a multiplet under the gauge groups, on the cocharacter lattice, times `unit`; zero ones left out. */
export interface GaugeWeights {
  readonly key: string;
  readonly unit: number;
  readonly rank: number;
  /** Row by row. */
  readonly rows: Int32Array;
  readonly multiplicities: Float64Array;
}

/** More weights than this are not added up while somebody is typing. */
const WEIGHT_LIMIT = 20_000;
/** Denominators of charges up to this. */
const UNIT_LIMIT = 1000n;

/** What to multiply all weights by to make them integers on the lattice; null where that is too much. */
export function chargeUnit(theory: Theory, groups: GaugeFactors): number | null {
  let unit = 1n;
  for (const { representations } of theory.multiplets) {
    for (const { index } of groups) {
      for (const { charge } of (representations[index] as Representation).irreps) {
        unit = leastMultiple(unit, charge.denominator);
        if (unit > UNIT_LIMIT) return null;
      }
    }
  }
  return Number(unit);
}

// Pure memoisation, by the gauge groups and the representations.
const kept = new Map<string, GaugeWeights | null>();
const KEPT = 200;

/** Null where there are too many weights. */
export function gaugeWeights(
  groups: GaugeFactors,
  representations: readonly Representation[],
  unit: number,
): GaugeWeights | null {
  const names = groups.map(({ group, index }) => `${group.name}:${(representations[index] as Representation).key}`);
  const key = `${unit} ${names.join(' ')}`;
  const known = kept.get(key);
  if (known !== undefined) return known;
  const weights = listWeights(groups, representations, unit, key);
  if (kept.size >= KEPT) kept.clear();
  kept.set(key, weights);
  return weights;
}

function listWeights(
  groups: GaugeFactors,
  representations: readonly Representation[],
  unit: number,
  key: string,
): GaugeWeights | null {
  let sums: { row: number[]; multiplicity: number }[] = [{ row: [], multiplicity: 1 }];
  for (const { group, index } of groups) {
    const representation = representations[index] as Representation;
    if (!representation.hasWeightsWithin(WEIGHT_LIMIT)) return null;
    const { rank } = cocharacterLattice(group);
    const parts = representation.orbits().flatMap((orbit) => {
      const rows = orbitOnLattice(group, orbit, unit);
      return Array.from({ length: orbit.size }, (_, k) => ({
        row: Array.from(rows.subarray(k * rank, (k + 1) * rank)),
        multiplicity: orbit.multiplicity,
      }));
    });
    if (parts.length * sums.length > WEIGHT_LIMIT) return null;
    sums = sums.flatMap((sum) =>
      parts.map((part) => ({ row: [...sum.row, ...part.row], multiplicity: sum.multiplicity * part.multiplicity })),
    );
  }
  const charged = sums.filter(({ row }) => row.some((entry) => entry !== 0));
  return {
    key,
    unit,
    rank: sums[0]?.row.length ?? 0,
    rows: Int32Array.from(charged.flatMap(({ row }) => row)),
    multiplicities: Float64Array.from(charged, ({ multiplicity }) => multiplicity),
  };
}

/** The value of the weight that begins at `offset` on a lattice vector. */
export function valueAt(rows: ArrayLike<number>, offset: number, point: readonly number[], rank: number): number {
  let sum = 0;
  for (let k = 0; k < rank; k++) sum += (rows[offset + k] as number) * (point[k] as number);
  return sum;
}

/** sum_w |w(n)|, times the unit, and sum_w |w(n)| w, times its square. */
export interface WeightSums {
  readonly spread: number;
  readonly moment: readonly number[];
}

export function weightSums({ rows, multiplicities, rank }: GaugeWeights, point: readonly number[]): WeightSums {
  let spread = 0;
  const moment = new Array<number>(rank).fill(0);
  for (let row = 0; row < multiplicities.length; row++) {
    const value = Math.abs(valueAt(rows, row * rank, point, rank)) * (multiplicities[row] as number);
    if (value === 0) continue;
    spread += value;
    for (let k = 0; k < rank; k++) moment[k] = (moment[k] as number) + value * (rows[row * rank + k] as number);
  }
  return { spread, moment };
}
