import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import type { FunctionName } from '../functions/special-function';
import { functions } from '../functions/table';
import type { ClosedConstant, ClosedForm, ClosedFunction } from '../spectrum/closed-form';
import { formLatex } from './form';
import { indexPolynomialLatex, sumLatex } from './polynomial';
import { type Piece, printer } from './product';

/** A closed form as one fraction: numbers and functions by the sign of their power, constants in an exponential. */
export function closedPieces({ numbers, functions: special, exponent }: ClosedForm): Piece[] {
  const factors = [
    ...numbers.map(({ base, power }) => ({ latex: baseLatex(base), power, bare: isBare(base) })),
    ...special.map(({ of, power }) => ({ latex: functionLatex(of), power, bare: false })),
  ];
  const above = factors.filter(({ power }) => !isNegative(power));
  const below = factors.filter(({ power }) => isNegative(power));
  const sum = exponentLatex(exponent);
  const top = [...above.map((f) => powerLatex(f.latex, f.power, f.bare)), sum === '' ? '' : `e^{${sum}}`].filter(
    (text) => text !== '',
  );
  const bottom = below.map((f) => powerLatex(f.latex, f.power.neg(), f.bare));
  const latex =
    bottom.length === 0 ? juxtaposed(top) || '1' : `\\frac{${juxtaposed(top) || '1'}}{${juxtaposed(bottom)}}`;
  return [{ latex, from: [], expanded: null }];
}

/** Whole powers of whole numbers in front of a hyperbolic 2 are multiplied in: 2 \cdot 2\sinh is 4\sinh. */
function juxtaposed(parts: readonly string[]): string {
  let coefficient = 1n;
  const rest = parts.map((part) => {
    const leading = /^(\d+)(?=\\(?:sinh|cosh|sin)\b)/.exec(part);
    if (leading) coefficient *= BigInt(leading[1] as string);
    const whole = /^\d+$/.test(part);
    if (whole) coefficient *= BigInt(part);
    return whole ? '' : leading ? part.slice(leading[0].length) : part;
  });
  const text = rest.filter((part) => part !== '').join('\\,');
  if (text === '') return coefficient === 1n ? '' : `${coefficient}`;
  if (coefficient === 1n) return text;
  // 2 times 2^{1/4} is not 22^{1/4}.
  return /^\d/.test(text) ? `${coefficient}\\cdot ${text}` : `${coefficient}${text}`;
}

function baseLatex(base: Form): string {
  return isBare(base) ? formLatex(base) : `(${sumLatex(base)})`;
}

/** A number, a letter or pi: needs no parentheses as a base. */
function isBare(base: Form): boolean {
  const only = base.terms[0];
  if (base.terms.length !== 1 || only === undefined) return false;
  const plain = only.coefficient.isReal() && only.coefficient.re.sign() > 0 && only.coefficient.re.isInteger();
  if (only.factors.length === 0) return plain || only.coefficient.re.isZero();
  const factor = only.factors[0];
  return (
    factor?.atom.kind !== 'call' &&
    plain &&
    only.coefficient.re.equals(Rational.one) &&
    only.factors.length === 1 &&
    factor?.power === 1
  );
}

function powerLatex(base: string, power: Form, bare: boolean): string {
  const value = power.toRational();
  if (value?.equals(Rational.one)) return base;
  if (value?.equals(Rational.of(1, 2))) return `\\sqrt{${base.replace(/^\((.*)\)$/, '$1')}}`;
  const exponent = sumLatex(power);
  return bare || base.startsWith('(') ? `${base}^{${exponent}}` : `\\left(${base}\\right)^{${exponent}}`;
}

function isNegative(power: Form): boolean {
  return (power.toRational()?.sign() ?? 1) < 0;
}

function functionLatex(of: ClosedFunction): string {
  const x = of.argument;
  switch (of.name) {
    case 'gamma':
      return `\\Gamma\\left(${sumLatex(x)}\\right)`;
    case 'barnesG':
      return `G\\left(${sumLatex(x)}\\right)`;
    case 'sine':
      return `2\\sin${argumentLatex(x.mul(Form.pi))}`;
    case 'hyperbolicSine':
      return `2\\sinh${argumentLatex(x.mul(Form.pi))}`;
    case 'hyperbolicCosine':
      return `2\\cosh${argumentLatex(x.mul(Form.pi))}`;
    case 'multipleGamma':
      return withPeriods(`\\Gamma_{${of.periods.length}}`, x, of.periods);
    case 'multipleSine':
      return of.periods.length === 3
        ? inTable('tripleSine', x, of.periods)
        : withPeriods(`S_{${of.periods.length}}`, x, of.periods);
    case 'overRoots':
      return overRootsLatex(of);
    case 'doubleSine':
    case 'upsilon':
      return inTable(of.name, x, [of.b]);
  }
}

/** A product over the roots of a polynomial; \Gamma_1(x|1) is written as \Gamma(x)/\sqrt{2\pi}. */
function overRootsLatex({ argument, order, polynomial }: Extract<ClosedFunction, { name: 'overRoots' }>): string {
  const over = `\\prod_{\\rho:\\,${indexPolynomialLatex(polynomial, '\\rho ').replaceAll('\\rho ^', '\\rho^')}=0}`;
  const x = argument.isZero() ? '-\\rho' : `${sumLatex(argument)}-\\rho`;
  if (order === 1) return `${over}\\frac{\\Gamma\\left(${x}\\right)}{\\sqrt{2\\pi}}`;
  const ones = Array.from({ length: order }, () => '1').join(',');
  return `${over}\\Gamma_{${order}}\\left(${x}\\,\\middle|\\,${ones}\\right)`;
}

/** sinh \pi a, but sinh(\pi (a + b)). */
function argumentLatex(x: Form): string {
  const text = formLatex(x);
  return x.terms.length === 1 && !text.startsWith('-') ? ` ${text}` : `\\left(${text}\\right)`;
}

function withPeriods(name: string, x: Form, periods: readonly Form[]): string {
  return `${name}\\left(${sumLatex(x)}\\,\\middle|\\,${periods.map(formLatex).join(',')}\\right)`;
}

function inTable(name: FunctionName, x: Form, parameters: readonly Form[]): string {
  return functions[name].notations[0]?.latex(x, parameters, printer) ?? '';
}

function exponentLatex(exponent: ClosedForm['exponent']): string {
  return exponent
    .map(({ coefficient, of }) => termLatex(coefficient, of))
    .reduce((text, term) => (text === '' || term.startsWith('-') ? text + term : `${text}+${term}`), '');
}

function termLatex(coefficient: Form, of: ClosedConstant): string {
  if (of.name === 'one') return sumLatex(coefficient);
  const name = constantLatex(of);
  const only = coefficient.terms.length === 1;
  const negative = only && (coefficient.terms[0]?.coefficient.re.sign() ?? 0) < 0;
  const size = negative ? coefficient.neg() : coefficient;
  const sign = negative ? '-' : '';
  if (size.equals(Form.one)) return sign + name;
  return `${sign}${only ? formLatex(size) : `\\left(${sumLatex(size)}\\right)`}${name}`;
}

function constantLatex(of: Exclude<ClosedConstant, { name: 'one' }>): string {
  switch (of.name) {
    case 'zetaPrime':
      return `\\zeta'(-${of.order})`;
    case 'zeta':
      return `\\zeta(${of.order})`;
    case 'clausen':
      return `\\mathrm{Cl}_{${of.order}}\\left(${formLatex(of.argument.mul(Form.pi).scale(2))}\\right)`;
    case 'polylogarithm':
      return `\\mathrm{Li}_{${of.order}}\\left(e^{${formLatex(of.argument.mul(Form.pi).mul(Form.i).scale(2))}}\\right)`;
  }
}
