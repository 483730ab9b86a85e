import type { Form } from '../exact/form';
import type { GroupOption, MultipletKind, SphereName } from '../language/tree';

/** One squashing parameter. */
export interface Squashing {
  /** As typed. */
  readonly name: string;
  /** Geometry symbol. */
  readonly symbol: string;
  /** Value on the round sphere. */
  readonly round: Form;
  readonly mayBeComplex: boolean;
}

/**
 * What may be written in a theory on a given sphere. Each sphere's file supplies its own; reading a theory asks these
 * rules and never which sphere it is.
 */
export interface SphereRules {
  readonly name: SphereName;
  readonly multiplets: readonly MultipletKind[];
  /** Squashing parameters: all have to be positive, or, where they may be complex, have a positive real part. */
  readonly squashing: readonly Squashing[];
  readonly options: {
    readonly gauge: readonly GroupOption['kind'][];
    readonly flavor: readonly GroupOption['kind'][];
  };
  /** Why an option or a kind of multiplet is not in the list, by its word, and `mixed` where levels do not mix. */
  readonly refusals: Readonly<Record<string, string>>;
  /** True where a half-hyper takes one of each pair of weights, so that its weights have to come in such pairs. */
  readonly halvesWeights: boolean;
  readonly supersymmetries: readonly number[];
  /** R-charge where the column R is absent, and the only one allowed for multiplets that fix it. */
  readonly rCharge: (kind: MultipletKind) => { readonly value: Form; readonly fixed: boolean };
}
