import type { Rational } from '../../exact/rational';
import { decimal, rationalLatex } from './words';

/** An R-charge at the parameters' values: exact where it is rational, else in doubles. */
export type RValue = Rational | number;

export function addR(a: RValue, b: RValue): RValue {
  return typeof a === 'number' || typeof b === 'number' ? plainR(a) + plainR(b) : a.add(b);
}

export function timesR(a: RValue, factor: Rational): RValue {
  return typeof a === 'number' ? a * factor.toNumber() : a.mul(factor);
}

/** -1, 0 or 1 as the value is below, at or above a bound; doubles within 1e-9 count as equal, NaN as neither. */
export function compareR(value: RValue, bound: Rational): number {
  if (typeof value !== 'number') return value.compare(bound);
  const difference = value - bound.toNumber();
  return Math.abs(difference) < 1e-9 ? 0 : Math.sign(difference);
}

export function plainR(value: RValue): number {
  return typeof value === 'number' ? value : value.toNumber();
}

export function rLatex(value: RValue): string {
  return typeof value === 'number' ? decimal(value) : rationalLatex(value);
}
