import { readExpression } from './expression-form';
import type { TokenReader } from './token-reader';
import type { Expression, IndexRange, RangeClause } from './tree';

const RANGE = '`..` and the upper end';

/** `-2 .. 2`. Null when something is wrong, which is then reported. */
export function readBounds(reader: TokenReader): { readonly from: Expression; readonly to: Expression } | null {
  const from = readExpression(reader);
  if (!from || !reader.expect('..', RANGE)) return null;
  const to = readExpression(reader);
  if (!to) return null;
  const low = from.form.toRational();
  const high = to.form.toRational();
  if (low && high && low.compare(high) >= 0) {
    const span = { from: from.span.from, to: to.span.to };
    return reader.report('range-empty', span, { from: from.text, to: to.text });
  }
  return { from, to };
}

/** `sigma1 = -3 .. 3`. */
export function readRange(reader: TokenReader): RangeClause | null {
  const name = reader.symbol('name-missing', 'the name to vary');
  if (!name || !reader.expect('=', '`=` and a range such as `-3 .. 3`')) return null;
  const bounds = readBounds(reader);
  return bounds && { name, ...bounds };
}

/** `n >= 0`, `n = 1 .. 5`. One value, `n = 2 .. 2`, is a range of an index. */
export function readIndexRange(reader: TokenReader): IndexRange | null {
  const name = reader.symbol('name-missing', 'the name of an index');
  if (!name) return null;
  const relation = reader.peek();
  const open = relation?.text === '>=' || relation?.text === '\u2265';
  if (!open && relation?.text !== '=') {
    if (!relation) return reader.report('index-range-missing', name.span, { name: name.name });
    return reader.report('index-relation', relation, { name: name.name, word: relation.text });
  }
  reader.next();
  const from = readExpression(reader);
  if (!from) return null;
  const span = { from: name.span.from, to: from.span.to };
  if (open) return { span, name, from, to: null };
  if (!reader.expect('..', RANGE)) return null;
  const to = readExpression(reader);
  return to && { span: { from: name.span.from, to: to.span.to }, name, from, to };
}
