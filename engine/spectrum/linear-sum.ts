import { bitLength, numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  type FixedComplex,
  logComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { formFixed } from '../arithmetic/form-fixed';
import type { Form } from '../exact/form';
import { type Estimate, stepsToFarPoint } from '../functions/euler-maclaurin';
import type { Run } from './expansion';
import { fixedCoefficients, fixedMultiplicity } from './explicit-sum';
import { hurwitzTail, type Partial } from './hurwitz-tail';
import { type Polynomial, shiftPolynomial } from './polynomial';
import { log2TotalWeight, risingPolynomial, sumOfLogarithms } from './power-product';

/** Most logarithms taken one by one before a series takes over. */
export const MAXIMAL_STEPS = 100_000;

/** Bits that the series is started further out for: the guard bits of usual multiplicities. */
const REACH = 48;

/** Largest error of a number known to one unit in either part. */
const SLIP = 1.5;

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
    run.to === null ? stepsToFarPoint(start, multiplicity.length, bits + REACH) + offset : run.to - run.from + 1;
  if (steps > MAXIMAL_STEPS) return 'spectrum-too-far';
  const size = Math.hypot(start.re + steps, start.im) + Math.abs(start.re) + 2;
  const terms = roughExpansion.map((c, k) => numberFromFixed(absoluteComplex(c) + 1n, 64) * size ** (k + 1));
  const rising = risingPolynomial(multiplicity, run.from);
  const weight = terms.reduce((sum, t) => sum + t, 0) * (Math.log(size) + 2);
  const guard = 20 + Math.ceil(Math.max(Math.log2(1 + weight), rising === null ? 0 : log2TotalWeight(rising, steps)));
  const working = bits + guard;
  const shift = formFixed(a, working);
  if (shift === null) return 'spectrum-undefined';
  const numbers = Array.from({ length: steps }, (_, j) => ({
    re: shift.re + (BigInt(run.from + j) << BigInt(working)),
    im: shift.im,
  }));
  const multiplied = rising && !numbers.some(isZero) ? sumOfLogarithms(numbers, rising, working, () => SLIP) : null;
  const below = multiplied ?? oneByOne(numbers, multiplicity, run.from, working);
  if (below === null) return 'spectrum-undefined';
  if (run.to !== null) return rounded(below.value, below.error, guard);
  const coefficients = fixedCoefficients(expansion, working);
  if (coefficients === null) return 'spectrum-undefined';
  const at = { re: shift.re + (BigInt(run.from + steps) << BigInt(working)), im: shift.im };
  const tail = hurwitzTail(coefficients, at, working);
  return rounded(subtractComplex(below.value, tail.value), below.error + tail.error, guard);
}

function isZero({ re, im }: FixedComplex): boolean {
  return re === 0n && im === 0n;
}

/** The sum of M(from + j) log z_j logarithm by logarithm, vanishing numbers left out: for any multiplicities. */
function oneByOne(
  numbers: readonly FixedComplex[],
  multiplicity: Polynomial,
  from: number,
  working: number,
): Partial | null {
  const factor = fixedMultiplicity(multiplicity, working, Math.abs(from) + numbers.length);
  if (factor === null) return null;
  let value = zeroComplex;
  let error = 0;
  for (const [j, z] of numbers.entries()) {
    if (isZero(z)) continue;
    value = addComplex(value, factor.times(from + j, logComplex(z, working)));
    const distance = numberFromFixed(absoluteComplex(z), working);
    error += (factor.size(from + j) + 1) * (4 + 2 / distance) + 2 * Math.abs(Math.log(distance)) + 6;
  }
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
