import { Form } from '../exact/form';
import { Gaussian } from '../exact/gaussian';
import { WEIGHT } from '../product/factor';
import type { ModeFactor, ModeTower } from '../spheres/sphere';
import type { TheoryGroup } from '../theory/theory';
import { formInParentheses, formLatex } from './form';
import type { Piece } from './product';
import { NO_WEIGHT, printWeights } from './weights';

/** Towers of modes in LaTeX: for each weight a product over the level n, fermions above bosons. */
export function modesLatex(groups: readonly TheoryGroup[], towers: readonly ModeTower[]): Piece[] {
  return towers.flatMap((tower) => {
    const printed = tower.weights === null ? [NO_WEIGHT] : printWeights(groups, tower.weights, tower.half);
    return printed.map(({ indices, choices, weight }) => ({
      latex: indices + choices + towerLatex(tower, weight),
      from: tower.from,
      expanded: null,
    }));
  });
}

function towerLatex(tower: ModeTower, weight: Form): string {
  const at = (form: Form): Form => form.substitute((name) => (name === WEIGHT ? weight : null));
  const prefactor = tower.prefactor === null ? '' : `${prefactorLatex(at(tower.prefactor), weight)}\\,`;
  const above = tower.factors.filter(({ multiplicity }) => !isNegative(multiplicity));
  const below = tower.factors.filter(({ multiplicity }) => isNegative(multiplicity));
  const fraction = `\\frac{${modes(above, at)}}{${modes(below, at)}}`;
  const level = `\\prod_{n\\ge${tower.start}}${fraction}`;
  return tower.power === 1 ? prefactor + level : `\\left[${prefactor}${level}\\right]^{${tower.power}}`;
}

/** The Vandermonde factor as the square of the weight. */
export function prefactorLatex(prefactor: Form, weight: Form): string {
  if (!prefactor.equals(weight.mul(weight))) return formInParentheses(prefactor);
  // A single coordinate is squared as it stands; in braces, since its name may carry a prime.
  const [term, ...others] = weight.terms;
  const plain = others.length === 0 && term?.factors.length === 1 && term.coefficient.equals(Gaussian.one);
  return `${plain ? `{${formLatex(weight)}}` : `(${formLatex(weight)})`}^2`;
}

function isNegative(form: Form): boolean {
  return form.terms.some(({ coefficient }) => coefficient.re.sign() < 0);
}

function modes(factors: readonly ModeFactor[], at: (form: Form) => Form): string {
  return factors
    .map(({ eigenvalue, multiplicity }) => {
      const power = isNegative(multiplicity) ? multiplicity.neg() : multiplicity;
      return `\\left(${levelFirst(at(eigenvalue))}\\right)^{${polynomialLatex(power)}}`;
    })
    .join('');
}

/** n + 2 - z with the level in front. */
export function levelFirst(form: Form): string {
  const { rest } = form.linearPart('n');
  const text = formLatex(rest);
  if (rest.isZero()) return 'n';
  return text.startsWith('-') || text.startsWith('\\pm') || text.startsWith('\\mp') ? `n${text}` : `n+${text}`;
}

/** Multiplicities factor over the integers: n(n+1), (n+1)^2; printed as such. */
function polynomialLatex(form: Form): string {
  const n = Form.symbol('n');
  const one = Form.one;
  const known: readonly (readonly [Form, string])[] = [
    [n.mul(n.add(one)), 'n(n+1)'],
    [n.add(one).mul(n.add(one)), '(n+1)^2'],
    [n.add(one).mul(n.add(Form.number(2))), '(n+1)(n+2)'],
    [n.mul(n.add(Form.number(2))).scale(2), '2n(n+2)'],
  ];
  return known.find(([polynomial]) => polynomial.equals(form))?.[1] ?? formLatex(form);
}
