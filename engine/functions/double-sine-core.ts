import { shiftRounded } from '../arithmetic/fixed';
import type { FixedComplex } from '../arithmetic/fixed-complex';
import { multiplyComplex, squareComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { expScaled } from '../arithmetic/fixed-exp';
import { powerSum } from '../arithmetic/fixed-series';
import { sinCosFixed } from '../arithmetic/fixed-trig';
import type { FarTable } from './double-sine-far-table';
import type { DoubleSineFrame } from './double-sine-frame';
import type { ContourHeight } from './double-sine-heights';
import { log2MidpointError, log2ResidueError } from './double-sine-heights';
import type { NearTable } from './double-sine-near-table';
import { fixedFromDyadic, nodeCount } from './double-sine-near-table';
import type { ScaledSeries } from './double-sine-series';

/** log s_b(x) inside the strip, with the frame's precision, and the error of the method in ulps of the frame's bits. */
export interface CoreValue {
  readonly value: FixedComplex;
  readonly error: number;
}

/** e^theta = up 2^exponent, e^-theta = down 2^-exponent. */
interface BothWays {
  readonly up: FixedComplex;
  readonly down: FixedComplex;
  readonly exponent: number;
}

function expBothWays(theta: FixedComplex, bits: number): BothWays {
  const shift = BigInt(bits);
  const one = 1n << shift;
  const { mantissa, exponent } = theta.re === 0n ? { mantissa: one, exponent: 0 } : expScaled(theta.re, bits);
  const inverse = theta.re === 0n ? one : (one << shift) / mantissa;
  if (theta.im === 0n) return { up: { re: mantissa, im: 0n }, down: { re: inverse, im: 0n }, exponent };
  const { sin, cos } = sinCosFixed(theta.im, bits);
  return {
    up: { re: (mantissa * cos) >> shift, im: (mantissa * sin) >> shift },
    down: { re: (inverse * cos) >> shift, im: -((inverse * sin) >> shift) },
    exponent,
  };
}

function shiftComplex(z: FixedComplex, drop: number): FixedComplex {
  return { re: shiftRounded(z.re, drop), im: shiftRounded(z.im, drop) };
}

/** theta = factor x. */
function phase(frame: DoubleSineFrame, factor: bigint, x: FixedComplex): FixedComplex {
  const shift = BigInt(frame.constantBits);
  return { re: (factor * x.re) >> shift, im: (factor * x.im) >> shift };
}

/**
 * Rounding in ulps of 2^-precision: every sum errs by at most gain (4 + 47 A gain) with coefficients up to A (argument of the
 * exponential 1, its value 4, z and |z|^2 up to 41 together, powerSum 3 + 6 A gain), gain = 1/(1 - |z|)^2 <= 4 over poles;
 * about ten sums, two of them times x.
 * Constants with constantBits meet x at most squared.
 */
function roundingBound(frame: DoubleSineFrame, log2Largest: number, gain: number, size: number): number {
  // 2^12 2^log2Largest >= 2048 (1 + A).
  const inside = 2 ** (12 + log2Largest + frame.bits - frame.precision) * (2 + size + gain * gain);
  const constants = (1 + size) ** 2 * 2 ** (frame.bits - frame.constantBits + 4);
  return inside + constants;
}

/** Lowest contour whose error is 2^-10 ulp, among those tabulated; and the error in ulps of the one taken. */
function chooseContour(
  frame: DoubleSineFrame,
  last: number,
  log2Error: (contour: ContourHeight) => number,
): { contour: ContourHeight; error: number } {
  for (let i = 0; ; i++) {
    const contour = frame.contours[i] as ContourHeight;
    const below = log2Error(contour) + frame.bits;
    if (below <= -10 || i === last) return { contour, error: 2 ** below };
  }
}

/** sum_k w_k sin((2k+1) x h) = [e^(ixh) P(e^(2ixh)) - e^(-ixh) P(e^(-2ixh))]/(2i), P(z) = sum_k w_k z^k. */
function nodeSum(frame: DoubleSineFrame, table: NearTable, x: FixedComplex, imaginary: number): FixedComplex {
  const bits = frame.precision;
  const shift = BigInt(bits);
  const h = fixedFromDyadic(table.step, bits);
  const both = expBothWays({ re: (-x.im * h) >> shift, im: (x.re * h) >> shift }, bits);
  const half = (turn: FixedComplex, rate: number): FixedComplex => {
    const square = squareComplex(turn, bits);
    const z = { re: (square.re * table.damping) >> shift, im: (square.im * table.damping) >> shift };
    const count = Math.min(table.weights.length, nodeCount(frame, table.step, rate));
    return multiplyComplex(turn, powerSum(table.weights, count, z, bits), bits);
  };
  const up = half(shiftComplex(both.up, -both.exponent), frame.q + 2 * imaginary);
  // On the real axis the second half is the conjugate of the first.
  const down =
    x.im === 0n ? { re: up.re, im: -up.im } : half(shiftComplex(both.down, both.exponent), frame.q - 2 * imaginary);
  return { re: (up.im - down.im) >> 1n, im: (down.re - up.re) >> 1n };
}

/** P(e^theta) and P(e^-theta) for |Re x| within reach; the second needs `short` terms only. */
function seriesBothWays(
  series: ScaledSeries,
  both: BothWays,
  count: number,
  short: number,
  bits: number,
): { up: FixedComplex; down: FixedComplex } {
  const available = Math.min(count, series.coefficients.length);
  const up = powerSum(series.coefficients, available, shiftComplex(both.up, series.scale - both.exponent), bits);
  // |e^theta| = 1 on the imaginary axis: conjugate again.
  if (both.exponent === 0 && both.up.re === both.down.re && both.up.im === -both.down.im) {
    return { up, down: { re: up.re, im: -up.im } };
  }
  const z = shiftComplex(both.down, series.scale + both.exponent);
  return { up, down: powerSum(series.coefficients, Math.min(available, short), z, bits) };
}

/** Midpoint rule with residues, |Re x| <= reach and |Im x| <= Q/4 (up to rounding), Re x >= 0. */
export function nearLogarithm(
  frame: DoubleSineFrame,
  table: NearTable,
  x: FixedComplex,
  approx: { re: number; im: number },
): CoreValue {
  const bits = frame.precision;
  const { contour, error } = chooseContour(frame, table.contour, (c) => log2MidpointError(c, approx.re, table.step));
  const nodes = nodeSum(frame, table, x, approx.im);
  const lead = phase(frame, table.linear, x);
  let re = nodes.re - lead.re;
  let im = nodes.im - lead.im;
  const counts = [contour.belowSmall + 1, contour.belowLarge + 1];
  table.poles.forEach((series, i) => {
    if (series.coefficients.length < 2 || (counts[i] as number) < 2) return;
    const both = expBothWays(phase(frame, series.factor, x), bits);
    const short = decayingCount(frame, table, i === 0 ? frame.smallApprox : frame.largeApprox, approx.re);
    const { up, down } = seriesBothWays(series, both, counts[i] as number, short, bits);
    re += (up.re - down.re) >> 1n;
    im += (up.im - down.im) >> 1n;
  });
  if (table.doublePoles !== null && frame.resonance !== null) {
    const { timesX, plain } = table.doublePoles;
    const { q } = frame.resonance;
    const count = Math.floor(contour.belowSmall / q) + 1;
    const both = expBothWays(phase(frame, timesX.factor, x), bits);
    const short = decayingCount(frame, table, q * frame.smallApprox, approx.re);
    const even = seriesBothWays(timesX, both, count, short, bits);
    const odd = seriesBothWays(plain, both, count, short, bits);
    const product = multiplyComplex(x, { re: even.up.re + even.down.re, im: even.up.im + even.down.im }, bits);
    re += product.re + odd.up.re - odd.down.re;
    im += product.im + odd.up.im - odd.down.im;
  }
  const size = Math.hypot(approx.re, approx.im);
  // The two node sums and the shortened pole sums each drop less than 2^-11 ulp.
  const dropped = 2 ** -8;
  const rounding = roundingBound(frame, table.log2Largest, table.gain, size);
  return { value: { re: im, im: -re }, error: error + dropped + rounding };
}

/**
 * Terms of a pole series at e^-theta: all coefficients are below C e^(-2 pi y_n/h) with C = max(2^guard, 2 + 2 pi/h) (1 + Q), so the tail
 * falls by kappa = 2 pi y_1/h + 2 y_1 Re x > 4 a term.
 */
function decayingCount(frame: DoubleSineFrame, table: NearTable, period: number, real: number): number {
  const first = Math.PI * period;
  const kappa = (2 * Math.PI * first) / table.step + 2 * first * real;
  const constant = Math.log((2 ** frame.guard + 2 + (2 * Math.PI) / table.step) * (2 + frame.q));
  return Math.ceil((frame.length + constant) / kappa) + 1;
}

/** Residues alone, Re x >= Q/4 and |Im x| <= Q/4 (up to rounding). */
export function farLogarithm(
  frame: DoubleSineFrame,
  table: FarTable,
  x: FixedComplex,
  approx: { re: number; im: number },
): CoreValue {
  const bits = frame.precision;
  const { contour, error } = chooseContour(frame, table.contour, (c) => log2ResidueError(c, approx.re));
  const counts = [contour.belowSmall + 1, contour.belowLarge + 1];
  // (pi/2)(x^2 + constant), x^2 exact with 2 precision bits.
  const constant = shiftRounded(table.constant, frame.constantBits - 2 * bits);
  const half = piFixed(frame.constantBits);
  const drop = BigInt(frame.constantBits + bits + 1);
  let re = ((x.re * x.re - x.im * x.im + constant) * half) >> drop;
  let im = (2n * x.re * x.im * half) >> drop;
  const at = (series: ScaledSeries, count: number): FixedComplex => {
    const theta = phase(frame, series.factor, x);
    const both = expBothWays({ re: -theta.re, im: -theta.im }, bits);
    const z = shiftComplex(both.up, series.scale - both.exponent);
    return powerSum(series.coefficients, Math.min(count, series.coefficients.length), z, bits);
  };
  table.poles.forEach((series, i) => {
    if (series.coefficients.length < 2 || (counts[i] as number) < 2) return;
    const sum = at(series, counts[i] as number);
    re += sum.re;
    im += sum.im;
  });
  if (table.doublePoles !== null && frame.resonance !== null) {
    const count = Math.floor(contour.belowSmall / frame.resonance.q) + 1;
    if (count > 1) {
      const product = multiplyComplex(x, at(table.doublePoles.timesX, count), bits);
      const plain = at(table.doublePoles.plain, count);
      re += product.re + plain.re;
      im += product.im + plain.im;
    }
  }
  const size = Math.hypot(approx.re, approx.im);
  return { value: { re: -im, im: re }, error: error + roundingBound(frame, table.log2Largest, 4, size) };
}
