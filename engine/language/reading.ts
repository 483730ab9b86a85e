import type { Form } from '../exact/form';
import type { Diagnostic, Severity, Span } from './tree';
import type { SyntaxCode } from './wording-syntax';

/** One reading of a text: the text, what is wrong with it so far, and the exact values met so far. */
export class Reading {
  readonly text: string;
  readonly diagnostics: Diagnostic[] = [];
  /** Forms by the text they were written as; notebooks say the same few things many times. */
  readonly forms: Map<string, Form>;

  constructor(text: string, forms = new Map<string, Form>()) {
    this.text = text;
    this.forms = forms;
  }

  /** Answers null, so that a reader can give up with `return reading.report(...)`. */
  report(
    code: SyntaxCode,
    span: Span,
    data: Readonly<Record<string, string>> = {},
    severity: Severity = 'error',
  ): null {
    const clipped = Object.fromEntries(Object.entries(data).map(([key, value]) => [key, clip(value)]));
    this.diagnostics.push({ code, span: { from: span.from, to: span.to }, severity, data: clipped });
    return null;
  }

  /** How many problems there are so far; `soundSince` asks about those that come after. */
  get mark(): number {
    return this.diagnostics.length;
  }

  soundSince(mark: number): boolean {
    return !this.diagnostics.slice(mark).some(({ severity }) => severity === 'error');
  }

  /** A reading of the same text whose problems may not count. */
  aside(): Reading {
    return new Reading(this.text, this.forms);
  }
}

/** Longest word repeated in a sentence. */
const LONGEST_WORD = 200;

function clip(word: string): string {
  return word.length <= LONGEST_WORD ? word : `${word.slice(0, LONGEST_WORD)}...`;
}
