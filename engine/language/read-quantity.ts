import { readExpression } from './expression-form';
import type { TokenReader } from './token-reader';
import type { Token } from './tokens';
import type { Expression, Name, Part, Quantity, Span } from './tree';
import { PARTS, PRESCRIPTIONS, SPECIAL_FUNCTIONS, type SpecialFunctionWord } from './words';

const QUANTITY = 'a quantity such as `one-loop of ...`';

/** `abs integrand of electric`: what a curve shows, or null for the quantity itself, and the quantity. */
export function readCurve(reader: TokenReader): { readonly part: Part | null; readonly quantity: Quantity } | null {
  const part = PARTS.find((word) => reader.at(word));
  // A multiplet may be called `re`.
  const shows = part && reader.peek(1)?.text !== 'of' ? part : null;
  if (shows) reader.next();
  const quantity = readQuantity(reader);
  return quantity && { part: shows, quantity };
}

/** `one-loop of electric`, `log determinant of dirac by operator`, `doublesine(0.3, 5/4)`. */
export function readQuantity(reader: TokenReader): Quantity | null {
  const start = reader.here.from;
  const log = reader.at('log') && reader.peek(1)?.text !== 'of' && reader.next() !== null;
  const token = reader.peek();
  if (!token) return reader.report('quantity-missing', reader.last);
  if (token.kind !== 'name') {
    if (token.kind === 'junk') return reader.unexpected(token, QUANTITY);
    return reader.report('quantity-expected', token, { word: token.text });
  }
  if (reader.peek(1)?.text === '(' && !hasOrders(reader)) return readFunction(reader, token, log, start);
  const what = readWhat(reader);
  if (!what) return null;
  const orders = reader.at('(') ? readOrders(reader) : undefined;
  if (orders === null) return null;
  if (!reader.take('of')) return reader.report('of-missing', reader.here, { name: what.name });
  const subject = reader.name('subject-missing', 'the name of a theory or a spectrum');
  if (!subject) return null;
  const span = { from: start, to: subject.span.to };
  if (orders) return { kind: 'theory', log, what, orders, theory: subject, span };
  if (what.name !== 'determinant') return { kind: 'theory', log, what, theory: subject, span };
  const prescription = readPrescription(reader);
  return prescription && { kind: 'determinant', log, spectrum: subject, prescription, span: spanFrom(start, reader) };
}

/** Whether `name(...)` is followed by `of`, and so a quantity of a theory and no function of numbers. */
function hasOrders(reader: TokenReader): boolean {
  for (let k = 2; ; k++) {
    const token = reader.peek(k);
    if (token === null || token.text === '(') return false;
    if (token.text === ')') return reader.peek(k + 1)?.text === 'of';
  }
}

/** `(1, 2)`: whole numbers. */
function readOrders(reader: TokenReader): number[] | null {
  reader.next();
  const orders: number[] = [];
  do {
    const token = reader.next();
    if (!token || !/^\d{1,2}$/.test(token.text)) {
      return reader.report('order-expected', token ?? reader.last, { word: token?.text ?? '' });
    }
    orders.push(Number(token.text));
  } while (reader.take(','));
  return reader.expect(')', '`,` or `)`') && orders;
}

function spanFrom(from: number, reader: TokenReader): Span {
  return { from, to: reader.last.to };
}

/** A name, or `one-loop` written without blanks. */
function readWhat(reader: TokenReader): Name | null {
  const [one, dash, loop] = [reader.peek(), reader.peek(1), reader.peek(2)];
  if (
    one?.text === 'one' &&
    dash?.text === '-' &&
    loop?.text === 'loop' &&
    one.to === dash.from &&
    dash.to === loop.from
  ) {
    for (let k = 0; k < 3; k++) reader.next();
    return { name: 'one-loop', span: { from: one.from, to: loop.to } };
  }
  return reader.name('quantity-missing', QUANTITY);
}

/** `by operator`; without it, by factors. */
function readPrescription(reader: TokenReader): (typeof PRESCRIPTIONS)[number] | null {
  const by = reader.take('by');
  if (!by) return 'factors';
  const token = reader.next();
  const prescription = PRESCRIPTIONS.find((word) => word === token?.text);
  return prescription ?? reader.report('prescription-unknown', token ?? by, { word: token?.text ?? '' });
}

function readFunction(reader: TokenReader, token: Token, log: boolean, start: number): Quantity | null {
  const name = reader.name('quantity-missing', QUANTITY);
  if (!name) return null;
  if (!isSpecialFunction(name.name)) return reader.report('special-function-unknown', token, { name: name.name });
  const opening = reader.next();
  const args: Expression[] = [];
  do {
    const argument = readExpression(reader);
    if (!argument) return null;
    args.push(argument);
  } while (reader.take(',') ?? reader.take(';'));
  if (reader.atEnd) return reader.report('parenthesis-open', opening ?? token);
  if (!reader.expect(')', '`,` or `)`')) return null;
  const span = spanFrom(start, reader);
  const { signature, least, most } = SPECIAL_FUNCTIONS[name.name];
  if (args.length < least || args.length > most) {
    return reader.report('argument-count', span, { name: name.name, signature, count: `${args.length}` });
  }
  return { kind: 'function', log, function: name, arguments: args, span };
}

function isSpecialFunction(name: string): name is SpecialFunctionWord {
  return Object.hasOwn(SPECIAL_FUNCTIONS, name);
}
