import { FormError, FormTooLargeError } from '../exact/form';
import { type Remark, remark } from './tower';

/** The result of exact work, or the remark that it is undefined (a division by zero) or beyond all bounds. */
export function guarded<T>(work: () => T, place: number | null): T | Remark {
  try {
    return work();
  } catch (error) {
    if (!(error instanceof FormError)) throw error;
    return remark(error instanceof FormTooLargeError ? 'spectrum-too-large' : 'spectrum-undefined', place, 'row');
  }
}
