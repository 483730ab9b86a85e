import { FormError } from '../exact/form';
import { functions } from '../functions/table';
import type { FormulaForm, MultipletRow, Name, Span, TheoryBlock } from '../language/tree';
import { formLatex } from '../latex/form';
import { printer } from '../latex/product';
import { representationLatex } from '../latex/representation';
import { symbolLatex } from '../latex/symbol';
import type { Sphere } from '../spheres/sphere';
import { wallOrder } from '../spheres/wall-order';
import type { ReadRow } from '../theory/build';
import type { Condition, Finding } from '../theory/checks/condition';
import type { Theory, TheoryGroup } from '../theory/theory';
import type { Analysis, TheoryEntry } from './analysis';
import { FORMS, formulaView, type Printable } from './formula';
import { preferredForm, printableTheory } from './formula-request';
import type { Check, FormulaView, TheoryCard, TheoryColumn, TheoryRow } from './result';
import { unreadable } from './subject';

/** The card of a theory: charge table, checks, formulas. */
export function theoryCard(
  analysis: Analysis,
  block: TheoryBlock,
  notation: number,
): Omit<TheoryCard, 'id' | 'span' | 'line'> {
  const entry = analysis.theories.get(block.name.name);
  const own = entry?.block === block ? entry : undefined;
  const groups = own?.built?.groups ?? [];
  const rows = own?.built?.rows ?? [];
  const theory = own?.built?.theory ?? null;
  const sphere = own?.sphere ?? null;
  const printable = own ? printableTheory(analysis, block.name.name, notation) : null;
  return {
    kind: 'theory',
    name: block.name.name,
    nameSpan: block.name.span,
    sphereLatex: theory && sphere ? caption(sphere, own) : (block.sphere?.sphere.name ?? ''),
    supersymmetry: `N = ${block.supersymmetry?.value ?? sphere?.minimalSupersymmetry ?? 2}`,
    columns: (block.header?.columns ?? []).map((head) => column(head, block, groups)),
    rows: block.multiplets.map((row) =>
      tableRow(
        analysis.text,
        row,
        rows.find((read) => read.row === row),
      ),
    ),
    multipletKinds: sphere?.multiplets ?? [],
    insertRowAt: lineAfter(analysis.text, block.multiplets.at(-1) ?? block.header),
    insertGroupAt: lineAfter(analysis.text, block.groups.at(-1) ?? block.sphere),
    indent: indentOf(analysis.text, block),
    checks: theory && sphere ? checks(own) : [],
    formulas: formulas(printable, own ? unreadable(own, block.name.name) : SAME_NAME),
    preferredForm: printable === null ? 'functions' : preferredForm(printable),
    notations: notationLabels(own),
    parameters: theory ? [...analysis.parameters.keys()].filter((name) => mentions(theory, name)) : [],
  };
}

function caption(sphere: Sphere, entry: TheoryEntry | undefined): string {
  const theory = entry?.built?.theory;
  if (!theory) return '';
  const squashing = sphere.squashing
    .filter(({ round, symbol }) => !(theory.geometry.get(symbol) ?? round).equals(round))
    .map(({ symbol, round }) => `${symbolLatex(symbol)}=${formLatex(theory.geometry.get(symbol) ?? round)}`);
  return [sphere.latex(theory), ...squashing].join(',\\ ');
}

function column({ name, span }: Name, block: TheoryBlock, groups: readonly TheoryGroup[]): TheoryColumn {
  const line = block.groups.find((candidate) => candidate.name.name === name);
  const typed = line ? { text: line.group.text, span: line.group.span } : null;
  const place = { name, headSpan: span, typed };
  if (name === 'R') return { ...place, latex: 'R', role: 'R', group: null };
  const group = groups.find((candidate) => candidate.name === name);
  if (!group) return { ...place, latex: symbolLatex(name), role: 'flavor', group: null };
  const levels = [group.level, group.abelianLevel].filter((level) => level !== null).map(formLatex);
  const subscript = levels.length === 0 ? '' : `_{${levels.join(',')}}`;
  const { latex, name: full, quotient } = group.group;
  const base = quotient !== null && subscript !== '' ? `\\left(${latex}\\right)` : latex;
  return { ...place, latex: base + subscript, role: group.role, group: full };
}

function tableRow(text: string, row: MultipletRow, read: ReadRow | undefined): TheoryRow {
  return {
    kind: row.kind,
    name: row.name.name,
    latex: symbolLatex(row.name.name),
    span: row.span,
    lineSpan: wholeLine(text, row.span),
    nameSpan: row.name.span,
    cells: row.cells.map((cell, k) => ({ text: cell.text, span: cell.span, latex: cellLatex(read?.cells[k] ?? null) })),
  };
}

function cellLatex(cell: ReadRow['cells'][number]): string | null {
  if (cell === null) return null;
  return cell.kind === 'R' ? formLatex(cell.form) : representationLatex(cell.representation);
}

/** From the start of the line to behind its line break. */
function wholeLine(text: string, span: Span): Span {
  let { from, to } = span;
  while (from > 0 && text[from - 1] !== '\n' && text[from - 1] !== '\r') from--;
  while (to < text.length && text[to] !== '\n' && text[to] !== '\r') to++;
  if (text[to] === '\r' && text[to + 1] === '\n') to += 2;
  else if (to < text.length) to++;
  return { from, to };
}

function lineAfter(text: string, part: { readonly span: Span } | null | undefined): number | null {
  return part ? wholeLine(text, part.span).to : null;
}

function indentOf(text: string, block: TheoryBlock): string {
  const line = block.header ?? block.groups[0] ?? block.sphere;
  if (!line) return '  ';
  const { from } = wholeLine(text, line.span);
  return /^[ \t]+/.exec(text.slice(from, line.span.from + 1))?.[0] ?? '  ';
}

function checks(entry: TheoryEntry | undefined): Check[] {
  const theory = entry?.built?.theory;
  if (!theory || !entry?.sphere) return [];
  return [...entry.sphere.conditions, wallOrder(entry.sphere)].flatMap((condition) =>
    examine(condition, theory).map(({ verdict, says, formula, source, detail }) => ({
      id: detail === undefined ? condition.id : `${condition.id}:${detail}`,
      verdict,
      says,
      formula,
      source,
    })),
  );
}

/** A condition whose expressions are undefined at the present values is unknown, and says so. */
function examine(condition: Condition, theory: Theory): readonly Finding[] {
  try {
    return condition.examine(theory, printer);
  } catch (error) {
    if (!(error instanceof FormError)) throw error;
    return [{ verdict: 'unknown', says: `${condition.title}: ${error.message}`, formula: '', source: '' }];
  }
}

/** All checks of a theory, for the batch output too. */
export { checks as theoryChecks };

const SAME_NAME = 'Another theory above has the same name; rename one of them.';

function formulas(printable: Printable | null, why: string | null): Record<FormulaForm, FormulaView> {
  const view = (form: FormulaForm): FormulaView =>
    printable === null ? { kind: 'refused', message: why ?? '' } : formulaView(printable, form);
  const [modes, unpaired, special, elementary] = FORMS.map(view) as [
    FormulaView,
    FormulaView,
    FormulaView,
    FormulaView,
  ];
  return { modes, unpaired, functions: special, elementary };
}

/** Notations of the special function that this sphere's formulas are written in. */
function notationLabels(entry: TheoryEntry | undefined): string[] {
  const theory = entry?.built?.theory;
  if (!theory || !entry?.sphere) return [];
  return functions[entry.sphere.specialFunction].notations.map(({ label }) => label);
}

function mentions(theory: NonNullable<TheoryEntry['built']>['theory'], name: string): boolean {
  if (theory === null) return false;
  const forms = [
    ...theory.multiplets.map(({ rCharge }) => rCharge),
    ...theory.groups.flatMap(({ level, abelianLevel, fi, theta, coupling }) => [
      level,
      abelianLevel,
      fi,
      theta,
      coupling,
    ]),
  ];
  return forms.some((form) => form?.symbols().includes(name) ?? false);
}
