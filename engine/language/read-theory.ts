import { nearest } from './near-words';
import type { Problems } from './problems';
import { readGroupLine } from './read-group-line';
import { checkTable, readHeader, readMultiplet } from './read-matter';
import { readMixed, readSphere, readSupersymmetry } from './read-sphere';
import { readSuperpotential } from './read-superpotential';
import type { TheoryDraft } from './theory-draft';
import { TokenReader } from './token-reader';
import type { Line, Token, WorkPiece } from './tokens';
import type { MultipletKind, TheoryBlock } from './tree';
import { GROUP_OPTIONS, THEORY_LINE_WORDS, type TheoryLineWord } from './words';

/**
 * A theory with all its lines. Lines that cannot be read are reported and left out; a theory without a name is left
 * out as a whole.
 */
export function readTheory(piece: WorkPiece, text: string, problems: Problems): TheoryBlock | null {
  const [first = [], ...rest] = piece.lines;
  const head = new TokenReader(first, piece.wordSpan, text, problems);
  const name = head.name('name-missing', 'the name of the theory');
  if (name) head.expectEnd('the end of the line');
  const draft: TheoryDraft = {
    sphere: null,
    groups: [],
    mixed: [],
    supersymmetry: null,
    header: null,
    multiplets: [],
    superpotential: [],
    incomplete: false,
  };
  for (const line of rest) readTheoryLine(line, draft, text, problems);
  if (!name) return null;
  if (!draft.sphere) problems.report('sphere-missing', name.span, { theory: name.name });
  checkTable(draft, problems);
  const { incomplete: _, ...lines } = draft;
  return { kind: 'theory', span: { from: piece.from, to: piece.to }, name, ...lines };
}

function readTheoryLine(line: Line, draft: TheoryDraft, text: string, problems: Problems): void {
  const first = line[0];
  if (!first) return;
  const word = THEORY_LINE_WORDS.find((candidate) => candidate === first.text);
  if (word) {
    const stops = word === 'gauge' || word === 'flavor' ? GROUP_OPTIONS : [];
    READERS[word](new TokenReader(line.slice(1), first, text, problems, stops), draft, first);
    return;
  }
  draft.incomplete = true;
  if (first.kind === 'junk') problems.report('unexpected-character', first, { character: first.text });
  else
    problems.report('theory-line-unknown', first, {
      word: first.text,
      meant: nearest(first.text, THEORY_LINE_WORDS) ?? '',
    });
}

type LineReader = (reader: TokenReader, draft: TheoryDraft, word: Token) => void;

const readGroup: LineReader = (reader, draft, word) => {
  const group = readGroupLine(reader, word);
  if (!group) draft.incomplete = true;
  else if (draft.groups.some((other) => other.name.name === group.name.name)) {
    reader.problems.report('group-twice', group.name.span, { name: group.name.name });
  } else draft.groups.push(group);
};

const readRow: LineReader = (reader, draft, word) => {
  const row = readMultiplet(reader, word, word.text as MultipletKind, draft.header);
  if (!row) draft.incomplete = true;
  else if (draft.multiplets.some((other) => other.name.name === row.name.name)) {
    reader.problems.report('multiplet-twice', row.name.span, { name: row.name.name });
  } else draft.multiplets.push(row);
};

const READERS: Readonly<Record<TheoryLineWord, LineReader>> = {
  sphere: once('sphere', readSphere),
  supersymmetry: once('supersymmetry', readSupersymmetry),
  matter: once('header', readHeader),
  gauge: readGroup,
  flavor: readGroup,
  chiral: readRow,
  hyper: readRow,
  halfhyper: readRow,
  twisted: readRow,
  mixed: (reader, draft, word) => {
    const line = readMixed(reader, word);
    if (line) draft.mixed.push(line);
  },
  superpotential: (reader, draft) => {
    draft.superpotential.push(...readSuperpotential(reader));
  },
};

/** A line that a theory has at most once; the first one counts. */
function once<K extends 'sphere' | 'supersymmetry' | 'header'>(
  field: K,
  read: (reader: TokenReader, word: Token) => TheoryDraft[K],
): LineReader {
  return (reader, draft, word) => {
    const value = read(reader, word);
    if (draft[field] !== null) reader.problems.report('line-twice', word, { word: word.text });
    else draft[field] = value;
  };
}
