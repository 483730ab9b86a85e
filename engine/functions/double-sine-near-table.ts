import { shiftRounded } from '../arithmetic/fixed';
import { piFixed } from '../arithmetic/fixed-constants';
import { expFixed, expScaled } from '../arithmetic/fixed-exp';
import type { DoubleSineFrame } from './double-sine-frame';
import type { ContourHeight } from './double-sine-heights';
import { log2MidpointError } from './double-sine-heights';
import type { DoublePoleSeries, LatticeOfPoles, ScaledSeries } from './double-sine-series';
import { alternatingCosecants, buildingBits, latticesBelow, log2LargestOf, twoPiTimes } from './double-sine-series';

/**
 * Tables of log s_b(x) = -i { sum_{k>=0} w_k sin((2k+1) x h) - pi^2 x/(2h) + R_b(x) + R_{1/b}(x) + D(x) } for |Re x| <= reach:
 *   w_k = h/(2 t_k sinh(b t_k) sinh(t_k/b)), t_k = (k + 1/2) h,
 *   R_beta(x) = sum_n (-1)^n sinh(2 pi n beta x) phi(pi n beta) / (n sin(pi n beta^2)), phi(y) = 1/(1 + e^(2 pi y/h)),
 * the midpoint rule with the residues of the nearest poles; for b^2 = p/q the double poles y_k = pi k sqrt(pq) are left out of R and add
 *   D(x) = sum_k sigma_k (pi/y_k) { 2x cosh(2 x y_k) phi + sinh(2 x y_k) (phi' - phi/y_k) }, sigma_k = (-1)^(k(p+q)).
 * Method: Turing 1945; Matta and Reichel, Math. Comp. 25 (1971) 339; Trefethen and Weideman, SIAM Review 56 (2014) 385.
 */
export interface NearTable {
  readonly reach: number;
  /** h, dyadic: weights, phases and the linear term must belong to the same h exactly. */
  readonly step: number;
  /** Index of the highest contour for which poles are tabulated. */
  readonly contour: number;
  /** w_k e^(sigma k). */
  readonly weights: readonly bigint[];
  /** e^-sigma. */
  readonly damping: bigint;
  /** 1/(1 - rho)^2, rho the largest |z| in the sum over nodes. */
  readonly gain: number;
  readonly poles: readonly [ScaledSeries, ScaledSeries];
  readonly doublePoles: DoublePoleSeries | null;
  /** pi^2/(2h) with the frame's constantBits. */
  readonly linear: bigint;
  /** At least log2 of every coefficient, and at least 0. */
  readonly log2Largest: number;
}

/** h next to the wished value, with 40 significant bits. */
function dyadicNear(wished: number): number {
  const unit = 2 ** (Math.floor(Math.log2(wished)) - 40);
  return Math.round(wished / unit) * unit;
}

/** A double of at most 44 significant bits as a fixed point number, exact for sizes above 2^-50 and bits >= 100. */
export function fixedFromDyadic(x: number, bits: number): bigint {
  const up = 44 - Math.floor(Math.log2(x));
  return shiftRounded(BigInt(x * 2 ** up), up - bits);
}

/**
 * Nodes needed where terms fall by e^(-rate h): w_k <= 4 K e^(-Q t_k) with K = 1/((1 - e^-bh)(1 - e^-h/b)), and the geometric tail
 * adds a factor below 1/(1 - e^(-rate h)). What is dropped is below e^-length.
 */
export function nodeCount(frame: DoubleSineFrame, step: number, rate: number): number {
  const { smallApprox, largeApprox, length } = frame;
  const k = 1 / (Math.expm1(-smallApprox * step) * Math.expm1(-largeApprox * step));
  const tail = -Math.expm1(-rate * step);
  return Math.max(1, Math.ceil((length + Math.log((4 * k) / tail)) / (rate * step) - 0.5));
}

/** Weights by recurrences from e^(-bh), e^(-h/b): no exponential per node. */
function nodeWeights(frame: DoubleSineFrame, step: number, damping: bigint): bigint[] {
  const bits = buildingBits(frame);
  const shift = BigInt(bits);
  const one = 1n << shift;
  const h = fixedFromDyadic(step, bits);
  const decayOf = (period: bigint, halves: number) =>
    expFixed(-((h * period) >> BigInt(frame.constantBits + halves)), bits);
  let a = decayOf(frame.small, 0);
  let c = decayOf(frame.large, 0);
  // e^(-Q t_k + sigma k) starts at e^(-Qh/2) and goes on by e^(-Qh + sigma).
  let g = decayOf(frame.small + frame.large, 1);
  const ratio = (((a * c) >> shift) << BigInt(frame.precision)) / damping;
  const a2 = (a * a) >> shift;
  const c2 = (c * c) >> shift;
  const weights: bigint[] = [];
  for (let k = nodeCount(frame, step, frame.q / 2), odd = 1n; k > 0; k--, odd += 2n) {
    const bottom = (((one - a) * (one - c)) >> shift) * odd;
    weights.push((g << BigInt(frame.precision + 2)) / bottom);
    a = (a * a2) >> shift;
    c = (c * c2) >> shift;
    g = (g * ratio) >> shift;
  }
  return weights;
}

/** e^(-2 pi y_1/h) 2^scale < 1 with buildingBits, y_1 = factor/2 the first pole of a lattice. */
function firstDecay(frame: DoubleSineFrame, factor: bigint, step: number, scale: number): bigint {
  const bits = buildingBits(frame);
  const wide = bits + 64;
  const overStep = (piFixed(wide) << BigInt(bits)) / fixedFromDyadic(step, bits);
  const exponent = (overStep * factor) >> BigInt(wide + frame.constantBits - bits);
  const decay = expScaled(-exponent, bits);
  return shiftRounded(decay.mantissa, -decay.exponent - scale);
}

/** |e^theta| <= 2^(scale - 1) up to |Re x| = reach. */
function scaleFor(period: number, reach: number): number {
  return Math.ceil((2 * Math.PI * period * reach) / Math.LN2) + 1;
}

/** Coefficients of R_beta as a series in e^(2 pi beta x): the sinh is the difference of the series at theta and -theta, halved. */
function nearSeries(frame: DoubleSineFrame, lattice: LatticeOfPoles, step: number, reach: number): ScaledSeries {
  const bits = buildingBits(frame);
  const shift = BigInt(bits);
  const factor = twoPiTimes(frame, lattice.period);
  const scale = scaleFor(lattice.approx, reach);
  const first = firstDecay(frame, factor, step, scale);
  const cut = BigInt(bits - frame.precision);
  const coefficients = [0n];
  // v = e^(-2 pi y_n/h) 2^(scale n), u without the scale; phi = u/(1 + u).
  let v = first;
  alternatingCosecants(frame, lattice).forEach((cosecant, i) => {
    const u = v >> BigInt(scale * (i + 1));
    coefficients.push(cosecant === null ? 0n : (v * cosecant) / (((1n << shift) + u) << cut));
    v = (v * first) >> shift;
  });
  return { coefficients, scale, factor };
}

/** sigma_k (pi/y_k) phi, which belongs to x (e^theta + e^-theta), and sigma_k (pi/(2 y_k)) (phi' - phi/y_k), to e^theta - e^-theta. */
function nearDoublePoles(frame: DoubleSineFrame, count: number, step: number, reach: number): DoublePoleSeries | null {
  if (frame.resonance === null || count === 0) return null;
  const { p, q } = frame.resonance;
  const bits = buildingBits(frame);
  const shift = BigInt(bits);
  const one = 1n << shift;
  const cut = BigInt(bits - frame.precision);
  const pi = piFixed(bits);
  // sqrt(pq) = q small.
  const factor = twoPiTimes(frame, frame.small * BigInt(q));
  const scale = scaleFor(q * frame.smallApprox, reach);
  const first = firstDecay(frame, factor, step, scale);
  const twoPiOverStep = (pi << BigInt(bits + 1)) / fixedFromDyadic(step, bits);
  const timesX = [0n];
  const plain = [0n];
  let v = first;
  for (let k = 1; k <= count; k++) {
    const u = v >> BigInt(scale * k);
    const y = (factor * BigInt(k)) >> BigInt(frame.constantBits - bits + 1);
    const phi = (v << shift) / (one + u);
    const lead = (pi * phi) / y;
    // phi' = -(2 pi/h) phi (1 - phi) and 1 - phi = 1/(1 + u).
    const slope = (twoPiOverStep << shift) / (one + u) + (one << shift) / y;
    const sign = (k * (p + q)) % 2 === 0 ? 1n : -1n;
    timesX.push((sign * lead) >> cut);
    plain.push((-sign * lead * slope) >> (cut + shift + 1n));
    v = (v * first) >> shift;
  }
  return { timesX: { coefficients: timesX, scale, factor }, plain: { coefficients: plain, scale, factor } };
}

/**
 * Table for |Re x| <= reach with 2 pi/h = Q/stretch + 2 reach: stretch = 1 balances nodes and poles for reach = Q/4. The poles needed are
 * those below stretch length/Q, so stretch <= 2 stays within the frame's contours.
 */
export function buildNearTable(frame: DoubleSineFrame, reach: number, stretch: number): NearTable {
  const { q, bits, precision, contours } = frame;
  const step = dyadicNear((2 * Math.PI) / (q / stretch + 2 * reach));
  const sufficient = contours.findIndex((c) => log2MidpointError(c, reach, step) <= -bits - 10);
  const contour = sufficient < 0 ? contours.length - 1 : sufficient;
  const highest = contours[contour] as ContourHeight;
  // A power of two damps exactly; for small steps the weights fall too slowly for it, and e^(-3Qh/4) leaves |z| <= e^(-Qh/4).
  const binary = Math.ceil((q * step) / (2 * Math.LN2)) + 1;
  const byPower = binary * Math.LN2 < 0.75 * q * step;
  const sigma = byPower ? binary * Math.LN2 : dyadicNear(0.75 * q * step);
  const damping = byPower ? 1n << BigInt(precision - binary) : expFixed(-fixedFromDyadic(sigma, precision), precision);
  const rho = Math.exp((q * step) / 2 - sigma);
  const weights = nodeWeights(frame, step, damping);
  const [low, high] = latticesBelow(frame, highest);
  const poles = [nearSeries(frame, low, step, reach), nearSeries(frame, high, step, reach)] as const;
  const doubles = frame.resonance === null ? 0 : Math.floor(highest.belowSmall / frame.resonance.q);
  const doublePoles = nearDoublePoles(frame, doubles, step, reach);
  const lists = [weights, poles[0].coefficients, poles[1].coefficients];
  if (doublePoles !== null) lists.push(doublePoles.timesX.coefficients, doublePoles.plain.coefficients);
  const wide = frame.constantBits;
  const pi = piFixed(wide);
  return {
    reach,
    step,
    contour,
    weights,
    damping,
    gain: 1 / (1 - rho) ** 2,
    poles,
    doublePoles,
    linear: (pi * pi) / (fixedFromDyadic(step, wide) << 1n),
    log2Largest: log2LargestOf(frame, lists),
  };
}
