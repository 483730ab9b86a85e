import { type DoubleComplex, divide } from '../arithmetic/double-complex';
import { numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  type FixedComplex,
  logComplex,
  multiplyComplex,
  oneComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { type BarnesFar, barnesFar, barnesFarValue, barnesReach } from './barnes-far';
import { type Estimate, stepsToReach } from './euler-maclaurin';
import { stirlingAt } from './log-gamma-precise';
import { RisingProduct } from './rising-product';
import { stirlingReach } from './stirling-series';

/** Most lattice points multiplied out; beyond it the precision asked for is out of reach. */
const MAXIMAL_POINTS = 400_000;

/** A value of log Gamma_N; `proved`: the error bounds everything. */
export interface BarnesEstimate extends Estimate {
  readonly proved: boolean;
}

/**
 * log Gamma_N(x|w) = d/ds zeta_N(s, x|w) at 0, zeta_N(s) = sum over n >= 0 of (x + n.w)^-s with principal logarithms
 * (Barnes 1904; normalisation of Ruijsenaars 2000, Adv. Math. 156, 107). The periods lie in an open half plane and
 * their cone does not hold the negative real axis; x + n.w is never 0. Method: steps along the largest period,
 * Gamma_N(x) = Gamma_(N-1)(x|the others) Gamma_N(x + w), down to one period, where
 * log Gamma_1(x|w) = log Gamma(x/w) + (x/w - 1/2) log w - log(2 pi)/2; far away the expansion of barnes-far.ts.
 * `further` adds steps, for a second value. Error: rounding and remainders; of the latter no bound is known for periods
 * that are not positive (`proved` is false), so two values with different `further` should then be compared. Errors of x
 * and of the periods are not included. Null when too many lattice points would be needed.
 */
export function logBarnesGamma(
  x: FixedComplex,
  periods: readonly FixedComplex[],
  bits: number,
  further = 0,
): BarnesEstimate | null {
  const size = (z: FixedComplex): bigint => absoluteComplex(z);
  const sorted = [...periods].sort((a, b) => (size(a) < size(b) ? 1 : size(a) > size(b) ? -1 : 0));
  const guard = guardBits(x, sorted, bits);
  const working = bits + guard;
  const lift = (z: FixedComplex): FixedComplex => ({ re: z.re << BigInt(guard), im: z.im << BigInt(guard) });
  const lifted = sorted.map(lift);
  const last = lifted[lifted.length - 1] as FixedComplex;
  const walk: Walk = {
    bits: working,
    further,
    periods: lifted,
    far: lifted.slice(0, -1).map((_, level) => barnesFar(lifted.slice(level), working)),
    rough: sorted.map((w) => approximate(w, bits)),
    log: logComplex(last, working),
    simple: last.im === 0n && last.re > 0n,
    product: new RisingProduct(working),
    value: zeroComplex,
    linear: zeroComplex,
    turns: zeroComplex,
    error: 0,
    points: 0,
  };
  descend(walk, lift(x), 0);
  if (walk.points > MAXIMAL_POINTS) return null;
  const product = walk.product.logarithm();
  const lead = multiplyComplex(walk.linear, walk.log, working);
  // 2 pi i times what the principal logarithms of x + n w and of x/w + n, w differ by.
  const turned = multiplyComplex(walk.turns, { re: 0n, im: 2n * piFixed(working) }, working);
  const total = subtractComplex(addComplex(addComplex(walk.value, lead), turned), product.value);
  // log w errs by 1.5 and pi by 2.
  const linearSize = 2 + numberFromFixed(absoluteComplex(walk.linear) + absoluteComplex(walk.turns), working);
  const error = product.error + BigInt(Math.ceil(walk.error + 2 * linearSize));
  const by = BigInt(guard);
  return {
    value: { re: total.re >> by, im: total.im >> by },
    error: (error >> by) + 2n,
    proved: lifted.every(({ re, im }) => im === 0n && re > 0n),
  };
}

interface Walk {
  readonly bits: number;
  readonly further: number;
  /** Descending in modulus; level k uses those from k on. */
  readonly periods: readonly FixedComplex[];
  readonly far: readonly BarnesFar[];
  readonly rough: readonly DoubleComplex[];
  /** log of the last period. */
  readonly log: FixedComplex;
  /** The last period is positive: principal logarithms of x + n w and x/w + n agree. */
  readonly simple: boolean;
  readonly product: RisingProduct;
  value: FixedComplex;
  /** Sum of x/w - 1/2 over all rows, to be multiplied by log w. */
  linear: FixedComplex;
  /** Factor of 2 pi i. */
  turns: FixedComplex;
  error: number;
  points: number;
}

function approximate(z: FixedComplex, bits: number): DoubleComplex {
  return { re: numberFromFixed(z.re, bits), im: numberFromFixed(z.im, bits) };
}

/** Bits that sums of powers of the far point cancel, and some for the rounding of the terms. */
function guardBits(x: FixedComplex, periods: readonly FixedComplex[], bits: number): number {
  const largest = numberFromFixed(absoluteComplex(periods[0] as FixedComplex), bits);
  const away = barnesReach(bits + 100, periods.length) * largest + numberFromFixed(absoluteComplex(x), bits);
  const volume = periods.reduce((sum, w) => sum + Math.log2(away / numberFromFixed(absoluteComplex(w), bits)), 0);
  return 4 * Math.ceil((volume + Math.log2(Math.log2(away + 2) + 2) + 12) / 4);
}

/** Adds log Gamma of the periods from `level` on at x. */
function descend(walk: Walk, x: FixedComplex, level: number): void {
  if (walk.points > MAXIMAL_POINTS) return;
  const far = walk.far[level];
  if (far === undefined) {
    addRow(walk, x);
    return;
  }
  const steps = stepsAway(walk, x, level) + walk.further;
  let at = x;
  for (let step = 0; step < steps; step++) {
    descend(walk, at, level + 1);
    if (walk.points > MAXIMAL_POINTS) return;
    at = addComplex(at, walk.periods[level] as FixedComplex);
  }
  const value = barnesFarValue(far, at, walk.bits);
  walk.value = addComplex(walk.value, value.value);
  walk.error += Number(value.error);
}

/** Adds log Gamma_1(x|w) of the last period: the factors go to the product. */
function addRow(walk: Walk, x: FixedComplex): void {
  const { bits } = walk;
  const w = walk.periods[walk.periods.length - 1] as FixedComplex;
  const one = oneComplex(bits).re;
  const whole = w.im === 0n && w.re === one;
  const z = whole ? x : divideComplex(x, w, bits);
  const rough = approximate(z, bits);
  const steps = stepsToReach(rough, stirlingReach(bits)) + walk.further;
  walk.points += steps + 1;
  if (walk.points > MAXIMAL_POINTS) return;
  walk.product.multiplyRising(z, steps);
  const away = { re: z.re + BigInt(steps) * one, im: z.im };
  const far = stirlingAt(away, bits);
  // log(2 pi)/2 of log Gamma and of log Gamma_1 cancel.
  walk.value = addComplex(walk.value, far.value);
  walk.linear = addComplex(walk.linear, { re: z.re - (one >> 1n), im: z.im });
  walk.error += Number(far.error) + 1;
  // The quotient's 1.5 units meet |psi(z)| <= |log Z| + sum of 1/|z + k|, of which two may be next to 0, and log w.
  if (!whole) walk.error += 1.5 * (slope(rough, steps) + numberFromFixed(absoluteComplex(walk.log), bits));
  if (!walk.simple || (z.im === 0n) !== (x.im === 0n)) addTurns(walk, x, z, steps);
}

function slope(z: DoubleComplex, steps: number): number {
  const nearest = z.re > 0 ? 0 : Math.min(steps, Math.round(-z.re));
  const distance = Math.hypot(z.re + nearest, z.im);
  const size = Math.hypot(z.re, z.im) + steps;
  return Math.log(size + 2) + 2 / distance + 2 * Math.log(steps + 2) + 4;
}

/**
 * With log(x + n w) = log w + log(x/w + n) + 2 pi i m_n the row has -2 pi i (sum of m_n over the steps + m zeta(0, x/w + steps)),
 * zeta(0, a) = 1/2 - a, m that of the far point.
 */
function addTurns(walk: Walk, x: FixedComplex, z: FixedComplex, steps: number): void {
  const { bits } = walk;
  const w = walk.rough[walk.rough.length - 1] as DoubleComplex;
  const [start, ratio] = [approximate(x, bits), approximate(z, bits)];
  const turn = (n: number): number => {
    const direct = Math.atan2(start.im + n * w.im, start.re + n * w.re);
    return Math.round((direct - Math.atan2(w.im, w.re) - Math.atan2(ratio.im, ratio.re + n)) / (2 * Math.PI));
  };
  let near = 0;
  for (let n = 0; n < steps; n++) near += turn(n);
  const far = BigInt(turn(steps));
  const half = 1n << BigInt(bits - 1);
  const away = z.re + (BigInt(steps) << BigInt(bits));
  walk.turns = subtractComplex(walk.turns, {
    re: (BigInt(near) << BigInt(bits)) + far * (half - away),
    im: -far * z.im,
  });
}

/** Steps along the period of a level after which its expansion is good. */
function stepsAway(walk: Walk, x: FixedComplex, level: number): number {
  const periods = walk.rough.slice(level);
  const w = periods[0] as DoubleComplex;
  const half = periods.reduce((sum, p) => ({ re: sum.re + p.re / 2, im: sum.im + p.im / 2 }), { re: 0, im: 0 });
  const rough = approximate(x, walk.bits);
  const reach = barnesReach(walk.bits, periods.length);
  // Bounds of the remainder hold in the right half plane only; other periods go up to 120 degrees.
  const least = (walk.far[level] as BarnesFar).positive ? 0 : -0.5;
  const far = (steps: number): boolean => {
    const y = { re: rough.re - half.re + steps * w.re, im: rough.im - half.im + steps * w.im };
    return periods.every((p) => {
      const ratio = divide(y, p);
      const size = Math.hypot(ratio.re, ratio.im);
      // |y/p| cos(arg/2) is what limits the expansion.
      return ratio.re > least * size && size * Math.sqrt((1 + ratio.re / size) / 2) >= reach;
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
