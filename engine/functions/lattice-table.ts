import type { DoubleComplex } from '../arithmetic/double-complex';
import { fixedFromNumber, fixedFromRatio, multiplyFixed, numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  type FixedComplex,
  multiplyComplex,
  oneComplex,
  scaleComplex,
  squareComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { barnesSeries } from './barnes-series';
import { memoiseByKey } from './kernel-memo';
import { type FactorTable, logOfSquares } from './lattice-factors';
import { farDerivatives, type LatticeLevel } from './lattice-far';
import { LogProduct } from './log-product';
import type { ExactParameter } from './special-function';

/**
 * What log prod (1 - z^2/l^2) over the half-integer points l = sum (n_i + 1/2) w_i, n_i >= 0, needs of the periods: the
 * points next to 0 as factors, all others by the power series of their logarithms.
 */
export interface LatticeTable extends FactorTable {
  /** The series serves |z| <= radius. */
  readonly radius: number;
  readonly radiusSquare: bigint;
  /** Sum of log l^2 over those points. */
  readonly logSquares: FixedComplex;
  /** Coefficients of (z/radius)^2, (z/radius)^4, ... */
  readonly coefficients: readonly FixedComplex[];
  /** log Gamma_N at half the sum of the periods (normalised as in `logBarnesGamma`). */
  readonly center: () => FixedComplex;
}

/** More lattice points than this are not multiplied out. */
const MAXIMAL_LATTICE_POINTS = 400_000;
/** Why there is no table, in words. */
export const TOO_MANY_POINTS = `more than ${MAXIMAL_LATTICE_POINTS} lattice points would be needed`;
/** Products spent on the power sums of further points, so that these need not be factors. */
const ABSORBING = 200_000;
/** Points further out than so many radii may be left to the power series. */
const FACTORS_REACH = 6;

/** What expansions leave out is below 2^-(bits + this). */
const SPARE_BITS = 32;

/**
 * How far out, in periods, the expansion of a sum at infinity starts, in order to be right to `bits` bits: its smallest term
 * is about e^{-2 pi reach}, and term i, (2i)!/(2 pi reach)^{2i}, must be small before the 0.2 `bits` + 16 terms end that
 * `barnesSeries` has.
 */
export function latticeReach(bits: number): number {
  const target = bits + SPARE_BITS;
  const last = 2 * Math.floor(0.2 * target + 16);
  // Stirling's formula for the root of (2i)!.
  const root = (last / Math.E) * (2 * Math.PI * last) ** (1 / (2 * last));
  return Math.max(0.1104 * target + 2, (root * 2 ** (target / last)) / (2 * Math.PI));
}

/** A class of radii that holds |z|: ratios of the root of 2, not below a quarter of the sum of the periods. */
export function latticeRadius(size: number, total: number): number {
  const least = total / 4;
  return size <= least ? least : least * Math.SQRT2 ** Math.ceil(2 * Math.log2((size * (1 + 1e-9)) / least));
}

const tables = memoiseByKey<LatticeTable | null>(24);
/** Tables with more points than this take megabytes each, and few are kept. */
const MANY_POINTS = 30_000;
const largeTables = memoiseByKey<LatticeTable | null>(4);

/**
 * The table for periods w with positive real parts (or rotated so), |z| <= `radius`, right to `bits` bits; null where too
 * many lattice points would be needed. Another `stretch` moves every far point and leaves the same sum.
 */
export function latticeTable(
  periods: readonly ExactParameter[],
  radius: number,
  bits: number,
  stretch = 1,
): LatticeTable | null {
  const approx = periods.map(({ approx }) => approx);
  const sizes = approx.map(({ re, im }) => Math.hypot(re, im));
  const reach = latticeReach(bits) * stretch;
  const out = reach * Math.max(...sizes) + radius;
  const volume = sizes.reduce((sum, size) => sum + Math.max(0, Math.log2(out / size)), 0);
  const working = bits + 32 * Math.ceil((volume + Math.log2(Math.log2(out + 2) + 2) + 34) / 32);
  const exact = periods.map((w) => w.value(working));
  // Points of a simplex with edges `out`.
  const many = sizes.reduce((count, size, k) => (count * out) / (size * (k + 1)), 1) > MANY_POINTS;
  return (many ? largeTables : tables)(
    [bits, radius, stretch, ...exact.flatMap(({ re, im }) => [re, im])].join('|'),
    () => {
      const order = sizes.map((_, k) => k).sort((a, b) => (sizes[b] as number) - (sizes[a] as number));
      const pick = <T>(list: readonly T[]): T[] => order.map((k) => list[k] as T);
      return build({ periods: pick(exact), rough: pick(approx), reach, radius, bits: working });
    },
  );
}

interface Frame {
  /** Descending in modulus. */
  readonly periods: readonly FixedComplex[];
  readonly rough: readonly DoubleComplex[];
  readonly reach: number;
  readonly radius: number;
  readonly bits: number;
}

interface Walk extends Frame {
  readonly points: FixedComplex[];
  /** By the number of periods already stepped along: where the expansion over the others starts. */
  readonly far: FixedComplex[][];
}

/** Minus the cosine of the widest angle between u and a period: next to 180 degrees no expansion serves. */
export const WIDEST = 0.95;
/** Far points lie beyond so many radii, so that the power series falls off. */
const SERIES_REACH = 1.6;

/**
 * |u/p| cos(arg/2), which limits an expansion at infinity, is large enough for every period from `level` on, and u is
 * beyond the radius of the power series.
 */
function isFarOut({ rough, reach, radius }: Frame, level: number, re: number, im: number): boolean {
  if (re * re + im * im < (SERIES_REACH * radius) ** 2) return false;
  for (let k = level; k < rough.length; k++) {
    const p = rough[k] as DoubleComplex;
    const norm = p.re * p.re + p.im * p.im;
    const ratio = (re * p.re + im * p.im) / norm;
    const size = Math.sqrt((re * re + im * im) / norm);
    const needed = reach + radius / Math.sqrt(norm);
    if (ratio <= -WIDEST * size || size * (size + ratio) < 2 * needed * needed) return false;
  }
  return true;
}

/** Steps along the period of a level, from u = re + i im, until the expansion serves. */
function stepsOut(frame: Frame, level: number, re: number, im: number): number {
  const p = frame.rough[level] as DoubleComplex;
  const far = (steps: number): boolean => isFarOut(frame, level, re + steps * p.re, im + steps * p.im);
  if (far(0)) return 0;
  let high = 1;
  while (!far(high)) {
    if (high > MAXIMAL_LATTICE_POINTS) return high;
    high *= 2;
  }
  let low = high >> 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (far(middle)) high = middle;
    else low = middle;
  }
  return high;
}

/** The number of lattice points that would be multiplied out, at least while it is not above `most`. */
function countPoints(frame: Frame, most: number, level = 0, re = 0, im = 0): number {
  const p = frame.rough[level] as DoubleComplex;
  const steps = stepsOut(frame, level, re, im);
  if (level === frame.rough.length - 1) return steps;
  let count = 0;
  for (let k = 0; k < steps && count <= most; k++) {
    count += countPoints(frame, most - count, level + 1, re + (k + 0.5) * p.re, im + (k + 0.5) * p.im);
  }
  return count;
}

/** Adds the points and far points beyond u, a half-integer combination of the periods before `level`. */
function descend(walk: Walk, u: FixedComplex, level: number): void {
  const w = walk.periods[level];
  if (w === undefined) {
    walk.points.push(u);
    return;
  }
  const steps = stepsOut(walk, level, numberFromFixed(u.re, walk.bits), numberFromFixed(u.im, walk.bits));
  let at = u;
  for (let k = 0; k < steps; k++) {
    descend(walk, { re: at.re + (w.re >> 1n), im: at.im + (w.im >> 1n) }, level + 1);
    at = addComplex(at, w);
  }
  (walk.far[level] as FixedComplex[]).push(at);
}

function build(frame: Frame): LatticeTable | null {
  if (countPoints(frame, MAXIMAL_LATTICE_POINTS) > MAXIMAL_LATTICE_POINTS) return null;
  const { bits, radius, periods } = frame;
  const walk: Walk = { ...frame, points: [], far: periods.map(() => []) };
  descend(walk, zeroComplex, 0);
  const { factors, absorbed, terms } = separated(walk);
  const levels = walk.far.map(
    (points, level): LatticeLevel => ({
      points,
      periods: periods.length - level,
      series: barnesSeries(periods.slice(level), bits),
    }),
  );
  const { derivatives, center } = farDerivatives(levels, radius, terms, bits);
  addPowerSums(derivatives, absorbed, radius, bits);
  const shift = BigInt(bits);
  const squares = factors.map((point) =>
    point.im === 0n ? { re: (point.re * point.re) >> shift, im: 0n } : squareComplex(point, bits),
  );
  const parts: FactorTable = {
    bits,
    squares,
    roughRe: Float64Array.from(squares, ({ re }) => numberFromFixed(re, bits)),
    roughIm: Float64Array.from(squares, ({ im }) => numberFromFixed(im, bits)),
    real: periods.every(({ im }) => im === 0n),
  };
  return {
    ...parts,
    radius,
    radiusSquare: multiplyFixed(fixedFromNumber(radius, bits), fixedFromNumber(radius, bits), bits),
    logSquares: logOfSquares(parts),
    coefficients: derivatives,
    center: once(() => {
      const product = new LogProduct(bits);
      for (const point of walk.points) product.multiply(point);
      return subtractComplex(center(), product.logarithm().value);
    }),
  };
}

/** Computed when first asked for, and remembered. */
function once<T>(compute: () => T): () => T {
  let known: { readonly value: T } | null = null;
  return () => {
    known ??= { value: compute() };
    return known.value;
  };
}

/** Which points are factors and which are left to the power series, and how many terms that then needs. */
function separated({ points, far, radius, bits }: Walk): {
  readonly factors: readonly FixedComplex[];
  readonly absorbed: readonly FixedComplex[];
  readonly terms: number;
} {
  const size = (point: FixedComplex): number => numberFromFixed(absoluteComplex(point), bits);
  const termsFrom = (nearest: number): number => Math.ceil((bits * Math.LN2) / (2 * Math.log(nearest / radius))) + 4;
  const border = FACTORS_REACH * radius;
  // Points beyond a far point u lie further out than it.
  const open = Math.min(...far.flat().map(size));
  const absorbed = points.filter((point) => size(point) > border);
  const terms = termsFrom(Math.min(border, open));
  if (absorbed.length * terms <= ABSORBING) {
    return { factors: points.filter((point) => size(point) <= border), absorbed, terms };
  }
  return { factors: points, absorbed: [], terms: termsFrom(open) };
}

/** Adds -(radius/l)^{2j}/j for every point to coefficient j. */
function addPowerSums(
  coefficients: FixedComplex[],
  points: readonly FixedComplex[],
  radius: number,
  bits: number,
): void {
  const scaled = { re: fixedFromNumber(radius, bits), im: 0n };
  const sums: FixedComplex[] = coefficients.map(() => zeroComplex);
  for (const point of points) {
    const ratio = squareComplex(divideComplex(scaled, point, bits), bits);
    let power = oneComplex(bits);
    for (let j = 0; j < sums.length; j++) {
      power = multiplyComplex(power, ratio, bits);
      if (power.re >> 1n === 0n && power.im >> 1n === 0n) break;
      sums[j] = addComplex(sums[j] as FixedComplex, power);
    }
  }
  sums.forEach((sum, j) => {
    const share = scaleComplex(sum, fixedFromRatio(1n, BigInt(j + 1), bits), bits);
    coefficients[j] = subtractComplex(coefficients[j] as FixedComplex, share);
  });
}
