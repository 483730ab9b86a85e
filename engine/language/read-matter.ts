import { expressionOf } from './expression-form';
import { parseExpression } from './expression-syntax';
import { listed, spellName } from './names';
import type { Reading } from './reading';
import { TokenReader } from './token-reader';
import type { Token } from './tokens';
import type { Expression, MatterHeader, MultipletKind, MultipletRow, Name } from './tree';
import { SPECTRUM_QUANTITIES, THEORY_QUANTITIES } from './words';

const QUANTITIES = [...THEORY_QUANTITIES, ...SPECTRUM_QUANTITIES];

/** `matter  G  F  R`: the names of the columns. */
export function readHeader(reader: TokenReader, word: Token): MatterHeader {
  const columns = new Map<string, Name>();
  while (!reader.atEnd) {
    const name = soleName(reader.takeTouching(), reader, 'column-name');
    if (!name) continue;
    if (columns.has(name.name)) reader.report('column-twice', name.span, { name: name.name });
    else columns.set(name.name, name);
  }
  return { span: { from: word.from, to: reader.last.to }, columns: [...columns.values()] };
}

/** A row of the charge table: kind, name, one cell a column. */
export function readMultiplet(
  reader: TokenReader,
  word: Token,
  kind: MultipletKind,
  header: MatterHeader | null,
): MultipletRow | null {
  if (reader.atEnd) return reader.report('multiplet-name-missing', word, { word: word.text });
  const name = soleName(reader.takeTouching(), reader, 'multiplet-name');
  if (!name) return null;
  if (QUANTITIES.some((quantity) => quantity === name.name)) {
    return reader.report('multiplet-name-taken', name.span, { name: name.name });
  }
  const cells: MultipletRow['cells'][number][] = [];
  while (!reader.atEnd) cells.push(readCell(reader));
  if (header) checkCells(name, cells, header, reader.reading);
  return { kind, span: { from: word.from, to: reader.last.to }, name, cells };
}

function checkCells(name: Name, cells: MultipletRow['cells'], header: MatterHeader, reading: Reading): void {
  const missing = header.columns.slice(cells.length).map((column) => column.name);
  const surplus = cells[header.columns.length];
  if (missing.length > 0) {
    const span = cells.at(-1)?.span ?? name.span;
    reading.report('cell-missing', span, { name: name.name, columns: listed(missing) });
  } else if (surplus) {
    const span = { from: surplus.span.from, to: (cells.at(-1) ?? surplus).span.to };
    const columns = listed(header.columns.map((column) => column.name));
    reading.report('cell-surplus', span, { name: name.name, count: `${header.columns.length}`, columns });
  }
}

/** A cell is what stands between blanks. Only where it is an expression can it be wrong already here. */
function readCell(reader: TokenReader): MultipletRow['cells'][number] {
  const tokens = reader.takeTouching();
  const from = tokens[0]?.from ?? reader.last.from;
  const span = { from, to: reader.last.to };
  const junk = tokens.find((token) => token.kind === 'junk');
  if (junk) reader.unexpected(junk, 'a charge or a representation');
  return { text: reader.textFrom(from), span, expression: junk ? null : cellExpression(tokens, reader) };
}

/** Words such as `27*` or `(2,1,0)` are no expressions, which is no mistake; a charge 1/0 is one. */
function cellExpression(tokens: readonly Token[], reader: TokenReader): Expression | null {
  const aside = reader.reading.aside();
  const inside = new TokenReader(tokens, reader.last, aside);
  const node = parseExpression(inside);
  if (!node || !inside.atEnd) return null;
  const expression = expressionOf(node, reader.reading);
  reader.reading.diagnostics.push(...aside.diagnostics);
  return expression;
}

function soleName(tokens: readonly Token[], reader: TokenReader, code: 'column-name' | 'multiplet-name'): Name | null {
  const [token, ...others] = tokens;
  const span = { from: token?.from ?? reader.last.from, to: reader.last.to };
  const junk = tokens.find((candidate) => candidate.kind === 'junk');
  if (junk) return reader.unexpected(junk, 'a name');
  if (token?.kind !== 'name' || others.length > 0) {
    return reader.report(code, span, { word: reader.textFrom(span.from) });
  }
  return { name: spellName(token.text), span };
}
