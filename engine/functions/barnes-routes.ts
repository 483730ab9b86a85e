import { divideFixed, numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import { conjugateComplex, type FixedComplex } from '../arithmetic/fixed-complex';
import { logBarnesGamma } from './barnes-gamma';
import type { Estimate } from './euler-maclaurin';
import { memoiseByKey } from './kernel-memo';
import type { ExactParameter, PreciseLog } from './special-function';
import { logTripleSineRound } from './triple-sine-closed';
import { tripleSineByContour } from './triple-sine-contour';
import { logTripleSineByLattice } from './triple-sine-lattice';
import { logTripleSine } from './triple-sine-precise';
import { logUpsilonByMidpoint } from './upsilon-midpoint';
import { logUpsilon } from './upsilon-precise';

/** A second value of a logarithm and how it was found. */
export interface SecondRoute {
  readonly route: string;
  readonly log: PreciseLog;
}

/** Two units of x in the working precision. */
const ROUNDING = 2n << 16n;

/** log Gamma_2(Q/2) by precision and period. */
const centers = memoiseByKey<Estimate | null>(16);

/**
 * log Upsilon_b(x) = 2 log Gamma_2(Q/2) - log Gamma_2(x) - log Gamma_2(Q - x) with the double Gamma function of periods b
 * and 1/b by steps and asymptotic series; imaginary part up to multiples of 2 pi.
 */
export function upsilonByDoubleGamma(x: FixedComplex, b: ExactParameter, bits: number): SecondRoute | null {
  if (b.approx.im !== 0 || !(b.approx.re > 0)) return null;
  const working = bits + 16;
  const exact = b.value(working).re;
  const inverse = divideFixed(1n << BigInt(working), exact, working);
  const periods = [real(exact), real(inverse)];
  const lifted = { re: x.re << 16n, im: x.im << 16n };
  const total = exact + inverse;
  const center = centers([working, exact].join('|'), () => logBarnesGamma(real(total >> 1n), periods, working));
  const one = logBarnesGamma(lifted, periods, working);
  // On the middle line, up to the error of x, Q - x is the conjugate of x, and Gamma_2 is real on the real line.
  const off = 2n * lifted.re - total;
  const two =
    -ROUNDING <= off && off <= ROUNDING
      ? one && { value: conjugateComplex(one.value), error: one.error }
      : logBarnesGamma({ re: total - lifted.re, im: -lifted.im }, periods, working);
  if (center === null || one === null || two === null) return null;
  const share = argumentShare(x, [b.approx.re, 1 / b.approx.re], bits);
  if (share === null) return null;
  const error = 2n * center.error + one.error + two.error;
  const value: PreciseLog = {
    kind: 'value',
    re: shiftRounded(2n * center.value.re - one.value.re - two.value.re, 16),
    im: shiftRounded(-one.value.im - two.value.im, 16),
    error: (error >> 16n) + 2n + share,
  };
  return { route: 'double Gamma functions', log: value };
}

/** Bits from which the midpoint rule for Upsilon, whose nodes grow with their square, is slower than other lattice sums. */
const MIDPOINT_BITS = 800;
/** Share by which the far points of the second lattice sum are moved out. */
const STRETCH = 1.15;

/** The integral by the midpoint rule; for many digits, far arguments and complex b the lattice product with other far points. */
export function upsilonSecondRoute(x: FixedComplex, b: ExactParameter, bits: number): SecondRoute | null {
  if (!(b.approx.re > 0)) return null;
  const integral = bits <= MIDPOINT_BITS ? logUpsilonByMidpoint(x, b, bits) : null;
  if (integral !== null) return { route: 'midpoint rule', log: integral };
  return { route: 'lattice product with other far points', log: logUpsilon(x, b, bits, STRETCH) };
}

/** Bits up to which the contour, whose nodes grow with the square of the bits, is worth its time. */
const CONTOUR_BITS = 800;

/** Above this many bits the closed form for equal periods is the quicker route, below it the quadrature. */
export const CLOSED_FORM_BITS = 400;
/** Bits up to which the quadrature is worth its time as a second route. */
const QUADRATURE_BITS = 1200;

/** Bits up to which the lattice product, whose points grow with the cube of the bits, is quicker than the contour. */
const LATTICE_BITS = 360;

/**
 * For equal periods the one of quadrature and closed form that is not the main route; else the lattice product, for many
 * digits the quadrature on another contour. Complex periods: the lattice product with other far points.
 */
export function tripleSineSecondRoute(x: FixedComplex, w: readonly ExactParameter[], bits: number): SecondRoute | null {
  if (!w.every(({ approx }) => approx.im === 0 && approx.re > 0)) {
    const log = logTripleSineByLattice(x, w, bits, STRETCH);
    return { route: 'lattice product with other far points', log };
  }
  const closed = logTripleSineRound(x, w, bits);
  if (closed !== null) {
    if (bits <= CLOSED_FORM_BITS) return { route: 'closed form in polylogarithms', log: closed };
    return bits > QUADRATURE_BITS ? null : { route: 'midpoint rule', log: logTripleSine(x, w, bits) };
  }
  if (bits <= LATTICE_BITS) {
    const log = logTripleSineByLattice(x, w, bits);
    if (log.kind !== 'unreachable') return { route: 'lattice product', log };
  }
  if (bits > CONTOUR_BITS) return null;
  return { route: 'midpoint rule off the real line', log: logTripleSine(x, w, bits, tripleSineByContour) };
}

/**
 * What one unit in x may do to the logarithm: the growth of its derivative, and the nearest zero; null where doubles
 * cannot tell x from a zero.
 */
function argumentShare(x: FixedComplex, periods: readonly [number, number], bits: number): bigint | null {
  const total = periods[0] + periods[1];
  const re = numberFromFixed(x.re, bits);
  const im = numberFromFixed(x.im, bits);
  const reach = Math.hypot(re, im) + total;
  const growth = (reach * (Math.log(reach + 2) + 4)) / (periods[0] * periods[1]);
  const near = Math.hypot(im, nearestZero(Math.max(-re, re - total), periods));
  return near <= DOUBLE_ROUNDING * reach ? null : BigInt(Math.ceil(8 * growth + 16 / near));
}

/** Rounding of a lattice point in doubles, relative to its size. */
const DOUBLE_ROUNDING = 1e-12;

/** Distance of a real number to the numbers m w1 + n w2, m, n >= 0. */
function nearestZero(beyond: number, [first, second]: readonly [number, number]): number {
  let nearest = Math.abs(beyond);
  for (let m = 0; m * first <= beyond; m++) {
    const left = beyond - m * first;
    const off = left / second - Math.round(left / second);
    nearest = Math.min(nearest, Math.abs(off) * second);
  }
  return nearest;
}

function real(value: bigint): FixedComplex {
  return { re: value, im: 0n };
}
