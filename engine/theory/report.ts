import { type Form, FormError } from '../exact/form';
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

/** An expression at the parameters' values; null, and a report, where they leave it undefined (a division by zero). */
export function valueAt(
  { form, span, text }: Expression,
  parameters: ReadonlyMap<string, Form>,
  report: Report,
): Form | null {
  try {
    return form.substitute((name) => parameters.get(name) ?? null);
  } catch (error) {
    if (!(error instanceof FormError)) throw error;
    report(problem('value-undefined', span, { text }));
    return null;
  }
}
