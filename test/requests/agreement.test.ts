// Two routes to one number, compared; the wording is our own, there is no outside source.
import { expect, test } from 'vitest';
import type { Ball } from '../../engine/arithmetic/ball';
import { agreedDigits, agreement, doubts } from '../../engine/requests/agreement';

const ball = (re: bigint): Ball => ({ re, im: 0n, bits: 100, error: 1n });

test('digits are counted from the first one', () => {
  const one = 1n << 100n;
  expect(agreedDigits(ball(one), ball(one), 40)).toBe(40);
  // 2^-60 is 8.7e-19.
  expect(agreedDigits(ball(one), ball(one + (1n << 40n)), 40)).toBe(18);
  expect(agreedDigits(ball(one), ball(-one), 40)).toBe(0);
});

test('what the second route leaves unconfirmed is said, rounding is not', () => {
  expect(doubts(agreement('a sum', 40), 40)).toEqual([]);
  expect(doubts(agreement('a sum', 38), 40)).toEqual([]);
  expect(doubts(null, 40)).toEqual([]);
  expect(doubts(agreement('a sum', 37), 40)).toEqual([
    'The second route confirms 37 digits only: do not rely on those after them.',
  ]);
});
