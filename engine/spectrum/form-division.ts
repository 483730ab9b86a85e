import { type Atom, Form, type Term } from '../exact/form';
import { Gaussian } from '../exact/gaussian';
import { Rational } from '../exact/rational';

/**
 * Exact division and square roots of forms as Laurent polynomials in their atoms. Both answer null where no exact
 * result exists; every answer has been multiplied back.
 */

/** g with f = g h, for h not zero; null where h does not divide f. */
export function exactQuotient(f: Form, h: Form): Form | null {
  if (h.terms.length === 1) return f.div(h);
  const order = orderOf([f, h]);
  const lead = leadingTerm(h, order);
  let quotient = Form.zero;
  let rest = f;
  // A quotient has no more terms than there are monomials in f and h together in any case of use.
  for (let step = 0; step < f.terms.length + h.terms.length && !rest.isZero(); step++) {
    const term = asForm(leadingTerm(rest, order)).div(asForm(lead));
    quotient = quotient.add(term);
    rest = rest.sub(term.mul(h));
  }
  return rest.isZero() ? quotient : null;
}

/** f / h, with an `inverse` atom where the division is not exact. */
export function quotient(f: Form, h: Form): Form {
  return exactQuotient(f, h) ?? f.div(h);
}

/**
 * g with g^2 = f, Gaussian coefficients only: sqrt(-4 a^2) = 2 i a, sqrt(a^2 + 2 a b + b^2) = a + b. The sign is such
 * that the leading coefficient has positive real part, or positive imaginary part when it is imaginary.
 */
export function exactSquareRoot(f: Form): Form | null {
  if (f.isZero()) return Form.zero;
  const order = orderOf([f]);
  const lead = rootOfTerm(leadingTerm(f, order));
  if (lead === null) return null;
  let root = lead;
  for (let step = 0; step < f.terms.length; step++) {
    const rest = f.sub(root.mul(root));
    if (rest.isZero()) return root;
    root = root.add(asForm(leadingTerm(rest, order)).div(lead.scale(2)));
  }
  return f.equals(root.mul(root)) ? root : null;
}

/** The Gaussian rational square root with positive real part (or positive imaginary part), where it exists. */
export function gaussianSquareRoot(z: Gaussian): Gaussian | null {
  const size = z.re.mul(z.re).add(z.im.mul(z.im)).sqrt();
  if (size === null) return null;
  const half = Rational.of(1, 2);
  const re = size.add(z.re).mul(half).sqrt();
  const im = size.sub(z.re).mul(half).sqrt();
  if (re === null || im === null) return null;
  return Gaussian.of(re, z.im.sign() < 0 ? im.neg() : im);
}

function rootOfTerm(term: Term): Form | null {
  const coefficient = gaussianSquareRoot(term.coefficient);
  if (coefficient === null || term.factors.some(({ power }) => power % 2 !== 0)) return null;
  return asForm({ coefficient, factors: term.factors.map(({ atom, power }) => ({ atom, power: power / 2 })) });
}

/** The form with squares of square roots written out: sqrt(x)^2 is x. */
export function reduceRoots(form: Form): Form {
  const isHigh = (term: Term): boolean => term.factors.some(({ atom, power }) => isRoot(atom) && power > 1);
  if (!form.terms.some(isHigh)) return form;
  return Form.sum(
    form.terms.map((term) => {
      let product = Form.gaussian(term.coefficient);
      for (const { atom, power } of term.factors) {
        if (!isRoot(atom) || power < 2) product = product.mul(Form.atom(atom, power));
        else {
          product = product.mul((atom.arguments[0] as Form).pow(Math.floor(power / 2)));
          if (power % 2 === 1) product = product.mul(Form.atom(atom));
        }
      }
      return product;
    }),
  );
}

function isRoot(atom: Atom): atom is Extract<Atom, { kind: 'call' }> {
  return atom.kind === 'call' && atom.name === 'sqrt';
}

/** The form with one term. */
export function asForm(term: Term): Form {
  let form = Form.gaussian(term.coefficient);
  for (const { atom, power } of term.factors) form = form.mul(Form.atom(atom, power));
  return form;
}

/** The atoms in which monomials are compared, lexicographically by their powers. */
function orderOf(forms: readonly Form[]): readonly Atom[] {
  const atoms = new Map<string, Atom>();
  for (const form of forms) {
    for (const term of form.terms) for (const { atom } of term.factors) atoms.set(atom.key, atom);
  }
  return [...atoms.values()].sort((a, b) => (a.key < b.key ? -1 : 1));
}

function leadingTerm(form: Form, order: readonly Atom[]): Term {
  return form.terms.reduce((best, term) => (compareTerms(term, best, order) > 0 ? term : best));
}

function compareTerms(a: Term, b: Term, order: readonly Atom[]): number {
  for (const { key } of order) {
    const difference = powerIn(a, key) - powerIn(b, key);
    if (difference !== 0) return difference;
  }
  return 0;
}

function powerIn(term: Term, key: string): number {
  return term.factors.find(({ atom }) => atom.key === key)?.power ?? 0;
}
