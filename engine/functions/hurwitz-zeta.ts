import { numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  expComplex,
  type FixedComplex,
  integerPowerComplex,
  logComplex,
  multiplyComplex,
  oneComplex,
  scaleComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { ln2Fixed, piFixed } from '../arithmetic/fixed-constants';

import { listBits, stepsToFarPoint } from './euler-maclaurin';
import { twiceEvenZeta } from './even-zeta';
import { exactRational } from './exact-rational';
import type { Complex, ExactParameter } from './special-function';
import type { FunctionValue, ValueFunction } from './value-function';

/** Larger |s| or |a| would need sums of many thousand terms or cancel thousands of bits. */
const LARGEST = 1000;

/**
 * The Hurwitz zeta function zeta(s, a) = sum_{k>=0} (a + k)^{-s} with principal powers, continued in s (DLMF 25.11).
 * Pole at s = 1. Euler-Maclaurin (DLMF 25.11.28):
 *   sum_{k<N} (a+k)^{-s} + A^{1-s}/(s-1) + A^{-s}/2 + sum_j B_2j/(2j)! (s)_{2j-1} A^{1-s-2j},  A = a + N.
 * Error: the guard bits cover rounding, cancellation and the arguments; the remainder is compared with the last term,
 * which falls below the last place before the sum ends. |s|, |a| <= 1000.
 */
export const hurwitzZeta: ValueFunction = {
  least: 2,
  most: 2,
  definition: '\\zeta(s,a)=\\sum_{k\\ge0}\\frac{1}{(a+k)^s}',
  evaluate: ([s, a], bits) => {
    const order = s as ExactParameter;
    const start = a as ExactParameter;
    const refused = refusal(order, start);
    if (refused) return refused;
    const guard = guardBits(order.approx, start.approx, bits);
    return rounded(eulerMaclaurin(order, start.value(bits + guard), bits + guard), guard);
  },
  crossCheck: ([s, a], bits) => {
    const order = s as ExactParameter;
    const start = a as ExactParameter;
    const refused = refusal(order, start);
    if (refused) return null;
    // 2^s zeta(s, a) = zeta(s, a/2) + zeta(s, (a + 1)/2): other terms, other far point.
    const guard = guardBits(order.approx, start.approx, bits) + Math.ceil(Math.abs(order.approx.re)) + 2;
    const working = bits + guard;
    const point = start.value(working);
    const even = eulerMaclaurin(order, { re: point.re >> 1n, im: point.im >> 1n }, working);
    const odd = eulerMaclaurin(order, { re: (point.re + (1n << BigInt(working))) >> 1n, im: point.im >> 1n }, working);
    if (even === null || odd === null) return null;
    const factor = expComplex(
      multiplyComplex(negative(order.value(working)), { re: ln2Fixed(working), im: 0n }, working),
      working,
    );
    return {
      route: 'duplication law in a',
      value: rounded(multiplyComplex(factor, addComplex(even, odd), working), guard),
    };
  },
  sources: [{ key: 'DLMF-25.11', text: 'NIST Digital Library of Mathematical Functions, 25.11' }],
};

function rounded(value: FixedComplex | null, guard: number): FunctionValue {
  if (value === null) return { kind: 'indistinct' };
  return {
    kind: 'value',
    of: 'value',
    re: shiftRounded(value.re, guard),
    im: shiftRounded(value.im, guard),
    error: 2n,
  };
}

function refusal(s: ExactParameter, a: ExactParameter): FunctionValue | null {
  const order = exactRational(s);
  if (order?.isInteger() && order.numerator === 1n) return { kind: 'pole' };
  const start = exactRational(a);
  if (start?.isInteger() && start.sign() <= 0 && !(order?.isInteger() && order.sign() <= 0)) {
    return { kind: 'outside', says: 'the second argument must not be 0, -1, -2, ... unless the first is' };
  }
  if (Math.hypot(s.approx.re, s.approx.im) > LARGEST || Math.hypot(a.approx.re, a.approx.im) > LARGEST) {
    return { kind: 'outside', says: `both arguments must be at most ${LARGEST} in size` };
  }
  return null;
}

/**
 * Bits for the largest term and its derivatives by s and a: |(a + k)^{-s}| log |a + k| |s|/|a + k| over the terms,
 * e^{|Im s| pi} from the phases, 1/|s - 1|^2 from the pole, and 2^12 terms.
 */
function guardBits(s: Complex, a: Complex, bits: number): number {
  const far = 0.2 * bits + 40 + Math.hypot(s.re, s.im) + Math.hypot(a.re, a.im);
  // The smallest |a + k|, k >= 0.
  const near = Math.max(2 ** -64, Math.hypot(a.re >= 0.5 ? a.re : a.re - Math.round(a.re), a.im));
  const growth =
    Math.max((1 - s.re) * Math.log2(far), -(s.re + 1) * Math.log2(near), 0) + Math.abs(s.im) * Math.PI * Math.LOG2E;
  const pole = Math.max(0, -2 * Math.log2(Math.max(2 ** -200, Math.hypot(s.re - 1, s.im))));
  const guard = Math.ceil(growth + pole + 2 * Math.log2(far) + Math.log2(Math.hypot(s.re, s.im) + 2)) + 24;
  // Whole multiples of 64 in all, so that the tables of logarithm and exponential serve many arguments.
  return listBits(bits + guard) - bits;
}

/** zeta(s, a) with `bits` fraction bits; null next to s = 1 or where a term is infinite. */
function eulerMaclaurin(s: ExactParameter, a: FixedComplex, bits: number): FixedComplex | null {
  const one = oneComplex(bits);
  const order = s.value(bits);
  const integer = exactRational(s);
  const exponent = integer?.isInteger() ? Number(integer.numerator) : null;
  const less = { re: order.re - one.re, im: order.im };
  if (absoluteComplex(less) < 16n) return null;
  const approximate = { re: numberFromFixed(a.re, bits), im: numberFromFixed(a.im, bits) };
  const steps = stepsToFarPoint(approximate, Math.ceil(Math.hypot(s.approx.re, s.approx.im)), bits);
  let sum = zeroComplex;
  let at = a;
  for (let k = 0; k < steps; k++) {
    const term = inversePower(at, order, exponent, bits);
    if (term === null) return null;
    sum = addComplex(sum, term);
    at = { re: at.re + one.re, im: at.im };
  }
  const power = inversePower(at, order, exponent, bits);
  if (power === null) return null;
  sum = addComplex(sum, multiplyComplex(power, divideComplex(at, less, bits), bits));
  sum = addComplex(sum, { re: power.re >> 1n, im: power.im >> 1n });
  return addTail(sum, power, at, order, bits);
}

/**
 * sum + sum_j B_2j/(2j)! (s)_{2j-1} A^{1-2j} power, in units of 2 pi A: the coefficients +-2 zeta(2j) are of order one and
 * the terms (s)_{2j-1} A (2 pi A)^{-2j} fall from the start. Null if they do not fall below the last place.
 */
function addTail(
  start: FixedComplex,
  power: FixedComplex,
  at: FixedComplex,
  s: FixedComplex,
  bits: number,
): FixedComplex | null {
  const unit = 1n << BigInt(bits);
  const circle = 2n * piFixed(bits);
  const inverse = divideComplex(oneComplex(bits), multiplyComplex(at, { re: circle, im: 0n }, bits), bits);
  const square = multiplyComplex(inverse, inverse, bits);
  let term = multiplyComplex(multiplyComplex(multiplyComplex(power, at, bits), square, bits), s, bits);
  let sum = start;
  // The bits vary with the arguments; lists are made for whole multiples of 64, so that close ones share.
  const list = listBits(bits);
  const coefficients = twiceEvenZeta(64 * Math.ceil((0.3 * bits + 40) / 64), list);
  for (let j = 1; j <= coefficients.length; j++) {
    const coefficient = coefficients[j - 1] as bigint;
    const part = scaleComplex(term, j % 2 === 1 ? coefficient : -coefficient, list);
    sum = addComplex(sum, part);
    if (absoluteComplex(part) <= 4n && j > 2) return sum;
    for (const add of [2 * j - 1, 2 * j]) {
      term = multiplyComplex(term, { re: s.re + BigInt(add) * unit, im: s.im }, bits);
    }
    term = multiplyComplex(term, square, bits);
  }
  return null;
}

/** z^{-s}, principal; by products for an integer s. Null at z = 0 where it is infinite. */
function inversePower(z: FixedComplex, s: FixedComplex, integer: number | null, bits: number): FixedComplex | null {
  if (z.re === 0n && z.im === 0n)
    return integer !== null && integer <= 0 ? (integer === 0 ? oneComplex(bits) : zeroComplex) : null;
  if (integer === null) return expComplex(negative(multiplyComplex(s, logComplex(z, bits), bits)), bits);
  const size = integerPowerComplex(z, Math.abs(integer), bits);
  if (integer <= 0) return size;
  // A high power of a small number may vanish; its inverse is then too large for these bits.
  return size.re === 0n && size.im === 0n ? null : divideComplex(oneComplex(bits), size, bits);
}

function negative(z: FixedComplex): FixedComplex {
  return { re: -z.re, im: -z.im };
}
