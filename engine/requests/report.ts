import type { PairingTable } from '../latex/mode-pairing';
import type { Analysis } from './analysis';
import { isRequest } from './analysis';
import type { Surroundings } from './answer';
import { FORMS, formulaView } from './formula';
import { printableTheory } from './formula-request';
import { problems } from './outline';
import type { Check, FormulaView, Result } from './result';
import { run } from './run';
import { spectrumCard } from './spectrum-card';
import { unreadable } from './subject';
import { theoryChecks } from './theory-card';

/** Everything the batch command prints about a notebook. */
export interface Report {
  readonly theories: readonly {
    readonly name: string;
    readonly line: number;
    readonly latex: Readonly<Record<string, string | null>>;
    /** Why a form has no LaTeX, by form; empty when all have. */
    readonly refused: Readonly<Record<string, string>>;
    readonly checks: readonly Check[];
    /** Which bosonic and fermionic modes pair, where all modes are known. */
    readonly pairing?: readonly PairingTable[];
  }[];
  readonly spectra: readonly {
    readonly name: string;
    readonly line: number;
    /** As printed, with the spins of their modes where they are those of a field on S^3. */
    readonly towers: readonly { readonly kind: string; readonly latex: string; readonly spins: string | null }[];
    readonly latex: Readonly<Record<string, string | null>>;
    readonly refused: Readonly<Record<string, string>>;
    readonly checks: readonly Check[];
  }[];
  readonly results: readonly unknown[];
  readonly problems: readonly {
    readonly line: number;
    readonly column: number;
    readonly severity: string;
    readonly message: string;
  }[];
}

/** Answers all requests of a notebook in order; `failed` says whether any could not be answered. */
export function report(analysis: Analysis, surroundings: Surroundings): { output: Report; failed: boolean } {
  const requests = analysis.notebook.blocks.filter(isRequest);
  const results = requests.map((request, k) => {
    surroundings.progress({ done: k, of: requests.length, says: request.kind });
    return run(analysis, request, surroundings);
  });
  const output: Report = {
    theories: [...analysis.theories.values()].map((entry) => {
      const { name } = entry.block.name;
      const theory = printableTheory(analysis, name, 0);
      const refusal: FormulaView = { kind: 'refused', message: unreadable(entry, name) ?? '' };
      const views = FORMS.map((form) => [form, theory === null ? refusal : formulaView(theory, form)] as const);
      const { line } = analysis.lines.place(entry.block.span.from);
      return { name, line, ...latexOf(views), checks: theoryChecks(entry), ...pairingOf(views) };
    }),
    spectra: [...analysis.spectra.values()].map(({ block }) => {
      const card = spectrumCard(analysis, block);
      const views = Object.entries(card.formulas);
      const { line } = analysis.lines.place(block.span.from);
      const towers = card.towers.map(({ kind, latex, spins }) => ({ kind, latex, spins }));
      return { name: block.name.name, line, towers, ...latexOf(views), checks: card.checks };
    }),
    results: results.map(printable),
    problems: problems(analysis).map(({ line, column, severity, message }) => ({ line, column, severity, message })),
  };
  return { output, failed: results.some(({ kind }) => kind === 'failure') };
}

function latexOf(views: readonly (readonly [string, FormulaView])[]): {
  latex: Record<string, string | null>;
  refused: Record<string, string>;
} {
  const latex = views.map(([form, view]) => [form, view.kind === 'formula' ? view.latex : null] as const);
  const refused = views.flatMap(([form, view]) => (view.kind === 'refused' ? [[form, view.message] as const] : []));
  return { latex: Object.fromEntries(latex), refused: Object.fromEntries(refused) };
}

function pairingOf(views: readonly (readonly [string, FormulaView])[]): { pairing?: readonly PairingTable[] } {
  for (const [, view] of views) {
    if (view.kind === 'formula' && view.pairing !== undefined) return { pairing: view.pairing.tables };
  }
  return {};
}

/** A result without the tag that only the page needs; notes only where there are some. */
function printable({ kind: _kind, notes, ...rest }: Result): object {
  return notes.length === 0 ? rest : { ...rest, notes };
}
