import { FormError } from '../exact/form';
import type { FormulaRequest } from '../language/tree';
import { type ElementaryProduct, elementary, isOpen, quantity } from '../spheres/quantity';
import type { Analysis } from './analysis';
import { type Answer, failure } from './answer';
import { fixedValues } from './fixed-values';
import { formulaView, type Printable } from './formula';
import type { FormulaResult } from './result';
import { spectrumFormula } from './spectrum-card';
import { unreadable } from './subject';

/** `formula ...`: one form of a formula, as a card of its own. */
export function runFormula(analysis: Analysis, request: FormulaRequest): Answer {
  const name = request.subject.name;
  const entry = analysis.theories.get(name);
  if (!entry && analysis.spectra.has(name)) {
    const formula = spectrumFormula(analysis, name, request.form);
    return { kind: 'formula', of: name, notes: [], formula } satisfies Answer<FormulaResult>;
  }
  const printable = printableTheory(analysis, name, 0);
  if (printable === null) return failure(name, unreadable(entry, name) ?? '');
  const form = request.form ?? preferredForm(printable);
  return {
    kind: 'formula',
    of: name,
    notes: [],
    formula: formulaView(printable, form),
  } satisfies Answer<FormulaResult>;
}

/** Elementary where nothing else but constants is left, else special functions. */
export function preferredForm(printable: Printable): 'elementary' | 'functions' {
  try {
    return printable.elementary().product.some(isOpen) ? 'functions' : 'elementary';
  } catch (error) {
    if (!(error instanceof FormError)) throw error;
    return 'functions';
  }
}

/** A theory of the notebook with what printing needs; null when it cannot be read. */
export function printableTheory(analysis: Analysis, name: string, notation: number): Printable | null {
  const entry = analysis.theories.get(name);
  if (!entry?.sphere || !entry.built?.theory) return null;
  const fixed = fixedValues(analysis, entry);
  const { sphere } = entry;
  const { theory } = entry.built;
  const oneLoop = quantity(sphere, theory, 'one-loop') ?? [];
  let known: ElementaryProduct | null = null;
  const reduced = (): ElementaryProduct => {
    known ??= elementary(sphere, theory, oneLoop, fixed);
    return known;
  };
  return { sphere, theory, notation, oneLoop, elementary: reduced, printed: new Map() };
}
