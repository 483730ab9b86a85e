import { addBalls, type Ball, negateBall } from '../arithmetic/ball';

/** Digits to which two values agree, relative to the first, not more than were asked for. */
export function agreedDigits(a: Ball, b: Ball, digits: number): number {
  const precision = Math.ceil(4 * digits) + 64;
  const difference = addBalls(a, negateBall(b), precision);
  const size = (ball: Ball): number => {
    const length = (x: bigint): number => (x < 0n ? -x : x).toString(2).length;
    return Math.max(length(ball.re), length(ball.im)) - ball.bits;
  };
  if (difference.re === 0n && difference.im === 0n) return digits;
  return Math.max(0, Math.min(digits, Math.floor((size(a) - size(difference)) * Math.log10(2))));
}
