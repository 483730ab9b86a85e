import type { Form } from '../exact/form';
import { analyseTower, isRemark } from './analyse';
import { type Pairing, pairTowers } from './pairing';
import { type Remark, remark, type Spectrum, type Tower, type WrittenTower } from './tower';

/** A spectrum at given values of its parameters, taken apart and paired. */
export interface Prepared {
  readonly towers: readonly Tower[];
  readonly pairing: Pairing;
}

/** Values of names, over those that the spectrum has from the notebook. */
export type Values = ReadonlyMap<string, Form>;

export const noValues: Values = new Map();

/** The written towers with values put in; an index shadows a parameter of its name. */
export function substituteTowers(spectrum: Spectrum, values: Values, defaults: boolean): WrittenTower[] {
  return spectrum.towers.map((tower) => {
    const indices = new Set(tower.ranges.map(({ name }) => name));
    const lookup = (name: string): Form | null =>
      indices.has(name) ? null : (values.get(name) ?? (defaults ? (spectrum.parameters.get(name) ?? null) : null));
    // A parameter may be given in terms of another one.
    const put = (form: Form): Form => form.substitute(lookup).substitute(lookup);
    return {
      ...tower,
      exponent: put(tower.exponent),
      eigenvalue: tower.eigenvalue.map(({ form, power }) => ({ form: put(form), power })),
      degeneracy: put(tower.degeneracy),
      ranges: tower.ranges.map((range) => ({
        ...range,
        from: put(range.from),
        to: range.to === null ? null : put(range.to),
      })),
    };
  });
}

/** Names without a value, indices apart. */
export function openNames(towers: readonly WrittenTower[]): string[] {
  const open = new Set<string>();
  for (const { eigenvalue, degeneracy, ranges } of towers) {
    const indices = new Set(ranges.map(({ name }) => name));
    const forms = [degeneracy, ...eigenvalue.map(({ form }) => form), ...ranges.map(({ from }) => from)];
    for (const form of forms) for (const name of form.symbols()) if (!indices.has(name)) open.add(name);
  }
  return [...open].sort();
}

/** Taken apart and paired with symbols left as they are, or the first reason why not. */
export function prepare(written: readonly WrittenTower[]): Prepared | Remark {
  const towers: Tower[] = [];
  for (const [place, tower] of written.entries()) {
    const parts = analyseTower(tower, place);
    if (isRemark(parts)) return parts;
    towers.push(...parts);
  }
  return { towers, pairing: pairTowers(towers) };
}

/** Every name has a value, or the remark that says which have none. */
export function withAllValues(spectrum: Spectrum, values: Values): WrittenTower[] | Remark {
  const written = substituteTowers(spectrum, values, true);
  const open = openNames(written);
  return open.length === 0 ? written : remark('spectrum-names-unset', null, 'row', { names: open.join(', ') });
}
