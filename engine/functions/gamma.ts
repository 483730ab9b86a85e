import { Form } from '../exact/form';
import { logGammaKernel } from './log-gamma-double';
import { logGammaPrecise } from './log-gamma-precise';
import { logGammaBySpouge } from './log-gamma-spouge';
import { parenthesised, plus, realFirst } from './notation';
import type { SpecialFunction } from './special-function';

const HALF = Form.ratio(1, 2);

/**
 * Euler's Gamma(x) = int_0^oo t^{x-1} e^{-t} dt: poles at 0, -1, -2, ..., no zeros, Gamma(x + 1) = x Gamma(x)
 * (DLMF 5.2-5.5). It is sqrt(2 pi) times the zeta-regularised product of 1/(x + n) over n >= 0 (Lerch).
 */
export const gamma: SpecialFunction = {
  name: 'gamma',
  spelling: 'gamma',
  parameters: [],
  reflections: [],
  mirror: (x) => x.conjugate(),
  shifts: [{ step: () => Form.one, quotient: (x) => [{ name: 'linear', argument: x, parameters: [], power: 1 }] }],
  zeros: [{ kind: 'pole', start: () => Form.zero, steps: () => [Form.one.neg()] }],
  growth: [],
  // Stirling, DLMF 5.11.1.
  logarithmicGrowth: [Form.one, Form.i, Form.i.neg()].map((direction) => ({
    direction,
    about: () => Form.zero,
    polynomial: (z) => Form.call('log', Form.pi.scale(2)).mul(HALF).sub(z),
    logarithm: (z) => z.sub(HALF),
  })),
  notations: [
    {
      label: '\\Gamma',
      latex: (argument, _parameters, print) => `\\Gamma${parenthesised(realFirst(argument, print))}`,
      definition: () => '\\Gamma(x)=\\int_0^\\infty t^{x-1}e^{-t}\\,dt',
    },
  ],
  modes: (argument, _parameters, print) => `\\prod_{n\\ge0}\\frac{1}{${plus('n', argument, print)}}`,
  elementary: false,
  doubleError: () => 4e-15,
  double: () => logGammaKernel(),
  precise: (argument, _parameters, bits) => logGammaPrecise(argument, bits),
  crossCheck: (argument, _parameters, bits) => ({
    route: "Spouge's approximation",
    log: logGammaBySpouge(argument, bits),
  }),
  sources: [{ key: 'DLMF-5', text: 'NIST Digital Library of Mathematical Functions, chapter 5' }],
};
