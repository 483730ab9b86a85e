/**
 * Tables for log s_b in doubles: everything that depends on b alone.
 *
 * Two formulas share them, both with the poles of g(t) = 1/(2 t sinh(b t) sinh(t/b)) at t = i pi n b and i pi n / b.
 * Near (|Re x| <= reach, |Im x| <= Q/4): the midpoint rule with step h, corrected by the residues of the nearest poles,
 *   log s_b(x) = -i { sum_k w_k sin((2k+1) x h) - pi^2 x/(2h) + R_b(x) + R_{1/b}(x) },
 *   w_k = h/(2 t_k sinh(b t_k) sinh(t_k/b)), t_k = (k + 1/2) h,
 *   R_beta(x) = sum_n (-1)^n sinh(2 pi n beta x) phi(pi n beta) / (n sin(pi n beta^2)), phi(y) = 1/(1 + e^{2 pi y/h}).
 * Far (Re x >= reach, any Im x): the residues alone,
 *   log s_b(x) = i { (pi/2)(x^2 + (b^2 + b^-2)/12) + sum_{beta = b, 1/b} sum_n (-1)^n e^{-2 pi n beta x}/(2 n sin(pi n beta^2)) }.
 * Poles of the two lattices that nearly or exactly coincide (b^2 near a rational number) have small sines; such a pair is
 * kept together in a form without the small denominator.
 *
 * Source of the correction by residues: Turing 1945; Matta and Reichel, Math. Comp. 25 (1971) 339; review Trefethen and
 * Weideman, SIAM Review 56 (2014) 385. The pair form is elementary algebra on top of it.
 */
export interface DoubleSineTables {
  /** The smaller period, at most 1. */
  readonly small: number;
  /** The larger period, 1/small. */
  readonly large: number;
  /** small + large. */
  readonly q: number;
  /** Largest |Re x| of the near formula, Q/4. */
  readonly reach: number;
  readonly step: number;
  /** pi^2/(2h). */
  readonly linear: number;
  /** (b^2 + b^-2)/12. */
  readonly constant: number;
  /** w_k. */
  readonly weights: Float64Array;
  readonly near: PoleTables;
  readonly far: PoleTables;
}

/** Residue sums over the poles with y <= height. Index 0 of the coefficient arrays is n = 1. */
export interface PoleTables {
  /** Coefficients of the unpaired poles i pi n small; zero where n is in a pair. */
  readonly small: Float64Array;
  /** The same for i pi n large. */
  readonly large: Float64Array;
  readonly pairs: PairTables;
  /** Largest n and m in a pair (0 without pairs). */
  readonly deepestSmall: number;
  readonly deepestLarge: number;
}

/**
 * Pairs y1 = pi n small, y2 = pi m large, Delta = y1 - y2, in the order of n. A pair adds
 *   near: first x cosh(x (y1 + y2)) sinhc(x Delta) + second sinh(2 x y2),
 *   far:  first x e^{-x (y1 + y2)} sinhc(x Delta) + second e^{-2 x y2}.
 */
export interface PairTables {
  readonly n: Int32Array;
  readonly m: Int32Array;
  readonly delta: Float64Array;
  readonly first: Float64Array;
  readonly second: Float64Array;
}

/** log(1/eps) with a margin of 3: what is left out is below e^-40. */
const DEPTH = 40;

/** Poles closer than this, as |Delta/small|, are paired; beyond it the larger denominator exceeds sin(0.5). */
const PAIR_WIDTH = 0.5;

/** Builds the tables for s_b with real b > 0. Throws RangeError otherwise. */
export function doubleSineTables(b: number): DoubleSineTables {
  if (!(b > 0) || !Number.isFinite(b)) throw new RangeError('The double sine in doubles needs b > 0.');
  const small = b <= 1 ? b : 1 / b;
  const large = b <= 1 ? 1 / b : b;
  const q = small + large;
  const reach = q / 4;
  const rate = q + 2 * reach;
  const step = (2 * Math.PI) / rate;
  const count = Math.ceil(DEPTH / ((q / 2) * step));
  const weights = new Float64Array(count);
  for (let k = 0; k < count; k++) {
    const t = (k + 0.5) * step;
    weights[k] = (4 / (2 * k + 1)) * (Math.exp(-q * t) / (Math.expm1(-2 * small * t) * Math.expm1(-2 * large * t)));
  }
  const periods = { small, large, squareExcess: squareExcess(b) };
  return {
    small,
    large,
    q,
    reach,
    step,
    linear: (Math.PI / 4) * rate,
    constant: (small * small + large * large) / 12,
    weights,
    near: poleTables(periods, DEPTH / q, nearCoefficients(rate)),
    far: poleTables(periods, DEPTH / (2 * reach), FAR_COEFFICIENTS),
  };
}

/** How a formula weighs a pole of one lattice and a pair; see `PairTables`. */
interface Coefficients {
  /** Coefficient of (-1)^n/(n sin(pi n beta^2)) at y. */
  readonly single: (y: number) => number;
  /** The two coefficients of a pair; s1 = sinc(small Delta), bracket as in `bracket`. */
  readonly pair: (y1: number, y2: number, delta: number, s1: number, bracket: number) => readonly [number, number];
}

const FAR_COEFFICIENTS: Coefficients = {
  single: () => 0.5,
  pair: (y1, y2, _delta, s1, bracket) => [-Math.PI / (y1 * s1), (Math.PI / 2) * (bracket / y2 - 1 / (y1 * y2 * s1))],
};

function nearCoefficients(rate: number): Coefficients {
  const phi = (y: number): number => 1 / (1 + Math.exp(rate * y));
  return {
    single: phi,
    pair: (y1, y2, delta, s1, bracket) => {
      const slope = -phi(y1) * (1 - phi(y2)) * rate * expm1c(rate * delta);
      const second = (slope / y1 - phi(y2) / (y1 * y2)) / s1 + (phi(y2) / y2) * bracket;
      return [(2 * Math.PI * phi(y1)) / (y1 * s1), Math.PI * second];
    },
  };
}

interface Periods {
  readonly small: number;
  readonly large: number;
  /** small^2 - fl(small * small), for the exact distance of n small^2 from an integer. */
  readonly squareExcess: number;
}

function poleTables(periods: Periods, height: number, coefficients: Coefficients): PoleTables {
  const { small, large } = periods;
  const square = small * small;
  const ofSmall = new Float64Array(Math.floor(height / (Math.PI * small)));
  const ofLarge = new Float64Array(Math.floor(height / (Math.PI * large)));
  const pairs: { n: number; m: number; delta: number; first: number; second: number }[] = [];
  const inPair = new Set<number>();
  for (let n = 1; n <= ofSmall.length + 1; n++) {
    const m = Math.round(n * square);
    // small * Delta / pi = n small^2 - m, without the rounding of small^2.
    const offset = n * square - m + n * periods.squareExcess;
    const delta = (Math.PI * offset) / small;
    const y1 = Math.PI * n * small;
    if (m >= 1 && Math.abs(delta) < PAIR_WIDTH * small) {
      const y2 = Math.PI * m * large;
      // A pair is kept whole or left out whole: half of it would have a large coefficient.
      if (Math.min(y1, y2) > height) continue;
      const sign = (n + m) % 2 === 0 ? 1 : -1;
      const s1 = sinc(small * delta);
      const bracket = small * sineExcess(small * delta) - large * sineExcess(large * delta);
      const [first, second] = coefficients.pair(y1, y2, delta, s1, bracket);
      pairs.push({ n, m, delta, first: sign * first, second: sign * second });
      inPair.add(m);
    } else if (n <= ofSmall.length) {
      const sign = (n + m) % 2 === 0 ? 1 : -1;
      ofSmall[n - 1] = (sign * coefficients.single(y1)) / (n * Math.sin(Math.PI * offset));
    }
  }
  for (let m = 1; m <= ofLarge.length; m++) {
    if (inPair.has(m)) continue;
    const ratio = m * large * large;
    const n = Math.round(ratio);
    const sign = (n + m) % 2 === 0 ? 1 : -1;
    ofLarge[m - 1] = (sign * coefficients.single(Math.PI * m * large)) / (m * Math.sin(Math.PI * (ratio - n)));
  }
  return {
    small: ofSmall.subarray(0, lastNonZero(ofSmall)),
    large: ofLarge.subarray(0, lastNonZero(ofLarge)),
    pairs: {
      n: Int32Array.from(pairs, (pair) => pair.n),
      m: Int32Array.from(pairs, (pair) => pair.m),
      delta: Float64Array.from(pairs, (pair) => pair.delta),
      first: Float64Array.from(pairs, (pair) => pair.first),
      second: Float64Array.from(pairs, (pair) => pair.second),
    },
    deepestSmall: pairs.reduce((most, pair) => Math.max(most, pair.n), 0),
    deepestLarge: pairs.reduce((most, pair) => Math.max(most, pair.m), 0),
  };
}

function lastNonZero(values: Float64Array): number {
  let length = values.length;
  while (length > 0 && values[length - 1] === 0) length--;
  return length;
}

/** small^2 - fl(small^2) for small = min(b, 1/b), by Dekker's splitting; for b > 1 also the rounding of 1/b counts. */
function squareExcess(b: number): number {
  if (b <= 1) return productExcess(b, b);
  const small = 1 / b;
  // 1/b = small (1 + r) with r = 1 - small b up to r^2, so small^2 gains 2 r small^2.
  const remainder = -(small * b - 1) - productExcess(small, b);
  return productExcess(small, small) + 2 * remainder * small * small;
}

/** a b - fl(a b), exactly barring underflow (Dekker 1971). */
function productExcess(a: number, b: number): number {
  const p = a * b;
  const splitA = 134217729 * a;
  const highA = splitA - (splitA - a);
  const splitB = 134217729 * b;
  const highB = splitB - (splitB - b);
  const lowA = a - highA;
  const lowB = b - highB;
  return lowA * lowB - (p - highA * highB - lowA * highB - highA * lowB);
}

function sinc(z: number): number {
  return z === 0 ? 1 : Math.sin(z) / z;
}

/** (e^z - 1)/z. */
function expm1c(z: number): number {
  return z === 0 ? 1 : Math.expm1(z) / z;
}

/** 1/sin z - 1/z for |z| <= 1/2 by its power series (DLMF 4.19.4). */
function sineExcess(z: number): number {
  const s = z * z;
  let sum = 0;
  for (let k = SINE_EXCESS.length - 1; k >= 0; k--) sum = sum * s + (SINE_EXCESS[k] as number);
  return sum * z;
}

/** 2 (2^{2k-1} - 1) |B_{2k}|/(2k)!, k = 1 .. 10; at z = 1/2 the first term left out is 5e-17. */
const SINE_EXCESS: readonly number[] = [
  1 / 6,
  7 / 360,
  31 / 15120,
  127 / 604800,
  73 / 3421440,
  1414477 / 653837184000,
  8191 / 37362124800,
  16931177 / 762187345920000,
  5749691557 / 2554547108585472000,
  91546277357 / 401428831349145600000,
];
