import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { formDouble } from '../../engine/arithmetic/form-double';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { EITHER_SIGN, formInParentheses, formLatex } from '../../engine/latex/form';
import { evaluateLatex } from './evaluate-latex';

const r = Form.symbol('r');
const sigma = Form.symbol('sigma');
const m = Form.symbol('m');
const b = Form.symbol('@b');
const Q = Form.symbol('@Q');
const { i, pi } = Form;
const half = Form.ratio(1, 2);

// The way papers on localisation write arguments: common practice, no source.
test.each([
  [Form.zero, '0'],
  [Form.number(-3), '-3'],
  [Form.ratio(-2, 3), '-\\frac{2}{3}'],
  [i, 'i'],
  [i.neg(), '-i'],
  [i.mul(Form.ratio(3, 2)), '\\frac{3i}{2}'],
  [i.mul(Q).mul(half).mul(Form.one.sub(r)).sub(sigma), '\\frac{iQ}{2}(1-r)-\\sigma'],
  [i.mul(Q).mul(r.scale(2).sub(Form.one)).add(m), 'iQ(2r-1)+m'],
  [pi.mul(b).mul(sigma), '\\pi b\\sigma'],
  [pi.mul(sigma).div(b), '\\frac{\\pi\\sigma}{b}'],
  [m.sub(sigma), 'm-\\sigma'],
  [sigma.add(m).neg(), '-m-\\sigma'],
  [i.mul(sigma.sub(m)), 'i(\\sigma-m)'],
  [r.pow(2).scale(Rational.of(1, 3)), '\\frac{r^2}{3}'],
  [r.pow(-2), '\\frac{1}{r^2}'],
  [Form.call('sqrt', Form.number(2)).scale(3), '3\\sqrt{2}'],
  [Form.call('exp', r), 'e^{r}'],
  [Form.symbol(EITHER_SIGN).mul(sigma).add(Form.one), '1\\pm \\sigma'],
  [Form.symbol(EITHER_SIGN).mul(sigma).neg().add(Form.one), '1\\mp \\sigma'],
])('%s is set as %s', (form, latex) => {
  expect(formLatex(form)).toBe(latex);
});

test('parentheses only where they are needed', () => {
  expect(formInParentheses(sigma)).toBe('\\sigma');
  expect(formInParentheses(sigma.neg())).toBe('(-\\sigma)');
  expect(formInParentheses(m.sub(sigma))).toBe('(m-\\sigma)');
});

describe('what is set has the value of the form', () => {
  const atom = fc.constantFrom(r, sigma, m, pi, b, Q, Form.call('sqrt', Form.number(2)));
  const coefficient = fc
    .tuple(fc.integer({ min: -6, max: 6 }), fc.integer({ min: 1, max: 6 }), fc.constantFrom(Form.one, i))
    .map(([n, d, unit]) => Form.ratio(n, d).mul(unit));
  const monomial = fc
    .tuple(coefficient, fc.array(fc.tuple(atom, fc.constantFrom(1, 1, 2, -1)), { maxLength: 3 }))
    .map(([c, factors]) => factors.reduce((product, [base, power]) => product.mul(base.pow(power)), c));
  const form = fc.array(monomial, { minLength: 1, maxLength: 5 }).map((terms) => Form.sum(terms));

  test('read back by a reader of its own', () => {
    const values = { r: 0.3, '\\sigma': 0.7, m: -0.45 };
    const at = (name: string) => {
      const known: Record<string, number> = { r: 0.3, sigma: 0.7, m: -0.45, '@b': 1.25, '@Q': 2.05 };
      return { re: known[name] ?? Number.NaN, im: 0 };
    };
    fc.assert(
      fc.property(form, (x) => {
        const wanted = formDouble(x, at) ?? { re: Number.NaN, im: 0 };
        const found = evaluateLatex(`(${formLatex(x)})`, { values, b: 1.25 });
        const size = 1 + Math.hypot(wanted.re, wanted.im);
        expect(Math.hypot(found.re - wanted.re, found.im - wanted.im), formLatex(x)).toBeLessThan(1e-10 * size);
      }),
      { numRuns: 200 },
    );
  });
});
