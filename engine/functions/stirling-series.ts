import { log2Above, numberFromFixed } from '../arithmetic/fixed';
import { divideComplex, type FixedComplex, multiplyComplex, squareComplex } from '../arithmetic/fixed-complex';
import { powerSum } from '../arithmetic/fixed-series';
import { memoiseBounded } from '../arithmetic/memo';
import { evenBernoulliNumbers } from './bernoulli';
import type { Estimate } from './euler-maclaurin';

interface StirlingTable {
  /** rho = 2^log2Radius, at most half of the least |Z|. */
  readonly log2Radius: number;
  /** C_j = B_2j/(2j (2j - 1)) rho^(1-2j), j >= 1, each off by less than 1 unit. */
  readonly coefficients: readonly bigint[];
  /** At least log2 |C_j|. */
  readonly log2: readonly number[];
}

/** The least |Z| cos(arg Z/2) from which the series is summed with `bits` bits: 0.11 bits would do, the rest shortens it. */
export function stirlingReach(bits: number): number {
  return 0.15 * bits + 6;
}

const stirlingTable = memoiseBounded(16, (bits: number): StirlingTable => {
  const reach = stirlingReach(bits);
  const log2Radius = Math.floor(Math.log2(reach)) - 1;
  const coefficients: bigint[] = [];
  const log2: number[] = [];
  for (let j = 1; ; j++) {
    const { numerator, denominator } = evenBernoulliNumbers(j)[j - 1] as { numerator: bigint; denominator: bigint };
    // 40 more bits for the size, which is also needed below one unit.
    const shift = bits + 40 - (2 * j - 1) * log2Radius;
    const below = denominator * BigInt(2 * j * (2 * j - 1));
    const wide = shift >= 0 ? (numerator << BigInt(shift)) / below : numerator / (below << BigInt(-shift));
    coefficients.push(wide >> 40n);
    const size = log2Above(wide, bits + 40);
    log2.push(size);
    // The first neglected term at |Z| cos(arg Z/2) = reach, with sec(arg Z/2) <= sqrt 2.
    if (size + (2 * j - 1) * (log2Radius - Math.log2(reach)) + 0.5 < -bits - 2)
      return { log2Radius, coefficients, log2 };
  }
});

/**
 * sum_j B_2j/(2j (2j - 1)) Z^(1-2j) for Re Z >= 0 and |Z| cos(arg Z/2) >= stirlingReach(bits) (DLMF 5.11.1). It runs in
 * u = (rho/Z)^2, |u| <= 1/4, with real coefficients: a recurrence with two long products a term.
 * Error in units: the remainder, at most the first neglected term times sec^(2j)(arg Z/2) (DLMF 5.11(ii)), 1; powerSum with
 * |u| <= 1/4 and coefficients below 1/50, 6; the quotient's and its square's cuts times slopes below 1/4, 2; the last product 2.
 */
export function stirlingSeries(z: FixedComplex, bits: number): Estimate {
  const { log2Radius, coefficients, log2 } = stirlingTable(bits);
  const re = numberFromFixed(z.re, bits);
  const size = Math.hypot(re, numberFromFixed(z.im, bits));
  const log2Size = Math.log2(size);
  const log2Secant = -Math.log2((1 + re / size) / 2) / 2;
  let count = 0;
  let remainder = Number.POSITIVE_INFINITY;
  while (count < coefficients.length) {
    // Term count + 1, if neglected.
    const j = count + 1;
    remainder = (log2[count] as number) + (2 * j - 1) * (log2Radius - log2Size) + 2 * j * log2Secant;
    if (remainder < -bits) break;
    count++;
  }
  const radius = 1n << BigInt(bits + log2Radius);
  if (z.im === 0n) {
    const v = (radius << BigInt(bits)) / z.re;
    const u = { re: (v * v) >> BigInt(bits), im: 0n };
    return { value: { re: (v * powerSum(coefficients, count, u, bits).re) >> BigInt(bits), im: 0n }, error: 12n };
  }
  const v = divideComplex({ re: radius, im: 0n }, z, bits);
  const sum = powerSum(coefficients, count, squareComplex(v, bits), bits);
  return { value: multiplyComplex(v, sum, bits), error: 12n };
}
