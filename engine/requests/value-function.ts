import { type Ball, expBall, logBall, magnitudeAbove } from '../arithmetic/ball';
import { formatBall } from '../arithmetic/decimal-text';
import { bitLength } from '../arithmetic/fixed';
import type { Form } from '../exact/form';
import type { ExactParameter } from '../functions/special-function';
import type { FunctionValue } from '../functions/value-function';
import { type ValueFunctionWord, valueFunctions } from '../functions/values';
import type { Quantity } from '../language/tree';
import { exactParameter } from '../numeric/precise';
import { agreedDigits, agreement } from './agreement';
import { type Answer, failure } from './answer';
import type { ValueResult } from './result';

/** Whether a word names a function that is a value and no factor of products. */
export function isValueFunction(word: string): word is ValueFunctionWord {
  return Object.hasOwn(valueFunctions, word);
}

/** Bits above what the digits need that are tried before a value is given up. */
const MAXIMAL_GUARD = 4096;

/** `value dilog(1/3), 50 digits`. */
export function valueFunctionAnswer(
  word: ValueFunctionWord,
  quantity: Extract<Quantity, { kind: 'function' }>,
  values: (name: string) => Form | null,
  digits: number,
): Answer {
  const declared = valueFunctions[word];
  const forms = quantity.arguments.map(({ form }) => form.substitute(values));
  if (forms.length < declared.least || forms.length > declared.most) {
    return failure(word, `\`${word}\` does not take ${forms.length} arguments.`);
  }
  const [open] = forms.flatMap((form) => form.symbols());
  if (open !== undefined) return failure(word, `No value for \`${open}\`; give it with \`let\`.`);
  const args = forms.map(exactParameter);
  const found = settle((bits) => declared.evaluate(args, bits), digits);
  if (typeof found === 'string') return failure(word, found);
  const value = quantity.log ? logBall(found, precision(digits)) : found;
  if (value === null) return failure(word, 'The value cannot be told from zero, so that its logarithm is not known.');
  return {
    kind: 'value',
    of: word,
    notes: [],
    value: formatBall(value, digits),
    digits,
    crossCheck: confirmed(word, args, found, digits),
  } satisfies Answer<ValueResult>;
}

function precision(digits: number): number {
  return Math.ceil(digits * Math.log2(10)) + 32;
}

/** The value with the bits that its digits need; a string says why there is none. */
function settle(evaluate: (bits: number) => FunctionValue, digits: number): Ball | string {
  const needed = precision(digits);
  for (let guard = 16; guard <= MAXIMAL_GUARD; guard *= 2) {
    const bits = needed + guard;
    const value = evaluate(bits);
    if (value.kind === 'pole') return 'The argument is a pole.';
    if (value.kind === 'outside') return value.says;
    if (value.kind === 'indistinct') continue;
    const ball: Ball = { re: value.re, im: value.im, bits, error: value.error };
    const result = value.of === 'logarithm' ? expBall(ball, needed + 8) : ball;
    if (result === null) continue;
    if (result.error === 0n && result.re === 0n && result.im === 0n) return result;
    if (bitLength(magnitudeAbove(result)) - bitLength(result.error) >= needed - 28) return result;
  }
  return 'The argument cannot be told from a pole or a zero. Give it exactly, or move it away.';
}

function confirmed(
  word: ValueFunctionWord,
  args: readonly ExactParameter[],
  value: Ball,
  digits: number,
): ValueResult['crossCheck'] {
  // A value known to be zero was not computed.
  if (value.error === 0n && value.re === 0n && value.im === 0n) return null;
  let route: string | null = null;
  const other = settle((bits) => {
    const second = valueFunctions[word].crossCheck(args, bits);
    route = second?.route ?? null;
    return second?.value ?? { kind: 'outside', says: '' };
  }, digits);
  if (route === null || typeof other === 'string') return null;
  return agreement(route, agreedDigits(value, other, digits));
}
