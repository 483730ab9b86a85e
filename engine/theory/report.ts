import type { Form } from '../exact/form';
import type { Diagnostic, Expression, Name, Severity, Span } from '../language/tree';
import type { Refusal } from '../lie/refusal';

/** Where a stage puts the problems it finds. */
export type Report = (diagnostic: Diagnostic) => void;

/** A problem by its code; the words are in `language/wording-theory`. */
export function problem(
  code: string,
  span: Span,
  data: Readonly<Record<string, string>> = {},
  severity: Severity = 'error',
): Diagnostic {
  return { code, span, severity, data };
}

/** What `lie/` refuses comes with its own words. */
export function refused(refusal: Refusal, span: Span): Diagnostic {
  return problem('refused', span, { what: refusal.what, why: refusal.why, remedy: refusal.remedy });
}

/** Names in an expression that no `let` gives a value. */
export function unknownNames(expression: Expression, parameters: ReadonlyMap<string, Form>): readonly Name[] {
  return expression.names.filter(({ name }) => !parameters.has(name));
}
