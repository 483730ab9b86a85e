import { ExternalTokenizer, type InputStream } from '@lezer/lr';
import { BYTE_ORDER_MARK, END, isBlank, isNewline, newlineLength, PERCENT, skipBlanks } from './characters';
import { fencedCodeEnd, headingEnd, ruleEnd } from './markdown-lines';
import {
  blankLines,
  CompareWord,
  ExtremizeWord,
  FencedCode,
  FormulaWord,
  Heading,
  IntegrateWord,
  LetWord,
  PlotWord,
  paragraphStart,
  RepresentationWord,
  Rule,
  SpectrumWord,
  TheoryWord,
  ValueWord,
} from './notebook.parser.gen.terms';
import { WORK_WORDS, type WorkWord } from './words';

const TERM_OF_WORD: Readonly<Record<WorkWord, number>> = {
  let: LetWord,
  theory: TheoryWord,
  spectrum: SpectrumWord,
  formula: FormulaWord,
  value: ValueWord,
  plot: PlotWord,
  representation: RepresentationWord,
  integrate: IntegrateWord,
  extremize: ExtremizeWord,
  compare: CompareWord,
};

const TERMS: ReadonlyMap<string, number> = new Map(WORK_WORDS.map((word) => [word, TERM_OF_WORD[word]]));

const LONGEST_WORD = Math.max(...WORK_WORDS.map((word) => word.length));

/** Decides, between blocks, what the line that begins here is. Prose is what is left over. */
export const lineStart = new ExternalTokenizer((input) => {
  if (input.next === END) return;
  const blank = blankLinesEnd(input);
  if (blank > 0) return input.acceptToken(blankLines, blank);
  const word = workWord(input);
  if (word) return input.acceptToken(word.term, word.length);
  for (const [term, end] of [
    [Heading, headingEnd],
    [Rule, ruleEnd],
    [FencedCode, fencedCodeEnd],
  ] as const) {
    const offset = end(input, 0);
    if (offset > 0) return input.acceptToken(term, offset);
  }
  input.acceptToken(paragraphStart, 0);
});

/** Length of the rest of a line end and of all blank lines from here; a byte order mark counts as one. */
function blankLinesEnd(input: InputStream): number {
  if (input.pos === 0 && input.next === BYTE_ORDER_MARK) return 1;
  let end = 0;
  for (;;) {
    const at = skipBlanks(input, end);
    const newline = newlineLength(input, at);
    if (newline > 0) end = at + newline;
    else return input.peek(at) === END ? at : end;
  }
}

function workWord(input: InputStream): { readonly term: number; readonly length: number } | null {
  let word = '';
  for (let length = 0; length <= LONGEST_WORD; length++) {
    const code = input.peek(length);
    if (code >= 0x61 && code <= 0x7a) {
      word += String.fromCharCode(code);
      continue;
    }
    const term = code === END || isNewline(code) || isBlank(code) || code === PERCENT ? TERMS.get(word) : undefined;
    return term === undefined ? null : { term, length };
  }
  return null;
}
