import type { Assignment, Block, Diagnostic, Quantity, Request } from '../language/tree';
import { say } from '../language/wording';
import { formLatex } from '../latex/form';
import { symbolLatex } from '../latex/symbol';
import { type Analysis, isRequest, realNumber, subjects } from './analysis';
import { requestKey, requestText } from './request-text';
import type { Card, Outline, ParameterCard, Problem, RequestCard } from './result';
import { spectrumCard } from './spectrum-card';
import { askedText } from './subject';
import { theoryCard } from './theory-card';

/** The notebook as cards in the order of the text. `notation` gives the notation chosen for a theory, by its name. */
export function outline(analysis: Analysis, notation: Readonly<Record<string, number>>): Outline {
  const counts = new Map<string, number>();
  const identify = (kind: string, name: string): string => {
    const stem = `${kind}:${name}`;
    const count = (counts.get(stem) ?? 0) + 1;
    counts.set(stem, count);
    return `${stem}:${count}`;
  };
  const cards = analysis.notebook.blocks.map((block) => card(analysis, block, notation, identify));
  return { title: titleOf(analysis), cards, problems: problems(analysis) };
}

/** The first heading, without its marks. */
function titleOf(analysis: Analysis): string {
  for (const block of analysis.notebook.blocks) {
    if (block.kind !== 'prose') continue;
    const heading = /^ {0,3}#{1,6}[ \t]+(.+?)[ \t]*#*$/m.exec(block.text);
    if (heading?.[1]) return heading[1];
  }
  return '';
}

/** All problems with their places and sentences, in the order of the text. */
export function problems(analysis: Analysis): Problem[] {
  return [...analysis.diagnostics]
    .sort((a, b) => a.span.from - b.span.from)
    .map((diagnostic: Diagnostic) => ({
      span: diagnostic.span,
      ...analysis.lines.place(diagnostic.span.from),
      severity: diagnostic.severity,
      message: say(diagnostic),
    }));
}

function card(
  analysis: Analysis,
  block: Block,
  notation: Readonly<Record<string, number>>,
  identify: (kind: string, name: string) => string,
): Card {
  const { line } = analysis.lines.place(block.span.from);
  const base = { span: block.span, line };
  if (isRequest(block)) return { ...base, id: identify(block.kind, ''), ...requestCard(analysis, block) };
  switch (block.kind) {
    case 'prose':
      return { ...base, id: identify('prose', ''), kind: 'prose', text: block.text };
    case 'let':
      return { ...base, id: identify('let', block.name.name), ...parameterCard(analysis, block.name.name, block) };
    case 'theory': {
      const id = identify('theory', block.name.name);
      return { ...base, id, ...theoryCard(analysis, block, notation[block.name.name] ?? 0) };
    }
    case 'spectrum':
      return { ...base, id: identify('spectrum', block.name.name), ...spectrumCard(analysis, block) };
  }
}

type WithoutBase<C> = Omit<C, 'id' | 'span' | 'line'>;

function parameterCard(
  analysis: Analysis,
  name: string,
  block: Extract<Block, { kind: 'let' }>,
): WithoutBase<ParameterCard> {
  const entry = analysis.parameters.get(name);
  return {
    kind: 'let',
    name,
    latex: `${symbolLatex(name)}=${formLatex(block.value.form)}`,
    valueText: block.value.text,
    valueSpan: block.value.span,
    value: realNumber(entry?.value ?? null),
    range: entry?.range ?? null,
  };
}

function requestCard(analysis: Analysis, request: Request): WithoutBase<RequestCard> {
  const ranged = [...analysis.parameters].filter(([, { range }]) => range !== null).map(([name]) => name);
  const used = usedNames(analysis, request);
  return {
    kind: 'request',
    request: request.kind,
    caption: caption(request),
    conditions: conditions(request),
    text: requestText(analysis.text, request.span),
    key: requestKey(analysis, request),
    parameters: ranged.filter((name) => used.has(name)),
  };
}

function caption(request: Request): string {
  switch (request.kind) {
    case 'formula':
      return `formula of ${request.subject.name}${request.form ? `, ${request.form}` : ''}`;
    case 'value':
      return quantityText(request.quantity);
    case 'plot':
      return request.curves
        .map(({ part, quantity }) => `${part ? `${part} ` : ''}${quantityText(quantity)}`)
        .join(', ');
    case 'representation':
      return `${request.group.text}: ${request.representation.text}`;
    case 'integrate':
    case 'extremize':
      return `${request.kind} ${request.theory.name}`;
    case 'compare':
      return `${request.theories[0].name} with ${request.theories[1].name}`;
  }
}

function quantityText(quantity: Quantity): string {
  const log = quantity.log ? 'log ' : '';
  switch (quantity.kind) {
    case 'theory':
      return `${log}${askedText(quantity)} of ${quantity.theory.name}`;
    case 'determinant':
      return `${log}determinant of ${quantity.spectrum.name} by ${quantity.prescription}`;
    case 'function':
      return `${log}${quantity.function.name}(${quantity.arguments.map(({ text }) => text).join(', ')})`;
  }
}

/** What the request is asked at and over, LaTeX. */
function conditions(request: Request): string {
  const at = 'at' in request ? request.at.map(assignmentLatex) : [];
  const over =
    request.kind === 'plot' || request.kind === 'compare'
      ? request.over.map(
          ({ name, from, to }) => `${formLatex(from.form)}\\le ${symbolLatex(name.name)}\\le ${formLatex(to.form)}`,
        )
      : [];
  return [...over, ...at].join(',\\ ');
}

function assignmentLatex({ name, value }: Assignment): string {
  return `${symbolLatex(name.name)}=${formLatex(value.form)}`;
}

/** Parameters that an answer depends on, through the request, the theories it names, and other parameters. */
function usedNames(analysis: Analysis, request: Request): ReadonlySet<string> {
  const names = new Set<string>();
  const add = (more: readonly string[]): void => {
    for (const name of more) {
      if (names.has(name)) continue;
      names.add(name);
      const parameter = analysis.parameters.get(name);
      if (parameter) add(parameter.block.value.names.map((inner) => inner.name));
    }
  };
  for (const { name } of subjects(request)) {
    const block = analysis.theories.get(name)?.block ?? analysis.spectra.get(name)?.block;
    if (block) add(wordsOf(requestText(analysis.text, block.span)));
  }
  add(wordsOf(requestText(analysis.text, request.span)));
  return names;
}

/** Names that occur in a stretch of text, Greek letters aside: more than are used does no harm but a spare slider. */
function wordsOf(text: string): string[] {
  return text.match(/\p{L}[\p{L}\p{N}_']*/gu) ?? [];
}
