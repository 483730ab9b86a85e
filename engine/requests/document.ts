import type { FormulaForm } from '../language/tree';
import { standaloneDocument } from '../latex/document';
import { isSpecial } from '../spheres/quantity';
import type { Analysis } from './analysis';
import { formProduct, formulaView } from './formula';
import { printableTheory } from './formula-request';
import { outline } from './outline';
import { unreadable } from './subject';

/** LaTeX of a theory's formula: to paste into a paper, and as a document of its own; a message where there is none. */
export type LatexOut =
  | { readonly kind: 'latex'; readonly snippet: string; readonly document: string }
  | { readonly kind: 'refused'; readonly message: string };

export function latexOut(analysis: Analysis, name: string, form: FormulaForm, notation: number): LatexOut {
  const printable = printableTheory(analysis, name, notation);
  if (printable === null) return { kind: 'refused', message: unreadable(analysis.theories.get(name), name) ?? '' };
  const view = formulaView(printable, form);
  if (view.kind === 'refused') return view;
  const special = (formProduct(printable, form)?.product ?? []).filter(isSpecial);
  const used = new Map(special.map((f) => [`${f.name}|${f.parameters.map((p) => p.key).join()}`, f]));
  const card = outline(analysis, {}).cards.find((candidate) => candidate.kind === 'theory' && candidate.name === name);
  const table =
    card?.kind === 'theory'
      ? [
          ['', ...card.columns.map(({ latex }) => latex)],
          ...card.rows.map((row) => [row.latex, ...row.cells.map((cell) => cell.latex ?? cell.text)]),
        ]
      : [];
  const document = standaloneDocument({
    title: name,
    formula: view.latex,
    pairing: view.pairing?.latex ?? null,
    table,
    notes: view.notes,
    functions: [...used.values()].map((f) => ({ name: f.name, parameters: f.parameters, notation })),
    sources: printable.sphere.sources,
  });
  return { kind: 'latex', snippet: view.latex, document };
}
