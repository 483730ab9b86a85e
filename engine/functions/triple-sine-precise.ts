import { divideFixed, multiplyFixed, numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import { absoluteComplex, type FixedComplex, squareComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { logTwoPeriodSine } from './double-sine-of-periods';
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
import type { ExactParameter, PreciseLog } from './special-function';

/** Longest chain of shifts into the middle of the strip. */
const MAXIMAL_SHIFTS = 400;

const INDISTINCT: PreciseLog = { kind: 'indistinct' };

/**
 * log S_3(x | w1, w2, w3), S_3 = prod_{n>=0} (n.w + x)(n.w + |w| - x) zeta-regularised, real positive periods:
 * real on 0 < x < |w|, analytic off the real axis.
 *
 * Method, z = x - |w|/2: the midpoint rule without residues for the even integrand g(t) = cosh(2zt)/(t prod sinh(w_i t)),
 *   log S_3 = -(1/4) { h sum_{k>=0} g(t_k) - (1/2)[c4 pi^4/(3 h^3) + c2 pi^2/h] },
 *   c4 = 1/(w1 w2 w3), c2 = c4 (2 z^2 - (w1^2 + w2^2 + w3^2)/6),
 * after shifts S_3(x + w_i) = S_3(x)/S_2(x | w_j, w_k) into |Re z| <= |w|/4; for |Im z| so large that e^{-2 pi |Im z|/max w}
 * does not count, the limit -(i pi/6) (z^3 - (sum w^2) z/4) c4. Rational ratios of periods are nothing special.
 * Error: the rule's is below 2^-(bits+12) by its rate, rounding and one unit in each part of x are counted. 'indistinct'
 * next to a zero, 'unreachable' where more than 250 000 nodes would be needed.
 * Source: Narukawa 2004, math/0306164 (integral and growth); Kurokawa and Koyama 2003 (shift).
 */
export function logTripleSine(
  x: FixedComplex,
  periods: readonly ExactParameter[],
  bits: number,
  strip: StripRule = onStrip,
): PreciseLog {
  const approx = periods.map((w) => w.approx.re);
  if (periods.length !== 3 || !periods.every((w) => w.approx.im === 0 && w.approx.re > 0)) {
    return { kind: 'unreachable', says: 'three positive periods are needed' };
  }
  const total = approx.reduce((sum, w) => sum + w, 0);
  const exact = periods.map((w) => w.value(bits).re);
  const exactTotal = exact.reduce((sum, w) => sum + w, 0n);
  let point = x;
  let flipped = false;
  let re = 0n;
  let im = 0n;
  let error = 4n;
  const largest = approx.indexOf(Math.max(...approx));
  const smallest = approx.indexOf(Math.min(...approx));
  const mirror = (): void => {
    if (2n * point.re <= exactTotal) return;
    point = { re: exactTotal - point.re, im: -point.im };
    if (point.im < 0n) {
      // log S_3(conj x) = conj log S_3(x): stay in the upper half plane.
      point = { re: point.re, im: -point.im };
      flipped = !flipped;
    }
  };
  if (point.im < 0n) {
    point = { re: point.re, im: -point.im };
    flipped = true;
  }
  mirror();
  let count = 0;
  while (4n * point.re < exactTotal && !isFar(point, approx, bits)) {
    if (count++ > MAXIMAL_SHIFTS) {
      return { kind: 'unreachable', says: `more than ${MAXIMAL_SHIFTS} shifts by a period would be needed` };
    }
    const index = point.re <= 0n ? largest : smallest;
    const others = periods.filter((_, k) => k !== index);
    const sine = logTwoPeriodSine(point, others, bits);
    if (sine.kind !== 'value') return sine.kind === 'unreachable' ? sine : INDISTINCT;
    re += sine.re;
    im += flipped ? -sine.im : sine.im;
    error += sine.error;
    point = { re: point.re + (exact[index] as bigint), im: point.im };
    mirror();
  }
  const inside = isFar(point, approx, bits) ? limit(point, periods, bits) : strip(point, periods, bits);
  if (inside === null) return { kind: 'unreachable', says: 'too many nodes of the quadrature would be needed' };
  // A generous bound of |d log S_3/dz| in the middle half (see the test); every shift moved x by one more unit.
  const size = numberFromFixed(absoluteComplex(point), bits) + total;
  const slope =
    (2 * size * size) / approx.reduce((product, w) => product * w, 1) + (4 * size) / Math.min(...approx) ** 2;
  error += BigInt(Math.ceil(1.5 * slope * (count + 4))) + 2n;
  return { kind: 'value', re: re + inside.re, im: im + (flipped ? -inside.im : inside.im), error };
}

/** True where the limit for Im z -> infinity is exact to the bits. */
function isFar(x: FixedComplex, periods: readonly number[], bits: number): boolean {
  const height = Math.abs(numberFromFixed(x.im, bits));
  return (2 * Math.PI * height) / Math.max(...periods) > (bits + 24) * Math.LN2;
}

interface TripleTable {
  readonly plan: KernelPlan;
  readonly nodes: KernelNodes;
  readonly total: number;
  /** Half the sum of the periods. */
  readonly half: bigint;
  /** sum W_k - (1/2) [c4 pi^4/(3 h^3) - c4 (sum w^2) pi^2/(6 h)]. */
  readonly constant: bigint;
  /** -c4 pi^2/h. */
  readonly quadratic: bigint;
}

const tables = memoiseByKey<TripleTable>(24);

function tableFor(x: FixedComplex, periods: readonly ExactParameter[], bits: number): TripleTable | null {
  const approx = periods.map((w) => w.approx.re);
  const total = approx.reduce((sum, w) => sum + w, 0);
  const height = Math.PI / Math.max(...approx);
  const width = widthClass(numberFromFixed(x.re, bits) - total / 2, total);
  const reach = reachClass(numberFromFixed(x.im, bits) * height);
  const plan = planKernel(approx, bits, width, (bits + 14) * Math.LN2 + 2 * reach);
  if (plan === null) return null;
  const working = bits + plan.guard;
  const exact = periods.map((w) => w.value(working).re);
  return tables([bits, width, reach, ...exact].join('|'), () => {
    const nodes = kernelNodes(plan, exact, working);
    const pi = piFixed(working);
    const [w1, w2, w3] = exact as [bigint, bigint, bigint];
    const c4 = divideFixed(1n << BigInt(working), multiplyFixed(multiplyFixed(w1, w2, working), w3, working), working);
    const perStep = divideFixed(pi, nodes.step, working);
    const square = multiplyFixed(perStep, pi, working);
    const cube = multiplyFixed(multiplyFixed(square, perStep, working), perStep, working);
    const squares = exact.reduce((sum, w) => sum + multiplyFixed(w, w, working), 0n);
    const bracket = cube / 3n - multiplyFixed(squares, square, working) / 6n;
    return {
      plan,
      nodes,
      total,
      half: (w1 + w2 + w3) >> 1n,
      constant: nodes.weights.reduce((sum, w) => sum + w, 0n) - (multiplyFixed(c4, bracket, working) >> 1n),
      quadratic: -multiplyFixed(c4, square, working),
    };
  });
}

/** log S_3 for |Re z| <= |w|/4; null where it would take too many nodes. */
export type StripRule = (x: FixedComplex, periods: readonly ExactParameter[], bits: number) => FixedComplex | null;

function onStrip(x: FixedComplex, periods: readonly ExactParameter[], bits: number): FixedComplex | null {
  const table = tableFor(x, periods, bits);
  if (table === null) return null;
  const { nodes, half, constant, quadratic } = table;
  const working = nodes.bits;
  const lifted = liftPoint(x, bits, working);
  const close = lifted.re - half;
  // Within two units of the middle line the real sums serve; the change is part of the argument's error.
  const onAxis = close >> BigInt(working - bits + 1) === 0n || -close >> BigInt(working - bits + 1) === 0n;
  const z = { re: onAxis ? 0n : close, im: lifted.im };
  const sum = sumCosh(nodes, z, table.total, table.plan.depth);
  const square = squareComplex(z, working);
  const re = sum.re + constant + multiplyFixed(quadratic, square.re, working);
  const im = sum.im + multiplyFixed(quadratic, square.im, working);
  return { re: shiftRounded(-re, working - bits + 2), im: shiftRounded(-im, working - bits + 2) };
}

/** -(i pi/6) (z^3 - (sum w^2) z/4)/(w1 w2 w3) for Im z > 0. */
function limit(x: FixedComplex, periods: readonly ExactParameter[], bits: number): FixedComplex {
  const size = Math.log2(numberFromFixed(absoluteComplex(x), bits) + 2);
  const working = bits + Math.ceil(3 * size) + 16;
  const exact = periods.map((w) => w.value(working).re);
  const total = exact.reduce((sum, w) => sum + w, 0n);
  const lifted = liftPoint(x, bits, working);
  const z = { re: lifted.re - (total >> 1n), im: lifted.im };
  const squares = exact.reduce((sum, w) => sum + multiplyFixed(w, w, working), 0n);
  const square = squareComplex(z, working);
  const bracket = { re: square.re - (squares >> 2n), im: square.im };
  const volume = exact.reduce((product, w) => multiplyFixed(product, w, working), 1n << BigInt(working));
  const scale = divideFixed(piFixed(working), 6n * volume, working);
  const re = (z.re * bracket.re - z.im * bracket.im) >> BigInt(working);
  const im = (z.re * bracket.im + z.im * bracket.re) >> BigInt(working);
  return {
    re: shiftRounded(multiplyFixed(scale, im, working), working - bits),
    im: shiftRounded(-multiplyFixed(scale, re, working), working - bits),
  };
}
