import {
  absolute,
  add,
  type DoubleComplex,
  exp,
  log,
  multiply,
  negate,
  scale,
  subtract,
} from '../arithmetic/double-complex';
import { bernoulliNumber } from './bernoulli';

/** Terms of zeta(s) summed one by one before its Euler-Maclaurin tail. */
const SUMMED = 20;

/** zeta(s) at an integer s other than 1, in doubles: DLMF 25.2.9 for s > 1, 25.6.3 below. */
export function zetaDouble(s: number): number {
  if (s <= 0) return s === 0 ? -0.5 : (-1 * bernoulliNumber(1 - s).toNumber()) / (1 - s);
  let sum = 0;
  for (let n = 1; n < SUMMED; n++) sum += n ** -s;
  sum += SUMMED ** (1 - s) / (s - 1) + SUMMED ** -s / 2;
  let rising = s;
  let factorial = 2;
  for (let j = 1; j <= 8; j++) {
    sum += (bernoulliNumber(2 * j).toNumber() / factorial) * rising * SUMMED ** (1 - s - 2 * j);
    rising *= (s + 2 * j - 1) * (s + 2 * j);
    factorial *= (2 * j + 1) * (2 * j + 2);
  }
  return sum;
}

/**
 * Li_m(e^mu) for an integer m >= 2 in doubles, Re mu <= 0 and |Im mu| <= pi or so (principal branch): the series in e^mu
 * where that is small, else sum_k zeta(m-k) mu^k/k! with mu^(m-1)/(m-1)! (H_(m-1) - log(-mu)) (DLMF 25.12.12).
 * Error: some units of 2^-53 for |mu| < 4.
 */
export function polylogarithmDouble(m: number, mu: DoubleComplex): DoubleComplex {
  if (mu.re < -1) return directSeries(m, exp(mu));
  let sum: DoubleComplex = { re: 0, im: 0 };
  let power: DoubleComplex = { re: 1, im: 0 };
  let harmonic = 0;
  for (let k = 0; k < 80; k++) {
    if (k === m - 1) {
      const bracket = absolute(mu) === 0 ? { re: 0, im: 0 } : subtract({ re: harmonic, im: 0 }, log(negate(mu)));
      sum = add(sum, multiply(power, bracket));
    } else sum = add(sum, scale(power, zetaDouble(m - k)));
    harmonic += 1 / (k + 1);
    power = scale(multiply(power, mu), 1 / (k + 1));
  }
  return sum;
}

function directSeries(m: number, z: DoubleComplex): DoubleComplex {
  let sum: DoubleComplex = { re: 0, im: 0 };
  let power = z;
  for (let n = 1; n < 60; n++) {
    sum = add(sum, scale(power, n ** -m));
    power = multiply(power, z);
  }
  return sum;
}
