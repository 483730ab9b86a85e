import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { bernoulliPolynomial, powerSums } from './bernoulli-polynomial';
import { coefficient, degreeOf, evaluatePolynomial, type Polynomial } from './polynomial';

/**
 * e_1, ..., e_count of log(q(w)/w^r) = sum_k e_k w^-k at infinity for a monic q of degree r, by Newton's recursion from
 * the coefficients; (-1)^(k+1) k e_k is the power sum of the a_j in q = product of (w + a_j).
 */
export function logarithmCoefficients(q: Polynomial, count: number): Form[] {
  const degree = degreeOf(q);
  const e: Form[] = [];
  for (let k = 1; k <= count; k++) {
    let sum = coefficient(q, degree - k).scale(k);
    for (let i = Math.max(1, k - degree); i < k; i++) {
      sum = sum.sub((e[i - 1] as Form).mul(coefficient(q, degree - k + i)).scale(i));
    }
    e.push(sum.scale(Rational.of(1, k)));
  }
  return e;
}

/** zeta(-k, x) = -B_(k+1)(x)/(k+1) (DLMF 25.11.14). */
export function zetaAtNegative(k: number, x: Form): Form {
  return evaluatePolynomial(bernoulliPolynomial(k + 1), x).scale(Rational.of(-1, k + 1));
}

/** A run of consecutive values of an index; `to` null: endless. */
export interface Run {
  readonly from: number;
  readonly to: number | null;
}

/**
 * sum over the linear factors of q(nu) of zeta_j(0), zeta_j(s) = sum over nu of M(nu) (nu + a_j)^-s: the regularised
 * number of linear factors. For a finite run their number. Exact.
 */
export function regularisedCount(q: Polynomial, multiplicity: Polynomial, run: Run): Form {
  const degree = degreeOf(q);
  if (run.to !== null) {
    const above = powerSums(multiplicity, Form.number(run.to + 1));
    return above.sub(powerSums(multiplicity, Form.number(run.from))).scale(degree);
  }
  const e = logarithmCoefficients(q, multiplicity.length);
  const start = Form.number(run.from);
  return Form.sum(
    multiplicity.map((c, m) =>
      c.mul(
        zetaAtNegative(m, start)
          .scale(degree)
          .sub(e[m] as Form),
      ),
    ),
  );
}
