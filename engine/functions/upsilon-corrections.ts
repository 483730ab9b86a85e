import { divideFixed, multiplyFixed } from '../arithmetic/fixed';
import { piFixed } from '../arithmetic/fixed-constants';
import { twiceEvenZeta } from './even-zeta';

/**
 * The end point corrections of the midpoint rule for log Upsilon as numbers C_1, ..., C_{J+1} with
 *   sum_i e_i z^{2i} = sum_i C_i (2 rho z)^{2i}/(2i)!, rho = pi small, and
 *   e_i = -(1/2) (4^i/(2i)!) sum_{j = max(1, i-1)}^{J} h^{2j} B_{2j}(1/2)/(2j) d_{j+1-i}, sum d_m t^{2m} = t^2/(sinh bt sinh t/b).
 * In units of rho everything is of order one: d_m rho^{2m} is a product of series with coefficients
 * (-1)^k 2 eta(2k) (w small)^{2k}, and h^{2j} B_{2j}(1/2)/(2j) rho^{-2j} = (-1)^j 2 eta(2j) (2j-1)! (h/(2 pi rho))^{2j}.
 * `periods` smaller first, with `bits` fraction bits. Error: below J^2 units each.
 */
export function endCorrections(
  periods: readonly bigint[],
  step: bigint,
  terms: number,
  bits: number,
): readonly bigint[] {
  const shift = BigInt(bits);
  const one = 1n << shift;
  const small = periods[0] as bigint;
  const eta = twiceEta(terms + 1, bits);
  const kernel = kernelSeries(periods, terms + 1, bits);
  const pi = piFixed(bits);
  const rate = divideFixed(step, 2n * multiplyFixed(multiplyFixed(pi, pi, bits), small, bits), bits);
  const rateSquare = multiplyFixed(rate, rate, bits);
  const ends: bigint[] = [];
  let size = rateSquare;
  for (let j = 1; j <= terms; j++) {
    const value = multiplyFixed(size, eta[j] as bigint, bits);
    ends.push(j % 2 === 0 ? value : -value);
    size = multiplyFixed(size, rateSquare, bits) * BigInt(2 * j * (2 * j + 1));
  }
  const rho = multiplyFixed(pi, small, bits);
  const scale = divideFixed(one, 2n * multiplyFixed(rho, rho, bits), bits);
  const result: bigint[] = [];
  for (let i = 1; i <= terms + 1; i++) {
    let sum = 0n;
    for (let j = Math.max(1, i - 1); j <= terms; j++) sum += (ends[j - 1] as bigint) * (kernel[j + 1 - i] as bigint);
    result.push(-multiplyFixed(sum >> shift, scale, bits));
  }
  return result;
}

/**
 * d_m (pi small)^{2m}, m = 0, ..., count - 1, for prod_i (w_i t/sinh w_i t) = sum d_m t^{2m} over two periods, the smaller
 * first and their product 1: coefficients (-1)^k 2 eta(2k) (w small)^{2k} for each.
 */
export function kernelSeries(periods: readonly bigint[], count: number, bits: number): readonly bigint[] {
  const one = 1n << BigInt(bits);
  const eta = twiceEta(count, bits);
  let kernel: readonly bigint[] = [one];
  for (const period of periods) {
    const ratio = multiplyFixed(period, periods[0] as bigint, bits);
    const square = multiplyFixed(ratio, ratio, bits);
    const series: bigint[] = [];
    for (let k = 0, power = one; k < count; k++, power = multiplyFixed(power, square, bits)) {
      const size = multiplyFixed(power, eta[k] as bigint, bits);
      series.push(k % 2 === 0 ? size : -size);
    }
    kernel = multiplySeries(kernel, series, count, bits);
  }
  return kernel;
}

function multiplySeries(a: readonly bigint[], b: readonly bigint[], count: number, bits: number): bigint[] {
  return Array.from({ length: count }, (_, m) => {
    let sum = 0n;
    for (let k = 0; k <= m && k < a.length; k++) sum += (a[k] as bigint) * (b[m - k] as bigint);
    return sum >> BigInt(bits);
  });
}

/** 2 eta(2k) = 2 (1 - 2^{1-2k}) zeta(2k), k = 0, ..., count - 1. */
function twiceEta(count: number, bits: number): readonly bigint[] {
  const zeta = twiceEvenZeta(Math.max(1, count - 1), bits);
  return [1n << BigInt(bits), ...zeta.map((value, index) => value - (value >> BigInt(2 * index + 1)))];
}
