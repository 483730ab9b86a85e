import { isRemark } from './analyse';
import { type ClosedCheck, checkClosed } from './closed-check';
import type { ClosedForm } from './closed-form';
import { type ExactNumbers, exactNumbers } from './exact-numbers';
import { guarded } from './guard';
import { inspectTowers } from './inspect';
import type { Pairing } from './pairing';
import { noValues, openNames, type Prepared, prepare, substituteTowers } from './prepare';
import { isRefusal } from './read';
import { recognise } from './recognise';
import { type Remark, remark, type Spectrum } from './tower';
import { zeroModes } from './zero-modes';

/** Everything about a spectrum that is known without digits, its parameters left as symbols. */
export interface SpectrumView {
  readonly spectrum: Spectrum;
  readonly prepared: Prepared | Remark;
  readonly numbers: {
    readonly factors: ExactNumbers;
    /** Null where the operator prescription is not defined. */
    readonly operator: ExactNumbers | null;
  } | null;
  readonly closed: { readonly form: ClosedForm; readonly check: ClosedCheck } | Remark;
  /** The pairing at the notebook's values, where further classes meet there; else null. */
  readonly merged: Pairing | null;
}

export function spectrumView(spectrum: Spectrum): SpectrumView {
  const symbolic = substituteTowers(spectrum, noValues, false);
  const prepared = guarded(() => prepare(symbolic), null);
  if (isRemark(prepared)) return { spectrum, prepared, numbers: null, closed: prepared, merged: null };
  const numbers = guarded(() => bothNumbers(prepared), null);
  return {
    spectrum,
    prepared,
    numbers: isRemark(numbers) ? null : numbers,
    closed: guarded(() => closedForm(spectrum, prepared, openNames(symbolic)), null),
    merged: mergedPairing(spectrum, prepared.pairing),
  };
}

function bothNumbers({ towers }: Prepared): SpectrumView['numbers'] & object {
  const factors = exactNumbers(towers, 'factors');
  // By factors the numbers exist for every spectrum.
  return { factors: factors as ExactNumbers, operator: exactNumbers(towers, 'operator') };
}

function closedForm(
  spectrum: Spectrum,
  { towers, pairing }: Prepared,
  names: readonly string[],
): SpectrumView['closed'] {
  const refusal = inspectTowers(towers, null).find(isRefusal);
  if (refusal) return refusal;
  if (zeroModes(pairing).length > 0) return remark('closed-zero-mode', null, 'row');
  const form = recognise(pairing);
  if (form === null) return remark('closed-unknown', null, 'row');
  const check = checkClosed(pairing, form, names, spectrum.parameters);
  return check === null ? remark('closed-unconfirmed', null, 'row') : { form, check };
}

function mergedPairing(spectrum: Spectrum, pairing: Pairing): Pairing | null {
  if (spectrum.parameters.size === 0) return null;
  const at = guarded(() => prepare(substituteTowers(spectrum, noValues, true)), null);
  if (isRemark(at) || openClasses(at.pairing) >= openClasses(pairing)) return null;
  return at.pairing;
}

function openClasses({ classes, several }: Pairing): number {
  return classes.filter(({ left }) => left.length > 0).length + several.filter(({ left }) => left.length > 0).length;
}
