import { Form } from '../exact/form';
import { functions } from '../functions/table';
import { expandChain, type Geometry, StepLattice } from './chain';
import { type Factor, FLUX, type Product, WEIGHT, type WeightSet } from './factor';
import { flippable, gather } from './gather';
import { attach, pairByShifts } from './pair-by-shifts';
import { reduceElementary } from './reduce-elementary';

/**
 * A function that is even about a centre, taken over both signs of its weights at a whole number of periods from there,
 * is moved to the centre if nothing but elementary functions is left over: Upsilon(ix) Upsilon(-ix) =
 * x^2 Upsilon(1 + ix) Upsilon(1 - ix) at b = 1.
 */
export function centred<W extends WeightSet>(
  product: Product<W>,
  geometry: Geometry,
  lattices: Map<string, StepLattice>,
): Product<W> {
  return product.flatMap((factor) => moved(factor, geometry, lattices) ?? [factor]);
}

function moved<W extends WeightSet>(
  factor: Factor<W>,
  geometry: Geometry,
  lattices: Map<string, StepLattice>,
): Product<W> | null {
  const { name, parameters, argument, power } = factor;
  const even = functions[name].reflections.find((reflection) => reflection.power === 1 && reflection.sign === 1);
  if (functions[name].elementary || !even || !flippable(factor)) return null;
  const position = argument.substitute((symbol) => (symbol === WEIGHT || symbol === FLUX ? Form.zero : null));
  const distance = even.center(parameters).sub(position);
  if (distance.isZero()) return null;
  const steps = StepLattice.shared(lattices, name, parameters, geometry).decompose(distance);
  if (steps === null) return null;
  let left: Product<W> = attach(expandChain(name, argument, parameters, steps), -power, factor, false, factor.from);
  for (let round = 0; round < ROUNDS; round++) left = gather(reduceElementary(pairByShifts(left, geometry, lattices)));
  if (left.some((other) => !functions[other.name].elementary)) return null;
  return [...left, { ...factor, argument: argument.add(distance) }];
}

/** Gammas of the quotients meet in the first round, what they leave in the second. */
const ROUNDS = 2;
