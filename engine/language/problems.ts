import type { Diagnostic, Severity, Span } from './tree';
import type { SyntaxCode } from './wording-syntax';

/** Collects what is wrong with the text while it is read. */
export class Problems {
  readonly list: Diagnostic[] = [];

  /** Answers null, so that a reader can give up with `return problems.report(...)`. */
  report(
    code: SyntaxCode,
    span: Span,
    data: Readonly<Record<string, string>> = {},
    severity: Severity = 'error',
  ): null {
    this.list.push({ code, span: { from: span.from, to: span.to }, severity, data });
    return null;
  }

  /** Takes over a problem that was found elsewhere. */
  pass(diagnostic: Diagnostic): void {
    this.list.push(diagnostic);
  }
}
