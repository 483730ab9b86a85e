import type { FormulaForm } from '../../engine/language/tree';
import type { OutlineOptions } from '../../workers/types';
import { createStore, type Store } from './store';

export type SpectrumForm = 'product' | 'unpaired' | 'closed';

/** How a notebook is looked at; kept beside its text, absent entries mean the first choice. */
export interface View extends OutlineOptions {
  readonly forms: Readonly<Record<string, FormulaForm>>;
  readonly spectrumForms: Readonly<Record<string, SpectrumForm>>;
}

export const plainView: View = { notation: {}, forms: {}, spectrumForms: {} };

const formulaForms: readonly FormulaForm[] = ['modes', 'unpaired', 'functions', 'elementary'];
const spectrumForms: readonly SpectrumForm[] = ['product', 'unpaired', 'closed'];

function entriesWhere<Value>(from: unknown, holds: (value: unknown) => value is Value): Record<string, Value> {
  if (typeof from !== 'object' || from === null) return {};
  const found: Record<string, Value> = {};
  for (const [key, value] of Object.entries(from)) if (holds(value)) found[key] = value;
  return found;
}

/** A view as stored, by any version: what is not understood is left out. */
export function readView(stored: unknown): View {
  if (typeof stored !== 'object' || stored === null) return plainView;
  return {
    notation: entriesWhere(
      'notation' in stored ? stored.notation : null,
      (value): value is number => typeof value === 'number' && Number.isInteger(value) && value >= 0,
    ),
    forms: entriesWhere('forms' in stored ? stored.forms : null, (value): value is FormulaForm =>
      formulaForms.some((form) => form === value),
    ),
    spectrumForms: entriesWhere(
      'spectrumForms' in stored ? stored.spectrumForms : null,
      (value): value is SpectrumForm => spectrumForms.some((form) => form === value),
    ),
  };
}

export const createView = (): Store<View> => createStore(plainView);
