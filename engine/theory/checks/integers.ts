import { gcd } from '../../exact/rational';

/** Greatest common divisor of two integers of either sign. */
export function commonDivisor(a: number, b: number): number {
  let x = Math.abs(a);
  let y = Math.abs(b);
  while (y !== 0) [x, y] = [y, x % y];
  return x;
}

/** Least common multiple of two positive integers. */
export function leastMultiple(a: bigint, b: bigint): bigint {
  return (a / gcd(a, b)) * b;
}
