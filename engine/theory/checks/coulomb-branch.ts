import { Rational } from '../../exact/rational';
import { gaugeGroups, type Theory } from '../theory';
import { Fan } from './fan';
import {
  chargeUnit,
  type GaugeFactors,
  type GaugeWeights,
  gaugeWeights,
  valueAt,
  type WeightSums,
  weightSums,
} from './gauge-weights';
import { cocharacterLattice } from './lattice';
import { dimensionWithout, type Matter, matterOf } from './matter';

/**
 * The directions n of the Coulomb branch in which one-loop factors grow differently: the Weyl chamber of all gauge
 * groups, cut by the hyperplanes w(n) = 0 of all matter weights. What grows like |w(n)| is linear on each of its
 * cones, so that it is known from the rays.
 */
export interface CoulombBranch {
  readonly groups: GaugeFactors;
  readonly rank: number;
  readonly unit: number;
  readonly matter: readonly ChargedMatter[];
  /** Sum of the positive roots of all groups, on the lattice. */
  readonly rootSum: readonly number[];
  readonly rays: readonly BranchRay[];
  readonly chamber: Chamber;
}

/** The Weyl chamber of all groups: functions that bound it (one more splits every U(1) direction), and their duals. */
export interface Chamber {
  readonly walls: readonly (readonly number[])[];
  /** Entry k is primitive, and zero on every wall but the k-th. */
  readonly edges: readonly (readonly number[])[];
  /** Whether wall k may also be negative: it is no simple root. */
  readonly free: readonly boolean[];
}

export interface ChargedMatter {
  readonly matter: Matter;
  /** Copies of each gauge weight: dimension under flavour, twice for a hyper. */
  readonly copies: number;
  readonly weights: GaugeWeights;
}

/** A ray as a primitive cocharacter in the lattice bases of all groups. */
export interface BranchRay {
  readonly point: readonly number[];
  /** Signs under the functions that bound the cones, in the same order for all rays. */
  readonly signs: readonly number[];
  /** For each entry of `matter`, copies left out. */
  readonly sums: readonly WeightSums[];
}

// Pure memoisation: several conditions ask for the same theory.
const branches = new WeakMap<Theory, CoulombBranch | null>();

/** Null where there are too many weights or cones. */
export function coulombBranch(theory: Theory): CoulombBranch | null {
  const known = branches.get(theory);
  if (known !== undefined) return known;
  const branch = findBranch(theory);
  branches.set(theory, branch);
  return branch;
}

function findBranch(theory: Theory): CoulombBranch | null {
  const groups = gaugeGroups(theory).map(({ group, index }) => ({ group: group.group, index }));
  const rootSum = groups.flatMap(({ group }) => cocharacterLattice(group).rootSum);
  const unit = chargeUnit(theory, groups);
  if (unit === null) return null;
  const matter: ChargedMatter[] = [];
  for (const one of matterOf(theory)) {
    const weights = gaugeWeights(groups, one.representations, unit);
    if (weights === null) return null;
    if (weights.rows.length === 0) continue;
    const flavour = dimensionWithout(one.representations, ...groups.map(({ index }) => index));
    matter.push({ matter: one, copies: Number(flavour) * (one.withDual ? 2 : 1), weights });
  }
  const chamber = chamberOf(groups);
  const fan = fanOf(groups, chamber, matter);
  if (fan === null) return null;
  const rays = fan.map(({ point, signs }) => ({
    point,
    signs,
    sums: matter.map(({ weights }) => sumsOn(point, weights)),
  }));
  return { groups, rank: rootSum.length, unit, matter, rootSum, rays, chamber };
}

type FanRays = readonly { readonly point: readonly number[]; readonly signs: readonly number[] }[];

// Pure memoisation, by gauge groups and the set of weights; and of sums, by ray and weights.
const fans = new Map<string, FanRays | null>();
const FANS_KEPT = 100;
const sumsKept = new WeakMap<readonly number[], Map<string, WeightSums>>();

function sumsOn(point: readonly number[], weights: GaugeWeights): WeightSums {
  let kept = sumsKept.get(point);
  if (!kept) {
    kept = new Map();
    sumsKept.set(point, kept);
  }
  const known = kept.get(weights.key);
  if (known) return known;
  const sums = weightSums(weights, point);
  kept.set(weights.key, sums);
  return sums;
}

function fanOf(groups: GaugeFactors, chamber: Chamber, matter: readonly ChargedMatter[]): FanRays | null {
  const keys = [...new Set(matter.map(({ weights }) => weights.key))].sort();
  const key = `${groups.map(({ group }) => group.name).join()} ${keys.join(' ; ')}`;
  const known = fans.get(key);
  if (known !== undefined) return known;
  const rays = findRays(chamber, matter);
  if (fans.size >= FANS_KEPT) fans.clear();
  fans.set(key, rays);
  return rays;
}

function findRays(chamber: Chamber, matter: readonly ChargedMatter[]): FanRays | null {
  const { walls, edges, free } = chamber;
  const rank = walls.length;
  const points = edges.flatMap((edge, k) => (free[k] ? [edge, edge.map((entry) => -entry)] : [edge]));
  const cuts = new Map<string, number[]>();
  for (const { weights } of matter) {
    for (let start = 0; start < weights.rows.length; start += rank) {
      const values = points.map((point) => valueAt(weights.rows, start, point, rank));
      if (values.every((value) => value >= 0) || values.every((value) => value <= 0)) continue;
      const row = Array.from(weights.rows.subarray(start, start + rank));
      cuts.set(hyperplaneKey(row), row);
    }
  }
  const fan = new Fan(rank, true);
  const signs = (functions: Iterable<readonly number[]>, point: readonly number[]): number[] =>
    Array.from(functions, (row) => Math.sign(valueAt(row, 0, point, rank)));
  for (const point of points) fan.add(point, signs(walls, point));
  for (const cut of cuts.values()) if (!fan.cut((point) => valueAt(cut, 0, point, rank))) return null;
  const all = [...walls, ...cuts.values()];
  return fan.points.map((point) => ({ point, signs: signs(all, point) }));
}

/** The same for all multiples of a weight. */
function hyperplaneKey(row: readonly number[]): string {
  const first = row.find((entry) => entry !== 0) ?? 1;
  return row.map((entry) => Rational.of(entry, first).toString()).join();
}

function chamberOf(groups: GaugeFactors): Chamber {
  const lattices = groups.map(({ group }) => cocharacterLattice(group));
  const rank = lattices.reduce((sum, lattice) => sum + lattice.rank, 0);
  let offset = 0;
  const parts = lattices.map((lattice) => {
    const placed = (vector: readonly number[]): number[] => {
      const whole = new Array<number>(rank).fill(0);
      for (const [k, entry] of vector.entries()) whole[offset + k] = entry;
      return whole;
    };
    const walls = lattice.walls.map(placed);
    const edges = lattice.edges.map(placed);
    offset += lattice.rank;
    return { walls, edges, free: walls.map((_, k) => k >= lattice.simple) };
  });
  return {
    walls: parts.flatMap(({ walls }) => walls),
    edges: parts.flatMap(({ edges }) => edges),
    free: parts.flatMap(({ free }) => free),
  };
}
