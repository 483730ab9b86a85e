import { addBalls, type Ball, multiplyBalls, subtractBalls } from '../arithmetic/ball';
import { numberFromFixed } from '../arithmetic/fixed';
import { Rational } from '../exact/rational';
import { bernoulliNumber } from './bernoulli';
import { argumentBall, enclosed, halfBall, ln2Ball, rationalBall, wholeNumber } from './enclosure';
import { hurwitzZetaDerivative } from './hurwitz-derivative';
import { SECH_BITS } from './sech-quadrature';
import type { ExactParameter } from './special-function';
import type { FunctionValue, ValueFunction } from './value-function';
import { derivativeByIntegral } from './zeta-derivative-integral';

/** Larger orders, or numbers, would cancel thousands of bits. */
const LARGEST_ORDER = 60;
const LARGEST = 10_000;

/**
 * zeta'(-k, a) = d/ds zeta(s, a) at s = -k, k = 0, 1, ..., 60, for complex a that is not 0, -1, -2, ..., |a| <= 10^4;
 * principal logarithms of a, a + 1, ... (for real negative ones the argument is pi). Zeta'(-k) is that at a = 1.
 * Method: steps and Euler-Maclaurin (DLMF 25.11.28 differentiated). Error: rounding and remainder as proved there, and
 * what the error of a does, by d/da zeta'(-k, a) = k zeta'(1 - k, a) - zeta(1 - k, a), psi(a) for k = 0.
 */
export const zetaDerivative: ValueFunction = {
  least: 2,
  most: 2,
  definition:
    '\\zeta^{\\prime}(-k,a)=\\left.\\frac{\\partial}{\\partial s}\\sum_{n\\ge0}\\frac{1}{(a+n)^s}\\right|_{s=-k}',
  evaluate: ([k, a], bits) => {
    const [order, start] = [k as ExactParameter, a as ExactParameter];
    return (
      refusal(order, start) ??
      enclosed(bits, (precision) =>
        derivativeBall(wholeNumber(order) as number, argumentBall(start, precision), precision),
      )
    );
  },
  crossCheck: ([k, a], bits) => {
    const [order, start] = [k as ExactParameter, a as ExactParameter];
    if (refusal(order, start)) return null;
    const k0 = wholeNumber(order) as number;
    const integral = bits <= SECH_BITS && k0 <= INTEGRAL_ORDER;
    const compute = integral ? derivativeByIntegral : byDuplication;
    const value = enclosed(bits, (precision) => compute(k0, argumentBall(start, precision), precision));
    return { route: integral ? 'integral against 1/cosh^2' : 'duplication law in a', value };
  },
  sources: [{ key: 'DLMF-25.11', text: 'NIST Digital Library of Mathematical Functions, 25.11' }],
};

/** Orders up to which the integral serves as the second route. */
const INTEGRAL_ORDER = 20;

function refusal(k: ExactParameter, a: ExactParameter): FunctionValue | null {
  const order = wholeNumber(k);
  if (order === null || order < 0 || order > LARGEST_ORDER) {
    return { kind: 'outside', says: `The first argument is k in zeta'(-k, a), one of 0, 1, ..., ${LARGEST_ORDER}.` };
  }
  const start = wholeNumber(a);
  if (start !== null && start <= 0) return { kind: 'outside', says: 'The second argument must not be 0, -1, -2, ....' };
  if (Math.hypot(a.approx.re, a.approx.im) > LARGEST) {
    return { kind: 'outside', says: `The second argument must be at most ${LARGEST} in size.` };
  }
  return null;
}

/** zeta'(-k, a) for every point of the ball `a`; null where it holds 0, -1, -2, .... */
export function derivativeBall(k: number, a: Ball, precision: number): Ball | null {
  const bits = Math.max(a.bits, precision);
  const up = BigInt(bits - a.bits);
  const point = { re: a.re << up, im: a.im << up };
  const spread = a.error << up;
  // The distance to the nearest of 0, -1, -2, ....
  const unit = 1n << BigInt(bits);
  const nearest = point.re > 0n ? 0n : ((point.re - unit / 2n) / unit) * unit;
  const reach = (x: bigint): number => Math.abs(numberFromFixed(x, bits));
  const distance = Math.hypot(reach(point.re - nearest), reach(point.im)) - reach(spread);
  if (!(distance > 0)) return null;
  const { value, error } = hurwitzZetaDerivative(k, point, bits);
  if (spread === 0n) return { ...value, bits, error };
  const size = Math.hypot(reach(point.re), reach(point.im));
  const slope = k === 0 ? 0 : (k + 1) * (size + 3) ** k * (Math.log(size + 3) + 5);
  const near = Math.log(size + 3) + 5 + 1 / distance;
  return { ...value, bits, error: error + spread * BigInt(Math.ceil(slope + near)) };
}

/**
 * zeta'(-k, a) = 2^k [zeta'(-k, a/2) + zeta'(-k, (a + 1)/2)] - log 2 zeta(-k, a), zeta(-k, a) = -B_{k+1}(a)/(k + 1)
 * (DLMF 25.11.14-15): from 2^s zeta(s, a) = zeta(s, a/2) + zeta(s, (a + 1)/2), whose logarithms are principal alike.
 */
function byDuplication(k: number, a: Ball, precision: number): Ball | null {
  const half = { ...a, bits: a.bits + 1 };
  const one = derivativeBall(k, half, precision);
  const two = derivativeBall(k, addBalls(half, halfBall, precision + 64), precision);
  if (one === null || two === null) return null;
  const wide = precision + 64 * (k + 1);
  const sum = addBalls(one, two, wide);
  const zeta = multiplyBalls(bernoulliPolynomial(k + 1, a, wide), rationalBall(Rational.of(-1, k + 1), wide), wide);
  return subtractBalls({ ...sum, bits: sum.bits - k }, multiplyBalls(zeta, ln2Ball(wide), wide), wide);
}

/** B_n(x) (DLMF 24.2.5), by Horner's rule. */
export function bernoulliPolynomial(n: number, x: Ball, precision: number): Ball {
  let value = rationalBall(Rational.one, precision);
  let binomial = Rational.one;
  for (let k = 1; k <= n; k++) {
    binomial = binomial.mul(Rational.of(n - k + 1, k));
    const coefficient = rationalBall(binomial.mul(bernoulliNumber(k)), precision);
    value = addBalls(multiplyBalls(value, x, precision), coefficient, precision);
  }
  return value;
}
