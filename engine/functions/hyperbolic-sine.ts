import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { imaginaryPart, twiceCosine } from './exact-angle';
import { hyperbolicKernel } from './hyperbolic-double';
import { logTwoSinh } from './hyperbolic-precise';
import { hyperbolicArgument } from './notation';
import type { SpecialFunction } from './special-function';

const HALF = Rational.of(1, 2);
const HALF_I = Form.i.scale(HALF);

/**
 * f(x) = 2 sinh(pi x): zeros at i n for every integer n. Laws and growth: DLMF 4.28-4.35.
 */
export const hyperbolicSine: SpecialFunction = {
  name: 'hyperbolicSine',
  spelling: '',
  parameters: [],
  reflections: [{ center: () => Form.zero, power: 1, sign: -1 }],
  shifts: [
    {
      step: () => Form.i,
      quotient: () => [{ name: 'linear', argument: Form.number(-1), parameters: [], power: 1 }],
    },
    {
      step: () => HALF_I,
      quotient: (x) => [
        { name: 'linear', argument: Form.i, parameters: [], power: 1 },
        { name: 'hyperbolicCosine', argument: x, parameters: [], power: 1 },
        { name: 'hyperbolicSine', argument: x, parameters: [], power: -1 },
      ],
    },
  ],
  exactValue: (x) => {
    // 2 sinh(i pi q) = 2 i cos(pi (1/2 - q)).
    const q = imaginaryPart(x);
    return q === null || q.sign() <= 0 ? null : (twiceCosine(HALF.sub(q).abs())?.mul(Form.i) ?? null);
  },
  zeros: [
    { kind: 'zero', start: () => Form.zero, steps: () => [Form.i] },
    { kind: 'zero', start: () => Form.i.neg(), steps: () => [Form.i.neg()] },
  ],
  growth: [
    { direction: Form.one, logarithm: (x) => Form.pi.mul(x) },
    { direction: Form.one.neg(), logarithm: (x) => Form.pi.mul(x).neg().add(Form.i.mul(Form.pi)) },
  ],
  notations: [
    {
      label: '2\\sinh(\\pi x)',
      latex: (argument, _parameters, print) => `2\\sinh${hyperbolicArgument(argument, print)}`,
      definition: () => '2\\sinh(\\pi x)=2\\pi x\\prod_{n\\ge1}\\left(1+\\frac{x^2}{n^2}\\right)',
    },
  ],
  modes: null,
  elementary: true,
  doubleError: () => 1e-15,
  double: () => hyperbolicKernel(0),
  precise: (argument, _parameters, bits) => logTwoSinh(argument, bits),
  crossCheck: null,
  sources: [{ key: 'DLMF-4', text: 'NIST Digital Library of Mathematical Functions, 4.28-4.36' }],
};
