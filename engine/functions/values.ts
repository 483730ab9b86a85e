import { barnesGamma } from './barnes-gamma-value';
import { dilogarithm } from './dilogarithm';
import { hurwitzZeta } from './hurwitz-zeta';
import type { ValueFunction } from './value-function';

/** The words of `value` for special functions that are no factors of products. */
export type ValueFunctionWord = 'barnesgamma' | 'dilog' | 'hurwitz';

/** Special functions that can be asked for by a word and are no factors of products. */
export const valueFunctions: Record<ValueFunctionWord, ValueFunction> = {
  barnesgamma: barnesGamma,
  dilog: dilogarithm,
  hurwitz: hurwitzZeta,
};
