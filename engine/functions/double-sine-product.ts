import { numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import type { FixedComplex } from '../arithmetic/fixed-complex';
import {
  divideComplex,
  expComplex,
  multiplyComplex,
  oneComplex,
  scaleComplex,
  squareComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import type { GeometricProduct } from './double-sine-geometric';
import { logGeometricProduct } from './double-sine-geometric';
import type { PreciseLog } from './special-function';

/** A complex b with Re b > 0 and b^2 not real. */
export interface ComplexPeriod {
  /** b with `bits` fraction bits, each part off by less than one ulp. */
  readonly value: (bits: number) => FixedComplex;
  readonly approx: { readonly re: number; readonly im: number };
}

/** More factors than this take seconds: b^2 is too nearly real. */
const LARGEST_COUNT = 20_000;

const GUARD = 40;

/** Bits of the largest exponential: sizes of factors are kept in doubles, which end at 2^1024. */
const MOST_GROWTH = 900;

/**
 * log s_b(x) for complex b by the q-products, for Im b^2 > 0 (else b and 1/b change places):
 *   s_b(x) = e^(-(i pi/2)(x^2 + (b^2 + b^-2)/12)) prod_{n>=0} (1 + e^(i pi b^2 (2n+1)) e^(2 pi b x)) / (1 + e^(-i pi (2n+1)/b^2) e^(2 pi x/b)),
 * used for Re x <= 0, the other side by s_b(x) s_b(-x) = 1. The logarithm is the sum of the principal logarithms of the factors: the
 * analytic branch where e^(2 pi b x) and e^(2 pi x/b) do not exceed 1 in size, elsewhere a logarithm of the right number.
 * Error, argument and refusals as in logDoubleSine, but zeros and poles are not named: 'indistinct' there. Null where more than 20 000
 * factors are needed. Checked against mpmath's quadrature of the defining integral at four complex b (see the test).
 * Source: Faddeev, Kashaev and Volkov 2001 (hep-th/0006156).
 */
export function logDoubleSineByProduct(x: FixedComplex, b: ComplexPeriod, bits: number): PreciseLog | null {
  const swap = b.approx.re * b.approx.im < 0;
  const size = Math.hypot(numberFromFixed(x.re, bits), numberFromFixed(x.im, bits));
  const modulus = Math.hypot(b.approx.re, b.approx.im);
  const largest = Math.max(modulus, 1 / modulus);
  // |e^(2 pi b x)| may be large: its bits are lost where the product with powers of q comes back to 1.
  const growth = exponentBits({ re: numberFromFixed(x.re, bits), im: numberFromFixed(x.im, bits) }, b.approx);
  if (!(growth <= MOST_GROWTH)) {
    return { kind: 'unreachable', says: 'the argument lies too far out for the q-products of s_b' };
  }
  const precision = bits + GUARD + Math.ceil(growth) + 2 * Math.ceil(Math.log2(2 + size));
  const outer = b.value(precision + 64);
  const drop = 64;
  const given = { re: shiftRounded(outer.re, drop), im: shiftRounded(outer.im, drop) };
  const inverse = divideComplex(oneComplex(precision), given, precision);
  const [beta, other] = swap ? [inverse, given] : [given, inverse];
  const negative = x.re > 0n;
  const up = BigInt(precision - bits);
  const point = negative ? { re: -x.re << up, im: -x.im << up } : { re: x.re << up, im: x.im << up };
  const spread = Math.max(size, largest);
  const top = productOver(point, beta, 1n, spread, precision);
  const bottom = productOver(point, other, -1n, spread, precision);
  if (top === null || bottom === null) return null;
  const threshold = 16 * Math.PI * largest * 2 ** -bits;
  if (!(Math.min(top.smallest, bottom.smallest) > threshold)) return { kind: 'indistinct' };
  const squares = squareComplex(point, precision);
  const [b2, c2] = [squareComplex(beta, precision), squareComplex(other, precision)];
  const sum = { re: squares.re + (b2.re + c2.re) / 12n, im: squares.im + (b2.im + c2.im) / 12n };
  const half = piFixed(precision);
  // -(i pi/2)(u + i v) = (pi/2)(v - i u).
  const re = ((sum.im * half) >> BigInt(precision + 1)) + top.log.re - bottom.log.re;
  const im = -((sum.re * half) >> BigInt(precision + 1)) + top.log.im - bottom.log.im;
  const rounding = top.error + bottom.error + 16 * (1 + size) ** 2 * (1 + largest) ** 4;
  const slope = Math.PI * size + 2 * Math.PI * largest * (top.slope + bottom.slope) * 1.5;
  const sign = negative ? -1n : 1n;
  return {
    kind: 'value',
    re: sign * shiftRounded(re, precision - bits),
    im: sign * shiftRounded(im, precision - bits),
    error: BigInt(Math.ceil(rounding * 2 ** (bits - precision) + Math.SQRT2 * slope + 2)),
  };
}

/** log2 of the larger of |e^(2 pi b y)| and |e^(2 pi y/b)|, at least 0, for the one y of x and -x with Re y <= 0. */
function exponentBits(x: ComplexPeriod['approx'], b: ComplexPeriod['approx']): number {
  const sign = x.re > 0 ? -1 : 1;
  const direct = sign * (b.re * x.re - b.im * x.im);
  const inverse = (sign * (b.re * x.re + b.im * x.im)) / (b.re * b.re + b.im * b.im);
  return (2 * Math.PI * Math.max(0, direct, inverse)) / Math.LN2;
}

/** sum_n log(1 + e^(sign i pi beta^2 (2n+1)) e^(2 pi beta x)), |e^(sign i pi beta^2)| < 1; `spread` bounds |x| and |beta|. */
function productOver(
  x: FixedComplex,
  beta: FixedComplex,
  sign: bigint,
  spread: number,
  bits: number,
): GeometricProduct | null {
  const timesPi = (z: FixedComplex): FixedComplex => scaleComplex(z, piFixed(bits), bits);
  const square = timesPi(squareComplex(beta, bits));
  // sign i pi beta^2.
  const turn = { re: -sign * square.im, im: sign * square.re };
  const lead = timesPi(multiplyComplex(beta, x, bits));
  const start = expComplex({ re: turn.re + 2n * lead.re, im: turn.im + 2n * lead.im }, bits);
  const ratio = expComplex({ re: 2n * turn.re, im: 2n * turn.im }, bits);
  const size = Math.hypot(numberFromFixed(start.re, bits), numberFromFixed(start.im, bits));
  const fall = -2 * numberFromFixed(turn.re, bits);
  if (!(fall > 0)) return null;
  // |start| |ratio|^n/(1 - |ratio|) below an ulp; one factor where |start| is.
  const needed = bits * Math.LN2 + Math.log(size) - Math.log(-Math.expm1(-fall));
  const count = Math.max(0, Math.ceil(needed / fall)) + 1;
  if (count > LARGEST_COUNT) return null;
  // Exponents err by their factors' ulps times pi and the other factor, and by pi's ulp times the product.
  const exponentError = 24 * (1 + spread) ** 2;
  return logGeometricProduct(start, ratio, count, bits, (4 + exponentError) * (1 + size), 4 + exponentError);
}
