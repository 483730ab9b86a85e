import { formDouble } from '../../arithmetic/form-double';
import type { Form } from '../../exact/form';
import { Rational } from '../../exact/rational';
import { dimension } from '../../lie/invariants';
import type { Representation } from '../../lie/representation';
import type { Multiplet, Theory } from '../theory';
import type { RValue } from './r-values';

/**
 * A multiplet counted in chirals: a hyper stands for one in its representation and one in the dual, a half-hyper for
 * one.
 */
export interface Matter {
  readonly name: string;
  readonly multiplet: Multiplet;
  readonly representations: readonly Representation[];
  readonly rCharge: Form;
  readonly withDual: boolean;
}

export function matterOf(theory: Theory): readonly Matter[] {
  return theory.multiplets.map((multiplet) => ({
    name: multiplet.name,
    multiplet,
    representations: multiplet.representations,
    rCharge: multiplet.rCharge,
    withDual: multiplet.kind === 'hyper',
  }));
}

/** Sums over the weights of a representation. */
export interface Traces {
  readonly dimension: bigint;
  /** Second-order index with respect to each simple part. */
  readonly indices: readonly bigint[];
  /** Sum of the U(1) charges, for U(n) the charge under the trace: sum over irreps of dim times charge. */
  readonly charge: Rational;
  readonly chargeSquared: Rational;
}

// Pure memoisation: representations are shared by all theories that spell them the same way.
const traces = new WeakMap<Representation, Traces>();

export function tracesOf(representation: Representation): Traces {
  const known = traces.get(representation);
  if (known) return known;
  const { group, irreps } = representation;
  let charge = Rational.zero;
  let chargeSquared = Rational.zero;
  if (group.abelianRank > 0) {
    for (const irrep of irreps) {
      const count = Rational.of(BigInt(irrep.multiplicity) * dimension(group.system, irrep.labels));
      charge = charge.add(irrep.charge.mul(count));
      chargeSquared = chargeSquared.add(irrep.charge.mul(irrep.charge).mul(count));
    }
  }
  const found = { dimension: representation.dimension, indices: representation.indices, charge, chargeSquared };
  traces.set(representation, found);
  return found;
}

/** Dimension of a product of representations, those of the groups in `without` left out. */
export function dimensionWithout(representations: readonly Representation[], ...without: number[]): bigint {
  return representations.reduce(
    (product, one, index) => (without.includes(index) ? product : product * tracesOf(one).dimension),
    1n,
  );
}

/** Sum over all chirals of a number that is the same for a representation and its dual. */
export function sumOverMatter(theory: Theory, value: (matter: Matter) => Rational): Rational {
  return matterOf(theory).reduce((sum, matter) => {
    const one = value(matter);
    return sum.add(matter.withDual ? one.add(one) : one);
  }, Rational.zero);
}

/** Sum of the second-order index over all chirals, for one simple part of one group. */
export function indexSum(theory: Theory, group: number, part: number): Rational {
  return sumOverMatter(theory, ({ representations }) => {
    const index = tracesOf(representations[group] as Representation).indices[part] as bigint;
    return index === 0n ? Rational.zero : Rational.of(index * dimensionWithout(representations, group));
  });
}

/** The exact value of a level at the parameters' values; zero where none is given. */
export function levelValue(theory: Theory, level: Form | null): Rational {
  return level?.substitute((name) => theory.parameters.get(name) ?? null).toRational() ?? Rational.zero;
}

/** An R-charge at the parameters' values: exact where it is rational, else in doubles; its real part where it is complex. */
export function rChargeValue(theory: Theory, form: Form): RValue {
  const value = form.substitute((name) => theory.parameters.get(name) ?? null);
  return value.toGaussian()?.re ?? formDouble(value, () => null)?.re ?? Number.NaN;
}
