import type { Form } from '../exact/form';
import type { MultipletKind, MultipletRow, Name, Span, SphereName } from '../language/tree';
import type { Group } from '../lie/group';
import type { Representation } from '../lie/representation';

/** A supersymmetric gauge theory on a sphere, read from its block and the parameters above it. Immutable. */
export interface Theory {
  readonly name: string;
  readonly sphere: SphereName;
  /** Exact values of the geometry symbols: `@b` on S3 and S4, `@w1`.. on S5. */
  readonly geometry: ReadonlyMap<string, Form>;
  /** True when no squashing was asked for. */
  readonly round: boolean;
  /** Number N of supersymmetries in the convention of the sphere's dimension, as typed; null: the sphere's own. */
  readonly supersymmetry: number | null;
  readonly groups: readonly TheoryGroup[];
  readonly mixed: readonly MixedLevel[];
  readonly multiplets: readonly Multiplet[];
  readonly superpotential: readonly SuperpotentialTerm[];
  /** Values of the `let` parameters that the theory mentions. */
  readonly parameters: ReadonlyMap<string, Form>;
  /** Names that stand for FI and similar background values without a `let`: they count as zero until set. */
  readonly backgrounds: readonly string[];
  /** Names in couplings without a `let`: they have to be set before a classical factor has a value. */
  readonly couplings: readonly string[];
}

export interface TheoryGroup {
  readonly role: 'gauge' | 'flavor';
  readonly name: string;
  readonly group: Group;
  /** Names of all printed coordinates (sigma1, sigma2, ...), dependent ones included. */
  readonly coordinates: readonly string[];
  /** Names of the fluxes through the sphere that go with the coordinates (flux1, flux2, ...). */
  readonly fluxes: readonly string[];
  /** What the dependent coordinates are, by name. */
  readonly dependent: ReadonlyMap<string, Form>;
  readonly level: Form | null;
  /** Level k' of the U(1) part of U(n) where it was set apart. */
  readonly abelianLevel: Form | null;
  readonly fi: Form | null;
  readonly theta: Form | null;
  readonly coupling: Form | null;
  readonly span: Span;
}

export interface MixedLevel {
  /** Indices into `groups`. */
  readonly groups: readonly [number, number];
  readonly level: Form;
  readonly span: Span;
}

export interface Multiplet {
  readonly kind: MultipletKind;
  readonly name: string;
  /** One representation for each group, in the order of `groups`. */
  readonly representations: readonly Representation[];
  /** R-charge of the lowest component; canonical where no column R is given. */
  readonly rCharge: Form;
  readonly row: MultipletRow;
}

export interface SuperpotentialTerm {
  readonly fields: readonly { readonly multiplet: Multiplet; readonly power: number; readonly field: Name }[];
  readonly span: Span;
}

/** Gauge groups with their places in `groups`. */
export function gaugeGroups(theory: Theory): readonly { readonly group: TheoryGroup; readonly index: number }[] {
  return theory.groups.flatMap((group, index) => (group.role === 'gauge' ? [{ group, index }] : []));
}
