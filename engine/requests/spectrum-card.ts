import type { FormulaForm, SpectrumBlock } from '../language/tree';
import { say } from '../language/wording';
import { type SpectrumFormula, type SpectrumPieces, spectrumPieces } from '../latex/spectrum-card';
import type { Remark } from '../spectrum/tower';
import { spectrumView } from '../spectrum/view';
import type { Analysis } from './analysis';
import type { FormulaView, SpectrumCard } from './result';

/** The card of a spectrum: towers, what pairs, what is left, closed form. */
export function spectrumCard(analysis: Analysis, block: SpectrumBlock): Omit<SpectrumCard, 'id' | 'span' | 'line'> {
  const pieces = piecesOf(analysis, block);
  const refused: FormulaView = { kind: 'refused', message: unreadableSpectrum(block.name.name) };
  if (pieces === null) {
    const formulas = { product: refused, unpaired: refused, closed: refused };
    return { kind: 'spectrum', name: block.name.name, towers: [], pairing: [], formulas, checks: [] };
  }
  const { product, unpaired, closed } = pieces.formulas;
  return {
    kind: 'spectrum',
    name: block.name.name,
    towers: pieces.towers,
    pairing: pieces.pairing,
    formulas: { product: viewOf(product), unpaired: viewOf(unpaired), closed: viewOf(closed) },
    checks: pieces.checks,
  };
}

/** The form of a spectrum's formula that goes with each form of a theory's. */
export function spectrumFormula(analysis: Analysis, name: string, form: FormulaForm | null): FormulaView {
  const block = analysis.spectra.get(name)?.block;
  const pieces = block ? piecesOf(analysis, block) : null;
  if (pieces === null) return { kind: 'refused', message: unreadableSpectrum(name) };
  const { product, unpaired, closed } = pieces.formulas;
  if (form === 'modes') return viewOf(product);
  return viewOf(form === 'unpaired' || (form === null && closed.kind === 'refused') ? unpaired : closed);
}

export function unreadableSpectrum(name: string): string {
  return `The spectrum \`${name}\` has errors; mend them first.`;
}

function piecesOf(analysis: Analysis, block: SpectrumBlock): SpectrumPieces | null {
  const entry = analysis.spectra.get(block.name.name);
  return entry?.block === block && entry.spectrum !== null ? spectrumPieces(spectrumView(entry.spectrum)) : null;
}

function viewOf(formula: SpectrumFormula): FormulaView {
  return formula.kind === 'formula' ? formula : { kind: 'refused', message: sayRemark(formula.remark) };
}

/** What a remark of the spectral engine says in words. */
export function sayRemark({ code, data }: Remark): string {
  return say({ code, data, span: { from: 0, to: 0 }, severity: 'error' });
}
