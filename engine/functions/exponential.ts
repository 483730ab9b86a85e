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
  shifts: [],
  zeros: [],
  growth: [
    { direction: Form.one, logarithm: (x) => x },
    { direction: Form.one.neg(), logarithm: (x) => x },
  ],
  notations: [
    {
      label: 'e^{x}',
      latex: (argument, _parameters, print) => `e^{${print.form(argument)}}`,
      definition: () => 'e^{x}=\\sum_{n\\ge0}\\frac{x^n}{n!}',
    },
  ],
  modes: null,
  elementary: true,
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
