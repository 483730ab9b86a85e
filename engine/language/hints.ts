import { nearest } from './near-words';
import type { Reading } from './reading';
import type { Piece, ProsePiece } from './tokens';
import type { Span } from './tree';
import { SPECTRUM_LINE_WORDS, THEORY_LINE_WORDS, WORK_WORDS, type WorkWord } from './words';

/** Lines of a list or a quotation are indented for their own reasons. */
const LIST_OR_QUOTE = /^(?:[-*+>]|\d{1,9}[.)])(?:\s|$)/;

/** What follows the word on the first line of a paragraph when it was meant as work. */
const LOOKS_LIKE_WORK: Readonly<Record<WorkWord, RegExp>> = {
  let: /^\S+\s*=/,
  theory: /^\S+\s*(?:%.*)?$/,
  spectrum: /^\S+\s*(?:%.*)?$/,
  formula: /^\S+(?:\s+as\s+\w+)?\s*(?:%.*)?$/,
  value: /^(?:log\s+)?[\w-]+(?:\s+of\s+\S+\s*(?:$|%|,|at\b|by\b)|\()/,
  plot: /\bover\b.*\.\./,
  representation: /^\S+\s*:/,
  integrate: /^[\w']+\s*(?:$|%|,|at\b)/,
  extremize: /^\S+\s+over\b/,
  compare: /^\S+\s+with\b/,
};

/**
 * A hint where a paragraph looks like work: a misspelt word, a line that is not indented or should not be. `before` is
 * the piece in front of it.
 */
export function hintAt(paragraph: ProsePiece, before: Piece | null, reading: Reading): void {
  const { from, to } = paragraph;
  const follows = before?.kind === 'work' && reading.text.slice(before.to, from).split(/\r\n|\r|\n/).length <= 2;
  const hint = hintFor(reading.text.slice(from, to), from, follows ? before.word : null);
  if (hint) reading.report(hint.code, hint, hint.data, 'hint');
}

interface Hint extends Span {
  readonly code: HintCode;
  readonly data: Readonly<Record<string, string>>;
}

/** `block` is the word of the work that ends on the line before. */
function hintFor(paragraph: string, from: number, block: WorkWord | null): Hint | null {
  const line = /^[^\r\n]*/.exec(paragraph)?.[0] ?? '';
  const indent = line.length - line.trimStart().length;
  const word = /^\S+/.exec(line.slice(indent))?.[0] ?? '';
  const at = { from: from + indent, to: from + indent + word.length };
  if (indent > 0) return isWorkWord(word) ? { ...at, code: 'hint-work-indented', data: { word } } : null;
  if (word.startsWith('%')) return { ...at, code: 'hint-comment-in-prose', data: {} };
  if (block && LINE_WORDS[block]?.some((candidate) => candidate === word)) {
    return { ...at, code: 'hint-line-not-indented', data: { word, block } };
  }
  const meant = meantWord(word, line.slice(word.length, word.length + LOOK_AHEAD).trim());
  if (meant) return { ...at, code: 'hint-work-word', data: { word, meant } };
  if (LIST_OR_QUOTE.test(line) || !/[\r\n][^\S\r\n]+\S/.test(paragraph)) return null;
  return { ...at, code: 'hint-paragraph-indented', data: {} };
}

/** How much of a line is looked at; the patterns cost quadratic time. */
const LOOK_AHEAD = 200;

/** Words that begin a line of a block, where one that is not indented gives the block away. */
const LINE_WORDS: Partial<Readonly<Record<WorkWord, readonly string[]>>> = {
  theory: THEORY_LINE_WORDS,
  spectrum: SPECTRUM_LINE_WORDS,
};

type HintCode =
  | 'hint-work-indented'
  | 'hint-comment-in-prose'
  | 'hint-line-not-indented'
  | 'hint-work-word'
  | 'hint-paragraph-indented';

function isWorkWord(word: string): word is WorkWord {
  return WORK_WORDS.some((candidate) => candidate === word);
}

/**
 * The work word that was meant. Sentences begin with capitals, so a small word one edit away is taken at its letters;
 * `Let us ...` or `Values of ...` only where the line goes on as work does.
 */
function meantWord(word: string, rest: string): WorkWord | null {
  const near = nearest(word, WORK_WORDS);
  if (!near || !isWorkWord(near)) return null;
  const small = word === word.toLowerCase();
  return small || LOOKS_LIKE_WORK[near].test(rest) ? near : null;
}
