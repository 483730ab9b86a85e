import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import type { Estimate } from '../functions/euler-maclaurin';
import { logarithmOf } from './anomaly';
import type { Run } from './expansion';
import { isFailure, linearSum, type SumFailure } from './linear-sum';
import type { ModeClass, Pairing } from './pairing';
import type { Polynomial } from './polynomial';
import { rootlessSum } from './rootless-sum';
import { severalSum } from './several-sum';
import { estimateOf, scaleEstimate, sumOf } from './total';

/**
 * log det by factors of a paired spectrum: linear classes and quadratic ones by Hurwitz zeta functions, other
 * polynomials without their roots, several indices by multiple gamma functions, and the constants taken out.
 */
export function factorValue(pairing: Pairing, bits: number): Estimate | SumFailure {
  const parts: Estimate[] = [];
  for (const found of pairing.classes) {
    for (const stretch of found.left) {
      const value = classValue(found, stretch, bits);
      if (isFailure(value)) return value;
      parts.push(value);
    }
  }
  for (const { periods, left } of pairing.several) {
    for (const { shift, multiplicity } of left) {
      const value = severalSum(shift, periods, multiplicity, bits);
      if (isFailure(value)) return value;
      parts.push(value);
    }
  }
  for (const { base, exponent } of pairing.constants) {
    const logarithm = estimateOf(logarithmOf(base), bits + 32);
    const factor = estimateOf(exponent, bits + 32);
    if (logarithm === null || factor === null) return 'spectrum-undefined';
    parts.push(fewerBits(scaleEstimate(logarithm, factor, bits + 32), 32));
  }
  return sumOf(parts);
}

function classValue(
  { polynomial }: ModeClass,
  stretch: ModeClass['left'][number],
  bits: number,
): Estimate | SumFailure {
  const { from, to, multiplicity } = stretch;
  if (polynomial.length === 2) return linearSum(polynomial[0] as Form, multiplicity, stretch, bits);
  if (polynomial.length === 3) return quadraticSum(polynomial, multiplicity, stretch, bits);
  if (to === null) return rootlessSum(polynomial, multiplicity, { from, to }, bits, 'factors');
  const below = rootlessSum(polynomial, multiplicity, { from, to: null }, bits, 'factors');
  const above = rootlessSum(polynomial, multiplicity, { from: to + 1, to: null }, bits, 'factors');
  if (isFailure(below)) return below;
  return isFailure(above) ? above : sumOf([below, negative(above)]);
}

/**
 * (nu + a)(nu + a') with a, a' = h +- sqrt(h^2 - c): the sums of both linear factors; of complex conjugates one is
 * enough.
 */
function quadraticSum(
  [c = Form.zero, twice = Form.zero]: Polynomial,
  multiplicity: Polynomial,
  run: Run,
  bits: number,
): Estimate | SumFailure {
  const half = twice.scale(Rational.of(1, 2));
  const discriminant = half.mul(half).sub(c);
  const root = Form.call('sqrt', discriminant);
  const first = linearSum(half.add(root), multiplicity, run, bits);
  if (isFailure(first)) return first;
  const rational = [twice, ...multiplicity].every((form) => form.toRational() !== null);
  if (rational && discriminant.toRational()?.sign() === -1) {
    return { value: { re: 2n * first.value.re, im: 0n }, error: 2n * first.error };
  }
  const second = linearSum(half.sub(root), multiplicity, run, bits);
  return isFailure(second) ? second : sumOf([first, second]);
}

export function negative({ value, error }: Estimate): Estimate {
  return { value: { re: -value.re, im: -value.im }, error };
}

export function fewerBits({ value, error }: Estimate, drop: number): Estimate {
  const by = BigInt(drop);
  return { value: { re: value.re >> by, im: value.im >> by }, error: (error >> by) + 2n };
}
