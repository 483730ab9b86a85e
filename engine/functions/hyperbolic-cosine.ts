import { Form } from '../exact/form';
import { imaginaryPart, twiceCosine } from './exact-angle';
import { hyperbolicKernel } from './hyperbolic-double';
import { logTwoCosh } from './hyperbolic-precise';
import { hyperbolicArgument } from './notation';
import type { SpecialFunction } from './special-function';

const HALF_I = Form.i.mul(Form.ratio(1, 2));

/**
 * f(x) = 2 cosh(pi x): zeros at i (n + 1/2) for every integer n. Laws and growth: DLMF 4.28-4.35.
 */
export const hyperbolicCosine: SpecialFunction = {
  name: 'hyperbolicCosine',
  spelling: '',
  parameters: [],
  reflections: [{ center: () => Form.zero, power: 1, sign: 1 }],
  shifts: [
    {
      step: () => Form.i,
      quotient: () => [{ name: 'linear', argument: Form.number(-1), parameters: [], power: 1 }],
    },
    {
      step: () => HALF_I,
      quotient: (x) => [
        { name: 'linear', argument: Form.i, parameters: [], power: 1 },
        { name: 'hyperbolicSine', argument: x, parameters: [], power: 1 },
        { name: 'hyperbolicCosine', argument: x, parameters: [], power: -1 },
      ],
    },
  ],
  exactValue: (x) => {
    const q = imaginaryPart(x);
    return q === null ? null : twiceCosine(q.abs());
  },
  zeros: [
    { kind: 'zero', start: () => HALF_I, steps: () => [Form.i] },
    { kind: 'zero', start: () => HALF_I.neg(), steps: () => [Form.i.neg()] },
  ],
  growth: [
    { direction: Form.one, logarithm: (x) => Form.pi.mul(x) },
    { direction: Form.one.neg(), logarithm: (x) => Form.pi.mul(x).neg() },
  ],
  notations: [
    {
      label: '2\\cosh(\\pi x)',
      latex: (argument, _parameters, print) => `2\\cosh${hyperbolicArgument(argument, print)}`,
      definition: () => '2\\cosh(\\pi x)=2\\prod_{n\\ge0}\\left(1+\\frac{x^2}{(n+1/2)^2}\\right)',
    },
  ],
  modes: null,
  elementary: true,
  doubleError: () => 1e-15,
  double: () => hyperbolicKernel(0.5),
  precise: (argument, _parameters, bits) => logTwoCosh(argument, bits),
  crossCheck: null,
  sources: [{ key: 'DLMF-4', text: 'NIST Digital Library of Mathematical Functions, 4.28-4.36' }],
};
