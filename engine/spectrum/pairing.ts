import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import type { ConstantPower, Contribution } from './contribution';
import { type Run, regularisedCount } from './expansion';
import { pairSeveral, type SeveralClass } from './pairing-several';
import {
  addPolynomials,
  coefficient,
  degreeOf,
  evaluatePolynomial,
  type Polynomial,
  polynomialIn,
  polynomialKey,
  samePolynomial,
  scalePolynomial,
  shiftPolynomial,
  zeroPolynomial,
} from './polynomial';
import type { Tower } from './tower';

/** Factors q(nu) to the power M(nu), for nu in a run. */
export interface Stretch extends Run {
  readonly multiplicity: Polynomial;
}

/** All modes that share their factors: q(nu) with nu an integer, q monic. */
export interface ModeClass {
  readonly polynomial: Polynomial;
  /** What each tower brings: exponent times degeneracy times power, in nu. */
  readonly rows: readonly (Stretch & { readonly place: number })[];
  /** What stays after cancelling: runs that do not overlap, ascending, multiplicities not zero. */
  readonly left: readonly Stretch[];
}

/**
 * The towers with everything cancelled that cancels exactly, factor by factor: the determinant regularised by factors
 * is the product of the classes, of the classes in several indices and of the constants.
 */
export interface Pairing {
  readonly classes: readonly ModeClass[];
  readonly several: readonly SeveralClass[];
  readonly constants: readonly ConstantPower[];
}

export function pairTowers(towers: readonly Tower[]): Pairing {
  const several = pairSeveral(towers.filter(({ indices }) => indices.length > 1));
  const contributions = [...towers.filter(({ indices }) => indices.length === 1).flatMap(single), ...several.single];
  const constants = [...contributions.flatMap(constantsOf), ...several.constants];
  return { classes: classesOf(contributions), several: several.classes, constants: gatherConstants(constants) };
}

function single(tower: Tower): Contribution[] {
  const degeneracy = polynomialIn(tower.degeneracy, tower.indices[0] as string) ?? zeroPolynomial;
  return tower.factors.map((factor) => ({
    place: tower.place,
    polynomial: factor.kind === 'linear' ? [factor.constant, Form.one] : factor.polynomial,
    last: tower.last,
    multiplicity: scalePolynomial(degeneracy, tower.exponent.mul(Rational.of(factor.power))),
    scale: factor.scale,
  }));
}

function constantsOf({ polynomial, last, multiplicity, scale }: Contribution): ConstantPower[] {
  if (scale.length === 0) return [];
  const count = regularisedCount(polynomial, multiplicity, { from: 0, to: last });
  return scale.map(({ base, weight }) => ({ base, exponent: count.scale(weight) }));
}

/** Powers of one base added up; those that vanish left out. */
function gatherConstants(constants: readonly ConstantPower[]): ConstantPower[] {
  const found = new Map<string, ConstantPower>();
  for (const { base, exponent } of constants) {
    const known = found.get(base.key);
    found.set(base.key, { base, exponent: known ? known.exponent.add(exponent) : exponent });
  }
  return [...found.values()].filter(({ exponent }) => !exponent.isZero());
}

function classesOf(contributions: readonly Contribution[]): ModeClass[] {
  const found = new Map<string, { polynomial: Polynomial; rows: ModeClass['rows'][number][] }>();
  for (const { place, polynomial, last, multiplicity } of contributions) {
    const { representative, offset } = canonical(polynomial);
    const key = polynomialKey(representative);
    const row = {
      place,
      from: offset,
      to: last === null ? null : offset + last,
      multiplicity: shiftPolynomial(multiplicity, Form.number(-offset)),
    };
    const known = found.get(key);
    if (known) known.rows.push(row);
    else found.set(key, { polynomial: representative, rows: [row] });
  }
  return [...found.values()].map(({ polynomial, rows }) => ({ polynomial, rows, left: settle(rows) }));
}

/**
 * q(nu - offset) such that the mean of the a_j in q = product of (nu + a_j) has its rational part in [0, 1); symbols
 * and irrational parts stay as they are. Shifted polynomials share one representative.
 */
export function canonical(q: Polynomial): { representative: Polynomial; offset: number } {
  const mean = coefficient(q, degreeOf(q) - 1).scale(Rational.of(1, degreeOf(q)));
  const rational = mean.terms.find(({ factors }) => factors.length === 0)?.coefficient.re ?? Rational.zero;
  const offset = Number(rational.floor());
  // Beyond the safe integers nothing pairs anyway.
  if (offset === 0 || !Number.isSafeInteger(offset)) return { representative: q, offset: 0 };
  return { representative: shiftPolynomial(q, Form.number(-offset)), offset };
}

/** Finite runs up to this length are listed mode by mode. */
const LISTED_MODES = 64;

/** The sum of all rows as runs that do not overlap, the endless one as long as it can be. */
function settle(rows: readonly Stretch[]): Stretch[] {
  const pieces = sumOfRuns(rows).flatMap(listed);
  const tail = pieces.at(-1);
  if (tail === undefined || tail.to !== null) return pieces.filter(({ multiplicity }) => multiplicity.length > 0);
  const rest = pieces.slice(0, -1);
  let from = tail.from;
  for (let mode = rest.at(-1); mode !== undefined && mode.from === mode.to; mode = rest.at(-1)) {
    const value = evaluatePolynomial(tail.multiplicity, Form.number(from - 1));
    if (mode.to !== from - 1 || !value.equals(coefficient(mode.multiplicity, 0))) break;
    rest.pop();
    from--;
  }
  while (evaluatePolynomial(tail.multiplicity, Form.number(from)).isZero()) from++;
  return [...rest.filter(({ multiplicity }) => multiplicity.length > 0), { ...tail, from }];
}

/** Runs between neighbouring ends, multiplicities added up; an endless run that cancels is left out. */
function sumOfRuns(rows: readonly Stretch[]): Stretch[] {
  const ends = new Set<number>();
  for (const { from, to } of rows) {
    ends.add(from);
    if (to !== null) ends.add(to + 1);
  }
  const sorted = [...ends].sort((a, b) => a - b);
  return sorted.flatMap((from, k): Stretch[] => {
    const next = sorted[k + 1];
    const inside = rows.filter((row) => row.from <= from && (row.to === null || row.to >= from));
    const multiplicity = inside.map((row) => row.multiplicity).reduce(addPolynomials, zeroPolynomial);
    if (next === undefined) return multiplicity.length === 0 ? [] : [{ from, to: null, multiplicity }];
    return [{ from, to: next - 1, multiplicity }];
  });
}

function listed(stretch: Stretch): Stretch[] {
  const { from, to, multiplicity } = stretch;
  if (to === null || to - from >= LISTED_MODES) return [stretch];
  return Array.from({ length: to - from + 1 }, (_, k) => {
    const value = evaluatePolynomial(multiplicity, Form.number(from + k));
    return { from: from + k, to: from + k, multiplicity: value.isZero() ? zeroPolynomial : [value] };
  });
}

/** True when nothing of a class is left. */
export function cancels({ left }: ModeClass): boolean {
  return left.length === 0;
}

/** True when two stretches have the same run and multiplicity. */
export function sameStretch(a: Stretch, b: Stretch): boolean {
  return a.from === b.from && a.to === b.to && samePolynomial(a.multiplicity, b.multiplicity);
}
