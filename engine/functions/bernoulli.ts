import { Rational } from '../exact/rational';

/** Known B_2, B_4, ...; grows on demand and depends on nothing else. */
const known: Rational[] = [];

/**
 * The Bernoulli numbers B_2, B_4, ..., B_2count, exactly (DLMF 24.2.1), from the tangent numbers T_n by the recurrence
 * in integers of Brent and Harvey 2011 (arXiv:1108.0286, section 6): B_2n = (-1)^(n-1) 2n T_n / (4^n (4^n - 1)).
 */
export function evenBernoulliNumbers(count: number): readonly Rational[] {
  if (known.length < count) {
    // Doubling keeps the total work within a constant of the last call's.
    const length = Math.max(count, 2 * known.length, 16);
    const tangents = tangentNumbers(length);
    for (let n = known.length + 1; n <= length; n++) {
      const power = 4n ** BigInt(n);
      const value = Rational.of(BigInt(2 * n) * (tangents[n - 1] as bigint), power * (power - 1n));
      known.push(n % 2 === 0 ? value.neg() : value);
    }
  }
  return known;
}

/** B_n with B_1 = -1/2. */
export function bernoulliNumber(n: number): Rational {
  if (n === 0) return Rational.one;
  if (n === 1) return Rational.of(-1, 2);
  return n % 2 === 1 ? Rational.zero : (evenBernoulliNumbers(n / 2)[n / 2 - 1] as Rational);
}

/** T_1, ..., T_count: tan x = sum T_n x^(2n-1)/(2n-1)!. */
function tangentNumbers(count: number): bigint[] {
  const t: bigint[] = [1n];
  for (let k = 1; k < count; k++) t.push(BigInt(k) * (t[k - 1] as bigint));
  for (let k = 1; k < count; k++) {
    for (let j = k; j < count; j++) {
      t[j] = BigInt(j - k) * (t[j - 1] as bigint) + BigInt(j - k + 2) * (t[j] as bigint);
    }
  }
  return t;
}
