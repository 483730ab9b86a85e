import type { Span } from '../../engine/language/tree';

/** A stretch of text replaced by another; offsets are those of the text before any change of the same list. */
export interface Change {
  readonly from: number;
  readonly to: number;
  readonly insert: string;
}

function inOrder(changes: readonly Change[]): readonly Change[] {
  return [...changes].sort((left, right) => left.from - right.from || left.to - right.to);
}

export function applyChanges(text: string, changes: readonly Change[]): string {
  let result = '';
  let at = 0;
  for (const change of inOrder(changes)) {
    result += text.slice(at, change.from) + change.insert;
    at = change.to;
  }
  return result + text.slice(at);
}

/** The one change that leads from a text to another, as short as a common beginning and end allow. */
export function changeBetween(before: string, after: string): Change | null {
  if (before === after) return null;
  const shorter = Math.min(before.length, after.length);
  let head = 0;
  while (head < shorter && before[head] === after[head]) head += 1;
  let tail = 0;
  while (tail < shorter - head && before[before.length - 1 - tail] === after[after.length - 1 - tail]) tail += 1;
  return { from: head, to: before.length - tail, insert: after.slice(head, after.length - tail) };
}

/** Where an offset lands after the changes; what is inserted right at it comes after it. */
export function mapOffset(offset: number, changes: readonly Change[]): number {
  let shift = 0;
  for (const change of inOrder(changes)) {
    if (change.from >= offset) break;
    if (change.to > offset) return change.from + shift + change.insert.length;
    shift += change.insert.length - (change.to - change.from);
  }
  return offset + shift;
}

/** A span after the changes; null when one of them reaches into it, since it then means something else. */
export function mapSpan(span: Span, changes: readonly Change[]): Span | null {
  let shift = 0;
  for (const change of inOrder(changes)) {
    if (change.from >= span.to) break;
    if (change.to > span.from) return null;
    shift += change.insert.length - (change.to - change.from);
  }
  return { from: span.from + shift, to: span.to + shift };
}
