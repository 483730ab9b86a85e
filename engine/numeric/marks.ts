import { formDouble } from '../arithmetic/form-double';
import type { Form } from '../exact/form';
import { type DivisorPoint, divisorOnLine, mergeDivisor } from '../product/divisor';
import type { Product } from '../product/factor';
import { collectEntries } from './precise';

/** Zeros (order > 0) and poles of a product for real values of one variable in [from, to]. */
export function marksOnLine(
  product: Product,
  variable: string,
  values: (name: string) => Form | null,
  from: number,
  to: number,
): DivisorPoint[] {
  const entries = collectEntries(product, (name) => (name === variable ? null : values(name)));
  const points = entries.flatMap((entry): DivisorPoint[] => {
    if (entry.parameters.some((form) => form.symbols().length > 0)) return [];
    const { coefficient, rest } = entry.argument.linearPart(variable);
    const c1 = formDouble(coefficient, () => null);
    const c0 = formDouble(rest, () => null);
    if (c0 === null || c1 === null) return [];
    const found = divisorOnLine(entry.name, entry.parameters, c0, c1, from, to);
    return found.map(({ at, order }) => ({ at, order: order * entry.power }));
  });
  return mergeDivisor(points);
}
