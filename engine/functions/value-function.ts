import type { ExactParameter, Source } from './special-function';

/**
 * A special function that stands for a value and not for a factor of a product: it can be asked for by `value`, but has
 * no laws that products are simplified by.
 */
export interface ValueFunction {
  /** Numbers of arguments it takes. */
  readonly least: number;
  readonly most: number;
  /** The definition, in LaTeX. */
  readonly definition: string;
  readonly evaluate: (args: readonly ExactParameter[], bits: number) => FunctionValue;
  /** An independent second route; null where there is none for these arguments. */
  readonly crossCheck: (
    args: readonly ExactParameter[],
    bits: number,
  ) => { readonly route: string; readonly value: FunctionValue } | null;
  readonly sources: readonly Source[];
}

/**
 * The value, or its logarithm, within `error` units of 2^-bits, the errors of the arguments included; or why there is
 * none: a pole, an argument that cannot be told from one with these bits, or one outside the domain (in words).
 */
export type FunctionValue =
  | {
      readonly kind: 'value';
      readonly of: 'value' | 'logarithm';
      readonly re: bigint;
      readonly im: bigint;
      readonly error: bigint;
    }
  | { readonly kind: 'pole' }
  | { readonly kind: 'indistinct' }
  | { readonly kind: 'outside'; readonly says: string };
