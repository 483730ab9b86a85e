import { expect, test } from 'vitest';
import { row } from '../spheres/fixture';
import { answer, failureOf } from './answers';

const theory = (...lines: string[]) => ['theory t', ...lines.map((line) => `  ${line}`), ''];

// The Virasoro algebra gives the value: test/fixtures/spheres/spheres.py.
test('an instanton coefficient to 40 digits, exactly, and by other terms', () => {
  const result = answer(
    ...theory('sphere S4, b = 3/5', 'gauge G = SU(2)'),
    'value instanton2 of t at sigma = 2i/7, 40 digits',
  );
  if (result.kind !== 'value') throw new Error(failureOf(result));
  const [numerator, denominator] = (row('nekrasov-SU2-2').exact ?? '').split('/').map(BigInt) as [bigint, bigint];
  expect(result.notes[0]).toBe(`Exactly $\\frac{${numerator}}{${denominator}}$.`);
  const digits = `${(numerator * 10n ** 45n) / denominator}`;
  expect(result.value.re.replace(/^0\.0*/, '').slice(0, 39)).toBe(digits.slice(0, 39));
  expect(result.value.im).toBe('0');
  expect(result.crossCheck).toEqual({ route: 'the sum with b and 1/b exchanged', agrees: '40 digits' });
});

// S^3 and the others have no such series; orders run from 1.
test('what cannot be had is said', () => {
  const at = (request: string, lines: string[] = theory('sphere S4', 'gauge G = SU(2)')) =>
    failureOf(answer(...lines, request));
  expect(at('value instanton1 of t')).toBe('Without a value: sigma. Add `at sigma = 0.3`.');
  expect(at('value instanton1 of t at sigma = i')).toBe(
    'The point is a pole of this coefficient. Move it off the pole.',
  );
  expect(at('value log instanton1 of t at sigma = 1')).toBe('A coefficient is given by itself; leave out `log`.');
  expect(at('value instanton0 of t at sigma = 1')).toContain('`instanton0` is no quantity of `t`; there are');
  expect(at('plot instanton1 of t over sigma = 0 .. 1')).toContain('is a coefficient, which has no curve here');
  const three = theory('sphere S3', 'gauge G = SU(2)');
  expect(at('value instanton1 of t at sigma = 1', three)).toContain('`instanton1` is no quantity of `t`');
  expect(at('value instanton60 of t at sigma = 1')).toContain('too many Young diagrams with 60 boxes');
});
