import { bitLength, fixedFromNumber, numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  type FixedComplex,
  multiplyComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { Form } from '../exact/form';
import { Gaussian } from '../exact/gaussian';
import { Rational } from '../exact/rational';
import { complexRoots } from './complex-roots';
import { fixedCoefficients } from './explicit-sum';
import type { Polynomial } from './polynomial';

/** Roots closer than this to each other, relative to the largest, are not told apart. */
const SEPARATION = 1e-4;

/** Bits beyond those asked for, against the growth of errors through the value at a root. */
const GUARD = 64;

/**
 * The a_j of a monic polynomial product of (n + a_j), each as an exact dyadic number within 2^-bits, by Newton's
 * iteration from approximate roots. Null where roots lie too close together or a coefficient has no value.
 */
export function polynomialRoots(q: Polynomial, bits: number): Form[] | null {
  if (q.length === 2) return [q[0] as Form];
  const working = bits + GUARD;
  const coefficients = fixedCoefficients(q, working);
  if (coefficients === null) return null;
  const starts = complexRoots(
    coefficients.map(({ re, im }) => ({ re: numberFromFixed(re, working), im: numberFromFixed(im, working) })),
  );
  const largest = Math.max(...starts.map(({ re, im }) => Math.hypot(re, im)));
  const close = starts.some((z, k) =>
    starts.slice(k + 1).some((w) => Math.hypot(z.re - w.re, z.im - w.im) < SEPARATION * largest),
  );
  if (close) return null;
  const roots: Form[] = [];
  for (const start of starts) {
    const root = polish(
      coefficients,
      { re: fixedFromNumber(start.re, working), im: fixedFromNumber(start.im, working) },
      working,
    );
    if (root === null) return null;
    const unit = 1n << BigInt(working);
    roots.push(Form.gaussian(Gaussian.of(Rational.of(-root.re, unit), Rational.of(-root.im, unit))));
  }
  return roots;
}

/** Newton steps double the digits: from 40 bits, so many suffice for any precision in use. */
const STEPS = 24;

function polish(coefficients: readonly FixedComplex[], start: FixedComplex, working: number): FixedComplex | null {
  let z = start;
  for (let step = 0; step < STEPS; step++) {
    let value = zeroComplex;
    let slope = zeroComplex;
    for (let k = coefficients.length - 1; k >= 0; k--) {
      slope = addComplex(multiplyComplex(slope, z, working), value);
      value = addComplex(multiplyComplex(value, z, working), coefficients[k] as FixedComplex);
    }
    if (slope.re === 0n && slope.im === 0n) return null;
    const by = divideComplex(value, slope, working);
    z = { re: z.re - by.re, im: z.im - by.im };
    if (bitLength(absoluteComplex(by)) < GUARD / 2) return z;
  }
  return null;
}
