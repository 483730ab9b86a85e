import { numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import type { FixedComplex } from '../arithmetic/fixed-complex';
import type { CoreValue } from './double-sine-core';
import { farLogarithm, nearLogarithm } from './double-sine-core';
import type { DoubleSineFrame } from './double-sine-frame';
import { placeOnLattice } from './double-sine-lattice';
import type { ExactPeriod } from './double-sine-period';
import { shiftedLogarithm } from './double-sine-shift';
import type { DoubleSineTables } from './double-sine-tables';
import { doubleSineTables } from './double-sine-tables';
import type { PreciseLog } from './special-function';

/** An approximate argument beside the fixed one, for choices that need no digits. */
interface Approximate {
  readonly re: number;
  readonly im: number;
}

type Core = (tables: DoubleSineTables, x: FixedComplex, approx: Approximate) => CoreValue | null;

/**
 * log s_b(x), s_b(x) = prod_{m,n>=0} (m b + n/b + Q/2 - ix)/(m b + n/b + Q/2 + ix) zeta-regularised, Q = b + 1/b, b > 0 real:
 *   log s_b(x) = -i Int_0^oo dt/t [ sin(2xt)/(2 sinh(bt) sinh(t/b)) - x/t ] for |Im x| < Q/2, log s_b(0) = 0,
 * continued analytically off the imaginary axis; on the axis beyond the strip the value is the limit from Re x > 0.
 *
 * Domain: all x except the poles i(Q/2 + m b + n/b) and the zeros -i(...); |Re x|, |Im x| below 2^40. Cost grows with |Im x|/(1/b) + Q^2.
 * Argument: `bits` fraction bits, each part off by at most one ulp, whose effect is part of the error stated. On the imaginary axis
 * (re exactly 0) an argument within an ulp of a lattice point is taken for that point; elsewhere one that close is 'indistinct'.
 *
 * Method: Re x < 0 by oddness; |Im x| > Q/4 by the functional equation, first with the larger, then with the smaller period, one
 * logarithm each; |Re x| <= Q/4 midpoint rule with residues (double-sine-near-table.ts), else residues alone
 * (double-sine-far-table.ts). Rational b^2: double poles, decided by integers. Nearly rational b^2: guard bits as many as the
 * small divisors have; 'unreachable' if they would exceed 2^13.
 *
 * Error: discretisation by the bound of double-sine-heights.ts, rounding by counting, argument by the derivative
 * |(log s_b)'| <= pi |Re x| + 2.1 Q in |Im x| <= Q/4 plus that of the shifts. Checked against mpmath (see the test).
 * Source of the definition: Kurokawa and Koyama, Forum Math. 15 (2003) 839; Faddeev, Kashaev and Volkov, hep-th/0006156.
 */
export function logDoubleSine(x: FixedComplex, b: ExactPeriod, bits: number): PreciseLog {
  return evaluate(x, b, bits, (tables, point, approx) => {
    const { frame } = tables;
    const reach = frame.q / 4;
    return approx.re > reach
      ? farLogarithm(frame, tables.far(), point, approx)
      : nearLogarithm(frame, tables.near(reach, 1), point, approx);
  });
}

/** Step of the second route relative to the first: no node, weight or residue factor is shared. */
const OTHER_STRETCH = 1.27;

/** |Re x| beyond this many Q/4 would need thousands of nodes. */
const OTHER_REACH = 64;

/**
 * The same function with another step of the midpoint rule and its own tables: every term changes, the sum must not. It uses nodes also
 * where logDoubleSine uses residues alone; null for |Re x| > 16 Q, where nodes are too many.
 */
export function logDoubleSineByOtherStep(x: FixedComplex, b: ExactPeriod, bits: number): PreciseLog | null {
  let outOfReach = false;
  const log = evaluate(x, b, bits, (tables, point, approx) => {
    const { frame } = tables;
    const needed = Math.max(1, 2 ** Math.ceil(Math.log2(approx.re / (frame.q / 4))));
    outOfReach = needed > OTHER_REACH;
    if (outOfReach) return null;
    return nearLogarithm(frame, tables.near((needed * frame.q) / 4, OTHER_STRETCH), point, approx);
  });
  return outOfReach ? null : log;
}

const INDISTINCT: PreciseLog = { kind: 'indistinct' };

function evaluate(x: FixedComplex, b: ExactPeriod, bits: number, core: Core): PreciseLog {
  if (x.re === 0n) {
    const place = placeOnLattice(x.im < 0n ? -x.im : x.im, b, bits);
    if (place.kind === 'on') return { kind: x.im > 0n ? 'pole' : 'zero', order: place.order };
    if (place.kind === 'indistinct') return INDISTINCT;
  }
  const tables = doubleSineTables(b, bits);
  if (tables === null) return { kind: 'unreachable', says: 'b squared is too near a rational number with small terms' };
  const negative = x.re < 0n;
  const right = negative ? { re: -x.re, im: -x.im } : x;
  const log = evaluateRight(right, tables, core);
  if (log.kind !== 'value' || !negative) return log;
  return { ...log, re: -log.re, im: -log.im };
}

/** Shifts that bring |Im x| to 1/(2 beta)-ish by the larger period, then to Q/4 by the smaller. */
function shiftsNeeded(frame: DoubleSineFrame, imaginary: number): { large: number; small: number } {
  const { q, smallApprox, largeApprox } = frame;
  const size = Math.abs(imaginary);
  // Within half a large period nothing is gained by another large step.
  const large = size > q / 4 ? Math.max(0, Math.round(size / largeApprox)) : 0;
  const left = Math.abs(size - large * largeApprox);
  return { large, small: left > q / 4 ? Math.ceil((left - q / 4) / smallApprox) : 0 };
}

function evaluateRight(x: FixedComplex, tables: DoubleSineTables, core: Core): PreciseLog {
  const { frame } = tables;
  const { precision, bits, q } = frame;
  const up = BigInt(precision - bits);
  let point: FixedComplex = { re: x.re << up, im: x.im << up };
  const real = numberFromFixed(x.re, bits);
  const { large, small } = shiftsNeeded(frame, numberFromFixed(x.im, bits));
  let error = 0;
  let slope = Math.PI * real + 2.1 * q;
  let re = 0n;
  let im = 0n;
  for (const [useLarge, count] of [
    [true, large],
    [false, small],
  ] as const) {
    if (count === 0) continue;
    const upwards = point.im >= 0n;
    const shifted = shiftedLogarithm(frame, point, useLarge, count);
    const beta = useLarge ? frame.largeApprox : frame.smallApprox;
    // A zero of 1 + e^(-2w) within four ulps of x, |w'| = pi beta: the logarithm is not known even roughly.
    if (!(shifted.smallest > 8 * Math.PI * beta * 2 ** -bits)) return INDISTINCT;
    point = shifted.point;
    re += upwards ? -shifted.sum.re : shifted.sum.re;
    im += upwards ? -shifted.sum.im : shifted.sum.im;
    error += shifted.error;
    // |log(1 + d)| <= d (1 + 2 d) for the relative change d <= 1/2 that the argument's ulp makes.
    const change = (2 * Math.PI * beta * Math.SQRT2 * 2 ** -bits) / shifted.smallest;
    slope += shifted.slope * (1 + 2 * change);
  }
  const inside = core(tables, point, { re: real, im: numberFromFixed(point.im, precision) });
  if (inside === null) return INDISTINCT;
  const total = error + inside.error + Math.SQRT2 * (slope + 1e-6);
  return {
    kind: 'value',
    re: shiftRounded(re + inside.value.re, precision - bits),
    im: shiftRounded(im + inside.value.im, precision - bits),
    // One ulp for rounding both parts; the bound itself is a sum of doubles.
    error: BigInt(Math.ceil(total * (1 + 1e-9) + 1)),
  };
}
