import { absolute, bitLength, fixedFromRatio, numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  type FixedComplex,
  multiplyComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { formFixed } from '../arithmetic/form-fixed';
import { gcd, type Rational } from '../exact/rational';
import type { Polynomial } from './polynomial';

/** A multiplicity M(nu) ready to be multiplied with fixed point numbers at integers. */
export interface FixedMultiplicity {
  /** M(nu) times a number with `bits` fraction bits, within two units plus that number's size. */
  readonly times: (nu: number, value: FixedComplex) => FixedComplex;
  /** |M(nu)| in doubles. */
  readonly size: (nu: number) => number;
}

/**
 * Exact where the coefficients are rational; otherwise the coefficients carry enough further bits for |nu| up to
 * `reach`. Null where a coefficient has no value.
 */
export function fixedMultiplicity(p: Polynomial, bits: number, reach: number): FixedMultiplicity | null {
  const rational = p.map((c) => c.toRational());
  if (rational.every((c) => c !== null)) return exactMultiplicity(rational, bits);
  const extra = Math.ceil(p.length * Math.log2(Math.abs(reach) + 2)) + 8;
  const coefficients: FixedComplex[] = [];
  for (const c of p) {
    const value = formFixed(c, bits + extra);
    if (value === null) return null;
    coefficients.push(value);
  }
  const at = (nu: number): FixedComplex => {
    const x = BigInt(nu);
    let sum = zeroComplex;
    for (let k = coefficients.length - 1; k >= 0; k--) {
      sum = addComplex({ re: sum.re * x, im: sum.im * x }, coefficients[k] as FixedComplex);
    }
    return sum;
  };
  return {
    times: (nu, value) => multiplyComplex(at(nu), value, bits + extra),
    size: (nu) => numberFromFixed(absoluteComplex(at(nu)), bits + extra),
  };
}

function exactMultiplicity(coefficients: readonly Rational[], bits: number): FixedMultiplicity {
  const denominator = coefficients.reduce((d, c) => (d * c.denominator) / gcd(d, c.denominator), 1n);
  const numerators = coefficients.map((c) => c.numerator * (denominator / c.denominator));
  const at = (nu: number): bigint => {
    const x = BigInt(nu);
    return numerators.reduceRight((sum, c) => sum * x + c, 0n);
  };
  return {
    times: (nu, value) => {
      const m = at(nu);
      return { re: (value.re * m) / denominator, im: (value.im * m) / denominator };
    },
    size: (nu) =>
      absolute(at(nu)) === 0n ? 0 : numberFromFixed(fixedFromRatio(absolute(at(nu)), denominator, bits), bits),
  };
}

/** Coefficients of a polynomial as fixed point numbers, or null where one has no value. */
export function fixedCoefficients(p: Polynomial, bits: number): FixedComplex[] | null {
  const values: FixedComplex[] = [];
  for (const c of p) {
    const value = formFixed(c, bits);
    if (value === null) return null;
    values.push(value);
  }
  return values;
}

/** log2 |value|, at least that of one unit. */
export function log2Of(value: FixedComplex, bits: number): number {
  return bitLength(absoluteComplex(value) + 1n) - bits;
}
