import { add, type DoubleComplex, multiply, scale } from '../arithmetic/double-complex';
import { memoiseBounded } from '../arithmetic/memo';
import { evenBernoulliNumbers } from './bernoulli';

/**
 * Coefficients d_0, ..., d_{count-1} of prod_i (w_i t/sinh(w_i t)) = sum_m d_m t^{2m} in doubles, from
 * x/sinh x = -sum_k 2 (2^{2k-1} - 1) B_{2k} x^{2k}/(2k)! (DLMF 4.33). All terms of one d_m have the same sign.
 */
export function oddKernelSeries(periods: readonly number[], count: number): readonly number[] {
  const single = inverseSinhSeries(count);
  let product: readonly number[] = single.map((_, k): number => (k === 0 ? 1 : 0));
  for (const period of periods) {
    const scaled = single.map((value, k) => value * period ** (2 * k));
    product = product.map((_, m) => {
      let sum = 0;
      for (let k = 0; k <= m; k++) sum += (product[k] as number) * (scaled[m - k] as number);
      return sum;
    });
  }
  return product;
}

/** The same for complex periods. */
export function oddComplexKernelSeries(periods: readonly DoubleComplex[], count: number): readonly DoubleComplex[] {
  const single = inverseSinhSeries(count);
  let product: readonly DoubleComplex[] = single.map((_, k) => ({ re: k === 0 ? 1 : 0, im: 0 }));
  for (const period of periods) {
    const square = multiply(period, period);
    const scaled: DoubleComplex[] = [];
    let power: DoubleComplex = { re: 1, im: 0 };
    for (const value of single) {
      scaled.push(scale(power, value));
      power = multiply(power, square);
    }
    product = product.map((_, m) => {
      let sum: DoubleComplex = { re: 0, im: 0 };
      for (let k = 0; k <= m; k++)
        sum = add(sum, multiply(product[k] as DoubleComplex, scaled[m - k] as DoubleComplex));
      return sum;
    });
  }
  return product;
}

/** Coefficients of x/sinh x in powers of x^2. */
const inverseSinhSeries = memoiseBounded(4, (count: number): readonly number[] => {
  const bernoulli = evenBernoulliNumbers(Math.max(1, count - 1));
  const list = [1];
  let factorial = 1;
  for (let k = 1; k < count; k++) {
    factorial *= (2 * k - 1) * (2 * k);
    list.push((-2 * (2 ** (2 * k - 1) - 1) * (bernoulli[k - 1]?.toNumber() as number)) / factorial);
  }
  return list;
});
