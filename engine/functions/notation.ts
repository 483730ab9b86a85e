import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import type { Printer } from './special-function';

/** Small pieces of LaTeX that the notations of several functions share. */

/** `(...)`, with delimiters that grow when there is a fraction inside. */
export function parenthesised(inner: string): string {
  return inner.includes('\\frac') ? `\\left(${inner}\\right)` : `(${inner})`;
}

/** True when the text is a sum or carries a sign, outside all brackets. */
export function isSum(text: string): boolean {
  let depth = 0;
  for (const [token] of text.matchAll(/\\(?:pm|mp)(?![A-Za-z])|[\s\S]/g)) {
    if ('({['.includes(token)) depth++;
    else if (')}]'.includes(token)) depth--;
    else if (depth === 0 && ['+', '-', '\\pm', '\\mp'].includes(token)) return true;
  }
  return false;
}

/** The text, in parentheses when it is a sum. */
export function asFactor(text: string): string {
  return isSum(text) ? parenthesised(text) : text;
}

/** pi times a form, pi in front: `\pi b(\sigma_1-\sigma_2)`, `\frac{\pi\sigma}{b}`. */
export function piTimes(form: Form, print: Printer): string {
  return print.form(Form.pi.mul(form));
}

/** The argument of sinh or cosh of pi times a form, in parentheses unless it reads `\pi(...)`. */
export function hyperbolicArgument(form: Form, print: Printer): string {
  const text = piTimes(form, print);
  return /^\\pi(\\left)?\(/.test(text) ? text : parenthesised(text);
}

/** `lead + form` with real terms first and the sign of each; `lead` alone when the form is zero. */
export function plus(lead: string, form: Form, print: Printer): string {
  if (form.isZero()) return lead;
  const text = realFirst(form, print);
  return /^(-|\\pm|\\mp)/.test(text) ? `${lead}${text}` : `${lead}+${text}`;
}

/** A form with its real terms before the imaginary ones: `1-r+i\sigma`. */
export function realFirst(form: Form, print: Printer): string {
  const real = form.split().filter((term) => term.terms.every(({ coefficient }) => coefficient.isReal()));
  const rest = form.sub(Form.sum(real));
  if (real.length === 0 || rest.isZero()) return print.form(form);
  const tail = print.form(rest);
  return `${print.form(Form.sum(real))}${/^(-|\\pm|\\mp)/.test(tail) ? '' : '+'}${tail}`;
}

/** `mb+nb^{-1}` or `m+n`: indices times periods; a period 1 is not written, rational ones stand in front. */
export function indexSum(indices: readonly string[], periods: readonly Form[], print: Printer): string {
  const terms = periods.map((period, k) => {
    const index = indices[k] as string;
    const rational = period.toRational();
    if (rational?.equals(Rational.one)) return index;
    const text = periodText(period, print);
    return rational ? `${text}${index}` : `${index}${asFactor(text)}`;
  });
  return terms.join('+');
}

/** `(lead+x)(lead+y)`, a square where both are the same. */
export function pairOfModes(lead: string, x: Form, y: Form, print: Printer): string {
  const [one, two] = [x, y].map((form) => parenthesised(plus(lead, form, print))) as [string, string];
  return one === two ? `${one}^{2}` : one + two;
}

/** A period; the inverse of a symbol as a power, `b^{-1}`. */
export function periodText(period: Form, print: Printer): string {
  const text = print.form(period);
  const inverse = /^\\frac\{1\}\{([A-Za-z])\}$/.exec(text);
  return inverse ? `${inverse[1]}^{-1}` : text;
}
