import type { Span } from '../../engine/language/tree';
import type { TheoryCard, TheoryRow } from '../../engine/requests/result';
import type { Change } from '../state/changes';

/** Blanks that stay between two cells when a longer one eats into the space after it. */
const GAP = 2;

/** A cell's new content; the columns after it stay where they are as far as the blanks allow. */
export function cellChange(text: string, span: Span, content: string): Change {
  const blanks = /^ +(?=[^\s])/.exec(text.slice(span.to))?.[0].length ?? 0;
  const longer = content.length - (span.to - span.from);
  const eaten = Math.max(0, Math.min(longer, blanks - GAP));
  const added = blanks > 0 ? Math.max(0, -longer) : 0;
  return { from: span.from, to: span.to + eaten, insert: content + ' '.repeat(added) };
}

/** Names for a new multiplet, in the order in which they are tried. */
const letters = ['x', 'y', 'z', 'p', 'q', 'u', 'v', 'w'];

export function freshName(taken: readonly string[]): string {
  const used = new Set(taken);
  const letter = letters.find((name) => !used.has(name));
  if (letter !== undefined) return letter;
  let number = 1;
  while (used.has(`x${number}`)) number += 1;
  return `x${number}`;
}

const isWord = (group: string | null) => group !== null && group !== 'U(1)';

/** A fundamental of the first gauge group, neutral under everything else. */
function plainCells(card: TheoryCard): readonly string[] {
  const first = card.columns.findIndex(({ role }) => role === 'gauge');
  return card.columns.map(({ role, group }, at) => {
    if (role === 'R') return '1/2';
    if (at === first) return isWord(group) ? 'fund' : '1';
    return isWord(group) ? '1' : '0';
  });
}

/** Offsets in a line at which its words begin. */
function wordStarts(line: string): readonly number[] {
  return [...line.replace(/%.*$/, '').matchAll(/\S+/g)].map((word) => word.index);
}

function lineBefore(text: string, end: number): string {
  return text.slice(text.lastIndexOf('\n', end - 1) + 1, end);
}

/** A new row under the last one, its cells under the cells or column names above. */
export function addedRow(text: string, card: TheoryCard, kind: string): Change | null {
  if (card.insertRowAt === null) return null;
  const at = card.insertRowAt;
  const startsLine = text[at - 1] === '\n';
  const starts = wordStarts(lineBefore(text, startsLine ? at - 1 : at));
  // Above is another row (kind, name, cells) or the header (`matter`, columns), which has no name.
  const cellStarts = starts.slice(card.rows.length > 0 ? 2 : 1);
  const nameStart = card.rows.length > 0 ? starts[1] : undefined;
  const name = freshName([...card.rows.map((row) => row.name), ...card.parameters]);
  let line = card.indent + kind;
  const place = (word: string, start: number | undefined) => {
    line = start !== undefined && start > line.length ? line.padEnd(start) + word : `${line}  ${word}`;
  };
  place(name, nameStart);
  plainCells(card).forEach((cell, column) => {
    place(cell, cellStarts[column]);
  });
  return { from: at, to: at, insert: startsLine ? `${line}\n` : `\n${line}` };
}

/** The row once more under itself, with a name of its own. */
export function copiedRow(text: string, card: TheoryCard, at: number): readonly Change[] | null {
  const row = card.rows[at];
  if (!row) return null;
  const { lineSpan, nameSpan } = row;
  const line = text.slice(lineSpan.from, lineSpan.to).replace(/\r?\n$/, '');
  const name = freshName([...card.rows.map((other) => other.name), ...card.parameters]);
  const inLine = { from: nameSpan.from - lineSpan.from, to: nameSpan.to - lineSpan.from };
  const change = cellChange(line, inLine, name);
  const copy = line.slice(0, change.from) + change.insert + line.slice(change.to);
  const end = lineSpan.from + line.length;
  return [{ from: end, to: end, insert: `\n${copy}` }];
}

export function removedRow(card: TheoryCard, at: number): readonly Change[] | null {
  const row = card.rows[at];
  return row ? [{ ...row.lineSpan, insert: '' }] : null;
}

/** The row changes places with its neighbour; null at the end of the table. */
export function movedRow(text: string, card: TheoryCard, at: number, by: -1 | 1): readonly Change[] | null {
  const row = card.rows[at];
  const other = card.rows[at + by];
  if (!row || !other) return null;
  const withoutBreak = ({ lineSpan }: TheoryRow) => {
    const line = text.slice(lineSpan.from, lineSpan.to).replace(/\r?\n$/, '');
    return { line, from: lineSpan.from, to: lineSpan.from + line.length };
  };
  const here = withoutBreak(row);
  const there = withoutBreak(other);
  return [
    { from: here.from, to: here.to, insert: there.line },
    { from: there.from, to: there.to, insert: here.line },
  ];
}
