import { readExpression } from './expression-form';
import { readRange } from './read-range';
import type { TokenReader } from './token-reader';
import type { Token } from './tokens';
import type { Assignment, Digits, Name, RangeClause } from './tree';

/** What may follow the first part of a request. */
export interface Clauses {
  readonly at: readonly Assignment[];
  readonly over: readonly RangeClause[];
  readonly names: readonly Name[];
  readonly digits: Digits | null;
}

/** Which clauses a request takes: `over` ranges, or names (`extremize`). */
export interface ClausesTaken {
  readonly at?: true;
  readonly over?: 'ranges' | 'names';
  readonly digits?: true;
}

/**
 * `at sigma1 = 0.3, sigma2 = -1`, `over r = 0 .. 1`, `, 40 digits`, in any order, each once, to the end of the line.
 * Null when something is wrong, which is then reported.
 */
export function readClauses(reader: TokenReader, taken: ClausesTaken): Clauses | null {
  const found = new Map<string, Token>();
  let at: readonly Assignment[] = [];
  let over: readonly RangeClause[] = [];
  let names: readonly Name[] = [];
  let digits: Digits | null = null;
  while (!reader.atEnd) {
    const comma = reader.take(',');
    if (comma && reader.atEnd) return reader.report('comma-last', comma);
    const token = reader.peek();
    if (!token) break;
    const kind = token.kind === 'number' && reader.peek(1)?.text === 'digits' ? 'digits' : token.text;
    if (found.has(kind)) return reader.report('clause-twice', token, { word: kind });
    found.set(kind, token);
    if (kind === 'at' && taken.at) {
      reader.next();
      const read = readList(reader, readAssignment, (item) => item.name);
      if (!read) return null;
      at = read;
    } else if (kind === 'over' && taken.over === 'ranges') {
      reader.next();
      const read = readList(reader, readRange, (item) => item.name);
      if (!read) return null;
      over = read;
    } else if (kind === 'over' && taken.over === 'names') {
      reader.next();
      const read = readList(reader, readSymbol, (item) => item);
      if (!read) return null;
      names = read;
    } else if (kind === 'digits' && taken.digits) {
      digits = readDigits(reader);
      if (!digits) return null;
    } else {
      reader.expectEnd(expectedOf(taken));
      return null;
    }
  }
  return { at, over, names, digits };
}

function expectedOf(taken: ClausesTaken): string {
  const forms = [
    taken.at ? '`at` and values' : '',
    taken.over === 'ranges' ? '`over` and a range' : '',
    taken.over === 'names' ? '`over` and names' : '',
    taken.digits ? '`, 40 digits`' : '',
    'the end of the request',
  ];
  return forms.filter((form) => form !== '').join(', or ');
}

/** Items after commas, up to a comma that something else follows; no name twice. */
function readList<T>(
  reader: TokenReader,
  read: (reader: TokenReader) => T | null,
  nameOf: (item: T) => Name,
): T[] | null {
  const items: T[] = [];
  const seen = new Set<string>();
  for (;;) {
    const item = read(reader);
    if (!item) return null;
    const { name, span } = nameOf(item);
    if (seen.has(name)) return reader.report('set-twice', span, { name });
    seen.add(name);
    items.push(item);
    if (!reader.at(',') || !goesOn(reader)) return items;
    reader.next();
  }
}

function goesOn(reader: TokenReader): boolean {
  const after = reader.peek(1);
  return after !== null && after.kind !== 'number' && !reader.stopsAt(after);
}

function readAssignment(reader: TokenReader): Assignment | null {
  const name = reader.symbol('name-missing', 'the name to set');
  if (!name || !reader.expect('=', '`=` and a value')) return null;
  const value = readExpression(reader);
  return value && { name, value };
}

function readSymbol(reader: TokenReader): Name | null {
  return reader.symbol('name-missing', 'the name to vary');
}

/** Beyond this no request is meant; what can be computed is decided when it runs. */
const LONGEST_DIGITS = 5;

function readDigits(reader: TokenReader): Digits | null {
  const number = reader.next();
  const word = reader.next();
  if (!number || !word) return null;
  const span = { from: number.from, to: word.to };
  if (!/^\d+$/.test(number.text) || number.text.length > LONGEST_DIGITS || Number(number.text) === 0) {
    return reader.report('digits-value', number, { word: number.text });
  }
  return { value: Number(number.text), span };
}
