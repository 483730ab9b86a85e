import { numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  type FixedComplex,
  integerPowerComplex,
  logComplex,
  multiplyComplex,
  oneComplex,
  scaleComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { formFixed, rationalFixed } from '../arithmetic/form-fixed';
import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { bernoulliNumber } from '../functions/bernoulli';
import { factorial } from '../functions/factorial';
import { scaleLogarithm } from './anomaly';
import { barnesZetaAtZero } from './barnes-polynomial';
import { type BarnesTerm, barnesTerms } from './barnes-term';
import { polynomialIn } from './polynomial';
import type { Tower, TowerFactor } from './tower';

/** A part of a product cut off, and what is added to it; `error` in units. */
export interface CutOff {
  readonly sum: FixedComplex;
  readonly counterterms: FixedComplex;
  readonly error: number;
}

type LinearFactor = Extract<TowerFactor, { kind: 'linear' }>;

/** Number of logarithms that a cut-off of every index takes. */
export function pointsBelow(tower: Tower, cutoff: number): number {
  return tower.factors.length * (cutoff + 1) ** tower.indices.length;
}

/**
 * The logarithm of the product of a tower in several indices, every index from 0 to `cutoff`. The box is the sum over
 * sets S of indices of (-1)^|S| times the tower that starts at cutoff + 1 in S; what is added takes away those for
 * S not empty, of each the terms of the expansion of log Gamma_N about the middle of the first cell (barnes-far.ts) that
 * do not vanish as the cut-off grows. Null where something has no value.
 */
export function cutOffSeveral(tower: Tower, cutoff: number, bits: number): CutOff | null {
  const exponent = formFixed(Form.number(tower.exponent), bits);
  if (exponent === null) return null;
  let total: CutOff = { sum: zeroComplex, counterterms: zeroComplex, error: 0 };
  for (const factor of tower.factors) {
    if (factor.kind !== 'linear') return null;
    const box = boxSum(tower, factor, cutoff, bits);
    const counter = box && counterterms(tower, factor, cutoff, bits);
    if (box === null || counter === null) return null;
    const times = (z: FixedComplex): FixedComplex => {
      const { re, im } = multiplyComplex(z, exponent, bits);
      return { re: re * BigInt(factor.power), im: im * BigInt(factor.power) };
    };
    total = {
      sum: addComplex(total.sum, times(box.value)),
      counterterms: addComplex(total.counterterms, times(counter.value)),
      error: total.error + factor.power * (box.error + counter.error),
    };
  }
  return total;
}

function boxSum(
  { degeneracy, indices }: Tower,
  factor: LinearFactor,
  cutoff: number,
  bits: number,
): { value: FixedComplex; error: number } | null {
  const start = formFixed(factor.constant, bits);
  const scale = formFixed(scaleLogarithm(factor.scale), bits);
  const periods = factor.periods.map((w) => formFixed(w, bits));
  const monomials = monomialsOf(degeneracy, indices, bits);
  if (start === null || scale === null || monomials === null || !periods.every((w) => w !== null)) return null;
  let value = zeroComplex;
  let error = 0;
  const visit = (place: number, z: FixedComplex, at: readonly bigint[]): void => {
    const period = periods[place];
    if (period !== undefined) {
      let moved = z;
      for (let j = 0; j <= cutoff; j++) {
        visit(place + 1, moved, [...at, BigInt(j)]);
        moved = addComplex(moved, period as FixedComplex);
      }
      return;
    }
    if (z.re === 0n && z.im === 0n) return;
    const weight = monomials.reduce((sum, { coefficient, powers }) => {
      const monomial = powers.reduce((product, power, k) => product * (at[k] as bigint) ** BigInt(power), 1n);
      return addComplex(sum, { re: coefficient.re * monomial, im: coefficient.im * monomial });
    }, zeroComplex);
    value = addComplex(value, multiplyComplex(weight, addComplex(logComplex(z, bits), scale), bits));
    const size = numberFromFixed(absoluteComplex(weight), bits) + 1;
    error += size * (4 + (2 * cutoff * indices.length + 2) / numberFromFixed(absoluteComplex(z), bits));
  };
  visit(0, start, []);
  return { value, error };
}

interface Monomial {
  readonly coefficient: FixedComplex;
  readonly powers: readonly number[];
}

function monomialsOf(form: Form, indices: readonly string[], bits: number): Monomial[] | null {
  const [first, ...rest] = indices;
  if (first === undefined) {
    const coefficient = formFixed(form, bits);
    return coefficient === null ? null : [{ coefficient, powers: [] }];
  }
  const found: Monomial[] = [];
  for (const [power, c] of (polynomialIn(form, first) ?? []).entries()) {
    const inner = c.isZero() ? [] : monomialsOf(c, rest, bits);
    if (inner === null) return null;
    found.push(...inner.map(({ coefficient, powers }) => ({ coefficient, powers: [power, ...powers] })));
  }
  return found;
}

/** -sum over S of (-1)^|S| times the kept part of the tower that starts beyond the cut-off in S. */
function counterterms(
  tower: Tower,
  factor: LinearFactor,
  cutoff: number,
  bits: number,
): { value: FixedComplex; error: number } | null {
  const { indices } = tower;
  const scale = scaleLogarithm(factor.scale);
  const degree = Math.max(0, ...(monomialsOf(tower.degeneracy, indices, 64) ?? []).map(({ powers }) => sum(powers)));
  let value = zeroComplex;
  let error = 0;
  for (let set = 1; set < 1 << indices.length; set++) {
    const chosen = indices.map((_, k) => (set >> k) % 2 === 1);
    const moved = (name: string): Form | null =>
      chosen[indices.indexOf(name)] ? Form.symbol(name).add(Form.number(cutoff + 1)) : null;
    const constant = Form.sum([factor.constant, ...factor.periods.map((w, k) => w.scale(chosen[k] ? cutoff + 1 : 0))]);
    const terms = barnesTerms({ ...tower, degeneracy: tower.degeneracy.substitute(moved) }, { ...factor, constant });
    const sign = sum(chosen.map(Number)) % 2 === 0 ? -1n : 1n;
    for (const term of terms) {
      const kept = keptPart(term, degree, bits);
      const count = formFixed(scale.mul(barnesZetaAtZero(term.shift, term.periods)), bits);
      const factorOf = formFixed(term.multiplicity, bits);
      if (kept === null || count === null || factorOf === null) return null;
      const part = multiplyComplex(factorOf, subtractComplex(count, kept.value), bits);
      value = addComplex(value, { re: sign * part.re, im: sign * part.im });
      error += (numberFromFixed(absoluteComplex(factorOf), bits) + 1) * kept.error;
    }
  }
  return { value, error };
}

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0);
}

/**
 * The terms of log Gamma_N(y|w) with at least the power -degree of z = y - |w|/2: with c_j of t^2j in the product of
 * (w_i t/2)/sinh(w_i t/2), (-1)^N c_j (H_p - log z) z^p/p! for p = N - 2j >= 0, (-p-1)! c_j z^p beyond, over the volume.
 */
function keptPart(
  { shift, periods }: BarnesTerm,
  degree: number,
  bits: number,
): { value: FixedComplex; error: number } | null {
  const middle = formFixed(shift.sub(Form.sum(periods).scale(Rational.of(1, 2))), bits);
  const w = periods.map((p) => formFixed(p, bits));
  if (middle === null || !w.every((p) => p !== null)) return null;
  const count = periods.length;
  const last = Math.floor((count + degree) / 2);
  const series = (w as FixedComplex[]).reduce<FixedComplex[]>(
    (product, p) => multiplySeries(product, centredSeries(p, last, bits), bits),
    [oneComplex(bits), ...Array.from({ length: last }, () => zeroComplex)],
  );
  const volume = (w as FixedComplex[]).reduce((product, p) => multiplyComplex(product, p, bits), oneComplex(bits));
  const logarithm = logComplex(middle, bits);
  let total = zeroComplex;
  let harmonic = Rational.zero;
  const harmonics = Array.from({ length: count + 1 }, (_, k) => {
    if (k > 0) harmonic = harmonic.add(Rational.of(1, k));
    return harmonic;
  });
  series.forEach((c, j) => {
    const power = count - 2 * j;
    const size = integerPowerComplex(middle, Math.abs(power), bits);
    const value = power >= 0 ? size : divideComplex(oneComplex(bits), size, bits);
    const plain = multiplyComplex(c, value, bits);
    if (power < 0) {
      total = addComplex(total, scaleComplex(plain, rationalFixed(factorial(-power - 1), bits), bits));
      return;
    }
    const number = { re: rationalFixed(harmonics[power] as Rational, bits), im: 0n };
    const bracket = multiplyComplex(plain, subtractComplex(number, logarithm), bits);
    const over = Rational.of(count % 2 === 0 ? 1 : -1).div(factorial(power));
    total = addComplex(total, scaleComplex(bracket, rationalFixed(over, bits), bits));
  });
  // Every term takes some ten products, each within a unit of the largest power and its logarithm.
  const size = numberFromFixed(absoluteComplex(middle), bits) + 2;
  const cell = numberFromFixed(absoluteComplex(volume), bits);
  const error = (64 * (last + 2) * size ** count * (Math.log(size) + 4)) / Math.min(cell, cell ** 2);
  return { value: divideComplex(total, volume, bits), error };
}

/** (w t/2)/sinh(w t/2) = sum of (2^(1-2j) - 1) B_2j/(2j)! (w t)^2j (DLMF 4.19.4). */
function centredSeries(w: FixedComplex, last: number, bits: number): FixedComplex[] {
  const square = multiplyComplex(w, w, bits);
  let power = oneComplex(bits);
  return Array.from({ length: last + 1 }, (_, j) => {
    if (j > 0) power = multiplyComplex(power, square, bits);
    const factor = Rational.of(2)
      .pow(1 - 2 * j)
      .sub(Rational.one)
      .mul(bernoulliNumber(2 * j))
      .div(factorial(2 * j));
    return scaleComplex(power, rationalFixed(factor, bits), bits);
  });
}

function multiplySeries(a: readonly FixedComplex[], b: readonly FixedComplex[], bits: number): FixedComplex[] {
  return a.map((_, k) =>
    a
      .slice(0, k + 1)
      .reduce((total, c, i) => addComplex(total, multiplyComplex(c, b[k - i] as FixedComplex, bits)), zeroComplex),
  );
}
