import { fixedFromNumber, fixedFromRatio, multiplyFixed, numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  type FixedComplex,
  integerPowerComplex,
  logComplex,
  multiplyComplex,
  scaleComplex,
  squareComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { Rational } from '../exact/rational';
import type { BarnesSeries } from './barnes-series';
import { factorial } from './factorial';

/** Places u from which the sums over all further points u + sum (n_i + 1/2) w_i, n_i >= 0, are expanded. */
export interface LatticeLevel {
  readonly points: readonly FixedComplex[];
  /** How many periods the sum runs along. */
  readonly periods: number;
  readonly series: BarnesSeries;
}

/**
 * Derivatives at infinity. With y = u + |w|/2 over n periods, and d_i from prod (w_i t/2)/sinh(w_i t/2) = sum d_i t^{2i},
 *   log Gamma_n(y) = (1/prod w) sum_i d_i L_{n-2i}(u),
 *   L_e(u) = (-1)^e (H_e - log u) u^e/e! for e >= 0, (-e-1)! u^e for e < 0, and L_e' = -L_{e-1},
 * so that -log Gamma_n(y + z) - log Gamma_n(y - z) has the coefficients -2/(2j)! (1/prod w) sum_i d_i L_{n-2i-2j}(u).
 * Returned for j = 1, ..., `terms`, in powers of (z/radius)^2, summed over all levels, and log Gamma_n for j = 0 as
 * `center`. Every u is so far out that the terms fall below 2^-bits before they grow.
 */
export function farDerivatives(
  levels: readonly LatticeLevel[],
  radius: number,
  terms: number,
  bits: number,
): { readonly derivatives: FixedComplex[]; readonly center: () => FixedComplex } {
  const present = levels.filter(({ points }) => points.length > 0).map((level) => prepared(level, radius, terms, bits));
  const derivatives = Array.from({ length: terms }, (_, index) => {
    const total = present.reduce((sum, level) => addComplex(sum, derivative(level, index + 1, bits)), zeroComplex);
    return { re: -2n * total.re, im: -2n * total.im };
  });
  return {
    derivatives,
    center: () => present.reduce((sum, level) => addComplex(sum, derivative(level, 0, bits)), zeroComplex),
  };
}

interface Prepared {
  readonly periods: number;
  readonly series: BarnesSeries;
  /** Sums of L_e(u), e = n, n - 2, ... by e. */
  readonly low: readonly FixedComplex[];
  /** Sums of (U/u)^m for m = n (mod 2), m = 1 or 2 first, each with its own number of fraction bits. */
  readonly powers: readonly FixedComplex[];
  readonly powerBits: readonly number[];
  /** (W/(2 pi U))^2, (radius/U)^2, U^-1; U not above any |u|, W the modulus of the largest period. */
  readonly step: bigint;
  readonly radiusStep: bigint;
  readonly inverse: bigint;
  readonly radiusSquare: bigint;
}

function prepared({ points, periods, series }: LatticeLevel, radius: number, terms: number, bits: number): Prepared {
  const least = points.reduce(
    (min, u) => {
      const size = absoluteComplex(u);
      return min === null || size < min ? size : min;
    },
    null as bigint | null,
  );
  const inner = fixedFromNumber(numberFromFixed(least ?? 1n, bits) * (1 - 2 ** -40), bits);
  const inverse = (1n << BigInt(2 * bits)) / inner;
  const inverseSquare = multiplyFixed(inverse, inverse, bits);
  const radiusFixed = fixedFromNumber(radius, bits);
  const radiusSquare = multiplyFixed(radiusFixed, radiusFixed, bits);
  const low = regularSums(points, periods, bits);
  const step = multiplyFixed(series.unit, inverseSquare, bits);
  const radiusStep = multiplyFixed(radiusSquare, inverseSquare, bits);
  const powerBits = bitsNeeded(
    periods,
    numberFromFixed(step, bits),
    numberFromFixed(radiusStep, bits),
    numberFromFixed(inner, bits),
    terms,
    series.coefficients.length,
    bits,
  );
  const powers: FixedComplex[] = powerBits.map(() => zeroComplex);
  for (const u of points) addPowers(powers, powerBits, divideComplex({ re: inner, im: 0n }, u, bits), periods, bits);
  return {
    periods,
    series,
    low,
    powers,
    powerBits,
    step,
    radiusStep,
    inverse,
    radiusSquare,
  };
}

/** Bits kept beyond those that a power sum needs. */
const SPARE_BITS = 24;

/**
 * Fraction bits of the sums of (U/u)^m, m = n (mod 2): full where they count fully, fewer by the size of the largest factor
 * (m - 1)!/(2j)! (W/(2 pi U))^{2i} (radius/U)^{2j} U^n, m = 2i + 2j - n, that they meet; none where they count no longer.
 */
function bitsNeeded(
  n: number,
  step: number,
  radiusStep: number,
  inner: number,
  terms: number,
  coefficients: number,
  bits: number,
): number[] {
  const log2Factorial = [0];
  for (let k = 1; k <= 2 * (terms + coefficients); k++)
    log2Factorial.push((log2Factorial[k - 1] as number) + Math.log2(k));
  const [stepLog, radiusLog] = [Math.log2(step), Math.log2(radiusStep)];
  const first = n % 2 === 0 ? 2 : 1;
  const needed: number[] = [];
  for (let j = 0; j <= terms; j++) {
    let smallest = Number.POSITIVE_INFINITY;
    for (let i = Math.max(0, Math.ceil((first + n) / 2 - j)); i < coefficients; i++) {
      const m = 2 * i + 2 * j - n;
      const size =
        (log2Factorial[m - 1] as number) -
        (log2Factorial[2 * j] as number) +
        i * stepLog +
        j * radiusLog +
        n * Math.max(0, Math.log2(inner));
      // The terms are summed no further than they fall.
      if (size < -bits - SPARE_BITS || size > smallest) break;
      smallest = size;
      const index = (m - first) / 2;
      needed[index] = Math.max(needed[index] ?? 0, bits + SPARE_BITS + size);
    }
  }
  // Falling, in steps of 32, so that a power is cut now and then.
  let most = 0;
  for (let k = needed.length - 1; k >= 0; k--) {
    most = Math.max(most, needed[k] ?? 0);
    needed[k] = Math.min(bits, 32 * Math.ceil(most / 32));
  }
  return needed;
}

function addPowers(
  powers: FixedComplex[],
  powerBits: readonly number[],
  ratio: FixedComplex,
  periods: number,
  bits: number,
): void {
  let square = squareComplex(ratio, bits);
  let power = periods % 2 === 0 ? square : ratio;
  let at = bits;
  for (let k = 0; k < powers.length; k++) {
    const kept = powerBits[k] as number;
    if (kept < at) {
      const drop = BigInt(at - kept);
      square = { re: square.re >> drop, im: square.im >> drop };
      power = { re: power.re >> drop, im: power.im >> drop };
      at = kept;
    }
    if (power.re >> 1n === 0n && power.im >> 1n === 0n) return;
    powers[k] = addComplex(powers[k] as FixedComplex, power);
    power =
      power.im === 0n && square.im === 0n
        ? { re: multiplyFixed(power.re, square.re, at), im: 0n }
        : multiplyComplex(power, square, at);
  }
}

/** Sums of L_e(u) for e = n, n - 2, ... >= 0, by e. */
function regularSums(points: readonly FixedComplex[], n: number, bits: number): FixedComplex[] {
  const sums = Array.from({ length: n + 1 }, () => zeroComplex);
  for (const u of points) {
    const log = logComplex(u, bits);
    for (let e = n; e >= 0; e -= 2) sums[e] = addComplex(sums[e] as FixedComplex, regular(u, log, e, bits));
  }
  return sums;
}

/** L_e(u). */
function regular(u: FixedComplex, log: FixedComplex, e: number, bits: number): FixedComplex {
  let harmonic = Rational.zero;
  for (let k = 1; k <= e; k++) harmonic = harmonic.add(Rational.of(1, k));
  const first = fixedFromRatio(harmonic.numerator, harmonic.denominator, bits);
  const bracket = { re: first - log.re, im: -log.im };
  const power = multiplyComplex(integerPowerComplex(u, e, bits), bracket, bits);
  const below = factorial(e).numerator * (e % 2 === 0 ? 1n : -1n);
  return { re: power.re / below, im: power.im / below };
}

/** radius^{2j}/(2j)! (1/prod w) sum_i d_i sum_u L_{n-2i-2j}(u). */
function derivative(level: Prepared, j: number, bits: number): FixedComplex {
  const { periods, series, low, powers, powerBits, step, radiusStep, inverse, radiusSquare } = level;
  const { coefficients, unit, inverseVolume } = series;
  let sum = zeroComplex;
  const over = 2 * j <= periods ? factorial(2 * j).numerator : 1n;
  let i = 0;
  for (let scale = 1n << BigInt(bits); periods - 2 * i - 2 * j >= 0; i++) {
    const term = multiplyComplex(coefficients[i] as FixedComplex, low[periods - 2 * i - 2 * j] as FixedComplex, bits);
    let factor = scale;
    for (let k = 0; k < j; k++) factor = multiplyFixed(factor, radiusSquare, bits);
    sum = addComplex(sum, scaleComplex(term, factor / over, bits));
    scale = multiplyFixed(scale, unit, bits);
  }
  // (m - 1)!/(2j)! (W/(2 pi U))^{2i} (radius/U)^{2j} U^n with m = 2i + 2j - n.
  let m = 2 * i + 2 * j - periods;
  let factor = 1n << BigInt(bits);
  for (let k = 0; k < i; k++) factor = multiplyFixed(factor, step, bits);
  if (periods < 2 * j) {
    // (2j - n - 1)!/(2j)! is one over n + 1 factors.
    for (let k = 2 * j - periods; k <= 2 * j; k++) factor /= BigInt(k);
  } else factor /= over;
  factor = timesPower(factor, radiusStep, j, bits);
  const grown = 1n << BigInt(bits);
  for (let k = 0; k < periods; k++) factor = (factor * grown) / inverse;
  let smallest: bigint | null = null;
  for (; i < coefficients.length; i++) {
    const index = (m - (periods % 2 === 0 ? 2 : 1)) / 2;
    const [power, kept] = [powers[index], powerBits[index] ?? 0];
    if (power === undefined || factor === 0n || (smallest !== null && factor > smallest)) break;
    smallest = factor;
    // The factor is short, so it comes first.
    const short = scaleComplex(coefficients[i] as FixedComplex, factor, bits);
    sum = addComplex(sum, short.im === 0n ? scaleComplex(power, short.re, kept) : multiplyComplex(short, power, kept));
    factor = multiplyFixed(factor, step, bits) * BigInt(m * (m + 1));
    m += 2;
  }
  return multiplyComplex(sum, inverseVolume, bits);
}

function timesPower(factor: bigint, base: bigint, count: number, bits: number): bigint {
  return multiplyFixed(factor, integerPowerComplex({ re: base, im: 0n }, count, bits).re, bits);
}
