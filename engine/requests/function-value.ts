import { formatBall } from '../arithmetic/decimal-text';
import { formDouble } from '../arithmetic/form-double';
import type { Form } from '../exact/form';
import type { SpecialFunction } from '../functions/special-function';
import { functions } from '../functions/table';
import type { Quantity } from '../language/tree';
import { evaluatePrecise } from '../numeric/precise';
import type { TheoryProduct } from '../spheres/sphere';
import { agreedDigits, agreement } from './agreement';
import type { Analysis } from './analysis';
import { type Answer, failure } from './answer';
import type { ValueResult } from './result';
import { isValueFunction, valueFunctionAnswer } from './value-function';

type FunctionQuantity = Extract<Quantity, { kind: 'function' }>;

/** A special function of given arguments as a product of one factor; a string says why it cannot be had. */
export function functionProduct(
  quantity: FunctionQuantity,
  values: (name: string) => Form | null,
): TheoryProduct | string {
  const word = quantity.function.name;
  const declared = Object.values(functions).find(({ spelling }) => spelling === word);
  if (!declared) return `\`${word}\` is not offered yet.`;
  const expected = 1 + declared.parameters.length;
  if (quantity.arguments.length !== expected) {
    return `\`${word}\` takes ${expected} arguments; ${quantity.arguments.length} were given.`;
  }
  const [argument, ...parameters] = quantity.arguments.map(({ form }) => form.substitute(values));
  if (!argument) return `\`${word}\` needs an argument.`;
  if (declared.outsideParameters) {
    const says = outsideWords(declared, parameters);
    if (says !== null) return `\`${word}\` is not defined here: ${says}.`;
  }
  const outside = declared.outsideParameters ? -1 : parameters.findIndex((form) => !positive(form));
  if (outside >= 0) {
    const typed = quantity.arguments[outside + 1]?.text ?? '';
    return `\`${word}\` is defined for \`${declared.parameters[outside]}\` with positive real part; \`${typed}\` has none.`;
  }
  return [{ name: declared.name, argument, parameters, power: 1, weights: null, half: false, from: [] }];
}

/** Periods need a positive real part; one with free names passes, and is looked at when they have values. */
function positive(form: Form): boolean {
  const value = formDouble(form, () => null);
  return value === null || (value.re > 0 && Number.isFinite(value.re));
}

/** What the function says of its parameters; those with free names pass. */
function outsideWords({ outsideParameters }: SpecialFunction, parameters: readonly Form[]): string | null {
  const values = parameters.flatMap((form) => formDouble(form, () => null) ?? []);
  return values.length < parameters.length ? null : (outsideParameters?.(values) ?? null);
}

/** `value doublesine(0.3 + 0.2i, 5/4), 50 digits`. */
export function functionValue(analysis: Analysis, quantity: FunctionQuantity, digits: number): Answer {
  const of = quantity.function.name;
  const values = (name: string) => analysis.values.get(name) ?? null;
  if (isValueFunction(of)) return valueFunctionAnswer(of, quantity, values, digits);
  const product = functionProduct(quantity, values);
  if (typeof product === 'string') return failure(of, product);
  const value = evaluatePrecise(product, values, digits);
  switch (value.kind) {
    case 'value': {
      const other = evaluatePrecise(product, values, digits, 'second');
      const confirmed = other.kind === 'value' && other.route !== null;
      return {
        kind: 'value',
        of,
        notes: [],
        value: formatBall(quantity.log ? value.log : value.value, digits),
        digits,
        crossCheck: confirmed ? agreement(other.route ?? '', agreedDigits(value.value, other.value, digits)) : null,
      } satisfies Answer<ValueResult>;
    }
    case 'zero':
    case 'pole':
      return failure(of, `The argument is a ${value.kind} of order ${value.order}.`);
    case 'unset':
      return failure(of, `No value for ${value.names.join(', ')}; give it with \`let\`.`);
    case 'meeting':
    case 'indistinct':
      return failure(of, 'The argument cannot be told from a pole or a zero. Give it exactly, or move it away.');
    case 'outside':
      return failure(of, `${value.why}.`);
    case 'unreachable':
      return failure(
        of,
        `The value is out of reach: ${value.why ?? 'an argument is undefined, or outside the domain of the function'}.`,
      );
  }
}
