import type { Form } from '../exact/form';
import type { FunctionName, Source } from '../functions/special-function';
import type { Geometry } from '../product/chain';
import type { Product } from '../product/factor';
import type { Condition } from '../theory/checks/condition';
import type { SphereRules } from '../theory/rules';
import type { Multiplet, Theory } from '../theory/theory';
import type { TheoryWeights } from '../theory/weights';

export type TheoryProduct = Product<TheoryWeights>;

/**
 * One sphere: its rules, and how multiplets and weights become factors. All conventions of that sphere live in its
 * file and nowhere else.
 */
export interface Sphere extends SphereRules {
  /** Caption, LaTeX: `S^3_b`. */
  readonly latex: (theory: Theory) => string;
  /** Number of supersymmetries when none is typed. */
  readonly minimalSupersymmetry: number;
  /** Definitions and values of the geometry symbols, for simplification and evaluation. */
  readonly geometry: (theory: Theory) => Geometry;
  /** Product over the roots of the vector multiplet, and over further fields that `supersymmetry` brings. */
  readonly vector: (theory: Theory) => TheoryProduct;
  readonly multiplet: (theory: Theory, multiplet: Multiplet) => TheoryProduct;
  /** Classical contribution: exponentials of polynomials in the Coulomb parameters. */
  readonly classical: (theory: Theory) => TheoryProduct;
  /** Every mode before bosons and fermions are paired, as towers; a refusal in words where it is not known. */
  readonly modes: (theory: Theory) => ModesView;
  /** Conventions to print under a formula: `Q = b + 1/b`, the measure, signs; LaTeX in `$...$`. */
  readonly conventions: (theory: Theory) => readonly string[];
  /** What a referee checks of a theory on this sphere. */
  readonly conditions: readonly Condition[];
  /** Whether the partition function is a sum over gauge fluxes. */
  readonly fluxes: boolean;
  /** The function that multiplets of this sphere give, whose notations can be chosen. */
  readonly specialFunction: FunctionName;
  /**
   * Coefficients of a series that multiplies the integrand, by what they are called (`instanton2` for the second of
   * `instanton`, `instanton(1, 2)` for one order a gauge group); absent where a sphere has none.
   */
  readonly series?: {
    readonly name: string;
    /** `exchanged`: the same coefficient by different terms, for a check. */
    readonly coefficient: (theory: Theory, order: SeriesOrder, exchanged: boolean) => CoefficientSum;
    /** Conventions to say beside a value. */
    readonly notes: (theory: Theory) => readonly string[];
  };
  readonly sources: readonly Source[];
}

/** Powers of the variables of a series, one for each gauge group in the order of the text; a number is their sum. */
export type SeriesOrder = number | readonly number[];

/**
 * A coefficient as a sum of products of closed forms; refused in words where it cannot be had. Single terms may diverge
 * where the sum does not: every factor moves with a small d, and the limit d -> 0 of the sum is meant.
 */
export type CoefficientSum =
  | { readonly kind: 'sum'; readonly terms: readonly CoefficientTerm[] }
  | { readonly kind: 'refused'; readonly message: string };

export type CoefficientTerm = readonly RegulatedFactor[];

/** (value + slope d)^power. */
export interface RegulatedFactor {
  readonly value: Form;
  readonly slope: number;
  readonly power: 1 | -1;
}

/** A linear factor of the eigenvalues of one field: form in the level `n` and the weight, with its multiplicity. */
export interface ModeFactor {
  readonly eigenvalue: Form;
  /** Polynomial in `n`; positive for modes in the numerator (fermions), negative for bosons. */
  readonly multiplicity: Form;
}

/** Modes of one field at level n, an irreducible representation of SU(2)_L x SU(2)_R; everything a form in `n`. */
export interface FieldModes {
  readonly field: string;
  readonly left: Form;
  readonly right: Form;
  /** Their number, (2 left + 1)(2 right + 1). */
  readonly multiplicity: Form;
}

/** Bosonic and fermionic modes that share a linear factor and the spin of SU(2)_L, for each level n >= start. */
export interface ModePair {
  readonly eigenvalue: Form;
  readonly start: number;
  readonly boson: FieldModes;
  readonly fermion: FieldModes;
}

/** Modes for each weight of a set and each level n >= start. */
export interface ModeTower {
  readonly weights: TheoryWeights | null;
  readonly half: boolean;
  readonly power: number;
  readonly start: number;
  /** A factor outside the product over levels. */
  readonly prefactor: Form | null;
  readonly factors: readonly ModeFactor[];
  /** The same modes in pairs related by supersymmetry. */
  readonly pairs: readonly ModePair[];
  readonly from: readonly string[];
}

export type ModesView =
  | { readonly kind: 'modes'; readonly towers: readonly ModeTower[] }
  | { readonly kind: 'refused'; readonly message: string };
