import { divideFixed, fixedFromRatio, numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  type FixedComplex,
  logComplex,
  multiplyComplex,
  negateComplex,
  oneComplex,
  scaleComplex,
  squareComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { Rational } from '../exact/rational';
import type { Estimate } from './euler-maclaurin';
import { twiceEvenZeta } from './even-zeta';
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

/**
 * With zeta(0) = -1/2, zeta(-2j) = 0 and zeta(1 - 2j) = (-1)^j 2 zeta(2j) (2j-1)!/(2 pi)^{2j} (DLMF 25.6.3, 25.4.1) the
 * terms beyond mu^n are mu^{n-1} times (-1)^j 2 zeta(2j) (2j-1)!/(n-1+2j)! (mu/2 pi)^{2j}, which fall from the start.
 */
function nearCircle(n: number, z: FixedComplex, bits: number): FixedComplex {
  const one = oneComplex(bits);
  if (z.re === one.re && z.im === 0n) return { re: zetaInteger(n, bits), im: 0n };
  const mu = logComplex(z, bits);
  let power: FixedComplex = one;
  let sum = zeroComplex;
  let harmonic = Rational.zero;
  for (let k = 0; k < n - 1; k++) {
    sum = addComplex(sum, scaleComplex(power, zetaInteger(n - k, bits), bits));
    power = overInteger(multiplyComplex(power, mu, bits), k + 1);
    harmonic = harmonic.add(Rational.of(1, k + 1));
  }
  const first = fixedFromRatio(harmonic.numerator, harmonic.denominator, bits);
  const log = logComplex(negateComplex(mu), bits);
  sum = addComplex(sum, multiplyComplex(power, { re: first - log.re, im: -log.im }, bits));
  // power is mu^{n-1}/(n-1)!; the next term is -mu^n/(2 n!).
  sum = subtractComplex(sum, overInteger(multiplyComplex(power, mu, bits), 2 * n));
  const twoPi = 2n * piFixed(bits);
  const turn = { re: divideFixed(mu.re, twoPi, bits), im: divideFixed(mu.im, twoPi, bits) };
  const square = squareComplex(turn, bits);
  const coefficients = twiceEvenZeta(64 * Math.ceil((0.6 * bits + 16) / 64), bits);
  // term_j = power (2j-1)! (n-1)!/(n-1+2j)! turn^{2j}.
  let term = overInteger(multiplyComplex(power, square, bits), n * (n + 1));
  for (let j = 1; j <= coefficients.length; j++) {
    const coefficient = coefficients[j - 1] as bigint;
    const part = scaleComplex(term, j % 2 === 1 ? -coefficient : coefficient, bits);
    sum = addComplex(sum, part);
    if (part.re >> 2n === 0n && part.im >> 2n === 0n) break;
    const factor = BigInt(2 * j * (2 * j + 1));
    const next = multiplyComplex(term, square, bits);
    term = overInteger({ re: next.re * factor, im: next.im * factor }, (n + 2 * j) * (n + 2 * j + 1));
  }
  return sum;
}

function overInteger(z: FixedComplex, by: number): FixedComplex {
  return { re: z.re / BigInt(by), im: z.im / BigInt(by) };
}
