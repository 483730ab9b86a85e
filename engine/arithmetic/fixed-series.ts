import { numberFromFixed } from './fixed';
import type { FixedComplex } from './fixed-complex';

/** Digits of big integers have 64 bits: dropping fewer saves nothing. */
const DIGIT = 64;
/** Smaller |z| is treated as this one: doubles end there. */
const LEAST = 2 ** -1000;

/**
 * sum_{n < count} a_n z^n for real a_n, |z| < 1. Horner's scheme for real z; else the real recurrence
 * b_n = a_n + 2 Re(z) b_{n+1} - |z|^2 b_{n+2} (Knuth, The Art of Computer Programming 2, 4.6.4), two real products a term.
 *
 * What step n errs by enters with at most (n + 1) |z|^(n-1), so it works with droppedBits(n) bits less, whole digits.
 * With |a_n| <= A, gain = 1/(1 - |z|)^2 and bits as in the arguments, the sum errs by at most
 * gain (2 + 4 A gain) units (one cut of the term and one of z and |z|^2, which meet sums up to A gain) and, for the dropped
 * bits, half of that again: sum_n (n + 1)/(16 (n + 2)^2) < 1/2 for count <= 2000.
 */
export function powerSum(coefficients: readonly bigint[], count: number, z: FixedComplex, bits: number): FixedComplex {
  if (count <= 0) return { re: 0n, im: 0n };
  return z.im === 0n ? realSum(coefficients, count, z.re, bits) : complexSum(coefficients, count, z, bits);
}

/** Bits that step n may go without, where |z| = 2^-rate; whole digits. */
function droppedBits(n: number, rate: number, bits: number): number {
  const spare = rate * (n - 1) - 2 * Math.log2(n + 2) - 4;
  return spare < DIGIT ? 0 : Math.min(DIGIT * Math.floor(spare / DIGIT), bits);
}

/** The least step that may still go without as many bits as step n. */
function lastStep(n: number, drop: number, rate: number, bits: number): number {
  if (drop === 0) return 0;
  let low = 0;
  let high = n;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (droppedBits(middle, rate, bits) >= drop) high = middle;
    else low = middle;
  }
  return high;
}

function realSum(coefficients: readonly bigint[], count: number, z: bigint, bits: number): FixedComplex {
  const rate = -Math.log2(Math.max(Math.abs(numberFromFixed(z, bits)), LEAST));
  let sum = 0n;
  let before = 0;
  for (let n = count - 1; n >= 0; ) {
    const drop = droppedBits(n, rate, bits);
    const last = lastStep(n, drop, rate, bits);
    const shift = BigInt(bits - drop);
    if (drop === 0) {
      sum <<= BigInt(before);
      for (; n >= 0; n--) sum = (coefficients[n] as bigint) + ((z * sum) >> shift);
      return { re: sum, im: 0n };
    }
    const down = BigInt(drop);
    const short = z >> down;
    if (before > drop) sum <<= BigInt(before - drop);
    for (; n >= last; n--) sum = ((coefficients[n] as bigint) >> down) + ((short * sum) >> shift);
    before = drop;
  }
  return { re: sum, im: 0n };
}

function complexSum(coefficients: readonly bigint[], count: number, z: FixedComplex, bits: number): FixedComplex {
  const full = BigInt(bits);
  const { re, im } = z;
  const twice = re << 1n;
  const norm = (re * re + im * im) >> full;
  const rate = -Math.log2(Math.max(numberFromFixed(norm + 2n, bits), LEAST)) / 2;
  let sum = 0n;
  let above = 0n;
  let before = 0;
  for (let n = count - 1; n > 0; ) {
    const drop = droppedBits(n, rate, bits);
    const last = Math.max(1, lastStep(n, drop, rate, bits));
    const shift = BigInt(bits - drop);
    if (before > drop) {
      sum <<= BigInt(before - drop);
      above <<= BigInt(before - drop);
    }
    if (drop === 0) {
      for (; n > 0; n--) {
        const next = (coefficients[n] as bigint) + ((twice * sum - norm * above) >> shift);
        above = sum;
        sum = next;
      }
    } else {
      const down = BigInt(drop);
      const [shortTwice, shortNorm] = [twice >> down, norm >> down];
      for (; n >= last; n--) {
        const next = ((coefficients[n] as bigint) >> down) + ((shortTwice * sum - shortNorm * above) >> shift);
        above = sum;
        sum = next;
      }
    }
    before = drop;
  }
  if (before > 0) {
    sum <<= BigInt(before);
    above <<= BigInt(before);
  }
  return { re: (coefficients[0] as bigint) + ((re * sum - norm * above) >> full), im: (im * sum) >> full };
}
