import { Form } from '../../exact/form';
import { Rational } from '../../exact/rational';
import type { Printer } from '../../functions/special-function';
import type { TheoryGroup } from '../theory';

/** Pieces of the sentences that conditions say; LaTeX without the dollar signs unless told otherwise. */

export function nameLatex(name: string, print: Printer): string {
  return print.form(Form.symbol(name));
}

/** `G=\mathrm{U}(2)`. */
export function groupLatex({ name, group }: TheoryGroup, print: Printer): string {
  return `${nameLatex(name, print)}=${group.latex}`;
}

/** Denominators up to this are written as fractions, larger ones as decimals. */
const PLAIN_DENOMINATOR = 100n;

/** `\frac{3}{2}`; `0.70824` (rounded, marked \approx by the caller's wording) where the fraction would be unreadable. */
export function rationalLatex(value: Rational): string {
  if (value.denominator > PLAIN_DENOMINATOR) return decimal(value.toNumber());
  const { numerator, denominator } = value.abs();
  const size = denominator === 1n ? `${numerator}` : `\\frac{${numerator}}{${denominator}}`;
  return value.sign() < 0 ? `-${size}` : size;
}

/** Five significant digits. */
export function decimal(value: number): string {
  return `${Number(value.toPrecision(5))}`.replace(/e([+-]?)\+?(\d+)$/, '\\cdot10^{$1$2}');
}

/** `1+\frac{3}{2}-2` from the terms, zeros included. */
export function sumLatex(terms: readonly Rational[]): string {
  return terms.map((term, k) => (k > 0 && term.sign() >= 0 ? '+' : '') + rationalLatex(term)).join('');
}

/** `a, b and c`. */
export function listWords(words: readonly string[], last = 'and'): string {
  if (words.length < 2) return words.join('');
  return `${words.slice(0, -1).join(', ')} ${last} ${words.at(-1)}`;
}

export const half = Rational.of(1, 2);

/** A number given as an integer multiple of 1/scale, or as a double. */
export function scaledLatex(
  value: number,
  { exact, scale }: { readonly exact: boolean; readonly scale: number },
): string {
  return exact && Number.isSafeInteger(value) ? rationalLatex(Rational.of(value, scale)) : decimal(value / scale);
}
