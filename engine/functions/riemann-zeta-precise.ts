import { memoiseBounded } from '../arithmetic/memo';
import { memoiseByKey } from './kernel-memo';

/**
 * zeta(s) for an integer s >= 2 by Borwein's alternating sum (P. Borwein 2000, algorithm 2),
 *   zeta(s) = -1/(d_n (1 - 2^{1-s})) sum_{k<n} (-1)^k (d_k - d_n)/(k+1)^s, d_k = n sum_{i<=k} (n+i-1)! 4^i/((n-i)! (2i)!),
 * with error below 3/(3 + sqrt 8)^n. Result with `bits` fraction bits, off by at most 1 unit.
 */
export function zetaInteger(s: number, bits: number): bigint {
  return values(`${s}|${bits}`, () => alternatingSum(s, bits));
}

const values = memoiseByKey<bigint>(32);

function alternatingSum(s: number, bits: number): bigint {
  const guard = 24;
  const d = borweinCoefficients(64 * Math.ceil((bits + guard) / 64));
  const last = d[d.length - 1] as bigint;
  const shift = BigInt(bits + guard);
  let total = 0n;
  for (let k = 0; k < d.length - 1; k++) {
    const term = ((last - (d[k] as bigint)) << shift) / BigInt(k + 1) ** BigInt(s);
    total += k % 2 === 0 ? term : -term;
  }
  const power = 1n << BigInt(s - 1);
  return ((total * power) / (last * (power - 1n)) + (1n << BigInt(guard - 1))) >> BigInt(guard);
}

/** d_0, ..., d_n, integers; (3 + sqrt 8)^n exceeds 2^(bits + 4). */
export const borweinCoefficients = memoiseBounded(8, (bits: number): readonly bigint[] => {
  const n = Math.ceil((bits + 4) / Math.log2(3 + Math.sqrt(8)));
  const list: bigint[] = [];
  let term = 1n;
  let sum = 1n;
  list.push(sum);
  for (let i = 1; i <= n; i++) {
    // term_i = n (n+i-1)! 4^i/((n-i)! (2i)!).
    term = (term * 4n * BigInt(n + i - 1) * BigInt(n - i + 1)) / BigInt((2 * i - 1) * (2 * i));
    sum += term;
    list.push(sum);
  }
  return list;
});
