import { Form } from '../exact/form';
import { type Product, WEIGHT, type WeightSet } from './factor';
import { countOf } from './gather';

/**
 * The same product, its linear factors without the numbers in front of their weights, where these and the constant factors
 * multiply to 1. They come from a period in numbers, which enters a chain of shifts and leaves it again.
 */
export function withoutScales<W extends WeightSet>(product: Product<W>): Product<W> {
  let total = Form.one;
  const rest = product.flatMap((factor): Product<W> => {
    const { argument, weights } = factor;
    const scale = weights === null ? argument.toRational() : argument.linearPart(WEIGHT).coefficient.toRational();
    if (factor.name !== 'linear' || scale === null || scale.isZero()) return [factor];
    total = total.mul(Form.number(scale).pow(factor.power * countOf(factor)));
    return weights === null ? [] : [{ ...factor, argument: argument.div(Form.number(scale)) }];
  });
  return total.equals(Form.one) ? rest : product;
}
