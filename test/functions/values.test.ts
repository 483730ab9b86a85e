import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import type { ExactParameter } from '../../engine/functions/special-function';
import type { FunctionValue } from '../../engine/functions/value-function';
import { type ValueFunctionWord, valueFunctions } from '../../engine/functions/values';
import fixture from '../fixtures/functions/values.json';
import { exactParameter, fixedFromText, unitsOff } from './fixed-text';

function argument(text: string): ExactParameter {
  const [re, im] = text.split(',').map((part) => Form.number(Rational.parse(part) as Rational));
  return exactParameter(im ? (re as Form).add(Form.i.mul(im)) : (re as Form));
}

function units(value: FunctionValue, other: { re: bigint; im: bigint }, bits: number): number {
  if (value.kind !== 'value') throw new Error(value.kind);
  return unitsOff(value, other, bits, value.of === 'logarithm');
}

const rows = fixture.rows.map(
  (row) =>
    [
      row.function as ValueFunctionWord,
      row.arguments.join('; '),
      row.arguments,
      row.value as [string, string],
    ] as const,
);

// Source of the fixture: mpmath; see the generator beside it.
describe.each([60, 180, 380])('%i bits', (bits) => {
  test.each(rows)('%s(%s): the error stated is kept', (word, _text, args, wanted) => {
    const value = valueFunctions[word].evaluate(args.map(argument), bits);
    const exact = { re: fixedFromText(wanted[0], bits), im: fixedFromText(wanted[1], bits) };
    const bound = value.kind === 'value' ? Number(value.error) : -1;
    // The fixture has 120 significant digits.
    const printed = Math.abs(Number(wanted[0])) * 10 ** (1 - fixture.digits) * 2 ** bits;
    expect(units(value, exact, bits)).toBeLessThanOrEqual(bound + 1 + printed);
    expect(bound).toBeLessThan(1000);
  });

  test.each(rows)('%s(%s): the second route agrees', (word, _text, args) => {
    const one = valueFunctions[word].evaluate(args.map(argument), bits);
    const two = valueFunctions[word].crossCheck(args.map(argument), bits);
    if (one.kind !== 'value' || two?.value.kind !== 'value') throw new Error(`${one.kind}, ${two?.value.kind}`);
    expect(units(one, two.value, bits)).toBeLessThanOrEqual(Number(one.error + two.value.error));
  });
});

describe('where there is no value', () => {
  const kind = (word: ValueFunctionWord, ...args: string[]): string =>
    valueFunctions[word].evaluate(args.map(argument), 100).kind;

  test('zeta(1, a) is a pole; zeta(s, -n) is undefined', () => {
    expect(kind('hurwitz', '1', '1/3')).toBe('pole');
    expect(kind('hurwitz', '2', '-3')).toBe('outside');
    expect(kind('hurwitz', '-2', '-3')).toBe('value');
  });

  test('poles and exact zeros', () => {
    expect(kind('digamma', '-3')).toBe('pole');
    expect(kind('polygamma', '2', '0')).toBe('pole');
    expect(kind('polylog', '1', '1')).toBe('pole');
    expect(kind('polylog', '-3', '1')).toBe('pole');
    expect(kind('clausen', '1', '0')).toBe('pole');
    expect(kind('riemannzeta', '1')).toBe('pole');
    const zero = (word: ValueFunctionWord, ...args: string[]): unknown =>
      valueFunctions[word].evaluate(args.map(argument), 100);
    const exact = { kind: 'value', of: 'value', re: 0n, im: 0n, error: 0n };
    expect(zero('riemannzeta', '-4')).toEqual(exact);
    expect(zero('barnesg', '-2')).toEqual(exact);
    expect(zero('polylog', '-2', '-1')).toEqual(exact);
    expect(zero('polylog', '-6', '-1')).toEqual(exact);
    expect(kind('polylog', '-3', '-1')).toBe('value');
    expect(zero('clausen', '4', '0')).toEqual(exact);
    expect(zero('qpochhammer', '1', '1/3')).toEqual(exact);
    expect(zero('qpochhammer', '9/4', '-2/3')).toEqual(exact);
  });

  test('Clausen functions at multiples of pi', () => {
    const at = (order: number, angle: Form): FunctionValue =>
      valueFunctions.clausen.evaluate([exactParameter(Form.ratio(order, 1)), exactParameter(angle)], 100);
    const exact = { kind: 'value', of: 'value', re: 0n, im: 0n, error: 0n };
    expect(at(2, Form.pi)).toEqual(exact);
    expect(at(4, Form.pi.scale(-6))).toEqual(exact);
    expect(at(1, Form.pi.scale(2)).kind).toBe('pole');
    expect(at(3, Form.pi).kind).toBe('value');
  });

  test('arguments outside the domain', () => {
    expect(kind('polygamma', '1/2', '1')).toBe('outside');
    expect(kind('polygamma', '-1', '1')).toBe('outside');
    expect(kind('polylog', '3/2', '1/2')).toBe('outside');
    expect(kind('clausen', '2', '1,1')).toBe('outside');
    expect(kind('zetaprime', '1', '-2')).toBe('outside');
    expect(kind('qpochhammer', '1/2', '1')).toBe('outside');
    expect(kind('barnesg', '20000')).toBe('outside');
  });

  test('Gamma_N at -n.w, and periods in no half plane', () => {
    expect(kind('barnesgamma', '0', '1', '2')).toBe('indistinct');
    expect(kind('barnesgamma', '-5/2', '1', '3/2')).toBe('indistinct');
    expect(kind('barnesgamma', '1', '1', '-1')).toBe('outside');
  });
});
