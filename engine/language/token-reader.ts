import { spellName } from './names';
import type { Reading } from './reading';
import type { Line, Token } from './tokens';
import type { Name, Severity, Span } from './tree';
import type { SyntaxCode } from './wording-syntax';
import { CLAUSE_WORDS, RESERVED } from './words';

const NO_STOPS: ReadonlySet<string> = new Set();

/** Reads the tokens of one line from left to right. */
export class TokenReader {
  readonly reading: Reading;
  readonly #tokens: Line;
  readonly #before: Span;
  readonly #stops: ReadonlySet<string>;
  #position = 0;

  /**
   * `before` is the word the tokens follow; "nothing after" is said there. `stops` are words that no number before
   * them is multiplied with, besides the reserved ones.
   */
  constructor(tokens: Line, before: Span, reading: Reading, stops: ReadonlySet<string> = NO_STOPS) {
    this.#tokens = tokens;
    this.#before = before;
    this.reading = reading;
    this.#stops = stops;
  }

  report(code: SyntaxCode, span: Span, data?: Readonly<Record<string, string>>, severity?: Severity): null {
    return this.reading.report(code, span, data, severity);
  }

  /** Whether an expression ends before this word. */
  stopsAt(token: Token): boolean {
    return CLAUSE_WORDS.has(token.text) || this.#stops.has(token.text);
  }

  peek(ahead = 0): Token | null {
    return this.#tokens[this.#position + ahead] ?? null;
  }

  next(): Token | null {
    const token = this.peek();
    if (token) this.#position++;
    return token;
  }

  get atEnd(): boolean {
    return this.#position >= this.#tokens.length;
  }

  /** Where the last token read stands; the word in front of the line before that. */
  get last(): Span {
    return this.#tokens[this.#position - 1] ?? this.#before;
  }

  /** The next token, or the last one where none is left. */
  get here(): Span {
    return this.peek() ?? this.last;
  }

  at(text: string): boolean {
    return this.peek()?.text === text;
  }

  take(text: string): Token | null {
    return this.at(text) ? this.next() : null;
  }

  /** Whether the next token touches the one before it. */
  get tight(): boolean {
    const next = this.peek();
    return next !== null && next.from === this.last.to;
  }

  /** Text from a token's start to the end of the last token read. */
  textFrom(from: number): string {
    return this.reading.text.slice(from, this.last.to);
  }

  /** Goes to the next comma outside brackets, or to the end of the line. */
  skipToComma(): void {
    let depth = 0;
    for (let token = this.peek(); token && (token.text !== ',' || depth > 0); token = this.peek()) {
      if (token.text === '(' || token.text === '[') depth++;
      else if (token.text === ')' || token.text === ']') depth = Math.max(0, depth - 1);
      this.next();
    }
  }

  /** Reads a cell: tokens that touch. */
  takeTouching(): Token[] {
    const touching: Token[] = [];
    while (!this.atEnd && (touching.length === 0 || this.tight)) touching.push(this.next() as Token);
    return touching;
  }

  /** Reports a token that cannot stand where it stands. */
  unexpected(token: Token, expected: string): null {
    if (token.kind === 'junk') return this.report('unexpected-character', token, { character: token.text });
    return this.report('unexpected-text', token, { word: token.text, expected });
  }

  /** Reads `text`; `expected` says to the user what should have come. */
  expect(text: string, expected: string): Token | null {
    const token = this.peek();
    if (!token) return this.report('line-ends', this.last, { expected });
    return token.text === text ? this.next() : this.unexpected(token, expected);
  }

  /** True at the end of the line, else reports the first token left over. */
  expectEnd(expected: string): boolean {
    const token = this.peek();
    return token === null || this.unexpected(token, expected) !== null;
  }

  /** A name that is defined or used here. `missing` is reported where the line ends instead. */
  name(missing: SyntaxCode, expected: string): Name | null {
    const token = this.peek();
    if (!token)
      return this.report(missing, this.last, { after: this.reading.text.slice(this.last.from, this.last.to) });
    if (token.kind !== 'name') return this.unexpected(token, expected);
    this.next();
    return { name: spellName(token.text), span: { from: token.from, to: token.to } };
  }

  /** The name of a block, alone on its line; what touches it without being part of it is reported. */
  blockName(expected: string): Name | null {
    const name = this.name('name-missing', expected);
    if (!name) return null;
    if (this.tight) {
      this.takeTouching();
      const span = { from: name.span.from, to: this.last.to };
      this.report('block-name', span, { word: this.textFrom(span.from) });
    } else this.expectEnd('the end of the line');
    return name;
  }

  /** A name that may stand in expressions: words with a meaning there are refused. */
  symbol(missing: SyntaxCode, expected: string): Name | null {
    const name = this.name(missing, expected);
    if (name && RESERVED.has(name.name)) {
      return this.report('reserved-name', name.span, { name: name.name });
    }
    return name;
  }
}
