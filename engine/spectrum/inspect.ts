import { formDouble } from '../arithmetic/form-double';
import { Form } from '../exact/form';
import { gcd } from '../exact/rational';
import { analyseTower, isRemark } from './analyse';
import { formText } from './form-text';
import { type Pairing, pairTowers } from './pairing';
import { binomialCoefficients, evaluatePolynomial, type Polynomial, polynomialIn } from './polynomial';
import { noValues, substituteTowers } from './prepare';
import { signRemarks } from './signs';
import { type Remark, remark, type Spectrum, type Tower } from './tower';
import { zeroModes } from './zero-modes';

/** What is to be said of a spectrum at the notebook's values of its parameters; what depends on open names is left out. */
export function inspect(spectrum: Spectrum): Remark[] {
  const remarks: Remark[] = [];
  const towers: Tower[] = [];
  for (const [place, written] of substituteTowers(spectrum, noValues, true).entries()) {
    const parts = analyseTower(written, place);
    if (isRemark(parts)) remarks.push(parts);
    else towers.push(...parts);
  }
  return [...remarks, ...inspectTowers(towers, remarks.length === 0 ? pairTowers(towers) : null)];
}

/** Remarks on towers taken apart and, where all of them could be, on their pairing. */
export function inspectTowers(towers: readonly Tower[], pairing: Pairing | null): Remark[] {
  const remarks = towers.flatMap((tower) => [...degeneracyRemarks(tower), ...halfPlane(tower)]);
  if (pairing === null) return unique(remarks);
  const zero = zeroModes(pairing).map(({ place, order }) => {
    const sign = (order.toRational()?.sign() ?? 1) < 0 ? 'infinite' : 'zero';
    return remark('zero-mode', place, 'eigenvalue', { order: formText(order), determinant: sign });
  });
  return unique([...remarks, ...zero, ...signRemarks(towers, pairing)]);
}

/** Towers that a finite range was written out to say the same thing once. */
function unique(remarks: readonly Remark[]): Remark[] {
  return [...new Map(remarks.map((r) => [`${r.code} ${r.place} ${JSON.stringify(r.data)}`, r])).values()];
}

/** Values of the index that are looked at for a negative degeneracy; no degeneracy of the field changes sign later. */
const LOOKED_AT = 64;

function degeneracyRemarks(tower: Tower): Remark[] {
  const { degeneracy, indices, place } = tower;
  if (degeneracy.symbols().some((name) => !indices.includes(name))) return [];
  const value = formDouble(degeneracy, () => ({ re: 0.375, im: 0 }));
  if (value !== null && Math.abs(value.im) > 1e-12 * Math.abs(value.re)) {
    return [remark('degeneracy-not-real', place, 'degeneracy', { degeneracy: formText(degeneracy) })];
  }
  const negative = indices.length === 1 ? firstNegative(tower) : null;
  if (negative !== null) return [remark('degeneracy-negative', place, 'degeneracy', negative)];
  return isIntegerValued(degeneracy, indices)
    ? []
    : [remark('degeneracy-fraction', place, 'degeneracy', { degeneracy: formText(degeneracy) })];
}

function firstNegative({ degeneracy, indices, last }: Tower): { step: string; value: string } | null {
  const p = polynomialIn(degeneracy, indices[0] as string) ?? [];
  const top = p.at(-1)?.toRational();
  const valueAt = evaluator(p);
  for (let step = 0; step <= Math.min(last ?? LOOKED_AT, LOOKED_AT); step++) {
    const value = valueAt(step);
    if (value !== null && value < 0) return { step: `${step}`, value: `${value}` };
  }
  return last === null && top && top.sign() < 0 ? { step: 'large', value: '-' } : null;
}

/** Values in doubles, without cancellation where the coefficients are rational. */
function evaluator(p: Polynomial): (step: number) => number | null {
  const rational = p.map((c) => c.toRational());
  if (!rational.every((c) => c !== null)) {
    return (step) => formDouble(evaluatePolynomial(p, Form.number(step)), () => null)?.re ?? null;
  }
  const denominator = rational.reduce((d, c) => (d * c.denominator) / gcd(d, c.denominator), 1n);
  const numerators = rational.map((c) => c.numerator * (denominator / c.denominator));
  return (step) => Number(numerators.reduceRight((sum, c) => sum * BigInt(step) + c, 0n)) / Number(denominator);
}

function isIntegerValued(degeneracy: Form, indices: readonly string[]): boolean {
  const [first, ...rest] = indices;
  if (first === undefined) return degeneracy.toRational()?.isInteger() ?? false;
  return binomialCoefficients(polynomialIn(degeneracy, first) ?? []).every((q) => isIntegerValued(q, rest));
}

/** Periods must lie in an open half plane, or infinitely many eigenvalues crowd together. */
function halfPlane(tower: Tower): Remark[] {
  if (tower.indices.length < 2) return [];
  return tower.factors.flatMap((factor) => {
    if (factor.kind !== 'linear') return [];
    const periods = factor.periods.map((w) => formDouble(w, () => null));
    if (!periods.every((w) => w !== null) || inHalfPlane(periods)) return [];
    const data = { periods: factor.periods.map(({ key }) => key).join(', ') };
    return [remark('tower-half-plane', tower.place, 'eigenvalue', data)];
  });
}

/** True when some direction has a positive component along every one of the numbers. */
export function inHalfPlane(points: readonly { readonly re: number; readonly im: number }[]): boolean {
  const angles = points.map(({ re, im }) => Math.atan2(im, re)).sort((a, b) => a - b);
  if (points.some(({ re, im }) => re === 0 && im === 0)) return false;
  // They fit in a half plane exactly when the widest gap between neighbouring directions exceeds pi.
  const gaps = angles.map((angle, k) =>
    k === 0 ? angle + 2 * Math.PI - (angles.at(-1) as number) : angle - (angles[k - 1] as number),
  );
  return Math.max(...gaps) > Math.PI * (1 + 1e-14);
}
