import type { Tree, TreeCursor } from '@lezer/common';
import * as term from './notebook.parser.gen.terms';
import type { Span } from './tree';
import type { WorkWord } from './words';

export type TokenKind = 'number' | 'name' | 'operator' | 'comparison' | 'range' | 'bracket' | 'punctuation' | 'junk';

export interface Token extends Span {
  readonly kind: TokenKind;
  readonly text: string;
}

export type Line = readonly Token[];

/** A stretch of prose of one kind, between blank lines. */
export interface ProsePiece extends Span {
  readonly kind: 'paragraph' | 'other';
}

/** A work line with what follows it indented. Requests and parameters have one line, however it is broken. */
export interface WorkPiece extends Span {
  readonly kind: 'work';
  readonly word: WorkWord;
  readonly wordSpan: Span;
  readonly lines: readonly Line[];
}

export type Piece = ProsePiece | WorkPiece;

/** Kinds of tokens that are one node; words of the language are names that the readers recognise by themselves. */
const KIND_OF_NODE: ReadonlyMap<number, TokenKind> = new Map([
  [term.Number, 'number'],
  [term.Operator, 'operator'],
  [term.Comparison, 'comparison'],
  [term.RangeDots, 'range'],
  [term.Bracket, 'bracket'],
  [term.Comma, 'punctuation'],
  [term.Punctuation, 'punctuation'],
  [term.Junk, 'junk'],
  ...[
    term.Name,
    term.InWord,
    term.ClauseWord,
    term.QuantityWord,
    term.TheoryLineWord,
    term.GroupLineWord,
    term.OptionWord,
    term.MatterLineWord,
    term.SpectrumLineWord,
    term.TowerLineWord,
    term.TowerClauseWord,
  ].map((id) => [id, 'name'] as const),
]);

const WORD_OF_NODE: ReadonlyMap<number, WorkWord> = new Map([
  [term.Let, 'let'],
  [term.Theory, 'theory'],
  [term.Spectrum, 'spectrum'],
  [term.Formula, 'formula'],
  [term.Value, 'value'],
  [term.Plot, 'plot'],
  [term.Representation, 'representation'],
  [term.Integrate, 'integrate'],
  [term.Extremize, 'extremize'],
  [term.Compare, 'compare'],
]);

/** Nodes that hold the tokens of one indented line of a theory or a spectrum. */
const LINE_NODES: ReadonlySet<number> = new Set([
  term.TheoryLine,
  term.GroupLine,
  term.MatterLine,
  term.SpectrumLine,
  term.TowerLine,
  term.Line,
]);

/** The pieces of a notebook in order, with the tokens of its work; each is made when it is asked for. */
export function* piecesOf(tree: Tree, text: string): Generator<Piece> {
  const cursor = tree.cursor();
  if (!cursor.firstChild()) return;
  do {
    const { from, to, type } = cursor;
    const word = WORD_OF_NODE.get(type.id);
    if (word) yield workPiece(cursor, word, text);
    else if (type.id !== term.Comment) yield { kind: type.id === term.Paragraph ? 'paragraph' : 'other', from, to };
  } while (cursor.nextSibling());
}

function workPiece(cursor: TreeCursor, word: WorkWord, text: string): WorkPiece {
  const from = cursor.from;
  const wordSpan = { from, to: from + word.length };
  const first: Token[] = [];
  const lines: Token[][] = [first];
  let to = wordSpan.to;
  cursor.firstChild();
  while (cursor.nextSibling()) {
    if (LINE_NODES.has(cursor.type.id)) {
      const line: Token[] = [];
      lines.push(line);
      cursor.firstChild();
      do pushToken(line, cursor, text);
      while (cursor.nextSibling());
      cursor.parent();
    } else pushToken(first, cursor, text);
    if (cursor.type.id !== term.Comment) to = cursor.to;
  }
  cursor.parent();
  return { kind: 'work', word, wordSpan, from, to, lines };
}

function pushToken(line: Token[], cursor: TreeCursor, text: string): void {
  const { from, to } = cursor;
  const kind = KIND_OF_NODE.get(cursor.type.id);
  if (kind) line.push({ kind, text: text.slice(from, to), from, to });
  else if (cursor.type.id === term.OneLoop) {
    // One token for the editor; to the readers it is what it looks like, so that `one-loop` can be an expression.
    line.push({ kind: 'name', text: 'one', from, to: from + 3 });
    line.push({ kind: 'operator', text: '-', from: from + 3, to: from + 4 });
    line.push({ kind: 'name', text: 'loop', from: from + 4, to });
  }
}
