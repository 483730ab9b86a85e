// Sources: identities of elementary algebra, checked by multiplying back; the examples are our own.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { factorise } from '../../engine/spectrum/factorise';
import { exactQuotient, exactSquareRoot } from '../../engine/spectrum/form-division';
import {
  addPolynomials,
  binomialCoefficients,
  evaluatePolynomial,
  multiplyPolynomials,
  type Polynomial,
  polynomialIn,
  risingBinomial,
  samePolynomial,
  scalePolynomial,
  shiftPolynomial,
} from '../../engine/spectrum/polynomial';

const a = Form.symbol('a');
const b = Form.symbol('b');
const n = Form.symbol('n');
const number = (value: number, over = 1) => Form.ratio(value, over);
const linear = (shift: Form): Polynomial => [shift, Form.one];

function multiplyBack(p: Polynomial): Polynomial {
  const { leading, linear: factors, irreducible } = factorise(p);
  let product: Polynomial = [leading];
  for (const { shift, power } of factors) {
    for (let k = 0; k < power; k++) product = multiplyPolynomials(product, linear(shift));
  }
  for (const { polynomial, power } of irreducible) {
    for (let k = 0; k < power; k++) product = multiplyPolynomials(product, polynomial);
  }
  return product;
}

const shiftsOf = (p: Polynomial) =>
  factorise(p)
    .linear.flatMap(({ shift, power }) => Array.from({ length: power }, () => shift.key))
    .sort();

describe('division and roots of forms', () => {
  test('square roots of squares', () => {
    const g = a
      .add(b.scale(3))
      .sub(number(1, 2))
      .add(Form.i.mul(a.mul(b)));
    const root = exactSquareRoot(g.mul(g)) as Form;
    expect(root.mul(root).key).toBe(g.mul(g).key);
    expect(exactSquareRoot(a.mul(a).scale(-4))?.key).toBe(a.mul(Form.i).scale(2).key);
    expect(exactSquareRoot(a.mul(a).add(Form.one))).toBeNull();
    expect(exactSquareRoot(number(2))).toBeNull();
  });
  test('exact quotients', () => {
    const g = a.add(b.inverse());
    const h = a.sub(b).add(Form.one);
    expect(exactQuotient(g.mul(h), h)?.key).toBe(g.key);
    expect(exactQuotient(g.mul(h).add(Form.one), h)).toBeNull();
  });
});

describe('factorisation', () => {
  test('rational, Gaussian and repeated roots', () => {
    const p = [
      linear(number(1, 2)),
      linear(number(1, 2)),
      linear(number(-3)),
      linear(Form.i),
      linear(Form.i.neg()),
    ].reduce(multiplyPolynomials);
    expect(shiftsOf(p)).toEqual(['1/2', '1/2', '-3', '1*i', '-1*i'].sort());
    expect(samePolynomial(multiplyBack(p), p)).toBe(true);
  });
  test('n^2 + a^2 splits into n + ia and n - ia', () => {
    const p = polynomialIn(n.mul(n).add(a.mul(a)), 'n') as Polynomial;
    expect(shiftsOf(p)).toEqual([Form.i.mul(a).key, Form.i.mul(a).neg().key].sort());
  });
  test('a cubic with roots affine in two parameters', () => {
    const p = [linear(a.add(b).add(number(1, 2))), linear(a.sub(b.scale(2))), linear(number(3))].reduce(
      multiplyPolynomials,
    );
    expect(factorise(p).linear).toHaveLength(3);
    expect(samePolynomial(multiplyBack(p), p)).toBe(true);
  });
  test('irreducible polynomials stay whole, products of quadratics split', () => {
    const quadratic = [number(1), number(1), Form.one];
    expect(factorise(quadratic).irreducible).toHaveLength(1);
    expect(factorise([number(1), number(1), number(0), Form.one]).irreducible).toHaveLength(1);
    const quartic = multiplyPolynomials(quadratic, [number(1), number(-1), Form.one]);
    expect(factorise(quartic).irreducible).toHaveLength(2);
    expect(factorise([a, Form.zero, Form.one]).irreducible).toHaveLength(1);
  });
  test('a leading coefficient is taken out', () => {
    const p = multiplyPolynomials([Form.one, number(2)], [a, b]);
    const { leading, linear: factors } = factorise(p);
    expect(leading.key).toBe(b.scale(2).key);
    expect(factors.map(({ shift }) => shift.key).sort()).toEqual([a.div(b).key, '1/2'].sort());
  });
  test('random products of linear factors are taken apart and multiply back', () => {
    const root = fc.record({
      num: fc.integer({ min: -9, max: 9 }),
      den: fc.integer({ min: 1, max: 4 }),
      im: fc.integer({ min: -3, max: 3 }),
    });
    fc.assert(
      fc.property(
        fc.uniqueArray(root, { minLength: 1, maxLength: 5, selector: (r) => `${r.num / r.den},${r.im}` }),
        (roots) => {
          const shifts = roots.map(({ num, den, im }) => number(num, den).add(Form.i.scale(im)));
          const p = shifts.map(linear).reduce(multiplyPolynomials);
          expect(shiftsOf(p)).toEqual(shifts.map((s) => s.key).sort());
        },
      ),
      { numRuns: 60 },
    );
  });
});

describe('polynomials', () => {
  test('a name inside a function is no polynomial', () => {
    expect(polynomialIn(Form.call('sqrt', n), 'n')).toBeNull();
    expect(polynomialIn(n.inverse(), 'n')).toBeNull();
    expect(polynomialIn(a.inverse(), 'n')).toHaveLength(1);
  });
  test('shifting is evaluating further on', () => {
    const p = [number(1, 3), a, number(-2), Form.one];
    const shifted = shiftPolynomial(p, number(5, 2));
    for (const at of [0, 1, 4]) {
      const direct = evaluatePolynomial(p, number(at).add(number(5, 2)));
      expect(evaluatePolynomial(shifted, number(at)).key).toBe(direct.key);
    }
  });
  test('binomial coefficients add up to the polynomial', () => {
    const p = [number(2), number(7, 6), number(0), number(1, 3)];
    const sum = binomialCoefficients(p)
      .map((q, m) => scalePolynomial(risingBinomial(m), q))
      .reduce(addPolynomials);
    expect(samePolynomial(sum, p)).toBe(true);
    expect(evaluatePolynomial(risingBinomial(3), number(4)).toRational()?.equals(Rational.of(35))).toBe(true);
  });
});
