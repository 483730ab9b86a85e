import { memoiseByKey } from './kernel-memo';
import type { ExactParameter } from './special-function';

const shared = memoiseByKey<ExactParameter>(64);

/** Further bits in which equal parameters must agree, beyond those of a result. */
const BEYOND = 256;

/**
 * One object for equal real parameters, so that the tables remembered for the object are found again. Parameters with
 * a rational square are equal when squares and signs are; others when they agree in all bits that a result may depend on.
 */
export function sharedParameter(parameter: ExactParameter, bits: number): ExactParameter {
  const { square, approx } = parameter;
  if (approx.im !== 0) return parameter;
  const key = square !== null ? `${square}|${approx.re > 0}` : `${bits}|${parameter.value(bits + BEYOND).re}`;
  return shared(key, () => parameter);
}
