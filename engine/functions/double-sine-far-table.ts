import { piFixed } from '../arithmetic/fixed-constants';
import type { DoubleSineFrame } from './double-sine-frame';
import type { ContourHeight } from './double-sine-heights';
import { log2ResidueError } from './double-sine-heights';
import type { DoublePoleSeries, LatticeOfPoles, ScaledSeries } from './double-sine-series';
import { alternatingCosecants, buildingBits, latticesBelow, log2LargestOf, twoPiTimes } from './double-sine-series';

/**
 * Tables of the residues alone, for Re x >= reach:
 *   log s_b(x) = i { (pi/2)(x^2 + (b^2 + b^-2)/12) + sum_beta sum_n (-1)^n e^(-2 pi n beta x)/(2 n sin(pi n beta^2)) },
 * where for b^2 = p/q the double poles y_k = pi k sqrt(pq) give instead - sum_k sigma_k (pi/2) e^(-2 x y_k) (2x/y_k + 1/y_k^2).
 * Series run in e^(-theta).
 */
export interface FarTable {
  readonly reach: number;
  /** Index of the highest contour for which poles are tabulated. */
  readonly contour: number;
  readonly poles: readonly [ScaledSeries, ScaledSeries];
  readonly doublePoles: DoublePoleSeries | null;
  /** (b^2 + b^-2)/12 with the frame's constantBits. */
  readonly constant: bigint;
  /** At least log2 of every coefficient, and at least 0. */
  readonly log2Largest: number;
}

/** Negative: coefficients are scaled down as far as |z| = e^(-2 pi beta Re x) 2^-scale <= 1/2 allows. */
function scaleFor(period: number, reach: number): number {
  return 1 - Math.floor((2 * Math.PI * period * reach) / Math.LN2);
}

function farSeries(frame: DoubleSineFrame, lattice: LatticeOfPoles, reach: number): ScaledSeries {
  const scale = scaleFor(lattice.approx, reach);
  const cut = buildingBits(frame) - frame.precision + 1;
  const coefficients = [0n];
  alternatingCosecants(frame, lattice).forEach((cosecant, i) => {
    coefficients.push(cosecant === null ? 0n : cosecant >> BigInt(cut - scale * (i + 1)));
  });
  return { coefficients, scale, factor: twoPiTimes(frame, lattice.period) };
}

/** - sigma_k pi/y_k and - sigma_k pi/(2 y_k^2). */
function farDoublePoles(frame: DoubleSineFrame, count: number, reach: number): DoublePoleSeries | null {
  if (frame.resonance === null || count === 0) return null;
  const { p, q } = frame.resonance;
  const bits = buildingBits(frame);
  const factor = twoPiTimes(frame, frame.small * BigInt(q));
  const scale = scaleFor(q * frame.smallApprox, reach);
  const pi = piFixed(bits);
  const timesX = [0n];
  const plain = [0n];
  for (let k = 1; k <= count; k++) {
    const y = (factor * BigInt(k)) >> BigInt(frame.constantBits - bits + 1);
    const sign = (k * (p + q)) % 2 === 0 ? -1n : 1n;
    const lead = ((sign * pi) << BigInt(bits)) / y;
    const cut = BigInt(bits - frame.precision - scale * k);
    timesX.push(lead >> cut);
    plain.push(((lead << BigInt(bits - 1)) / y) >> cut);
  }
  return { timesX: { coefficients: timesX, scale, factor }, plain: { coefficients: plain, scale, factor } };
}

export function buildFarTable(frame: DoubleSineFrame, reach: number): FarTable {
  const { bits, constantBits, contours, small, large } = frame;
  const sufficient = contours.findIndex((c) => log2ResidueError(c, reach) <= -bits - 10);
  const contour = sufficient < 0 ? contours.length - 1 : sufficient;
  const highest = contours[contour] as ContourHeight;
  const [low, high] = latticesBelow(frame, highest);
  const poles = [farSeries(frame, low, reach), farSeries(frame, high, reach)] as const;
  const doubles = frame.resonance === null ? 0 : Math.floor(highest.belowSmall / frame.resonance.q);
  const doublePoles = farDoublePoles(frame, doubles, reach);
  const lists = [poles[0].coefficients, poles[1].coefficients];
  if (doublePoles !== null) lists.push(doublePoles.timesX.coefficients, doublePoles.plain.coefficients);
  return {
    reach,
    contour,
    poles,
    doublePoles,
    constant: ((small * small + large * large) >> BigInt(constantBits)) / 12n,
    log2Largest: log2LargestOf(frame, lists),
  };
}
