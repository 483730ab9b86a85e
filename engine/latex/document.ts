import type { Form } from '../exact/form';
import type { FunctionName, Source } from '../functions/special-function';
import { functions } from '../functions/table';
import { printer } from './product';
import { escapeText } from './symbol';

/** What a standalone document is made of. */
export interface DocumentParts {
  readonly title: string;
  /** The formula as one display without delimiters. */
  readonly formula: string;
  /** Tables of pairs of modes as one array without delimiters; null where there is none. */
  readonly pairing: string | null;
  /** Matter content as rows of LaTeX cells, first row the header. */
  readonly table: readonly (readonly string[])[];
  /** Remarks, with $...$ in them. */
  readonly notes: readonly string[];
  /** Special functions that occur, with their parameters and the index of the notation used. */
  readonly functions: readonly {
    readonly name: FunctionName;
    readonly parameters: readonly Form[];
    readonly notation: number;
  }[];
  readonly sources: readonly Source[];
}

/** A document that compiles with amsmath alone: formula, matter content, definitions, conventions, sources. */
export function standaloneDocument(parts: DocumentParts): string {
  const definitions = parts.functions.flatMap(({ name, parameters, notation }) => {
    const declared = functions[name].notations[notation] ?? functions[name].notations[0];
    return declared ? [declared.definition(parameters, printer)] : [];
  });
  const sources = collectSources(parts);
  const sections = [
    tableText(parts.table),
    `\\begin{equation*}\n${parts.formula}\n\\end{equation*}`,
    // Ten columns: small print keeps them on the page.
    parts.pairing === null
      ? ''
      : `Pairs of modes:\n{\\scriptsize\\setlength{\\arraycolsep}{2pt}\n\\begin{equation*}\n${parts.pairing}\n\\end{equation*}}`,
    definitions.length === 0
      ? ''
      : `Definitions:\n${definitions.map((d) => `\\begin{equation*}\n${d}\n\\end{equation*}`).join('\n')}`,
    parts.notes.length === 0
      ? ''
      : `Conventions:\n\\begin{itemize}\n${parts.notes.map((n) => `\\item ${n}`).join('\n')}\n\\end{itemize}`,
    sources.length === 0
      ? ''
      : `\\begin{thebibliography}{99}\n${sources.map(({ key, text }) => `\\bibitem{${key}} ${escapeText(text)}`).join('\n')}\n\\end{thebibliography}`,
  ];
  return [
    '\\documentclass{article}',
    '\\usepackage{amsmath}',
    `\\title{${escapeText(parts.title)}}`,
    '\\date{}',
    '\\begin{document}',
    '\\maketitle',
    ...sections.filter((section) => section !== ''),
    '\\end{document}',
    '',
  ].join('\n');
}

function collectSources(parts: DocumentParts): Source[] {
  const found = new Map<string, Source>();
  for (const source of [...parts.sources, ...parts.functions.flatMap(({ name }) => functions[name].sources)]) {
    found.set(source.key, source);
  }
  return [...found.values()];
}

function tableText(table: DocumentParts['table']): string {
  const [header, ...rows] = table;
  if (!header || rows.length === 0) return '';
  // `$$` would begin a display.
  const cellText = (cell: string): string => (cell === '' ? '' : `$${cell}$`);
  const line = (cells: readonly string[]): string => `${cells.map(cellText).join(' & ')} \\\\`;
  return [
    '\\begin{center}',
    `\\begin{tabular}{${'l'.repeat(header.length)}}`,
    '\\hline',
    line(header),
    '\\hline',
    ...rows.map(line),
    '\\hline',
    '\\end{tabular}',
    '\\end{center}',
  ].join('\n');
}
