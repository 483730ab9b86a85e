import { type DoubleComplex, divide } from '../arithmetic/double-complex';
import { fixedFromRatio, numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  type FixedComplex,
  integerPowerComplex,
  logComplex,
  multiplyComplex,
  oneComplex,
  scaleComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { Rational } from '../exact/rational';
import { type BarnesSeries, barnesSeries } from './barnes-series';
import type { Estimate } from './euler-maclaurin';
import { LogProduct } from './log-product';

/** Most lattice points multiplied out; beyond it the precision asked for is out of reach. */
const MAXIMAL_POINTS = 400_000;

/**
 * log Gamma_N(x|w) = d/ds zeta_N(s, x|w) at 0, zeta_N(s) = sum over n >= 0 of (x + n.w)^-s with principal logarithms
 * (Barnes 1904; normalisation of Ruijsenaars 2000, Adv. Math. 156, 107). The periods lie in an open half plane and
 * their cone does not hold the negative real axis; x + n.w is never 0. Method: steps along the largest period,
 * Gamma_N(x) = Gamma_(N-1)(x|the others) Gamma_N(x + w), down to products; far away the expansion of zeta_N in
 * even powers of 1/(x - |w|/2). `further` adds steps, for a second value.
 * Error: rounding and the last term of each expansion; no bound of the remainder is known for complex periods, so two
 * values with different `further` should be compared. Errors of x and of the periods are not included. Null when too
 * many lattice points would be needed.
 */
export function logBarnesGamma(
  x: FixedComplex,
  periods: readonly FixedComplex[],
  bits: number,
  further = 0,
): Estimate | null {
  const size = (z: FixedComplex): bigint => absoluteComplex(z);
  const sorted = [...periods].sort((a, b) => (size(a) < size(b) ? 1 : size(a) > size(b) ? -1 : 0));
  const guard = guardBits(x, sorted, bits);
  const working = bits + guard;
  const lift = (z: FixedComplex): FixedComplex => ({ re: z.re << BigInt(guard), im: z.im << BigInt(guard) });
  const lifted = sorted.map(lift);
  const walk: Walk = {
    bits: working,
    further,
    periods: lifted,
    series: lifted.map((_, level) => barnesSeries(lifted.slice(level), working)),
    rough: sorted.map((w) => approximate(w, bits)),
    product: new LogProduct(working),
    value: zeroComplex,
    error: 0n,
    points: 0,
  };
  descend(walk, lift(x), 0);
  if (walk.points > MAXIMAL_POINTS) return null;
  const product = walk.product.logarithm();
  const total = subtractComplex(walk.value, product.value);
  const by = BigInt(guard);
  return {
    value: { re: total.re >> by, im: total.im >> by },
    error: ((walk.error + product.error) >> by) + 2n,
  };
}

interface Walk {
  readonly bits: number;
  readonly further: number;
  /** Descending in modulus; level k uses those from k on. */
  readonly periods: readonly FixedComplex[];
  readonly series: readonly BarnesSeries[];
  readonly rough: readonly DoubleComplex[];
  readonly product: LogProduct;
  value: FixedComplex;
  error: bigint;
  points: number;
}

function approximate(z: FixedComplex, bits: number): DoubleComplex {
  return { re: numberFromFixed(z.re, bits), im: numberFromFixed(z.im, bits) };
}

/** How far out an expansion with `bits` bits starts, in units of the largest period; see stepsToFarPoint. */
function reachOf(bits: number, count: number): number {
  return 0.14 * bits + 6 + count;
}

/** Bits that sums of powers of the far point cancel, and some for the rounding of the terms. */
function guardBits(x: FixedComplex, periods: readonly FixedComplex[], bits: number): number {
  const largest = numberFromFixed(absoluteComplex(periods[0] as FixedComplex), bits);
  const away = reachOf(bits + 100, periods.length) * largest + numberFromFixed(absoluteComplex(x), bits);
  const volume = periods.reduce((sum, w) => sum + Math.log2(away / numberFromFixed(absoluteComplex(w), bits)), 0);
  return Math.ceil(volume + Math.log2(Math.log2(away + 2) + 2)) + 24;
}

/** Adds log Gamma of the periods from `level` on at x. */
function descend(walk: Walk, x: FixedComplex, level: number): void {
  const w = walk.periods[level];
  if (walk.points > MAXIMAL_POINTS) return;
  if (w === undefined) {
    walk.points++;
    walk.product.multiply(x);
    return;
  }
  const steps = stepsAway(walk, x, level) + walk.further;
  let at = x;
  for (let step = 0; step < steps; step++) {
    descend(walk, at, level + 1);
    at = addComplex(at, w);
  }
  const far = farValue(walk, at, level);
  walk.value = addComplex(walk.value, far.value);
  walk.error += far.error;
}

/** Steps along the period of a level after which its expansion is good. */
function stepsAway(walk: Walk, x: FixedComplex, level: number): number {
  const periods = walk.rough.slice(level);
  const w = periods[0] as DoubleComplex;
  const half = periods.reduce((sum, p) => ({ re: sum.re + p.re / 2, im: sum.im + p.im / 2 }), { re: 0, im: 0 });
  const rough = approximate(x, walk.bits);
  const reach = reachOf(walk.bits, periods.length);
  const far = (steps: number): boolean => {
    const y = { re: rough.re - half.re + steps * w.re, im: rough.im - half.im + steps * w.im };
    return periods.every((p) => {
      const ratio = divide(y, p);
      const size = Math.hypot(ratio.re, ratio.im);
      // |y/p| cos(arg/2) is what limits the expansion; beyond 120 degrees it is not used.
      return ratio.re > -size / 2 && size * Math.sqrt((1 + ratio.re / size) / 2) >= reach;
    });
  };
  let high = 1;
  while (!far(high) && high < MAXIMAL_POINTS) high *= 2;
  let low = 0;
  if (far(0)) return 0;
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (far(middle)) high = middle;
    else low = middle;
  }
  return high;
}

/** More fraction bits of the small step 1/y^2, so that it has as many significant bits as the rest. */
const STEP_BITS = 32;

/**
 * log Gamma_N at a far point: with y = x - |w|/2 and d_2j of product of (w_i t/2)/sinh(w_i t/2) = sum d_2j t^2j,
 * (1/product of w_i) sum_j d_2j times (-1)^(N-2j) (H_(N-2j) - log y) y^(N-2j)/(N-2j)! for 2j <= N and
 * (2j-N-1)! y^(N-2j) beyond.
 */
function farValue(walk: Walk, x: FixedComplex, level: number): Estimate {
  const { bits } = walk;
  const count = walk.periods.length - level;
  const { half, inverseVolume, coefficients, unit } = walk.series[level] as BarnesSeries;
  const y = subtractComplex(x, half);
  const logarithm = logComplex(y, bits);
  const wide = { re: y.re << BigInt(STEP_BITS), im: y.im << BigInt(STEP_BITS) };
  const inverse = divideComplex(oneComplex(bits + STEP_BITS), wide, bits + STEP_BITS);
  const square = multiplyComplex(inverse, inverse, bits + STEP_BITS);
  const step = scaleComplex(square, unit, bits);
  let sum = zeroComplex;
  let power = integerPowerComplex(y, count, bits);
  let height =
    numberFromFixed(absoluteComplex(power), bits) * (numberFromFixed(absoluteComplex(logarithm), bits) + count);
  let index = 0;
  for (; 2 * index <= count; index++) {
    const order = count - 2 * index;
    const factor = Rational.of(order % 2 === 0 ? 1 : -1).div(factorial(order));
    const bracket = subtractComplex({ re: fixed(harmonic(order), bits), im: 0n }, logarithm);
    const term = multiplyComplex(multiplyComplex(power, bracket, bits), coefficients[index] as FixedComplex, bits);
    sum = addComplex(sum, scaleComplex(term, fixed(factor, bits), bits));
    power = multiplyComplex(power, step, bits + STEP_BITS);
  }
  const tail = tailSum(coefficients, index, count, power, step, bits);
  height += numberFromFixed(absoluteComplex(power), bits);
  const volume = numberFromFixed(absoluteComplex(inverseVolume), bits);
  const error = (64 * (count + 1) * (height + 1) + tail.error) * (volume + 1);
  return { value: multiplyComplex(addComplex(sum, tail.value), inverseVolume, bits), error: BigInt(Math.ceil(error)) };
}

/** The terms beyond 2j = N; the error in units, as a double. */
function tailSum(
  coefficients: readonly FixedComplex[],
  first: number,
  count: number,
  start: FixedComplex,
  step: FixedComplex,
  bits: number,
): { readonly value: FixedComplex; readonly error: number } {
  const shift = BigInt(bits + STEP_BITS);
  let term = start;
  let sum = zeroComplex;
  let recent: readonly number[] = [];
  let smallest = Number.POSITIVE_INFINITY;
  for (let j = first; j < coefficients.length; j++) {
    const piece = multiplyComplex(term, coefficients[j] as FixedComplex, bits);
    sum = addComplex(sum, piece);
    // Single coefficients can be accidentally small (periods 1, 2), so three terms decide together.
    recent = [...recent.slice(-2), Number(absoluteComplex(piece)) + 1];
    const largest = Math.max(...recent);
    if (recent.length === 3 && (largest <= 2 || largest > 16 * smallest)) break;
    smallest = Math.min(smallest, largest);
    const ratio = BigInt((2 * j - count) * (2 * j - count + 1));
    term = {
      re: ((term.re * step.re - term.im * step.im) * ratio) >> shift,
      im: ((term.re * step.im + term.im * step.re) * ratio) >> shift,
    };
  }
  return { value: sum, error: 2 * Math.max(...recent, 1) + 8 * coefficients.length };
}

function harmonic(n: number): Rational {
  let sum = Rational.zero;
  for (let k = 1; k <= n; k++) sum = sum.add(Rational.of(1, k));
  return sum;
}

function factorial(n: number): Rational {
  let product = 1n;
  for (let k = 2; k <= n; k++) product *= BigInt(k);
  return Rational.of(product);
}

function fixed(value: Rational, bits: number): bigint {
  return fixedFromRatio(value.numerator, value.denominator, bits);
}
