import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type DoubleValue, formDouble } from '../../engine/arithmetic/form-double';
import { Form, FormTooLargeError } from '../../engine/exact/form';
import { Gaussian } from '../../engine/exact/gaussian';
import { Rational } from '../../engine/exact/rational';
import { anyForm, anyGaussian, anyMonomial, anyPolynomial, anyRational } from './forms';

const a = Form.symbol('a');
const b = Form.symbol('b');
const number = (n: number, d = 1) => Form.ratio(n, d);
const sqrt = (x: Form) => Form.call('sqrt', x);

/** Symbols at positive doubles, where all the functions of the generators are far from their cuts. */
const POINT: Readonly<Record<string, DoubleValue>> = {
  a: { re: 0.7, im: 0 },
  b: { re: 1.3, im: 0 },
  c: { re: 0.4, im: 0 },
};

function doubleOf(form: Form): DoubleValue {
  const value = formDouble(form, (name) => POINT[name] ?? null);
  if (value === null) throw new Error(`${form} has no value`);
  return value;
}

function expectClose(x: DoubleValue, y: DoubleValue, size: number): void {
  expect(Math.hypot(x.re - y.re, x.im - y.im)).toBeLessThanOrEqual(1e-11 * size);
}

const norm = ({ re, im }: DoubleValue) => Math.hypot(re, im);

describe('ring laws, by the normal form', () => {
  test('sums and products', () => {
    fc.assert(
      fc.property(anyForm, anyForm, anyForm, (x, y, z) => {
        expect(x.add(y).key).toBe(y.add(x).key);
        expect(x.mul(y).key).toBe(y.mul(x).key);
        expect(x.add(y).add(z).key).toBe(x.add(y.add(z)).key);
        expect(x.mul(y).mul(z).key).toBe(x.mul(y.mul(z)).key);
        expect(x.mul(y.add(z)).key).toBe(x.mul(y).add(x.mul(z)).key);
        expect(x.sub(x).isZero()).toBe(true);
        expect(x.mul(Form.one).key).toBe(x.key);
        expect(x.add(Form.zero).key).toBe(x.key);
        expect(x.mul(Form.zero).isZero()).toBe(true);
      }),
      { numRuns: 60 },
    );
  });

  test('sum of many is the sum of two at a time, in any order', () => {
    fc.assert(
      fc.property(fc.array(anyForm, { maxLength: 5 }), (forms) => {
        const expected = forms.reduce((sum, form) => sum.add(form), Form.zero);
        expect(Form.sum(forms).key).toBe(expected.key);
        expect(Form.sum([...forms].reverse()).key).toBe(expected.key);
      }),
      { numRuns: 40 },
    );
  });

  test('numbers act as factors', () => {
    fc.assert(
      fc.property(anyForm, anyGaussian, (x, g) => {
        expect(x.scale(g).key).toBe(x.mul(Form.gaussian(g)).key);
        expect(x.neg().key).toBe(x.scale(-1).key);
      }),
    );
  });

  test('powers', () => {
    fc.assert(
      fc.property(anyForm, fc.integer({ min: 0, max: 3 }), fc.integer({ min: 0, max: 3 }), (x, m, n) => {
        expect(x.pow(m).mul(x.pow(n)).key).toBe(x.pow(m + n).key);
      }),
      { numRuns: 30 },
    );
  });

  test('a single term has an exact inverse', () => {
    fc.assert(
      fc.property(anyMonomial, anyForm, (x, y) => {
        expect(x.mul(x.inverse()).key).toBe('1');
        expect(x.inverse().inverse().key).toBe(x.key);
        expect(y.mul(x).div(x).key).toBe(y.key);
        expect(x.pow(-2).mul(x).mul(x).key).toBe('1');
      }),
    );
  });

  // The factors left when a root leaves a product were once in the order of writing, so that equal forms differed.
  test('the order of factors does not depend on the way to them', () => {
    const r = sqrt(number(2));
    const c = Form.symbol('c');
    expect(c.mul(r).mul(a.inverse()).mul(r).key).toBe('2*a^-1*c');
    expect(r.mul(c).mul(a).mul(r).sub(a.mul(c).scale(2)).isZero()).toBe(true);
  });

  // The laws above compare keys; a key that forgot a coefficient or a power would let all of them pass.
  test('different forms have different keys', () => {
    fc.assert(
      fc.property(anyForm, anyForm, (x, y) => {
        const distance = norm(doubleOf(x.sub(y)));
        if (distance > 1e-9) expect(x.equals(y)).toBe(false);
        if (x.equals(y)) expect(distance).toBeLessThan(1e-9);
      }),
    );
    expect(a.equals(a.pow(2))).toBe(false);
    expect(a.equals(b)).toBe(false);
    expect(a.scale(2).equals(a.scale(3))).toBe(false);
  });
});

describe('values', () => {
  test('sums, products and inverses have the values of sums, products and inverses', () => {
    fc.assert(
      fc.property(anyForm, anyForm, (x, y) => {
        const [p, q] = [doubleOf(x), doubleOf(y)];
        const size = 1 + (1 + norm(p)) * (1 + norm(q)) * 100;
        expectClose(doubleOf(x.add(y)), { re: p.re + q.re, im: p.im + q.im }, size);
        expectClose(doubleOf(x.mul(y)), { re: p.re * q.re - p.im * q.im, im: p.re * q.im + p.im * q.re }, size);
        if (norm(p) < 1e-3) return;
        const square = p.re ** 2 + p.im ** 2;
        expectClose(doubleOf(x.inverse()), { re: p.re / square, im: -p.im / square }, 1 + 1e5 / norm(p));
      }),
    );
  });

  test('the inverse of zero is refused', () => {
    expect(() => Form.zero.inverse()).toThrow(RangeError);
    expect(() => a.div(a.sub(a))).toThrow(RangeError);
  });

  test('exact numbers come back', () => {
    fc.assert(
      fc.property(anyGaussian, anyRational, (g, q) => {
        expect(Form.gaussian(g).toGaussian()?.equals(g)).toBe(true);
        expect(Form.number(q).toRational()?.equals(q)).toBe(true);
        expect(Form.gaussian(g).add(a).toGaussian()).toBeNull();
      }),
    );
    expect(Form.zero.toRational()?.isZero()).toBe(true);
    expect(Form.i.toRational()).toBeNull();
    expect(Form.pi.toGaussian()).toBeNull();
  });
});

describe('substitution', () => {
  const values: fc.Arbitrary<(name: string) => Form | null> = fc.tuple(anyPolynomial, anyPolynomial).map(
    ([x, y]) =>
      (name: string) =>
        name === 'a' ? x : name === 'b' ? y : null,
  );

  test('is a homomorphism', () => {
    fc.assert(
      fc.property(anyPolynomial, anyPolynomial, values, (x, y, at) => {
        expect(x.mul(y).substitute(at).key).toBe(x.substitute(at).mul(y.substitute(at)).key);
        expect(x.add(y).substitute(at).key).toBe(x.substitute(at).add(y.substitute(at)).key);
      }),
      { numRuns: 60 },
    );
  });

  test('replaces all at once, so that names can be exchanged', () => {
    const exchange = (name: string) => (name === 'a' ? b : name === 'b' ? a : null);
    fc.assert(
      fc.property(anyForm, (x) => {
        expect(x.substitute(exchange).substitute(exchange).key).toBe(x.key);
      }),
    );
    expect(a.sub(b).substitute(exchange).key).toBe(b.sub(a).key);
  });

  test('reaches into functions, where exact values are found', () => {
    const x = Form.call('exp', a.sub(b)).add(sqrt(a.add(b)));
    const at = (name: string) => (name === 'a' || name === 'b' ? number(2) : null);
    expect(x.substitute(at).key).toBe('3');
  });

  test('agrees with putting the numbers in', () => {
    const exact = (name: string) => {
      const value = POINT[name];
      return value ? Form.number(Rational.parse(`${value.re}`) as Rational) : null;
    };
    fc.assert(
      fc.property(anyForm, (x) => {
        const value = doubleOf(x);
        expectClose(doubleOf(x.substitute(exact)), value, 1e3 * (1 + norm(value)));
        expect(x.substitute(exact).symbols()).toEqual([]);
      }),
    );
  });

  test('leaves a form without the name as it is', () => {
    const x = a.add(Form.pi);
    expect(x.substitute(() => null)).toBe(x);
    expect(x.substitute((name) => (name === 'c' ? a : null))).toBe(x);
  });
});

describe('roots', () => {
  test('the square of a root is its radicand', () => {
    fc.assert(
      fc.property(anyRational, (q) => {
        const root = sqrt(Form.number(q));
        expect(root.mul(root).key).toBe(Form.number(q).key);
        expect(root.pow(2).key).toBe(Form.number(q).key);
        if (!q.isZero()) expect(root.pow(-2).key).toBe(Form.number(q).inverse().key);
      }),
    );
  });

  test('so it is for single terms, while roots of sums stay', () => {
    const [x, y] = [Form.symbol('x'), Form.symbol('y')];
    expect(sqrt(x.div(y)).pow(2).key).toBe(x.div(y).key);
    expect(sqrt(x).pow(-1).key).toBe(sqrt(x).div(x).key);
    expect(sqrt(x).mul(sqrt(y)).div(sqrt(x)).key).toBe(sqrt(y).key);
    expect(sqrt(x.add(y)).pow(2).symbols()).toEqual(['x', 'y']);
  });

  test.each([
    [8, 1, '2*sqrt(2)'],
    [1, 2, '1/2*sqrt(2)'],
    [12, 25, '2/5*sqrt(3)'],
    [9, 4, '3/2'],
    [-4, 1, '2*i'],
    [-2, 1, '1*i*sqrt(2)'],
  ])('sqrt(%d/%d) is %s', (n, d, expected) => {
    expect(sqrt(number(n, d)).key).toBe(expected);
  });

  test('a quadratic field has one normal form', () => {
    const r = sqrt(number(2));
    // (1 + r)(1 - r) = -1; (3 + 2r) = (1 + r)^2; 1/r = r/2.
    expect(Form.one.add(r).mul(Form.one.sub(r)).key).toBe('-1');
    expect(Form.one.add(r).pow(2).key).toBe(number(3).add(r.scale(2)).key);
    expect(r.inverse().key).toBe(r.scale(Rational.of(1, 2)).key);
    expect(r.pow(5).key).toBe(r.scale(4).key);
    expect(r.mul(a).mul(r).key).toBe(a.scale(2).key);
  });

  test('values', () => {
    fc.assert(
      fc.property(anyRational, (q) => {
        fc.pre(Math.abs(q.toNumber()) < 1e6);
        const value = doubleOf(sqrt(Form.number(q)));
        const size = Math.sqrt(Math.abs(q.toNumber()));
        expectClose(value, q.sign() < 0 ? { re: 0, im: size } : { re: size, im: 0 }, 1 + size);
      }),
    );
  });
});

describe('exact values of functions', () => {
  const zero = Form.zero;
  test.each([
    ['exp', zero, '1'],
    ['cos', zero, '1'],
    ['cosh', zero, '1'],
    ['sin', zero, '0'],
    ['sinh', zero, '0'],
    ['tan', zero, '0'],
    ['tanh', zero, '0'],
    ['sqrt', zero, '0'],
    ['abs', number(-3, 2), '3/2'],
    ['log', Form.one, '0'],
    ['exp', Form.one, '1*e'],
  ] as const)('%s(%s) = %s', (name, argument, expected) => {
    expect(Form.call(name, argument).key).toBe(expected);
  });

  test('powers with integers and halves', () => {
    expect(Form.call('power', a, number(3)).key).toBe(a.pow(3).key);
    expect(Form.call('power', number(8), number(1, 2)).key).toBe('2*sqrt(2)');
    expect(Form.call('power', number(4), number(-3, 2)).key).toBe('1/8');
    expect(doubleOf(Form.call('power', number(2), number(1, 3))).re).toBeCloseTo(Math.cbrt(2), 13);
  });

  test('an inverse is taken where it is exact', () => {
    expect(Form.call('inverse', number(4)).key).toBe('1/4');
    expect(doubleOf(Form.call('inverse', a.add(b))).re).toBeCloseTo(0.5, 14);
  });
});

describe('parts', () => {
  test('the linear part and the rest make up the form', () => {
    fc.assert(
      fc.property(anyForm, (x) => {
        const { coefficient, rest } = x.linearPart('a');
        expect(coefficient.mul(a).add(rest).key).toBe(x.key);
        expect(rest.linearPart('a').coefficient.isZero()).toBe(true);
      }),
    );
    const { coefficient, rest } = a.mul(b).add(a.pow(2)).add(Form.one).linearPart('a');
    expect([coefficient.key, rest.key]).toEqual([b.key, a.pow(2).add(Form.one).key]);
  });

  test('the terms make up the form', () => {
    fc.assert(
      fc.property(anyForm, (x) => {
        expect(Form.sum(x.split()).key).toBe(x.key);
        expect(x.split().every((term) => term.terms.length === 1)).toBe(true);
      }),
    );
  });

  test('symbols are found inside functions too, sorted', () => {
    const x = Form.call('exp', b)
      .add(Form.call('inverse', a.add(Form.pi)))
      .add(Form.symbol('@w'));
    expect(x.symbols()).toEqual(['@w', 'a', 'b']);
    expect(number(3).symbols()).toEqual([]);
  });
});

describe('conjugation', () => {
  test('is an automorphism of order two', () => {
    fc.assert(
      fc.property(anyForm, anyForm, (x, y) => {
        expect(x.conjugate().conjugate().key).toBe(x.key);
        expect(x.mul(y).conjugate().key).toBe(x.conjugate().mul(y.conjugate()).key);
        expect(x.add(y).conjugate().key).toBe(x.conjugate().add(y.conjugate()).key);
      }),
      { numRuns: 60 },
    );
  });

  test('the value is the conjugate of the value', () => {
    fc.assert(
      fc.property(anyForm, (x) => {
        const { re, im } = doubleOf(x);
        expectClose(doubleOf(x.conjugate()), { re, im: -im }, 1 + Math.hypot(re, im));
      }),
    );
    expect(Form.i.conjugate().key).toBe(Form.i.neg().key);
    expect(Form.call('exp', Form.i.mul(a)).conjugate().key).toBe(Form.call('exp', Form.i.mul(a).neg()).key);
  });
});

describe('limits', () => {
  const many = (stem: string) => Form.sum(Array.from({ length: 65 }, (_, k) => Form.symbol(`${stem}${k}`)));

  test('a product of more terms than any formula has is refused', () => {
    expect(() => many('x').mul(many('y'))).toThrow(FormTooLargeError);
    expect(many('x').mul(Form.sum(many('y').split().slice(0, 63))).terms.length).toBe(65 * 63);
  });

  test('so is such a sum', () => {
    const long = many('x').mul(Form.sum(many('y').split().slice(0, 63)));
    expect(() => Form.sum([long, many('z')])).toThrow(FormTooLargeError);
  });

  test('large exponents stay functions', () => {
    expect(Form.call('power', a, number(256)).key).toBe('1*a^256');
    expect(Form.call('power', a, number(257)).key).toBe('1*power(1*a, 257)');
    expect(Form.call('power', Form.gaussian(Gaussian.of(2)), number(1000)).toRational()).toBeNull();
  });
});
