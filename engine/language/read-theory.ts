import { listed } from './names';
import { nearest } from './near-words';
import { readGroupLine } from './read-group-line';
import { readHeader, readMultiplet } from './read-matter';
import { readMixed, readSphere, readSupersymmetry } from './read-sphere';
import { readSuperpotential } from './read-superpotential';
import type { Reading } from './reading';
import type { TheoryDraft } from './theory-draft';
import { TokenReader } from './token-reader';
import type { Line, Token, WorkPiece } from './tokens';
import type { MultipletKind, TheoryBlock } from './tree';
import { GROUP_OPTIONS, THEORY_LINE_WORDS, type TheoryLineWord } from './words';

/**
 * A theory with all its lines. Lines that cannot be read are reported and left out; a theory without a name is left
 * out as a whole.
 */
export function readTheory(piece: WorkPiece, reading: Reading): TheoryBlock | null {
  const { mark } = reading;
  const [first = [], ...rest] = piece.lines;
  const name = new TokenReader(first, piece.wordSpan, reading).blockName('the name of the theory');
  const draft: TheoryDraft = {
    sphere: null,
    groups: new Map(),
    mixed: [],
    supersymmetry: null,
    header: null,
    multiplets: new Map(),
    superpotential: [],
  };
  for (const line of rest) readTheoryLine(line, draft, reading);
  if (!name) return null;
  const anySphere = rest.some((line) => line[0]?.text === 'sphere');
  if (!anySphere) reading.report('sphere-missing', name.span, { theory: name.name });
  reportNeutralGroups(draft, reading);
  return {
    kind: 'theory',
    span: { from: piece.from, to: piece.to },
    name,
    ...draft,
    groups: [...draft.groups.values()],
    multiplets: [...draft.multiplets.values()],
    sound: reading.soundSince(mark),
  };
}

/** A group no column speaks of leaves every multiplet neutral, which is seldom meant. */
function reportNeutralGroups({ header, multiplets, groups }: TheoryDraft, reading: Reading): void {
  if (!header || multiplets.size === 0) return;
  const columns = new Set(header.columns.map((column) => column.name));
  const missing = [...groups.keys()].filter((name) => !columns.has(name));
  if (missing.length > 0) reading.report('column-missing', header.span, { names: listed(missing) }, 'warning');
}

function readTheoryLine(line: Line, draft: TheoryDraft, reading: Reading): void {
  const first = line[0];
  if (!first) return;
  const word = THEORY_LINE_WORDS.find((candidate) => candidate === first.text);
  if (word) {
    const stops = word === 'gauge' || word === 'flavor' ? OPTION_WORDS : undefined;
    READERS[word](new TokenReader(line.slice(1), first, reading, stops), draft, first);
    return;
  }
  if (first.kind === 'junk') {
    reading.report('unexpected-character', first, { character: first.text });
  } else {
    const meant = nearest(first.text, THEORY_LINE_WORDS) ?? '';
    reading.report('theory-line-unknown', first, { word: first.text, meant });
  }
}

const OPTION_WORDS: ReadonlySet<string> = new Set(GROUP_OPTIONS);

type LineReader = (reader: TokenReader, draft: TheoryDraft, word: Token) => void;

const readGroup: LineReader = (reader, draft, word) => {
  const group = readGroupLine(reader, word);
  if (!group) return;
  if (draft.groups.has(group.name.name)) {
    reader.report('group-twice', group.name.span, { name: group.name.name });
  } else draft.groups.set(group.name.name, group);
};

const readRow: LineReader = (reader, draft, word) => {
  const row = readMultiplet(reader, word, word.text as MultipletKind, draft.header);
  if (!row) return;
  if (!draft.header && draft.multiplets.size === 0) {
    reader.report('matter-missing', row.span, { name: row.name.name });
  }
  if (draft.multiplets.has(row.name.name)) {
    reader.report('multiplet-twice', row.name.span, { name: row.name.name });
  } else draft.multiplets.set(row.name.name, row);
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
    if (draft[field] !== null) reader.report('line-twice', word, { word: word.text });
    else draft[field] = value;
  };
}
