import type { PoleTables } from './double-sine-tables-double';

/**
 * The residue sums of `DoubleSineTables` in doubles, near (hyperbolic) and far (decaying), for real and complex x.
 * Complex results are added to `out` = [re, im]; nothing is allocated.
 */

/** sum_n c_n sinh(n angle) for real angle by Clenshaw's recurrence; exact to rounding also for small angles. */
export function sinhSeries(angle: number, coefficients: Float64Array): number {
  if (coefficients.length === 0) return 0;
  const grown = Math.expm1(angle);
  const inverse = 1 / (grown + 1);
  const twoCosh = 2 + grown * grown * inverse;
  let first = 0;
  let second = 0;
  for (let n = coefficients.length - 1; n >= 0; n--) {
    const next = (coefficients[n] as number) + twoCosh * first - second;
    second = first;
    first = next;
  }
  return 0.5 * (grown + grown * inverse) * first;
}

/** out += sum_n c_n sinh(n (re + i im)). */
export function addSinhSeries(re: number, im: number, coefficients: Float64Array, out: Float64Array): void {
  if (coefficients.length === 0) return;
  const grown = Math.expm1(re);
  const inverse = 1 / (grown + 1);
  const sinh = 0.5 * (grown + grown * inverse);
  const cosh = 1 + 0.5 * grown * grown * inverse;
  const cos = Math.cos(im);
  const sin = Math.sin(im);
  const twoRe = 2 * cosh * cos;
  const twoIm = 2 * sinh * sin;
  let firstRe = 0;
  let firstIm = 0;
  let secondRe = 0;
  let secondIm = 0;
  for (let n = coefficients.length - 1; n >= 0; n--) {
    const nextRe = (coefficients[n] as number) + twoRe * firstRe - twoIm * firstIm - secondRe;
    const nextIm = twoRe * firstIm + twoIm * firstRe - secondIm;
    secondRe = firstRe;
    secondIm = firstIm;
    firstRe = nextRe;
    firstIm = nextIm;
  }
  const sineRe = sinh * cos;
  const sineIm = cosh * sin;
  out[0] = (out[0] as number) + sineRe * firstRe - sineIm * firstIm;
  out[1] = (out[1] as number) + sineRe * firstIm + sineIm * firstRe;
}

/** Terms of a power series with |ratio| = e^{-decay} that matter in doubles (e^-40). */
function termsFor(decay: number, length: number): number {
  return Math.min(length, Math.ceil(40 / decay));
}

/** sum_n c_n e^{-n decay}, decay > 0. */
export function decayingSeries(decay: number, coefficients: Float64Array): number {
  const count = termsFor(decay, coefficients.length);
  if (count === 0) return 0;
  const ratio = Math.exp(-decay);
  let sum = 0;
  for (let n = count - 1; n >= 0; n--) sum = ((coefficients[n] as number) + sum) * ratio;
  return sum;
}

/** out += sum_n c_n e^{-n (decay + i turn)}. */
export function addDecayingSeries(decay: number, turn: number, coefficients: Float64Array, out: Float64Array): void {
  const count = termsFor(decay, coefficients.length);
  if (count === 0) return;
  const size = Math.exp(-decay);
  const ratioRe = size * Math.cos(turn);
  const ratioIm = -size * Math.sin(turn);
  let re = 0;
  let im = 0;
  for (let n = count - 1; n >= 0; n--) {
    const shifted = (coefficients[n] as number) + re;
    re = shifted * ratioRe - im * ratioIm;
    im = shifted * ratioIm + im * ratioRe;
  }
  out[0] = (out[0] as number) + re;
  out[1] = (out[1] as number) + im;
}

/** The pairs of the near formula at real x; `small` and `large` are the periods. */
export function nearPairs(x: number, small: number, large: number, poles: PoleTables): number {
  const { n, m, delta, first, second } = poles.pairs;
  if (n.length === 0) return 0;
  const stepSmall = Math.exp(Math.PI * small * x);
  const stepLarge = Math.exp(Math.PI * large * x);
  let powerSmall = 1;
  let powerLarge = 1;
  let atSmall = 0;
  let atLarge = 0;
  let sum = 0;
  for (let k = 0; k < n.length; k++) {
    for (; atSmall < (n[k] as number); atSmall++) powerSmall *= stepSmall;
    for (; atLarge < (m[k] as number); atLarge++) powerLarge *= stepLarge;
    const mixed = powerSmall * powerLarge;
    const twice = powerLarge * powerLarge;
    const lead = (first[k] as number) * x * realSinhc(x * (delta[k] as number));
    sum += 0.5 * (lead * (mixed + 1 / mixed) + (second[k] as number) * (twice - 1 / twice));
  }
  return sum;
}

/** The pairs of the far formula at real x > 0. */
export function farPairs(x: number, small: number, large: number, poles: PoleTables): number {
  const { n, m, delta, first, second } = poles.pairs;
  if (n.length === 0) return 0;
  const stepSmall = Math.exp(-Math.PI * small * x);
  const stepLarge = Math.exp(-Math.PI * large * x);
  let powerSmall = 1;
  let powerLarge = 1;
  let atSmall = 0;
  let atLarge = 0;
  let sum = 0;
  for (let k = 0; k < n.length; k++) {
    for (; atSmall < (n[k] as number); atSmall++) powerSmall *= stepSmall;
    for (; atLarge < (m[k] as number); atLarge++) powerLarge *= stepLarge;
    const mixed = powerSmall * powerLarge;
    if (mixed < NEGLIGIBLE) break;
    const lead = (first[k] as number) * x * realSinhc(x * (delta[k] as number));
    sum += lead * mixed + (second[k] as number) * powerLarge * powerLarge;
  }
  return sum;
}

/** Below this e^{-x (y1 + y2)} a pair no longer matters: x times it stays under 2^-53 of the leading x^2. */
const NEGLIGIBLE = 1e-18;

/**
 * out += the pairs at x = a + i c, a >= 0. `direction` is 1 for the near formula (cosh and sinh) and -1 for the far one.
 */
export function addPairs(
  a: number,
  c: number,
  small: number,
  large: number,
  poles: PoleTables,
  direction: 1 | -1,
  out: Float64Array,
): void {
  const { n, m, delta, first, second } = poles.pairs;
  if (n.length === 0) return;
  const sizeSmall = Math.exp(direction * Math.PI * small * a);
  const smallRe = sizeSmall * Math.cos(Math.PI * small * c);
  const smallIm = direction * sizeSmall * Math.sin(Math.PI * small * c);
  const sizeLarge = Math.exp(direction * Math.PI * large * a);
  const largeRe = sizeLarge * Math.cos(Math.PI * large * c);
  const largeIm = direction * sizeLarge * Math.sin(Math.PI * large * c);
  let powerSmallRe = 1;
  let powerSmallIm = 0;
  let powerLargeRe = 1;
  let powerLargeIm = 0;
  let atSmall = 0;
  let atLarge = 0;
  for (let k = 0; k < n.length; k++) {
    for (; atSmall < (n[k] as number); atSmall++) {
      const re = powerSmallRe * smallRe - powerSmallIm * smallIm;
      powerSmallIm = powerSmallRe * smallIm + powerSmallIm * smallRe;
      powerSmallRe = re;
    }
    for (; atLarge < (m[k] as number); atLarge++) {
      const re = powerLargeRe * largeRe - powerLargeIm * largeIm;
      powerLargeIm = powerLargeRe * largeIm + powerLargeIm * largeRe;
      powerLargeRe = re;
    }
    // Near: (cosh, sinh) of the two exponents; far: the exponentials themselves.
    let mixedRe = powerSmallRe * powerLargeRe - powerSmallIm * powerLargeIm;
    let mixedIm = powerSmallRe * powerLargeIm + powerSmallIm * powerLargeRe;
    let twiceRe = powerLargeRe * powerLargeRe - powerLargeIm * powerLargeIm;
    let twiceIm = 2 * powerLargeRe * powerLargeIm;
    if (direction > 0) {
      const mixedNorm = 1 / (mixedRe * mixedRe + mixedIm * mixedIm);
      mixedRe = 0.5 * mixedRe * (1 + mixedNorm);
      mixedIm = 0.5 * mixedIm * (1 - mixedNorm);
      const twiceNorm = 1 / (twiceRe * twiceRe + twiceIm * twiceIm);
      twiceRe = 0.5 * twiceRe * (1 - twiceNorm);
      twiceIm = 0.5 * twiceIm * (1 + twiceNorm);
    } else if (Math.abs(mixedRe) + Math.abs(mixedIm) < NEGLIGIBLE) break;
    const gap = delta[k] as number;
    let leadRe = (first[k] as number) * a;
    let leadIm = (first[k] as number) * c;
    if (gap !== 0) {
      const zRe = a * gap;
      const zIm = c * gap;
      const sRe = zRe * zRe - zIm * zIm;
      const sIm = 2 * zRe * zIm;
      let ratioRe = 1;
      let ratioIm = 0;
      if (Math.abs(sRe) + Math.abs(sIm) < SERIES_LIMIT) {
        ratioRe = SINHC[SINHC.length - 1] as number;
        for (let j = SINHC.length - 2; j >= 0; j--) {
          const re = ratioRe * sRe - ratioIm * sIm + (SINHC[j] as number);
          ratioIm = ratioRe * sIm + ratioIm * sRe;
          ratioRe = re;
        }
      } else {
        const sinhRe = Math.sinh(zRe) * Math.cos(zIm);
        const sinhIm = Math.cosh(zRe) * Math.sin(zIm);
        const norm = 1 / (zRe * zRe + zIm * zIm);
        ratioRe = (sinhRe * zRe + sinhIm * zIm) * norm;
        ratioIm = (sinhIm * zRe - sinhRe * zIm) * norm;
      }
      const re = leadRe * ratioRe - leadIm * ratioIm;
      leadIm = leadRe * ratioIm + leadIm * ratioRe;
      leadRe = re;
    }
    const tail = second[k] as number;
    out[0] = (out[0] as number) + leadRe * mixedRe - leadIm * mixedIm + tail * twiceRe;
    out[1] = (out[1] as number) + leadRe * mixedIm + leadIm * mixedRe + tail * twiceIm;
  }
}

/** sinh(z)/z in powers of z^2, to 5e-17 for |z^2| <= 1/4. */
const SINHC: readonly number[] = [1, 1 / 6, 1 / 120, 1 / 5040, 1 / 362880, 1 / 39916800, 1 / 6227020800];
const SERIES_LIMIT = 0.25;

function realSinhc(z: number): number {
  const s = z * z;
  if (s > SERIES_LIMIT) return Math.sinh(z) / z;
  let sum = 0;
  for (let j = SINHC.length - 1; j >= 0; j--) sum = sum * s + (SINHC[j] as number);
  return sum;
}
