import { absolute, fixedFromRatio, numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  type FixedComplex,
  logComplex,
  multiplyComplex,
  negateComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { Rational } from '../exact/rational';
import { bernoulliNumber } from './bernoulli';
import type { Estimate } from './euler-maclaurin';
import { zetaInteger } from './riemann-zeta-precise';

/**
 * The polylogarithm Li_n(z) = sum_{k>=1} z^k/k^n (DLMF 25.12.10) for an integer n >= 2 and |z| <= 1; on the unit circle the
 * principal value. Power series for |z| <= 1/2, else in mu = log z, |mu| < 3.3 (DLMF 25.12.12, Wood 1992):
 *   Li_n(e^mu) = mu^{n-1}/(n-1)! (H_{n-1} - log(-mu)) + sum_{k != n-1} zeta(n - k) mu^k/k!.
 * The error counts rounding and the remainder, not the error of z. Null outside the disc.
 */
export function polylogarithm(n: number, z: FixedComplex, bits: number): Estimate | null {
  const guard = 24;
  const working = bits + guard;
  const exact = { re: z.re << BigInt(guard), im: z.im << BigInt(guard) };
  const size = numberFromFixed(absoluteComplex(z), bits);
  if (size > 1 + 2 ** (4 - bits)) return null;
  const value = size <= 0.5 ? powerSeries(n, exact, size, working) : nearCircle(n, exact, working);
  return { value: { re: value.re >> BigInt(guard), im: value.im >> BigInt(guard) }, error: 2n };
}

function powerSeries(n: number, z: FixedComplex, size: number, bits: number): FixedComplex {
  if (z.re === 0n && z.im === 0n) return zeroComplex;
  const terms = Math.ceil((bits * Math.LN2) / -Math.log(size)) + 2;
  let power = z;
  let sum = zeroComplex;
  for (let k = 1; k <= terms; k++) {
    const below = BigInt(k) ** BigInt(n);
    sum = addComplex(sum, { re: power.re / below, im: power.im / below });
    power = multiplyComplex(power, z, bits);
  }
  return sum;
}

function nearCircle(n: number, z: FixedComplex, bits: number): FixedComplex {
  const one = 1n << BigInt(bits);
  if (z.re === one && z.im === 0n) return { re: zetaInteger(n, bits), im: 0n };
  const mu = logComplex(z, bits);
  // mu^k/k! while the terms matter; zeta(n - k) stays below (k - n)!/(2 pi)^{k-n}.
  let power: FixedComplex = { re: one, im: 0n };
  let sum = zeroComplex;
  let harmonic = Rational.zero;
  const limit = Math.ceil((bits * Math.LN2) / Math.log((2 * Math.PI) / 3.35)) + n + 4;
  // B_{2j} grows while mu^k/k! falls below one unit: a power is kept with as many more bits as B gains.
  const extra = BigInt(Math.ceil(Math.max(0, limit * Math.log2(limit / 17))) + 8);
  power = { re: power.re << extra, im: 0n };
  for (let k = 0; k <= limit; k++) {
    if (k > 0) {
      const product = multiplyComplex(power, mu, bits);
      power = { re: product.re / BigInt(k), im: product.im / BigInt(k) };
      if (k <= n - 1) harmonic = harmonic.add(Rational.of(1, k));
    }
    if (k === n - 1) {
      const bracket = subtractComplex({ re: fixed(harmonic, bits), im: 0n }, logComplex(negateComplex(mu), bits));
      sum = addComplex(sum, multiplyComplex(power, bracket, bits));
    } else if (n - k >= 2) {
      const zeta = zetaInteger(n - k, bits);
      sum = addComplex(sum, { re: (power.re * zeta) >> BigInt(bits), im: (power.im * zeta) >> BigInt(bits) });
    } else {
      // zeta(-m) = (-1)^m B_{m+1}/(m+1) with B_1 = -1/2 (DLMF 25.6.3).
      const m = k - n;
      const number = bernoulliNumber(m + 1);
      if (number.isZero()) continue;
      const below = number.denominator * BigInt(m + 1);
      const above = m % 2 === 0 ? number.numerator : -number.numerator;
      const term = { re: (power.re * above) / below, im: (power.im * above) / below };
      sum = addComplex(sum, term);
      if (m > 4 && absolute(term.re) + absolute(term.im) < 1n << extra) break;
    }
  }
  return { re: sum.re >> extra, im: sum.im >> extra };
}

function fixed(value: Rational, bits: number): bigint {
  return fixedFromRatio(value.numerator, value.denominator, bits);
}
