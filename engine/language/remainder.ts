import { ExternalTokenizer } from '@lezer/lr';
import { END, isNewline, lineEnd, PERCENT } from './characters';
import { Comment, Junk } from './notebook.parser.gen.terms';

/**
 * What no token of the grammar covers: comments, and characters that mean nothing in a line of work. By hand, because
 * the character sets of a grammar leave out lone surrogates.
 */
export const remainder = new ExternalTokenizer((input) => {
  const code = input.next;
  if (code === END || isNewline(code)) return;
  if (code === PERCENT) return input.acceptToken(Comment, lineEnd(input, 0));
  const next = input.peek(1);
  const pair = code >= 0xd800 && code < 0xdc00 && next >= 0xdc00 && next < 0xe000;
  input.acceptToken(Junk, pair ? 2 : 1);
});
