import { addBalls, type Ball, ballFromRatio, multiplyBallByInteger, multiplyBalls } from '../arithmetic/ball';
import type { FixedComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { formDouble } from '../arithmetic/form-double';
import { formFixed } from '../arithmetic/form-fixed';
import type { Form } from '../exact/form';
import type { FunctionName } from '../functions/special-function';
import { functions } from '../functions/table';
import { exactOrder } from '../product/divisor';
import { latticeSum } from './lattice-sum';
import { exactParameter } from './precise';
import { isTooFar } from './reach';

/**
 * A derivative in the argument: a ball with error at most one unit of 2^-bits; or the order of the zero or pole that the
 * function has there; or null where the argument cannot be told from one, or lies too far out.
 */
export type LogDerivative = Ball | { readonly zeroOrder: number } | null;

/**
 * Five-point differences of step h: weights of log f(x + k h) for k = -2 ... 2, their common divisor, and how often the
 * bound of the derivative after the last one that they get right enters the error, over h^4: from Taylor's formula with
 * the remainder as an integral, (2 * 8 + 2 * 2^5)/(5! 12) = 1/18 and (2 * 16 + 2 * 2^6)/(6! 12) = 1/54, rounded up.
 */
const stencils = {
  1: { weights: [1, -8, 0, 8, -1], divisor: 12n, tested: 5, share: 1 / 18 },
  2: { weights: [-1, 16, -30, 16, -1], divisor: 12n, tested: 6, share: 1 / 54 },
} as const;

/** Bits kept beyond what is asked, and how far they may be raised when functions state larger errors. */
const GUARD = 16;
const MAXIMAL_GUARD = 1024;

/**
 * The first or second derivative of log f in its argument, where extremising needs it; argument and parameters must hold
 * no symbols.
 *
 * By differences of log f in enough digits. Derivatives of log f from the fifth on are sums over zeros and poles alone,
 * (-1)^{p-1} (p-1)! sum of +-(x - z)^-p: the functions here have order at most 3, so that their Hadamard polynomials are
 * at most cubic. This bounds the error of the differences; the rest is what f states for its own values.
 */
export function logDerivative(
  name: FunctionName,
  argument: Form,
  parameters: readonly Form[],
  order: 1 | 2,
  bits: number,
): LogDerivative {
  const approx = formDouble(argument, () => null);
  if (approx === null || isTooFar(name, approx, parameters)) return null;
  const zeroOrder = exactOrder(name, argument, parameters);
  if (zeroOrder !== 0) return { zeroOrder };
  const { weights, divisor, tested, share } = stencils[order];
  const sum = latticeSum(name, argument, parameters, tested);
  if (sum === null) return null;
  const factorial = tested === 5 ? 24 : 120;
  // h^4 share M <= 2^-(bits + 2), and 2 h within a quarter of the distance, for which the sum allows.
  const size = Math.max(Math.log2(sum.bound * factorial * share), -4 * bits);
  const step = Math.max(1, Math.ceil((bits + 2 + size) / 4), Math.ceil(3 - Math.log2(sum.distance)));
  for (let guard = GUARD; guard <= MAXIMAL_GUARD; guard *= 2) {
    const working = bits + order * step + guard;
    const logs = stencilLogs(name, argument, parameters, step, working, weights);
    if (logs === 'indistinct') continue;
    if (logs === null) return null;
    const precision = 2 * working + 256;
    let total: Ball = { re: 0n, im: 0n, bits: working, error: 0n };
    logs.forEach((log, k) => {
      total = addBalls(total, multiplyBallByInteger(log, BigInt(weights[k] as number), precision), precision);
    });
    const scaled = { ...total, bits: total.bits - order * step };
    const value = multiplyBalls(scaled, ballFromRatio(1n, divisor, precision), precision);
    const rounded = atBits(value, bits);
    if (rounded.error <= 1n) return rounded;
  }
  return null;
}

/** log f(x + k h) - log f(x) for k = -2 ... 2, each on the branch that joins them; null where one has no value. */
function stencilLogs(
  name: FunctionName,
  argument: Form,
  parameters: readonly Form[],
  step: number,
  working: number,
  weights: readonly number[],
): Ball[] | 'indistinct' | null {
  const at = formFixed(argument, working);
  if (at === null) return null;
  const exact = parameters.map(exactParameter);
  const middle = (weights.length - 1) / 2;
  const logs: Ball[] = [];
  for (let k = -middle; k <= middle; k++) {
    const point: FixedComplex = { re: at.re + (BigInt(k) << BigInt(working - step)), im: at.im };
    const log = functions[name].precise(point, exact, working);
    if (log.kind === 'indistinct') return 'indistinct';
    if (log.kind !== 'value') return null;
    logs.push({ re: log.re, im: log.im, bits: working, error: log.error });
  }
  const here = logs[middle] as Ball;
  const turn = 2n * piFixed(working);
  return logs.map((log) => {
    const im = log.im - here.im;
    // Neighbours differ by far less than half a turn: whole turns come from the cuts of the logarithm.
    const turns = (2n * im + turn) / (2n * turn) - (2n * im + turn < 0n ? 1n : 0n);
    const whole = turns < 0n ? -turns : turns;
    return { re: log.re - here.re, im: im - turns * turn, bits: working, error: log.error + here.error + 2n * whole };
  });
}

/** Rounds to `bits` fraction bits; the error of the differences is half a unit by the choice of the step. */
function atBits(value: Ball, bits: number): Ball {
  const drop = BigInt(value.bits - bits);
  const half = 1n << (drop - 1n);
  const round = (part: bigint) => (part + half) >> drop;
  // A quarter of a unit for the differences, and at most 0.71 units for rounding two parts.
  const exact = (value.error << 10n) >> drop;
  return { re: round(value.re), im: round(value.im), bits, error: exact < 40n ? 1n : (value.error >> drop) + 2n };
}

/**
 * The same in doubles, by Cauchy's formula over 32 points of a circle a quarter as wide as the distance to the nearest zero or
 * pole: truncated below 4^-31, rounded to about 1e-15 of the largest |log f| over the radius. Null where it lies too far out.
 */
export function logDerivativeDouble(
  name: FunctionName,
  argument: Form,
  parameters: readonly Form[],
  order: 1 | 2,
): { readonly re: number; readonly im: number } | null {
  const at = formDouble(argument, () => null);
  const sum = latticeSum(name, argument, parameters, 5);
  const periods = parameters.map((parameter) => formDouble(parameter, () => null));
  if (at === null || sum === null || periods.includes(null)) return null;
  const radius = Math.min(1, sum.distance) / 4;
  const count = 32;
  const angles = Array.from({ length: count }, (_, k) => (2 * Math.PI * k) / count);
  const re = Float64Array.from([at.re, ...angles.map((angle) => at.re + radius * Math.cos(angle))]);
  const im = Float64Array.from([at.im, ...angles.map((angle) => at.im + radius * Math.sin(angle))]);
  const outRe = new Float64Array(count + 1);
  const outIm = new Float64Array(count + 1);
  const kernel = functions[name].double(periods as { re: number; im: number }[]);
  kernel.addLog(re, im, 1, outRe, outIm);
  let sumRe = 0;
  let sumIm = 0;
  angles.forEach((angle, k) => {
    const x = (outRe[k + 1] as number) - (outRe[0] as number);
    const turned = (outIm[k + 1] as number) - (outIm[0] as number);
    const y = turned - 2 * Math.PI * Math.round(turned / (2 * Math.PI));
    sumRe += x * Math.cos(order * angle) + y * Math.sin(order * angle);
    sumIm += y * Math.cos(order * angle) - x * Math.sin(order * angle);
  });
  const scale = order / (count * radius ** order);
  return { re: sumRe * scale, im: sumIm * scale };
}
