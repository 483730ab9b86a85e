import {
  addBalls,
  type Ball,
  divideBalls,
  exactBall,
  integerPowerBall,
  logBall,
  multiplyBallByInteger,
  multiplyBalls,
  subtractBalls,
} from '../arithmetic/ball';
import { Rational } from '../exact/rational';
import { piBall, rationalBall } from './enclosure';
import { factorial } from './factorial';
import { bernoulliPolynomial, derivativeBall } from './zeta-derivative';

/** Orders up to which derivatives of zeta serve. */
export const LARGEST_DERIVATIVE = 60;

/**
 * Li_{m+1}(z) = i^m (2 pi)^m/m! [zeta'(-m, a) + (-1)^m zeta'(-m, 1 - a) - i pi B_{m+1}(a)/(m + 1)], z = e^{2 pi i a},
 * 0 <= Re a <= 1: Hurwitz's formula differentiated (DLMF 25.13.2, 25.11.9), with Euler-Maclaurin for zeta' instead of series in
 * log z. On the cut the value from below, Re a = 1. Null where z cannot be told from 0 or 1, or the side of the cut is not known.
 */
export function polylogarithmByZetaDerivatives(n: number, z: Ball, precision: number): Ball | null {
  const m = n - 1;
  const wide = precision + 4 * n + 48;
  const circle = multiplyBallByInteger(piBall(wide), 2n, wide);
  const imaginary = multiplyBalls(circle, exactBall(0n, 1n), wide);
  const atOne = z.error === 0n && z.im === 0n && z.re === 1n << BigInt(z.bits);
  const log = atOne ? exactBall(0n) : upperLogarithm(z, wide);
  if (log === null) return null;
  const a = atOne ? log : divideBalls(log, imaginary, wide);
  const power = integerPowerBall(imaginary, m, wide);
  if (a === null || power === null) return null;
  // zeta'(-m, 0) = zeta'(-m, 1) for m >= 1.
  const one = derivativeBall(m, atOne ? exactBall(1n) : a, wide);
  const two = derivativeBall(m, subtractBalls(exactBall(1n), a, wide), wide);
  if (one === null || two === null) return null;
  const sum = m % 2 === 0 ? addBalls(one, two, wide) : subtractBalls(one, two, wide);
  const half = multiplyBalls(piBall(wide), exactBall(0n, 1n), wide);
  const polynomial = multiplyBalls(half, bernoulliPolynomial(n, a, wide), wide);
  const bracket = subtractBalls(sum, multiplyBalls(polynomial, rationalBall(Rational.of(1, n), wide), wide), wide);
  return multiplyBalls(multiplyBalls(bracket, power, wide), rationalBall(Rational.one.div(factorial(m)), wide), wide);
}

/** log z with an argument in [0, 2 pi], 2 pi for z > 1 and 0 for 0 < z < 1. */
function upperLogarithm(z: Ball, precision: number): Ball | null {
  const turn = multiplyBalls(piBall(precision), exactBall(0n, 2n), precision);
  if (z.im === 0n) {
    // Real by declaration: half the turn for z < 0, none or all of it else.
    const size = logBall({ ...z, re: z.re < 0n ? -z.re : z.re }, precision);
    if (size === null) return null;
    if (z.re < 0n) return addBalls(size, { ...turn, bits: turn.bits + 1 }, precision);
    return size.re > 0n ? addBalls(size, turn, precision) : size;
  }
  // log z = log(-z) + i pi has its cut on the positive axis.
  const log = logBall({ ...z, re: -z.re, im: -z.im }, precision);
  return log && addBalls(log, { ...turn, bits: turn.bits + 1 }, precision);
}
