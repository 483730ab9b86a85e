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

/** What a second route says of a value: how many of its digits it gives again. */
export function agreement(route: string, digits: number): { readonly route: string; readonly agrees: string } {
  return { route, agrees: `${digits} digits` };
}

/** Rounding may cost the last digits of either route; a larger difference is a doubt, and said. */
const ROUNDED = 2;

/** A note where the second route leaves digits of a value unconfirmed. */
export function doubts(check: ReturnType<typeof agreement> | null, digits: number): string[] {
  const agreed = check === null ? digits : Number.parseInt(check.agrees, 10);
  if (agreed >= digits - ROUNDED) return [];
  return [`The second route confirms ${agreed} digits only: do not rely on those after them.`];
}
