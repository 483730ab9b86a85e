import { readExpression } from './expression-form';
import { parseExpression } from './expression-syntax';
import { nearest } from './near-words';
import type { Problems } from './problems';
import { factorsOf } from './product-factors';
import { readIndexRange } from './read-range';
import { TokenReader } from './token-reader';
import type { Token, WorkPiece } from './tokens';
import type { Expression, IndexRange, SpectrumBlock, TowerKind, TowerRow } from './tree';
import { SPECTRUM_LINE_WORDS } from './words';

/** A spectrum with its indices and towers. Lines that cannot be read are reported and left out. */
export function readSpectrum(piece: WorkPiece, text: string, problems: Problems): SpectrumBlock | null {
  const [first = [], ...rest] = piece.lines;
  const head = new TokenReader(first, piece.wordSpan, text, problems);
  const name = head.name('name-missing', 'the name of the spectrum');
  if (name) head.expectEnd('the end of the line');
  const indices: IndexRange[] = [];
  const towers: TowerRow[] = [];
  for (const line of rest) {
    const word = line[0];
    if (!word) continue;
    const reader = new TokenReader(line.slice(1), word, text, problems);
    if (word.text === 'index') {
      const index = readIndex(reader);
      if (index && indices.some((other) => other.name.name === index.name.name)) {
        problems.report('index-twice', index.name.span, { name: index.name.name });
      } else if (index) indices.push(index);
    } else {
      const tower = readTower(reader, word);
      if (tower) towers.push(tower);
    }
  }
  return name && { kind: 'spectrum', span: { from: piece.from, to: piece.to }, name, indices, towers };
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
  if (reader.atEnd) return reader.problems.report('eigenvalue-missing', reader.last);
  const node = parseExpression(reader);
  const eigenvalue = node && factorsOf(node, reader.text, reader.problems);
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
    if (seen.includes(clause.text)) return reader.problems.report('clause-twice', clause, { word: clause.text });
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
  const { problems } = reader;
  switch (word.text) {
    case 'boson':
    case 'fermion':
    case 'power':
      return word.text;
    case 'complex':
    case 'real': {
      const wanted = word.text === 'complex' ? 'boson' : 'fermion';
      if (reader.take(wanted)) return wanted === 'boson' ? 'complex boson' : 'real fermion';
      return problems.report('tower-kind', reader.here, { word: word.text, wanted });
    }
    default:
      if (word.kind === 'junk') return reader.unexpected(word, 'a tower');
      return problems.report('spectrum-line-unknown', word, {
        word: word.text,
        meant: nearest(word.text, SPECTRUM_LINE_WORDS) ?? '',
      });
  }
}

function readExponent(reader: TokenReader): Expression | null {
  if (!reader.take('(')) return reader.problems.report('tower-exponent', reader.here);
  const exponent = readExpression(reader);
  return exponent && reader.expect(')', '`)`') && exponent;
}

function readOwnRanges(reader: TokenReader): readonly IndexRange[] | null {
  const ranges: IndexRange[] = [];
  do {
    const range = readIndexRange(reader);
    if (!range) return null;
    if (ranges.some((other) => other.name.name === range.name.name)) {
      return reader.problems.report('index-twice', range.name.span, { name: range.name.name });
    }
    ranges.push(range);
  } while (reader.take(','));
  return ranges;
}
