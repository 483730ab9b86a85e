import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { barnesG } from '../../engine/functions/barnes-g';
import fixture from '../fixtures/functions/barnes-g.json';
import { exactParameter, fixedFromText, unitsOff } from './fixed-text';

function argument(text: string) {
  const [re, im] = text.split(',').map((part) => Form.number(Rational.parse(part) as Rational)) as [Form, Form];
  return exactParameter(re.add(Form.i.mul(im)));
}

// Source of the fixture: mpmath, two ways; see the generator beside it.
describe.each([60, 180])('log G(z) at complex z, %i bits', (bits) => {
  test.each(fixture.rows)('$argument: both routes keep the error stated', ({ argument: text, log }) => {
    const wanted = { re: fixedFromText(log[0] as string, bits), im: fixedFromText(log[1] as string, bits) };
    const z = argument(text);
    for (const value of [barnesG.evaluate([z], bits), barnesG.crossCheck([z], bits)?.value]) {
      if (value?.kind !== 'value') throw new Error('no value');
      expect(value.of).toBe('logarithm');
      // The fixture has 60 significant digits.
      const printed = Math.abs(Number(log[0])) * 10 ** (1 - fixture.digits) * 2 ** bits;
      expect(unitsOff(value, wanted, bits, true)).toBeLessThanOrEqual(Number(value.error) + 1 + printed);
      expect(Number(value.error)).toBeLessThan(2000);
    }
  });
});
