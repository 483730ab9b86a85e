import { Gaussian } from './gaussian';
import { Rational } from './rational';

/**
 * What a form is made of besides numbers: a name that a value can be given to, a mathematical constant,
 * or a function of forms that has no exact value of its own (`sqrt(2)`, `exp(1/3)`, `1/(1 + b)`).
 * Names that begin with `@` are the engine's own (geometry, placeholders); no user can type one.
 */
export type Atom =
  | { readonly kind: 'symbol'; readonly name: string; readonly key: string }
  | { readonly kind: 'constant'; readonly name: 'pi' | 'e'; readonly key: string }
  | { readonly kind: 'call'; readonly name: CallName; readonly arguments: readonly Form[]; readonly key: string };

/** Functions that may stand in a form. `inverse` is 1/x, `power` is x^y on the principal branch. */
export type CallName =
  | 'sqrt'
  | 'exp'
  | 'log'
  | 'sin'
  | 'cos'
  | 'tan'
  | 'sinh'
  | 'cosh'
  | 'tanh'
  | 'abs'
  | 'inverse'
  | 'power';

/** One term: coefficient times a product of atoms to integer powers, atoms in the order of their keys. */
export interface Term {
  readonly coefficient: Gaussian;
  readonly factors: readonly { readonly atom: Atom; readonly power: number }[];
}

/** A form grew past this many terms: nothing in the field needs it, and a product of sums could exhaust memory. */
const MAXIMAL_TERMS = 4096;

/**
 * An exact Laurent polynomial with Gaussian rational coefficients in atoms; affine in Coulomb parameters and masses
 * wherever it is the argument of a special function. Immutable and in normal form: two forms that are equal as
 * polynomials in their atoms have equal keys. Square roots of single terms are reduced (sqrt(2)^2 = 2), so forms over
 * one quadratic field are compared exactly.
 */
export class Form {
  static readonly zero = new Form([]);
  static readonly one = Form.number(Rational.one);
  static readonly i = Form.gaussian(Gaussian.i);
  static readonly pi = Form.atom({ kind: 'constant', name: 'pi', key: 'pi' });

  readonly terms: readonly Term[];
  #key: string | null = null;

  private constructor(terms: readonly Term[]) {
    this.terms = terms;
  }

  /** Canonical text; equal forms have equal keys. */
  get key(): string {
    this.#key ??= this.terms.length === 0 ? '0' : this.terms.map(termKey).join(' + ');
    return this.#key;
  }

  static number(value: Rational | number | bigint): Form {
    return Form.gaussian(Gaussian.of(value));
  }

  static ratio(numerator: number, denominator: number): Form {
    return Form.number(Rational.of(numerator, denominator));
  }

  static gaussian(value: Gaussian): Form {
    return value.isZero() ? new Form([]) : new Form([{ coefficient: value, factors: [] }]);
  }

  static symbol(name: string): Form {
    return Form.atom({ kind: 'symbol', name, key: name });
  }

  static atom(atom: Atom, power = 1): Form {
    return new Form([{ coefficient: Gaussian.one, factors: [{ atom, power }] }]);
  }

  /** A function of forms, reduced where an exact value exists (sqrt of a square, exp(0), ...). */
  static call(name: CallName, ...args: Form[]): Form {
    return reduceCall(name, args);
  }

  static sum(forms: readonly Form[]): Form {
    const collected = new Map<string, Term>();
    for (const form of forms) for (const term of form.terms) collect(collected, term);
    return Form.fromCollected(collected);
  }

  private static fromCollected(collected: Map<string, Term>): Form {
    const kept = [...collected].filter(([, term]) => !term.coefficient.isZero());
    if (kept.length > MAXIMAL_TERMS) throw new FormTooLargeError(kept.length);
    kept.sort(([a], [b]) => (a < b ? -1 : 1));
    return new Form(kept.map(([, term]) => term));
  }

  add(other: Form): Form {
    if (other.terms.length === 0) return this;
    if (this.terms.length === 0) return other;
    return Form.sum([this, other]);
  }

  neg(): Form {
    return new Form(this.terms.map((t) => ({ coefficient: t.coefficient.neg(), factors: t.factors })));
  }

  sub(other: Form): Form {
    return this.add(other.neg());
  }

  scale(factor: Rational | number | Gaussian): Form {
    const g = factor instanceof Gaussian ? factor : Gaussian.of(factor);
    if (g.isZero()) return Form.zero;
    return new Form(this.terms.map((t) => ({ coefficient: t.coefficient.mul(g), factors: t.factors })));
  }

  mul(other: Form): Form {
    if (this.terms.length * other.terms.length > MAXIMAL_TERMS) {
      throw new FormTooLargeError(this.terms.length * other.terms.length);
    }
    const collected = new Map<string, Term>();
    for (const a of this.terms) {
      for (const b of other.terms) for (const term of multiplyTerms(a, b)) collect(collected, term);
    }
    return Form.fromCollected(collected);
  }

  /** 1/form; exact for a single term, else an `inverse` atom. Throws FormError at zero. */
  inverse(): Form {
    if (this.terms.length === 0) throw new FormError('An exact expression divides by zero.');
    if (this.terms.length > 1) return Form.atom(callAtom('inverse', [this]));
    const term = this.terms[0] as Term;
    let result = Form.gaussian(term.coefficient.inverse());
    for (const { atom, power } of term.factors) result = result.mul(powerOfAtom(atom, -power));
    return result;
  }

  div(other: Form): Form {
    return this.mul(other.inverse());
  }

  /** Integer power. */
  pow(exponent: number): Form {
    if (exponent < 0) return this.inverse().pow(-exponent);
    let result = Form.one;
    for (let k = 0; k < exponent; k++) result = result.mul(this);
    return result;
  }

  equals(other: Form): boolean {
    return this.key === other.key;
  }

  isZero(): boolean {
    return this.terms.length === 0;
  }

  /** The exact number, or null if any atom is left. */
  toGaussian(): Gaussian | null {
    if (this.terms.length === 0) return Gaussian.zero;
    const only = this.terms[0] as Term;
    return this.terms.length === 1 && only.factors.length === 0 ? only.coefficient : null;
  }

  toRational(): Rational | null {
    const value = this.toGaussian();
    return value?.isReal() ? value.re : null;
  }

  /** Replaces symbols by forms, everywhere, also inside functions; symbols that `values` answers null for stay. */
  substitute(values: (name: string) => Form | null): Form {
    if (!this.terms.some((term) => term.factors.some(({ atom }) => mentions(atom, values)))) return this;
    const parts = this.terms.map((term) => {
      let product = Form.gaussian(term.coefficient);
      for (const { atom, power } of term.factors) product = product.mul(substituteAtom(atom, power, values));
      return product;
    });
    return Form.sum(parts);
  }

  /** All symbol names, those inside functions included, sorted. */
  symbols(): string[] {
    const names = new Set<string>();
    const visit = (form: Form): void => {
      for (const term of form.terms) {
        for (const { atom } of term.factors) {
          if (atom.kind === 'symbol') names.add(atom.name);
          else if (atom.kind === 'call') atom.arguments.forEach(visit);
        }
      }
    };
    visit(this);
    return [...names].sort();
  }

  /** Coefficient of the first power of a symbol, and the rest. Terms with other powers of it stay in the rest. */
  linearPart(name: string): { readonly coefficient: Form; readonly rest: Form } {
    const linear: Term[] = [];
    const rest: Term[] = [];
    for (const term of this.terms) {
      const hit = term.factors.find(({ atom }) => atom.kind === 'symbol' && atom.name === name);
      if (hit?.power === 1) {
        linear.push({ coefficient: term.coefficient, factors: term.factors.filter((f) => f !== hit) });
      } else rest.push(term);
    }
    return { coefficient: Form.sum(linear.map((t) => new Form([t]))), rest: new Form(rest) };
  }

  /** Each term as a form of its own, in order. */
  split(): Form[] {
    return this.terms.map((term) => new Form([term]));
  }

  /** Complex conjugate, all symbols taken real. */
  conjugate(): Form {
    return Form.sum(
      this.terms.map((term) => {
        let product = Form.gaussian(term.coefficient.conjugate());
        for (const { atom, power } of term.factors) {
          const base =
            atom.kind === 'call' ? Form.call(atom.name, ...atom.arguments.map((a) => a.conjugate())) : Form.atom(atom);
          product = product.mul(power === 1 ? base : base.pow(power));
        }
        return product;
      }),
    );
  }

  toString(): string {
    return this.key;
  }
}

/**
 * Thrown where exact values that a user chose leave a form without meaning (a division by zero) or without end. The
 * requests turn it into a refusal in words.
 */
export class FormError extends RangeError {}

/** Thrown when a form has more terms than any formula of the field. */
export class FormTooLargeError extends FormError {
  constructor(count: number) {
    super(`An exact expression would have ${count} terms; the limit is ${MAXIMAL_TERMS}.`);
  }
}

function termKey(term: Term): string {
  const atoms = monomialKey(term.factors);
  return atoms === '' ? term.coefficient.toString() : `${term.coefficient}*${atoms}`;
}

function monomialKey(factors: Term['factors']): string {
  return factors.map(({ atom, power }) => (power === 1 ? atom.key : `${atom.key}^${power}`)).join('*');
}

function collect(into: Map<string, Term>, term: Term): void {
  const key = monomialKey(term.factors);
  const present = into.get(key);
  into.set(key, present ? { coefficient: present.coefficient.add(term.coefficient), factors: present.factors } : term);
}

function multiplyTerms(a: Term, b: Term): readonly Term[] {
  const coefficient = a.coefficient.mul(b.coefficient);
  if (a.factors.length === 0) return [{ coefficient, factors: b.factors }];
  if (b.factors.length === 0) return [{ coefficient, factors: a.factors }];
  const powers = new Map<string, { atom: Atom; power: number }>();
  for (const { atom, power } of [...a.factors, ...b.factors]) {
    powers.set(atom.key, { atom, power: power + (powers.get(atom.key)?.power ?? 0) });
  }
  const merged = [...powers.values()].filter(({ power }) => power !== 0);
  merged.sort((x, y) => (x.atom.key < y.atom.key ? -1 : 1));
  const reducible = merged.find(({ atom, power }) => isRoot(atom) && (power < 0 || power > 1));
  if (!reducible) return [{ coefficient, factors: merged }];
  const rest: Term = { coefficient, factors: merged.filter((f) => f !== reducible) };
  const reduced = powerOfAtom(reducible.atom, reducible.power);
  return reduced.terms.flatMap((term) => multiplyTerms(rest, term));
}

/** True for the root of a single term. */
function isRoot(atom: Atom): atom is Extract<Atom, { kind: 'call' }> {
  return atom.kind === 'call' && atom.name === 'sqrt' && (atom.arguments[0] as Form).terms.length === 1;
}

/** atom^power, with sqrt(x)^2 = x for single terms x so that quadratic irrationals have one normal form. */
function powerOfAtom(atom: Atom, power: number): Form {
  if (!isRoot(atom) || power === 1) return Form.atom(atom, power);
  const outside = (atom.arguments[0] as Form).pow(Math.floor(power / 2));
  return power % 2 === 0 ? outside : outside.mul(Form.atom(atom));
}

function callAtom(name: CallName, args: readonly Form[]): Atom {
  return { kind: 'call', name, arguments: args, key: `${name}(${args.map((a) => a.key).join(', ')})` };
}

function mentions(atom: Atom, values: (name: string) => Form | null): boolean {
  if (atom.kind === 'symbol') return values(atom.name) !== null;
  if (atom.kind === 'constant') return false;
  return atom.arguments.some((form) => form.symbols().some((name) => values(name) !== null));
}

function substituteAtom(atom: Atom, power: number, values: (name: string) => Form | null): Form {
  if (atom.kind === 'symbol') {
    const value = values(atom.name);
    return value === null ? Form.atom(atom, power) : value.pow(power);
  }
  if (atom.kind === 'constant' || !mentions(atom, values)) return Form.atom(atom, power);
  return Form.call(atom.name, ...atom.arguments.map((a) => a.substitute(values))).pow(power);
}

/** The value of f(0) where it is rational. */
const AT_ZERO: Partial<Record<CallName, 0 | 1>> = {
  sqrt: 0,
  exp: 1,
  sin: 0,
  cos: 1,
  tan: 0,
  sinh: 0,
  cosh: 1,
  tanh: 0,
  abs: 0,
};

function reduceCall(name: CallName, args: readonly Form[]): Form {
  const x = args[0] as Form;
  const known = AT_ZERO[name];
  if (x.isZero() && known !== undefined) return Form.number(known);
  const q = x.toRational();
  if (name === 'inverse') return x.inverse();
  if (name === 'abs' && q) return Form.number(q.abs());
  if (name === 'abs' && x.terms.length === 1) {
    const { coefficient } = x.terms[0] as Term;
    if (coefficient.isReal() && !coefficient.equals(Gaussian.one)) {
      return Form.call('abs', x.scale(coefficient.inverse())).scale(coefficient.re.abs());
    }
  }
  if (name === 'abs' && x.terms[0]?.coefficient.re.sign() === -1) return Form.call('abs', x.neg());
  if (name === 'log' && q?.equals(Rational.one)) return Form.zero;
  if (name === 'sqrt' && q) return rootOfRational(q);
  if (name === 'exp' && q?.equals(Rational.one)) return Form.atom({ kind: 'constant', name: 'e', key: 'e' });
  if (name === 'power') {
    const exponent = (args[1] as Form).toRational();
    if (exponent?.isInteger() && exponent.abs().compare(Rational.of(MAXIMAL_EXPONENT)) <= 0) {
      return x.pow(Number(exponent.numerator));
    }
    if (exponent?.denominator === 2n && exponent.abs().compare(Rational.of(MAXIMAL_EXPONENT)) <= 0) {
      return Form.call('sqrt', x).pow(Number(exponent.numerator));
    }
  }
  return Form.atom(callAtom(name, args));
}

/** Largest integer exponent that is multiplied out; larger ones stay functions. */
const MAXIMAL_EXPONENT = 256;

/** sqrt(q) as rational times the root of a square-free part; square factors above 10^6 are not searched for. */
function rootOfRational(q: Rational): Form {
  if (q.sign() < 0) return Form.i.mul(rootOfRational(q.neg()));
  const exact = q.sqrt();
  if (exact) return Form.number(exact);
  let inside = q.numerator * q.denominator;
  let outside = 1n;
  for (let p = 2n; p * p <= inside && p < 1000n; p++) {
    while (inside % (p * p) === 0n) {
      inside /= p * p;
      outside *= p;
    }
  }
  return Form.number(Rational.of(outside, q.denominator)).mul(
    Form.atom(callAtom('sqrt', [Form.number(Rational.of(inside))])),
  );
}
