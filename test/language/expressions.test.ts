// Values: Python 3.11.7 with exact fractions (test/fixtures/language/expressions.py). Forms with functions: elementary identities.
import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import fixture from '../fixtures/language/expressions.json';
import { formOf, onlyBlock, problemsOf } from './reading';

const at = new Map(
  Object.entries(fixture.at).map(([name, value]) => [name, Form.number(Rational.parse(value) ?? Rational.zero)]),
);

describe('expressions are read exactly', () => {
  test.each(fixture.expressions)('$text', ({ text, re, im }) => {
    const value = formOf(text)
      .substitute((name) => at.get(name) ?? null)
      .toGaussian();
    expect({ re: value?.re.toString(), im: value?.im.toString() }).toEqual({ re, im });
  });
});

describe('numbers', () => {
  const cases = { '3': '3', '1/3': '1/3', '0.25': '1/4', '1.5e-3': '3/2000', '.5': '1/2', '2E3': '2000', '007': '7' };
  test.each(Object.entries(cases))('%s', (text, value) => {
    expect(formOf(text).toRational()?.toString()).toBe(value);
  });

  test('a letter e without digits is no exponent', () => {
    const e = Form.atom({ kind: 'constant', name: 'e', key: 'e' });
    expect(formOf('2e').key).toBe(e.scale(2).key);
    expect(formOf('2exp(1)').key).toBe(e.scale(2).key);
  });
});

describe('names and constants', () => {
  test.each([
    ['pi', 'π'],
    ['sigma1', 'σ1'],
    ["zeta'", "ζ'"],
    ['Omega', 'Ω'],
    ['mu_2', 'µ_2'],
    ['2*x', '2·x'],
    ['a - b', 'a − b'],
    ['n*(n + 1)', 'n(n+1)'],
    ['e^(2x)', 'exp(2x)'],
  ])('%s is %s', (one, other) => {
    expect(formOf(one).key).toBe(formOf(other).key);
  });

  test('the imaginary unit squares to -1', () => {
    expect(formOf('i^2').key).toBe('-1');
  });

  test('Greek capitals that look Latin are other names', () => {
    expect(formOf('Α').symbols()).toEqual(['Alpha']);
    expect(formOf('A').symbols()).toEqual(['A']);
  });

  test('names are listed with their places', () => {
    const { value } = onlyBlock('let', "let v = 2σ + sqrt(r')*pi - r'");
    expect(value.names.map(({ name, span }) => [name, span.from])).toEqual([
      ['sigma', 9],
      ["r'", 18],
      ["r'", 27],
    ]);
    expect(value.text).toBe("2σ + sqrt(r')*pi - r'");
  });
});

describe('functions', () => {
  test.each([
    ['sqrt(8)', '2sqrt(2)'],
    ['sqrt(2)^2', '2'],
    ['sqrt(1/2)', 'sqrt(2)/2'],
    ['2^(1/2)', 'sqrt(2)'],
    ['(-1)^(1/2)', 'i'],
    ['abs(-3/4)', '3/4'],
    ['exp(0)', '1'],
    ['log(1)', '0'],
    ['cos(0) + sin(0) + tan(0)', '1'],
    ['cosh(0) - sinh(0) - tanh(0)', '1'],
    ['exp(1)', 'e'],
  ])('%s = %s', (one, other) => {
    expect(formOf(one).key).toBe(formOf(other).key);
  });

  test('stay functions where there is no exact value', () => {
    expect(formOf('sinh(pi*r)').key).toBe('1*sinh(1*pi*r)');
    expect(formOf('1/(1+b)').symbols()).toEqual(['b']);
  });
});

describe('bounds', () => {
  const nested = (depth: number) => `${'('.repeat(depth)}1${')'.repeat(depth)}`;
  test('deep nesting is refused, moderate nesting is not', () => {
    expect(problemsOf(`let r = ${nested(64)}`)).toEqual([]);
    expect(problemsOf(`let r = ${nested(65)}`)).toEqual(['expression-too-deep 1:74']);
    expect(problemsOf(`let r = ${nested(100_000)}`)).toEqual(['expression-too-deep 1:74']);
    expect(problemsOf(`let r = ${'2^'.repeat(50_000)}2`)).toEqual(['expression-too-deep 1:139']);
    expect(problemsOf(`let r = ${'sqrt('.repeat(50_000)}2`)).toHaveLength(1);
    expect(formOf(`${'-'.repeat(50_001)}2`).key).toBe('-2');
  });

  test.each([
    ['10^10^10', 'exponent-too-large'],
    ['x^1000', 'exponent-too-large'],
    ['((9^256)^256)^256', 'number-too-large'],
    ['1e9999', 'number-too-large'],
    ['1e99999', 'number-too-long'],
    ['9'.repeat(5000), 'number-too-long'],
    ['(a+b+c+d+e1+f)^60', 'expression-too-large'],
    ['(a+b)*'.repeat(200).concat('1'), 'expression-too-large'],
    [`${Array.from({ length: 14 }, (_, k) => `(a${k}+b${k})`).join('')}`, 'expression-too-large'],
    [Array.from({ length: 5000 }, (_, k) => `a${k}`).join('+'), 'expression-too-large'],
    [Array.from({ length: 5000 }, (_, k) => `a${k}`).join('*'), 'expression-too-large'],
  ])('%s is refused', (text, code) => {
    expect(problemsOf(`let r = ${text}`)).toEqual([expect.stringMatching(`^${code} 1:`)]);
  });

  test('what formulas of the field need is not refused', () => {
    expect(formOf('(n+1)(n+2)(n+3)(n+4)(n+5)(n+6)(n+7)(n+8)(2n+9)/362880').terms).toHaveLength(10);
    expect(formOf('(a+b+c)^8').terms).toHaveLength(45);
    expect(formOf('2^256').toRational()?.numerator).toBe(2n ** 256n);
    expect(formOf(`0.${'3'.repeat(1000)}`).toRational()?.denominator).toBe(10n ** 1000n);
  });
});
