import { bitLength, numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import type { FixedComplex } from '../arithmetic/fixed-complex';
import { logComplex, multiplyComplex } from '../arithmetic/fixed-complex';
import { ln2Fixed, piFixed } from '../arithmetic/fixed-constants';

/** log of prod_{j < count} (1 + z r^j) and what bounds its error. */
export interface GeometricProduct {
  /** Sum of the principal logarithms of the factors. */
  readonly log: FixedComplex;
  /** Rounding error in ulps, as long as it is below 2^(bits - 2). */
  readonly error: number;
  /** sum of |z r^j| / |1 + z r^j|: the log changes by at most this times the relative change of z. */
  readonly slope: number;
  /** The smallest |1 + z r^j| as a double. */
  readonly smallest: number;
}

/**
 * sum_{j < count} log(1 + z r^j), each logarithm principal, |r| <= 1, from ONE logarithm of the product: its branch follows from the sum of
 * the arguments in doubles, known to 2^-40. `zError` bounds the error of z, `rError` that of r, in ulps.
 */
export function logGeometricProduct(
  z: FixedComplex,
  r: FixedComplex,
  count: number,
  bits: number,
  zError: number,
  rError: number,
): GeometricProduct {
  const one = 1n << BigInt(bits);
  const start = 1 + Math.hypot(numberFromFixed(z.re, bits), numberFromFixed(z.im, bits));
  let power = z;
  let product: FixedComplex = { re: one, im: 0n };
  let scale = 0;
  let argument = 0;
  let slope = 0;
  let relative = 0;
  let smallest = Number.POSITIVE_INFINITY;
  for (let j = 0; j < count; j++) {
    const factor = { re: one + power.re, im: power.im };
    const re = numberFromFixed(factor.re, bits);
    const im = numberFromFixed(factor.im, bits);
    const size = Math.hypot(re, im);
    smallest = Math.min(smallest, size);
    argument += Math.atan2(im, re);
    slope += Math.hypot(numberFromFixed(power.re, bits), im) / size;
    // z r^j errs by zError and by rError |z| and 2 more a step; the product, at least 1/4, by 6/size when multiplied, 4 when rescaled.
    relative += (zError + j * (rError * start + 2) + 6) / size + 4;
    product = multiplyComplex(product, factor, bits);
    const length = Math.max(bitLength(product.re), bitLength(product.im)) - bits;
    if (length > 2 || length < -1) {
      product = { re: shiftRounded(product.re, length), im: shiftRounded(product.im, length) };
      scale += length;
    }
    power = multiplyComplex(power, r, bits);
  }
  if (product.re === 0n && product.im === 0n) {
    return { log: product, error: Number.POSITIVE_INFINITY, slope: Number.POSITIVE_INFINITY, smallest: 0 };
  }
  const principal = logComplex(product, bits);
  const turns = Math.round((argument - numberFromFixed(principal.im, bits)) / (2 * Math.PI));
  const wide = bits + 44;
  const log = {
    re: principal.re + ((BigInt(scale) * ln2Fixed(wide)) >> 44n),
    im: principal.im + ((BigInt(2 * turns) * piFixed(wide)) >> 44n),
  };
  return { log, error: 2 * relative + 4, slope, smallest };
}
