import { Rational } from '../exact/rational';
import { type Refusal, refusal } from './refusal';

/**
 * The words of a cell of the charge table and of a representation request:
 *
 *     sum     = product { '+' product }
 *     product = factor { ('x' | '×') factor }
 *     factor  = [ integer '*' ] item { '.' item }
 *     item    = atom { '*' }                               a trailing star is the dual
 *     atom    = word | dimension | [labels] | (highest weight) | det^k | sym^k(sum) | alt^k(sum) | (sum)
 *
 * For U(1) and SO(2) an atom may be an exact number, the charge.
 */
export type Expression =
  | { readonly kind: 'sum' | 'product'; readonly parts: readonly Expression[] }
  | { readonly kind: 'multiple'; readonly times: number; readonly part: Expression }
  | { readonly kind: 'dual'; readonly part: Expression }
  | { readonly kind: 'power'; readonly how: 'sym' | 'alt'; readonly power: number; readonly part: Expression }
  | { readonly kind: 'word' | 'dimension'; readonly text: string }
  | { readonly kind: 'determinant'; readonly power: number }
  | { readonly kind: 'labels' | 'weight'; readonly entries: readonly number[] }
  | { readonly kind: 'charge'; readonly value: Rational };

export type ParsedExpression = { readonly kind: 'expression'; readonly expression: Expression } | Refusal;

const PATTERNS = {
  space: /\s*/y,
  power: /(sym|alt)\^(\d{1,3})\s*\(/y,
  plainPower: /(sym|alt)\^?(\d{1,4})(?![\w(])/y,
  determinant: /det(?:\^(-?\d{1,4}))?(?!\w)/y,
  word: /[A-Za-z]+/y,
  charge: /-?\d+(?:\/\d+|(?:\.\d+)?(?:[eE][+-]?\d{1,3})?)/y,
  integer: /\d+(?=\s*\*)/y,
  dimension: /\d+'*[vsc]?(?:bar)?'*/y,
  labels: /\[\s*(-?\d{1,9}(?:\s*,\s*-?\d{1,9})*)\s*\]/y,
  weight: /\(\s*(-?\d{1,9}(?:\s*,\s*-?\d{1,9})+)\s*\)/y,
  product: /x(?!\w)|×/y,
  star: /\*/y,
  plus: /\+/y,
  dot: /\./y,
  open: /\(/y,
  close: /\)/y,
} as const;

class Reader {
  readonly text: string;
  readonly charges: boolean;
  position = 0;

  constructor(text: string, charges: boolean) {
    this.text = text;
    this.charges = charges;
    this.take('space');
  }

  /** Reads one token and the blanks after it; null leaves the position unchanged. */
  take(name: keyof typeof PATTERNS): RegExpExecArray | null {
    const pattern = PATTERNS[name];
    pattern.lastIndex = this.position;
    const match = pattern.exec(this.text);
    if (!match) return null;
    PATTERNS.space.lastIndex = pattern.lastIndex;
    PATTERNS.space.exec(this.text);
    this.position = PATTERNS.space.lastIndex;
    return match;
  }

  sees(name: keyof typeof PATTERNS): boolean {
    const pattern = PATTERNS[name];
    pattern.lastIndex = this.position;
    return pattern.test(this.text);
  }
}

/** Null stands for a syntax error at the reader's position. */
type Read = Expression | null;

export function parseExpression(text: string, charges: boolean): ParsedExpression {
  const reader = new Reader(text, charges);
  const expression = readSum(reader);
  if (expression && reader.position === text.length) return { kind: 'expression', expression };
  const rest = text.slice(reader.position);
  const where = rest === '' ? 'It ends too early.' : `It cannot go on with '${rest}'.`;
  const remedy = charges
    ? 'Write a charge, an exact number, or a sum of charges.'
    : 'Examples: fund, anti+adj, 2*fund, sym2*, [1,0], fund x adj, sym^3(fund).';
  return refusal('representation-syntax', `'${text}' is not a representation.`, where, remedy);
}

function readSum(reader: Reader): Read {
  return readList(reader, 'sum', 'plus', (inner) => readList(inner, 'product', 'product', readFactor));
}

function readList(
  reader: Reader,
  kind: 'sum' | 'product',
  separator: 'plus' | 'product' | 'dot',
  readPart: (reader: Reader) => Read,
): Read {
  const parts: Expression[] = [];
  do {
    const part = readPart(reader);
    if (!part) return null;
    parts.push(part);
  } while (reader.take(separator));
  return parts.length === 1 ? (parts[0] as Expression) : { kind, parts };
}

function readFactor(reader: Reader): Read {
  const start = reader.position;
  const integer = reader.take('integer');
  if (integer) {
    reader.take('star');
    // `2*fund` counts, `27*` is a dual: only what can begin an item decides.
    if (beginsItem(reader)) {
      const part = readList(reader, 'product', 'dot', readItem);
      return part && { kind: 'multiple', times: Number(integer[0]), part };
    }
    reader.position = start;
  }
  return readList(reader, 'product', 'dot', readItem);
}

function beginsItem(reader: Reader): boolean {
  if (reader.sees('product')) return false;
  return (
    (['word', 'dimension', 'labels', 'open'] as const).some((name) => reader.sees(name)) ||
    (reader.charges && reader.sees('charge'))
  );
}

function readItem(reader: Reader): Read {
  let item = readAtom(reader);
  while (item && reader.take('star')) item = { kind: 'dual', part: item };
  return item;
}

const integers = (list: string): number[] => list.split(',').map(Number);

function readAtom(reader: Reader): Read {
  const power = reader.take('power');
  if (power) {
    const part = readSum(reader);
    if (!part || !reader.take('close')) return null;
    return { kind: 'power', how: power[1] as 'sym' | 'alt', power: Number(power[2]), part };
  }
  const plain = reader.take('plainPower');
  if (plain) return { kind: 'word', text: `${plain[1]}${plain[2]}` };
  const determinant = reader.take('determinant');
  if (determinant) return { kind: 'determinant', power: Number(determinant[1] ?? 1) };
  if (!reader.sees('product')) {
    const word = reader.take('word');
    if (word) return { kind: 'word', text: word[0] };
  }
  const labels = reader.take('labels');
  if (labels) return { kind: 'labels', entries: integers(labels[1] as string) };
  const weight = reader.take('weight');
  if (weight) return { kind: 'weight', entries: integers(weight[1] as string) };
  if (reader.take('open')) {
    const part = readSum(reader);
    return part && reader.take('close') ? part : null;
  }
  if (reader.charges) {
    const charge = reader.take('charge');
    const value = charge && Rational.parse(charge[0]);
    return value ? { kind: 'charge', value } : null;
  }
  const name = reader.take('dimension');
  return name && { kind: 'dimension', text: name[0] };
}
