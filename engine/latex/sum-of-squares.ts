import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { parenthesised } from '../functions/notation';
import type { Factor } from '../product/factor';
import { formLatex } from './form';

/** (x + i y)(x - i y) to a power: re is x, im is y. */
export interface SquarePair {
  readonly re: Form;
  readonly im: Form;
  readonly power: number;
}

/** Finds pairs of factors x + i y and x - i y, x and y real, to the same power. */
export function sumsOfSquares(factors: readonly Factor[]): {
  readonly squares: readonly SquarePair[];
  readonly others: readonly Factor[];
} {
  const others: Factor[] = [];
  const squares: SquarePair[] = [];
  for (const factor of factors) {
    const place = factor.name === 'linear' ? others.findIndex((other) => conjugate(other, factor)) : -1;
    const partner = others[place];
    if (partner === undefined) {
      others.push(factor);
      continue;
    }
    others.splice(place, 1);
    const half = Form.ratio(1, 2);
    squares.push({
      re: partner.argument.add(factor.argument).mul(half),
      im: partner.argument.sub(factor.argument).mul(Form.i.neg()).mul(half),
      power: factor.power,
    });
  }
  return { squares, others };
}

function conjugate(one: Factor, other: Factor): boolean {
  return (
    one.name === other.name &&
    one.power === other.power &&
    !one.argument.equals(other.argument) &&
    one.argument.conjugate().equals(other.argument)
  );
}

/** `\\left[(\\sigma_a-\\sigma_b)^2+\\frac{(n_a-n_b)^2}{4}\\right]`. */
export function sumOfSquaresLatex(re: Form, im: Form): string {
  return `\\left[${squareLatex(re)}+${squareLatex(im)}\\right]`;
}

function squareLatex(form: Form): string {
  const size = form.terms[0]?.coefficient.re.abs() ?? Rational.one;
  const common = form.terms.every(({ coefficient }) => coefficient.re.abs().equals(size)) ? size : Rational.one;
  const base = form.scale(Rational.one.div(common));
  const text = formLatex(base.terms[0]?.coefficient.re.sign() === -1 ? base.neg() : base);
  const plain = base.terms.length === 1 && !text.startsWith('\\frac');
  const square = `${plain ? text : parenthesised(text)}^2`;
  const { numerator, denominator } = common.mul(common);
  const above = numerator === 1n ? square : `${numerator}${square}`;
  return denominator === 1n ? above : `\\frac{${above}}{${denominator}}`;
}
