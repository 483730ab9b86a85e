import { Form } from '../exact/form';
import type { FunctionAt, FunctionName } from '../functions/special-function';

/** Placeholder in a factor's argument for the weight on the Coulomb parameters and masses: w.sigma + w.m. */
export const WEIGHT = '@w';
/** Placeholder for the weight on the fluxes: w.n. */
export const FLUX = '@f';

/**
 * A finite set of weights over which a factor is taken: an orbit of the Weyl groups of all groups together. The
 * product knows nothing of root systems; it needs to compare sets, to know their opposites, and to list them.
 */
export interface WeightSet {
  /** Equal for equal sets, different for different ones. */
  readonly key: string;
  /** Key of the set of negatives. */
  readonly oppositeKey: string;
  readonly size: number;
  readonly opposite: () => this;
  /** Every weight as linear forms on positions and on fluxes. */
  readonly weights: () => readonly Weight[];
  /** One of each pair w, -w; asked only of sets that are their own opposites and do not hold zero. */
  readonly half: () => readonly Weight[];
  /** The same weights as rows of coefficients in doubles, for programs. */
  readonly rows: (half: boolean) => WeightRows;
}

/** Weights in doubles: rows[k * names.length + j] is the coefficient of the coordinate names[j] in weight k. */
export interface WeightRows {
  /** Coordinates on which the weights are linear; the fluxes have the names `fluxes[j]`, null where there is none. */
  readonly names: readonly string[];
  readonly fluxes: readonly (string | null)[];
  readonly rows: Float64Array;
}

export interface Weight {
  readonly position: Form;
  readonly flux: Form;
}

/**
 * One factor of a product: a special function of an exactly known argument, to an integer power, taken over a set of
 * weights. The argument is affine in the placeholder `@w` (and `@f`), which stands for each weight in turn. A parameter
 * may hold the flux of the weight if the function is even in it.
 */
export interface Factor<W extends WeightSet = WeightSet> extends FunctionAt {
  readonly name: FunctionName;
  /** Null: one factor, without placeholder. */
  readonly weights: W | null;
  /** Only one of each pair w, -w. */
  readonly half: boolean;
  /** The multiplets it stems from, for pointing at. */
  readonly from: readonly string[];
}

/** An immutable product of factors; the empty list is 1. */
export type Product<W extends WeightSet = WeightSet> = readonly Factor<W>[];

/** The argument with the weight replaced by its negative. */
export function flipped(argument: Form): Form {
  return argument.substitute((name) => (name === WEIGHT || name === FLUX ? Form.symbol(name).neg() : null));
}

/** The same product written over the opposite weights. */
export function overOpposite<W extends WeightSet>(factor: Factor<W>): Factor<W> {
  if (factor.weights === null) return factor;
  return { ...factor, weights: factor.weights.opposite(), argument: flipped(factor.argument) };
}

export function inverse<W extends WeightSet>(product: Product<W>): Product<W> {
  return product.map((factor) => ({ ...factor, power: -factor.power }));
}

/** Replaces symbols in arguments and parameters. */
export function substitute<W extends WeightSet>(
  product: Product<W>,
  values: (name: string) => Form | null,
): Product<W> {
  return product.map((factor) => ({
    ...factor,
    argument: factor.argument.substitute(values),
    parameters: factor.parameters.map((p) => p.substitute(values)),
  }));
}

/** Every weight written out: factors without weight sets, arguments in the coordinates. */
export function expand<W extends WeightSet>(product: Product<W>): Product<never> {
  return product.flatMap((factor) => expandFactor(factor));
}

export function expandFactor<W extends WeightSet>(factor: Factor<W>): Product<never> {
  const { weights, half, ...rest } = factor;
  if (weights === null) return [{ ...rest, weights: null, half: false }];
  return (half ? weights.half() : weights.weights()).map((weight) => ({
    ...rest,
    argument: atWeight(factor.argument, weight),
    parameters: factor.parameters.map((form) => atWeight(form, weight)),
    weights: null,
    half: false,
  }));
}

/** The argument at one weight. */
export function atWeight(argument: Form, weight: Weight): Form {
  return argument.substitute((name) => (name === WEIGHT ? weight.position : name === FLUX ? weight.flux : null));
}

/** True for the geometry symbols b, Q, w1, ..: engine names that stand for numbers, placeholders left out. */
export function isGeometry(name: string): boolean {
  return name.startsWith('@') && name !== WEIGHT && name !== FLUX;
}

export function mentionsWeight(form: Form): boolean {
  return form.symbols().some((name) => name === WEIGHT || name === FLUX);
}

/** A number as a factor. */
export function constantFactor(value: Form, from: readonly string[]): Factor<never> {
  return { name: 'linear', argument: value, parameters: [], power: 1, weights: null, half: false, from };
}
