import { numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  type FixedComplex,
  multiplyComplex,
  oneComplex,
  scaleComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { logFixed } from '../arithmetic/fixed-log';
import { bernoulliNumber } from './bernoulli';
import type { Estimate } from './euler-maclaurin';
import { hurwitzZetaDerivative } from './hurwitz-derivative';

/** More equal periods than this lose more bits than they save time. */
const MOST = 6;

/**
 * log Gamma_N(x|w, ..., w) for N <= 6 equal positive periods, normalised as logBarnesGamma; null for others. With z = x/w,
 * zeta_N(s) = w^-s sum_k binomial(k + N - 1, N - 1) (z + k)^-s and the binomial as a polynomial sum_j c_j(z) (z + k)^j:
 *   log Gamma_N = sum_{j<N} c_j(z) (zeta'(-j, z) - zeta(-j, z) log w),  zeta(-j, z) = -B_{j+1}(z)/(j+1) (DLMF 25.11.14).
 * x + n w is never 0. Error: rounding and remainders as proved in hurwitz-derivative.ts; not that of x and w.
 */
export function logBarnesGammaEqual(x: FixedComplex, periods: readonly FixedComplex[], bits: number): Estimate | null {
  const w = periods[0] as FixedComplex;
  const count = periods.length;
  if (count > MOST || w.im !== 0n || w.re <= 0n) return null;
  if (periods.some(({ re, im }) => re !== w.re || im !== w.im)) return null;
  const size = (numberFromFixed(absoluteComplex(x), bits) + 1) / numberFromFixed(w.re, bits) + count + 1;
  const guard = 8 * Math.ceil(((count + 1) * Math.log2(size) + 24) / 8);
  const working = bits + guard;
  const up = BigInt(guard);
  const period = w.re << up;
  const z = quotient({ re: x.re << up, im: x.im << up }, period, working);
  const logPeriod = logFixed(period, working);
  const part = (value: FixedComplex): number => numberFromFixed(absoluteComplex(value), working) + 1;
  let value = zeroComplex;
  let error = 0;
  multiplicity(z, count, working).forEach((c, j) => {
    const derivative = hurwitzZetaDerivative(j, z, working);
    const zeta = hurwitzAtInteger(z, j, working);
    const bracket = subtractComplex(derivative.value, scaleComplex(zeta, logPeriod, working));
    value = addComplex(value, multiplyComplex(c, bracket, working));
    // c errs by 4 N size^N units, zeta(-j, z) by 4 (j + 2) size^(j + 1), log w by one.
    const zetaError = 4 * (j + 2) * size ** (j + 1) * (Math.abs(numberFromFixed(logPeriod, working)) + 1);
    error +=
      part(c) * (Number(derivative.error) + zetaError + part(zeta) + 3) + 4 * count * size ** count * part(bracket);
  });
  error += 1.5 * slope(z, count, size, working);
  return {
    value: { re: value.re >> up, im: value.im >> up },
    error: (BigInt(Math.ceil(error)) >> up) + 2n,
  };
}

function quotient(x: FixedComplex, w: bigint, bits: number): FixedComplex {
  const shift = BigInt(bits);
  return { re: (x.re << shift) / w, im: (x.im << shift) / w };
}

/**
 * A bound of |d/dz log Gamma_N|, N/dist for each of the poles, whose multiplicities are below size^(N-1), besides the growth
 * size^(N-1) (log size + 4); dist to the nearest pole.
 */
function slope(z: FixedComplex, count: number, size: number, bits: number): number {
  const re = numberFromFixed(z.re, bits);
  const nearest = re > 0 ? z.re : z.re + (BigInt(Math.round(-re)) << BigInt(bits));
  const distance = numberFromFixed(absoluteComplex({ re: nearest, im: z.im }) + 1n, bits);
  return count * size ** count * (Math.log(size) + 4 + 2 / distance);
}

/** c_0, ..., c_{N-1}: product over i = 1, ..., N - 1 of (u + i - z), over (N - 1)!. */
function multiplicity(z: FixedComplex, count: number, bits: number): FixedComplex[] {
  let list: FixedComplex[] = [oneComplex(bits)];
  for (let i = 1; i < count; i++) {
    const constant = { re: (BigInt(i) << BigInt(bits)) - z.re, im: -z.im };
    const below = BigInt(i);
    list = Array.from({ length: i + 1 }, (_, j) => {
      const raised = list[j - 1] ?? zeroComplex;
      const kept = list[j];
      const sum = kept === undefined ? raised : addComplex(raised, multiplyComplex(kept, constant, bits));
      return { re: sum.re / below, im: sum.im / below };
    });
  }
  return list;
}

/** zeta(-j, z) = -B_{j+1}(z)/(j+1), the polynomial by Horner's rule. */
function hurwitzAtInteger(z: FixedComplex, j: number, bits: number): FixedComplex {
  const n = j + 1;
  let value = oneComplex(bits);
  let binomial = 1n;
  for (let k = 1; k <= n; k++) {
    binomial = (binomial * BigInt(n - k + 1)) / BigInt(k);
    const { numerator, denominator } = bernoulliNumber(k);
    const next = multiplyComplex(value, z, bits);
    value = { re: next.re + ((binomial * numerator) << BigInt(bits)) / denominator, im: next.im };
  }
  return { re: -value.re / BigInt(n), im: -value.im / BigInt(n) };
}
