import { shiftRounded } from '../arithmetic/fixed';
import { divideComplex, oneComplex } from '../arithmetic/fixed-complex';
import { Rational } from '../exact/rational';
import type { ExactParameter } from './special-function';

/** 1/b as a parameter; b is not 0. */
export function inverseParameter(b: ExactParameter): ExactParameter {
  const { re, im } = b.approx;
  const norm = re * re + im * im;
  // A unit of b makes |b|^-2 units of 1/b.
  const guard = 4 + Math.max(0, Math.ceil(-Math.log2(norm)));
  return {
    square: b.square === null ? null : Rational.one.div(b.square),
    value: (bits) => {
      const quotient = divideComplex(oneComplex(bits + guard), b.value(bits + guard), bits + guard);
      return { re: shiftRounded(quotient.re, guard), im: shiftRounded(quotient.im, guard) };
    },
    approx: { re: re / norm, im: im === 0 ? 0 : -im / norm },
  };
}
