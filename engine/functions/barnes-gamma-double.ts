import {
  absolute,
  add,
  type DoubleComplex,
  divide,
  log,
  multiply,
  scale,
  subtract,
} from '../arithmetic/double-complex';
import { bernoulliNumber } from './bernoulli';

/** An expansion starts where |y/w| cos(arg/2) of every period w is at least this: exp(-2 pi 6.5) is below 2^-53. */
const REACH = 6.5;

/** Terms beyond the powers; their smallest one comes earlier at every far point. */
const TERMS = 24;

/** Most lattice points; a point that needs more has no value here. */
const MAXIMAL_POINTS = 200_000;

/** Coefficients of (z/2)/sinh(z/2) = sum h_j z^2j: -(1 - 2^(1-2j)) B_2j/(2j)!. */
const HALF_SERIES: readonly number[] = Array.from({ length: TERMS }, (_, j) => {
  if (j === 0) return 1;
  let factorial = 1;
  for (let k = 2; k <= 2 * j; k++) factorial *= k;
  return (-(1 - 2 ** (1 - 2 * j)) * bernoulliNumber(2 * j).toNumber()) / factorial;
});

/** log Gamma_N(x|w) for fixed periods, in doubles; see logBarnesGamma. NaN where the point is out of reach. */
export function barnesGammaDouble(periods: readonly DoubleComplex[]): (x: DoubleComplex) => DoubleComplex {
  const sorted = [...periods].sort((a, b) => absolute(b) - absolute(a));
  const levels = sorted.map((_, k) => levelOf(sorted.slice(k)));
  return (x) => {
    const total = { re: 0, im: 0, points: 0 };
    descend(levels, x, 0, total);
    return total.points > MAXIMAL_POINTS ? { re: Number.NaN, im: Number.NaN } : { re: total.re, im: total.im };
  };
}

interface Level {
  readonly periods: readonly DoubleComplex[];
  readonly half: DoubleComplex;
  readonly volume: DoubleComplex;
  /** Coefficients of product of (w_i t/2)/sinh(w_i t/2) in t^2j. */
  readonly series: readonly DoubleComplex[];
}

function levelOf(periods: readonly DoubleComplex[]): Level {
  const one = { re: 1, im: 0 };
  const start = Array.from({ length: TERMS }, (_, j) => (j === 0 ? one : { re: 0, im: 0 }));
  const series = periods.reduce<DoubleComplex[]>((product, w) => {
    const square = multiply(w, w);
    const own: DoubleComplex[] = [];
    let power: DoubleComplex = one;
    for (const h of HALF_SERIES) {
      own.push(scale(power, h));
      power = multiply(power, square);
    }
    return product.map((_, k) =>
      product
        .slice(0, k + 1)
        .reduce((sum, c, i) => add(sum, multiply(c, own[k - i] as DoubleComplex)), { re: 0, im: 0 }),
    );
  }, start);
  return {
    periods,
    half: scale(periods.reduce(add, { re: 0, im: 0 }), 0.5),
    volume: periods.reduce(multiply, one),
    series,
  };
}

function descend(
  levels: readonly Level[],
  x: DoubleComplex,
  at: number,
  total: { re: number; im: number; points: number },
): void {
  const level = levels[at];
  if (total.points > MAXIMAL_POINTS) return;
  if (level === undefined) {
    total.points++;
    total.re -= Math.log(Math.hypot(x.re, x.im));
    total.im -= Math.atan2(x.im, x.re);
    return;
  }
  const w = level.periods[0] as DoubleComplex;
  let point = x;
  while (!isFar(level, point)) {
    if (total.points > MAXIMAL_POINTS) return;
    descend(levels, point, at + 1, total);
    point = add(point, w);
  }
  const far = farValue(level, point);
  total.re += far.re;
  total.im += far.im;
}

function isFar({ periods, half }: Level, x: DoubleComplex): boolean {
  const y = subtract(x, half);
  return periods.every((w) => {
    const ratio = divide(y, w);
    const size = absolute(ratio);
    return ratio.re > -size / 2 && size * Math.sqrt((1 + ratio.re / size) / 2) >= REACH;
  });
}

function farValue({ periods, half, volume, series }: Level, x: DoubleComplex): DoubleComplex {
  const count = periods.length;
  const y = subtract(x, half);
  const logarithm = log(y);
  const step = divide({ re: 1, im: 0 }, multiply(y, y));
  let power: DoubleComplex = { re: 1, im: 0 };
  for (let k = 0; k < count; k++) power = multiply(power, y);
  let sum: DoubleComplex = { re: 0, im: 0 };
  let factor = 1;
  for (let k = 2; k <= count; k++) factor *= k;
  let smallest = Number.POSITIVE_INFINITY;
  for (let j = 0; j < TERMS; j++) {
    const order = count - 2 * j;
    const c = multiply(power, series[j] as DoubleComplex);
    if (order >= 0) {
      let harmonic = 0;
      for (let i = 1; i <= order; i++) harmonic += 1 / i;
      const bracket = subtract({ re: harmonic, im: 0 }, logarithm);
      sum = add(sum, scale(multiply(c, bracket), (order % 2 === 0 ? 1 : -1) / factor));
      factor = order > 1 ? factor / (order * (order - 1)) : 1;
    } else {
      const term = scale(c, factor);
      const size = absolute(term);
      if (size > 64 * smallest) break;
      smallest = Math.min(smallest, size || smallest);
      sum = add(sum, term);
      factor *= order * (order - 1);
    }
    power = multiply(power, step);
  }
  return divide(sum, volume);
}
