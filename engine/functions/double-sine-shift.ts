import { bitLength, numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import type { FixedComplex } from '../arithmetic/fixed-complex';
import { expComplex, logComplex, multiplyComplex } from '../arithmetic/fixed-complex';
import { ln2Fixed, piFixed } from '../arithmetic/fixed-constants';
import { sinCosFixed } from '../arithmetic/fixed-trig';
import type { DoubleSineFrame } from './double-sine-frame';

/** sum of log 2cosh(pi beta (x - i sigma beta (j + 1/2))), j < count, sigma = sign of Im x; and the point reached. */
export interface ShiftedLogarithm {
  /** x - i sigma beta count, with the frame's precision. */
  readonly point: FixedComplex;
  readonly sum: FixedComplex;
  /** Rounding, in ulps of the frame's bits. */
  readonly error: number;
  /** Bound of the derivative of the sum with respect to x. */
  readonly slope: number;
  /** The smallest |1 + e^(-2w)| met. */
  readonly smallest: number;
}

/**
 * log s_b(x) = log s_b(x - i sigma beta count) - sigma sum: the functional equation `count` times, for Re x >= 0. There
 * log 2cosh w = w + log(1 + e^(-2w)) with the principal logarithm is the analytic one; the factors 1 + e^(-2w_j) form a geometric sequence
 * in e^(-2w), so they are multiplied up and ONE logarithm is taken. The branch follows from the sum of the arguments, which is
 * known to 2^-40 from doubles.
 */
export function shiftedLogarithm(
  frame: DoubleSineFrame,
  x: FixedComplex,
  useLarge: boolean,
  count: number,
): ShiftedLogarithm {
  const { precision: bits, constantBits, bits: outer } = frame;
  const shift = BigInt(bits);
  const wide = BigInt(constantBits);
  const beta = useLarge ? frame.large : frame.small;
  const betaApprox = useLarge ? frame.largeApprox : frame.smallApprox;
  const upwards = x.im >= 0n;
  const k = BigInt(count);
  const travelled = shiftRounded(beta * k, constantBits - bits);
  const point = { re: x.re, im: upwards ? x.im - travelled : x.im + travelled };
  // sum of w_j = pi beta (count x - i sigma beta count^2/2).
  const piBeta = (piFixed(constantBits) * beta) >> wide;
  const middle = (beta * k * k) >> BigInt(constantBits - bits + 1);
  const whole = { re: x.re * k, im: upwards ? x.im * k - middle : x.im * k + middle };
  const lead = { re: (whole.re * piBeta) >> wide, im: (whole.im * piBeta) >> wide };
  // e^(-2w_0) = e^(-2 pi beta x) e^(i sigma pi beta^2), then times e^(2 i sigma pi beta^2) a step.
  const turn = ((piBeta * beta) >> BigInt(2 * constantBits - bits)) * (upwards ? 1n : -1n);
  const exponent = {
    re: -((x.re * piBeta) >> (wide - 1n)),
    im: turn - ((x.im * piBeta) >> (wide - 1n)),
  };
  let power = expComplex(exponent, bits);
  const { sin, cos } = sinCosFixed(2n * turn, bits);
  const ratio = { re: cos, im: sin };
  const one = 1n << shift;
  let product: FixedComplex = { re: one, im: 0n };
  let scale = 0;
  let argument = 0;
  let slope = 0;
  let relative = 0;
  let smallest = 2;
  for (let j = 0; j < count; j++) {
    const factor = { re: one + power.re, im: power.im };
    const re = numberFromFixed(factor.re, bits);
    const im = numberFromFixed(factor.im, bits);
    const size = Math.hypot(re, im);
    smallest = Math.min(smallest, size);
    argument += Math.atan2(im, re);
    slope += 2 / size;
    // power_j errs by 6 + 4 j ulps (exponential 6, rotation 4 a step); the product, at least 1/4, by 6/size more, and 4 when rescaled.
    relative += (14 + 4 * j) / size + 4;
    product = multiplyComplex(product, factor, bits);
    const length = Math.max(bitLength(product.re), bitLength(product.im)) - bits;
    if (length > 2 || length < -1) {
      product = { re: shiftRounded(product.re, length), im: shiftRounded(product.im, length) };
      scale += length;
    }
    power = multiplyComplex(power, ratio, bits);
  }
  if (product.re === 0n && product.im === 0n) {
    return { point, sum: lead, error: Number.POSITIVE_INFINITY, slope: Number.POSITIVE_INFINITY, smallest: 0 };
  }
  const principal = logComplex(product, bits);
  const turns = Math.round((argument - numberFromFixed(principal.im, bits)) / (2 * Math.PI));
  const sum = {
    re: lead.re + principal.re + ((BigInt(scale) * ln2Fixed(constantBits)) >> BigInt(constantBits - bits)),
    im: lead.im + principal.im + ((BigInt(2 * turns) * piFixed(constantBits)) >> BigInt(constantBits - bits)),
  };
  const ulps = 2 ** (outer - bits);
  // Constants carry 80 bits more than the precision; they meet count x and count^2.
  const constants =
    (1 + count + numberFromFixed(x.re, bits) + Math.abs(numberFromFixed(x.im, bits))) ** 2 * betaApprox ** 2;
  return {
    point,
    sum,
    error: 2 * relative * ulps + (16 + constants * 2 ** (bits - constantBits + 8)) * ulps,
    slope: slope * Math.PI * betaApprox,
    smallest,
  };
}
