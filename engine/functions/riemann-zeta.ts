import {
  addBalls,
  type Ball,
  divideBalls,
  exactBall,
  expBall,
  logBall,
  multiplyBallByInteger,
  multiplyBalls,
  negateBall,
  subtractBalls,
} from '../arithmetic/ball';
import { Rational } from '../exact/rational';
import { argumentBall, enclosed, exactZero, ln2Ball, wholeNumber, widened } from './enclosure';
import { ulpsOf } from './euler-maclaurin';
import { hurwitzZeta } from './hurwitz-zeta';
import { borweinCoefficients } from './riemann-zeta-precise';
import type { ExactParameter } from './special-function';
import type { ValueFunction } from './value-function';

const ONE: ExactParameter = {
  square: Rational.one,
  value: (bits) => ({ re: 1n << BigInt(bits), im: 0n }),
  approx: { re: 1, im: 0 },
};

/**
 * The Riemann zeta function zeta(s) = sum_{n>=1} n^{-s}, continued (DLMF 25.2), |s| <= 1000; pole at s = 1. It is
 * zeta(s, 1), by Euler-Maclaurin; error as there. Second route for Re s >= 1/2: Borwein's alternating sum.
 */
export const riemannZeta: ValueFunction = {
  least: 1,
  most: 1,
  definition: '\\zeta(s)=\\sum_{n\\ge1}\\frac{1}{n^s}',
  evaluate: ([s], bits) => {
    const whole = wholeNumber(s as ExactParameter);
    // The trivial zeros.
    if (whole !== null && whole < 0 && whole % 2 === 0) return exactZero;
    return hurwitzZeta.evaluate([s as ExactParameter, ONE], bits);
  },
  crossCheck: ([s], bits) => {
    const order = s as ExactParameter;
    if (wholeNumber(order) === 1) return null;
    if (order.approx.re < 0.5) return hurwitzZeta.crossCheck([order, ONE], bits);
    return {
      route: "Borwein's alternating sum",
      value: enclosed(bits, (precision) => alternatingSum(order, precision)),
    };
  },
  sources: [
    ...hurwitzZeta.sources,
    { key: 'Borwein-2000', text: 'P. Borwein, CMS Conf. Proc. 27 (2000) 29, algorithm 2' },
  ],
};

/**
 * -1/(d_n (1 - 2^{1-s})) sum_{k<n} (-1)^k (d_k - d_n)/(k+1)^s for Re s >= 1/2, with an error of at most
 * 3 (1 + 2 |Im s|) e^{pi |Im s|/2}/((3 + sqrt 8)^n |1 - 2^{1-s}|). Null at the zeros of 1 - 2^{1-s}.
 */
function alternatingSum(order: ExactParameter, precision: number): Ball | null {
  const height = Math.abs(order.approx.im) + 1;
  const above = Math.ceil(Math.log2(3 + 6 * height) + (Math.PI / 2) * height * Math.LOG2E);
  const d = borweinCoefficients(64 * Math.ceil((precision + above) / 64));
  const last = d[d.length - 1] as bigint;
  const s = argumentBall(order, precision + 16);
  let sum = exactBall(0n);
  for (let k = 0; k < d.length - 1; k++) {
    const log = k === 0 ? exactBall(0n) : logBall(exactBall(BigInt(k + 1)), precision + 16);
    const power = log && expBall(negateBall(multiplyBalls(log, s, precision + 16)), precision + 8);
    if (power === null) return null;
    const weight = last - (d[k] as bigint);
    sum = addBalls(sum, multiplyBallByInteger(power, k % 2 === 0 ? weight : -weight, precision + 8), precision + 8);
  }
  const less = subtractBalls(exactBall(1n), s, precision + 16);
  const two = expBall(multiplyBalls(less, ln2Ball(precision + 16), precision + 16), precision + 8);
  const alternating = divideBalls(sum, exactBall(last), precision + 8);
  if (two === null || alternating === null) return null;
  const enclosedSum = widened(alternating, ulpsOf(-precision, precision), precision);
  return divideBalls(enclosedSum, subtractBalls(exactBall(1n), two, precision + 8), precision);
}
