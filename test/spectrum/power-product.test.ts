import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { type FixedComplex, logComplex } from '../../engine/arithmetic/fixed-complex';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { hurwitzZetaDerivative } from '../../engine/functions/hurwitz-derivative';
import { hurwitzTail } from '../../engine/spectrum/hurwitz-tail';
import { evaluatePolynomial, type Polynomial } from '../../engine/spectrum/polynomial';
import { risingPolynomial, sumOfLogarithms } from '../../engine/spectrum/power-product';

const BITS = 160;

const coefficients = fc.array(fc.integer({ min: -9, max: 9 }), { minLength: 1, maxLength: 5 });
const part = fc.integer({ min: -(10 ** 9), max: 10 ** 9 });
const numbers = fc.array(
  fc.tuple(part, fc.oneof(fc.constant(0), part)).filter(([re, im]) => re !== 0 || im !== 0),
  { minLength: 1, maxLength: 30 },
);

function polynomial(values: readonly number[], denominator: number): Polynomial {
  return values.map((c) => Form.ratio(c, denominator));
}

function fixed(x: number): bigint {
  return (BigInt(x) << BigInt(BITS)) / 10_000_000n;
}

describe('logarithms multiplied out', () => {
  test('agree with the sum logarithm by logarithm within the error stated', () => {
    fc.assert(
      fc.property(coefficients, numbers, fc.integer({ min: -5, max: 5 }), (values, points, from) => {
        const multiplicity = polynomial(values, 6);
        const z = points.map(([re, im]): FixedComplex => ({ re: fixed(re), im: fixed(im) }));
        const rising = risingPolynomial(multiplicity, from);
        const found = rising && sumOfLogarithms(z, rising, BITS, () => 0);
        if (!found) throw new Error('no sum');
        let re = 0n;
        let im = 0n;
        for (const [j, number] of z.entries()) {
          const times = evaluatePolynomial(multiplicity, Form.number(from + j)).scale(6);
          const m = times.toRational()?.numerator ?? 0n;
          const logarithm = logComplex(number, BITS);
          re += m * logarithm.re;
          im += m * logarithm.im;
        }
        const gap = Math.max(Math.abs(Number(found.value.re - re / 6n)), Math.abs(Number(found.value.im - im / 6n)));
        // The other sum has one unit a logarithm.
        expect(gap).toBeLessThanOrEqual(found.error + z.length * 1e4);
      }),
    );
  });

  test('has no rising polynomial for multiplicities that are not rational', () => {
    expect(risingPolynomial([Form.call('sqrt', Form.number(2))], 0)).toBeNull();
  });
});

describe('zeta derivatives of one point in one pass', () => {
  test('agree with each of them from further out', () => {
    fc.assert(
      fc.property(
        coefficients,
        fc.integer({ min: 30, max: 60 }),
        fc.integer({ min: -20, max: 20 }),
        (values, re, im) => {
          const at = { re: BigInt(re) << BigInt(BITS), im: BigInt(im) << BigInt(BITS) };
          const c = values.map((value) => ({ re: BigInt(value) << BigInt(BITS), im: 0n }));
          const found = hurwitzTail(c, at, BITS);
          let sum = { re: 0n, im: 0n };
          let slip = 0n;
          for (const [k, value] of values.entries()) {
            const { value: derivative, error } = hurwitzZetaDerivative(k, at, BITS);
            sum = { re: sum.re + BigInt(value) * derivative.re, im: sum.im + BigInt(value) * derivative.im };
            slip += BigInt(Math.abs(value)) * error;
          }
          const gap = Math.hypot(Number(found.value.re - sum.re), Number(found.value.im - sum.im));
          expect(gap).toBeLessThanOrEqual(found.error + Number(slip));
          expect(numberFromFixed(BigInt(Math.ceil(found.error)), BITS)).toBeLessThan(1e-30);
        },
      ),
    );
  });

  test("zeta'(-1, 40) of mpmath 1.3.0", () => {
    // mpmath.zeta(-1, 40, derivative=1), mp.dps = 30.
    const unit = 1n << BigInt(BITS);
    const { value } = hurwitzTail(
      [
        { re: 0n, im: 0n },
        { re: unit, im: 0n },
      ],
      { re: 40n * unit, im: 0n },
      BITS,
    );
    const expected = Rational.parse('2477.716715031357885716321142') as Rational;
    expect(numberFromFixed(value.re - (expected.numerator * unit) / expected.denominator, BITS)).toBeCloseTo(0, 24);
  });
});
