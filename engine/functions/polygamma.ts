import { addBalls, type Ball, exactBall, logBall, multiplyBalls, negateBall, subtractBalls } from '../arithmetic/ball';
import { numberFromFixed } from '../arithmetic/fixed';
import { divideComplex, type FixedComplex, integerPowerComplex, oneComplex } from '../arithmetic/fixed-complex';
import { Rational } from '../exact/rational';
import { bernoulliNumber } from './bernoulli';
import {
  argumentBall,
  enclosed,
  halfBall,
  inversePower,
  ln2Ball,
  rationalBall,
  wholeNumber,
  widened,
} from './enclosure';
import { stepsToFarPoint, ulpsOf } from './euler-maclaurin';
import { factorial } from './factorial';
import { hurwitzZeta } from './hurwitz-zeta';
import { type Integrand, SECH_BITS, sechIntegral, stepsToRight } from './sech-quadrature';
import type { ExactParameter } from './special-function';
import type { FunctionValue, ValueFunction } from './value-function';

/** Orders beyond, and arguments further left, would take seconds. */
const LARGEST_ORDER = 500;
const LEFTMOST = -10_000;

/** psi(z) = Gamma'(z)/Gamma(z) (DLMF 5.2.2): `polygamma` of order 0. */
export const digamma: ValueFunction = {
  least: 1,
  most: 1,
  definition: '\\psi(z)=\\Gamma^{\\prime}(z)/\\Gamma(z)',
  evaluate: ([z], bits) => polygammaValue(0, z as ExactParameter, bits),
  crossCheck: ([z], bits) => second(0, z as ExactParameter, bits),
  sources: [
    { key: 'DLMF-5', text: 'NIST Digital Library of Mathematical Functions, 5.5, 5.11, 5.15' },
    { key: 'Johansson-Blagouchine-2019', text: 'F. Johansson, Ia. V. Blagouchine, arXiv:1804.01679 (2018), (5)' },
  ],
};

/**
 * psi^(n)(z), the n-th derivative of psi, n = 0, 1, ..., 500, for complex z with Re z >= -10^4; poles at 0, -1, -2, ....
 * Method: psi^(n)(z) = (-1)^{n+1} n! zeta(n + 1, z) (DLMF 25.11.12), for n = 0 its finite part, by steps to the right
 * and the asymptotic series (DLMF 5.11.2, 5.15.8) with its remainder bound. Error: proved, some units.
 */
export const polygamma: ValueFunction = {
  least: 2,
  most: 2,
  definition: '\\psi^{(n)}(z)=\\frac{d^{n+1}}{dz^{n+1}}\\log\\Gamma(z)',
  evaluate: ([n, z], bits) =>
    withOrder(n as ExactParameter, (order) => polygammaValue(order, z as ExactParameter, bits)),
  crossCheck: ([n, z], bits) => {
    const order = wholeNumber(n as ExactParameter);
    if (order === null || order < 0 || order > LARGEST_ORDER) return null;
    return second(order, z as ExactParameter, bits);
  },
  sources: digamma.sources,
};

/** Orders up to which the integral serves as the second route. */
const INTEGRAL_ORDER = 40;

/** The integral over the line Re w = Re z - 1/2; for many digits and high orders laws that lead back to the series. */
function second(order: number, z: ExactParameter, bits: number): ReturnType<ValueFunction['crossCheck']> {
  if (bits <= SECH_BITS && order <= INTEGRAL_ORDER) {
    const value = refusal(z) ?? enclosed(bits, (precision) => byIntegral(order, argumentBall(z, precision), precision));
    return { route: 'integral against 1/cosh^2', value };
  }
  if (order === 0) return { route: 'duplication law', value: byDuplication(0, z, bits) };
  return { route: 'Hurwitz zeta function', value: byHurwitz(order, z, bits) };
}

/**
 * psi(a) = (pi/2) int log w/cosh^2(pi v) dv, w = a - 1/2 + iv, and its derivatives, with steps
 * psi^(n)(z) = psi^(n)(z + 1) - (-1)^n n! z^{-n-1} (DLMF 5.15.5) far enough to the right. Null where a step meets a pole.
 */
function byIntegral(order: number, z: Ball, precision: number): Ball | null {
  const steps = stepsToRight(z);
  const wide = precision + 2 * order + 32;
  let sum = exactBall(0n);
  for (let k = 0; k < steps; k++) {
    const term = inversePower(addBalls(z, exactBall(BigInt(k)), wide), order + 1, wide);
    if (term === null) return null;
    sum = addBalls(sum, term, wide);
  }
  const far = addBalls(z, exactBall(BigInt(steps)), wide + 32);
  const inverse = (w: FixedComplex, n: number, bits: number): FixedComplex =>
    integerPowerComplex(divideComplex(oneComplex(bits), w, bits), n, bits);
  const integrand: Integrand = {
    value: (w, log, bits) => (order === 0 ? log : inverse(w, order, bits)),
    derivative: (w, _log, bits) => {
      const power = inverse(w, order + 1, bits);
      const factor = order === 0 ? 1n : BigInt(-order);
      return { re: factor * power.re, im: factor * power.im };
    },
  };
  // |psi^(n+1)| <= (n + 1)! 2^-n to the right of 2, without (n - 1)!.
  const integral = sechIntegral(far, integrand, 16, 4 * (order + 1) ** 2, wide);
  if (order === 0) return subtractBalls(integral, sum, wide);
  const scaled = multiplyBalls(integral, rationalBall(factorial(order - 1), wide), wide);
  const stepped = multiplyBalls(sum, rationalBall(factorial(order), wide), wide);
  const total = addBalls(scaled, stepped, wide);
  // (-1)^{n-1} for the integral, -(-1)^n for the steps.
  return order % 2 === 1 ? total : negateBall(total);
}

function withOrder(n: ExactParameter, value: (order: number) => FunctionValue): FunctionValue {
  const order = wholeNumber(n);
  if (order === null || order < 0 || order > LARGEST_ORDER) {
    return { kind: 'outside', says: `The order must be one of 0, 1, ..., ${LARGEST_ORDER}.` };
  }
  return value(order);
}

function polygammaValue(order: number, z: ExactParameter, bits: number): FunctionValue {
  return refusal(z) ?? enclosed(bits, (precision) => polygammaBall(order, argumentBall(z, precision), precision));
}

function refusal(z: ExactParameter): FunctionValue | null {
  const whole = wholeNumber(z);
  if (whole !== null && whole <= 0) return { kind: 'pole' };
  if (z.approx.re < LEFTMOST) return { kind: 'outside', says: `The real part must be at least ${LEFTMOST}.` };
  return null;
}

/** Null where a step meets a pole. */
function polygammaBall(order: number, z: Ball, precision: number): Ball | null {
  const s = order + 1;
  const approximate = { re: numberFromFixed(z.re, z.bits), im: numberFromFixed(z.im, z.bits) };
  const steps = stepsToFarPoint(approximate, order, precision);
  let sum = exactBall(0n);
  let at = z;
  for (let k = 0; k < steps; k++) {
    const term = inversePower(at, s, precision);
    if (term === null) return null;
    sum = addBalls(sum, term, precision);
    at = addBalls(z, exactBall(BigInt(k + 1)), precision + 32);
  }
  const tail = farSum(s, at, precision);
  if (tail === null) return null;
  const total = multiplyBalls(addBalls(sum, tail, precision), rationalBall(factorial(order), precision), precision);
  return order % 2 === 0 ? negateBall(total) : total;
}

/**
 * zeta(s, W), for s = 1 its finite part -psi(W): W^{1-s}/(s-1) or -log W, W^{-s}/2 and
 * sum_j B_2j (s)_{2j-1}/(2j)! W^{1-s-2j}. What is left out after J terms is at most the next one over
 * cos(arg W/2)^{s+2J} (DLMF 5.11(ii) for s = 1; the same integral of B_2J - B_2J(x - [x]) bounds it for every s).
 */
function farSum(s: number, w: Ball, precision: number): Ball | null {
  const inverse = inversePower(w, 1, precision);
  const power = inversePower(w, s, precision);
  const log = s === 1 ? logBall(w, precision) : null;
  if (inverse === null || power === null || (s === 1 && log === null)) return null;
  const lead = log
    ? negateBall(log)
    : multiplyBalls(multiplyBalls(power, w, precision), rationalBall(Rational.of(1, s - 1), precision), precision);
  let sum = addBalls(lead, multiplyBalls(power, halfBall, precision), precision);
  const [re, im] = [numberFromFixed(w.re, w.bits), numberFromFixed(w.im, w.bits)];
  const log2Size = Math.log2(Math.hypot(re, im)) - 2 ** -40;
  const log2Secant = -Math.log2(Math.sqrt((1 + re / Math.hypot(re, im)) / 2)) + 2 ** -40;
  const square = multiplyBalls(inverse, inverse, precision);
  let term = multiplyBalls(power, inverse, precision);
  let coefficient = Rational.of(s, 2);
  let smallest = Number.POSITIVE_INFINITY;
  for (let j = 1; ; j++) {
    const factor = bernoulliNumber(2 * j).mul(coefficient);
    const left = log2Above(factor) - (s + 2 * j - 1) * log2Size + (s + 2 * j) * log2Secant;
    const relative = left + s * log2Size;
    if (relative < -precision - 8 || left >= smallest) {
      const bits = precision + 8 + Math.ceil(s * Math.max(0, log2Size));
      return widened(sum, ulpsOf(left, bits), bits);
    }
    smallest = left;
    sum = addBalls(sum, multiplyBalls(term, rationalBall(factor, precision), precision), precision);
    term = multiplyBalls(term, square, precision);
    coefficient = coefficient.mul(Rational.of((s + 2 * j - 1) * (s + 2 * j), (2 * j + 1) * (2 * j + 2)));
  }
}

/** An upper bound of log2 |x|, x not 0, off by less than 2. */
function log2Above(x: Rational): number {
  const size = x.numerator < 0n ? -x.numerator : x.numerator;
  return size.toString(16).length * 4 - (x.denominator.toString(16).length - 1) * 4;
}

/** psi^(n)(z) = 2^{-n-1} [psi^(n)(z/2) + psi^(n)((z + 1)/2)], plus log 2 for n = 0 (DLMF 5.5.8, 5.15.7). */
function byDuplication(order: number, z: ExactParameter, bits: number): FunctionValue {
  const refused = refusal(z);
  if (refused) return refused;
  return enclosed(bits, (precision) => {
    const point = argumentBall(z, precision);
    const half = { ...point, bits: point.bits + 1 };
    const upper = addBalls(half, halfBall, precision + 32);
    const [one, two] = [half, upper].map((at) => polygammaBall(order, at, precision));
    if (!one || !two) return null;
    const sum = addBalls(one, two, precision);
    const mean = { ...sum, bits: sum.bits + order + 1 };
    return order === 0 ? addBalls(mean, ln2Ball(precision), precision) : mean;
  });
}

function byHurwitz(order: number, z: ExactParameter, bits: number): FunctionValue {
  const square = Rational.of((order + 1) ** 2);
  const factor = factorial(order).numerator;
  const further = factor.toString(2).length;
  const s: ExactParameter = {
    square,
    value: (fraction) => ({ re: BigInt(order + 1) << BigInt(fraction), im: 0n }),
    approx: { re: order + 1, im: 0 },
  };
  const zeta = hurwitzZeta.evaluate([s, z], bits + further);
  if (zeta.kind !== 'value') return zeta;
  return enclosed(bits, () => {
    const ball: Ball = { re: zeta.re * factor, im: zeta.im * factor, bits: bits + further, error: zeta.error * factor };
    return order % 2 === 0 ? subtractBalls(exactBall(0n), ball, 4 * bits + 2 * further) : ball;
  });
}
