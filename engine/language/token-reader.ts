import { spellName } from './names';
import type { Problems } from './problems';
import type { Line, Token } from './tokens';
import type { Name, Span } from './tree';
import type { SyntaxCode } from './wording-syntax';
import { CLAUSE_WORDS, RESERVED } from './words';

/** Reads the tokens of one line from left to right. */
export class TokenReader {
  readonly text: string;
  readonly problems: Problems;
  readonly #tokens: Line;
  readonly #before: Span;
  readonly #stops: ReadonlySet<string>;
  #position = 0;

  /**
   * `before` is the word the tokens follow; "nothing after" is said there. `stops` are words that no number before
   * them is multiplied with, besides the reserved ones.
   */
  constructor(tokens: Line, before: Span, text: string, problems: Problems, stops: readonly string[] = []) {
    this.#tokens = tokens;
    this.#before = before;
    this.text = text;
    this.problems = problems;
    this.#stops = new Set(stops);
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
    return this.text.slice(from, this.last.to);
  }

  /** Goes past everything up to the next comma outside brackets, and past the comma. */
  skipPastComma(): void {
    let depth = 0;
    for (let token = this.next(); token; token = this.next()) {
      if (token.text === '(' || token.text === '[') depth++;
      else if (token.text === ')' || token.text === ']') depth = Math.max(0, depth - 1);
      else if (token.text === ',' && depth === 0) return;
    }
  }

  skipRest(): void {
    this.#position = this.#tokens.length;
  }

  /**
   * Goes to the end of a cell: a stretch of tokens that touch. Answers its tokens.
   */
  takeTouching(): Token[] {
    const touching: Token[] = [];
    while (!this.atEnd && (touching.length === 0 || this.tight)) touching.push(this.next() as Token);
    return touching;
  }

  /** Reports a token that cannot stand where it stands. */
  unexpected(token: Token, expected: string): null {
    if (token.kind === 'junk') return this.problems.report('unexpected-character', token, { character: token.text });
    return this.problems.report('unexpected-text', token, { word: token.text, expected });
  }

  /** Reads `text`; `expected` says to the user what should have come. */
  expect(text: string, expected: string): Token | null {
    const token = this.peek();
    if (!token) return this.problems.report('line-ends', this.last, { expected });
    return token.text === text ? this.next() : this.unexpected(token, expected);
  }

  /** True at the end of the line, else reports the first token left over. */
  expectEnd(expected: string): boolean {
    const token = this.peek();
    if (!token) return true;
    const operand = token.kind === 'name' || token.kind === 'number';
    const before = this.#tokens[this.#position - 1];
    if (operand && !this.stopsAt(token) && (before?.kind === 'name' || before?.kind === 'number')) {
      this.problems.report('missing-operator', token, { left: before.text, right: token.text });
    } else this.unexpected(token, expected);
    return false;
  }

  /** A name that is defined or used here. `missing` is reported where the line ends instead. */
  name(missing: SyntaxCode, expected: string): Name | null {
    const token = this.peek();
    if (!token)
      return this.problems.report(missing, this.last, { after: this.text.slice(this.last.from, this.last.to) });
    if (token.kind !== 'name') return this.unexpected(token, expected);
    this.next();
    return { name: spellName(token.text), span: { from: token.from, to: token.to } };
  }

  /** A name that may stand in expressions: words with a meaning there are refused. */
  symbol(missing: SyntaxCode, expected: string): Name | null {
    const name = this.name(missing, expected);
    if (name && RESERVED.has(name.name)) {
      return this.problems.report('reserved-name', name.span, { name: name.name });
    }
    return name;
  }
}
