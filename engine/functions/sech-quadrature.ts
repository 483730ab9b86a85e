import { type Ball, rescaleBall } from '../arithmetic/ball';
import { divideFixed, multiplyFixed, numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  type FixedComplex,
  logComplex,
  multiplyComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { expFixed } from '../arithmetic/fixed-exp';
import { memoiseBounded } from '../arithmetic/memo';

interface Rule {
  readonly bits: number;
  /** h, a multiple of 2^-STEP_BITS. */
  readonly step: bigint;
  /** (pi/2) h/cosh^2(pi k h), k = 0, 1, ... */
  readonly weights: readonly bigint[];
}

const STEP_BITS = 40;
/** Bits up to which the rule, whose nodes grow with the square of the bits, is worth its time. */
export const SECH_BITS = 300;

/**
 * The trapezoidal rule for (pi/2) int_{-oo}^{oo} f(v)/cosh^2(pi v) dv, f analytic and of moderate growth for |Im v| <= 1/2: the
 * poles at +-i/2 make its error about (pi/h)^2 e^{-pi/h}, and the weights fall like e^{-2 pi |v|}.
 */
const ruleFor = memoiseBounded(8, (bits: number): Rule => {
  const depth = bits * Math.LN2 + 2 * Math.log(bits) + 8;
  const rough = Math.floor((Math.PI / depth) * 2 ** STEP_BITS);
  const step = BigInt(rough) << BigInt(bits - STEP_BITS);
  const pi = piFixed(bits);
  const ratio = expFixed(-2n * multiplyFixed(pi, step, bits), bits);
  const one = 1n << BigInt(bits);
  const scale = 2n * multiplyFixed(pi, step, bits);
  const weights: bigint[] = [];
  // 1/cosh^2(pi v) = 4 q/(1 + q)^2, q = e^{-2 pi v}.
  for (let q = one; q > 0n; q = multiplyFixed(q, ratio, bits)) {
    const below = multiplyFixed(one + q, one + q, bits);
    weights.push(multiplyFixed(scale, divideFixed(q, below, bits), bits));
  }
  return { bits, step, weights };
});

/** Powers of w times powers of log w, one of each. */
export type Integrand = (w: FixedComplex, log: FixedComplex, bits: number) => FixedComplex;

/**
 * (pi/2) int f(a - 1/2 + iv)/cosh^2(pi v) dv for Re a >= 2, f made of products of w and log w: with f = log w it is psi(a), with
 * f = w^{1-s}/(s - 1) it is zeta(s, a) (Johansson and Blagouchine 2019, Math. Comp. 88, 1829, arXiv:1804.01679, (5); DLMF
 * 25.11.4 continued). `growth` bounds |f(w)| e^{-pi |Im w|}, in bits. Error: the rule's by its rate, rounding by counting, that of a
 * by `slope`, a bound of the derivative by a.
 */
export function sechIntegral(a: Ball, f: Integrand, growth: number, slope: number, precision: number): Ball {
  const wide = 64 * Math.ceil((precision + Math.max(0, growth) + 40) / 64);
  const { bits, step, weights } = ruleFor(wide);
  const point = rescaleBall(a, bits);
  const half = 1n << BigInt(bits - 1);
  const real = point.im === 0n;
  let sum: FixedComplex = { re: 0n, im: 0n };
  const value = (im: bigint): FixedComplex => {
    const w = { re: point.re - half, im: point.im + im };
    return f(w, logComplex(w, bits), bits);
  };
  let largest = 1n;
  for (let k = 0; k < weights.length; k++) {
    const up = value(BigInt(k) * step);
    // At real a the other half is the conjugate.
    const down = k === 0 ? { re: 0n, im: 0n } : real ? { re: up.re, im: -up.im } : value(BigInt(-k) * step);
    const both = addComplex(up, down);
    sum = addComplex(sum, multiplyComplex(both, { re: weights[k] as bigint, im: 0n }, bits));
    const size = absoluteComplex(both) >> BigInt(bits);
    if (size > largest) largest = size;
  }
  const rounding = BigInt(16 * weights.length) * (largest + 2n);
  const share = point.error * BigInt(Math.ceil(Math.min(slope, 2 ** 200)));
  const rule = 1n << BigInt(Math.max(0, bits - precision - 8));
  return { re: sum.re, im: sum.im, bits, error: rounding + share + rule };
}

/** How many unit steps bring Re a to 2 or beyond, where w = 0 is further off than the poles of the weight. */
export function stepsToRight(a: Ball): number {
  return Math.max(0, Math.ceil(2 - numberFromFixed(a.re, a.bits)));
}
