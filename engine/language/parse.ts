import { hintsFor } from './hints';
import { parser } from './notebook.parser.gen';
import { Problems } from './problems';
import { readLet } from './read-let';
import { readRequest } from './read-request';
import { readSpectrum } from './read-spectrum';
import { readTheory } from './read-theory';
import { reportSecondNames } from './second-names';
import { piecesOf, type WorkPiece } from './tokens';
import type { Block, Notebook, Prose } from './tree';

/**
 * Reads a notebook. Total: every text has a tree and a list of problems, ordered by place; a block that cannot be read
 * is reported and left out, and the others do not feel it. A theory or a spectrum with bad lines is kept without them.
 * Time is linear in the length of the text.
 */
export function parseNotebook(text: string): Notebook {
  const problems = new Problems();
  const pieces = piecesOf(parser.parse(text), text);
  const blocks: Block[] = [];
  let proseFrom: number | null = null;
  let proseTo = 0;
  const endProse = (): void => {
    if (proseFrom !== null) blocks.push(proseBlock(proseFrom, proseTo, text));
    proseFrom = null;
  };
  for (const piece of pieces) {
    if (piece.kind === 'work') {
      endProse();
      const block = readWork(piece, text, problems);
      if (block) blocks.push(block);
    } else {
      proseFrom ??= piece.from;
      proseTo = piece.to;
    }
  }
  endProse();
  reportSecondNames(blocks, text, problems);
  hintsFor(pieces, text, problems);
  problems.list.sort((a, b) => a.span.from - b.span.from || a.span.to - b.span.to);
  return { blocks, diagnostics: problems.list };
}

function readWork(piece: WorkPiece, text: string, problems: Problems): Block | null {
  switch (piece.word) {
    case 'let':
      return readLet(piece, text, problems);
    case 'theory':
      return readTheory(piece, text, problems);
    case 'spectrum':
      return readSpectrum(piece, text, problems);
    default:
      return readRequest(piece.word, piece, text, problems);
  }
}

/** Prose without the line ends after it. */
function proseBlock(from: number, to: number, text: string): Prose {
  const prose = text.slice(from, to).trimEnd();
  return { kind: 'prose', span: { from, to: from + prose.length }, text: prose };
}
