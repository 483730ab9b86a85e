import {
  addBalls,
  type Ball,
  ballFromRatio,
  ballHoldsZero,
  divideBalls,
  exactBall,
  multiplyBallByInteger,
  multiplyBalls,
} from '../arithmetic/ball';
import { absoluteComplex } from '../arithmetic/fixed-complex';
import { formFixed } from '../arithmetic/form-fixed';
import type { Form } from '../exact/form';
import { Gaussian } from '../exact/gaussian';
import type { CoefficientTerm } from '../spheres/sphere';

/** What sums of regulated products are worked out in. */
interface Numbers<T> {
  readonly zero: T;
  readonly one: T;
  readonly add: (a: T, b: T) => T;
  readonly multiply: (a: T, b: T) => T;
  readonly scale: (a: T, factor: number) => T;
  /** Null where it cannot be told from zero. */
  readonly inverse: (a: T) => T | null;
  /** The number of a closed form; null where it has none. */
  readonly of: (form: Form) => T | null;
  readonly holdsZero: (a: T) => boolean;
}

export type CoefficientValue =
  /** `exact` where the coefficient is a Gaussian rational. */
  | { readonly kind: 'value'; readonly value: Ball; readonly exact: Gaussian | null }
  | { readonly kind: 'pole' }
  | { readonly kind: 'unset'; readonly names: readonly string[] }
  | { readonly kind: 'unreachable' };

/** Working precision is not raised beyond this many bits above what the digits need. */
const MAXIMAL_GUARD = 4096;

/**
 * The limit d -> 0 of a sum of products of (value + slope d)^(+-1), values closed forms: exact where they are Gaussian
 * rationals, else with a relative error below 10^-digits. A limit that does not exist is a pole.
 */
export function evaluateCoefficient(
  terms: readonly CoefficientTerm[],
  values: (name: string) => Form | null,
  digits: number,
): CoefficientValue {
  const closed = closedTerms(terms, values);
  const names = new Set(closed.flatMap((term) => term.flatMap(({ value }) => value.symbols())));
  if (names.size > 0) return { kind: 'unset', names: [...names] };
  const needed = Math.ceil(digits * Math.log2(10)) + 8;
  const exact = limitOf(closed, GAUSSIANS);
  if (exact.kind === 'pole') return { kind: 'pole' };
  if (exact.kind === 'value') return { kind: 'value', value: gaussianBall(exact.value, needed), exact: exact.value };
  for (let guard = 32; guard <= MAXIMAL_GUARD; guard *= 2) {
    const limit = limitOf(closed, balls(needed + guard));
    if (limit.kind === 'pole') return { kind: 'pole' };
    if (limit.kind === 'value' && isGood(limit.value, needed)) {
      return { kind: 'value', value: limit.value, exact: null };
    }
  }
  return { kind: 'unreachable' };
}

/** Values put in; equal factors share theirs, and a product with a vanishing numerator is left out. */
function closedTerms(
  terms: readonly CoefficientTerm[],
  values: (name: string) => Form | null,
): readonly CoefficientTerm[] {
  const known = new Map<Form, Form>();
  const closed = (form: Form): Form => {
    const found = known.get(form) ?? form.substitute(values);
    known.set(form, found);
    return found;
  };
  return terms
    .map((term) => term.map((factor) => ({ ...factor, value: closed(factor.value) })))
    .filter((term) => !term.some(({ value, slope, power }) => power === 1 && slope === 0 && value.isZero()));
}

type Limit<T> =
  | { readonly kind: 'value'; readonly value: T }
  | { readonly kind: 'pole' }
  | { readonly kind: 'unknown' };

function limitOf<T>(terms: readonly CoefficientTerm[], numbers: Numbers<T>): Limit<T> {
  let value = numbers.zero;
  /** Sums of the coefficients of d^-1, d^-2, ..: they vanish where there is a limit. */
  const singular: T[] = [];
  for (const term of terms) {
    const expansion = expand(term, numbers);
    if (expansion === 'pole') return { kind: 'pole' };
    if (expansion === null) return { kind: 'unknown' };
    const constant = expansion.length - 1;
    expansion.forEach((coefficient, k) => {
      if (k === constant) value = numbers.add(value, coefficient);
      else singular[constant - k - 1] = numbers.add(singular[constant - k - 1] ?? numbers.zero, coefficient);
    });
  }
  return singular.every(numbers.holdsZero) ? { kind: 'value', value } : { kind: 'pole' };
}

/**
 * Coefficients of d^-p, .., d^0 of a product with a pole of order p (nothing for a zero); null where a value is missing
 * or cannot be told from zero.
 */
function expand<T>(term: CoefficientTerm, numbers: Numbers<T>): T[] | null | 'pole' {
  let order = 0;
  let lead = numbers.one;
  const ratios: { readonly ratio: T; readonly power: 1 | -1 }[] = [];
  for (const { value, slope, power } of term) {
    if (value.isZero()) {
      if (slope === 0) return 'pole';
      order += power;
      const inverse =
        power === 1 ? numbers.scale(numbers.one, slope) : numbers.inverse(numbers.scale(numbers.one, slope));
      if (inverse === null) return null;
      lead = numbers.multiply(lead, inverse);
      continue;
    }
    const constant = numbers.of(value);
    const inverse = constant === null ? null : numbers.inverse(constant);
    if (constant === null || inverse === null) return null;
    lead = numbers.multiply(lead, power === 1 ? constant : inverse);
    if (slope !== 0) ratios.push({ ratio: numbers.scale(inverse, slope), power });
  }
  if (order > 0) return [];
  return regularPart(-order, ratios, numbers).map((coefficient) => numbers.multiply(coefficient, lead));
}

/** The product of (1 + ratio d)^(+-1) up to d^order. */
function regularPart<T>(
  order: number,
  ratios: readonly { readonly ratio: T; readonly power: 1 | -1 }[],
  numbers: Numbers<T>,
): T[] {
  const series = [numbers.one, ...new Array<T>(order).fill(numbers.zero)];
  for (const { ratio, power } of order === 0 ? [] : ratios) {
    const step = power === 1 ? ratio : numbers.scale(ratio, -1);
    // Downwards the old entries enter (a factor), upwards the new ones (a geometric series).
    for (let k = 1; k <= order; k++) {
      const place = power === 1 ? order + 1 - k : k;
      series[place] = numbers.add(series[place] as T, numbers.multiply(step, series[place - 1] as T));
    }
  }
  return series;
}

const GAUSSIANS: Numbers<Gaussian> = {
  zero: Gaussian.zero,
  one: Gaussian.one,
  add: (a, b) => a.add(b),
  multiply: (a, b) => a.mul(b),
  scale: (a, factor) => a.mul(Gaussian.of(factor)),
  inverse: (a) => (a.isZero() ? null : a.inverse()),
  of: (form) => form.toGaussian(),
  holdsZero: (a) => a.isZero(),
};

function balls(precision: number): Numbers<Ball> {
  return {
    zero: exactBall(0n),
    one: exactBall(1n),
    add: (a, b) => addBalls(a, b, precision),
    multiply: (a, b) => multiplyBalls(a, b, precision),
    scale: (a, factor) => multiplyBallByInteger(a, BigInt(factor), precision),
    inverse: (a) => divideBalls(exactBall(1n), a, precision),
    of: (form) => {
      const fixed = formFixed(form, precision);
      return fixed === null ? null : { re: fixed.re, im: fixed.im, bits: precision, error: 1n };
    },
    holdsZero: ballHoldsZero,
  };
}

/** Relative error below 2^-bits. */
function isGood({ re, im, error }: Ball, bits: number): boolean {
  return error << BigInt(bits) <= absoluteComplex({ re, im });
}

function gaussianBall({ re, im }: Gaussian, precision: number): Ball {
  const parts = [re, im].map((part) =>
    part.sign() < 0
      ? multiplyBallByInteger(ballFromRatio(-part.numerator, part.denominator, precision + 8), -1n, precision + 8)
      : ballFromRatio(part.numerator, part.denominator, precision + 8),
  ) as [Ball, Ball];
  const imaginary = multiplyBalls(parts[1], exactBall(0n, 1n), precision + 8);
  return addBalls(parts[0], imaginary, precision + 8);
}
