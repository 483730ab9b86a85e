import { bitLength, numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  type FixedComplex,
  integerPowerComplex,
  logComplex,
  multiplyComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { formFixed } from '../arithmetic/form-fixed';
import type { Form } from '../exact/form';
import { type Estimate, farPoint, stepsToFarPoint } from '../functions/euler-maclaurin';
import { scaledHurwitzDerivative } from '../functions/hurwitz-derivative';
import type { Run } from './expansion';
import { fixedCoefficients, fixedMultiplicity } from './explicit-sum';
import { type Polynomial, shiftPolynomial } from './polynomial';

/** Most logarithms taken one by one before a series takes over. */
export const MAXIMAL_STEPS = 100_000;

/** Finite runs up to this length are summed term by term. */
const SUMMED_RUN = 2048;

/** Why a sum has no value: a form without one (division by zero), or too many terms. */
export type SumFailure = 'spectrum-undefined' | 'spectrum-too-far';

export function isFailure(value: Estimate | SumFailure): value is SumFailure {
  return typeof value === 'string';
}

/**
 * The regularised sum over nu in a run of M(nu) log(nu + a), minus the derivative at 0 of
 * sum M(nu) (nu + a)^-s: sum_k c_k (-zeta'(-k, from + a)), c_k the coefficients of M in powers of nu + a
 * (Voros 1987; DLMF 25.11.18). Principal logarithms; a factor that is exactly zero is left out. `offset` moves the
 * point where the series takes over, for an independent second value.
 * Error: truncation bound and rounding, added up term by term.
 */
export function linearSum(
  a: Form,
  multiplicity: Polynomial,
  run: Run,
  bits: number,
  offset = 0,
): Estimate | SumFailure {
  if (run.to !== null && run.to - run.from >= SUMMED_RUN) {
    const below = linearSum(a, multiplicity, { from: run.from, to: null }, bits + 2, offset);
    const above = linearSum(a, multiplicity, { from: run.to + 1, to: null }, bits + 2, offset);
    return isFailure(below) ? below : isFailure(above) ? above : difference(below, above);
  }
  const rough = formFixed(a, 64);
  const expansion = shiftPolynomial(multiplicity, a.neg());
  const roughExpansion = fixedCoefficients(expansion, 64);
  if (rough === null || roughExpansion === null) return 'spectrum-undefined';
  const start = { re: numberFromFixed(rough.re, 64) + run.from, im: numberFromFixed(rough.im, 64) };
  const steps =
    run.to === null ? stepsToFarPoint(start, multiplicity.length, bits + 64) + offset : run.to - run.from + 1;
  if (steps > MAXIMAL_STEPS) return 'spectrum-too-far';
  const size = Math.hypot(start.re + steps, start.im) + Math.abs(start.re) + 2;
  const terms = roughExpansion.map((c, k) => numberFromFixed(absoluteComplex(c) + 1n, 64) * size ** (k + 1));
  const guard = 20 + Math.ceil(Math.log2(1 + terms.reduce((sum, t) => sum + t, 0) * (Math.log(size) + 2)));
  const working = bits + guard;
  const shift = formFixed(a, working);
  const factor = fixedMultiplicity(multiplicity, working, Math.abs(run.from) + steps);
  if (shift === null || factor === null) return 'spectrum-undefined';
  let sum = zeroComplex;
  let error = 0;
  for (let j = 0; j < steps; j++) {
    const nu = run.from + j;
    const z = { re: shift.re + (BigInt(nu) << BigInt(working)), im: shift.im };
    if (z.re === 0n && z.im === 0n) continue;
    const logarithm = logComplex(z, working);
    sum = addComplex(sum, factor.times(nu, logarithm));
    const distance = numberFromFixed(absoluteComplex(z), working);
    error += (factor.size(nu) + 1) * (4 + 2 / distance) + 2 * Math.abs(Math.log(distance)) + 6;
  }
  if (run.to !== null) return rounded(sum, error, guard);
  const at = { re: shift.re + (BigInt(run.from + steps) << BigInt(working)), im: shift.im };
  const tail = endlessTail(expansion, at, working);
  if (tail === null) return 'spectrum-undefined';
  return rounded(subtractComplex(sum, tail.value), error + tail.error, guard);
}

/** sum_k c_k zeta'(-k, W), its error in units as a double. */
function endlessTail(
  expansion: Polynomial,
  at: FixedComplex,
  working: number,
): { readonly value: FixedComplex; readonly error: number } | null {
  const coefficients = fixedCoefficients(expansion, working);
  if (coefficients === null) return null;
  const point = farPoint(at, working);
  const logarithm = logComplex(at, working);
  const size = 2 ** point.log2Size;
  let value = zeroComplex;
  let error = 0;
  coefficients.forEach((c, k) => {
    const scaled = multiplyComplex(c, integerPowerComplex(at, k, working), working);
    const weight = numberFromFixed(absoluteComplex(scaled) + 1n, working);
    const log2Weight = Math.log2(weight);
    const { value: derivative, error: inside } = scaledHurwitzDerivative(point, k, logarithm, log2Weight);
    value = addComplex(value, multiplyComplex(scaled, derivative, working));
    const height = numberFromFixed(absoluteComplex(derivative), working) + 1;
    error += (size ** k + 4 * (k + 1) * weight) * height + scaledError(inside, log2Weight) + 2;
  });
  return { value, error };
}

/** error times 2^exponent, rounded up to a power of two; either may be beyond doubles by itself. */
export function scaledError(error: bigint, exponent: number): number {
  return 2 ** (bitLength(error) + exponent);
}

/** Drops `guard` bits; the error in the old units. */
export function rounded(value: FixedComplex, error: number, guard: number): Estimate {
  return {
    value: { re: value.re >> BigInt(guard), im: value.im >> BigInt(guard) },
    error: BigInt(Math.ceil(error * 2 ** -guard)) + 2n,
  };
}

function difference(a: Estimate, b: Estimate): Estimate {
  const value = subtractComplex(a.value, b.value);
  return { value: { re: value.re >> 2n, im: value.im >> 2n }, error: (a.error + b.error) / 4n + 2n };
}
