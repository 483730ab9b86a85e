import { fixedFromNumber, numberFromFixed } from '../../engine/arithmetic/fixed';
import type { FixedComplex } from '../../engine/arithmetic/fixed-complex';
import { piFixed } from '../../engine/arithmetic/fixed-constants';
import { formDouble } from '../../engine/arithmetic/form-double';
import { formFixed } from '../../engine/arithmetic/form-fixed';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import type { ExactParameter, PreciseLog } from '../../engine/functions/special-function';

/** A decimal text as fixed point, rounded to nearest. */
export function fixedFromText(text: string, bits: number): bigint {
  const value = Rational.parse(text);
  if (!value) throw new Error(`Not a decimal number: ${text}`);
  return ((value.numerator << BigInt(bits + 1)) / value.denominator + 1n) >> 1n;
}

/** A pair of doubles as fixed point; exact when there are bits enough. */
export function fixedComplex(re: number, im: number, bits: number): FixedComplex {
  return { re: fixedFromNumber(re, bits), im: fixedFromNumber(im, bits) };
}

/** A form as a parameter of the precise tier. */
export function exactParameter(form: Form): ExactParameter {
  return {
    square: form.mul(form).toRational(),
    overPi: form.div(Form.pi).toRational(),
    value: (bits) => formFixed(form, bits) ?? { re: 0n, im: 0n },
    approx: formDouble(form, () => null) ?? { re: Number.NaN, im: Number.NaN },
  };
}

/** |log - wanted| in units of 2^-bits; imaginary parts may differ by a multiple of 2 pi when `modulo` is set. */
export function unitsOff(log: PreciseLog, wanted: FixedComplex, bits: number, modulo = false): number {
  if (log.kind !== 'value') throw new Error(`No value: ${log.kind}`);
  let im = log.im - wanted.im;
  if (modulo) {
    const turn = 2n * piFixed(bits + 64);
    const turns = BigInt(Math.round(numberFromFixed(im, bits) / (2 * Math.PI)));
    im -= (turns * turn) >> 64n;
  }
  return Math.hypot(Number(log.re - wanted.re), Number(im));
}

/** A double, exactly, as a parameter of the precise tier. */
export function parameterOfDouble(value: number): ExactParameter {
  const exact = Rational.of(fixedFromNumber(value, 1100), 1n << 1100n);
  return {
    square: exact.mul(exact),
    value: (bits) => ({ re: fixedFromNumber(value, bits), im: 0n }),
    approx: { re: value, im: 0 },
  };
}
