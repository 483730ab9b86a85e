import {
  addBalls,
  type Ball,
  divideBalls,
  exactBall,
  integerPowerBall,
  logBall,
  multiplyBallByInteger,
  multiplyBalls,
  negateBall,
  subtractBalls,
} from '../arithmetic/ball';
import { absolute, bitLength, numberFromFixed } from '../arithmetic/fixed';
import { sinCosFixed } from '../arithmetic/fixed-trig';
import { Rational } from '../exact/rational';
import { argumentBall, enclosed, exactZero, isReal, piBall, rationalBall, wholeNumber } from './enclosure';
import { factorial } from './factorial';
import { polylogarithmBall } from './polylogarithm';
import type { ExactParameter } from './special-function';
import type { FunctionValue, ValueFunction } from './value-function';
import { derivativeBall } from './zeta-derivative';

const LARGEST_ORDER = 200;

/**
 * The Clausen functions of real theta (Lewin 1981, chapters 4 and 7): Cl_n(theta) = sum_{k>=1} sin(k theta)/k^n for even
 * n, cos(k theta)/k^n for odd n, 1 <= n <= 200: imaginary or real part of Li_n(e^{i theta}). Cl_1 = -log|2 sin(theta/2)|.
 * Error: some units.
 */
export const clausen: ValueFunction = {
  least: 2,
  most: 2,
  definition:
    '\\mathrm{Cl}_{2m}(\\theta)=\\sum_{k\\ge1}\\frac{\\sin k\\theta}{k^{2m}},\\quad\\mathrm{Cl}_{2m+1}(\\theta)=\\sum_{k\\ge1}\\frac{\\cos k\\theta}{k^{2m+1}}',
  evaluate: ([n, theta], bits) => value(n as ExactParameter, theta as ExactParameter, bits, clausenBall),
  crossCheck: ([n, theta], bits) => {
    const derivatives = (wholeNumber(n as ExactParameter) ?? 0) <= LARGEST_DERIVATIVE + 1;
    return {
      route: derivatives ? 'derivatives of the zeta function' : 'duplication law',
      value: value(n as ExactParameter, theta as ExactParameter, bits, derivatives ? byZetaDerivatives : byDuplication),
    };
  },
  sources: [{ key: 'Lewin-1981', text: 'L. Lewin, Polylogarithms and Associated Functions, North Holland (1981)' }],
};

type Compute = (n: number, theta: Ball, precision: number) => Ball | null;

function value(n: ExactParameter, theta: ExactParameter, bits: number, compute: Compute): FunctionValue {
  const order = wholeNumber(n);
  if (order === null || order < 1 || order > LARGEST_ORDER) {
    return { kind: 'outside', says: `The order must be one of 1, 2, ..., ${LARGEST_ORDER}.` };
  }
  if (!isReal(theta)) return { kind: 'outside', says: 'The angle must be real.' };
  // theta in units of pi, where it is known to be a whole number of them.
  const half = wholeNumber(theta) === 0 ? 0 : theta.overPi?.isInteger() ? Number(theta.overPi.numerator % 2n) : null;
  if (order === 1 && half === 0) return { kind: 'pole' };
  if (order % 2 === 0 && half !== null) return exactZero;
  return enclosed(bits, (precision) => compute(order, argumentBall(theta, precision), precision));
}

function clausenBall(n: number, theta: Ball, precision: number): Ball | null {
  const bits = Math.max(theta.bits, precision);
  const { sin, cos } = sinCosFixed(theta.re << BigInt(bits - theta.bits), bits);
  const error = (theta.error << BigInt(bits - theta.bits)) + 3n;
  if (theta.re === 0n && theta.error === 0n) return part(n, polylogarithmBall(n, exactBall(1n), precision));
  if (n > 1) return part(n, polylogarithmBall(n, { re: cos, im: sin, bits, error }, precision));
  // -log|2 sin(theta/2)|: read with one fraction bit more theta is theta/2, with one less the sine is twice the sine.
  const twiceSine = absolute(sinCosFixed(theta.re << BigInt(bits - theta.bits), bits + 1).sin);
  if (twiceSine <= error) return null;
  const log = logBall({ re: twiceSine, im: 0n, bits, error }, precision);
  return log && negateBall(log);
}

function part(n: number, li: Ball | null): Ball | null {
  return li && { ...li, re: n % 2 === 0 ? li.im : li.re, im: 0n };
}

/** Orders of the derivatives of zeta up to which they are the second route. */
const LARGEST_DERIVATIVE = 60;

/**
 * Cl_{m+1}(2 pi a) = +-(2 pi)^m/m! [zeta'(-m, a) + (-1)^m zeta'(-m, 1 - a)], 0 < a < 1, the sign that of the real or imaginary part
 * of i^m (Hurwitz's formula differentiated, DLMF 25.13.2 and 25.11.9): Euler-Maclaurin instead of series in theta.
 */
function byZetaDerivatives(n: number, theta: Ball, precision: number): Ball | null {
  const m = n - 1;
  const reach = Math.max(0, bitLength(theta.re) - theta.bits);
  const wide = precision + reach + 3 * n + 32;
  const circle = multiplyBallByInteger(piBall(wide), 2n, wide);
  const turns = divideBalls(theta, circle, wide);
  if (turns === null) return null;
  const whole = shiftRight(turns);
  const a = subtractBalls(turns, exactBall(whole), wide);
  // At a = 0 the two derivatives are one.
  if (theta.re === 0n && theta.error === 0n) return byDuplication(n, theta, precision);
  const one = derivativeBall(m, a, wide);
  const two = derivativeBall(m, subtractBalls(exactBall(1n), a, wide), wide);
  const power = integerPowerBall(circle, m, wide);
  if (one === null || two === null || power === null) return null;
  const sum = m % 2 === 0 ? addBalls(one, two, wide) : subtractBalls(one, two, wide);
  const scaled = multiplyBalls(
    multiplyBalls(sum, power, wide),
    rationalBall(Rational.one.div(factorial(m)), wide),
    wide,
  );
  return m % 4 < 2 ? scaled : negateBall(scaled);
}

/** The whole part. */
function shiftRight({ re, bits }: Ball): bigint {
  return bits >= 0 ? re >> BigInt(bits) : re << BigInt(-bits);
}

/** Cl_n(theta) = 2^{n-1} [Cl_n(theta/2) + Cl_n(theta/2 + pi)]; for Cl_1 it is sin theta = 2 sin(theta/2) cos(theta/2). */
function byDuplication(n: number, theta: Ball, precision: number): Ball | null {
  const wide = precision + n + 16;
  const turns = Math.max(0, Math.ceil(Math.log2(Math.abs(numberFromFixed(theta.re, theta.bits)) + 1)));
  const half = { ...theta, bits: theta.bits + 1 };
  const one = clausenBall(n, half, wide);
  const two = clausenBall(n, addBalls(half, piBall(wide + 8), wide + turns + 8), wide);
  if (one === null || two === null) return null;
  return multiplyBallByInteger(addBalls(one, two, wide), 1n << BigInt(n - 1), wide);
}
