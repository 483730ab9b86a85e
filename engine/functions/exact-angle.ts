import { Form } from '../exact/form';
import { Rational } from '../exact/rational';

/** 2 cos(pi q) for q = 0, 1/6, 1/4, 1/3 (DLMF 4.17). */
const TWICE_COSINE: readonly (readonly [Rational, Form])[] = [
  [Rational.zero, Form.number(2)],
  [Rational.of(1, 6), Form.call('sqrt', Form.number(3))],
  [Rational.of(1, 4), Form.call('sqrt', Form.number(2))],
  [Rational.of(1, 3), Form.one],
];

/** 2 cos(pi q) where it is a rational or a quadratic irrational with a short form, for 0 <= q < 1/2; else null. */
export function twiceCosine(q: Rational): Form | null {
  return TWICE_COSINE.find(([angle]) => angle.equals(q))?.[1] ?? null;
}

/** q for the argument i q; null when the argument is not of that form. */
export function imaginaryPart(argument: Form): Rational | null {
  const value = argument.toGaussian();
  return value?.re.isZero() ? value.im : null;
}
