import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { type DivisorPoint, divisorOnLine, exactOrder, mergeDivisor } from '../../engine/product/divisor';

const ratio = Form.ratio;
const i = Form.i;

/** b as a fraction p/q. */
const squashing = fc.tuple(fc.integer({ min: 1, max: 6 }), fc.integer({ min: 1, max: 6 })).map(([p, q]) => ({ p, q }));

/**
 * Order of s_b at i h: zeros at -i(Q/2 + m b + n/b), poles at the opposite points, all m, n >= 0 (product definition of
 * the double sine). Counted by trying all m, in units of 1/(2pq) where every number is an integer.
 */
function countedOrder(h: number, p: number, q: number): number {
  let order = 0;
  for (let m = 0; p * p * (2 * m + 1) < Math.abs(h); m++) {
    const left = Math.abs(h) - p * p * (2 * m + 1) - q * q;
    if (left >= 0 && left % (2 * q * q) === 0) order++;
  }
  return order === 0 ? 0 : h < 0 ? order : -order;
}

describe('order at an exact point', () => {
  test('of the double sine, with multiplicities where b^2 is rational', () => {
    fc.assert(
      fc.property(squashing, fc.integer({ min: -400, max: 400 }), ({ p, q }, h) => {
        const order = exactOrder('doubleSine', i.scale(Rational.of(h, 2 * p * q)), [ratio(p, q)]);
        expect(order).toBe(countedOrder(h, p, q));
      }),
    );
    // On the round sphere the zero at -i n has order n.
    expect([1, 2, 3].map((n) => exactOrder('doubleSine', i.scale(-n), [Form.one]))).toEqual([1, 2, 3]);
    expect([1, 2, 3].map((n) => exactOrder('doubleSine', i.scale(n), [Form.one]))).toEqual([-1, -2, -3]);
  });

  test('where b is a root: all zeros and poles are simple', () => {
    const b = Form.call('sqrt', Form.number(2));
    for (const [m, n] of [
      [0, 0],
      [3, 0],
      [0, 5],
      [7, 2],
    ] as const) {
      const point = i.mul(b.add(b.inverse()).mul(ratio(1, 2)).add(b.scale(m)).add(b.inverse().scale(n)));
      expect(exactOrder('doubleSine', point, [b])).toBe(-1 - (n >= 2 ? Math.floor(n / 2) : 0) - m);
      expect(exactOrder('doubleSine', point.add(ratio(1, 10 ** 9)), [b])).toBe(0);
    }
  });

  // sinh(pi x) = 0 at i n, cosh(pi x) = 0 at i (n + 1/2): DLMF 4.28.
  test('of the hyperbolic functions', () => {
    fc.assert(
      fc.property(fc.integer({ min: -4000, max: 4000 }), (h) => {
        const point = i.scale(Rational.of(h, 4));
        expect(exactOrder('hyperbolicSine', point, [])).toBe(h % 4 === 0 ? 1 : 0);
        expect(exactOrder('hyperbolicCosine', point, [])).toBe(Math.abs(h % 4) === 2 ? 1 : 0);
      }),
    );
    expect(exactOrder('linear', Form.zero, [])).toBe(1);
    expect(exactOrder('linear', ratio(1, 3), [])).toBe(0);
    expect(exactOrder('exponential', Form.zero, [])).toBe(0);
  });

  test('nearness is not enough', () => {
    const near = i.add(ratio(1, 10 ** 12));
    expect(exactOrder('hyperbolicSine', near, [])).toBe(0);
    expect(exactOrder('hyperbolicSine', i, [])).toBe(1);
  });
});

type Line = Parameters<typeof divisorOnLine>;

/** Total order at each point, positions rounded. */
function orders(points: readonly DivisorPoint[]): Map<string, number> {
  return new Map(mergeDivisor(points).map(({ at, order }) => [at.toFixed(8), order]));
}

describe('on a line', () => {
  test('sinh on the real line vanishes at 0, on the imaginary one at every integer', () => {
    const sinh = (c1: Line[3], from: number, to: number) =>
      divisorOnLine('hyperbolicSine', [], { re: 0, im: 0 }, c1, from, to);
    expect(sinh({ re: 1, im: 0 }, -50, 50)).toEqual([{ at: 0, order: 1 }]);
    expect(orders(sinh({ re: 0, im: 1 }, -3.5, 4.5))).toEqual(
      orders([-3, -2, -1, 0, 1, 2, 3, 4].map((at) => ({ at, order: 1 }))),
    );
  });

  // A plot over an R-charge may go as far as one likes.
  test('far along the line nothing is forgotten', () => {
    const far = divisorOnLine('hyperbolicSine', [], { re: 0, im: 0 }, { re: 0, im: 1 }, -300.5, 300.5);
    expect(far.length).toBe(601);
    const shifted = divisorOnLine('hyperbolicCosine', [], { re: 0, im: 1000 }, { re: 0, im: 1 }, -2, 2);
    expect(orders(shifted)).toEqual(orders([-1.5, -0.5, 0.5, 1.5].map((at) => ({ at, order: 1 }))));
  });

  test('a line that does not pass through them meets none', () => {
    expect(divisorOnLine('hyperbolicSine', [], { re: 0, im: 0.5 }, { re: 1, im: 0 }, -9, 9)).toEqual([]);
    expect(divisorOnLine('hyperbolicSine', [], { re: 0, im: 0 }, { re: 0, im: 0 }, -9, 9)).toEqual([]);
    expect(divisorOnLine('exponential', [], { re: 0, im: 0 }, { re: 1, im: 1 }, -9, 9)).toEqual([]);
  });

  test('the double sine along its axis, against the exact order at every multiple of a common step', () => {
    fc.assert(
      fc.property(squashing, ({ p, q }) => {
        const b = ratio(p, q);
        const reach = 8;
        const steps = Array.from({ length: 4 * p * q * reach + 1 }, (_, k) => k - 2 * p * q * reach);
        const expected = steps.flatMap((h) => {
          const order = countedOrder(h, p, q);
          return order === 0 ? [] : [{ at: h / (2 * p * q), order }];
        });
        const found = divisorOnLine('doubleSine', [b], { re: 0, im: 0 }, { re: 0, im: 1 }, -reach, reach);
        expect(orders(found)).toEqual(orders(expected));
      }),
      { numRuns: 20 },
    );
  });

  test('points that coincide add up, and cancel', () => {
    expect(
      mergeDivisor([
        { at: 1, order: 2 },
        { at: 1 + 1e-12, order: -2 },
      ]),
    ).toEqual([]);
    expect(
      mergeDivisor([
        { at: 2, order: 1 },
        { at: 1, order: 1 },
        { at: 2, order: 1 },
      ]),
    ).toEqual([
      { at: 1, order: 1 },
      { at: 2, order: 2 },
    ]);
  });
});
