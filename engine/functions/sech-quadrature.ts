import { type Ball, rescaleBall } from '../arithmetic/ball';
import { divideFixed, multiplyFixed, numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  type FixedComplex,
  logComplex,
  scaleComplex,
  subtractComplex,
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
  /** phi_m = 1/(e^{2 pi (m + 1/2)/h} - 1) and (2 pi/h) phi_m (1 + phi_m) for the poles i (m + 1/2), m < POLES. */
  readonly residues: readonly (readonly [simple: bigint, double: bigint])[];
}

const STEP_BITS = 40;
/** Pairs of poles of the weight whose residues are taken into account; so much fewer are the nodes. */
const POLES = 10;
/** Bits up to which the rule, whose nodes grow with the square of the bits, is worth its time. */
export const SECH_BITS = 800;

const ruleFor = memoiseBounded(8, (bits: number): Rule => {
  const depth = bits * Math.LN2 + 2 * Math.log(bits) + 8;
  const rough = Math.floor(((2 * Math.PI * (POLES + 0.5)) / depth) * 2 ** STEP_BITS);
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
  const rate = divideFixed(2n * pi, step, bits);
  const residues = Array.from({ length: POLES }, (_, m) => {
    const small = expFixed(-((BigInt(2 * m + 1) * rate) >> 1n), bits);
    const simple = divideFixed(small, one - small, bits);
    return [simple, multiplyFixed(rate, multiplyFixed(simple, one + simple, bits), bits)] as const;
  });
  return { bits, step, weights, residues };
});

/** A function of w, made of products of w and log w, and its derivative. */
export interface Integrand {
  readonly value: (w: FixedComplex, log: FixedComplex, bits: number) => FixedComplex;
  readonly derivative: (w: FixedComplex, log: FixedComplex, bits: number) => FixedComplex;
}

/**
 * (pi/2) int_{-oo}^{oo} f(a - 1/2 + iv)/cosh^2(pi v) dv for Re a >= POLES + 2: with f = log w it is psi(a), with
 * f = w^{1-s}/(s - 1) it is zeta(s, a) (Johansson and Blagouchine 2019, Math. Comp. 88, 1829, arXiv:1804.01679, (5)). By the
 * trapezoidal rule with the residues at the double poles +-i (m + 1/2), which are values of f and f' at a - 1 - m and a + m;
 * what is left is about e^{-2 pi (POLES + 1/2)/h}. `growth` bounds |f(w)| e^{-pi |Im w|}, in bits. Error: the rule's by its rate,
 * rounding by counting, that of a by `slope`, a bound of the derivative by a.
 */
export function sechIntegral(a: Ball, f: Integrand, growth: number, slope: number, precision: number): Ball {
  const { bits, step, weights, residues } = ruleFor(32 * Math.ceil((precision + Math.max(0, growth) + 28) / 32));
  const point = rescaleBall(a, bits);
  const real = point.im === 0n;
  const one = 1n << BigInt(bits);
  const at = (re: bigint, im: bigint, of: 'value' | 'derivative' = 'value'): FixedComplex => {
    const w = { re: point.re + re, im: point.im + im };
    return f[of](w, logComplex(w, bits), bits);
  };
  let sum: FixedComplex = { re: 0n, im: 0n };
  let largest = 1n;
  for (let k = 0; k < weights.length; k++) {
    const up = at(-(one >> 1n), BigInt(k) * step);
    // At real a the other half is the conjugate.
    const down = real ? { re: up.re, im: -up.im } : at(-(one >> 1n), BigInt(-k) * step);
    const both = k === 0 ? up : addComplex(up, down);
    sum = addComplex(sum, scaleComplex(both, weights[k] as bigint, bits));
    const size = absoluteComplex(both) >> BigInt(bits);
    if (size > largest) largest = size;
  }
  residues.forEach(([simple, double], m) => {
    const [below, above] = [-BigInt(m + 1) * one, BigInt(m) * one];
    const slopes = subtractComplex(at(below, 0n, 'derivative'), at(above, 0n, 'derivative'));
    const values = addComplex(at(below, 0n), at(above, 0n));
    sum = subtractComplex(sum, scaleComplex(slopes, simple, bits));
    sum = subtractComplex(sum, scaleComplex(values, double, bits));
  });
  const rounding = BigInt(16 * (weights.length + 4 * POLES)) * (largest + 2n);
  const share = point.error * BigInt(Math.ceil(Math.min(slope, 2 ** 200)));
  const rule = 1n << BigInt(Math.max(0, bits - precision - 8));
  return { re: sum.re, im: sum.im, bits, error: rounding + share + rule };
}

/** How many unit steps bring Re a so far to the right that f is regular at all poles used. */
export function stepsToRight(a: Ball): number {
  return Math.max(0, Math.ceil(POLES + 2 - numberFromFixed(a.re, a.bits)));
}
