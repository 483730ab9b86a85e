import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { asForm } from './form-division';

/** A polynomial in one index with forms as coefficients: of n^0, n^1, ...; the last is not zero, [] is 0. */
export type Polynomial = readonly Form[];

export const zeroPolynomial: Polynomial = [];

/** The form as a polynomial in a name; null where the name stands inside a function or in a denominator. */
export function polynomialIn(form: Form, name: string): Polynomial | null {
  const coefficients: Form[] = [];
  for (const term of form.terms) {
    let degree = 0;
    const rest: (typeof term.factors)[number][] = [];
    for (const factor of term.factors) {
      if (factor.atom.kind === 'symbol' && factor.atom.name === name) degree = factor.power;
      else if (factor.atom.kind === 'call' && factor.atom.arguments.some((a) => a.symbols().includes(name)))
        return null;
      else rest.push(factor);
    }
    if (degree < 0) return null;
    const part = asForm({ coefficient: term.coefficient, factors: rest });
    coefficients[degree] = (coefficients[degree] ?? Form.zero).add(part);
  }
  return trimmed(Array.from(coefficients, (c) => c ?? Form.zero));
}

export function trimmed(coefficients: readonly Form[]): Polynomial {
  let length = coefficients.length;
  while (length > 0 && (coefficients[length - 1] as Form).isZero()) length--;
  return coefficients.slice(0, length);
}

/** -1 for 0. */
export function degreeOf(p: Polynomial): number {
  return p.length - 1;
}

export function coefficient(p: Polynomial, degree: number): Form {
  return p[degree] ?? Form.zero;
}

export function leadingCoefficient(p: Polynomial): Form {
  return p[p.length - 1] ?? Form.zero;
}

export function constantPolynomial(value: Form): Polynomial {
  return trimmed([value]);
}

export function addPolynomials(p: Polynomial, q: Polynomial): Polynomial {
  const length = Math.max(p.length, q.length);
  return trimmed(Array.from({ length }, (_, k) => coefficient(p, k).add(coefficient(q, k))));
}

export function scalePolynomial(p: Polynomial, factor: Form | Rational | number): Polynomial {
  return trimmed(p.map((c) => (factor instanceof Form ? c.mul(factor) : c.scale(factor))));
}

export function multiplyPolynomials(p: Polynomial, q: Polynomial): Polynomial {
  const product: Form[] = Array.from({ length: Math.max(0, p.length + q.length - 1) }, () => Form.zero);
  p.forEach((a, i) => {
    q.forEach((b, j) => {
      product[i + j] = (product[i + j] as Form).add(a.mul(b));
    });
  });
  return trimmed(product);
}

/** p(n + by), by Horner's rule on the coefficients. */
export function shiftPolynomial(p: Polynomial, by: Form): Polynomial {
  if (by.isZero()) return p;
  const result = [...p];
  for (let low = 0; low < p.length - 1; low++) {
    for (let k = p.length - 2; k >= low; k--) {
      result[k] = (result[k] as Form).add((result[k + 1] as Form).mul(by));
    }
  }
  return trimmed(result);
}

/** p(at). */
export function evaluatePolynomial(p: Polynomial, at: Form): Form {
  return p.reduceRight((sum, c) => sum.mul(at).add(c), Form.zero);
}

export function samePolynomial(p: Polynomial, q: Polynomial): boolean {
  return p.length === q.length && p.every((c, k) => c.equals(coefficient(q, k)));
}

export function polynomialKey(p: Polynomial): string {
  return p.map((c) => c.key).join(' ; ');
}

/** p / (n - root), the remainder dropped. */
export function divideByRoot(p: Polynomial, root: Form): Polynomial {
  const result: Form[] = [];
  let carry = Form.zero;
  for (let k = p.length - 1; k >= 1; k--) {
    carry = carry.mul(root).add(coefficient(p, k));
    result[k - 1] = carry;
  }
  return trimmed(result);
}

/** The quotient of p by a monic polynomial, or null where a remainder is left. */
export function divideExactly(p: Polynomial, monic: Polynomial): Polynomial | null {
  let rest = p;
  const result: Form[] = Array.from({ length: Math.max(0, p.length - monic.length + 1) }, () => Form.zero);
  while (rest.length >= monic.length) {
    const place = rest.length - monic.length;
    const factor = leadingCoefficient(rest);
    result[place] = factor;
    const taken = [...Array.from({ length: place }, () => Form.zero), ...monic.map((c) => c.mul(factor))];
    // The leading terms cancel identically, so the length falls in every step.
    rest = trimmed(addPolynomials(rest, scalePolynomial(taken, -1)).slice(0, rest.length - 1));
  }
  return rest.length === 0 ? trimmed(result) : null;
}

/**
 * Coefficients q_m of p(j) = sum_m q_m binomial(j + m, m); p is integer valued on the integers exactly when they are
 * all integers.
 */
export function binomialCoefficients(p: Polynomial): readonly Form[] {
  const result: Form[] = [];
  let rest = p;
  while (rest.length > 0) {
    const degree = degreeOf(rest);
    const basis = risingBinomial(degree);
    const factor = leadingCoefficient(rest).div(leadingCoefficient(basis));
    result[degree] = factor;
    rest = addPolynomials(rest, scalePolynomial(basis, factor.neg())).slice(0, degree);
    rest = trimmed(rest);
  }
  return Array.from(result, (q) => q ?? Form.zero);
}

/** binomial(j + m, m) as a polynomial in j. */
export function risingBinomial(m: number): Polynomial {
  let result: Polynomial = [Form.one];
  for (let k = 1; k <= m; k++) {
    result = scalePolynomial(multiplyPolynomials(result, [Form.number(k), Form.one]), Rational.of(1, k));
  }
  return result;
}

/** The polynomial as a form in a name. */
export function polynomialForm(p: Polynomial, name: string): Form {
  return evaluatePolynomial(p, Form.symbol(name));
}
