import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { logarithmCoefficients } from './expansion';
import { type Polynomial, polynomialIn } from './polynomial';
import type { ScaleRecord, Tower, TowerFactor } from './tower';

/**
 * log det by its own zeta function minus log det factor by factor of a tower in one index, without the exponent. With
 * l_j = log(linear factor j / w) expanded in 1/w it is the coefficient of 1/w in
 * d(w) (sum_j l_j^2/2 - (sum_j l_j)^2/(2 r)), the residue formula of Wodzicki (see Kontsevich and Vishik 1994,
 * hep-th/9406140) for products of linear forms. Only power sums of the roots enter, so it is exact for any polynomial.
 * Zero for finite towers and for a single linear factor.
 */
export function towerAnomaly(tower: Tower): Form {
  if (tower.last !== null || tower.order === 1) return Form.zero;
  const degeneracy = polynomialIn(tower.degeneracy, tower.indices[0] as string) ?? [];
  const factors = tower.factors.map((factor) => expandFactor(factor, degeneracy.length));
  const half = Rational.of(1, 2 * tower.order);
  const logarithm = Form.sum(factors.map(({ scale, count }) => scale.scale(count)));
  const total = degeneracy.map((_, m) => Form.sum(factors.map(({ e, power }) => (e[m] as Form).scale(power))));
  let harmonic = Rational.zero;
  const parts = degeneracy.map((c, m) => {
    // sum_j of the products e_k e_l with k + l = m + 1 is -2 H_m e_(m+1), by the power sums.
    const single = factors.map(({ e, power, scale }) =>
      (e[m] as Form).mul(scale.sub(Form.number(harmonic))).scale(power),
    );
    harmonic = harmonic.add(Rational.of(1, m + 1));
    const squares = total.slice(0, m).map((a, i) => a.mul(total[m - 1 - i] as Form));
    const square = Form.sum([logarithm.mul(total[m] as Form).scale(2), ...squares]);
    return c.mul(Form.sum(single).sub(square.scale(half)));
  });
  return Form.sum(parts);
}

interface Expanded {
  /** Coefficients of the whole factor, all its linear factors together. */
  readonly e: readonly Form[];
  /** Logarithm of the constant in front of each linear factor. */
  readonly scale: Form;
  readonly power: number;
  /** Number of linear factors with the power. */
  readonly count: number;
}

function expandFactor(factor: TowerFactor, terms: number): Expanded {
  const q: Polynomial = factor.kind === 'linear' ? [factor.constant, Form.one] : factor.polynomial;
  return {
    e: logarithmCoefficients(q, terms),
    scale: scaleLogarithm(factor.scale),
    power: factor.power,
    count: (q.length - 1) * factor.power,
  };
}

/** sum of weight log(base); log(-1) is i pi. */
export function scaleLogarithm(scale: readonly ScaleRecord[]): Form {
  return Form.sum(scale.map(({ base, weight }) => logarithmOf(base).scale(weight)));
}

export function logarithmOf(base: Form): Form {
  return base.equals(Form.number(-1)) ? Form.pi.mul(Form.i) : Form.call('log', base);
}
