import type { SpectrumBlock } from '../language/tree';
import type { Analysis } from './analysis';
import type { FormulaView, SpectrumCard } from './result';

/** The card of a spectrum block. */
export function spectrumCard(_analysis: Analysis, block: SpectrumBlock): Omit<SpectrumCard, 'id' | 'span' | 'line'> {
  const refused: FormulaView = { kind: 'refused', message: 'Spectra are read, but not computed yet.' };
  return {
    kind: 'spectrum',
    name: block.name.name,
    towers: [],
    pairing: [],
    formulas: { product: refused, unpaired: refused, closed: refused },
    checks: [],
  };
}
