import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { bernoulliNumber } from '../functions/bernoulli';

/**
 * B_{N,k}(x|w) of t^N e^(x t)/product of (e^(w_i t) - 1) = sum_k t^k B_{N,k}(x|w)/k!, exactly, for k = 0 ... count
 * (the multiple Bernoulli polynomials, Narukawa 2004, math/0306164, section 2). N is the number of periods.
 */
export function barnesPolynomials(x: Form, periods: readonly Form[], count: number): Form[] {
  let series = exponentialSeries(x, count);
  for (const w of periods) series = multiplySeries(series, bernoulliSeries(w, count), count);
  let factorial = 1;
  return series.map((c, k) => {
    factorial *= Math.max(1, k);
    return c.scale(factorial);
  });
}

/** zeta_N(0, x|w) = (-1)^N B_{N,N}(x|w)/N!: the regularised number of points of the tower. */
export function barnesZetaAtZero(x: Form, periods: readonly Form[]): Form {
  const count = periods.length;
  const top = barnesPolynomials(x, periods, count)[count] as Form;
  return top.scale(Rational.of(count % 2 === 0 ? 1 : -1).div(factorialOf(count)));
}

/** Residue of zeta_N(s, x|w) at s = k, 1 <= k <= N: (-1)^(N-k) B_{N,N-k}(x|w)/((k-1)! (N-k)!). */
export function barnesResidue(x: Form, periods: readonly Form[], k: number): Form {
  const low = periods.length - k;
  const value = barnesPolynomials(x, periods, low)[low] as Form;
  return value.scale(Rational.of(low % 2 === 0 ? 1 : -1).div(factorialOf(k - 1).mul(factorialOf(low))));
}

function factorialOf(n: number): Rational {
  let product = 1n;
  for (let k = 2; k <= n; k++) product *= BigInt(k);
  return Rational.of(product);
}

/** x^k/k!. */
function exponentialSeries(x: Form, count: number): Form[] {
  const result = [Form.one];
  for (let k = 1; k <= count; k++) result.push((result[k - 1] as Form).mul(x).scale(Rational.of(1, k)));
  return result;
}

/** t/(e^(w t) - 1) = sum_k B_k w^(k-1) t^k/k!. */
function bernoulliSeries(w: Form, count: number): Form[] {
  const result: Form[] = [];
  let power = w.inverse();
  for (let k = 0; k <= count; k++) {
    result.push(power.scale(bernoulliNumber(k).div(factorialOf(k))));
    // w^-1, 1, w, ...: an `inverse` atom times w is not reduced, so 1 is written directly.
    power = k === 0 ? Form.one : power.mul(w);
  }
  return result;
}

function multiplySeries(a: readonly Form[], b: readonly Form[], count: number): Form[] {
  return Array.from({ length: count + 1 }, (_, k) =>
    Form.sum(a.slice(0, k + 1).map((c, i) => c.mul(b[k - i] as Form))),
  );
}
