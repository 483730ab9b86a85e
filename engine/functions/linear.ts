import { logComplex } from '../arithmetic/fixed-complex';
import { Form } from '../exact/form';
import { asFactor } from './notation';
import { argumentError, isIndistinct } from './precise-log';
import type { SpecialFunction } from './special-function';

/**
 * f(x) = x itself, as a factor of a product. Principal logarithm, +i pi on the negative real axis.
 * Double tier: error of the platform's logarithm. Precise tier: 2 units plus the error of the argument.
 */
export const linear: SpecialFunction = {
  name: 'linear',
  spelling: '',
  parameters: [],
  reflections: [{ center: () => Form.zero, power: 1, sign: -1 }],
  shifts: [],
  zeros: [{ kind: 'zero', start: () => Form.zero, steps: () => [] }],
  growth: [],
  logarithmicGrowth: [Form.one, Form.one.neg(), Form.i, Form.i.neg()].map((direction) => ({
    direction,
    about: () => Form.zero,
    polynomial: () => Form.zero,
    logarithm: () => Form.one,
  })),
  notations: [
    {
      label: 'x',
      latex: (argument, _parameters, print) => asFactor(print.form(argument)),
      definition: () => 'x',
    },
  ],
  modes: null,
  elementary: true,
  doubleError: () => 1e-15,
  double: () => ({
    addLog: (xRe, xIm, power, outRe, outIm) => {
      for (let k = 0; k < xRe.length; k++) {
        const re = xRe[k] as number;
        const im = xIm === null ? 0 : (xIm[k] as number);
        outRe[k] = (outRe[k] as number) + power * Math.log(Math.hypot(re, im));
        // + 0 turns -0 into 0: the cut is approached from above.
        outIm[k] = (outIm[k] as number) + power * Math.atan2(im + 0, re);
      }
    },
  }),
  precise: (argument, _parameters, bits) => {
    if (isIndistinct(argument)) return { kind: 'indistinct' };
    const log = logComplex(argument, bits);
    return { kind: 'value', re: log.re, im: log.im, error: 2n + argumentError(argument, bits) };
  },
  crossCheck: null,
  sources: [],
};
