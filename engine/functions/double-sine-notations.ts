import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { asFactor, indexSum, isSum, parenthesised, periodText, plus, realFirst } from './notation';
import type { Notation, Printer } from './special-function';

/**
 * How the double sine is written in the field. Every notation is the same function; the relations, with the product
 * s_b(x) = prod (m b + n/b + Q/2 - i x)/(m b + n/b + Q/2 + i x), are
 *   s_b(x) = S_2(Q/2 - i x | b, 1/b),            S_2(z|w) = prod (z + n.w)/(|w| - z + n.w)       (Kurokawa-Koyama)
 *          = Gamma_h(i Q/2 - x; i b, i/b),        Gamma_h(z; w) = prod ((n + 1).w - z)/(n.w + z)   (van de Bult 2007)
 *          = e^{-i pi x^2/2 - i pi (b^2 + b^-2)/24} e_b(x),  e_b = Phi_b = exp int_{R+i0} e^{-2ixt} dt/(4t sinh bt sinh t/b)
 *                                                                     (Faddeev-Kashaev-Volkov, hep-th/0006156)
 *          = e^{l_b(-i x)},  l_1 = l of Jafferis, arXiv:1012.3210.
 */
export const doubleSineNotations: readonly Notation[] = [
  {
    label: 's_b',
    latex: (x, parameters, print) => `s_{${subscript(parameters, print)}}${parenthesised(print.form(x))}`,
    definition: (parameters, print) => {
      const product = quotientProduct(Form.symbol('x'), parameters, print);
      return `s_{${subscript(parameters, print)}}(x)=${product}${whereQ(parameters)}`;
    },
  },
  {
    label: 'S_2',
    latex: (x, parameters, print) =>
      `S_2${parenthesised(`${realFirst(halfQ(parameters).sub(Form.i.mul(x)), print)}\\,|\\,${periods(parameters, print)}`)}`,
    definition: (parameters, print) =>
      `S_2(z\\,|\\,${periods(parameters, print)})=\\prod_{m,n\\ge0}` +
      `\\frac{${indices(parameters, print)}+z}{${plus(indices(parameters, print), capitalQ(parameters), print)}-z}` +
      `=s_{${subscript(parameters, print)}}${parenthesised(ofS2(parameters, print))}` +
      whereQ(parameters),
  },
  {
    label: '\\Gamma_h',
    latex: (x, parameters, print) =>
      `\\Gamma_h${parenthesised(
        `${print.form(Form.i.mul(halfQ(parameters)).sub(x))};${imaginaryPeriods(parameters, print)}`,
      )}`,
    definition: (parameters, print) => {
      const omega = imaginaryPeriods(parameters, print);
      return (
        `\\Gamma_h(z;\\omega_1,\\omega_2)=\\prod_{m,n\\ge0}` +
        `\\frac{(m+1)\\omega_1+(n+1)\\omega_2-z}{m\\omega_1+n\\omega_2+z},\\quad(\\omega_1,\\omega_2)=(${omega})`
      );
    },
  },
  faddeev('e_b', 'e'),
  faddeev('\\Phi_b', '\\Phi'),
  {
    label: 'e^{\\ell}',
    latex: (x, parameters, print) =>
      `e^{${ell(parameters, print)}${parenthesised(realFirst(Form.i.neg().mul(x), print))}}`,
    definition: (parameters, print) =>
      isRound(parameters)
        ? '\\ell(z)=-z\\log(1-e^{2\\pi iz})+\\tfrac i2\\left(\\pi z^2+\\tfrac1\\pi\\mathrm{Li}_2(e^{2\\pi iz})\\right)-\\tfrac{i\\pi}{12}'
        : `${ell(parameters, print)}(z)=\\log s_{${subscript(parameters, print)}}(iz)`,
  },
];

/** The product that s_b(x) regularises; on the round sphere equal factors are collected. */
export function doubleSineModes(x: Form, parameters: readonly Form[], print: Printer): string {
  return quotientProduct(x, parameters, print);
}

function quotientProduct(x: Form, parameters: readonly Form[], print: Printer): string {
  const ix = Form.i.mul(x);
  if (isRound(parameters)) {
    return `\\prod_{n\\ge1}\\left(\\frac{${plus('n', ix.neg(), print)}}{${plus('n', ix, print)}}\\right)^{n}`;
  }
  const lead = indices(parameters, print);
  const above = plus(lead, halfQ(parameters).sub(ix), print);
  const below = plus(lead, halfQ(parameters).add(ix), print);
  return `\\prod_{m,n\\ge0}\\frac{${above}}{${below}}`;
}

/** Faddeev's quantum dilogarithm; e_b and Phi_b are two letters for it. */
function faddeev(label: string, letter: string): Notation {
  return {
    label,
    latex: (x, parameters, print) => {
      const text = print.form(x);
      const square = isSum(text) || text.length > 1 ? `${parenthesised(text)}^2` : `${text}^2`;
      const letters = `${letter}_{${subscript(parameters, print)}}${parenthesised(text)}`;
      return `e^{-\\frac{i\\pi}{2}${square}-${phaseText(parameters, print)}}\\,${letters}`;
    },
    definition: (parameters, print) => {
      const [b, inverse] = bothPeriods(parameters);
      const sinh = (period: Form): string => `\\sinh${parenthesised(print.form(period.mul(Form.symbol('t'))))}`;
      return (
        `${letter}_{${subscript(parameters, print)}}(x)=\\exp\\int_{-\\infty+i0}^{+\\infty+i0}` +
        `\\frac{e^{-2ixt}}{4\\,${sinh(b)}${sinh(inverse)}}\\frac{dt}{t}`
      );
    },
  };
}

/** i pi (b^2 + b^-2)/24. */
function phaseText(parameters: readonly Form[], print: Printer): string {
  const [b, inverse] = bothPeriods(parameters);
  const sum = b.pow(2).add(inverse.pow(2));
  if (b.toRational()) return print.form(Form.i.mul(Form.pi).mul(sum).scale(Rational.of(1, 24)));
  const text = print.form(b);
  return /^[A-Za-z]$/.test(text)
    ? `\\frac{i\\pi}{24}(${text}^2+${text}^{-2})`
    : `\\frac{i\\pi}{24}${parenthesised(print.form(sum))}`;
}

/** The argument of s_b that S_2(z) stands for: i (z - Q/2). */
function ofS2(parameters: readonly Form[], print: Printer): string {
  if (isRound(parameters)) return 'i(z-1)';
  return `\\tfrac{i}{2}${parenthesised(`2z-${asFactor(print.form(capitalQ(parameters)))}`)}`;
}

function isRound(parameters: readonly Form[]): boolean {
  return (parameters[0] as Form).equals(Form.one);
}

function bothPeriods(parameters: readonly Form[]): [Form, Form] {
  const b = parameters[0] as Form;
  return [b, b.inverse()];
}

function subscript(parameters: readonly Form[], print: Printer): string {
  if (isRound(parameters)) return 'b=1';
  const b = parameters[0] as Form;
  return b.toRational()?.toString() ?? print.form(b);
}

function ell(parameters: readonly Form[], print: Printer): string {
  return isRound(parameters) ? '\\ell' : `\\ell_{${subscript(parameters, print)}}`;
}

/** Q as a symbol while b is one, else its value. */
function capitalQ(parameters: readonly Form[]): Form {
  const b = parameters[0] as Form;
  return b.equals(Form.symbol('@b')) ? Form.symbol('@Q') : b.add(b.inverse());
}

function halfQ(parameters: readonly Form[]): Form {
  return capitalQ(parameters).scale(Rational.of(1, 2));
}

function whereQ(parameters: readonly Form[]): string {
  return (parameters[0] as Form).equals(Form.symbol('@b')) ? ',\\quad Q=b+b^{-1}' : '';
}

function indices(parameters: readonly Form[], print: Printer): string {
  return indexSum(['m', 'n'], bothPeriods(parameters), print);
}

function periods(parameters: readonly Form[], print: Printer): string {
  return bothPeriods(parameters)
    .map((period) => periodText(period, print))
    .join(',');
}

function imaginaryPeriods(parameters: readonly Form[], print: Printer): string {
  if (isRound(parameters)) return 'i,i';
  return bothPeriods(parameters)
    .map((period) => `i${asFactor(periodText(period, print))}`)
    .join(',');
}
