import { integerSqrt, numberFromFixed } from '../arithmetic/fixed';
import { memoiseBounded } from '../arithmetic/memo';
import type { ExactParameter } from './special-function';

/**
 * A real positive b known exactly enough to decide resonance: `square` is b^2 where that is rational (as p/q in any terms), else null;
 * `value(bits)` is b in fixed point, off by less than one ulp; `approx` is a double next to b.
 * Tables are remembered for the object itself: keep one object for one b.
 */
export interface ExactPeriod {
  readonly square: { readonly numerator: bigint; readonly denominator: bigint } | null;
  readonly value: (bits: number) => bigint;
  readonly approx: number;
}

function greatestCommonDivisor(a: bigint, b: bigint): bigint {
  return b === 0n ? a : greatestCommonDivisor(b, a % b);
}

/** b = sqrt(numerator / denominator), both positive. */
export function periodOfSquare(numerator: bigint, denominator: bigint): ExactPeriod {
  const value = memoiseBounded(8, (bits: number) => integerSqrt((numerator << BigInt(2 * bits)) / denominator));
  return { square: { numerator, denominator }, value, approx: numberFromFixed(value(200), 200) };
}

/** b = numerator / denominator, both positive. */
export function periodOfRatio(numerator: bigint, denominator: bigint): ExactPeriod {
  return periodOfSquare(numerator * numerator, denominator * denominator);
}

/** Pure memoisation: one period for one parameter object, so that its tables are found again. */
const periods = new WeakMap<ExactParameter, ExactPeriod>();

/** The period behind a parameter of a function; null unless it is real and positive. */
export function periodOfParameter(parameter: ExactParameter): ExactPeriod | null {
  const { approx, square, value } = parameter;
  if (approx.im !== 0 || !(approx.re > 0)) return null;
  const known = periods.get(parameter);
  if (known !== undefined) return known;
  const period = { square, value: (bits: number) => value(bits).re, approx: approx.re };
  periods.set(parameter, period);
  return period;
}

/** small^2 = p/q in lowest terms, p <= q. */
export interface ReducedSquare {
  readonly p: bigint;
  readonly q: bigint;
}

/** b^2 or b^-2, whichever is at most 1, reduced; null for irrational b^2. */
export function reducedSquare(b: ExactPeriod): ReducedSquare | null {
  if (b.square === null) return null;
  const { numerator, denominator } = b.square;
  const common = greatestCommonDivisor(numerator, denominator);
  const [p, q] = [numerator / common, denominator / common];
  return p <= q ? { p, q } : { p: q, q: p };
}

export interface PeriodPair {
  /** min(b, 1/b) and max(b, 1/b); each off by at most 2 ulps. */
  readonly small: bigint;
  readonly large: bigint;
}

/** The two periods in order of size; s_b does not change when they are exchanged. */
export function orderedPeriods(b: ExactPeriod, bits: number): PeriodPair {
  const swap = b.approx > 1;
  const size = Math.max(b.approx, 1 / b.approx);
  // An ulp of b is (1/b)^2 ulps of 1/b.
  const guard = 2 * Math.ceil(Math.log2(size)) + 4;
  const one = b.value(bits + guard);
  const other = (1n << BigInt(2 * (bits + guard))) / one;
  const drop = BigInt(guard);
  return swap ? { small: other >> drop, large: one >> drop } : { small: one >> drop, large: other >> drop };
}
