import { Form } from '../exact/form';
import type { Geometry } from '../product/chain';
import { type Factor, isGeometry, WEIGHT } from '../product/factor';
import type { Theory, TheoryGroup } from '../theory/theory';
import { TheoryWeights, type WeightPart } from '../theory/weights';
import type { TheoryProduct } from './sphere';

/** Weights of flavour groups beyond which a factor is left as it is. */
const MAXIMAL_WEIGHTS = 64;

/** The masses of a flavour group in a factor, where all of them have values. */
export function fixedMasses(
  { groups }: Theory,
  { weights }: Factor<TheoryWeights>,
  fixed: ReadonlyMap<string, Form>,
): readonly string[] {
  return fixedParts(groups, weights, fixed).flatMap(({ group }) => masses(groups[group] as TheoryGroup));
}

/**
 * The product with its masses at given values. A flavour group whose masses are all given leaves the weight sets; its
 * weights become shifts of the argument, one factor for each.
 */
export function withFixedMasses(
  { groups }: Theory,
  product: TheoryProduct,
  fixed: ReadonlyMap<string, Form>,
  geometry: Geometry,
): TheoryProduct {
  const definitions = geometry[0] ?? (() => null);
  return product.flatMap((factor) => {
    const parts = fixedParts(groups, factor.weights, fixed);
    const flavour = new TheoryWeights(groups, parts);
    if (parts.length === 0 || flavour.size > MAXIMAL_WEIGHTS) return [factor];
    const rest = factor.weights?.parts.filter((part) => !parts.includes(part)) ?? [];
    const weights = rest.length === 0 ? null : new TheoryWeights(groups, rest);
    const position = weights === null ? Form.zero : Form.symbol(WEIGHT);
    // One of each pair of weights: one of each pair of the flavour group, and all of the others.
    return (factor.half ? flavour.half() : flavour.weights()).map((weight): Factor<TheoryWeights> => {
      const shifted = position.add(weight.position.substitute((name) => fixed.get(name) ?? null));
      const argument = factor.argument.substitute((name) => (name === WEIGHT ? shifted : null));
      // A shift by b leaves nothing as it is while Q is a symbol of its own.
      const resolved = shifted.symbols().some(isGeometry) ? argument.substitute(definitions) : argument;
      return { ...factor, argument: resolved, weights, half: false };
    });
  });
}

function fixedParts(
  groups: readonly TheoryGroup[],
  weights: TheoryWeights | null,
  fixed: ReadonlyMap<string, Form>,
): readonly WeightPart[] {
  return (weights?.parts ?? []).filter(({ group }) => {
    const own = groups[group] as TheoryGroup;
    return own.role === 'flavor' && masses(own).every((name) => fixed.has(name));
  });
}

function masses({ coordinates, dependent }: TheoryGroup): string[] {
  return coordinates.filter((name) => !dependent.has(name));
}
