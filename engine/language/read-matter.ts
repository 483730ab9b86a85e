import { expressionOf } from './expression-form';
import { parseExpression } from './expression-syntax';
import { spellName } from './names';
import { Problems } from './problems';
import type { TheoryDraft } from './theory-draft';
import { TokenReader } from './token-reader';
import type { Token } from './tokens';
import type { Expression, MatterHeader, MultipletKind, MultipletRow, Name } from './tree';
import { THEORY_QUANTITIES } from './words';

/** `matter  G  F  R`: the names of the columns. */
export function readHeader(reader: TokenReader, word: Token): MatterHeader {
  const columns: Name[] = [];
  while (!reader.atEnd) {
    const name = soleName(reader.takeTouching(), reader, 'column-name');
    if (!name) continue;
    if (columns.some((other) => other.name === name.name)) {
      reader.problems.report('column-twice', name.span, { name: name.name });
    } else columns.push(name);
  }
  return { span: { from: word.from, to: reader.last.to }, columns };
}

/** A row of the charge table: kind, name, one cell a column. */
export function readMultiplet(
  reader: TokenReader,
  word: Token,
  kind: MultipletKind,
  header: MatterHeader | null,
): MultipletRow | null {
  const { problems } = reader;
  if (reader.atEnd) return problems.report('multiplet-name-missing', word, { word: word.text });
  const name = soleName(reader.takeTouching(), reader, 'multiplet-name');
  if (!name) return null;
  if (THEORY_QUANTITIES.some((quantity) => quantity === name.name)) {
    return problems.report('multiplet-name-taken', name.span, { name: name.name });
  }
  const cells: MultipletRow['cells'][number][] = [];
  while (!reader.atEnd) cells.push(readCell(reader));
  if (header) checkCells(name, cells, header, problems);
  return { kind, span: { from: word.from, to: reader.last.to }, name, cells };
}

function checkCells(name: Name, cells: MultipletRow['cells'], header: MatterHeader, problems: Problems): void {
  const missing = header.columns.slice(cells.length).map((column) => column.name);
  const surplus = cells[header.columns.length];
  if (missing.length > 0) {
    const span = cells.at(-1)?.span ?? name.span;
    problems.report('cell-missing', span, { name: name.name, columns: missing.join(', ') });
  } else if (surplus) {
    const span = { from: surplus.span.from, to: (cells.at(-1) ?? surplus).span.to };
    const columns = header.columns.map((column) => column.name).join(', ');
    problems.report('cell-surplus', span, { name: name.name, count: `${header.columns.length}`, columns });
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
  const problems = new Problems();
  const inside = new TokenReader(tokens, reader.last, reader.text, problems);
  const node = parseExpression(inside);
  if (!node || !inside.atEnd) return null;
  const expression = expressionOf(node, reader.text, problems);
  for (const problem of problems.list) reader.problems.pass(problem);
  return expression;
}

function soleName(tokens: readonly Token[], reader: TokenReader, code: 'column-name' | 'multiplet-name'): Name | null {
  const [token, ...others] = tokens;
  const span = { from: token?.from ?? reader.last.from, to: reader.last.to };
  const junk = tokens.find((candidate) => candidate.kind === 'junk');
  if (junk) return reader.unexpected(junk, 'a name');
  if (token?.kind !== 'name' || others.length > 0) {
    return reader.problems.report(code, span, { word: reader.textFrom(span.from) });
  }
  return { name: spellName(token.text), span };
}

/** What only the whole theory tells: columns against groups, rows against the header, fields against rows. */
export function checkTable(draft: TheoryDraft, problems: Problems): void {
  const { header, multiplets, groups } = draft;
  const first = multiplets[0];
  if (!header && first) problems.report('matter-missing', first.span, { name: first.name.name });
  if (draft.incomplete) return;
  const names = groups.map((group) => group.name.name);
  const allowed = names.join(', ');
  if (header) {
    const columns = header.columns.map((column) => column.name);
    for (const column of header.columns) {
      if (column.name !== 'R' && !names.includes(column.name)) {
        problems.report('column-unknown', column.span, { name: column.name, allowed });
      }
    }
    const missing = names.filter((name) => !columns.includes(name));
    if (missing.length > 0) problems.report('column-missing', header.span, { names: missing.join(', ') });
  }
  for (const name of draft.mixed.flatMap((line) => line.groups)) {
    if (!names.includes(name.name)) problems.report('group-unknown', name.span, { name: name.name, allowed });
  }
  const fields = multiplets.map((row) => row.name.name);
  for (const { field } of draft.superpotential.flatMap((monomial) => monomial.fields)) {
    if (fields.includes(field.name)) continue;
    problems.report('field-unknown', field.span, { name: field.name, allowed: fields.join(', ') });
  }
}
