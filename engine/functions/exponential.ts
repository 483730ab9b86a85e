import { Form } from '../exact/form';
import type { SpecialFunction } from './special-function';

/**
 * f(x) = e^x, the exponential of a polynomial of the parameters; its logarithm is the argument itself, exactly.
 */
export const exponential: SpecialFunction = {
  name: 'exponential',
  spelling: '',
  parameters: [],
  reflections: [],
  additive: (sum) => sum,
  powers: (argument) => {
    const terms = argument.split().map((term) => ({ term, power: logarithm(term) }));
    return {
      rest: Form.sum(terms.flatMap(({ term, power }) => (power === null ? [term] : []))),
      bases: terms.flatMap(({ power }) => power ?? []),
    };
  },
  shifts: [],
  zeros: [],
  // The logarithm is the argument in whatever direction, also along a line where it is imaginary: e^{2 pi i zeta x}.
  growth: [Form.one, Form.i, Form.one.neg(), Form.i.neg()].map((direction) => ({ direction, logarithm: (x) => x })),
  notations: [
    {
      label: 'e^{x}',
      latex: (argument, _parameters, print) => `e^{${print.form(argument)}}`,
      definition: () => 'e^{x}=\\sum_{n\\ge0}\\frac{x^n}{n!}',
    },
  ],
  modes: null,
  elementary: true,
  doubleError: () => 1e-15,
  double: () => ({
    addLog: (xRe, xIm, power, outRe, outIm) => {
      for (let k = 0; k < xRe.length; k++) {
        outRe[k] = (outRe[k] as number) + power * (xRe[k] as number);
        if (xIm !== null) outIm[k] = (outIm[k] as number) + power * (xIm[k] as number);
      }
    },
  }),
  precise: (argument) => ({ kind: 'value', re: argument.re, im: argument.im, error: 2n }),
  crossCheck: null,
  sources: [],
};

/** n log x with a whole number n. */
function logarithm(term: Form): { readonly base: Form; readonly exponent: number } | null {
  const [only] = term.terms;
  const [factor, ...more] = only?.factors ?? [];
  if (!only?.coefficient.isReal() || !only.coefficient.re.isInteger() || !factor || more.length > 0) return null;
  const { atom, power } = factor;
  if (atom.kind !== 'call' || atom.name !== 'log' || power !== 1) return null;
  return { base: atom.arguments[0] as Form, exponent: Number(only.coefficient.re.numerator) };
}
