import type { Form } from '../../engine/exact/form';
import { LineIndex } from '../../engine/language/lines';
import { parseNotebook } from '../../engine/language/parse';
import type { Block } from '../../engine/language/tree';

/** The problems of a text as `code line:column`, with the severity where it is no error. */
export function problemsOf(text: string): string[] {
  const lines = new LineIndex(text);
  return parseNotebook(text).diagnostics.map(({ code, span, severity }) => {
    const { line, column } = lines.place(span.from);
    return `${code} ${line}:${column}${severity === 'error' ? '' : ` ${severity}`}`;
  });
}

/** The only block of a text without problems. */
export function onlyBlock<K extends Block['kind']>(kind: K, text: string): Extract<Block, { kind: K }> {
  const { blocks, diagnostics } = parseNotebook(text);
  const [block] = blocks;
  if (diagnostics.length > 0 || blocks.length !== 1 || !block || !isKind(block, kind)) {
    throw new Error(`expected one ${kind} block: ${JSON.stringify({ kinds: blocks.map((b) => b.kind), diagnostics })}`);
  }
  return block;
}

function isKind<K extends Block['kind']>(block: Block, kind: K): block is Extract<Block, { kind: K }> {
  return block.kind === kind;
}

/** The exact value of an expression, alone on a line; warnings do not count. */
export function formOf(text: string): Form {
  const { blocks, diagnostics } = parseNotebook(`let value = ${text}`);
  const [block] = blocks;
  if (block?.kind !== 'let' || diagnostics.some(({ severity }) => severity === 'error')) {
    throw new Error(`not read: ${text}: ${JSON.stringify(diagnostics)}`);
  }
  return block.value.form;
}

/** A tree with expressions as their text, names and words as theirs, and no places: short enough to write down. */
export function outline(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(outline);
  if (typeof value !== 'object' || value === null) return value;
  if ('form' in value && 'text' in value) return value.text;
  const entries = Object.entries(value).filter(([key]) => key !== 'span');
  const [first] = entries;
  if (entries.length === 1 && first && (first[0] === 'name' || first[0] === 'text')) return outline(first[1]);
  return Object.fromEntries(entries.map(([key, entry]) => [key, outline(entry)]));
}
