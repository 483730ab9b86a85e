import { absolute, numberFromFixed } from '../arithmetic/fixed';
import { atan2Fixed } from '../arithmetic/fixed-atan';
import { type FixedComplex, logModulus, oneComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { gcd } from '../exact/rational';
import type { Polynomial } from './polynomial';

/** A polynomial sum_k coefficients_k binomial(j + k, k) / denominator, the coefficients integers. */
export interface RisingPolynomial {
  readonly coefficients: readonly bigint[];
  readonly denominator: bigint;
}

/**
 * M(from + j) in rising binomials of j, whose coefficients are the backward differences of M at from - 1. Null where a
 * coefficient of M is no rational number.
 */
export function risingPolynomial(multiplicity: Polynomial, from: number): RisingPolynomial | null {
  const rational = multiplicity.map((c) => c.toRational());
  if (!rational.every((c) => c !== null)) return null;
  const denominator = rational.reduce((d, c) => (d * c.denominator) / gcd(d, c.denominator), 1n);
  const numerators = rational.map((c) => c.numerator * (denominator / c.denominator));
  const values = numerators.map((_, i) => {
    const x = BigInt(from - 1 - i);
    return numerators.reduceRight((sum, c) => sum * x + c, 0n);
  });
  for (let order = 1; order < values.length; order++) {
    for (let i = values.length - 1; i >= order; i--) values[i] = (values[i - 1] as bigint) - (values[i] as bigint);
  }
  return { coefficients: values, denominator };
}

/** log2 of a bound of sum_j |M(from + j)| over j < count, each binomial by itself. */
export function log2TotalWeight({ coefficients, denominator }: RisingPolynomial, count: number): number {
  let binomial = count;
  let total = 1;
  coefficients.forEach((c, k) => {
    total += (Number(absolute(c)) / Number(denominator)) * binomial;
    binomial *= (count + k + 1) / (k + 2);
  });
  return Math.log2(total);
}

/** Arguments are added up in doubles; more turns than this would no longer be counted safely. */
const LARGEST_ANGLE = 1e10;

/** A product on its way: mantissa of about unit size times 2^exponent, the sum of the arguments, the relative error. */
interface Running {
  mantissa: FixedComplex;
  /** |mantissa| in doubles. */
  size: number;
  exponent: number;
  angle: number;
  /** In units of 2^-bits. */
  error: number;
}

/**
 * sum_j M_j log z_j over the numbers given, with principal logarithms: with A_0 the product of the z_j from the last to
 * the first and A_(k+1) the product of the partial products of A_k, A_k is the product of z_j^binomial(j + k, k), so
 * that a polynomial of degree d needs d + 1 multiplications a number and d + 1 logarithms. None of the z_j may be 0;
 * `slip` bounds the error of z_j in units. Error, in units: a product adds the errors of its factors and two
 * units of rounding, all relative; the logarithm, its own unit in either part and two units of pi a turn.
 * Null where the arguments add up to too many turns.
 */
export function sumOfLogarithms(
  numbers: readonly FixedComplex[],
  { coefficients, denominator }: RisingPolynomial,
  bits: number,
  slip: (j: number) => number,
): { readonly value: FixedComplex; readonly error: number } | null {
  const running = coefficients.map(
    (): Running => ({ mantissa: oneComplex(bits), size: 1, exponent: 0, angle: 0, error: 0 }),
  );
  for (let j = numbers.length - 1; j >= 0; j--) {
    let factor = runningOf(numbers[j] as FixedComplex, bits, slip(j));
    for (const product of running) {
      multiplyBy(product, factor, bits);
      factor = product;
    }
  }
  let re = 0n;
  let im = 0n;
  let error = 1;
  for (const [k, product] of running.entries()) {
    const times = coefficients[k] as bigint;
    if (times === 0n) continue;
    if (!(Math.abs(product.angle) < LARGEST_ANGLE)) return null;
    const { mantissa, exponent, angle } = product;
    const principal = atan2Fixed(mantissa.im, mantissa.re, bits);
    const turns = Math.round((angle - numberFromFixed(principal, bits)) / (2 * Math.PI));
    re += times * logModulus(mantissa, bits - exponent, bits);
    im += times * (principal + 2n * BigInt(turns) * piFixed(bits));
    const share = Number(absolute(times)) / Number(denominator);
    error += share * (1.01 * product.error + 3 + 2 * Math.abs(turns));
  }
  return { value: { re: re / denominator, im: im / denominator }, error: error + 2 };
}

function runningOf(z: FixedComplex, bits: number, slip: number): Running {
  const re = numberFromFixed(z.re, bits);
  const im = numberFromFixed(z.im, bits);
  const size = Math.hypot(re, im);
  return { mantissa: z, size, exponent: 0, angle: Math.atan2(im, re), error: slip / size };
}

function multiplyBy(product: Running, factor: Running, bits: number): void {
  const { mantissa: a } = product;
  const { mantissa: b } = factor;
  let size = product.size * factor.size;
  const excess = Math.floor(Math.log2(size));
  size *= 2 ** -excess;
  const shift = BigInt(bits + excess);
  product.mantissa =
    a.im === 0n && b.im === 0n
      ? { re: (a.re * b.re) >> shift, im: 0n }
      : { re: (a.re * b.re - a.im * b.im) >> shift, im: (a.re * b.im + a.im * b.re) >> shift };
  product.size = size;
  product.exponent += factor.exponent + excess;
  product.angle += factor.angle;
  product.error += factor.error + 2;
}
