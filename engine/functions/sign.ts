import { piFixed } from '../arithmetic/fixed-constants';
import { Form } from '../exact/form';
import { gcd, Rational } from '../exact/rational';
import { isSum } from './notation';
import type { Printer, SpecialFunction } from './special-function';

/**
 * f(x) = (-1)^x for integers x, as products over fluxes have it. Its logarithm is i pi for odd and 0 for even x; an
 * argument that is no integer has no value here.
 */
export const sign: SpecialFunction = {
  name: 'sign',
  spelling: '',
  parameters: [],
  reflections: [],
  additive: parity,
  outside: (argument) =>
    argument.toRational()?.isInteger()
      ? null
      : `(-1)^x has no value at x = ${argument.key}: charges times fluxes are integers`,
  shifts: [],
  zeros: [],
  growth: [],
  notations: [
    {
      label: '(-1)^x',
      latex: (argument, _parameters, print) => `(-1)^{${exponent(argument, print)}}`,
      definition: () => '(-1)^x,\\quad x=0,\\pm1,\\ldots',
    },
  ],
  modes: null,
  elementary: true,
  doubleError: () => 1e-15,
  double: () => ({
    addLog: (xRe, xIm, power, outRe, outIm) => {
      for (let k = 0; k < xRe.length; k++) {
        const x = xRe[k] as number;
        if (!Number.isInteger(x) || (xIm !== null && xIm[k] !== 0)) outRe[k] = Number.NaN;
        else if ((x * power) % 2 !== 0) outIm[k] = (outIm[k] as number) + Math.PI;
      }
    },
  }),
  precise: (argument, _parameters, bits) => {
    const whole = argument.re >> BigInt(bits);
    if (argument.im !== 0n || whole << BigInt(bits) !== argument.re) return { kind: 'indistinct' };
    return { kind: 'value', re: 0n, im: whole % 2n === 0n ? 0n : piFixed(bits), error: 1n };
  },
  crossCheck: null,
  sources: [],
};

/** The exponent over its common denominator, positive terms first: `(n+|n|)/2`. */
function exponent(argument: Form, print: Printer): string {
  const denominator = argument.terms.reduce((common, { coefficient: { re } }) => {
    const left = re.denominator / gcd(common, re.denominator);
    return common * left;
  }, 1n);
  const terms = argument.scale(Rational.of(denominator)).split();
  const [above, below] = [false, true].map((negative) => terms.filter((term) => isNegative(term) === negative));
  const text = [above, below].map((list) => (list?.length ? print.form(Form.sum(list)) : '')).join('');
  if (denominator === 1n) return text;
  return `${isSum(text) ? `(${text})` : text}/${denominator}`;
}

function isNegative(term: Form): boolean {
  return term.terms[0]?.coefficient.re.sign() === -1;
}

/**
 * An integer argument up to even numbers: |n| and n have the same parity, and so have x and -x. Names stand for integers;
 * where a coefficient is no integer nothing is known of the single terms, and the sum stays as it is.
 */
function parity(sum: Form): Form {
  const terms = sum.split().map((term) => {
    const [only] = term.terms;
    const factor = only?.factors.length === 1 ? only.factors[0] : undefined;
    const size = factor?.atom.kind === 'call' && factor.atom.name === 'abs' && factor.power === 1 ? factor.atom : null;
    const rest = size === null ? term : (size.arguments[0] as Form).scale(only?.coefficient ?? 1);
    return only?.coefficient.isReal() && only.coefficient.re.isInteger() ? rest : null;
  });
  if (terms.includes(null)) return sum;
  const whole = Form.sum(terms.flatMap((term) => term ?? []));
  return Form.sum(
    whole.split().map((term) => {
      const coefficient = term.terms[0]?.coefficient.re;
      return coefficient?.isInteger() && coefficient.numerator % 2n === 0n ? Form.zero : positive(term);
    }),
  );
}

function positive(term: Form): Form {
  return isNegative(term) ? term.neg() : term;
}
