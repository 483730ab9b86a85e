import fc from 'fast-check';
import { expect, test } from 'vitest';
import { piFixed } from '../../engine/arithmetic/fixed-constants';
import { Form } from '../../engine/exact/form';
import { sign } from '../../engine/functions/sign';

const n = Form.symbol('n');
const k = Form.symbol('k');

function phase(x: number, power: number): number {
  const re = new Float64Array(1);
  const im = new Float64Array(1);
  sign.double([]).addLog(Float64Array.of(x), Float64Array.of(0), power, re, im);
  return Math.round(Math.cos(im[0] as number)) * (re[0] === 0 ? 1 : Number.NaN);
}

// The references are powers of -1 by parity, worked out with the remainder of a division.
test('(-1)^x by parity, and no value between the integers', () => {
  fc.assert(
    fc.property(fc.integer({ min: -1000, max: 1000 }), fc.integer({ min: -5, max: 5 }), (x, power) => {
      expect(phase(x, power)).toBe((x * power) % 2 === 0 ? 1 : -1);
    }),
  );
  expect(phase(0.5, 1)).toBeNaN();
});

test('the precise tier gives i pi for odd arguments, and refuses others', () => {
  const bits = 64;
  const at = (re: bigint) => sign.precise({ re, im: 0n }, [], bits);
  expect(at(-3n << 64n)).toMatchObject({ kind: 'value', re: 0n, im: piFixed(bits) });
  expect(at(4n << 64n)).toMatchObject({ kind: 'value', re: 0n, im: 0n });
  expect(at(1n << 63n).kind).toBe('indistinct');
});

test('sums of exponents are reduced to their parity', () => {
  const reduce = (form: Form): string => sign.additive?.(form).key ?? '';
  const size = Form.call('abs', n);
  expect(reduce(n.scale(2).add(k))).toBe('1*k');
  expect(reduce(n.neg())).toBe('1*n');
  expect(reduce(size.add(n))).toBe('0');
  // Half-integer coefficients: (n + |n|)/2 is an integer whose parity the single terms do not show.
  const half = n.add(size).mul(Form.ratio(1, 2));
  expect(reduce(half)).toBe(half.key);
});
