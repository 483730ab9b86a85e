import { Form } from '../exact/form';
import type { Assignment, Name } from '../language/tree';
import type { Sphere } from '../spheres/sphere';
import { isCocharacter } from '../theory/flux-lattice';
import { gaugeGroups, type Theory } from '../theory/theory';
import type { Analysis } from './analysis';

/** Values of all symbols of a theory at a point, as closed forms. */
export interface Point {
  readonly values: (name: string) => Form | null;
  /** Assumptions in words. */
  readonly notes: readonly string[];
}

export type PointResult =
  | { readonly kind: 'point'; readonly point: Point }
  | { readonly kind: 'failure'; readonly message: string };

/**
 * The point of a request: assignments first, then the notebook's parameters. Names in `free` (the axes of a plot) stay
 * open. Of the names that the quantity depends on (`used`), Coulomb parameters that are not set are zero for plots and
 * an error for values; masses and FI parameters that are not set are zero, and a note says so.
 */
export function resolvePoint(
  analysis: Analysis,
  sphere: Sphere,
  theory: Theory,
  at: readonly Assignment[],
  free: readonly Name[],
  unsetCoulomb: 'error' | 'zero',
  used: ReadonlySet<string>,
): PointResult {
  const settable = settableNames(analysis, sphere, theory);
  const dependent = new Map(theory.groups.flatMap(({ dependent: relations }) => [...relations]));
  const set = new Map<string, Form>();
  for (const name of [...free, ...at.map((a) => a.name)]) {
    const message = unsettable(name.name, settable, dependent);
    if (message !== null) return { kind: 'failure', message };
  }
  for (const { name, value } of at) {
    const closed = value.form.substitute((symbol) => analysis.values.get(symbol) ?? null);
    const open = closed.symbols();
    if (open.length > 0)
      return {
        kind: 'failure',
        message: `\`${name.name}\` is set to \`${value.text}\`, but \`${open[0]}\` has no value.`,
      };
    if (set.has(name.name)) return { kind: 'failure', message: `\`${name.name}\` is set twice.` };
    set.set(name.name, closed);
  }
  const fluxAxis = free.find(({ name }) => settable.fluxes.includes(name));
  if (fluxAxis) {
    return { kind: 'failure', message: `The flux \`${fluxAxis.name}\` takes integers only and is no axis of a plot.` };
  }
  const axes = new Set(free.map(({ name }) => name));
  const notes: string[] = [];
  const failure = fillUnset(settable, axes, set, unsetCoulomb, notes, used);
  if (failure !== null) return { kind: 'failure', message: failure };
  const off = offLattice(theory, settable, set);
  if (off !== null) return { kind: 'failure', message: off };
  const geometry = sphere.geometry(theory);
  const values = (name: string): Form | null => {
    if (axes.has(name)) return null;
    const own = set.get(name) ?? analysis.values.get(name);
    if (own) return own;
    if (!name.startsWith('@')) return null;
    return geometry.reduce((form, stage) => form.substitute(stage), Form.symbol(name));
  };
  return { kind: 'point', point: { values, notes } };
}

/** Fluxes on which a weight would not be integral, in words; null where there are none. */
function offLattice(theory: Theory, settable: Settable, set: ReadonlyMap<string, Form>): string | null {
  for (const { group } of gaugeGroups(theory)) {
    const own = group.group.independent.map((k) => group.fluxes[k] as string);
    if (!own.every((name) => settable.fluxes.includes(name) && set.has(name))) continue;
    const values = group.coordinates.map((name) => {
      const form = group.dependent.get(name) ?? Form.symbol(name);
      const flux = (symbol: string): string => group.fluxes[group.coordinates.indexOf(symbol)] ?? symbol;
      return form.substitute((symbol) => set.get(flux(symbol)) ?? null).toRational();
    });
    if (values.every((value) => value !== null) && isCocharacter(group.group, values)) continue;
    const given = own.map((name) => `\`${name} = ${set.get(name)?.key}\``).join(', ');
    const broken = own.find((name) => !set.get(name)?.toRational()?.isInteger());
    if (broken !== undefined && group.group.quotient === null && INTEGRAL.includes(group.group.family)) {
      return `The flux \`${broken}\` has to be an integer; \`${set.get(broken)?.key}\` is none.`;
    }
    return `${given} is no flux of ${group.group.name}: a weight of one of its representations would not be an integer on it.`;
  }
  return null;
}

/** Groups whose fluxes are any integers in the printed coordinates. */
const INTEGRAL: readonly string[] = ['U', 'SU', 'SO', 'USp'];

interface Settable {
  readonly coulomb: readonly string[];
  /** Empty on spheres without a sum over fluxes. */
  readonly fluxes: readonly string[];
  readonly masses: readonly string[];
  readonly backgrounds: readonly string[];
  readonly couplings: readonly string[];
  readonly parameters: readonly string[];
}

function independent(theory: Theory, role: 'gauge' | 'flavor', names: 'coordinates' | 'fluxes'): string[] {
  return theory.groups
    .filter((group) => group.role === role)
    .flatMap((group) => group.group.independent.map((k) => group[names][k] as string));
}

function settableNames(analysis: Analysis, sphere: Sphere, theory: Theory): Settable {
  return {
    coulomb: independent(theory, 'gauge', 'coordinates'),
    fluxes: sphere.fluxes ? independent(theory, 'gauge', 'fluxes') : [],
    masses: independent(theory, 'flavor', 'coordinates'),
    backgrounds: theory.backgrounds,
    couplings: theory.couplings,
    parameters: [...analysis.values.keys()],
  };
}

function unsettable(name: string, settable: Settable, dependent: ReadonlyMap<string, Form>): string | null {
  const all = Object.values(settable).flat();
  if (all.includes(name)) return null;
  if (dependent.has(name)) {
    return `\`${name}\` follows from the other coordinates of its group (their sum is zero) and is not set by itself.`;
  }
  const list = all.length === 0 ? 'nothing' : all.map((known) => `\`${known}\``).join(', ');
  return `This theory has no \`${name}\`; what can be set is ${list}.`;
}

function fillUnset(
  settable: Settable,
  axes: ReadonlySet<string>,
  set: Map<string, Form>,
  unsetCoulomb: 'error' | 'zero',
  notes: string[],
  used: ReadonlySet<string>,
): string | null {
  const open = (names: readonly string[]): string[] =>
    names.filter((name) => used.has(name) && !set.has(name) && !axes.has(name));
  const needed = open([...settable.coulomb, ...settable.fluxes]);
  if (needed.length > 0 && unsetCoulomb === 'error') {
    const example = needed.map((name) => `${name} = ${settable.fluxes.includes(name) ? '1' : '0.3'}`).join(', ');
    return `Without a value: ${needed.join(', ')}. Add \`at ${example}\`.`;
  }
  const couplings = open(settable.couplings);
  if (couplings.length > 0)
    return `The coupling has no value: add \`at ${couplings.map((name) => `${name} = 1`).join(', ')}\`.`;
  const masses = open(settable.masses).filter((name) => !settable.parameters.includes(name));
  const backgrounds = open(settable.backgrounds);
  for (const name of [...needed, ...masses, ...backgrounds]) set.set(name, Form.zero);
  if (needed.length > 0) notes.push(`Not set, taken as zero: ${needed.join(', ')}.`);
  if (masses.length > 0) notes.push(`Masses not set, taken as zero: ${masses.join(', ')}.`);
  if (backgrounds.length > 0) notes.push(`Parameters not set, taken as zero: ${backgrounds.join(', ')}.`);
  return null;
}
