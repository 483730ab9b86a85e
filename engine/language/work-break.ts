import { ExternalTokenizer } from '@lezer/lr';
import { END, newlineLength, skipBlanks } from './characters';
import { blockEnd, lineBreak } from './notebook.parser.gen.terms';

/**
 * The end of a line of work. An indented line goes on with the block, blank lines between or not; anything at column 0,
 * or the end of the text, ends it.
 */
export const workBreak = new ExternalTokenizer((input) => {
  const first = newlineLength(input, 0);
  if (first === 0) {
    if (input.next === END) input.acceptToken(blockEnd, 0);
    return;
  }
  for (let start = first; ; ) {
    const content = skipBlanks(input, start);
    const newline = newlineLength(input, content);
    if (newline === 0) {
      const indented = content > start && input.peek(content) !== END;
      return indented ? input.acceptToken(lineBreak, content) : input.acceptToken(blockEnd, first);
    }
    start = content + newline;
  }
});
