import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Ball } from '../../engine/arithmetic/ball';
import {
  addBalls,
  ballFromRatio,
  ballHoldsZero,
  divideBalls,
  exactBall,
  expBall,
  integerPowerBall,
  logBall,
  multiplyBallByInteger,
  multiplyBalls,
  rescaleBall,
  roundBall,
  shiftBall,
  subtractBalls,
} from '../../engine/arithmetic/ball';

/*
 * The true value is a point inside every operand ball: exact points are drawn, balls are made around them with a displaced centre,
 * and the operation on balls must still hold the operation on points, done with many more bits. Whether the elementary functions
 * themselves are right is checked against mpmath in fixed-elementary.test.ts.
 */
const PRECISE = 900;

const part = fc.bigInt(-(1n << 80n), 1n << 80n);
const drawn = fc.record({
  re: part,
  im: part,
  bits: fc.integer({ min: 60, max: 110 }),
  shiftRe: fc.integer({ min: -40, max: 40 }),
  shiftIm: fc.integer({ min: -40, max: 40 }),
  wide: fc.integer({ min: 0, max: 50 }),
});
type Drawn = typeof drawn extends fc.Arbitrary<infer T> ? T : never;

function around(d: Drawn): { point: Ball; ball: Ball } {
  const unit = 1n << BigInt(d.wide);
  const point = exactBall(d.re, d.im, d.bits);
  const ball = {
    re: d.re + BigInt(d.shiftRe) * unit,
    im: d.im + BigInt(d.shiftIm) * unit,
    bits: d.bits,
    error: BigInt(Math.ceil(Math.hypot(d.shiftRe, d.shiftIm))) * unit,
  };
  return { point, ball };
}

/** The narrow ball of the point's result lies in the ball, within the narrow ball's own error. */
function holds(ball: Ball | null, point: Ball | null): boolean {
  if (ball === null) return true;
  if (point === null) return false;
  const bits = Math.max(ball.bits, point.bits);
  const a = rescaleBall(ball, bits);
  const b = rescaleBall(point, bits);
  const distance = (a.re - b.re) ** 2n + (a.im - b.im) ** 2n;
  return distance <= (a.error + b.error) ** 2n;
}

type Binary = (a: Ball, b: Ball, precision: number) => Ball | null;
type Unary = (a: Ball, precision: number) => Ball | null;

const binary: Record<string, Binary> = {
  add: addBalls,
  subtract: subtractBalls,
  multiply: multiplyBalls,
  divide: divideBalls,
};
const unary: Record<string, Unary> = {
  round: roundBall,
  exp: expBall,
  log: logBall,
  cube: (a, p) => integerPowerBall(a, 3, p),
  inverseSeventh: (a, p) => integerPowerBall(a, -7, p),
  timesInteger: (a, p) => multiplyBallByInteger(a, -12345678901n, p),
};

describe('operations on balls hold the operations on their points', () => {
  test.each(Object.entries(binary))('%s', (_, operation) => {
    fc.assert(
      fc.property(drawn, drawn, fc.integer({ min: 20, max: 200 }), (a, b, precision) => {
        const x = around(a);
        const y = around(b);
        expect(holds(operation(x.ball, y.ball, precision), operation(x.point, y.point, PRECISE))).toBe(true);
      }),
      { numRuns: 300 },
    );
  });

  test.each(Object.entries(unary))('%s', (_, operation) => {
    fc.assert(
      fc.property(drawn, fc.integer({ min: 20, max: 200 }), (a, precision) => {
        const x = around(a);
        expect(holds(operation(x.ball, precision), operation(x.point, PRECISE))).toBe(true);
      }),
      { numRuns: 200 },
    );
  });

  test('a ball with its error understated is caught', () => {
    const x = around({ re: 1n << 79n, im: 12345n, bits: 80, shiftRe: 40, shiftIm: 0, wide: 40 });
    const honest = expBall(x.ball, 100) as Ball;
    const point = expBall(x.point, PRECISE);
    expect(holds(honest, point)).toBe(true);
    expect(holds({ ...honest, error: honest.error / 4n }, point)).toBe(false);
  });
});

describe('errors stay small', () => {
  const precision = 160;
  const ulps = (ball: Ball | null) => Number(ball?.error ?? -1n);

  test('one operation on exact operands costs a few ulps', () => {
    const a = ballFromRatio(22n, 7n, precision);
    const exact = exactBall(a.re, 3n, a.bits);
    expect(ulps(a)).toBe(1);
    expect(ulps(expBall(exact, precision))).toBeLessThanOrEqual(3);
    expect(ulps(logBall(exact, precision))).toBeLessThanOrEqual(3);
    expect(ulps(divideBalls(exact, exactBall(7n, 5n), precision))).toBeLessThanOrEqual(3);
    expect(multiplyBalls(exactBall(3n), exactBall(5n, 0n, 1), precision)).toEqual(exactBall(15n, 0n, 1));
  });

  test('sizes far outside doubles are held', () => {
    const huge = expBall(exactBall(100_000n), precision) as Ball;
    const tiny = expBall(exactBall(-100_000n), precision) as Ball;
    const one = multiplyBalls(huge, tiny, precision);
    expect(holds(one, exactBall(1n))).toBe(true);
    expect(ulps(one)).toBeLessThan(64);
    expect(addBalls(huge, tiny, precision).error).toBe(
      rescaleBall(huge, addBalls(huge, tiny, precision).bits).error + 1n,
    );
    expect(shiftBall(exactBall(3n), 5)).toEqual(exactBall(3n, 0n, -5));
  });
});

test('balls as wide as their values: the product of the errors counts', () => {
  const wide = (re: bigint, error: bigint): Ball => ({ re, im: 0n, bits: 0, error });
  expect(multiplyBalls(wide(0n, 5n), wide(0n, 7n), 60).error).toBeGreaterThanOrEqual(35n);
  // (10 + 4)(20 + 15) = 490.
  const product = multiplyBalls(wide(10n, 4n), wide(20n, 15n), 60);
  expect(product.re + product.error).toBeGreaterThanOrEqual(490n);
  // (10 + 4)/(20 - 15) = 2.8.
  const quotient = divideBalls(wide(10n, 4n), wide(20n, 15n), 60);
  expect(holds(quotient, divideBalls(exactBall(14n), exactBall(5n), PRECISE))).toBe(true);
});

test('refusals: 0 in the divisor or the logarithm, a ball across the cut, an unknown exponent', () => {
  const aroundZero: Ball = { re: 3n, im: 4n, bits: 10, error: 5n };
  expect(ballHoldsZero(aroundZero)).toBe(true);
  expect(divideBalls(exactBall(1n), aroundZero, 50)).toBeNull();
  expect(integerPowerBall(aroundZero, -2, 50)).toBeNull();
  expect(logBall(aroundZero, 50)).toBeNull();
  expect(logBall({ re: -100n, im: 1n, bits: 0, error: 1n }, 50)).toBeNull();
  expect(logBall(exactBall(-1n), 50)?.im).toBeGreaterThan(0n);
  expect(expBall({ re: 0n, im: 0n, bits: 0, error: 65n }, 50)).toBeNull();
  expect(expBall({ re: 0n, im: 0n, bits: 0, error: 3n }, 50)?.error).toBeGreaterThan(0n);
});
