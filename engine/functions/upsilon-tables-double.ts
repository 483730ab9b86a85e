import { evenBernoulliNumbers } from './bernoulli';
import { oddKernelSeries } from './hyperbolic-series';

/**
 * Tables for log Upsilon_b in doubles: everything that depends on b alone. See `upsilon-double.ts` for the formulas.
 */
export interface UpsilonTables {
  /** The smaller period, at most 1, and the larger, 1/small. */
  readonly small: number;
  readonly large: number;
  readonly q: number;
  readonly step: number;
  /** w_k = h/(2 t_k sinh(b t_k) sinh(t_k/b)). */
  readonly weights: Float64Array;
  /** Coefficients of z^2, z^4, ... of the end point correction, with log(2/h) in the first. */
  readonly polynomial: Float64Array;
  /** |Im z| from which the asymptotic series serves. */
  readonly reach: number;
  /** Coefficients of z^-2, z^-4, ... of the asymptotic series. */
  readonly asymptotic: Float64Array;
  /** (b^2 + b^-2)/12. */
  readonly logarithmic: number;
}

/** log(1/eps) with a margin of 3. */
export const UPSILON_DEPTH = 40;

/** Terms of the Euler-Maclaurin correction. */
const CORRECTIONS = 30;
/**
 * 2 pi p/h, p = pi small the height of the nearest pole: at |Im z| = reach the remainder (2J)!/(2 pi p/h)^{2J} times the
 * growth e^{2 reach p} = e^DEPTH is e^-DEPTH for J = 30.
 */
const RATE = 88;
/** Terms of the asymptotic series: (2m - 3)!/DEPTH^{2m-2} falls below 1e-17 at m = 15. */
const ASYMPTOTIC_TERMS = 15;

/** Builds the tables for real b > 0; throws RangeError otherwise. */
export function upsilonTables(b: number): UpsilonTables {
  if (!(b > 0) || !Number.isFinite(b)) throw new RangeError('Upsilon in doubles needs b > 0.');
  const small = b <= 1 ? b : 1 / b;
  const large = b <= 1 ? 1 / b : b;
  const q = small + large;
  const height = Math.PI * small;
  const step = (2 * Math.PI * height) / RATE;
  const count = Math.ceil((2 * UPSILON_DEPTH) / (q * step)) + 2;
  const weights = new Float64Array(count);
  for (let k = 0; k < count; k++) {
    const t = (k + 0.5) * step;
    weights[k] = (4 / (2 * k + 1)) * (Math.exp(-q * t) / (Math.expm1(-2 * small * t) * Math.expm1(-2 * large * t)));
  }
  const d = oddKernelSeries([small, large], CORRECTIONS + 1);
  const bernoulli = evenBernoulliNumbers(CORRECTIONS).slice(0, CORRECTIONS);
  // h^{2j} B_{2j}(1/2)/(2j), B_{2j}(1/2) = -(1 - 2^{1-2j}) B_{2j} (DLMF 24.4.27).
  const ends = bernoulli.map((number, index) => {
    const twice = 2 * index + 2;
    return (-(1 - 2 ** (1 - twice)) * number.toNumber() * step ** twice) / twice;
  });
  const polynomial = new Float64Array(CORRECTIONS + 1);
  let scale = 1;
  for (let i = 1; i <= CORRECTIONS + 1; i++) {
    scale *= 4 / ((2 * i - 1) * (2 * i));
    let sum = 0;
    for (let j = Math.max(1, i - 1); j <= CORRECTIONS; j++) sum += (ends[j - 1] as number) * (d[j + 1 - i] as number);
    polynomial[i - 1] = -0.5 * scale * sum;
  }
  polynomial[0] = (polynomial[0] as number) + Math.log(2 / step);
  const asymptotic = new Float64Array(ASYMPTOTIC_TERMS - 1);
  let factorial = 1;
  for (let m = 2; m <= ASYMPTOTIC_TERMS; m++) {
    if (m > 2) factorial *= (2 * m - 4) * (2 * m - 3);
    asymptotic[m - 2] = (-0.5 * (d[m] as number) * factorial) / 4 ** (m - 1);
  }
  return {
    small,
    large,
    q,
    step,
    weights,
    polynomial,
    reach: UPSILON_DEPTH / (2 * height),
    asymptotic,
    logarithmic: (small * small + large * large) / 12,
  };
}
