import { numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import type { FixedComplex } from '../arithmetic/fixed-complex';
import { addComplex, expComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { sinCosFixed } from '../arithmetic/fixed-trig';
import type { DoubleSineFrame } from './double-sine-frame';
import { logGeometricProduct } from './double-sine-geometric';

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
 * in e^(-2w), so that one logarithm serves them all.
 */
export function shiftedLogarithm(
  frame: DoubleSineFrame,
  x: FixedComplex,
  useLarge: boolean,
  count: number,
): ShiftedLogarithm {
  const { precision: bits, constantBits, bits: outer } = frame;
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
  const first = expComplex(
    { re: -((x.re * piBeta) >> (wide - 1n)), im: turn - ((x.im * piBeta) >> (wide - 1n)) },
    bits,
  );
  const { sin, cos } = sinCosFixed(2n * turn, bits);
  // The exponential errs by 4 ulps and 3 of its argument, the rotation by 1 and 2.
  const product = logGeometricProduct(first, { re: cos, im: sin }, count, bits, 7, 4);
  const size = 1 + count + numberFromFixed(x.re, bits) + Math.abs(numberFromFixed(x.im, bits));
  // Constants carry 80 bits more than the precision; they meet count x and count^2.
  const constants = (size * betaApprox) ** 2 * 2 ** (bits - constantBits + 8);
  return {
    point,
    sum: addComplex(lead, product.log),
    error: (product.error + constants + 4) * 2 ** (outer - bits),
    // d log 2cosh(w)/dx = pi beta tanh w, |tanh w| <= 1 + 2 |e^(-2w)/(1 + e^(-2w))|.
    slope: Math.PI * betaApprox * (count + 2 * product.slope),
    smallest: product.smallest,
  };
}
