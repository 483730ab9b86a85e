import fc from 'fast-check';
import { expect, test } from 'vitest';
import { multiplyComplex } from '../../engine/arithmetic/fixed-complex';
import { powerSum } from '../../engine/arithmetic/fixed-series';
import { memoiseBounded } from '../../engine/arithmetic/memo';

const BITS = 90;

test('powerSum is the sum of powers, within 2 ulps a step over (1 - |z|)^2', () => {
  const unit = fc.bigInt(-(1n << 90n), 1n << 90n);
  const inside = fc.record({
    re: unit.map((a) => a / 3n),
    im: fc.oneof(
      fc.constant(0n),
      unit.map((a) => a / 3n),
    ),
  });
  fc.assert(
    fc.property(fc.array(unit, { maxLength: 40 }), inside, fc.nat(40), (coefficients, z, wanted) => {
      const count = Math.min(wanted, coefficients.length);
      const value = powerSum(coefficients, count, z, BITS);
      // Direct sum with 60 more bits.
      let power = { re: 1n << 150n, im: 0n };
      let re = 0n;
      let im = 0n;
      for (const a of coefficients.slice(0, count)) {
        re += (a * power.re) >> 150n;
        im += (a * power.im) >> 150n;
        power = multiplyComplex(power, { re: z.re << 60n, im: z.im << 60n }, 150);
      }
      const distance = Math.hypot(Number(value.re - re), Number(value.im - im));
      expect(distance).toBeLessThan(2 / (1 - 0.48) ** 2 + 2 * count);
    }),
  );
});

test('memoiseBounded forgets the entry used longest ago, and nothing else', () => {
  const computed: number[] = [];
  const square = memoiseBounded(2, (n: number) => {
    computed.push(n);
    return BigInt(n * n);
  });
  expect([square(2), square(3), square(2), square(2)]).toEqual([4n, 9n, 4n, 4n]);
  expect(computed).toEqual([2, 3]);
  square(5);
  square(2);
  expect(computed).toEqual([2, 3, 5]);
  square(3);
  expect(computed).toEqual([2, 3, 5, 3]);
});

test('powerSum at 0 and at numbers below the least double, with more bits than doubles reach', () => {
  const bits = 1400;
  const coefficients = [3n << 1400n, 5n << 1400n, 7n << 1400n];
  expect(powerSum(coefficients, 3, { re: 0n, im: 0n }, bits)).toEqual({ re: 3n << 1400n, im: 0n });
  const tiny = powerSum(coefficients, 3, { re: 1n << 100n, im: 1n << 100n }, bits);
  expect(Number(tiny.re - (3n << 1400n) - (5n << 100n))).toBeCloseTo(0, -1);
  expect(Number(tiny.im - (5n << 100n))).toBeCloseTo(0, -1);
});
