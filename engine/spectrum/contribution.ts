import type { Form } from '../exact/form';
import type { Polynomial } from './polynomial';
import type { ScaleRecord } from './tower';

/** base^exponent: constants taken out of linear factors, with their regularised number. */
export interface ConstantPower {
  readonly base: Form;
  readonly exponent: Form;
}

/** One linear form or polynomial in a single index, on its way to its class. */
export interface Contribution {
  readonly place: number;
  /** Monic, in an index from 0. */
  readonly polynomial: Polynomial;
  readonly last: number | null;
  /** Times exponent and power. */
  readonly multiplicity: Polynomial;
  readonly scale: readonly ScaleRecord[];
}
