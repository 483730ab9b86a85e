import Decimal from 'decimal.js';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { gcd, integerRoot, Rational } from '../../engine/exact/rational';
import { anyRational } from './forms';

// Outside references: BigInt division for exact facts, decimal.js for decimal text and doubles.
const Wide = Decimal.clone({ precision: 60, maxE: 9e15, minE: -9e15 });

/** The same number for decimal.js. */
function decimal({ numerator, denominator }: Rational): Decimal {
  return new Wide(numerator.toString()).div(denominator.toString());
}

describe('field laws', () => {
  test('sums, products and their inverses', () => {
    fc.assert(
      fc.property(anyRational, anyRational, anyRational, (a, b, c) => {
        expect(a.add(b).equals(b.add(a))).toBe(true);
        expect(a.mul(b).equals(b.mul(a))).toBe(true);
        expect(
          a
            .add(b)
            .add(c)
            .equals(a.add(b.add(c))),
        ).toBe(true);
        expect(
          a
            .mul(b)
            .mul(c)
            .equals(a.mul(b.mul(c))),
        ).toBe(true);
        expect(a.mul(b.add(c)).equals(a.mul(b).add(a.mul(c)))).toBe(true);
        expect(a.sub(b).add(b).equals(a)).toBe(true);
        expect(a.add(a.neg()).isZero()).toBe(true);
        if (!b.isZero()) expect(a.div(b).mul(b).equals(a)).toBe(true);
      }),
    );
  });

  test('numbers agree with decimal.js', () => {
    const close = (x: Decimal, y: Decimal) => x.minus(y).abs().lte(x.abs().plus(y.abs()).times('1e-50'));
    fc.assert(
      fc.property(anyRational, anyRational, (a, b) => {
        // Decimals have sixty digits: no more than five may cancel in the sum.
        fc.pre(decimal(a.add(b)).abs().gt(decimal(a).abs().times('1e-5')));
        expect(close(decimal(a.add(b)), decimal(a).plus(decimal(b)))).toBe(true);
        expect(close(decimal(a.mul(b)), decimal(a).mul(decimal(b)))).toBe(true);
        expect(a.compare(b)).toBe(decimal(a).comparedTo(decimal(b)));
        expect(a.floor()).toBe(BigInt(decimal(a).floor().toFixed()));
        expect(a.sign()).toBe(decimal(a).comparedTo(0));
      }),
    );
  });

  test('powers are repeated products', () => {
    fc.assert(
      fc.property(anyRational, fc.integer({ min: 0, max: 9 }), (a, n) => {
        const product = Array.from({ length: n }, () => a).reduce((x, y) => x.mul(y), Rational.one);
        expect(a.pow(n).equals(product)).toBe(true);
        if (!a.isZero()) expect(a.pow(-n).mul(product).equals(Rational.one)).toBe(true);
      }),
    );
  });
});

test('one number has one form: lowest terms, positive denominator', () => {
  fc.assert(
    fc.property(anyRational, fc.bigInt({ min: -50n, max: 50n }), (a, k) => {
      fc.pre(k !== 0n);
      const same = Rational.of(a.numerator * k, a.denominator * k);
      expect([same.numerator, same.denominator]).toEqual([a.numerator, a.denominator]);
      expect(same.denominator > 0n).toBe(true);
      const size = same.numerator < 0n ? -same.numerator : same.numerator;
      expect(gcd(size, same.denominator)).toBe(1n);
    }),
  );
});

test('zero denominators and fractional numbers are refused', () => {
  expect(() => Rational.of(1, 0)).toThrow(RangeError);
  expect(() => Rational.one.div(Rational.zero)).toThrow(RangeError);
  expect(() => Rational.zero.pow(-1)).toThrow(RangeError);
  expect(() => Rational.of(0.5)).toThrow(RangeError);
});

describe('text', () => {
  test('decimals are read exactly', () => {
    const digits = fc.stringMatching(/^\d{1,8}$/);
    const number = fc.tuple(
      fc.constantFrom('', '-', '+'),
      digits,
      fc.option(digits),
      fc.option(fc.integer({ min: -30, max: 30 })),
    );
    fc.assert(
      fc.property(number, ([sign, whole, part, exponent]) => {
        const text = `${sign}${whole}${part === null ? '' : `.${part}`}${exponent === null ? '' : `e${exponent}`}`;
        const value = Rational.parse(text) as Rational;
        expect(decimal(value).equals(new Wide(text))).toBe(true);
      }),
    );
  });

  test('what is printed is read back', () => {
    fc.assert(
      fc.property(anyRational, (a) => {
        expect(Rational.parse(a.toString())?.equals(a)).toBe(true);
      }),
    );
  });

  test.each(['', '.', '-', '1/0', '1.2.3', '1e', '1e12345', 'e5', '0x10', '1/2/3', ' 1', 'Infinity', '1/-2'])(
    '%j is no number',
    (text) => {
      expect(Rational.parse(text)).toBeNull();
    },
  );
});

describe('roots', () => {
  test('the integer root is the floor of the root', () => {
    fc.assert(
      fc.property(fc.bigInt({ min: 0n, max: 10n ** 60n }), (n) => {
        const root = integerRoot(n);
        expect(root * root <= n && n < (root + 1n) * (root + 1n)).toBe(true);
      }),
    );
  });

  test('a rational root is found exactly where there is one', () => {
    fc.assert(
      fc.property(anyRational, (a) => {
        expect(a.mul(a).sqrt()?.equals(a.abs())).toBe(true);
        const root = a.sqrt();
        if (root !== null) expect(root.mul(root).equals(a)).toBe(true);
        if (a.sign() > 0) expect(a.mul(a).mul(Rational.of(2)).sqrt()).toBeNull();
        if (a.sign() < 0) expect(root).toBeNull();
      }),
    );
  });
});

describe('the nearest double', () => {
  const wide = fc.bigInt({ min: 1n, max: 10n ** 18n });

  /** Numerators and denominators of any two sizes, also far beyond the largest double. */
  test('within two units in the last place, whatever the sizes', () => {
    const power = fc.integer({ min: 0, max: 700 });
    fc.assert(
      fc.property(wide, wide, power, power, (n, d, p, q) => {
        const a = Rational.of(n * 10n ** BigInt(p) + 1n, d * 10n ** BigInt(q) + 1n);
        const wanted = decimal(a);
        const size = wanted.e;
        fc.pre(size > -300 && size < 300);
        const relative = new Wide(a.toNumber()).div(wanted).minus(1).abs();
        expect(relative.lte(2 * 2 ** -52), `${a}: ${a.toNumber()} against ${wanted}`).toBe(true);
      }),
    );
  });

  // One step past 2^1024 above a small denominator: the value itself is an ordinary double.
  test('huge over small', () => {
    expect(Rational.of(10n ** 310n + 1n, 10n ** 5n).toNumber()).toBe(1e305);
    expect(Rational.of(-(10n ** 5n), 10n ** 310n + 1n).toNumber()).toBe(-1e-305);
    expect(Rational.of(10n ** 400n).toNumber()).toBe(Number.POSITIVE_INFINITY);
    expect(Rational.of(1n, 10n ** 400n).toNumber()).toBe(0);
  });
});
