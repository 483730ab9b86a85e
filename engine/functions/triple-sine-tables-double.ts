import { type DoubleSineTables, doubleSineTables } from './double-sine-tables-double';
import { oddKernelSeries } from './hyperbolic-series';

/** Tables for log S_3 in doubles: everything that depends on the periods alone. See `triple-sine-double.ts`. */
export interface TripleSineTables {
  /** Periods, largest first. */
  readonly periods: readonly [number, number, number];
  /** Sum of the periods. */
  readonly total: number;
  readonly step: number;
  /** h/(t_k sinh(w1 t_k) sinh(w2 t_k) sinh(w3 t_k)). */
  readonly weights: Float64Array;
  /** c4 h sum_k A_k and 2 c4 h sum_k B_k. */
  readonly constant: number;
  readonly quadratic: number;
  /** |Im z| from which the polynomial limit serves. */
  readonly reach: number;
  /** 1/(w1 w2 w3). */
  readonly cubic: number;
  /** (w1^2 + w2^2 + w3^2)/4. */
  readonly linear: number;
  /** For each period the double sine of the other two: S_2(x) = s_b(i (x/scale - q/2)). */
  readonly doubles: readonly {
    readonly larger: number;
    readonly smaller: number;
    readonly scale: number;
    readonly tables: DoubleSineTables;
  }[];
}

/** log(1/eps) with a margin of 3. */
export const TRIPLE_SINE_DEPTH = 40;

/** 2 pi p/h with p = pi/max(w) the height of the nearest pole: DEPTH for the error, DEPTH for the growth at `reach`. */
const RATE = 84;

/** Powers of t^2 in the series of the kernel, used for max(w) t < 1: the ratio is below 1/pi^2. */
const SERIES_TERMS = 20;

/** Builds the tables for real positive periods; throws RangeError otherwise. */
export function tripleSineTables(w1: number, w2: number, w3: number): TripleSineTables {
  const periods = [w1, w2, w3].sort((a, b) => b - a) as [number, number, number];
  if (!periods.every((w) => w > 0 && Number.isFinite(w))) {
    throw new RangeError('The triple sine in doubles needs positive periods.');
  }
  const total = w1 + w2 + w3;
  const height = Math.PI / periods[0];
  const step = (2 * Math.PI * height) / RATE;
  const count = Math.ceil((2 * TRIPLE_SINE_DEPTH) / (total * step)) + 2;
  const cubic = 1 / (w1 * w2 * w3);
  const weights = new Float64Array(count);
  for (let k = 0; k < count; k++) {
    const t = (k + 0.5) * step;
    const below = periods.reduce((product, w) => product * -Math.expm1(-2 * w * t), t);
    weights[k] = (8 * step * Math.exp(-total * t)) / below;
  }
  const sums = regularSums(periods, step);
  return {
    periods,
    total,
    step,
    weights,
    constant: cubic * step * sums.quartic,
    quadratic: 2 * cubic * step * sums.square,
    reach: TRIPLE_SINE_DEPTH / (2 * height),
    cubic,
    linear: (w1 * w1 + w2 * w2 + w3 * w3) / 4,
    doubles: [0, 1, 2].map((omitted) => {
      const [u, v] = periods.filter((_, k) => k !== omitted) as [number, number];
      return { larger: u, smaller: v, scale: Math.sqrt(u * v), tables: doubleSineTables(Math.sqrt(u / v)) };
    }),
  };
}

/**
 * sum_k A_k and sum_k B_k over all k >= 0, F(t) = prod w_i t/sinh(w_i t),
 * A = (F - 1 + (sum w^2) t^2/6)/t^4, B = (F - 1)/t^2; series where the differences would lose digits.
 */
function regularSums(periods: readonly number[], step: number): { quartic: number; square: number } {
  const series = oddKernelSeries(periods, SERIES_TERMS);
  const squares = periods.reduce((sum, w) => sum + w * w, 0) / 6;
  const largest = Math.max(...periods);
  const total = periods.reduce((sum, w) => sum + w, 0);
  // Beyond the last node F itself is below e^-45.
  const last = Math.max(Math.ceil(60 / (total * step)), 40);
  let quartic = -powerTail(4, last, step) + squares * powerTail(2, last, step);
  let square = -powerTail(2, last, step);
  for (let k = last - 1; k >= 0; k--) {
    const t = (k + 0.5) * step;
    const s = t * t;
    if (largest * t < 1) {
      let sum = 0;
      for (let m = SERIES_TERMS - 1; m >= 2; m--) sum = sum * s + (series[m] as number);
      quartic += sum;
      square += sum * s + (series[1] as number);
    } else {
      const kernel = periods.reduce((product, w) => (product * 2 * w * t) / -Math.expm1(-2 * w * t), 1);
      const f = kernel * Math.exp(-total * t);
      quartic += (f - 1 + squares * s) / (s * s);
      square += (f - 1) / s;
    }
  }
  return { quartic, square };
}

/** sum_{k >= n} ((k + 1/2) h)^{-s} for n >= 40 by the midpoint form of Euler-Maclaurin (DLMF 2.10); relative error 1e-16. */
function powerTail(s: number, n: number, step: number): number {
  const lead = n ** (1 - s) / (s - 1);
  const first = (-s * n ** (-s - 1)) / 24;
  const second = (7 * s * (s + 1) * (s + 2) * n ** (-s - 3)) / 5760;
  const third = (-31 * s * (s + 1) * (s + 2) * (s + 3) * (s + 4) * n ** (-s - 5)) / 967680;
  const fourth = (127 * s * (s + 1) * (s + 2) * (s + 3) * (s + 4) * (s + 5) * (s + 6) * n ** (-s - 7)) / 154828800;
  return (lead + first + second + third + fourth) / step ** s;
}
