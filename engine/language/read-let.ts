import { readExpression } from './expression-form';
import { readBounds } from './read-range';
import type { Reading } from './reading';
import { TokenReader } from './token-reader';
import type { WorkPiece } from './tokens';
import type { Parameter } from './tree';

/** `let r = 1/3`, `let m = 0.2 in -2 .. 2`. A range that cannot be read is left out, a value that cannot leaves nothing. */
export function readLet(piece: WorkPiece, reading: Reading): Parameter | null {
  const reader = new TokenReader(piece.lines[0] ?? [], piece.wordSpan, reading);
  const name = reader.symbol('name-missing', 'the name of the parameter');
  if (!name || !reader.expect('=', '`=` and a value')) return null;
  const value = readExpression(reader);
  if (!value) return null;
  const ranged = reader.take('in') !== null;
  const range = ranged ? readBounds(reader) : null;
  if (range || !ranged) reader.expectEnd(ranged ? 'the end of the line' : '`in` and a range, or the end of the line');
  return { kind: 'let', span: { from: piece.from, to: piece.to }, name, value, range };
}
