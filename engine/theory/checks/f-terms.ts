import type { Representation } from '../../lie/representation';
import type { SuperpotentialTerm, Theory } from '../theory';
import type { RValue } from './r-values';

/** A chiral field of the matter content, seen by the gauge groups. A hyper is two of them. */
export interface Field {
  readonly name: string;
  readonly latex: string;
  /** Under the gauge groups only. */
  readonly representations: readonly Representation[];
  /** Dimension under the flavour groups. */
  readonly copies: number;
  readonly rCharge: RValue;
}

/**
 * What dW = 0 says about a product of fields: nothing, that it vanishes in the chiral ring, or that it is related to
 * other products.
 */
export type FTerm = 'none' | 'vanishes' | 'related';

/**
 * dW/dX = 0 for a field X: where one monomial contains X, the rest of that monomial vanishes, and so does every product
 * with it; where several do, there is a relation. A relation with fewer components than the product leaves some of them.
 */
export function fTermOf(theory: Theory, product: readonly Field[], fields: readonly Field[]): FTerm {
  const powers = powersOf(product.map(({ name }) => name));
  let found: FTerm = 'none';
  for (const { name, copies } of fields) {
    const monomials = theory.superpotential.filter((term) => term.fields.some(({ field }) => field.name === name));
    for (const term of monomials) {
      const rest = derivative(term, name);
      const divides = rest.size > 0 && [...rest].every(([other, power]) => (powers.get(other) ?? 0) >= power);
      if (!divides || copies < components(rest, fields)) continue;
      if (monomials.length === 1) return 'vanishes';
      found = 'related';
    }
  }
  return found;
}

function powersOf(names: readonly string[]): Map<string, number> {
  const powers = new Map<string, number>();
  for (const name of names) powers.set(name, (powers.get(name) ?? 0) + 1);
  return powers;
}

/** Powers of the fields in the derivative of a monomial. */
function derivative(term: SuperpotentialTerm, by: string): Map<string, number> {
  const powers = new Map<string, number>();
  for (const { field, power } of term.fields) powers.set(field.name, (powers.get(field.name) ?? 0) + power);
  const left = (powers.get(by) ?? 0) - 1;
  if (left > 0) powers.set(by, left);
  else powers.delete(by);
  return powers;
}

/** The least number of flavour components that a product of fields can have: powers count antisymmetrised. */
function components(powers: ReadonlyMap<string, number>, fields: readonly Field[]): number {
  let count = 1;
  for (const [name, power] of powers) {
    const copies = fields.find((field) => field.name === name)?.copies ?? 1;
    if (copies < power) continue;
    for (let k = 0; k < power; k++) count = (count * (copies - k)) / (k + 1);
  }
  return count;
}
