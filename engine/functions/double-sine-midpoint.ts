import { absolute, bitLength, divideFixed, multiplyFixed, numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import { expComplex, type FixedComplex, multiplyComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { expFixed } from '../arithmetic/fixed-exp';
import { logTwoCosh } from './hyperbolic-precise';
import type { ExactParameter, PreciseLog } from './special-function';

/** More nodes than this would take longer than a cross-check is worth. */
const MAXIMAL_NODES = 40_000;
/** Longest chain of shifts into the strip. */
const MAXIMAL_SHIFTS = 2000;

/**
 * log s_b(x) for real b > 0 by the plain midpoint rule on the defining integral,
 *   log s_b(x) = -i { sum_{k<N} w_k sin((2k+1) x h) - pi^2 x/(2h) }, w_k = h/(2 t_k sinh(b t_k) sinh(t_k/b)),
 * without any residue, after shifts by the smaller period to |Im x| <= Q/4. Nothing is shared with the main route but
 * the elementary functions: another step, other nodes, no pole, no case distinction for rational b^2. Its number of
 * nodes grows with the square of the digits.
 *
 * The integrand is even and its nearest poles are i pi min(b, 1/b), so the error of the rule is of the order of
 * e^{-(2 pi/h - 2 |Re x|) pi min(b, 1/b)} (Trefethen and Weideman, SIAM Review 56 (2014) 385); h is chosen to make it
 * 2^-(bits + 16). Null where it would need too many nodes or shifts, or b is not real.
 */
export function logDoubleSineByMidpoint(x: FixedComplex, b: ExactParameter, bits: number): PreciseLog | null {
  if (b.approx.im !== 0 || !(b.approx.re > 0)) return null;
  const reflect = x.im < 0n;
  const upper: FixedComplex = reflect ? { re: -x.re, im: -x.im } : x;
  const size = Math.max(bitLength(upper.re), bitLength(upper.im)) - bits;
  const working = bits + 48 + 2 * Math.max(0, size);
  const period = b.value(working).re;
  const inverse = divideFixed(1n << BigInt(working), period, working);
  const [small, large] = period < inverse ? [period, inverse] : [inverse, period];
  const quarter = (small + large) >> 2n;
  const lifted = { re: upper.re << BigInt(working - bits), im: upper.im << BigInt(working - bits) };
  const count = lifted.im > quarter ? Number((lifted.im - quarter) / small) + 1 : 0;
  if (count > MAXIMAL_SHIFTS) return null;
  const base = midpointSum({ re: lifted.re, im: lifted.im - BigInt(count) * small }, small, large, working);
  if (base === null) return null;
  let { re, im } = base;
  let error = 4n + argumentSlope(upper, numberFromFixed(4n * quarter, working), bits);
  for (let j = 0; j < count; j++) {
    // s_b(x) = s_b(x - i p) / 2cosh(pi p (x - i p/2)); the argument of cosh inherits p units of error, and one more.
    const below = lifted.im - (small * BigInt(2 * j + 1)) / 2n;
    const w = { re: multiplyFixed(small, lifted.re, working), im: multiplyFixed(small, below, working) };
    const coarse = { re: shiftRounded(w.re, working - bits), im: shiftRounded(w.im, working - bits) };
    const check = logTwoCosh(coarse, bits);
    const factor = logTwoCosh(w, working);
    if (check.kind !== 'value' || factor.kind !== 'value') return { kind: 'indistinct' };
    re -= factor.re;
    im -= factor.im;
    error += 2n * check.error;
  }
  const sign = reflect ? -1n : 1n;
  return {
    kind: 'value',
    re: sign * shiftRounded(re, working - bits),
    im: sign * shiftRounded(im, working - bits),
    error,
  };
}

/** Bound on |d log s_b/dx| in |Im x| <= Q/4, times the two units of the argument: 2 (pi |x| + 2 Q). */
function argumentSlope(x: FixedComplex, q: number, bits: number): bigint {
  const size = numberFromFixed(absolute(x.re) + absolute(x.im), bits);
  return BigInt(Math.ceil(2 * (4 * size + 2 * q)));
}

function midpointSum(x: FixedComplex, small: bigint, large: bigint, bits: number): FixedComplex | null {
  const shift = BigInt(bits);
  const q = small + large;
  const pi = piFixed(bits);
  const depth = (bits - 16) * Math.LN2;
  const smallest = numberFromFixed(small, bits);
  const re = Math.abs(numberFromFixed(x.re, bits));
  const decay = numberFromFixed(q - 2n * absolute(x.im), bits);
  const rate = depth / (Math.PI * smallest) + 2 * re;
  // A dyadic step: the same number in the nodes and in the term pi^2 x/(2h).
  const stepUnits = Math.floor(((2 * Math.PI) / rate) * 2 ** 40);
  const step = BigInt(stepUnits) << (shift - 40n);
  const nodes = Math.ceil(depth / (decay * stepUnits * 2 ** -40)) + 4;
  if (nodes > MAXIMAL_NODES) return null;
  // e^{(-Q +- 2 i x) t_k} are two decaying geometric sequences.
  const turn = { re: -multiplyFixed(2n * x.im, step, bits), im: multiplyFixed(2n * x.re, step, bits) };
  const fall = multiplyFixed(q, step, bits);
  const plusStep = expComplex({ re: turn.re - fall, im: turn.im }, bits);
  const minusStep = expComplex({ re: -turn.re - fall, im: -turn.im }, bits);
  let plus = expComplex({ re: (turn.re - fall) >> 1n, im: turn.im >> 1n }, bits);
  let minus = expComplex({ re: (-turn.re - fall) >> 1n, im: -turn.im >> 1n }, bits);
  const smallStep = expFixed(-2n * multiplyFixed(small, step, bits), bits);
  const largeStep = expFixed(-2n * multiplyFixed(large, step, bits), bits);
  let ofSmall = expFixed(-multiplyFixed(small, step, bits), bits);
  let ofLarge = expFixed(-multiplyFixed(large, step, bits), bits);
  const one = 1n << shift;
  let sumRe = 0n;
  let sumIm = 0n;
  for (let k = 0; k < nodes; k++) {
    const below = BigInt(2 * k + 1) * ((one - ofSmall) * (one - ofLarge));
    // 4 (plus - minus)/(2i) / below.
    sumRe += ((plus.im - minus.im) << (2n * shift + 1n)) / below;
    sumIm += ((minus.re - plus.re) << (2n * shift + 1n)) / below;
    plus = multiplyComplex(plus, plusStep, bits);
    minus = multiplyComplex(minus, minusStep, bits);
    ofSmall = multiplyFixed(ofSmall, smallStep, bits);
    ofLarge = multiplyFixed(ofLarge, largeStep, bits);
  }
  const linear = divideFixed(multiplyFixed(pi, pi, bits), 2n * step, bits);
  // -i (a + i b) = b - i a.
  return {
    re: sumIm - multiplyFixed(linear, x.im, bits),
    im: multiplyFixed(linear, x.re, bits) - sumRe,
  };
}
