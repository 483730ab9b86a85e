import { ExternalTokenizer, type InputStream } from '@lezer/lr';
import { END, isBlank, isNewline, newlineLength } from './characters';
import { headingEnd, isBlankLine, opensFence, underlineEnd } from './markdown-lines';
import { Code, Math as MathTerm, paragraphEnd, Text, Underline } from './notebook.parser.gen.terms';

const DOLLAR = 0x24;
const BACKSLASH = 0x5c;
const BACKTICK = 0x60;

/** Longest formula and code span looked for inside a paragraph, so that no paragraph costs quadratic time. */
const LONGEST_MATH = 2000;
const LONGEST_CODE = 500;

/** The inside of a paragraph: formulas, code spans, text, and the place where it ends. */
export const prose = new ExternalTokenizer(
  (input, stack) => {
    if (startsLine(input)) {
      if (stack.canShift(Underline)) {
        const underline = underlineEnd(input, 0);
        if (underline > 0) return input.acceptToken(Underline, underline);
      }
      if (stack.canShift(paragraphEnd) && interrupts(input, 0)) return input.acceptToken(paragraphEnd, 0);
    } else if (input.next === END) return input.acceptToken(paragraphEnd, 0);
    const math = input.next === DOLLAR ? mathEnd(input) : 0;
    if (math > 0) return input.acceptToken(MathTerm, math);
    const code = input.next === BACKTICK ? codeEnd(input) : 0;
    if (code > 0) return input.acceptToken(Code, code);
    input.acceptToken(Text, textEnd(input));
  },
  { contextual: true },
);

function startsLine(input: InputStream): boolean {
  return input.pos === 0 || isNewline(input.peek(-1));
}

/** A blank line ends a paragraph; a heading or a fence may follow it at once. */
function interrupts(input: InputStream, offset: number): boolean {
  return isBlankLine(input, offset) || headingEnd(input, offset) > 0 || opensFence(input, offset) !== null;
}

/** `$...$` or `$$...$$`; the next unescaped dollar must close it, else the first one is text. */
function mathEnd(input: InputStream): number {
  const width = input.peek(1) === DOLLAR ? 2 : 1;
  if (width === 1 && (isBlank(input.peek(1)) || isNewline(input.peek(1)))) return 0;
  for (let at = width; at < LONGEST_MATH; at++) {
    const code = input.peek(at);
    if (code === END) return 0;
    if (code === BACKSLASH) at++;
    else if (code === DOLLAR) return width === 1 ? at + 1 : input.peek(at + 1) === DOLLAR ? at + 2 : 0;
    else if (endsParagraphAt(input, at)) return 0;
  }
  return 0;
}

function codeEnd(input: InputStream): number {
  const width = backticks(input, 0);
  for (let at = width; at < LONGEST_CODE; ) {
    const run = backticks(input, at);
    if (run === width) return at + run;
    if (run === 0 && (input.peek(at) === END || endsParagraphAt(input, at))) return 0;
    at += Math.max(run, 1);
  }
  return 0;
}

function backticks(input: InputStream, offset: number): number {
  let length = 0;
  while (length < LONGEST_CODE && input.peek(offset + length) === BACKTICK) length++;
  return length;
}

/** Whether the line end at this offset, if it is one, is followed by a line that no longer belongs to the paragraph. */
function endsParagraphAt(input: InputStream, offset: number): boolean {
  const newline = newlineLength(input, offset);
  return newline > 0 && interrupts(input, offset + newline);
}

/** Text up to the next formula, code span, or end of the paragraph; backticks that open nothing belong to it. */
function textEnd(input: InputStream): number {
  let at = Math.max(backticks(input, 0), input.next === DOLLAR ? 1 : 0);
  for (;;) {
    const code = input.peek(at);
    if (code === END || code === DOLLAR || code === BACKTICK) return at;
    const newline = newlineLength(input, at);
    if (newline > 0) {
      at += newline;
      if (interrupts(input, at) || underlineEnd(input, at) > 0) return at;
    } else at += code === BACKSLASH && !isNewline(input.peek(at + 1)) && input.peek(at + 1) !== END ? 2 : 1;
  }
}
