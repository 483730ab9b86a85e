import {
  addBalls,
  type Ball,
  divideBalls,
  exactBall,
  magnitudeAbove,
  multiplyBalls,
  negateBall,
  subtractBalls,
} from '../arithmetic/ball';
import { bitLength, numberFromFixed } from '../arithmetic/fixed';
import { absoluteComplex } from '../arithmetic/fixed-complex';
import { Rational } from '../exact/rational';
import { argumentBall, enclosed, exactZero, wholeNumber, widened } from './enclosure';
import { ulpsOf } from './euler-maclaurin';
import { exactRational } from './exact-rational';
import type { ExactParameter } from './special-function';
import type { FunctionValue, ValueFunction } from './value-function';

const LARGEST = 1e6;
/** |q| up to which the factors number some ten thousand at most. */
const LARGEST_NOME = 0.99;

/**
 * (x; q)_infinity = prod_{k>=0} (1 - x q^k) (DLMF 17.2.4) for complex |q| <= 0.99 and |x| <= 10^6; zeros at x = q^{-k}.
 * Method: Euler's sum. Second route: the product up to |x q^N| < 2^{-p}; what is left out is 1 within
 * 4 |x| |q|^N/(1 - |q|). Error: proved.
 */
export const qPochhammer: ValueFunction = {
  least: 2,
  most: 2,
  definition: '(x;q)_\\infty=\\prod_{k\\ge0}(1-x\\,q^k)',
  evaluate: ([x, q], bits) => value(x as ExactParameter, q as ExactParameter, bits, eulerSum),
  crossCheck: ([x, q], bits) => ({
    route: 'product',
    value: value(x as ExactParameter, q as ExactParameter, bits, product),
  }),
  sources: [{ key: 'DLMF-17.2', text: 'NIST Digital Library of Mathematical Functions, 17.2, 17.3' }],
};

type Compute = (x: Ball, q: Ball, precision: number) => Ball | null;

function value(x: ExactParameter, q: ExactParameter, bits: number, compute: Compute): FunctionValue {
  if (!(Math.hypot(q.approx.re, q.approx.im) <= LARGEST_NOME)) {
    return { kind: 'outside', says: `The second argument must be at most ${LARGEST_NOME} in size.` };
  }
  if (Math.hypot(x.approx.re, x.approx.im) > LARGEST) {
    return { kind: 'outside', says: `The first argument must be at most ${LARGEST} in size.` };
  }
  if (isZero(x, q)) return exactZero;
  const point = (precision: number): Ball => argumentBall(x, precision);
  if (wholeNumber(q) === 0) {
    return enclosed(bits, (precision) => subtractBalls(exactBall(1n), point(precision), precision + 32));
  }
  return enclosed(bits, (precision) => compute(point(precision), argumentBall(q, precision), precision));
}

/** Whether x q^k = 1 for some k, decided where both are rational. */
function isZero(x: ExactParameter, q: ExactParameter): boolean {
  const [start, nome] = [exactRational(x), exactRational(q)];
  if (start === null || nome === null || start.isZero()) return false;
  const k = nome.isZero()
    ? 0
    : Math.max(0, Math.round(-Math.log(Math.abs(x.approx.re)) / Math.log(Math.abs(q.approx.re))));
  return k < 1000 && start.mul(nome.pow(k)).equals(Rational.one);
}

function product(x: Ball, q: Ball, precision: number): Ball | null {
  const one = exactBall(1n);
  const left = Math.log2(1 - numberFromFixed(absoluteComplex(q), q.bits)) - 1;
  let power = x;
  let total: Ball = one;
  for (;;) {
    total = multiplyBalls(total, subtractBalls(one, power, precision), precision);
    power = multiplyBalls(power, q, precision);
    // |log(1 - u)| <= 2 |u| for |u| <= 1/2, and e^v - 1 <= 2 v for v <= 1.
    const rest = log2Above(power) + 2 - left;
    if (rest < -precision) {
      const bits = precision - log2Above(total);
      return widened(total, ulpsOf(rest + log2Above(total), bits), bits);
    }
  }
}

/** (x; q)_infinity = sum_n (-1)^n q^{n(n-1)/2} x^n/(q; q)_n (DLMF 17.3.2, Euler), stopped where the ratio is below 1/8. */
function eulerSum(x: Ball, q: Ball, precision: number): Ball | null {
  const one = exactBall(1n);
  let term: Ball | null = one;
  let sum: Ball = one;
  let power: Ball = one;
  for (;;) {
    const next = multiplyBalls(power, q, precision);
    const ratio: Ball | null = divideBalls(
      multiplyBalls(negateBall(x), power, precision),
      subtractBalls(one, next, precision),
      precision,
    );
    if (ratio === null) return null;
    term = multiplyBalls(term, ratio, precision);
    power = next;
    const size = log2Above(term);
    // Where |q|^n < 1/2, later ratios are at most 3 times this one: the rest is below 2 terms.
    if (log2Above(ratio) < -3 && log2Above(power) < -1 && size < -precision) {
      return widened(sum, ulpsOf(size + 2, precision), precision);
    }
    sum = addBalls(sum, term, precision + Math.max(0, log2Above(sum)));
  }
}

/** An upper bound of log2 |a|; -infinity for an exact 0. */
function log2Above(a: Ball): number {
  if (a.re === 0n && a.im === 0n && a.error === 0n) return Number.NEGATIVE_INFINITY;
  return bitLength(magnitudeAbove(a)) - a.bits;
}
