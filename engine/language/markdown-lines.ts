import type { InputStream } from '@lezer/lr';
import { END, isNewline, lineEnd, newlineLength, SPACE, skipBlanks } from './characters';

/*
 * The few line forms of CommonMark that decide where a paragraph begins and ends (CommonMark 0.31.2, sections 4.1 to
 * 4.5). Each answers for the line that starts at `offset`; 0 means no.
 */

const HASH = 0x23;
const ASTERISK = 0x2a;
const HYPHEN = 0x2d;
const EQUALS = 0x3d;
const UNDERSCORE = 0x5f;
const BACKTICK = 0x60;
const TILDE = 0x7e;

/** An indentation from here on makes indented code of a line. */
const CODE_INDENT = 4;

function indentOf(input: InputStream, offset: number): number {
  let indent = 0;
  while (indent < CODE_INDENT && input.peek(offset + indent) === SPACE) indent++;
  return indent;
}

function runOf(input: InputStream, offset: number, code: number): number {
  let length = 0;
  while (input.peek(offset + length) === code) length++;
  return length;
}

function endsLine(input: InputStream, offset: number): boolean {
  const code = input.peek(offset);
  return code === END || isNewline(code);
}

export function isBlankLine(input: InputStream, offset: number): boolean {
  return endsLine(input, skipBlanks(input, offset));
}

/** Offset of the end of an ATX heading, or 0. */
export function headingEnd(input: InputStream, offset: number): number {
  const indent = indentOf(input, offset);
  const level = indent < CODE_INDENT ? runOf(input, offset + indent, HASH) : 0;
  if (level < 1 || level > 6) return 0;
  const after = offset + indent + level;
  return skipBlanks(input, after) > after || endsLine(input, after) ? lineEnd(input, after) : 0;
}

/** Offset of the end of a thematic break, or 0. */
export function ruleEnd(input: InputStream, offset: number): number {
  const start = offset + indentOf(input, offset);
  const mark = input.peek(start);
  if (mark !== HYPHEN && mark !== ASTERISK && mark !== UNDERSCORE) return 0;
  let count = 0;
  let at = start;
  while (!endsLine(input, at)) {
    if (input.peek(at) === mark) {
      count++;
      at++;
    } else {
      const next = skipBlanks(input, at);
      if (next === at) return 0;
      at = next;
    }
  }
  return count >= 3 ? at : 0;
}

/** Offset of the end of a setext heading's underline, or 0. */
export function underlineEnd(input: InputStream, offset: number): number {
  const start = offset + indentOf(input, offset);
  const mark = input.peek(start);
  if (mark !== HYPHEN && mark !== EQUALS) return 0;
  const end = skipBlanks(input, start + runOf(input, start, mark));
  return endsLine(input, end) ? end : 0;
}

interface FenceMark {
  readonly mark: number;
  readonly length: number;
  readonly after: number;
}

function fenceMark(input: InputStream, offset: number): FenceMark | null {
  const indent = indentOf(input, offset);
  const mark = input.peek(offset + indent);
  if (indent === CODE_INDENT || (mark !== BACKTICK && mark !== TILDE)) return null;
  const length = runOf(input, offset + indent, mark);
  return length >= 3 ? { mark, length, after: offset + indent + length } : null;
}

/** Whether fenced code opens here. The info string of a backtick fence has no backtick, else it is a code span. */
export function opensFence(input: InputStream, offset: number): FenceMark | null {
  const fence = fenceMark(input, offset);
  if (fence?.mark !== BACKTICK) return fence;
  for (let at = fence.after; !endsLine(input, at); at++) if (input.peek(at) === BACKTICK) return null;
  return fence;
}

/** Offset of the end of fenced code: of its closing fence, or of the text where none closes it. 0 where none opens. */
export function fencedCodeEnd(input: InputStream, offset: number): number {
  const opening = opensFence(input, offset);
  if (!opening) return 0;
  let at = lineEnd(input, opening.after);
  for (;;) {
    const newline = newlineLength(input, at);
    if (newline === 0) return at;
    const closing = fenceMark(input, at + newline);
    at = lineEnd(input, at + newline);
    if (closing && closing.mark === opening.mark && closing.length >= opening.length) {
      if (skipBlanks(input, closing.after) === at) return at;
    }
  }
}
