import { integerSqrt } from '../../engine/arithmetic/fixed';
import type { ExactPeriod } from '../../engine/functions/double-sine-period';
import { periodOfRatio, periodOfSquare } from '../../engine/functions/double-sine-period';

function irrational(value: (bits: number) => bigint): ExactPeriod {
  return { square: null, value, approx: Number(value(60)) * 2 ** -60 };
}

/** sqrt(1 + sqrt(2)/10^6): irrational and close to 1. */
const nearOne = (bits: number) => {
  const wide = BigInt(2 * bits + 40);
  return integerSqrt((1n << wide) + integerSqrt(2n << (2n * wide)) / 1000000n) >> 20n;
};

/** The periods of the fixture, by the names it uses. */
export const periods: Readonly<Record<string, ExactPeriod>> = {
  'b = 1': periodOfRatio(1n, 1n),
  'b = 2^(1/4)': irrational((bits) => integerSqrt(integerSqrt(2n << BigInt(4 * bits)))),
  'b = 7/10': periodOfRatio(7n, 10n),
  'b = 1/20': periodOfRatio(1n, 20n),
  'b = 3/10': periodOfRatio(3n, 10n),
  'b = 101/100': periodOfRatio(101n, 100n),
  'b = 1 + 10^-7': periodOfRatio(10000001n, 10000000n),
  'b = 5/4': periodOfRatio(5n, 4n),
  'b = sqrt 2': periodOfSquare(2n, 1n),
  'b = 20': periodOfRatio(20n, 1n),
  'b^2 = 1 + 10^-6 sqrt 2': irrational(nearOne),
  'b^2 = 2/3': periodOfSquare(2n, 3n),
};

export function period(name: string): ExactPeriod {
  const found = periods[name];
  if (found === undefined) throw new Error(`no period ${name}`);
  return found;
}
