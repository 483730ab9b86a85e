import { Rational } from '../exact/rational';
import { spellName } from './names';
import { nearest } from './near-words';
import type { TokenReader } from './token-reader';
import type { Token } from './tokens';
import type { Span } from './tree';
import { CLAUSE_WORDS, EXPRESSION_FUNCTIONS, type ExpressionFunction, SPECIAL_FUNCTIONS } from './words';

/** An expression as it was written. Sums and products are flat, so that long ones need no depth. */
export type ExpressionNode = Span &
  (
    | { readonly kind: 'number'; readonly value: Rational }
    | { readonly kind: 'name'; readonly name: string }
    | { readonly kind: 'parentheses'; readonly inside: ExpressionNode }
    | { readonly kind: 'negation'; readonly operand: ExpressionNode }
    | { readonly kind: 'sum'; readonly terms: readonly ExpressionNode[] }
    | { readonly kind: 'product'; readonly factors: readonly Factor[] }
    | { readonly kind: 'power'; readonly base: ExpressionNode; readonly exponent: ExpressionNode }
    | { readonly kind: 'call'; readonly function: ExpressionFunction; readonly argument: ExpressionNode }
  );

export interface Factor {
  readonly node: ExpressionNode;
  readonly divides: boolean;
}

/** Nested parentheses, exponents and functions; far beyond any formula, far below the depth of the call stack. */
export const MAXIMAL_DEPTH = 64;

/** Longest number that is read exactly. */
export const MAXIMAL_DIGITS = 1200;

const MINUS = new Set(['-', '\u2212']);
const TIMES = new Set(['*', '\u00b7']);

/**
 * Reads as much as is an expression: sums of products of powers. A product may be written by juxtaposition where a
 * number or a closing parenthesis meets a name or an opening parenthesis, or a name an opening parenthesis; it binds
 * as `*` does, from left to right. Null when something is wrong, which is then reported.
 */
export function parseExpression(reader: TokenReader): ExpressionNode | null {
  const node = new ExpressionParser(reader).sum();
  return node && endsWell(reader) ? node : null;
}

class ExpressionParser {
  readonly #reader: TokenReader;
  #depth = 0;

  constructor(reader: TokenReader) {
    this.#reader = reader;
  }

  sum(): ExpressionNode | null {
    const first = this.product();
    if (!first) return null;
    const terms = [first];
    for (let sign = this.#sign(); sign; sign = this.#sign()) {
      this.#reader.next();
      const term = this.product();
      if (!term) return null;
      terms.push(MINUS.has(sign.text) ? negate(term, sign.from) : term);
    }
    return terms.length === 1 ? first : { kind: 'sum', terms, from: first.from, to: this.#reader.last.to };
  }

  product(): ExpressionNode | null {
    const first = this.unary();
    if (!first) return null;
    const factors: Factor[] = [{ node: first, divides: false }];
    let warned = false;
    for (;;) {
      const token = this.#reader.peek();
      if (!token) break;
      const divides = token.text === '/';
      if (divides || TIMES.has(token.text)) this.#reader.next();
      else if (!this.#juxtaposes(token)) break;
      else if (!warned) warned = this.#warnIfMisread(factors, first, token);
      const node = this.unary();
      if (!node) return null;
      factors.push({ node, divides });
    }
    return factors.length === 1 ? first : { kind: 'product', factors, from: first.from, to: this.#reader.last.to };
  }

  /** Signs bind less than powers: -x^2 is -(x^2). */
  unary(): ExpressionNode | null {
    const from = this.#reader.here.from;
    let negative = false;
    for (let sign = this.#sign(); sign; sign = this.#sign()) {
      this.#reader.next();
      if (MINUS.has(sign.text)) negative = !negative;
    }
    const operand = this.power();
    return operand && negative ? negate(operand, from) : operand;
  }

  power(): ExpressionNode | null {
    const base = this.primary();
    if (!base || !this.#reader.take('^')) return base;
    const exponent = this.#nested(() => this.unary());
    return exponent && { kind: 'power', base, exponent, from: base.from, to: exponent.to };
  }

  primary(): ExpressionNode | null {
    const token = this.#reader.peek();
    if (!token) return this.#reader.report('expression-missing', this.#reader.last);
    if (token.kind === 'number') return this.#number(token);
    if (token.text === '(') return this.#parenthesised();
    if (token.kind === 'junk') return this.#reader.unexpected(token, 'an expression');
    if (token.kind !== 'name' || CLAUSE_WORDS.has(token.text)) {
      return this.#reader.report('expression-expected', token, { word: token.text });
    }
    return this.#nameOrCall(token);
  }

  #number(token: Token): ExpressionNode | null {
    this.#reader.next();
    const value = token.text.length <= MAXIMAL_DIGITS ? Rational.parse(token.text) : null;
    if (!value) return this.#reader.report('number-too-long', token, { digits: `${MAXIMAL_DIGITS}` });
    return { kind: 'number', value, from: token.from, to: token.to };
  }

  #parenthesised(): ExpressionNode | null {
    const opening = this.#reader.next() as Token;
    const inside = this.#nested(() => this.sum());
    if (!inside) return null;
    if (!endsWell(this.#reader)) return null;
    const closing = this.#reader.peek();
    if (closing?.text !== ')') {
      return closing
        ? this.#reader.unexpected(closing, 'an operator or `)`')
        : this.#reader.report('parenthesis-open', opening);
    }
    this.#reader.next();
    return { kind: 'parentheses', inside, from: opening.from, to: closing.to };
  }

  #nameOrCall(token: Token): ExpressionNode | null {
    this.#reader.next();
    const name = spellName(token.text);
    const called = this.#reader.at('(');
    const known = EXPRESSION_FUNCTIONS.find((word) => word === name);
    if (known) {
      if (!called) return this.#reader.report('function-without-argument', token, { name });
      const argument = this.#parenthesised();
      return argument && { kind: 'call', function: known, argument, from: token.from, to: this.#reader.last.to };
    }
    if (called && this.#reader.tight) {
      if (Object.hasOwn(SPECIAL_FUNCTIONS, name))
        return this.#reader.report('special-function-inside', token, { name });
      const meant = nearest(name, EXPRESSION_FUNCTIONS);
      if (meant) return this.#reader.report('function-unknown', token, { name, meant });
    }
    return { kind: 'name', name, from: token.from, to: token.to };
  }

  #nested(read: () => ExpressionNode | null): ExpressionNode | null {
    if (this.#depth >= MAXIMAL_DEPTH) {
      return this.#reader.report('expression-too-deep', this.#reader.here, { depth: `${MAXIMAL_DEPTH}` });
    }
    this.#depth++;
    const node = read();
    this.#depth--;
    return node;
  }

  #sign(): Token | null {
    const token = this.#reader.peek();
    return token && (token.text === '+' || MINUS.has(token.text)) ? token : null;
  }

  #juxtaposes(token: Token): boolean {
    const before = this.#reader.peek(-1);
    if (token.text === '(') return before !== null && before.kind !== 'operator';
    const open = before?.kind === 'number' || before?.text === ')';
    return open && token.kind === 'name' && !this.#reader.stopsAt(token);
  }

  /** `1/2r` and `x^2y` are read from left to right; somebody may have meant `1/(2r)` or `x^(2y)`. */
  #warnIfMisread(factors: readonly Factor[], first: ExpressionNode, token: Token): boolean {
    const reader = this.#reader;
    const previous = factors.at(-1);
    if (!previous || !reader.tight) return false;
    const afterPower = previous.node.kind === 'power' && token.kind === 'name' && reader.peek(-1)?.kind === 'number';
    if (!previous.divides && !afterPower) return false;
    const code = previous.divides ? 'product-after-division' : 'product-after-power';
    reader.report(code, token, { left: reader.textFrom(first.from), right: token.text }, 'warning');
    return true;
  }
}

/** Reports a name or a number that follows an expression without anything between. */
function endsWell(reader: TokenReader): boolean {
  const token = reader.peek();
  const name = token?.kind === 'name' && !reader.stopsAt(token);
  const number = token?.kind === 'number' && reader.peek(1)?.text !== 'digits';
  return !token || !(name || number) || reader.report('missing-operator', token, { word: token.text }) !== null;
}

function negate(operand: ExpressionNode, from: number): ExpressionNode {
  return { kind: 'negation', operand, from, to: operand.to };
}
