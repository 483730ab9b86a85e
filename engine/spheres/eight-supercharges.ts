import { Form } from '../exact/form';
import type { FunctionName } from '../functions/special-function';
import { type Factor, substitute, WEIGHT } from '../product/factor';
import { gaugeGroups, type Multiplet, type Theory } from '../theory/theory';
import { matterWeights, rootWeights, type TheoryWeights, type WeightedSet } from '../theory/weights';
import type { TheoryProduct } from './sphere';

const w = Form.symbol(WEIGHT);

/** What the one-loop factors of S^4 and S^5 are made of: one function with a zero at 0, even about the middle of its strip. */
export interface RoundFunction {
  readonly name: FunctionName;
  readonly parameters: readonly Form[];
  /** The middle of the strip: argument of a massless hyper at zero weight. */
  readonly center: Form;
  /** Where the adjoint hyper that the largest supersymmetry brings has its argument at zero weight. */
  readonly partner: Form;
  /** Geometry symbols on the round sphere. */
  readonly round: ReadonlyMap<string, Form>;
}

/** The function at i a.sigma for every root; `withPartner` adds the adjoint hyper of the largest supersymmetry. */
export function vectorFactors(theory: Theory, of: RoundFunction, withPartner: boolean): TheoryProduct {
  const product = gaugeGroups(theory).flatMap(({ group, index }) => {
    const roots = rootWeights(theory, index).map(({ weights }) => ({ weights, multiplicity: 1 }));
    const vectors = factors(of, roots, Form.zero, 1, 'vector');
    if (!withPartner) return vectors;
    const adjoint = [...roots, { weights: null, multiplicity: group.group.rank }];
    return [...vectors, ...factors(of, adjoint, of.partner, -1, 'vector')];
  });
  return onRound(theory, of, product);
}

/**
 * One over the function at center + i w.(sigma, m) for every weight. A half-hyper takes one of each pair of weights: its
 * factor is even in the weight, so that any choice will do.
 */
export function hyperFactors(
  theory: Theory,
  of: RoundFunction,
  { kind, name, representations }: Multiplet,
): TheoryProduct {
  const full = factors(of, matterWeights(theory.groups, representations), of.center, -1, name);
  const own =
    kind === 'hyper'
      ? full
      : full.map((factor) =>
          factor.weights === null ? { ...factor, power: factor.power / 2 } : { ...factor, half: true },
        );
  return onRound(theory, of, own);
}

/** On the round sphere the geometry has its values from the start. */
export function onRound(theory: Theory, { round }: RoundFunction, product: TheoryProduct): TheoryProduct {
  return theory.round ? substitute(product, (name) => round.get(name) ?? null) : product;
}

/** The function at start + i w over sets of weights; the zero weight has position 0. */
function factors(
  { name, parameters }: RoundFunction,
  sets: readonly WeightedSet[],
  start: Form,
  power: 1 | -1,
  from: string,
): TheoryProduct {
  return sets.map(
    ({ weights, multiplicity }): Factor<TheoryWeights> => ({
      name,
      argument: weights === null ? start : start.add(Form.i.mul(w)),
      parameters,
      power: power * multiplicity,
      weights,
      half: false,
      from: [from],
    }),
  );
}
