import type { Form } from '../exact/form';
import type { Rational } from '../exact/rational';
import type { Span, TowerKind } from '../language/tree';
import type { Polynomial } from './polynomial';

/** Highest degree of an eigenvalue, all factors with their powers together. */
export const MAXIMAL_DEGREE = 16;
/** Highest degree of a degeneracy in one index. */
export const MAXIMAL_DEGENERACY_DEGREE = 32;
/** Most modes that finite ranges may be written out to. */
export const MAXIMAL_MODES = 5000;
/** Most endless indices of one tower; the work grows with the power of their number. */
export const MAXIMAL_INDICES = 4;

/**
 * A set of towers as typed: eigenvalues and degeneracies as forms in indices and parameters. The determinant it
 * stands for is the product over the towers of (product of eigenvalue^degeneracy)^exponent.
 */
export interface Spectrum {
  readonly name: string;
  readonly towers: readonly WrittenTower[];
  /** Values of the notebook's parameters, used where a request sets no others. */
  readonly parameters: ReadonlyMap<string, Form>;
}

export interface WrittenTower {
  readonly kind: TowerKind;
  /** Power of the tower's determinant: -1/2, -1, 1, 1/2, or the p of `power(p)`. */
  readonly exponent: Form;
  readonly eigenvalue: readonly { readonly form: Form; readonly power: number }[];
  readonly degeneracy: Form;
  /** Of the indices that the tower uses, in the order of their declaration. */
  readonly ranges: readonly WrittenRange[];
  readonly spans: TowerSpans;
  /** What it is, for tables; empty for a tower of the text. */
  readonly label: string;
}

export interface WrittenRange {
  readonly name: string;
  readonly from: Form;
  readonly to: Form | null;
  readonly span: Span;
}

export interface TowerSpans {
  readonly row: Span;
  readonly eigenvalue: Span;
  readonly degeneracy: Span;
}

/**
 * A constant taken out of each of several linear forms: every one of them is multiplied by base^weight. A polynomial
 * c n^r + ... shares c evenly among its r linear factors; so does a number in front of a product.
 */
export interface ScaleRecord {
  readonly base: Form;
  readonly weight: Rational;
}

export type TowerFactor =
  | {
      /** sum_i periods_i j_i + constant. With one index the period is 1. */
      readonly kind: 'linear';
      readonly periods: readonly Form[];
      readonly constant: Form;
      readonly scale: readonly ScaleRecord[];
      readonly power: number;
    }
  | {
      /** A monic polynomial in the only index, without linear factor over Q(i) and the parameters. */
      readonly kind: 'irreducible';
      readonly polynomial: Polynomial;
      readonly scale: readonly ScaleRecord[];
      readonly power: number;
    };

/** A tower taken apart: every index runs from 0 in steps of 1. */
export interface Tower {
  /** Number of the written tower it stems from. */
  readonly place: number;
  readonly exponent: Rational;
  readonly indices: readonly string[];
  /** Last value of the only index of a finite tower; null where every index is endless. */
  readonly last: number | null;
  readonly degeneracy: Form;
  readonly factors: readonly TowerFactor[];
  /** Number of linear factors, counted with powers. */
  readonly order: number;
}

/** Why a tower or a spectrum has no (such) determinant, or what to know about it: an entry of the wording table. */
export interface Remark {
  readonly code: RemarkCode;
  /** Number of the tower concerned; null: the spectrum as a whole. */
  readonly place: number | null;
  readonly part: 'row' | 'eigenvalue' | 'degeneracy';
  /** A range of its own, where that is at fault. */
  readonly span: Span | null;
  readonly data: Readonly<Record<string, string>>;
}

export type RemarkCode = RefusalCode | WarningCode;

export type RefusalCode =
  | 'tower-not-polynomial'
  | 'tower-without-index'
  | 'tower-zero-eigenvalue'
  | 'tower-degree'
  | 'tower-indices'
  | 'tower-several-indices'
  | 'tower-half-plane'
  | 'tower-range-bound'
  | 'tower-range-order'
  | 'tower-range-length'
  | 'tower-power'
  | 'spectrum-too-large'
  | 'degeneracy-not-polynomial'
  | 'degeneracy-degree'
  | 'degeneracy-infinite'
  | 'degeneracy-negative'
  | 'degeneracy-not-real'
  | 'operator-periods'
  | 'spectrum-empty'
  | 'determinant-zero'
  | 'determinant-infinite'
  | 'spectrum-names-unset'
  | 'spectrum-undefined'
  | 'spectrum-too-far'
  | 'spectrum-digits'
  | 'closed-zero-mode'
  | 'closed-unknown'
  | 'closed-unconfirmed';

export type WarningCode =
  | 'zero-mode'
  | 'near-zero-mode'
  | 'negative-modes'
  | 'negative-axis'
  | 'square-root-sign'
  | 'degeneracy-fraction'
  | 'mixed-order'
  | 'scale-dependent';

export function remark(
  code: RemarkCode,
  place: number | null,
  part: Remark['part'],
  data: Readonly<Record<string, string>> = {},
  span: Span | null = null,
): Remark {
  return { code, place, part, span, data };
}
