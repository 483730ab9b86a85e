import { memoiseBounded } from '../arithmetic/memo';
import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { bernoulliNumber } from '../functions/bernoulli';
import { evaluatePolynomial, type Polynomial } from './polynomial';

/** B_n(x) = sum_k binomial(n, k) B_(n-k) x^k (DLMF 24.2.5). */
export const bernoulliPolynomial = memoiseBounded(64, (n: number): Polynomial => {
  const result: Form[] = [];
  let binomial = Rational.one;
  for (let k = 0; k <= n; k++) {
    result.push(Form.number(binomial.mul(bernoulliNumber(n - k))));
    binomial = binomial.mul(Rational.of(n - k, k + 1));
  }
  return result;
});

/** P with P(x + 1) - P(x) = p(x), from Bernoulli polynomials (DLMF 24.4.1). */
export function powerSums(p: Polynomial, at: Form): Form {
  return Form.sum(
    p.map((c, k) => c.mul(evaluatePolynomial(bernoulliPolynomial(k + 1), at)).scale(Rational.of(1, k + 1))),
  );
}
