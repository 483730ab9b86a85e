import { readFileSync } from 'node:fs';
import Decimal from 'decimal.js';
import { describe, expect, test } from 'vitest';
import type { ValueResult } from '../../engine/requests/result';
import { answer, answers, failureOf } from './answers';

const Exact = Decimal.clone({ precision: 400, maxE: 9e15, minE: -9e15 });

/** Values made with mpmath from weights listed by hand: test/fixtures/requests/generate.py. */
const fixture: { rows: readonly { id: string; text: string; value: readonly [string, string] }[]; digits: number } =
  JSON.parse(readFileSync(new URL('../fixtures/requests/values.json', import.meta.url), 'utf8'));

function numberOf(...lines: readonly string[]): ValueResult {
  const result = answer(...lines);
  if (result.kind !== 'value') throw new Error(`${lines.join('\n')}: ${failureOf(result)}`);
  return result;
}

/** Weight of the last digit printed. */
function lastPlace(text: string): Decimal {
  const [digits = '', exponent = '0'] = text.split('e');
  return new Exact(10).pow(Number(exponent) - (digits.split('.')[1]?.length ?? 0));
}

const significant = (text: string) => text.replace(/e.*$/, '').replace(/[-.]/g, '').replace(/^0+/, '').length;

describe('every printed digit is right', () => {
  test.each(fixture.rows.map((row) => [row.id, row] as const))('%s', (_id, { text, value }) => {
    const result = numberOf(text);
    const { re, im, error } = result.value;
    const [x, y] = value.map((part) => new Exact(part)) as [Decimal, Decimal];
    const size = x.abs().plus(y.abs());
    // The reference has 46 digits of the larger part.
    const slack = size.times('1e-44');
    const parts: [string, Decimal][] = [
      [re, x],
      [im, y],
    ];
    for (const [printed, wanted] of parts) {
      if (printed === '0') continue;
      expect(new Exact(printed).minus(wanted).abs().lte(lastPlace(printed).plus(slack)), printed).toBe(true);
    }
    const off = new Exact(re).minus(x).pow(2).plus(new Exact(im).minus(y).pow(2)).sqrt();
    expect(off.lte(new Exact(error).plus(slack)), `${off} against ${error}`).toBe(true);
    expect(Math.max(significant(re), significant(im))).toBe(40);
    // The bound is worth having: below the fortieth digit of the value, up to a factor of a hundred.
    expect(new Exact(error).lte(size.times('1e-38'))).toBe(true);
    if (result.crossCheck) expect(result.crossCheck.agrees).toMatch(/^(39|40) digits$/);
  });

  test('one wrong digit would be seen', () => {
    const [row] = fixture.rows;
    const { re } = numberOf(row?.text ?? '').value;
    const wrong = re.replace(/\d$/, (d) => `${(Number(d) + 5) % 10}`);
    expect(
      new Exact(wrong)
        .minus(row?.value[0] ?? '0')
        .abs()
        .lte(lastPlace(wrong)),
    ).toBe(false);
  });

  test('different numbers of digits agree', () => {
    const texts = [1, 5, 12, 25, 60, 120].map((digits) =>
      numberOf(`value doublesine(0.3 + 0.2i, 5/4), ${digits} digits`),
    );
    const best = new Exact(texts.at(-1)?.value.re ?? '0');
    for (const { value, digits } of texts) {
      expect(new Exact(value.re).minus(best).abs().lte(lastPlace(value.re))).toBe(true);
      expect(significant(value.re)).toBeLessThanOrEqual(digits);
    }
  });
});

const lines = ['theory t', '  sphere S3', '  gauge G = U(2), fi zeta', '  flavor F = SU(2), mass m', '  matter G F R'];
const theory = [...lines, '  chiral q fund fund 1/3', ''];
const fails = (...requests: string[]) => failureOf(answer(...theory, ...requests));

describe('what is assumed is said', () => {
  test('masses and FI parameters that are not set', () => {
    const result = numberOf(...theory, 'value integrand of t at sigma1 = 1, sigma2 = 2, 10 digits');
    expect(result.notes).toEqual(['Masses not set, taken as zero: m.', 'Parameters not set, taken as zero: zeta.']);
    const set = numberOf(...theory, 'value integrand of t at sigma1 = 1, sigma2 = 2, m = 0, zeta = 0, 10 digits');
    expect(set.notes).toEqual([]);
    expect(set.value).toEqual(result.value);
  });

  test('only what the quantity depends on', () => {
    expect(numberOf(...theory, 'value vector of t at sigma1 = 1, sigma2 = 2, 10 digits').notes).toEqual([]);
  });

  test('digits: as asked for, else as the surroundings say', () => {
    expect(numberOf('value gamma(1/3), 12 digits').digits).toBe(12);
    expect(numberOf('value gamma(1/3)').digits).toBe(30);
  });
});

// Sentences are ours; the mathematics in them: zeros and poles of s_b, section 1 of its docstring's sources.
describe('what is no number is said in words', () => {
  test('Coulomb parameters without a value', () => {
    expect(fails('value one-loop of t at sigma1 = 1')).toMatch(/without a value: sigma2\. Add `at sigma2 = 0\.3`\./i);
  });

  test('a name the theory has not', () => {
    expect(fails('value one-loop of t at sigma3 = 1')).toMatch(
      /no `sigma3`; what can be set is `sigma1`, `sigma2`, `m`/,
    );
  });

  test('a coordinate that follows from the others', () => {
    const su3 = ['theory s', '  sphere S3', '  gauge G = SU(3)', ''];
    expect(failureOf(answer(...su3, 'value vector of s at sigma3 = 1'))).toMatch(/`sigma3` follows from the other/);
  });

  test('a value that has none itself', () => {
    expect(fails('value one-loop of t at sigma1 = x, sigma2 = 1')).toBe(
      '`sigma1` is set to `x`, but `x` has no value.',
    );
  });

  test('a quantity that is not there', () => {
    expect(fails('value p of t at sigma1 = 1, sigma2 = 2')).toMatch(
      /`p` is no quantity of `t`; there are `one-loop`, `vector`, `classical`, `integrand`.*`q`/,
    );
  });

  test('a theory with errors, and none at all', () => {
    expect(failureOf(answer(...lines, '  chiral q fond fund 1/3', '', 'value q of t'))).toBe(
      'The theory `t` has errors; mend them first.',
    );
    expect(failureOf(answer('value q of nowhere'))).toBe('There is no theory `nowhere` in this notebook.');
  });

  test('digits beyond reach', () => {
    expect(failureOf(answer('value gamma(1/3), 5000 digits'))).toBe(
      '5000 digits are out of reach: between 1 and 1000 can be had.',
    );
  });

  // The vector multiplet vanishes on the wall sigma1 = sigma2; a chiral of R = 0 has a pole at weight 0.
  test('zeros are values, poles are not', () => {
    const zero = numberOf(...theory, 'value vector of t at sigma1 = 1, sigma2 = 1');
    expect([zero.value, zero.notes]).toEqual([{ re: '0', im: '0', error: '0' }, ['The point is a zero of order 2.']]);
    expect(fails('value log vector of t at sigma1 = 1, sigma2 = 1')).toMatch(/zero of order 2.*minus infinity/);
    const pole = ['theory p', '  sphere S3', '  gauge G = U(1)', '  matter G R', '  chiral q 1 0', ''];
    expect(failureOf(answer(...pole, 'value q of p at sigma = 0'))).toMatch(/pole of order 1/);
    const both = [...pole.slice(0, -1), '  chiral p 1 2', '  chiral s 1 2', ''];
    expect(failureOf(answer(...pole.slice(0, -1), '  chiral x 2 2', '', 'value one-loop of p at sigma = 0'))).toMatch(
      /meet/,
    );
    expect(numberOf(...both, 'value one-loop of p at sigma = 0').value.re).toBe('0');
  });

  test('arguments of functions', () => {
    const said = (request: string) => failureOf(answer(request));
    expect(said('value gamma(-3)')).toMatch(/pole of order 1/);
    expect(said('value doublesine(-i, 1)')).toMatch(/zero of order 1/);
    expect(said('value gamma(x)')).toMatch(/No value for x/);
    expect(said('value gamma(10^30)')).toMatch(/out of reach/);
  });

  test('a failed request does not stop the others', () => {
    const results = answers(...theory, 'value p of t', '', 'value gamma(1/2), 10 digits');
    expect(results.map(({ kind }) => kind)).toEqual(['failure', 'value']);
  });
});

describe('one and the same number', () => {
  // s_b(x) s_b(-x) = 1 and s_b = s_{1/b}: Faddeev, Kashaev, Volkov 2001, hep-th/0006156.
  test('from either side of a law', () => {
    const [a, b] = ['5/4', '4/5'].map((p) => numberOf(`value doublesine(1/3+i/7, ${p}), 30 digits`).value);
    expect(a).toEqual(b);
    const [plus, minus] = ['1/3+i/7', '-1/3-i/7'].map(
      (x) => numberOf(`value log doublesine(${x}, 5/4), 30 digits`).value,
    );
    expect(minus).toEqual({ ...plus, re: negated(plus?.re), im: negated(plus?.im) });
  });

  test('with Greek letters and with names', () => {
    const [a, b] = ['σ1 = 1/2, σ2 = 1/3', 'sigma1 = 1/2, sigma2 = 1/3'].map((at) =>
      numberOf(...theory, `value q of t at ${at}, m = 1/9, 20 digits`),
    );
    expect(a?.value).toEqual(b?.value);
  });

  test('through parameters', () => {
    const lets = ['let s = 1/4', 'let u = 2s', ''];
    const [a, b] = ['u', '1/2'].map((x) =>
      numberOf(...lets, ...theory, `value q of t at sigma1 = ${x}, sigma2 = s, m = 0`),
    );
    expect(a?.value).toEqual(b?.value);
  });
});

function negated(text: string | undefined): string | undefined {
  return text?.startsWith('-') ? text.slice(1) : `-${text}`;
}
