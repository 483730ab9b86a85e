import { Form } from '../exact/form';
import { CLOSED_FORM_BITS, tripleSineSecondRoute } from './barnes-routes';
import { indexSum, pairOfModes, parenthesised, periodText, plus, realFirst } from './notation';
import type { FunctionAt, Printer, SpecialFunction } from './special-function';
import { logTripleSineRound } from './triple-sine-closed';
import { complexTripleSineKernel } from './triple-sine-complex-double';
import { tripleSineKernel } from './triple-sine-double';
import { logTripleSineByLattice, NO_HALF_PLANE, turnToTheRight } from './triple-sine-lattice';
import { logTripleSine } from './triple-sine-precise';

const HALF = Form.ratio(1, 2);

/**
 * The triple sine S_3(x | w1, w2, w3) = prod_{n>=0} (n.w + x)(n.w + |w| - x), zeta-regularised (no further constant).
 * Zeros at -n.w and |w| + n.w; S_3(|w| - x) = S_3(x); S_3(x + w_i) = S_3(x)/S_2(x | w_j, w_k) with
 * S_2(x | u, v) = s_b(i (x/sqrt(uv) - Q/2)), b = sqrt(u/v); log S_3 -> -(i pi/6) B_33(x | w) for Im x -> +infinity.
 * Parameters: w1, w2, w3 in an open half plane.
 */
export const tripleSine: SpecialFunction = {
  name: 'tripleSine',
  spelling: 'triplesine',
  parameters: ['w1', 'w2', 'w3'],
  reflections: [{ center: (w) => total(w).mul(HALF), power: 1, sign: 1 }],
  mirror: (x) => x.conjugate(),
  shifts: [0, 1, 2].map((index) => ({
    step: (w: readonly Form[]) => w[index] as Form,
    quotient: (x: Form, w: readonly Form[]) => [
      inverseDoubleSine(
        x,
        w.filter((_, k) => k !== index),
      ),
    ],
  })),
  zeros: [
    { kind: 'zero', start: () => Form.zero, steps: (w) => w.map((period) => period.neg()) },
    { kind: 'zero', start: (w) => Form.sum(w), steps: (w) => w },
  ],
  growth: [
    { direction: Form.i.neg(), logarithm: (x, w) => cubic(x, w).neg() },
    { direction: Form.i, logarithm: (x, w) => cubic(x, w) },
  ],
  notations: [
    {
      label: 'S_3',
      latex: (x, w, print) => `S_3${parenthesised(`${realFirst(x, print)}${periodList(w, print)}`)}`,
      definition: (w, print) => {
        const lead = indexSum(['n_1', 'n_2', 'n_3'], w, print);
        const factors = `${parenthesised(`${lead}+x`)}${parenthesised(`${plus(lead, total(w), print)}-x`)}`;
        return `S_3(x${periodList(w, print)})=\\prod_{n_1,n_2,n_3\\ge0}${factors}`;
      },
    },
  ],
  modes: (x, w, print) => {
    const rest = total(w).sub(x);
    // n1 + n2 + n3 = n in (n + 1)(n + 2)/2 ways.
    if (isRound(w)) return `\\prod_{n\\ge0}\\left[${pairOfModes('n', x, rest, print)}\\right]^{(n+1)(n+2)/2}`;
    const lead = indexSum(['n_1', 'n_2', 'n_3'], w, print);
    return `\\prod_{n_1,n_2,n_3\\ge0}${pairOfModes(lead, x, rest, print)}`;
  },
  elementary: false,
  doubleError: (w) => (w.every(({ im }) => im === 0) ? 4e-15 : 2e-14),
  double: (w) => {
    const [w1, w2, w3] = w.map(({ re, im }) => (im === 0 && re > 0 && Number.isFinite(re) ? re : null));
    return w1 && w2 && w3 ? tripleSineKernel(w1, w2, w3) : complexTripleSineKernel(w);
  },
  outsideParameters: (w) => (turnToTheRight(w) === null ? NO_HALF_PLANE : null),
  precise: (x, w, bits) => {
    if (!w.every(({ approx }) => approx.im === 0 && approx.re > 0)) return logTripleSineByLattice(x, w, bits);
    return (bits > CLOSED_FORM_BITS ? logTripleSineRound(x, w, bits) : null) ?? logTripleSine(x, w, bits);
  },
  crossCheck: (x, w, bits) => tripleSineSecondRoute(x, w, bits),
  sources: [
    { key: 'Kurokawa-Koyama-2003', text: 'N. Kurokawa, S. Koyama, Forum Math. 15 (2003) 839: multiple sine functions' },
    {
      key: 'Narukawa-2004',
      text: 'A. Narukawa, Adv. Math. 189 (2004) 247, math/0306164: integrals and modular properties',
    },
    { key: 'Lockhart-Vafa-2012', text: 'G. Lockhart, C. Vafa, arXiv:1210.5909 (2012)' },
  ],
};

/** 1/S_2(x | u, v) as a double sine. */
function inverseDoubleSine(x: Form, periods: readonly Form[]): FunctionAt {
  const [u, v] = periods as [Form, Form];
  // Roots apart: products of them then have one normal form.
  const [rootU, rootV] = [Form.call('sqrt', u), Form.call('sqrt', v)];
  const parameter = rootU.div(rootV);
  const argument = x.div(rootU.mul(rootV)).sub(parameter.add(parameter.inverse()).mul(HALF));
  return { name: 'doubleSine', argument: Form.i.mul(argument), parameters: [parameter], power: -1 };
}

/** (i pi/6) B_33(x | w), B_33 = (z^3 - (w1^2 + w2^2 + w3^2) z/4)/(w1 w2 w3) with z = x - |w|/2. */
function cubic(x: Form, w: readonly Form[]): Form {
  const z = x.sub(Form.sum(w).mul(HALF));
  const squares = Form.sum(w.map((period) => period.mul(period))).mul(Form.ratio(1, 4));
  const volume = w.reduce((product, period) => product.mul(period), Form.one);
  return Form.i.mul(Form.pi).mul(Form.ratio(1, 6)).mul(z.mul(z).sub(squares).mul(z).div(volume));
}

function isRound(w: readonly Form[]): boolean {
  return w.every((period) => period.equals(Form.one));
}

/** True for the periods of the squashed sphere as symbols. */
function isSymbolic(w: readonly Form[]): boolean {
  return w.every((period, k) => period.equals(Form.symbol(`@w${k + 1}`)));
}

/** Sum of the periods, with its own symbol while they are symbols. */
function total(w: readonly Form[]): Form {
  return isSymbolic(w) ? Form.symbol('@W') : Form.sum(w);
}

/** `|omega` or `|w_1,w_2,w_3`; nothing on the round sphere. */
function periodList(w: readonly Form[], print: Printer): string {
  if (isRound(w)) return '';
  return `\\,|\\,${isSymbolic(w) ? '\\omega' : w.map((period) => periodText(period, print)).join(',')}`;
}
