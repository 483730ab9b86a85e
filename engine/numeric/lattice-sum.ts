import { type DoubleValue, formDouble } from '../arithmetic/form-double';
import type { Form } from '../exact/form';
import type { FunctionName } from '../functions/special-function';
import { functions } from '../functions/table';

/** Most lattice points that are looked at one by one. */
const MOST_POINTS = 400_000;

/** Zeros and poles of a function as seen from a point. */
export interface LatticeSum {
  /** Distance to the nearest; infinite where the function has none. */
  readonly distance: number;
  /** Upper bound of the sum of |y - z|^-power over all zeros and poles z, for every y within a quarter of that distance. */
  readonly bound: number;
}

/**
 * Sums over the zeros and poles of a function about a point off them, power at least 4; null where too many points would
 * have to be looked at, or where periods have no common half plane.
 */
export function latticeSum(
  name: FunctionName,
  argument: Form,
  parameters: readonly Form[],
  power: number,
): LatticeSum | null {
  const at = formDouble(argument, () => null);
  if (at === null) return null;
  const cones: Cone[] = [];
  for (const lattice of functions[name].zeros) {
    const start = formDouble(lattice.start(parameters), () => null);
    const steps = lattice.steps(parameters).map((step) => formDouble(step, () => null));
    if (start === null || steps.includes(null)) return null;
    const cone = coneSeen({ re: at.re - start.re, im: at.im - start.im }, steps as DoubleValue[]);
    if (cone === null) return null;
    cones.push(cone);
  }
  const distance = Math.min(...cones.map(({ near }) => near));
  const reach = Number.isFinite(distance) ? distance / 4 : 0;
  let bound = 0;
  for (const { distances, dimension, slope, last } of cones) {
    for (const d of distances) bound += (d - reach) ** -power;
    if (dimension === 0) continue;
    // Beyond level K = last a point lies at least slope k/2 away, less the reach; there are at most 1.2 k^(d-1) a level.
    bound += 1.2 * (2.7 / slope) ** power * (last ** (dimension - power) / (power - dimension));
  }
  return { distance, bound: 1.01 * bound };
}

interface Cone {
  readonly distances: readonly number[];
  readonly near: number;
  readonly dimension: number;
  readonly slope: number;
  readonly last: number;
}

/** The points sum k_j step_j, k_j >= 0, seen from `to`: those of the first levels one by one, the others by a bound. */
function coneSeen(to: DoubleValue, steps: readonly DoubleValue[]): Cone | null {
  const { axis, slope } = halfPlane(steps);
  if (!(slope > 0)) return null;
  const ahead = Math.max(0, to.re * axis.re + to.im * axis.im);
  // From here on the distance, at least slope k - ahead, is at least slope k/2, also from a quarter nearer.
  const last = Math.ceil((2 * ahead) / slope + 12);
  if ((last + 3) ** steps.length > MOST_POINTS * 6) return null;
  const distances: number[] = [];
  const visit = (k: number, left: DoubleValue, levels: number): void => {
    const step = steps[k];
    if (step === undefined) {
      distances.push(Math.hypot(left.re, left.im));
      return;
    }
    for (let n = 0; n <= levels; n++) {
      visit(k + 1, { re: left.re - n * step.re, im: left.im - n * step.im }, levels - n);
    }
  };
  visit(0, to, last);
  const near = distances.reduce((least, d) => Math.min(least, d), Number.POSITIVE_INFINITY);
  return { distances, near, dimension: steps.length, slope, last };
}

/** The unit vector along which every step goes forward most, at least by `slope`, which is not positive where none does. */
function halfPlane(steps: readonly DoubleValue[]): { readonly axis: DoubleValue; readonly slope: number } {
  if (steps.length === 0) return { axis: { re: 0, im: 0 }, slope: 1 };
  const units = steps.map(({ re, im }) => ({ re: re / Math.hypot(re, im), im: im / Math.hypot(re, im) }));
  // It halves the angle between the two outermost.
  const middles = units.flatMap((one) => units.map((two) => ({ re: one.re + two.re, im: one.im + two.im })));
  const axes = middles.map(({ re, im }) => ({ re: re / Math.hypot(re, im), im: im / Math.hypot(re, im) }));
  const tried = axes.map((axis) => ({
    axis,
    slope: Math.min(...steps.map(({ re, im }) => re * axis.re + im * axis.im)),
  }));
  return tried.reduce((best, next) => (next.slope > best.slope ? next : best));
}
