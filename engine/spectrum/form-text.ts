import type { Form } from '../exact/form';

/** A form as plain text for sentences: `1*a + -2*b` is `a - 2*b`. */
export function formText(form: Form): string {
  return form.key.replace(/(?<!\^-?)\b1\*/g, '').replace(/\+ -/g, '- ');
}
