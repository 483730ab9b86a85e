import type { Quantity } from '../language/tree';
import { QUANTITIES, quantity } from '../spheres/quantity';
import type { TheoryProduct } from '../spheres/sphere';
import type { TheoryEntry } from './analysis';

/** Why a theory cannot be asked anything, in words; null when it can. */
export function unreadable(entry: TheoryEntry | undefined, name: string): string | null {
  if (!entry) return `There is no theory \`${name}\` in this notebook.`;
  if (entry.sphere === null) return `The theory \`${name}\` has no sphere; add a line such as \`sphere S3\`.`;
  if (!entry.built?.theory) return `The theory \`${name}\` has errors; mend them first.`;
  return null;
}

/** What is asked of a theory. */
export type Asked = Pick<Extract<Quantity, { kind: 'theory' }>, 'what' | 'orders'>;

/** The product that is asked for; null where it is none, or not known. */
export function theoryQuantity(entry: TheoryEntry, { what, orders }: Asked): TheoryProduct | null {
  if (entry.sphere === null || !entry.built?.theory || orders !== undefined) return null;
  return quantity(entry.sphere, entry.built.theory, what.name);
}

/** As typed: `one-loop`, `instanton(1, 2)`. */
export function askedText({ what, orders }: Asked): string {
  return orders === undefined ? what.name : `${what.name}(${orders.join(', ')})`;
}

export function unknownQuantity(entry: TheoryEntry, asked: Asked): string {
  const series = entry.sphere?.series === undefined ? [] : [`${entry.sphere.series.name}1`];
  const names = [...QUANTITIES, ...series, ...(entry.built?.theory?.multiplets ?? []).map(({ name }) => name)];
  return `\`${askedText(asked)}\` is no quantity of \`${entry.block.name.name}\`; there are ${names.map((n) => `\`${n}\``).join(', ')}.`;
}

/** Name of the theory, spectrum or function that a quantity is of. */
export function subjectName(quantity: Quantity): string {
  if (quantity.kind === 'theory') return quantity.theory.name;
  return quantity.kind === 'determinant' ? quantity.spectrum.name : quantity.function.name;
}
