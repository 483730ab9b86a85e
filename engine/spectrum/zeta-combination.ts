import { numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  type FixedComplex,
  multiplyComplex,
  scaleComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { type FarPoint, listBits, scaledBernoulli } from '../functions/euler-maclaurin';
import { scaledHurwitz } from '../functions/hurwitz-derivative';
import type { Partial } from './hurwitz-tail';
import { scaledError } from './linear-sum';

/**
 * sum over s = first, first + 1, ... of a_s W^s zeta(s, W) for a real far point W, at s = 1 the finite part; the a_s fall
 * geometrically. For s > 1 (DLMF 25.11.28) W^s zeta(s, W) = W/(s-1) + 1/2 + W sum_j B_2j/(2j)! (s)_(2j-1) W^(-2j), and
 * the sums over s are taken first: with 2^h about (2 pi W)^2 the numbers a_s (s)_(2j-1) 2^(-hj) go from j to j + 1 by a
 * product of small integers, and one product with a power of 2^h/(2 pi W)^2 a j is left.
 * Error, in units: each of the numbers a_s ... is within j + 1, since the factors are below 2^h while the terms fall; the
 * series of an s stops when its number vanishes, where the remainder is below the next term, or when the terms would
 * grow, where it is below the last one.
 */
export function zetaCombination(
  point: FarPoint,
  coefficients: readonly FixedComplex[],
  first: number,
  logarithm: FixedComplex,
): Partial {
  const { bits, at } = point;
  let value = zeroComplex;
  let error = 1;
  const open: Open[] = [];
  coefficients.forEach((a, k) => {
    const s = first + k;
    if (s <= 1) {
      const log2Weight = Math.log2(numberFromFixed(absoluteComplex(a) + 1n, bits) + 1);
      const { value: zeta, error: slip } = scaledHurwitz(point, s, logarithm, log2Weight);
      value = addComplex(value, multiplyComplex(a, zeta, bits));
      error += scaledError(slip, log2Weight) + 1;
      return;
    }
    const over = BigInt(s - 1);
    const lead = multiplyComplex(a, at, bits);
    value = addComplex(value, { re: lead.re / over + a.re / 2n, im: lead.im / over + a.im / 2n });
    error += 4;
    open.push({ s, re: a.re, im: a.im });
  });
  const tail = sharedTail(point, open);
  return { value: addComplex(value, tail.value), error: error + tail.error };
}

/** One s whose series goes on: a_s (s)_(2j-1) 2^(-hj), before the first step a_s. */
interface Open {
  readonly s: number;
  re: bigint;
  im: bigint;
}

function sharedTail(point: FarPoint, all: readonly Open[]): Partial {
  const { bits, at, step, stepBits, log2Size } = point;
  const size = 2 ** log2Size;
  const height = Math.floor(2 * (log2Size + Math.log2(2 * Math.PI)));
  const shift = BigInt(height);
  // 2^h/(2 pi W)^2, between 1/2 and 1.
  const ratio = (step.re << shift) >> BigInt(stepBits - bits);
  const wide = listBits(bits);
  const list = scaledBernoulli(wide);
  let power = at.re;
  let value = zeroComplex;
  let error = 0;
  let open = all;
  for (let j = 1; open.length > 0; j++) {
    power = (power * ratio) >> BigInt(bits);
    let re = 0n;
    let im = 0n;
    const left: Open[] = [];
    for (const term of open) {
      const { s } = term;
      const factor = j === 1 ? s : (s + 2 * j - 3) * (s + 2 * j - 2);
      // From here on the terms grow: the last one bounds the remainder.
      if (factor > 2 ** height) {
        error += 4 * size * numberFromFixed(absoluteComplex(term), bits) * 2 ** bits;
        continue;
      }
      const by = BigInt(factor);
      term.re = (term.re * by) >> shift;
      term.im = term.im === 0n ? 0n : (term.im * by) >> shift;
      re += term.re;
      im += term.im;
      // Rounded downwards, small negative numbers stay at -1.
      if (isSmall(term.re) && isSmall(term.im)) error += 8 * (size + 1);
      else left.push(term);
    }
    error += 4 * (j + 1) * open.length * (size + 1);
    // Beyond the list 2 zeta(2j) is 2.
    const bernoulli = list[j - 1] ?? (j % 2 === 0 ? -(2n << BigInt(wide)) : 2n << BigInt(wide));
    const scaled = scaleComplex({ re, im }, power, bits);
    value = addComplex(value, scaleComplex(scaled, bernoulli, wide));
    open = left;
  }
  return { value, error };
}

function isSmall(value: bigint): boolean {
  return value === 0n || value === -1n;
}
