import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { towerAnomaly } from './anomaly';
import { severalAnomaly } from './anomaly-several';
import { barnesZetaAtZero } from './barnes-polynomial';
import { barnesTerms } from './barnes-term';
import { regularisedCount } from './expansion';
import { polynomialIn, zeroPolynomial } from './polynomial';
import type { Tower, TowerFactor } from './tower';

/** What is known exactly of a spectrum before any logarithm is taken. */
export interface ExactNumbers {
  /** sum of exponent times zeta(0): of every linear factor by factors, of the polynomial by operator. */
  readonly zeta0: Form;
  /** Response of log det to multiplying every linear factor by c, per log c: zeta(0) by factors. */
  readonly scale: Form;
  /** log det by operator minus by factors. */
  readonly anomaly: Form;
}

/** Null where the operator prescription is not defined: factors with different periods. */
export function exactNumbers(towers: readonly Tower[], prescription: 'factors' | 'operator'): ExactNumbers | null {
  const counts = towers.map((tower) => countOf(tower).scale(tower.exponent));
  const scale = Form.sum(counts);
  const anomalies = towers.map(anomalyOf);
  if (!anomalies.every((a) => a !== null)) {
    return prescription === 'operator' ? null : { zeta0: scale, scale, anomaly: Form.zero };
  }
  const operator = Form.sum(counts.map((count, k) => count.scale(Rational.of(1, (towers[k] as Tower).order))));
  return { zeta0: prescription === 'factors' ? scale : operator, scale, anomaly: Form.sum(anomalies) };
}

/** With the exponent. */
function anomalyOf(tower: Tower): Form | null {
  const anomaly = tower.indices.length === 1 ? towerAnomaly(tower) : severalAnomaly(tower);
  return anomaly?.scale(tower.exponent) ?? null;
}

/** sum of zeta_j(0) over the linear factors, without the exponent. */
export function countOf(tower: Tower): Form {
  return Form.sum(tower.factors.map((factor) => factorCount(tower, factor).scale(factor.power)));
}

function factorCount(tower: Tower, factor: TowerFactor): Form {
  if (factor.kind === 'linear' && tower.indices.length > 1) {
    const terms = barnesTerms(tower, factor);
    return Form.sum(
      terms.map(({ shift, periods, multiplicity }) => multiplicity.mul(barnesZetaAtZero(shift, periods))),
    );
  }
  const degeneracy = polynomialIn(tower.degeneracy, tower.indices[0] as string) ?? zeroPolynomial;
  const q = factor.kind === 'linear' ? [factor.constant, Form.one] : factor.polynomial;
  return regularisedCount(q, degeneracy, { from: 0, to: tower.last });
}
