import { Form } from '../exact/form';
import { Gaussian } from '../exact/gaussian';
import { Rational } from '../exact/rational';
import { factorise } from '../spectrum/factorise';
import { asForm } from '../spectrum/form-division';
import { degreeOf, leadingCoefficient, type Polynomial, polynomialIn } from '../spectrum/polynomial';
import { formLatex } from './form';
import { symbolLatex } from './symbol';

/** A sum with numbers first, then real terms, then imaginary ones: 2 - Delta + i sigma. */
export function sumLatex(form: Form): string {
  const constant: Form[] = [];
  const real: Form[] = [];
  const imaginary: Form[] = [];
  for (const { coefficient, factors } of form.terms) {
    const plain = asForm({ coefficient: Gaussian.of(coefficient.re), factors });
    const turned = asForm({ coefficient: Gaussian.of(Rational.zero, coefficient.im), factors });
    if (!turned.isZero()) imaginary.push(turned);
    if (!plain.isZero()) (factors.length === 0 ? constant : real).push(plain);
  }
  return (
    joined([constant, real, imaginary].map((parts) => (parts.length === 0 ? '' : formLatex(Form.sum(parts))))) || '0'
  );
}

function joined(parts: readonly string[]): string {
  return parts
    .filter((part) => part !== '')
    .reduce(
      (text, part) => (text === '' || /^(?:-|\\[pm][pm](?![a-z]))/.test(part) ? text + part : `${text}+${part}`),
      '',
    );
}

/** A polynomial in an index, highest power first: n^2+2n+M^2, n+2-\Delta. */
export function indexPolynomialLatex(p: Polynomial, index: string): string {
  const parts = [...p.entries()].reverse().map(([power, c]) => {
    if (c.isZero()) return '';
    if (power === 0) return sumLatex(c);
    const letter = power === 1 ? index : `${index}^{${power}}`;
    if (c.equals(Form.one)) return letter;
    if (c.equals(Form.number(-1))) return `-${letter}`;
    const text = sumLatex(c);
    return c.terms.length > 1 ? `(${text})${letter}` : spaced(text, letter);
  });
  return joined(parts) || '0';
}

/** An eigenvalue in its indices; squares are completed where that makes it shorter: (n+1)^2+a^2. */
export function eigenvalueLatex(form: Form, indices: readonly string[]): string {
  const name = indices.find((index) => form.symbols().includes(index));
  if (name === undefined) return sumLatex(form);
  const used = indices.filter((index) => form.symbols().includes(index));
  if (used.length > 1) return severalLatex(form, used);
  const p = polynomialIn(form, name);
  if (p === null) return formLatex(form);
  return completedLatex(p, symbolLatex(name));
}

/** A monic quadratic with the square completed where that makes it shorter, else by powers. */
export function completedLatex(p: Polynomial, letter: string): string {
  const [c, b] = p as [Form, Form];
  const center = b?.scale(Rational.of(1, 2)).toRational() ?? null;
  if (p.length === 3 && p[2]?.equals(Form.one) && center !== null && !center.isZero()) {
    const rest = c.sub(Form.number(center.mul(center)));
    if (!rest.isZero() && rest.terms.length < c.terms.length) {
      return joined([`(${joined([letter, formLatex(Form.number(center))])})^2`, sumLatex(rest)]);
    }
  }
  return indexPolynomialLatex(p, letter);
}

/** Terms with indices first, in the order of the indices. */
function severalLatex(form: Form, indices: readonly string[]): string {
  const holds = (part: Form, index: string): boolean => part.symbols().includes(index);
  const parts = form.split();
  const lead = indices.flatMap((index, k) =>
    parts.filter((part) => holds(part, index) && !indices.slice(0, k).some((other) => holds(part, other))),
  );
  const rest = Form.sum(parts.filter((part) => !indices.some((index) => holds(part, index))));
  return joined([...lead.map(formLatex), rest.isZero() ? '' : sumLatex(rest)]);
}

/** Command names may not run into the next letter. */
function spaced(a: string, b: string): string {
  return /\\[A-Za-z]+$/.test(a) && /^[A-Za-z]/.test(b) ? `${a} ${b}` : a + b;
}

/**
 * A multiplicity as a product where it has rational roots: 2(n+1)(n+2), \frac{1}{6}(n+1)(n+2)(2n+3), else as a sum.
 */
export function multiplicityLatex(p: Polynomial, index: string): string {
  if (degreeOf(p) < 1) return sumLatex(p[0] ?? Form.zero);
  const { leading, linear, irreducible } = factorise(p);
  const content = leading.toRational();
  if (content === null || irreducible.length > 0 || linear.some(({ shift }) => shift.toRational() === null)) {
    return indexPolynomialLatex(p, index);
  }
  let factor = content;
  const parts = [...linear]
    .sort((a, b) => (a.shift.toRational() as Rational).compare(b.shift.toRational() as Rational))
    .map(({ shift, power }) => {
      const { numerator, denominator } = shift.toRational() as Rational;
      factor = factor.div(Rational.of(denominator).pow(power));
      const letter = denominator === 1n ? index : `${denominator}${index}`;
      const base = numerator === 0n ? letter : `(${letter}${numerator > 0n ? '+' : ''}${numerator})`;
      return power === 1 ? base : `${base}^{${power}}`;
    });
  const body = parts.join('');
  const bare =
    parts.length === 1 && linear[0]?.power === 1 && factor.equals(Rational.one)
      ? body.replace(/^\((.*)\)$/, '$1')
      : body;
  return factor.equals(Rational.one)
    ? bare
    : factor.equals(Rational.of(-1))
      ? `-${body}`
      : rationalLatex(factor) + body;
}

export function rationalLatex(value: Rational): string {
  return formLatex(Form.number(value));
}

/** A multiplicity with its sign taken off; null sign where it is not known. */
export function signOf(p: Polynomial): 1 | -1 {
  const top = leadingCoefficient(p);
  const lead = top.terms[0]?.coefficient;
  return lead !== undefined && (lead.re.sign() < 0 || (lead.re.isZero() && lead.im.sign() < 0)) ? -1 : 1;
}
