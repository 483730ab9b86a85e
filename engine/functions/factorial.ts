import { Rational } from '../exact/rational';

/** n! for n >= 0. */
export function factorial(n: number): Rational {
  let product = 1n;
  for (let k = 2; k <= n; k++) product *= BigInt(k);
  return Rational.of(product);
}
