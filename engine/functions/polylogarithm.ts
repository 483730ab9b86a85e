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
import {
  absoluteComplex,
  divideComplex,
  type FixedComplex,
  oneComplex,
  sqrtComplex,
} from '../arithmetic/fixed-complex';
import { Rational } from '../exact/rational';
import {
  argumentBall,
  enclosed,
  exactZero,
  halfBall,
  inversePower,
  isReal,
  piBall,
  rationalBall,
  wholeNumber,
  widened,
} from './enclosure';
import { factorial } from './factorial';
import { LARGEST_DERIVATIVE, polylogarithmByZetaDerivatives } from './polylogarithm-by-zeta';
import { polylogarithm as insideDisc } from './polylogarithm-precise';
import type { ExactParameter } from './special-function';
import type { FunctionValue, ValueFunction } from './value-function';
import { bernoulliPolynomial } from './zeta-derivative';

const LARGEST_ORDER = 200;

/**
 * Li_n(z) = sum_{k>=1} z^k/k^n (DLMF 25.12.10) for whole n, |n| <= 200, and complex z: the principal branch, cut along
 * [1, oo), on the cut the value from below. n >= 2: series inside the unit disc, Bernoulli polynomials outside;
 * n = 1: -log(1 - z); n <= 0: the rational function. Pole at z = 1 for n <= 1. Error: some units.
 */
export const polylogarithm: ValueFunction = {
  least: 2,
  most: 2,
  definition: '\\mathrm{Li}_n(z)=\\sum_{k\\ge1}\\frac{z^k}{k^n}',
  evaluate: ([n, z], bits) => value(n as ExactParameter, z as ExactParameter, bits, polylogarithmBall),
  crossCheck: ([n, z], bits) => {
    const order = wholeNumber(n as ExactParameter);
    if (order === null || Math.abs(order) > LARGEST_ORDER) return null;
    const [route, compute] = secondRoute(order);
    return { route, value: value(n as ExactParameter, z as ExactParameter, bits, compute) };
  },
  sources: [
    { key: 'DLMF-25.12', text: 'NIST Digital Library of Mathematical Functions, 25.12' },
    { key: 'Wood-1992', text: 'D. C. Wood, The computation of polylogarithms, University of Kent 15-92 (1992)' },
  ],
};

type Compute = (n: number, z: Ball, precision: number) => Ball | null;

function secondRoute(order: number): readonly [string, Compute] {
  if (order <= 0) return ['Stirling numbers', byStirlingNumbers];
  if (order === 1 || order > LARGEST_DERIVATIVE) return ['duplication law', byDuplication];
  return ['derivatives of the zeta function', polylogarithmByZetaDerivatives];
}

function value(n: ExactParameter, z: ExactParameter, bits: number, compute: Compute): FunctionValue {
  const order = wholeNumber(n);
  if (order === null || Math.abs(order) > LARGEST_ORDER) {
    return { kind: 'outside', says: `The order must be a whole number of at most ${LARGEST_ORDER} in size.` };
  }
  if (order <= 1 && wholeNumber(z) === 1) return { kind: 'pole' };
  if (wholeNumber(z) === 0) return exactZero;
  // Eulerian polynomials of even order vanish at -1 by symmetry.
  if (order < 0 && order % 2 === 0 && wholeNumber(z) === -1) return exactZero;
  return enclosed(bits, (precision) => {
    const point = argumentBall(z, precision);
    // Across the cut the value jumps: the side must be known.
    const touchesCut = !isReal(z) && absolute(point.im) <= point.error && numberFromFixed(point.re, point.bits) > 0.5;
    return order >= 1 && touchesCut ? null : compute(order, point, precision);
  });
}

/** Li_n at every point of the ball z; on the cut, where z is real, from below. */
export function polylogarithmBall(n: number, z: Ball, precision: number): Ball | null {
  if (n <= 0) return byEulerianNumbers(-n, z, precision);
  if (n === 1) return minusLog(z, precision);
  const bits = Math.max(z.bits, precision);
  const up = BigInt(bits - z.bits);
  const point = { re: z.re << up, im: z.im << up };
  const inside = absoluteComplex(point) <= 1n << BigInt(bits);
  const found = inside ? insideBall(n, point, bits) : outsideBall(n, point, bits, precision);
  if (found === null) return null;
  const spread = z.error << up;
  if (spread === 0n) return found;
  // |d Li_n/dz| = |Li_{n-1}(z)/z|: below zeta(2) for n > 2 in the disc, |log(1 - z)/z| for n = 2, bounded outside.
  const gap = numberFromFixed(absoluteComplex({ re: point.re - (1n << BigInt(bits)), im: point.im }) - spread, bits);
  if (n === 2 && gap <= 0) return null;
  const slope = 200 + (n === 2 ? Math.abs(Math.log(gap)) : 0);
  return widened(found, spread * BigInt(Math.ceil(slope)), bits);
}

function insideBall(n: number, z: FixedComplex, bits: number): Ball | null {
  const estimate = insideDisc(n, z, bits);
  return estimate && { ...estimate.value, bits, error: estimate.error };
}

/** Li_n(z) = (-1)^{n-1} Li_n(1/z) - (2 pi i)^n/n! B_n(1/2 + log(-z)/(2 pi i)), z off (0, 1) (Jonquiere; DLMF 25.13.3). */
function outsideBall(n: number, z: FixedComplex, bits: number, precision: number): Ball | null {
  const inverse = insideBall(n, divideComplex(oneComplex(bits), z, bits), bits);
  const wide = precision + 16 * n + 16;
  const log = logBall({ re: -z.re, im: -z.im, bits, error: 0n }, wide);
  if (inverse === null || log === null) return null;
  const circle = multiplyBalls(piBall(wide), exactBall(0n, 2n), wide);
  const turns = divideBalls(log, circle, wide);
  const power = integerPowerBall(circle, n, wide);
  if (turns === null || power === null) return null;
  const polynomial = multiplyBalls(power, bernoulliPolynomial(n, addBalls(halfBall, turns, wide), wide), wide);
  const scaled = multiplyBalls(polynomial, rationalBall(Rational.one.div(factorial(n)), wide), wide);
  // 1/z is rounded by a unit or two, which the slope at |1/z| <= 1 turns into some units more.
  const near = { ...inverse, error: inverse.error + 2n * BigInt(slopeInside(n, z, bits)) };
  return subtractBalls(n % 2 === 0 ? negateBall(near) : near, scaled, wide);
}

function slopeInside(n: number, z: FixedComplex, bits: number): number {
  if (n > 2) return 2;
  const gap = absoluteComplex({ re: z.re - (1n << BigInt(bits)), im: z.im });
  return Math.max(bits - bitLength(gap), 0) + 6;
}

function minusLog(z: Ball, precision: number): Ball | null {
  const log = logBall(subtractBalls(exactBall(1n), z, precision + 64), precision);
  if (log) return negateBall(log);
  if (z.im !== 0n) return null;
  // Real z > 1: 1 - z is negative, from above for z from below.
  const size = logBall(subtractBalls(z, exactBall(1n), precision + 64), precision);
  if (size === null || z.re < 0n) return null;
  return negateBall(addBalls(size, multiplyBalls(piBall(precision), exactBall(0n, 1n), precision), precision));
}

/** Li_{-m}(z) = sum_k A(m, k) z^{m-k}/(1-z)^{m+1} with Eulerian numbers (DLMF 26.14), m >= 1; z/(1 - z) for m = 0. */
function byEulerianNumbers(m: number, z: Ball, precision: number): Ball | null {
  const wide = precision + 64;
  const rest = inversePower(subtractBalls(exactBall(1n), z, wide), m + 1, wide);
  if (rest === null) return null;
  if (m === 0) return multiplyBalls(z, rest, wide);
  let row: bigint[] = [1n];
  for (let n = 2; n <= m; n++) {
    row = Array.from({ length: n }, (_, k) => BigInt(k + 1) * (row[k] ?? 0n) + BigInt(n - k) * (row[k - 1] ?? 0n));
  }
  // A(m, k) = A(m, m-1-k): the highest power first.
  let sum = exactBall(0n);
  for (const number of row) sum = addBalls(multiplyBalls(sum, z, wide), exactBall(number), wide);
  return multiplyBalls(multiplyBalls(sum, z, wide), rest, wide);
}

/** Li_{-m}(z) = sum_{k=0}^{m} k! S(m+1, k+1) (z/(1-z))^{k+1} (DLMF 26.8 for the Stirling numbers S). */
function byStirlingNumbers(n: number, z: Ball, precision: number): Ball | null {
  const wide = precision + 64;
  const ratio = divideBalls(z, subtractBalls(exactBall(1n), z, wide), wide);
  if (ratio === null) return null;
  // row[k] = k! S(m+1, k+1), by S(m+1, k+1) = (k+1) S(m, k+1) + S(m, k).
  let row: bigint[] = [1n];
  for (let m = 1; m <= -n; m++) {
    row = Array.from({ length: m + 1 }, (_, k) => BigInt(k + 1) * (row[k] ?? 0n) + BigInt(k) * (row[k - 1] ?? 0n));
  }
  let sum = exactBall(0n);
  for (const number of row.reverse()) sum = multiplyBalls(addBalls(sum, exactBall(number), wide), ratio, wide);
  return sum;
}

/** Li_n(z) = 2^{n-1} [Li_n(sqrt z) + Li_n(-sqrt z)]; the root stays below the cut with z. */
function byDuplication(n: number, z: Ball, precision: number): Ball | null {
  const bits = Math.max(z.bits, precision) + 8;
  const up = BigInt(bits - z.bits);
  const spread = (z.error << up) + 2n;
  const root = sqrtComplex({ re: z.re << up, im: z.im << up }, bits);
  const size = absoluteComplex(root);
  // |d sqrt z| = |dz|/(2 |sqrt z|).
  const error = 2n + (size > 0n ? (spread << BigInt(bits)) / size : 1n << BigInt((bits >> 1) + 4));
  const one = polylogarithmBall(n, { ...root, bits, error }, bits);
  const two = polylogarithmBall(n, { re: -root.re, im: -root.im, bits, error }, bits);
  if (one === null || two === null) return null;
  return multiplyBallByInteger(addBalls(one, two, bits + 8), 1n << BigInt(n - 1), bits);
}
