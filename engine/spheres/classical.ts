import { Form } from '../exact/form';
import type { Factor } from '../product/factor';
import { hasCubicTrace } from '../theory/checks/cubic-level';
import type { TheoryGroup } from '../theory/theory';
import type { TheoryWeights } from '../theory/weights';

/** (sigma, sigma) in the independent coordinates, in the normalisation of the group's level. */
export function quadratic(group: TheoryGroup): Form {
  return powerSum(group, 2).scale(group.group.levelScale);
}

/** Tr sigma^3 of U(n) and SU(n), n > 2; the weights of every other group here come in pairs, and it vanishes. */
export function cubicTrace(group: TheoryGroup): Form {
  return hasCubicTrace(group) ? powerSum(group, 3) : Form.zero;
}

/** Sum of a power of all printed coordinates, in the independent ones. */
function powerSum(group: TheoryGroup, power: number): Form {
  return Form.sum(group.coordinates.map((name) => coordinate(group, name).pow(power)));
}

/** Tr sigma over the printed coordinates; zero for a semisimple group. */
export function trace(group: TheoryGroup | undefined): Form {
  return group === undefined ? Form.zero : powerSum(group, 1);
}

/** Tr of the fluxes, written with the names in `fluxes`. */
export function fluxTrace(group: TheoryGroup): Form {
  const names = new Map(group.coordinates.map((name, k) => [name, group.fluxes[k] as string]));
  return trace(group).substitute((name) => {
    const flux = names.get(name);
    return flux === undefined ? null : Form.symbol(flux);
  });
}

function coordinate(group: TheoryGroup, name: string): Form {
  return group.dependent.get(name) ?? Form.symbol(name);
}

/** exp(argument) as a factor of the classical part. */
export function exponential(argument: Form): Factor<TheoryWeights> {
  return { name: 'exponential', argument, parameters: [], power: 1, weights: null, half: false, from: ['classical'] };
}
