import type { Ball } from '../arithmetic/ball';
import { absolute, bitLength, numberFromFixed } from '../arithmetic/fixed';
import { addComplex, type FixedComplex, multiplyComplex, zeroComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { formFixed } from '../arithmetic/form-fixed';
import type { Form } from '../exact/form';
import type { Estimate } from '../functions/euler-maclaurin';

/** Adds estimates of one precision. */
export function sumOf(estimates: readonly Estimate[]): Estimate {
  return estimates.reduce(
    (sum, { value, error }) => ({ value: addComplex(sum.value, value), error: sum.error + error }),
    { value: zeroComplex, error: 0n },
  );
}

/** An exact form as an estimate: within one unit. Null where it has no value. */
export function estimateOf(form: Form, bits: number): Estimate | null {
  const value = formFixed(form, bits);
  if (value === null) return null;
  const gaussian = form.toGaussian();
  const exact = gaussian !== null && isDyadic(gaussian.re.denominator, bits) && isDyadic(gaussian.im.denominator, bits);
  return { value, error: exact ? 0n : 1n };
}

function isDyadic(denominator: bigint, bits: number): boolean {
  return (1n << BigInt(bits)) % denominator === 0n;
}

export function scaleEstimate(estimate: Estimate, factor: Estimate, bits: number): Estimate {
  const a = sizeOf(estimate.value);
  const b = sizeOf(factor.value);
  return {
    value: multiplyComplex(estimate.value, factor.value, bits),
    error: ((a * factor.error + b * estimate.error + estimate.error * factor.error) >> BigInt(bits)) + 3n,
  };
}

/** |value| rounded up, in units. */
export function sizeOf({ re, im }: FixedComplex): bigint {
  return absolute(re) + absolute(im) + 1n;
}

export function ballOf({ value, error }: Estimate, bits: number): Ball {
  return { re: value.re, im: value.im, bits, error };
}

/**
 * Number of decimal digits on which two values agree, relative to the larger of 1 and their size; imaginary parts are
 * compared modulo 2 pi / turns. At most what the bits can tell.
 */
export function agreedDigits(a: FixedComplex, b: FixedComplex, bits: number, turns: number): number {
  const turn = (2n * piFixed(bits)) / BigInt(turns);
  const re = a.re - b.re;
  let im = (a.im - b.im) % turn;
  if (2n * absolute(im) > turn) im -= im > 0n ? turn : -turn;
  const gap = bitLength(absolute(re) + absolute(im) + 1n);
  const size = Math.max(0, bitLength(sizeOf(a)) - bits);
  return Math.max(0, Math.floor((bits + size - gap) * Math.log10(2)));
}

/** Value in doubles, for plans. */
export function approximately(value: FixedComplex, bits: number): { readonly re: number; readonly im: number } {
  return { re: numberFromFixed(value.re, bits), im: numberFromFixed(value.im, bits) };
}
