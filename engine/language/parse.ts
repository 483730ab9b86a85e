import { hintAt } from './hints';
import { notebookLanguageParser } from './notebook-language-parser';
import { readLet } from './read-let';
import { readRequest } from './read-request';
import { readSpectrum } from './read-spectrum';
import { readTheory } from './read-theory';
import { Reading } from './reading';
import { reportSecondNames } from './second-names';
import { type Piece, piecesOf, type WorkPiece } from './tokens';
import type { Block, Notebook, Prose } from './tree';

/**
 * Reads a notebook. Total: every text has a tree and a list of problems, ordered by place; a block that cannot be read
 * is reported and left out, and the others do not feel it. A theory or a spectrum with bad lines is kept without them.
 * Time is linear in the length of the text.
 */
export function parseNotebook(text: string): Notebook {
  const reading = new Reading(text);
  const blocks: Block[] = [];
  let before: Piece | null = null;
  let proseFrom: number | null = null;
  let proseTo = 0;
  const endProse = (): void => {
    if (proseFrom !== null) blocks.push(proseBlock(proseFrom, proseTo, text));
    proseFrom = null;
  };
  for (const piece of piecesOf(notebookLanguageParser.parse(text), text)) {
    if (piece.kind === 'work') {
      endProse();
      const block = readWork(piece, reading);
      if (block) blocks.push(block);
    } else {
      if (piece.kind === 'paragraph') hintAt(piece, before, reading);
      proseFrom ??= piece.from;
      proseTo = piece.to;
    }
    before = piece;
  }
  endProse();
  reportSecondNames(blocks, reading);
  reading.diagnostics.sort((a, b) => a.span.from - b.span.from || a.span.to - b.span.to);
  return { blocks, diagnostics: reading.diagnostics };
}

function readWork(piece: WorkPiece, reading: Reading): Block | null {
  switch (piece.word) {
    case 'let':
      return readLet(piece, reading);
    case 'theory':
      return readTheory(piece, reading);
    case 'spectrum':
      return readSpectrum(piece, reading);
    default:
      return readRequest(piece.word, piece, reading);
  }
}

/** Prose without the line ends after it. */
function proseBlock(from: number, to: number, text: string): Prose {
  const prose = text.slice(from, to).trimEnd();
  return { kind: 'prose', span: { from, to: from + prose.length }, text: prose };
}
