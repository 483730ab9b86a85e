import type { DoubleComplex } from '../arithmetic/double-complex';
import { absolute, bitLength, numberFromFixed } from '../arithmetic/fixed';
import { atan2Fixed } from '../arithmetic/fixed-atan';
import { type FixedComplex, logModulus, multiplyComplex, squareComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { logScaled } from '../arithmetic/fixed-log';
import { memoiseBounded } from '../arithmetic/memo';
import type { Estimate } from './euler-maclaurin';

/** Relative units that one long product costs: both parts are cut, and the modulus is above 2^(-1/2) up to 2^-30. */
const CUT = 2.01;

/** The constants of two pairs of factors, see multiplyRising: c_k + c_l, and c_k c_l with the product's bits. */
interface Group {
  readonly middle: bigint;
  readonly rest: bigint;
  readonly sum: number;
}

interface Pairing {
  readonly pairs: number;
  readonly groups: readonly Group[];
  /** c_k of the pair that is left over. */
  readonly left: bigint | null;
}

/** More than any count of bits, so that n PRECISIONS + bits tells both. */
const PRECISIONS = 2 ** 20;

const pairing = memoiseBounded(64, (key: number): Pairing => {
  const [n, bits] = [Math.floor(key / PRECISIONS), key % PRECISIONS];
  const unit = BigInt(bits);
  const pairs = Math.floor(n / 2);
  const constant = (k: number): number => k * (n - 1 - k);
  const groups = Array.from({ length: Math.floor(pairs / 2) }, (_, i): Group => {
    const [first, second] = [constant(2 * i), constant(2 * i + 1)];
    const rest = (BigInt(first) * BigInt(second)) << unit;
    return { middle: BigInt(first + second), rest, sum: first + second };
  });
  return { pairs, groups, left: pairs % 2 === 1 ? BigInt(constant(pairs - 1)) << unit : null };
});

/** bits, bits + 1, ... as big integers, which are dear to make. */
const shiftsOf = memoiseBounded(16, (bits: number): readonly bigint[] =>
  Array.from({ length: 64 }, (_, grown) => BigInt(bits + grown)),
);

/**
 * A product of numbers as mantissa 2^exponent, |mantissa| about 1, with the sum of their principal arguments in doubles
 * (off by far less than pi for 10^6 factors) and its error, relative, in units of 2^-bits.
 */
export class RisingProduct {
  private readonly bits: number;
  private readonly shifts: readonly bigint[];
  private re: bigint;
  private im = 0n;
  private exponent = 0;
  /** log2 of |mantissa| in doubles, between -1/2 and 1/2: decides shifts, never digits. */
  private log2Size = 0;
  private angle = 0;
  private error = 0;

  constructor(bits: number) {
    this.bits = bits;
    this.shifts = shiftsOf(bits);
    this.re = 1n << BigInt(bits);
  }

  /**
   * Multiplies by z (z + 1) ... (z + n - 1), none of them 0; z has the product's bits and is taken as exact. With
   * w = z (z + n - 1) the factors k and n - 1 - k are w + c_k, c_k = k (n - 1 - k), and two such pairs are
   * w^2 + (c_k + c_l) w + c_k c_l: products with small integers, and one long product for four factors.
   */
  multiplyRising(z: FixedComplex, n: number): void {
    if (n <= 0) return;
    const rough = { re: numberFromFixed(z.re, this.bits), im: numberFromFixed(z.im, this.bits) };
    const least = Math.round(-rough.re);
    if (rough.re < 0.5 && least < n && Math.abs(rough.im) < 0.5) {
      // The factor next to 0 by itself, where z is exact: in a pair it would have the error of w.
      const at = (k: number): FixedComplex => ({ re: z.re + (BigInt(k) << BigInt(this.bits)), im: z.im });
      this.multiplyRising(z, least);
      this.multiplyAny(at(least));
      this.multiplyRising(at(least + 1), n - least - 1);
      return;
    }
    this.addAngles(rough.re, rough.im, n);
    this.multiplyPairs(z, rough, n);
  }

  /** All moduli are 1/2 at least, up to rounding. */
  private multiplyPairs(z: FixedComplex, rough: DoubleComplex, n: number): void {
    const { bits } = this;
    const unit = BigInt(bits);
    const norm = (k: number): number => (rough.re + k) * (rough.re + k) + rough.im * rough.im;
    const { pairs, groups, left } = pairing(n * PRECISIONS + bits);
    if (n % 2 === 1) this.multiply({ re: z.re + (BigInt(pairs) << unit), im: z.im }, Math.sqrt(norm(pairs)), 0);
    if (pairs === 0) return;
    const end = z.re + (BigInt(n - 1) << unit);
    const real = z.im === 0n;
    const w = real ? { re: (z.re * end) >> unit, im: 0n } : multiplyComplex(z, { re: end, im: z.im }, bits);
    const square = real ? { re: (w.re * w.re) >> unit, im: 0n } : squareComplex(w, bits);
    // w errs by up to sqrt 2 units, its square by twice |w| that, and sqrt 2 for its own cut.
    const wError = 1.42;
    const squareError = 2.84 * Math.sqrt(norm(0) * norm(n - 1)) + 3;
    for (let i = 0; i < groups.length; i++) {
      const { middle, rest, sum } = groups[i] as Group;
      const k = 2 * i;
      const last = n - 1 - k;
      const re = square.re + middle * w.re + rest;
      const im = real ? 0n : square.im + middle * w.im;
      const size = Math.sqrt(norm(k) * norm(last) * norm(k + 1) * norm(last - 1));
      this.multiply({ re, im }, size, squareError + sum * wError);
    }
    if (left !== null) {
      const k = pairs - 1;
      this.multiply({ re: w.re + left, im: w.im }, Math.sqrt(norm(k) * norm(n - 1 - k)), wError);
    }
  }

  /** Multiplies by z, |z| = modulus up to a factor 1 + 2^-40, off by `error` units. */
  private multiply(z: FixedComplex, modulus: number, error: number): void {
    const log2 = this.log2Size + Math.log2(modulus);
    const grown = Math.round(log2);
    const shift = this.shifts[grown] ?? BigInt(this.bits + grown);
    if (this.im === 0n && z.im === 0n) {
      this.re = (this.re * z.re) >> shift;
    } else {
      const re = (this.re * z.re - this.im * z.im) >> shift;
      this.im = (this.re * z.im + this.im * z.re) >> shift;
      this.re = re;
    }
    this.exponent += grown;
    this.log2Size = log2 - grown;
    this.error += CUT + (1.01 * error) / modulus;
  }

  /** Multiplies by a number of any size that is not 0. */
  multiplyAny(z: FixedComplex): void {
    const { bits } = this;
    const up = Math.max(0, bits - bitLength(absolute(z.re) | absolute(z.im)));
    const lifted = { re: z.re << BigInt(up), im: z.im << BigInt(up) };
    const [re, im] = [numberFromFixed(lifted.re, bits), numberFromFixed(lifted.im, bits)];
    this.angle += Math.atan2(im, re);
    this.multiply(lifted, Math.hypot(re, im), 0);
    this.exponent -= up;
  }

  private addAngles(re: number, im: number, n: number): void {
    if (im !== 0) {
      for (let k = 0; k < n; k++) this.angle += Math.atan2(im, re + k);
    } else if (re < 0) {
      this.angle += Math.PI * Math.min(n, Math.ceil(-re));
    }
  }

  /** The sum of the principal logarithms of all factors; error: rounding as counted, and that of the logarithm itself. */
  logarithm(): Estimate {
    const { bits, re, im } = this;
    // A relative error d changes the logarithm by d (1 + d) at most.
    const relative = this.error * 2 ** -bits;
    const error = BigInt(Math.ceil(this.error * (1 + Math.min(relative, 1)) * 1.001)) + 2n;
    if (im === 0n && re > 0n && this.angle === 0) {
      return { value: { re: logScaled(re, bits - this.exponent, bits), im: 0n }, error };
    }
    const principal = atan2Fixed(im, re, bits);
    const turns = BigInt(Math.round((this.angle - numberFromFixed(principal, bits)) / (2 * Math.PI)));
    return {
      value: { re: logModulus({ re, im }, bits - this.exponent, bits), im: principal + 2n * turns * piFixed(bits) },
      error: error + 2n * absolute(turns),
    };
  }
}
