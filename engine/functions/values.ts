import { barnesG } from './barnes-g';
import { barnesGamma } from './barnes-gamma-value';
import { clausen } from './clausen';
import { dilogarithm } from './dilogarithm';
import { hurwitzZeta } from './hurwitz-zeta';
import { digamma, polygamma } from './polygamma';
import { polylogarithm } from './polylogarithm';
import { qPochhammer } from './q-pochhammer';
import { riemannZeta } from './riemann-zeta';
import type { ValueFunction } from './value-function';
import { zetaDerivative } from './zeta-derivative';

/** The words of `value` for special functions that are no factors of products. */
export type ValueFunctionWord =
  | 'barnesg'
  | 'barnesgamma'
  | 'clausen'
  | 'digamma'
  | 'dilog'
  | 'hurwitz'
  | 'polygamma'
  | 'polylog'
  | 'qpochhammer'
  | 'riemannzeta'
  | 'zetaprime';

/** Special functions that can be asked for by a word and are no factors of products. */
export const valueFunctions: Record<ValueFunctionWord, ValueFunction> = {
  barnesg: barnesG,
  barnesgamma: barnesGamma,
  clausen,
  digamma,
  dilog: dilogarithm,
  hurwitz: hurwitzZeta,
  polygamma,
  polylog: polylogarithm,
  qpochhammer: qPochhammer,
  riemannzeta: riemannZeta,
  zetaprime: zetaDerivative,
};
