import katex from 'katex';
import { expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { formLatex } from '../../engine/latex/form';
import { escapeText, symbolLatex } from '../../engine/latex/symbol';

// Names as papers set them: common practice, no source.
test.each([
  ['sigma', '\\sigma'],
  ['sigma1', '\\sigma_1'],
  ['sigma12', '\\sigma_{12}'],
  ["sigma'", "\\sigma'"],
  ["sigma'2", "\\sigma'_2"],
  ["m''3", "m''_3"],
  ['m', 'm'],
  ['m_q', 'm_q'],
  ['m_qt', 'm_{\\mathrm{qt}}'],
  ['m1_q', 'm_{1,q}'],
  ['m_sigma', 'm_{\\sigma}'],
  ['mass', '\\mathrm{mass}'],
  ['mass2', '\\mathrm{mass}_2'],
  ['Gamma', '\\Gamma'],
  ['omicron', '\\mathrm{omicron}'],
  ['flux1', '\\mathrm{flux}_1'],
  ['@b', 'b'],
  ['@Q', 'Q'],
  ['0:sigma_a', '\\sigma_a'],
  ["@tr:sigma'", "\\operatorname{tr}\\sigma'"],
  ['a_b_c', '\\mathrm{a\\_b\\_c}'],
])('%s is %s', (name, latex) => {
  expect(symbolLatex(name)).toBe(latex);
});

/** Names of every shape a user may type: letters, digits, primes, underscores. */
const names = ['m', "m'", "m'1", "m1'", 'm_1', "m'_q", 'mu', "mu''2", 'mass', 'm_a_b', 'x_1_2', "theta1'", "T'", 'e1'];

test('every name can be set, raised to a power, inverted, and multiplied', () => {
  for (const name of names) {
    const x = Form.symbol(name);
    for (const form of [x, x.pow(2), x.pow(12), x.inverse(), x.pow(-2), x.pow(2).mul(Form.symbol('r')).add(x)]) {
      const latex = formLatex(form);
      expect(() => katex.renderToString(latex, { throwOnError: true, strict: 'error' }), latex).not.toThrow();
    }
  }
});

test('text is escaped where it would mean something', () => {
  expect(escapeText('a_b & 50% #1 {x} $y$')).toBe('a\\_b \\& 50\\% \\#1 \\{x\\} \\$y\\$');
  expect(escapeText('plain text')).toBe('plain text');
});
