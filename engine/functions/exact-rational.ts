import type { Rational } from '../exact/rational';
import type { ExactParameter } from './special-function';

/** The argument as an exact rational number; null where it is none, or not known to be one. */
export function exactRational({ square, approx }: ExactParameter): Rational | null {
  if (square === null || approx.im !== 0) return null;
  const size = square.sqrt();
  return size && approx.re < 0 ? size.neg() : size;
}
