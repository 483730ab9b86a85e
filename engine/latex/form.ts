import type { Atom, Form, Term } from '../exact/form';
import { Gaussian } from '../exact/gaussian';
import { gcd, Rational } from '../exact/rational';
import { symbolLatex, TRACE } from './symbol';

/**
 * A form in LaTeX the way papers write it: terms with the same geometry symbols and the same factor i are taken
 * together, so that iQ/2 - iQr/2 is \frac{iQ}{2}(1-r).
 */
export function formLatex(form: Form): string {
  if (form.isZero()) return '0';
  const groups = new Map<string, { outer: Term['factors']; imaginary: boolean; inner: Term[] }>();
  for (const term of form.terms.flatMap(splitComplex)) {
    const outer = outerOrder(term.factors.filter(({ atom }) => isGeometry(atom)));
    const inner = term.factors.filter(({ atom }) => !isGeometry(atom));
    const imaginary = !term.coefficient.isReal();
    const shared = imaginary || outer.length > 0;
    const key = `${imaginary}|${outer.map(({ atom, power }) => `${atom.key}^${power}`).join('*')}`;
    const rotated = imaginary ? Gaussian.of(term.coefficient.im) : term.coefficient;
    const entry = { coefficient: rotated, factors: inner };
    const present = groups.get(key);
    if (present && shared) present.inner.push(entry);
    else groups.set(shared ? key : `${key}|${groups.size}`, { outer, imaginary, inner: [entry] });
  }
  const ordered = [...groups.values()].sort((a, b) => rank(a) - rank(b));
  return joinSigned(ordered.map(({ outer, imaginary, inner }) => groupLatex(outer, imaginary, inner)));
}

/** The form in parentheses unless it is a single unsigned term. */
export function formInParentheses(form: Form): string {
  const text = formLatex(form);
  return form.terms.length > 1 || text.startsWith('-') ? `(${text})` : text;
}

/** Joins signed pieces, the first positive one without its sign. */
export function joinSigned(pieces: readonly Signed[]): string {
  return pieces
    .map(({ negative, either, latex }, k) => {
      if (either) return `${negative ? '\\mp' : '\\pm'} ${latex}`;
      return negative ? `-${latex}` : k === 0 ? latex : `+${latex}`;
    })
    .join('');
}

export interface Signed {
  readonly negative: boolean;
  /** Both signs are meant: the first printed is + unless `negative`. */
  readonly either?: boolean;
  readonly latex: string;
}

/** Factor that marks a term whose sign runs over both values; its letter says which signs run together. */
export const EITHER_SIGN = '@pm';

/** Geometry and imaginary parts first, then the rest in the order of the form. */
function rank(group: { outer: Term['factors']; imaginary: boolean }): number {
  return (group.outer.length > 0 ? 0 : 2) + (group.imaginary ? 0 : 1);
}

/** Geometry symbols and constants are taken out in front of a bracket. */
function isGeometry(atom: Atom): boolean {
  if (atom.kind === 'constant') return true;
  return (
    atom.kind === 'symbol' && atom.name.startsWith('@') && atom.name !== EITHER_SIGN && !atom.name.startsWith(TRACE)
  );
}

/** Constants first: pi b, not b pi. */
function outerOrder(factors: Term['factors']): Term['factors'] {
  const constant = (atom: Atom): number => (atom.kind === 'constant' ? 0 : 1);
  return [...factors].sort((a, b) => constant(a.atom) - constant(b.atom));
}

function splitComplex(term: Term): Term[] {
  const { re, im } = term.coefficient;
  if (re.isZero() || im.isZero()) return [term];
  return [
    { coefficient: Gaussian.of(re), factors: term.factors },
    { coefficient: Gaussian.of(Rational.zero, im), factors: term.factors },
  ];
}

/** content * [i] * outer * (inner), with the rational content in front as one fraction. */
function groupLatex(outer: Term['factors'], imaginary: boolean, inner: readonly Term[]): Signed {
  const content = contentOf(inner);
  const unit = imaginary ? 'i' : '';
  if (inner.length === 1) {
    const only = inner[0] as Term;
    return fraction(content, unit, [...outer, ...only.factors]);
  }
  const primitive = inner.map((term) => ({
    coefficient: Gaussian.of(term.coefficient.re.div(content)),
    factors: term.factors,
  }));
  const lead = fraction(content, unit, outer);
  const body = joinSigned(bracketOrder(primitive).map((t) => fraction(t.coefficient.re, '', t.factors)));
  return {
    negative: lead.negative,
    either: lead.either ?? false,
    latex: lead.latex === '1' ? `(${body})` : `${lead.latex}(${body})`,
  };
}

/** Greatest rational that divides all coefficients; negative only when all of them are. */
function contentOf(terms: readonly Term[]): Rational {
  let numerator = 0n;
  let denominator = 1n;
  for (const { coefficient } of terms) {
    const q = coefficient.re.abs();
    numerator = gcd(numerator, q.numerator);
    denominator = (denominator * q.denominator) / gcd(denominator, q.denominator);
  }
  const size = Rational.of(numerator, denominator);
  return terms.every(({ coefficient }) => coefficient.re.sign() < 0) ? size.neg() : size;
}

/** Terms of low degree first, but a positive one in front where there is one: 1 - r, 2r - 1. */
function bracketOrder(terms: readonly Term[]): Term[] {
  const sorted = [...terms].sort((a, b) => a.factors.length - b.factors.length);
  const first = sorted.findIndex(({ coefficient }) => coefficient.re.sign() > 0);
  return first <= 0 ? sorted : [sorted[first] as Term, ...sorted.filter((_, k) => k !== first)];
}

function fraction(coefficient: Rational, unit: string, factors: Term['factors']): Signed {
  const either = factors.some(({ atom }) => atom.kind === 'symbol' && atom.name === EITHER_SIGN);
  const above = factors.filter(
    ({ atom, power }) => power > 0 && !(atom.kind === 'symbol' && atom.name === EITHER_SIGN),
  );
  const below = factors.filter(({ power }) => power < 0);
  const n = coefficient.abs().numerator;
  const d = coefficient.denominator;
  const top = juxtapose([n === 1n ? '' : `${n}`, unit, ...above.map(({ atom, power }) => powerLatex(atom, power))]);
  const bottom = juxtapose([d === 1n ? '' : `${d}`, ...below.map(({ atom, power }) => powerLatex(atom, -power))]);
  const negative = coefficient.sign() < 0;
  if (bottom === '') return { negative, either, latex: top === '' ? '1' : top };
  return { negative, either, latex: `\\frac{${top === '' ? '1' : top}}{${bottom}}` };
}

/** Joins pieces with a thin gap only where a command name would swallow the next letter. */
export function juxtapose(parts: readonly string[]): string {
  return parts
    .filter((part) => part !== '')
    .reduce(
      (text, part) => (/\\[A-Za-z]+$/.test(text) && /^[A-Za-z]/.test(part) ? `${text} ${part}` : text + part),
      '',
    );
}

function powerLatex(atom: Atom, power: number): string {
  const base = atomLatex(atom);
  if (power === 1) return base;
  // A prime is a superscript too: m'_1^2 is no LaTeX.
  const wrapped = atom.kind === 'call' ? `\\left(${base}\\right)` : base.includes("'") ? `{${base}}` : base;
  return `${wrapped}^${power < 10 && power >= 0 ? power : `{${power}}`}`;
}

function atomLatex(atom: Atom): string {
  if (atom.kind === 'symbol') return symbolLatex(atom.name);
  if (atom.kind === 'constant') return atom.name === 'pi' ? '\\pi' : 'e';
  const args = atom.arguments.map(formLatex);
  const [first = ''] = args;
  switch (atom.name) {
    case 'sqrt':
      return `\\sqrt{${first}}`;
    case 'exp':
      return `e^{${first}}`;
    case 'abs':
      return `\\left|${first}\\right|`;
    case 'inverse':
      return `\\frac{1}{${first}}`;
    case 'power':
      return `\\left(${first}\\right)^{${args[1] ?? ''}}`;
    default:
      return `\\${atom.name}\\left(${first}\\right)`;
  }
}
