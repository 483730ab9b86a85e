import { numberFromFixed, shiftRounded, sqrtFixed } from '../arithmetic/fixed';
import {
  addComplex,
  divideComplex,
  type FixedComplex,
  logComplex,
  multiplyComplex,
  subtractComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { expFixed } from '../arithmetic/fixed-exp';
import { memoiseBounded } from '../arithmetic/memo';
import { logTwoSinh } from './hyperbolic-precise';
import type { PreciseLog } from './special-function';

/**
 * log Gamma(z) by Spouge's approximation (Spouge, SIAM J. Numer. Anal. 31 (1994) 931, theorem 1.3.1):
 *   Gamma(z + 1) = (z + a)^{z + 1/2} e^{-z-a} [sqrt(2 pi) + sum_{k=1}^{a-1} c_k/(z + k)] (1 + epsilon),
 *   c_k = (-1)^{k-1} (a - k)^{k-1/2} e^{a-k}/(k - 1)!,  |epsilon| < a^{-1/2} (2 pi)^{-a-1/2} for Re z >= 0.
 * Independent of Stirling's series; for cross-checks. The imaginary part is right up to a multiple of 2 pi.
 */
export function logGammaBySpouge(z: FixedComplex, bits: number): PreciseLog {
  const one = 1n << BigInt(bits);
  if (2n * z.re < one) {
    const sine = logTwoSinh({ re: z.im, im: -z.re }, bits);
    if (sine.kind !== 'value') return { kind: 'indistinct' };
    const other = logGammaBySpouge({ re: one - z.re, im: -z.im }, bits);
    if (other.kind !== 'value') return other;
    const pi = piFixed(bits);
    const logTwoPi = logComplex({ re: 2n * pi, im: 0n }, bits).re;
    return {
      kind: 'value',
      re: logTwoPi - sine.re - other.re,
      im: -sine.im - shiftRounded(pi, 1) - other.im,
      error: sine.error + other.error + 4n,
    };
  }
  const size = Math.max(2, Math.hypot(numberFromFixed(z.re, bits), numberFromFixed(z.im, bits)));
  const guard = 2 * Math.ceil(Math.log2(size)) + 16;
  const { a, coefficients, working } = spouge(64 * Math.ceil((bits + guard) / 64));
  const unit = 1n << BigInt(working);
  const up = BigInt(working - bits);
  const exact: FixedComplex = { re: z.re << up, im: z.im << up };
  let sum: FixedComplex = { re: sqrtFixed(2n * piFixed(working), working), im: 0n };
  for (let k = 1; k < a; k++) {
    const below = { re: exact.re + BigInt(k) * unit, im: exact.im };
    sum = addComplex(sum, divideComplex({ re: coefficients[k - 1] as bigint, im: 0n }, below, working));
  }
  const shifted = { re: exact.re + BigInt(a) * unit, im: exact.im };
  const half = { re: exact.re + (unit >> 1n), im: exact.im };
  // Gamma(z) = Gamma(z + 1)/z.
  let log = multiplyComplex(half, logComplex(shifted, working), working);
  log = subtractComplex(log, shifted);
  log = addComplex(log, logComplex(sum, working));
  log = subtractComplex(log, logComplex(exact, working));
  const slope = BigInt(Math.ceil(2 * Math.log(size) + 8));
  return {
    kind: 'value',
    re: shiftRounded(log.re, working - bits),
    im: shiftRounded(log.im, working - bits),
    error: slope + 4n,
  };
}

interface Spouge {
  readonly a: number;
  readonly working: number;
  readonly coefficients: readonly bigint[];
}

/** Coefficients for a relative error below 2^-bits; they grow like e^{1.3 a} and cancel, hence the further bits. */
const spouge: (bits: number) => Spouge = memoiseBounded(8, (bits: number): Spouge => {
  const a = Math.ceil((bits * Math.LN2) / Math.log(2 * Math.PI)) + 2;
  const working = bits + Math.ceil(2.6 * a) + 32;
  const coefficients: bigint[] = [];
  const e = expFixed(1n << BigInt(working), working);
  let power = 1n << BigInt(working);
  const exponentials: bigint[] = [];
  for (let k = 0; k < a; k++) {
    exponentials.push(power);
    power = (power * e) >> BigInt(working);
  }
  let factorial = 1n;
  for (let k = 1; k < a; k++) {
    const base = BigInt(a - k);
    const root = sqrtFixed(base << BigInt(working), working);
    const size = (base ** BigInt(k) * (exponentials[a - k] as bigint) * (1n << BigInt(working))) / (root * factorial);
    coefficients.push(k % 2 === 1 ? size : -size);
    factorial *= BigInt(k);
  }
  return { a, working, coefficients };
});
