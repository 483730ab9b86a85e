import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { barnesZetaAtZero } from './barnes-polynomial';
import { type BarnesTerm, barnesTerms, periodsKey, sortedPeriods } from './barnes-term';
import type { ConstantPower, Contribution } from './contribution';
import { quotient } from './form-division';
import { latticeOffset } from './period-lattice';
import { risingBinomial, scalePolynomial } from './polynomial';
import type { Tower } from './tower';

/** All modes w.n + shift of one set of periods, shifts equal up to the lattice of the periods. */
export interface SeveralClass {
  readonly periods: readonly Form[];
  /** What each tower brings. */
  readonly rows: readonly { readonly place: number; readonly shift: Form; readonly multiplicity: Form }[];
  /** What stays in this number of indices; the rest has cancelled or has gone into fewer indices. */
  readonly left: readonly { readonly shift: Form; readonly multiplicity: Form }[];
}

interface PairedSeveral {
  readonly classes: SeveralClass[];
  readonly single: Contribution[];
  readonly constants: ConstantPower[];
}

/**
 * Cancels towers in several indices: equal ones at once; those whose shifts differ by periods by
 * T_N(x) = T_(N-1)(x without w_i) + T_N(x + w_i) (Barnes 1904), which leaves towers in fewer indices. Towers of equal
 * periods are handed on as towers in one index.
 */
export function pairSeveral(towers: readonly Tower[]): PairedSeveral {
  const result: PairedSeveral = { classes: [], single: [], constants: [] };
  let pending = towers.flatMap((tower) => termsOf(tower, result.constants));
  for (let count = Math.max(0, ...pending.map(({ periods }) => periods.length)); count > 0; count--) {
    const now = pending.filter(({ periods }) => periods.length === count);
    pending = pending.filter(({ periods }) => periods.length !== count);
    for (const group of groupBy(now, ({ periods }) => periodsKey(periods))) {
      const periods = (group[0] as BarnesTerm).periods;
      if (periods.every((w) => w.equals(periods[0] as Form))) result.single.push(...group.map(asSingle));
      else {
        for (const family of families(group)) {
          const { class: found, lower } = reduce(family);
          result.classes.push(found);
          pending.push(...lower);
        }
      }
    }
  }
  return result;
}

function termsOf(tower: Tower, constants: ConstantPower[]): BarnesTerm[] {
  return tower.factors.flatMap((factor) => {
    if (factor.kind !== 'linear') return [];
    const terms = barnesTerms(tower, factor).map((term) => ({
      ...term,
      multiplicity: term.multiplicity.scale(tower.exponent.mul(Rational.of(factor.power))),
    }));
    for (const { base, weight } of factor.scale) {
      const count = Form.sum(terms.map((t) => t.multiplicity.mul(barnesZetaAtZero(t.shift, t.periods))));
      constants.push({ base, exponent: count.scale(weight) });
    }
    return terms;
  });
}

/** w (n + x/w) with multiplicity binomial(n + N - 1, N - 1). */
function asSingle({ place, periods, shift, multiplicity }: BarnesTerm): Contribution {
  const w = periods[0] as Form;
  return {
    place,
    polynomial: [quotient(shift, w), Form.one],
    last: null,
    multiplicity: scalePolynomial(risingBinomial(periods.length - 1), multiplicity),
    scale: w.equals(Form.one) ? [] : [{ base: w, weight: Rational.one }],
  };
}

function groupBy<T>(items: readonly T[], key: (item: T) => string): T[][] {
  const found = new Map<string, T[]>();
  for (const item of items) found.set(key(item), [...(found.get(key(item)) ?? []), item]);
  return [...found.values()];
}

interface Placed {
  readonly term: BarnesTerm;
  /** Steps of each distinct period from the first shift of the family. */
  readonly steps: readonly number[];
}

/** Terms of one set of periods, sorted by shift modulo the lattice. */
function families(group: readonly BarnesTerm[]): Placed[][] {
  const result: Placed[][] = [];
  for (const term of group) {
    const home = result.find((family) => offsetOf(family, term) !== null);
    if (home) home.push({ term, steps: offsetOf(home, term) as readonly number[] });
    else result.push([{ term, steps: distinct(term.periods).map(() => 0) }]);
  }
  return result;
}

function offsetOf(family: readonly Placed[], term: BarnesTerm): readonly number[] | null {
  const origin = (family[0] as Placed).term;
  return latticeOffset(term.shift.sub(origin.shift), distinct(term.periods));
}

function distinct(periods: readonly Form[]): Form[] {
  return [...new Map(periods.map((w) => [w.key, w])).values()];
}

/** Longest way along the periods that is written out. */
const MAXIMAL_STEPS = 64;

function reduce(family: readonly Placed[]): { class: SeveralClass; lower: BarnesTerm[] } {
  const first = (family[0] as Placed).term;
  const rows = family.map(({ term }) => ({ place: term.place, shift: term.shift, multiplicity: term.multiplicity }));
  const merged = groupBy(family, ({ steps }) => steps.join()).map((same) => ({
    ...(same[0] as Placed),
    multiplicity: Form.sum(same.map(({ term }) => term.multiplicity)),
  }));
  const open = merged.filter(({ multiplicity }) => !multiplicity.isZero());
  const target = open.reduce<readonly number[]>(
    (top, { steps }) => steps.map((s, i) => Math.max(s, top[i] ?? s)),
    open[0]?.steps ?? [],
  );
  const way = open.reduce((sum, { steps }) => sum + steps.reduce((s, k, i) => s + (target[i] as number) - k, 0), 0);
  const total = Form.sum(open.map(({ multiplicity }) => multiplicity));
  // Walking to a common shift pays when everything of this many indices cancels there.
  if (open.length < 2 || !total.isZero() || way > MAXIMAL_STEPS) {
    const left = open.map(({ term, multiplicity }) => ({ shift: term.shift, multiplicity }));
    return { class: { periods: first.periods, rows, left }, lower: [] };
  }
  const lower = open.flatMap(({ term, steps, multiplicity }) => walk(term, multiplicity, steps, target));
  return { class: { periods: first.periods, rows, left: [] }, lower };
}

/** The towers in one index less that are left behind on the way from `steps` to `target`. */
function walk(term: BarnesTerm, multiplicity: Form, steps: readonly number[], target: readonly number[]): BarnesTerm[] {
  const behind: BarnesTerm[] = [];
  let shift = term.shift;
  distinct(term.periods).forEach((w, i) => {
    const place = term.periods.findIndex((p) => p.equals(w));
    const fewer = sortedPeriods(term.periods.filter((_, k) => k !== place));
    for (let s = steps[i] as number; s < (target[i] as number); s++) {
      behind.push({ place: term.place, periods: fewer, shift, multiplicity });
      shift = shift.add(w);
    }
  });
  return behind;
}
