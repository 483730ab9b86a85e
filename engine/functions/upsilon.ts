import type { FixedComplex } from '../arithmetic/fixed-complex';
import { Form } from '../exact/form';
import { upsilonSecondRoute } from './barnes-routes';
import { asFactor, indexSum, pairOfModes, parenthesised, periodText, realFirst } from './notation';
import { outsideDomain } from './outside-domain';
import type { Complex, DoubleKernel, ExactParameter, FunctionAt, Printer, SpecialFunction } from './special-function';
import { complexUpsilonConstant, complexUpsilonKernel } from './upsilon-complex-double';
import { upsilonConstant, upsilonKernel } from './upsilon-double';
import { logUpsilon } from './upsilon-precise';

const HALF = Form.ratio(1, 2);

/**
 * Upsilon_b(x), normalised by Upsilon_b(Q/2) = 1, Q = b + 1/b:
 *   log Upsilon_b(x) = int_0^oo dt/t [(Q/2 - x)^2 e^{-2t} - sinh^2((Q/2 - x) t)/(sinh bt sinh t/b)],  0 < Re x < Q.
 * Zeros at -(m b + n/b) and Q + m b + n/b; Upsilon_b(Q - x) = Upsilon_b(x) = Upsilon_{1/b}(x);
 * Upsilon_b(x + b) = gamma(bx) b^{1-2bx} Upsilon_b(x), gamma(u) = Gamma(u)/Gamma(1 - u). The zeta-regularised product of
 * (m b + n/b + x)(m b + n/b + Q - x) is Upsilon_b(x) times its value at Q/2, a constant. Parameter: b > 0, or
 * complex b with Re b > 0.
 */
export const upsilon: SpecialFunction = {
  name: 'upsilon',
  spelling: 'upsilon',
  parameters: ['b'],
  reflections: [{ center: ([b]) => half(b as Form), power: 1, sign: 1 }],
  exactValue: (x, [b]) => (x.equals(half(b as Form)) ? Form.one : null),
  mirror: (x) => x.conjugate(),
  shifts: [
    { step: ([b]) => b as Form, quotient: (x, [b]) => quotient(x, b as Form, Form.call('log', b as Form)) },
    {
      step: ([b]) => (b as Form).inverse(),
      quotient: (x, [b]) => quotient(x, (b as Form).inverse(), Form.call('log', b as Form).neg()),
    },
  ],
  zeros: [
    {
      kind: 'zero',
      start: () => Form.zero,
      steps: ([b]) => [(b as Form).neg(), (b as Form).inverse().neg()],
    },
    { kind: 'zero', start: ([b]) => sum(b as Form), steps: ([b]) => [b as Form, (b as Form).inverse()] },
  ],
  growth: [],
  // z^2 log(-+iz) - (3/2) z^2 - ((b^2 + b^-2)/12) log(-+iz) + K: see `upsilon-double`.
  logarithmicGrowth: [Form.i.neg(), Form.i].map((direction) => ({
    direction,
    about: ([b]) => sum(b as Form).mul(HALF),
    polynomial: (z, [b]) =>
      direction
        .mul(Form.pi)
        .mul(HALF)
        .mul(logarithmic(z, b as Form))
        .sub(z.mul(z).mul(Form.ratio(3, 2))),
    logarithm: (z, [b]) => logarithmic(z, b as Form),
    constant: ([b]) => growthConstant(b as Complex),
  })),
  notations: [
    {
      label: '\\Upsilon_b',
      latex: (x, [b], print) => `\\Upsilon_{${subscript(b as Form, print)}}${parenthesised(realFirst(x, print))}`,
      definition: ([b], print) =>
        `\\log\\Upsilon_{${subscript(b as Form, print)}}(x)=\\int_0^\\infty\\frac{dt}{t}\\left[z^2e^{-2t}` +
        `-\\frac{\\sinh^2zt}{${sinh(b as Form, print)}\\,${sinh((b as Form).inverse(), print)}}\\right],` +
        `\\quad z=${isRound(b as Form) ? '1' : '\\tfrac Q2'}-x`,
    },
    {
      label: 'H',
      // At b = 1 Upsilon(1 + z) = H(z) = G(1 + z) G(1 - z), Pestun's letter; elsewhere H_b(z) = Upsilon_b(Q/2 + z).
      latex: (x, [b], print) => {
        const center = half(b as Form);
        return `${letterH(b as Form, print)}${parenthesised(realFirst(x.sub(center), print))}`;
      },
      definition: ([b], print) =>
        isRound(b as Form)
          ? 'H(z)=G(1+z)\\,G(1-z)=e^{-(1+\\gamma)z^2}\\prod_{n\\ge1}\\left(1-\\frac{z^2}{n^2}\\right)^{n}e^{z^2/n}'
          : `${letterH(b as Form, print)}(z)=\\Upsilon_{${subscript(b as Form, print)}}(\\tfrac Q2+z)`,
    },
  ],
  modes: (x, [b], print) => {
    const periods = [b as Form, (b as Form).inverse()];
    // Not m, which masses are called.
    const lead = indexSum(['k', 'n'], periods, print);
    return `\\prod_{k,n\\ge0}${pairOfModes(
      lead,
      x,
      half(b as Form)
        .scale(2)
        .sub(x),
      print,
    )}`;
  },
  elementary: false,
  doubleError: ([b]) => doubleError(b as Complex),
  double: ([b]) => doubleKernel(b as Complex),
  precise: (x: FixedComplex, [b], bits) => logUpsilon(x, b as ExactParameter, bits),
  crossCheck: (x, [b], bits) => upsilonSecondRoute(x, b as ExactParameter, bits),
  sources: [
    { key: 'Zamolodchikov-1996', text: 'A. Zamolodchikov, Al. Zamolodchikov, hep-th/9506136 (1996), (3.10)-(3.14)' },
    { key: 'Pestun-2007', text: 'V. Pestun, arXiv:0712.2824 (2007): H' },
    { key: 'Hama-Hosomichi-2012', text: 'N. Hama, K. Hosomichi, arXiv:1206.6359 (2012)' },
  ],
};

/** Far from b = 1 a hundred shifts add up: see the accuracy table of the guide. */
function doubleError({ re, im }: Complex): number {
  if (im !== 0) return 2e-14;
  return Math.max(re, 1 / re) <= 4 ? 1.2e-14 : 3e-14;
}

/** K = 2 log Gamma_2(Q/2). */
function growthConstant(b: Complex): Complex {
  return b.im === 0 ? { re: upsilonConstant(b.re), im: 0 } : complexUpsilonConstant(b);
}

function doubleKernel(b: Complex): DoubleKernel {
  if (!(b.re > 0) || !Number.isFinite(b.re) || !Number.isFinite(b.im)) return outsideDomain;
  return b.im === 0 ? upsilonKernel(b.re) : complexUpsilonKernel(b);
}

/** Upsilon(x + p)/Upsilon(x) = Gamma(px)/Gamma(1 - px) p^{1 - 2px}. */
function quotient(x: Form, period: Form, logarithm: Form): FunctionAt[] {
  const u = period.mul(x);
  return [
    { name: 'gamma', argument: u, parameters: [], power: 1 },
    { name: 'gamma', argument: Form.one.sub(u), parameters: [], power: -1 },
    { name: 'exponential', argument: Form.one.sub(u.scale(2)).mul(logarithm), parameters: [], power: 1 },
  ];
}

/** z^2 - (b^2 + b^-2)/12. */
function logarithmic(z: Form, b: Form): Form {
  return z.mul(z).sub(b.mul(b).add(b.mul(b).inverse()).mul(Form.ratio(1, 12)));
}

function sum(b: Form): Form {
  return b.add(b.inverse());
}

/** Q/2, with the symbol Q while b is one. */
function half(b: Form): Form {
  return (b.equals(Form.symbol('@b')) ? Form.symbol('@Q') : sum(b)).mul(HALF);
}

function isRound(b: Form): boolean {
  return b.equals(Form.one);
}

function subscript(b: Form, print: Printer): string {
  return isRound(b) ? 'b=1' : (b.toRational()?.toString() ?? print.form(b));
}

function letterH(b: Form, print: Printer): string {
  return isRound(b) ? 'H' : `H_{${subscript(b, print)}}`;
}

function sinh(period: Form, print: Printer): string {
  if (isRound(period)) return '\\sinh t';
  return `\\sinh${parenthesised(`${asFactor(periodText(period, print))}t`)}`;
}
