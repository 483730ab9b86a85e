import {
  absolute,
  add,
  type DoubleComplex,
  divide,
  log,
  multiply,
  scale,
  subtract,
} from '../arithmetic/double-complex';
import { bernoulliNumber } from '../functions/bernoulli';
import type { Run } from './expansion';

/** The Euler-Maclaurin series starts here: exp(-2 pi 6.5) is below 2^-53, and larger powers cancel more digits. */
const REACH = 6.5;

/** Terms of the series; beyond, they grow again at the nearest starting points. */
const TERMS = 18;

const BERNOULLI: readonly number[] = Array.from({ length: TERMS + 1 }, (_, j) => bernoulliNumber(2 * j).toNumber());

/** More steps than this are not taken: the value is then NaN. */
const MAXIMAL_STEPS = 200_000;

/**
 * The regularised sum over a run of M(nu) log(nu + a) in doubles, see linearSum; M by its coefficients. Infinite where
 * a factor vanishes. Error: some ulps of the largest of |c_k| 7^(k+1).
 */
export function linearSumDouble(a: DoubleComplex, m: readonly DoubleComplex[], run: Run): DoubleComplex {
  const start = { re: a.re + run.from, im: a.im };
  const far = run.to === null ? Math.ceil(Math.max(0, REACH + m.length / 2 - start.re)) : run.to - run.from + 1;
  // Far off the real axis the series is good at once.
  const steps = run.to === null && start.re > 0 && Math.abs(start.im) > 3 * REACH ? 0 : far;
  if (steps > MAXIMAL_STEPS) return { re: Number.NaN, im: Number.NaN };
  let sum: DoubleComplex = { re: 0, im: 0 };
  for (let j = 0; j < steps; j++) {
    const z = { re: start.re + j, im: start.im };
    const factor = horner(m, { re: run.from + j, im: 0 });
    if (factor.re === 0 && factor.im === 0) continue;
    const size = absolute(z);
    if (size <= 1e-13 * (Math.abs(a.re) + 1))
      return { re: factor.re > 0 ? -Number.POSITIVE_INFINITY : Number.POSITIVE_INFINITY, im: 0 };
    sum = add(sum, multiply(factor, log(z)));
  }
  if (run.to !== null) return sum;
  const w = { re: start.re + steps, im: start.im };
  return subtract(sum, derivativeTail(shifted(m, scale(a, -1)), w));
}

function horner(m: readonly DoubleComplex[], x: DoubleComplex): DoubleComplex {
  return m.reduceRight((sum, c) => add(multiply(sum, x), c), { re: 0, im: 0 });
}

/** Coefficients of M(u + by) in powers of u. */
function shifted(m: readonly DoubleComplex[], by: DoubleComplex): DoubleComplex[] {
  const result = [...m];
  for (let low = 0; low < m.length - 1; low++) {
    for (let k = m.length - 2; k >= low; k--) {
      result[k] = add(result[k] as DoubleComplex, multiply(result[k + 1] as DoubleComplex, by));
    }
  }
  return result;
}

/** sum_k c_k zeta'(-k, W). */
function derivativeTail(c: readonly DoubleComplex[], w: DoubleComplex): DoubleComplex {
  const logarithm = log(w);
  const inverse = divide({ re: 1, im: 0 }, w);
  let total: DoubleComplex = { re: 0, im: 0 };
  let power: DoubleComplex = { re: 1, im: 0 };
  c.forEach((coefficient, k) => {
    const lead = scale(subtract(logarithm, { re: 1 / (k + 1), im: 0 }), 1 / (k + 1));
    let value = subtract(multiply(w, lead), scale(logarithm, 0.5));
    value = add(value, seriesPart(k, logarithm, inverse));
    total = add(total, multiply(multiply(coefficient, power), value));
    power = multiply(power, w);
  });
  return total;
}

/** sum_j B_2j/(2j)! T_j W^(1-2j), see scaledHurwitzDerivative. */
function seriesPart(k: number, logarithm: DoubleComplex, inverse: DoubleComplex): DoubleComplex {
  let sum: DoubleComplex = { re: 0, im: 0 };
  let power = inverse;
  let factorial = 1;
  let rising = 1;
  let harmonic = 0;
  let next = 0;
  let beyond = 0;
  let smallest = Number.POSITIVE_INFINITY;
  for (let j = 1; j <= TERMS; j++) {
    factorial *= 2 * j * (2 * j - 1);
    const number = (BERNOULLI[j] as number) / factorial;
    let term: DoubleComplex;
    if (2 * j - 1 <= k) {
      for (; next < 2 * j - 1; next++) {
        rising *= next - k;
        harmonic += 1 / (next - k);
      }
      term = scale(multiply(power, subtract({ re: harmonic, im: 0 }, logarithm)), number * rising);
    } else {
      beyond = beyond === 0 ? signedFactorial(k, 2 * j - 2 - k) : beyond * (2 * j - 3 - k) * (2 * j - 2 - k);
      term = scale(power, number * beyond);
      const size = absolute(term);
      if (size > smallest) break;
      smallest = size;
    }
    sum = add(sum, term);
    power = multiply(power, multiply(inverse, inverse));
  }
  return sum;
}

/** (-1)^k k! n!. */
function signedFactorial(k: number, n: number): number {
  let product = k % 2 === 0 ? 1 : -1;
  for (let i = 2; i <= k; i++) product *= i;
  for (let i = 2; i <= n; i++) product *= i;
  return product;
}
