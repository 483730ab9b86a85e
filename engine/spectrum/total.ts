import type { Ball } from '../arithmetic/ball';
import { absolute, bitLength } from '../arithmetic/fixed';
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

/** Upper bound of |a - b| in units, imaginary parts compared modulo 2 pi / turns, or not at all (null). */
export function gapBetween(a: FixedComplex, b: FixedComplex, bits: number, turns: number | null): bigint {
  if (turns === null) return absolute(a.re - b.re);
  const turn = (2n * piFixed(bits)) / BigInt(turns);
  let im = (a.im - b.im) % turn;
  if (2n * absolute(im) > turn) im -= im > 0n ? turn : -turn;
  return absolute(a.re - b.re) + absolute(im);
}

/** Number of decimal digits on which a value agrees with another, relative to the larger of 1 and its size. */
export function agreedDigits(value: FixedComplex, gap: bigint, bits: number): number {
  const size = Math.max(0, bitLength(sizeOf(value)) - bits);
  return Math.max(0, Math.floor((bits + size - bitLength(gap + 1n)) * Math.log10(2)));
}
