import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import type { FunctionName } from '../../engine/functions/special-function';
import { logDerivative, logDerivativeDouble } from '../../engine/numeric/log-derivative';

/* Values by mpmath, by formulas of the literature: test/fixtures/numeric/log-derivative.py says which. */
interface Row {
  readonly name: FunctionName;
  readonly re: string;
  readonly im: string;
  readonly parameters: readonly string[];
  readonly order: 1 | 2;
  readonly value: readonly [string, string];
}
const file = new URL('../fixtures/numeric/log-derivative.json', import.meta.url);
const { rows } = JSON.parse(readFileSync(file, 'utf8')) as { rows: readonly Row[] };

const rational = (text: string) => {
  const [numerator, denominator = '1'] = text.split('/');
  return Form.number(Rational.of(BigInt(numerator ?? ''), BigInt(denominator)));
};
/** A decimal as an integer over 2^bits, cut. */
const fixed = (text: string, bits: number): bigint => {
  const [, sign, whole = '', after = ''] = /^(-?)(\d+)\.(\d+)$/.exec(text) ?? [];
  const cut = (BigInt(whole + after) << BigInt(bits)) / 10n ** BigInt(after.length);
  return sign ? -cut : cut;
};

describe.each(rows)(
  '$name at $re + $im i, $parameters, derivative $order',
  ({ name, re, im, parameters, order, value }) => {
    const argument = rational(re).add(Form.i.mul(rational(im)));
    const periods = parameters.map(rational);

    test.each([50, 130])('to %i bits', (bits) => {
      const found = logDerivative(name, argument, periods, order, bits);
      if (found === null || 'zeroOrder' in found) throw new Error('No value.');
      const [trueRe, trueIm] = [fixed(value[0], bits + 8), fixed(value[1], bits + 8)];
      const off = Math.hypot(Number((found.re << 8n) - trueRe), Number((found.im << 8n) - trueIm)) / 256;
      expect(found.bits).toBe(bits);
      expect(found.error).toBe(1n);
      expect(off).toBeLessThanOrEqual(1);
    });

    test('in doubles', () => {
      const found = logDerivativeDouble(name, argument, periods, order);
      const size = Math.max(1, Math.hypot(Number(value[0]), Number(value[1])));
      expect(Math.hypot((found?.re ?? NaN) - Number(value[0]), (found?.im ?? NaN) - Number(value[1]))).toBeLessThan(
        1e-12 * size,
      );
    });
  },
);

describe('where there is no derivative', () => {
  test('a zero and a pole say their order', () => {
    expect(logDerivative('gamma', Form.number(-2), [], 1, 60)).toEqual({ zeroOrder: -1 });
    expect(logDerivative('upsilon', Form.zero, [Form.one], 1, 60)).toEqual({ zeroOrder: 1 });
  });

  test('too far out there is none', () => {
    expect(logDerivative('tripleSine', Form.number(5000), [Form.one, Form.one, Form.one], 1, 60)).toBeNull();
  });
});
