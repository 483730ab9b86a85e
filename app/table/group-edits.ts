import type { TheoryCard } from '../../engine/requests/result';
import type { Change } from '../state/changes';
import { cellChange } from './row-edits';

/** Names for a new group, in the order in which they are tried. */
const letters = { gauge: ['G', 'H', 'K'], flavor: ['F', 'A', 'T'] } as const;

function freshGroup(card: TheoryCard, role: 'gauge' | 'flavor'): string {
  const used = new Set([...card.columns, ...card.rows].map(({ name }) => name).concat(card.parameters));
  const free = letters[role].find((name) => !used.has(name));
  if (free !== undefined) return free;
  let number = 1;
  while (used.has(`${letters[role][0]}${number}`)) number += 1;
  return `${letters[role][0]}${number}`;
}

/**
 * One more U(1), under which everything is neutral yet: a line for it, and a column of charges before that of R. Its group
 * and charges are then edited in place.
 */
export function addedGroup(text: string, card: TheoryCard, role: 'gauge' | 'flavor'): readonly Change[] | null {
  const at = card.insertGroupAt;
  if (at === null) return null;
  const name = freshGroup(card, role);
  const line = `${card.indent}${role.padEnd(6)}  ${name} = U(1)`;
  const changes: Change[] = [{ from: at, to: at, insert: text[at - 1] === '\n' ? `${line}\n` : `\n${line}` }];
  const column = card.columns.findIndex((candidate) => candidate.role === 'R');
  const head = card.columns[column]?.headSpan;
  if (!head) return changes;
  const width = name.length + 3;
  changes.push({ from: head.from, to: head.from, insert: name.padEnd(width) });
  for (const { cells } of card.rows) {
    const place = cells[column]?.span.from;
    if (place !== undefined) changes.push({ from: place, to: place, insert: '0'.padEnd(width) });
  }
  return changes;
}

/** Another group in the place of a column's. */
export function changedGroup(text: string, card: TheoryCard, column: number, group: string): readonly Change[] | null {
  const typed = card.columns[column]?.typed;
  return typed ? [cellChange(text, typed.span, group)] : null;
}
