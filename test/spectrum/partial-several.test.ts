// The limit of a product cut off is log det (spectra in several indices: Barnes 1904); examples are our own.
import { describe, expect, test } from 'vitest';
import type { Ball } from '../../engine/arithmetic/ball';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { isRemark } from '../../engine/spectrum/analyse';
import { partialProducts } from '../../engine/spectrum/partial-product';
import { determinant } from '../../engine/spectrum/regularised';
import type { Spectrum, WrittenTower } from '../../engine/spectrum/tower';

const [n, k, l] = ['n', 'k', 'l'].map((name) => Form.symbol(name)) as [Form, Form, Form];
const nowhere = { from: 0, to: 0 };

function spectrum(eigenvalue: readonly Form[], degeneracy: Form, indices: readonly string[], exponent = 1): Spectrum {
  const tower: WrittenTower = {
    kind: 'power',
    exponent: Form.number(exponent),
    eigenvalue: eigenvalue.map((form) => ({ form, power: 1 })),
    degeneracy,
    ranges: indices.map((name) => ({ name, from: Form.zero, to: null, span: nowhere })),
    spans: { row: nowhere, eigenvalue: nowhere, degeneracy: nowhere },
    label: '',
  };
  return { name: 'own', towers: [tower], parameters: new Map() };
}

const unequal = n.add(k.scale(Rational.of(5, 4))).add(Form.ratio(1, 3));
const CASES: readonly (readonly [string, Spectrum, 'factors' | 'operator'])[] = [
  ['unequal periods', spectrum([unequal], Form.one, ['n', 'k']), 'factors'],
  ['a degeneracy', spectrum([unequal], n.add(Form.one).mul(k.add(Form.number(2))), ['n', 'k'], -1), 'factors'],
  ['a scale', spectrum([unequal.scale(3)], Form.one, ['n', 'k']), 'factors'],
  ['a complex shift', spectrum([unequal.add(Form.i)], Form.one, ['n', 'k']), 'factors'],
  ['two factors by operator', spectrum([unequal, unequal.add(Form.one)], Form.one, ['n', 'k']), 'operator'],
  ['three indices', spectrum([unequal.add(l.scale(Rational.of(2, 3)))], Form.one, ['n', 'k', 'l']), 'factors'],
];

function distance(a: Ball, b: Ball): number {
  const part = (x: Ball, z: bigint): number => numberFromFixed(z, x.bits);
  return Math.hypot(part(a, a.re) - part(b, b.re), part(a, a.im) - part(b, b.im));
}

describe.each(CASES)('cut off in every index: %s', (_, own, prescription) => {
  const limit = determinant(own, prescription, new Map(), 16);
  const cutoffs = own.towers[0]?.ranges.length === 3 ? [5, 10, 20] : [10, 20, 40];
  const products = partialProducts(own, prescription, new Map(), cutoffs, 16);

  test('tends to log det, faster than the inverse of the cut-off', () => {
    if (limit.kind !== 'value' || isRemark(products)) throw new Error('no value');
    const distances = products.map(({ regulated }) => distance(regulated, limit.log));
    const [first = 0, second = 0, third = 1] = distances;
    expect(distances).toHaveLength(3);
    expect(third).toBeLessThan(2e-3);
    // Halving at least each time the cut-off doubles; the products themselves grow.
    expect([second / first < 0.55, third / second < 0.55]).toEqual([true, true]);
  });

  test('the sum is the plain sum of logarithms, and the parts add up', () => {
    if (isRemark(products)) throw new Error(products.code);
    for (const { sum, counterterms, regulated } of products) {
      expect(regulated.re).toBe(sum.re + counterterms.re);
      expect(regulated.im).toBe(sum.im + counterterms.im);
    }
  });
});

test('the product up to 1 in two indices is written out', () => {
  const products = partialProducts(spectrum([unequal], Form.one, ['n', 'k']), 'factors', new Map(), [1], 16);
  const plain = Math.log(1 / 3) + Math.log(4 / 3) + Math.log(19 / 12) + Math.log(31 / 12);
  if (isRemark(products)) throw new Error(products.code);
  const sum = products[0]?.sum as Ball;
  expect(numberFromFixed(sum.re, sum.bits)).toBeCloseTo(plain, 13);
});

test('cut-offs that take too many factors are left out', () => {
  const products = partialProducts(spectrum([unequal], Form.one, ['n', 'k']), 'factors', new Map(), [10, 1000], 16);
  expect(isRemark(products) ? [] : products.map(({ cutoff }) => cutoff)).toEqual([10]);
});
