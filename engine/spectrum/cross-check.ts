import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import type { Estimate } from '../functions/euler-maclaurin';
import { logarithmOf } from './anomaly';
import { barnesZetaAtZero } from './barnes-polynomial';
import { barnesTerms } from './barnes-term';
import { closedPrecise } from './closed-precise';
import { exactNumbers } from './exact-numbers';
import { regularisedCount } from './expansion';
import { fewerBits, negative } from './factor-value';
import { quotient } from './form-division';
import { isFailure, linearSum, type SumFailure } from './linear-sum';
import type { Pairing } from './pairing';
import {
  multiplyPolynomials,
  type Polynomial,
  polynomialIn,
  risingBinomial,
  scalePolynomial,
  zeroPolynomial,
} from './polynomial';
import { polynomialRoots } from './polynomial-roots';
import type { Prepared } from './prepare';
import { recognise } from './recognise';
import { type Prescription, rootlessSum } from './rootless-sum';
import { severalSumByContour, severalSumFurther } from './several-sum';
import { estimateOf, scaleEstimate, sumOf } from './total';
import type { Tower, TowerFactor } from './tower';

/** How a second value was found. */
export type CheckRoute = 'rootless' | 'roots' | 'closed' | 'contour' | 'further';

export interface CheckValue {
  readonly route: CheckRoute;
  readonly estimate: Estimate;
}

/**
 * log det by a way of its own. By factors, where the paired spectrum has a closed form in sines, that one, by the
 * routines of its functions. Else tower by tower and without pairing: eigenvalues of linear and quadratic factors as one polynomial
 * without its roots, those with other factors by their roots, several indices by a contour integral, or by further steps
 * of the recursion where that is out of reach.
 */
export function checkValue(
  { towers, pairing }: Prepared,
  prescription: Prescription,
  bits: number,
): CheckValue | SumFailure {
  const working = bits + 16;
  // By operator the whole polynomials in one index know nothing of the anomaly, and so confirm it.
  const several = towers.some(({ indices }) => indices.length > 1);
  const closed = several || prescription === 'factors' ? closedCheck(pairing, towers, prescription, working) : null;
  if (closed !== null) return { route: 'closed', estimate: fewerBits(closed, 16) };
  const parts: Estimate[] = [];
  const routes = new Set<CheckRoute>();
  for (const tower of towers) {
    const several = tower.indices.length > 1;
    const found = several ? severalCheck(tower, prescription, working) : singleCheck(tower, prescription, working);
    if (isFailed(found)) return found;
    const exponent = estimateOf(Form.number(tower.exponent), working);
    if (exponent === null) return 'spectrum-undefined';
    parts.push(scaleEstimate(found.estimate, exponent, working));
    routes.add(found.route);
  }
  // The weakest way names the whole.
  const route = (['further', 'contour', 'roots', 'rootless'] as const).find((r) => routes.has(r)) ?? 'rootless';
  return { route, estimate: fewerBits(sumOf(parts), 16) };
}

function closedCheck(
  pairing: Pairing,
  towers: readonly Tower[],
  prescription: Prescription,
  bits: number,
): Estimate | null {
  const form = recognise(pairing);
  const log = form === null ? null : closedPrecise(form, bits);
  if (log === null || prescription === 'factors') return log;
  const anomaly = estimateOf(exactNumbers(towers, 'operator')?.anomaly ?? Form.zero, bits);
  return anomaly === null ? null : sumOf([log, anomaly]);
}

function isFailed(found: CheckValue | SumFailure): found is SumFailure {
  return typeof found === 'string';
}

function singleCheck(tower: Tower, prescription: Prescription, bits: number): CheckValue | SumFailure {
  const degeneracy = polynomialIn(tower.degeneracy, tower.indices[0] as string) ?? zeroPolynomial;
  if (tower.factors.some((factor) => factor.kind === 'irreducible' && factor.polynomial.length > 3)) {
    const found = byRoots(tower, degeneracy, prescription, bits);
    // Roots too close to be told apart: the whole polynomial then, from another point.
    if (found !== null) return found;
  }
  const q = tower.factors.reduce<Polynomial>(
    (product, factor) => {
      let result = product;
      for (let k = 0; k < factor.power; k++) result = multiplyPolynomials(result, factorPolynomial(factor));
      return result;
    },
    [Form.one],
  );
  const endless = rootlessSum(q, degeneracy, { from: 0, to: null }, bits, prescription, FURTHER);
  if (isFailure(endless)) return endless;
  const parts = [endless];
  if (tower.last !== null) {
    const above = rootlessSum(q, degeneracy, { from: tower.last + 1, to: null }, bits, prescription, FURTHER);
    if (isFailure(above)) return above;
    parts.push(negative(above));
  }
  return withScales(tower, degeneracy, prescription, parts, bits, 'rootless');
}

/** Steps by which the second value lies further out. */
const FURTHER = 7;

function factorPolynomial(factor: TowerFactor): Polynomial {
  return factor.kind === 'linear' ? [factor.constant, Form.one] : factor.polynomial;
}

function byRoots(
  tower: Tower,
  degeneracy: Polynomial,
  prescription: Prescription,
  bits: number,
): CheckValue | SumFailure | null {
  const parts: Estimate[] = [];
  for (const factor of tower.factors) {
    const shifts = polynomialRoots(factorPolynomial(factor), bits);
    if (shifts === null) return null;
    for (const shift of shifts) {
      const multiplicity = scalePolynomial(degeneracy, factor.power);
      const value = linearSum(shift, multiplicity, { from: 0, to: tower.last }, bits, FURTHER);
      if (isFailure(value)) return value;
      parts.push(value);
    }
  }
  if (prescription === 'operator') {
    const bare = { ...tower, exponent: Rational.one, factors: tower.factors.map((f) => ({ ...f, scale: [] })) };
    const anomaly = estimateOf(exactNumbers([bare], 'operator')?.anomaly ?? Form.zero, bits);
    if (anomaly === null) return 'spectrum-undefined';
    parts.push(anomaly);
  }
  return withScales(tower, degeneracy, prescription, parts, bits, 'roots');
}

/** Adds the constants taken out of the factors: their logarithm times the regularised number of factors. */
function withScales(
  tower: Tower,
  degeneracy: Polynomial,
  prescription: Prescription,
  parts: readonly Estimate[],
  bits: number,
  route: CheckRoute,
): CheckValue | SumFailure {
  const constants: Form[] = [];
  const run = { from: 0, to: tower.last };
  const total = Form.sum(
    tower.factors.map((f) => regularisedCount(factorPolynomial(f), degeneracy, run).scale(f.power)),
  );
  for (const factor of tower.factors) {
    const own = regularisedCount(factorPolynomial(factor), degeneracy, run);
    // By operator the constant of the whole polynomial counts with zeta(0) of the whole: the mean over its factors.
    const share = Rational.of((factorPolynomial(factor).length - 1) * factor.power, tower.order);
    const count = prescription === 'factors' ? own.scale(factor.power) : total.scale(share);
    for (const { base, weight } of factor.scale) constants.push(logarithmOf(base).mul(count).scale(weight));
  }
  const constant = estimateOf(Form.sum(constants), bits);
  return constant === null ? 'spectrum-undefined' : { route, estimate: sumOf([...parts, constant]) };
}

function severalCheck(tower: Tower, prescription: Prescription, bits: number): CheckValue | SumFailure {
  const parts: Estimate[] = [];
  const constants: Form[] = [];
  let route: CheckRoute = 'rootless';
  for (const factor of tower.factors) {
    if (factor.kind !== 'linear') return 'spectrum-undefined';
    for (const { shift, periods, multiplicity } of barnesTerms(tower, factor)) {
      const found = termCheck(shift, periods, multiplicity.scale(factor.power), bits);
      if (isFailed(found)) return found;
      parts.push(found.estimate);
      if (found.route !== 'rootless' && route !== 'further') route = found.route;
      const count = barnesZetaAtZero(shift, periods).mul(multiplicity).scale(factor.power);
      for (const { base, weight } of factor.scale) constants.push(logarithmOf(base).mul(count).scale(weight));
    }
  }
  const constant = estimateOf(Form.sum(constants), bits);
  if (constant === null) return 'spectrum-undefined';
  parts.push(constant);
  const numbers = exactNumbers([{ ...tower, exponent: Rational.one }], prescription);
  const anomaly = prescription === 'operator' ? estimateOf(numbers?.anomaly ?? Form.zero, bits) : null;
  return { route, estimate: sumOf(anomaly === null ? parts : [...parts, anomaly]) };
}

/** Equal periods are a tower in one index, w (n + x/w) with a binomial multiplicity; others go by the contour. */
function termCheck(shift: Form, periods: readonly Form[], multiplicity: Form, bits: number): CheckValue | SumFailure {
  const w = periods[0] as Form;
  if (!periods.every((p) => p.equals(w))) {
    const integral = severalSumByContour(shift, periods, multiplicity, bits);
    if (!isFailure(integral)) return { route: 'contour', estimate: integral };
    const further = severalSumFurther(shift, periods, multiplicity, bits);
    return isFailure(further) ? further : { route: 'further', estimate: further };
  }
  const q = [quotient(shift, w), Form.one];
  const m = scalePolynomial(risingBinomial(periods.length - 1), multiplicity);
  const value = rootlessSum(q, m, { from: 0, to: null }, bits, 'factors', FURTHER);
  if (isFailure(value)) return value;
  const scale = estimateOf(logarithmOf(w).mul(regularisedCount(q, m, { from: 0, to: null })), bits);
  return scale === null ? 'spectrum-undefined' : { route: 'rootless', estimate: sumOf([value, scale]) };
}
