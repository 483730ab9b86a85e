/**
 * Horizontal contours between the poles of g(t) = sin(2xt)/(2t sinh(bt) sinh(t/b)), t = i pi n b and i pi n/b, and the rigorous error
 * of both formulas of the double sine when the poles below such a contour are kept and those above are dropped.
 *
 * On Im t = a:  |sin(2xt)| <= cosh(2 (Re x a + Im x u)), |t| >= a and |sinh(b(u + ia))|^2 = sinh^2 bu + sin^2 ba, so with
 *   I(a) = Int_0^oo cosh(2 Im x u) du / sqrt[(sinh^2 bu + sin^2 ba)(sinh^2(u/b) + sin^2(a/b))]
 *   midpoint rule with residues:  error <= e^{2 |Re x| a} I(a) / (a (e^{2 pi a/h} - 1)),
 *   residues alone (Re x > 0):    error <= e^{-2 Re x a} I(a) / (2a).
 * No small divisor enters as long as a lies in a gap of both lattices, so that a nearly coincident pair is never split.
 * (The trapezoidal bound is the usual one for a strip: Trefethen and Weideman, SIAM Review 56 (2014) 385, theorem 5.1.)
 */
export interface ContourHeight {
  readonly height: number;
  /** Poles of the two lattices below the contour. */
  readonly belowSmall: number;
  readonly belowLarge: number;
  /** log2 of an upper bound of I(a) for |Im x| <= Q/4. */
  readonly log2Integral: number;
}

/** Heights follow each other in this ratio: an argument that needs fewer poles wastes at most a fifth; half the highest is one. */
const RATIO = 2 ** (-1 / 3);

/** Samples of one search window, which spans two mean distances of poles. */
const SAMPLES = 32;

/** Guard against the rounding of doubles in sines of a b. */
const SINE_SLACK = 1e-9;

/** Height in [from, from + 2 pi/Q] that is farthest from all poles in the sense of |sin ba sin(a/b)|. */
function gapAbove(from: number, small: number, large: number): number {
  const width = (2 * Math.PI) / (small + large);
  let best = from;
  let bestSize = -1;
  for (let i = 0; i < SAMPLES; i++) {
    const a = from + (width * (i + 0.5)) / SAMPLES;
    const size = Math.abs(Math.sin(a * small) * Math.sin(a * large));
    if (size > bestSize) {
      best = a;
      bestSize = size;
    }
  }
  return best;
}

/**
 * Upper bound of I(a) at |Im x| = Q/4: on each cell of a geometric grid the numerator is taken at the right end and the
 * denominator at the left end (both increase); the tail beyond 16/Q is below 4 e^{-Qu/2}(2/Q) / ((1 - e^{-2bu})(1 - e^{-2u/b})).
 */
function integralBound(a: number, small: number, large: number): number {
  const q = small + large;
  const sineSmall = Math.abs(Math.sin(a * small)) - SINE_SLACK;
  const sineLarge = Math.abs(Math.sin(a * large)) - SINE_SLACK;
  if (sineSmall <= 0 || sineLarge <= 0) return Number.POSITIVE_INFINITY;
  const end = 16 / q;
  let left = 0;
  let right = Math.min(0.1 * Math.min(sineSmall / small, sineLarge / large), end);
  let sum = 0;
  while (left < end) {
    const top = Math.cosh((q * right) / 2);
    const bottom = Math.hypot(Math.sinh(small * left), sineSmall) * Math.hypot(Math.sinh(large * left), sineLarge);
    sum += ((right - left) * top) / bottom;
    left = right;
    right = Math.min(right * 1.25, end);
    if (right === left) break;
  }
  const tail = ((8 / q) * Math.exp((-q * end) / 2)) / (-Math.expm1(-2 * small * end) * -Math.expm1(-2 * large * end));
  return (sum + tail) * 1.001;
}

/** Contours from the lowest (below every pole where possible) to one at least `highest` above the axis, in increasing order. */
export function contourHeights(highest: number, small: number, large: number): ContourHeight[] {
  const heights: ContourHeight[] = [];
  const firstPole = Math.PI * small;
  for (let from = highest; ; from *= RATIO) {
    const lowest = from < firstPole;
    // Below the first pole the middle of the gap is the only choice.
    const height = lowest ? firstPole / 2 : gapAbove(from, small, large);
    heights.push({
      height,
      belowSmall: Math.floor(height / (Math.PI * small)),
      belowLarge: Math.floor(height / (Math.PI * large)),
      log2Integral: Math.log2(integralBound(height, small, large)),
    });
    if (lowest) return heights.reverse();
  }
}

/** log2 of the error bound of the midpoint rule with step h and the residues below the contour. */
export function log2MidpointError(contour: ContourHeight, realPart: number, step: number): number {
  const { height, log2Integral } = contour;
  const exponent = (2 * Math.PI * height) / step;
  // log2(e^E - 1) >= E log2 e + log2(1 - e^-E).
  const log2Growth = exponent / Math.LN2 + Math.log2(-Math.expm1(-exponent));
  return (2 * Math.abs(realPart) * height) / Math.LN2 + log2Integral - Math.log2(height) - log2Growth;
}

/** log2 of the error bound of the residues below the contour alone, Re x > 0. */
export function log2ResidueError(contour: ContourHeight, realPart: number): number {
  return (-2 * realPart * contour.height) / Math.LN2 + contour.log2Integral - Math.log2(contour.height) - 1;
}
