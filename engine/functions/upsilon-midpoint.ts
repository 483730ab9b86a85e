import { divideFixed, multiplyFixed, numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import { type FixedComplex, multiplyComplex, squareComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { logFixed } from '../arithmetic/fixed-log';
import { memoiseByKey } from './kernel-memo';
import {
  type KernelNodes,
  type KernelPlan,
  kernelNodes,
  liftPoint,
  planKernel,
  reachClass,
  sumCosh,
  widthClass,
} from './kernel-nodes';
import { logGammaPrecise } from './log-gamma-precise';
import type { ExactParameter, PreciseLog } from './special-function';
import { endCorrections } from './upsilon-corrections';

/** Longest chain of shifts into the strip. */
const MAXIMAL_SHIFTS = 60;

/** More nodes than this are not worth their time as a second route. */
const MAXIMAL_NODES = 20_000;
/** Nor are more terms of the correction, whose making takes the square of their number. */
const MAXIMAL_TERMS = 400;

const INDISTINCT: PreciseLog = { kind: 'indistinct' };

/**
 * log Upsilon_b(x), Upsilon_b(Q/2) = 1, for real b > 0: real on 0 < x < Q, analytic off the real axis.
 *
 * Method, x = Q/2 + z: the midpoint rule on the half line for
 *   log Upsilon = int_0^oo dt/t [z^2 e^{-2t} - sinh^2(zt)/(sinh bt sinh t/b)]
 *               = -sum_k w_k (cosh((2k+1) z h) - 1) + z^2 log(2/h) + sum_i e_i z^{2i},
 * e_i from the Euler-Maclaurin formula (DLMF 2.10; `endCorrections`), after shifts
 *   Upsilon_b(x + b) = Gamma(bx)/Gamma(1 - bx) b^{1-2bx} Upsilon_b(x)
 * into |Re z| <= Q/4. No pole is used, so that rational b^2 is nothing special. The number of nodes grows with the
 * square of the digits and with |Im z|: an independent second route, for few digits and near arguments.
 * Error: rule and correction are below 2^-(bits+12) by their rates; rounding and one unit in each part of x are counted.
 * 'indistinct' next to a zero; null where more than 20 000 nodes or 60 shifts would be needed.
 * Source: Zamolodchikov and Zamolodchikov 1996, hep-th/9506136; Nakayama 2004, hep-th/0402009.
 */
export function logUpsilonByMidpoint(x: FixedComplex, b: ExactParameter, bits: number): PreciseLog | null {
  if (b.approx.im !== 0 || !(b.approx.re > 0)) return null;
  const inverted = b.approx.re > 1;
  const given = b.value(bits + 8).re;
  const inverse = (1n << BigInt(2 * bits + 16)) / given;
  const [small, large] = inverted ? [inverse, given] : [given, inverse];
  const q = shiftRounded(small + large, 8);
  let point = x;
  let flipped = false;
  const fold = (): void => {
    if (2n * point.re > q) point = { re: q - point.re, im: -point.im };
    if (point.im < 0n) {
      // log Upsilon(conj x) = conj log Upsilon(x): stay in the upper half plane.
      point = { re: point.re, im: -point.im };
      flipped = !flipped;
    }
  };
  fold();
  let re = 0n;
  let im = 0n;
  let error = 4n;
  let count = 0;
  // Out of Re x <= 0 by the larger period, to Re x >= Q/4 by the smaller one: no pole of Gamma(1 - px) is met.
  while (4n * point.re < q) {
    if (count++ > MAXIMAL_SHIFTS) return null;
    const period = point.re <= 0n ? large : small;
    const shift = logShift(point, period, bits);
    if (shift.kind !== 'value') return INDISTINCT;
    re -= shift.re;
    im += flipped ? shift.im : -shift.im;
    error += shift.error;
    point = { re: point.re + shiftRounded(period, 8), im: point.im };
    fold();
  }
  const inside = onStrip(point, b, bits);
  if (inside === null) return null;
  const size = Math.hypot(numberFromFixed(point.re - q / 2n, bits), numberFromFixed(point.im, bits));
  // A generous bound of |d log Upsilon/dz| in the middle half (see the test); every shift moved x by one more unit.
  const slope = 2 * (size + 0.1) * (Math.abs(Math.log(size + 0.1)) + Math.abs(Math.log(b.approx.re)) + 4);
  error += BigInt(Math.ceil(1.5 * slope * (count + 3))) + 2n;
  return { kind: 'value', re: re + inside.re, im: im + (flipped ? -inside.im : inside.im), error };
}

/** log of Gamma(p x)/Gamma(1 - p x) p^{1 - 2 p x}; p has 8 more fraction bits than x. */
function logShift(x: FixedComplex, period: bigint, bits: number): PreciseLog {
  const one = 1n << BigInt(bits);
  const u = { re: (x.re * period) >> BigInt(bits + 8), im: (x.im * period) >> BigInt(bits + 8) };
  const above = logGammaPrecise(u, bits);
  const below = logGammaPrecise({ re: one - u.re, im: -u.im }, bits);
  if (above.kind !== 'value' || below.kind !== 'value') return INDISTINCT;
  const log = shiftRounded(logFixed(period, bits + 8), 8);
  const power = multiplyComplex({ re: one - 2n * u.re, im: -2n * u.im }, { re: log, im: 0n }, bits);
  // u is off by one unit and the period's share of x's.
  const size = numberFromFixed(period, bits + 8);
  const units = BigInt(Math.ceil(size)) + 2n;
  const exponent = Math.abs(numberFromFixed(u.re, bits)) + Math.abs(numberFromFixed(u.im, bits)) + 1;
  return {
    kind: 'value',
    re: above.re - below.re + power.re,
    im: above.im - below.im + power.im,
    error:
      (above.error + below.error) * units + BigInt(Math.ceil(4 * exponent + 4 * Math.abs(Math.log(size)) * (size + 1))),
  };
}

interface UpsilonTable {
  readonly plan: KernelPlan;
  readonly nodes: KernelNodes;
  readonly total: number;
  readonly half: bigint;
  /** log(2/h). */
  readonly logarithm: bigint;
  /** (2 pi small)^2. */
  readonly square: bigint;
  /** Coefficients of ((2 pi small z)^2)^i/(2i)!, i = 1, 2, ... */
  readonly corrections: readonly bigint[];
}

const tables = memoiseByKey<UpsilonTable>(24);

function tableFor(x: FixedComplex, b: ExactParameter, bits: number): UpsilonTable | null {
  const approx = [b.approx.re, 1 / b.approx.re];
  const small = Math.min(...approx);
  const total = approx.reduce((sum, w) => sum + w, 0);
  const width = widthClass(numberFromFixed(x.re, bits) - total / 2, total);
  const reach = reachClass(numberFromFixed(x.im, bits) * Math.PI * small);
  // The correction needs (2J)!/rate^{2J} e^{2 reach} < e^-depth; with 2J = depth + 2 reach a rate 1.15 times that does.
  const terms = Math.ceil(((bits + 14) * Math.LN2 + 2 * reach) / 2);
  if (terms > MAXIMAL_TERMS) return null;
  const plan = planKernel(approx, bits, width, 2.3 * terms);
  if (plan === null || plan.nodes > MAXIMAL_NODES) return null;
  const working = bits + plan.guard + 32 * Math.ceil((2 * reach) / Math.LN2 / 32);
  const exact = b.value(working).re;
  return tables([bits, width, reach, exact].join('|'), () => {
    const inverse = divideFixed(1n << BigInt(working), exact, working);
    const periods = exact < inverse ? [exact, inverse] : [inverse, exact];
    const nodes = kernelNodes(plan, periods, working);
    const height = multiplyFixed(piFixed(working), periods[0] as bigint, working);
    return {
      plan,
      nodes,
      total,
      half: (exact + inverse) >> 1n,
      logarithm: logFixed(divideFixed(2n << BigInt(working), nodes.step, working), working),
      square: 4n * multiplyFixed(height, height, working),
      corrections: endCorrections(periods, nodes.step, terms, working),
    };
  });
}

/** log Upsilon for |Re z| <= Q/4. */
function onStrip(x: FixedComplex, b: ExactParameter, bits: number): FixedComplex | null {
  const table = tableFor(x, b, bits);
  if (table === null) return null;
  const { nodes, half, logarithm, corrections } = table;
  const working = nodes.bits;
  const lifted = liftPoint(x, bits, working);
  const close = lifted.re - half;
  // Within two units of the middle line the real sums serve; the change is part of the argument's error.
  const room = BigInt(working - bits + 1);
  const z = { re: close >> room === 0n || -close >> room === 0n ? 0n : close, im: lifted.im };
  // The weights of the rule are h/(t sinh sinh), twice the w_k.
  const sum = sumCosh(nodes, z, table.total, table.plan.depth);
  const square = squareComplex(z, working);
  const y = {
    re: multiplyFixed(table.square, square.re, working),
    im: multiplyFixed(table.square, square.im, working),
  };
  let tail: FixedComplex = { re: 0n, im: 0n };
  for (let i = corrections.length; i >= 1; i--) {
    const shifted = { re: tail.re + (corrections[i - 1] as bigint), im: tail.im };
    const product = multiplyComplex(shifted, y, working);
    const divisor = BigInt((2 * i - 1) * (2 * i));
    tail = { re: product.re / divisor, im: product.im / divisor };
  }
  const re = multiplyFixed(logarithm, square.re, working) + tail.re - (sum.re >> 1n);
  const im = multiplyFixed(logarithm, square.im, working) + tail.im - (sum.im >> 1n);
  return { re: shiftRounded(re, working - bits), im: shiftRounded(im, working - bits) };
}
