import type { Form } from '../exact/form';
import type { Estimate } from '../functions/euler-maclaurin';
import { logarithmOf } from './anomaly';
import { isFailure, linearSum, type SumFailure } from './linear-sum';
import type { ModeClass, Pairing } from './pairing';
import { rootlessSum } from './rootless-sum';
import { severalSum } from './several-sum';
import { estimateOf, scaleEstimate, sumOf } from './total';

/**
 * log det by factors of a paired spectrum: linear classes by Hurwitz zeta functions, other polynomials without their
 * roots, several indices by multiple gamma functions, and the constants taken out.
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
  if (to === null) return rootlessSum(polynomial, multiplicity, { from, to }, bits, 'factors');
  const below = rootlessSum(polynomial, multiplicity, { from, to: null }, bits, 'factors');
  const above = rootlessSum(polynomial, multiplicity, { from: to + 1, to: null }, bits, 'factors');
  if (isFailure(below)) return below;
  return isFailure(above) ? above : sumOf([below, negative(above)]);
}

export function negative({ value, error }: Estimate): Estimate {
  return { value: { re: -value.re, im: -value.im }, error };
}

export function fewerBits({ value, error }: Estimate, drop: number): Estimate {
  const by = BigInt(drop);
  return { value: { re: value.re >> by, im: value.im >> by }, error: (error >> by) + 2n };
}
