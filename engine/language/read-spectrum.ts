import { readExpression } from './expression-form';
import { parseExpression } from './expression-syntax';
import { nearest } from './near-words';
import { factorsOf } from './product-factors';
import { readIndexRange } from './read-range';
import type { Reading } from './reading';
import { TokenReader } from './token-reader';
import type { Token, WorkPiece } from './tokens';
import type { Expression, IndexRange, SpectrumBlock, TowerKind, TowerRow } from './tree';
import { SPECTRUM_LINE_WORDS } from './words';

/** A spectrum with its indices and towers. Lines that cannot be read are reported and left out. */
export function readSpectrum(piece: WorkPiece, reading: Reading): SpectrumBlock | null {
  const { mark } = reading;
  const [first = [], ...rest] = piece.lines;
  const name = new TokenReader(first, piece.wordSpan, reading).blockName('the name of the spectrum');
  const indices = new Map<string, IndexRange>();
  const towers: TowerRow[] = [];
  for (const line of rest) {
    const word = line[0];
    if (!word) continue;
    const reader = new TokenReader(line.slice(1), word, reading);
    if (word.text === 'index') {
      const index = readIndex(reader);
      if (!index) continue;
      const { name: symbol, span } = index.name;
      if (indices.has(symbol)) reading.report('index-twice', span, { name: symbol });
      else indices.set(symbol, index);
    } else {
      const tower = readTower(reader, word);
      if (tower) towers.push(tower);
    }
  }
  if (!name) return null;
  return {
    kind: 'spectrum',
    span: { from: piece.from, to: piece.to },
    name,
    indices: [...indices.values()],
    towers,
    sound: reading.soundSince(mark),
  };
}

function readIndex(reader: TokenReader): IndexRange | null {
  const index = readIndexRange(reader);
  return index && reader.expectEnd('the end of the line') ? index : null;
}

/** `fermion  n + 3/2  times 2(n+1)(n+2)  for n >= 1`. */
function readTower(reader: TokenReader, word: Token): TowerRow | null {
  const kind = towerKind(reader, word);
  if (!kind) return null;
  const exponent = kind === 'power' ? readExponent(reader) : null;
  if (kind === 'power' && !exponent) return null;
  if (reader.atEnd) return reader.report('eigenvalue-missing', reader.last);
  const node = parseExpression(reader);
  const eigenvalue = node && factorsOf(node, reader.reading);
  if (!eigenvalue) return null;
  let degeneracy: Expression | null = null;
  let ranges: readonly IndexRange[] = [];
  const seen: string[] = [];
  while (!reader.atEnd) {
    const clause = reader.take('times') ?? reader.take('for');
    if (!clause) {
      reader.expectEnd('`times` and a degeneracy, or `for` and a range');
      return null;
    }
    if (seen.includes(clause.text)) return reader.report('clause-twice', clause, { word: clause.text });
    seen.push(clause.text);
    if (clause.text === 'times') {
      degeneracy = readExpression(reader);
      if (!degeneracy) return null;
    } else {
      const read = readOwnRanges(reader);
      if (!read) return null;
      ranges = read;
    }
  }
  return { kind, span: { from: word.from, to: reader.last.to }, exponent, eigenvalue, degeneracy, ranges };
}

function towerKind(reader: TokenReader, word: Token): TowerKind | null {
  switch (word.text) {
    case 'boson':
    case 'fermion':
    case 'power':
      return word.text;
    case 'complex':
    case 'real': {
      const wanted = word.text === 'complex' ? 'boson' : 'fermion';
      if (reader.take(wanted)) return wanted === 'boson' ? 'complex boson' : 'real fermion';
      return reader.report('tower-kind', reader.here, { word: word.text, wanted });
    }
    default:
      if (word.kind === 'junk') return reader.unexpected(word, 'a tower');
      return reader.report('spectrum-line-unknown', word, {
        word: word.text,
        meant: nearest(word.text, SPECTRUM_LINE_WORDS) ?? '',
      });
  }
}

function readExponent(reader: TokenReader): Expression | null {
  if (!reader.take('(')) return reader.report('tower-exponent', reader.here);
  const exponent = readExpression(reader);
  return exponent && reader.expect(')', '`)`') && exponent;
}

function readOwnRanges(reader: TokenReader): readonly IndexRange[] | null {
  const ranges = new Map<string, IndexRange>();
  do {
    const range = readIndexRange(reader);
    if (!range) return null;
    const { name, span } = range.name;
    if (ranges.has(name)) return reader.report('index-twice', span, { name });
    ranges.set(name, range);
  } while (reader.take(','));
  return [...ranges.values()];
}
