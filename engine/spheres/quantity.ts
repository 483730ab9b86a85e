import { Form } from '../exact/form';
import { functions } from '../functions/table';
import type { Geometry } from '../product/chain';
import { exactOrder } from '../product/divisor';
import { type Factor, FLUX, isGeometry, substitute, WEIGHT } from '../product/factor';
import { simplify } from '../product/simplify';
import { withoutScales } from '../product/without-scales';
import type { Theory } from '../theory/theory';
import type { TheoryWeights } from '../theory/weights';
import { fixedMasses, withFixedMasses } from './fixed-masses';
import type { Sphere, TheoryProduct } from './sphere';

/** What can be asked of a theory besides one of its multiplets. */
export const QUANTITIES = ['one-loop', 'vector', 'classical', 'integrand'] as const;

/**
 * The product for a quantity, before simplification: `one-loop`, `vector`, `classical`, `integrand`, or the factors of
 * the multiplets of that name; null for a name the theory does not have.
 */
export function quantity(sphere: Sphere, theory: Theory, what: string): TheoryProduct | null {
  switch (what) {
    case 'vector':
      return sphere.vector(theory);
    case 'classical':
      return sphere.classical(theory);
    case 'one-loop':
      return oneLoop(sphere, theory);
    case 'integrand':
      return [...sphere.classical(theory), ...oneLoop(sphere, theory)];
    default: {
      const named = theory.multiplets.filter(({ name }) => name === what);
      return named.length === 0 ? null : named.flatMap((multiplet) => sphere.multiplet(theory, multiplet));
    }
  }
}

function oneLoop(sphere: Sphere, theory: Theory): TheoryProduct {
  return [...sphere.vector(theory), ...theory.multiplets.flatMap((multiplet) => sphere.multiplet(theory, multiplet))];
}

/** A simplified product, and the parameter values it holds at; empty when it holds identically. */
export interface ElementaryProduct {
  readonly product: TheoryProduct;
  readonly at: readonly { readonly name: string; readonly value: Form }[];
}

/** Values of parameters, closed; some of them also as expressions in the geometry symbols. */
export interface FixedValues {
  readonly closed: ReadonlyMap<string, Form>;
  readonly inGeometry: ReadonlyMap<string, Form>;
}

const NO_VALUES: FixedValues = { closed: new Map(), inGeometry: new Map() };

/**
 * The product with as few special functions as the laws allow. Where they only cancel at the values that the notebook
 * fixes (a parameter without a range, a mass among them), those values are put in, and named.
 */
export function elementary(
  sphere: Sphere,
  theory: Theory,
  product: TheoryProduct,
  { closed, inGeometry }: FixedValues = NO_VALUES,
): ElementaryProduct {
  const geometry = sphere.geometry(theory);
  const identical = simplify(product, 'elementary', geometry);
  const open = identical.filter(isSpecial);
  const masses = [...new Set(open.flatMap((factor) => fixedMasses(theory, factor, closed)))];
  const names = new Set([...open.flatMap(({ argument }) => argument.symbols()), ...masses]);
  const used = [...names].filter((name) => closed.has(name));
  if (used.length === 0) return { product: identical, at: [] };
  const symbolic = theory.round ? [] : masses.filter((name) => inGeometry.has(name));
  // Masses made from b keep its symbol; where they are other numbers, b is one, too.
  for (const squashed of symbolic.length > 0 ? [true, false] : [false]) {
    const values = squashed ? new Map([...closed, ...inGeometry]) : closed;
    const atMasses = withFixedMasses(theory, product, values, geometry);
    const isNumber = !squashed && masses.some((name) => values.get(name)?.isZero() === false);
    const stages = [(name: string) => values.get(name) ?? null, ...(isNumber ? geometry : [])];
    const atValues = stages.reduce<TheoryProduct>((current, stage) => substitute(current, stage), atMasses);
    const special = withoutScales(simplify(atValues, 'elementary', geometry));
    if (special.filter(isSpecial).length < open.length && !special.some((factor) => isSingular(factor, geometry))) {
      return { product: special, at: used.map((name) => ({ name, value: values.get(name) ?? Form.zero })) };
    }
  }
  return { product: identical, at: [] };
}

/** True for a function at one of its own zeros or poles, whatever the Coulomb parameters are: 1/Upsilon(0). */
function isSingular({ name, argument, parameters, weights }: Factor<TheoryWeights>, geometry: Geometry): boolean {
  const known = (form: Form): Form => geometry.reduce((current, stage) => current.substitute(stage), form);
  const at = known(argument);
  return weights === null && at.symbols().length === 0 && exactOrder(name, at, parameters.map(known)) !== 0;
}

/** True for factors that are not elementary. */
export function isSpecial(factor: Factor<TheoryWeights>): boolean {
  return !functions[factor.name].elementary;
}

/** True for factors that are not elementary and no constants: they depend on more than the geometry. */
export function isOpen(factor: Factor<TheoryWeights>): boolean {
  return isSpecial(factor) && (factor.weights !== null || !factor.argument.symbols().every(isGeometry));
}

/** Names of all coordinates and parameters that a product depends on, geometry symbols left out. */
export function namesIn(theory: Theory, product: TheoryProduct): ReadonlySet<string> {
  const names = new Set<string>();
  for (const { argument, parameters, weights } of product) {
    const symbols = [argument, ...parameters].flatMap((form) => form.symbols());
    for (const name of symbols) if (!name.startsWith('@')) names.add(name);
    for (const { group } of weights?.parts ?? []) {
      const { group: acting, coordinates, fluxes, role } = theory.groups[group] as Theory['groups'][number];
      for (const k of acting.independent) {
        if (symbols.includes(WEIGHT)) names.add(coordinates[k] as string);
        if (symbols.includes(FLUX) && role === 'gauge') names.add(fluxes[k] as string);
      }
    }
  }
  return names;
}
