// Print forms are our own; that they are LaTeX is checked with KaTeX.
import katex from 'katex';
import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { parseNotebook } from '../../engine/language/parse';
import type { SpectrumBlock } from '../../engine/language/tree';
import { multiplicityLatex, sumLatex } from '../../engine/latex/polynomial';
import { type SpectrumPieces, spectrumPieces } from '../../engine/latex/spectrum-card';
import { polynomialIn } from '../../engine/spectrum/polynomial';
import { readSpectrum } from '../../engine/spectrum/read';
import { spectrumView } from '../../engine/spectrum/view';
import { parseForm } from '../spectrum/parse-form';

function pieces(lines: readonly string[], parameters: ReadonlyMap<string, Form> = new Map()): SpectrumPieces {
  const { blocks } = parseNotebook(`spectrum own\n${lines.map((line) => `  ${line}\n`).join('')}`);
  const block = blocks.find((b): b is SpectrumBlock => b.kind === 'spectrum');
  if (!block) throw new Error('no spectrum');
  return spectrumPieces(spectrumView(readSpectrum(block, parameters).spectrum));
}

function latexOf(shown: SpectrumPieces, which: keyof SpectrumPieces['formulas']): string {
  const formula = shown.formulas[which];
  return formula.kind === 'formula' ? formula.latex : formula.remark.code;
}

const chiral = [
  'index n >= 0',
  'complex boson (n+Delta-i*sigma)(n+2-Delta+i*sigma) times (n+1)^2',
  'fermion n+2-Delta+i*sigma times (n+1)(n+2)',
  'fermion n+1+Delta-i*sigma times (n+1)(n+2)',
];

const examples: readonly (readonly [string, readonly string[], string, string])[] = [
  [
    'a chiral multiplet on S^3',
    chiral,
    'Z=\\prod_{n\\ge 1}\\left(\\frac{n+1-\\Delta+i\\sigma}{n-1+\\Delta-i\\sigma}\\right)^{n}',
    's_{',
  ],
  [
    'a vector multiplet on S^3',
    ['index n >= 1', 'power(2) n+i*x', 'power(2) n-i*x'],
    'Z=\\prod_{n\\ge 1}\\left(n^{2}+x^2\\right)^{2}',
    'Z=\\frac{\\left(2\\sinh \\pi x\\right)^{2}}{x^{2}}',
  ],
  [
    'a hypermultiplet on S^4',
    ['index n >= 1', 'power(-1) (n+i*x)(n-i*x) times n'],
    'Z=\\prod_{n\\ge 1}\\left(n^{2}+x^2\\right)^{-n}',
    "Z=\\frac{e^{2\\zeta'(-1)}}{G\\left(1+ix\\right)\\,G\\left(1-ix\\right)}",
  ],
  [
    'a double sine',
    ['index m >= 0', 'index n >= 0', 'power(1) m*b+n/b+(b+1/b)/2-i*x', 'power(-1) m*b+n/b+(b+1/b)/2+i*x'],
    'Z=\\prod_{m,n\\ge 0}\\frac{bm+\\frac{n}{b}+\\frac{b}{2}+\\frac{1}{2b}-ix}{bm+\\frac{n}{b}+\\frac{b}{2}+\\frac{1}{2b}+ix}',
    'Z=s_{b}(x)',
  ],
  [
    'a number beside a power of a number',
    ['boson n^2+a^2 times 2 for n >= 1', 'fermion n+3/2 times 2(n+1)(n+2) for n >= 0'],
    'Z=\\prod_{n\\ge 1}\\frac{1}{n^{2}+a^2}\\;\\prod_{n\\ge 1}\\left(n+\\frac{1}{2}\\right)^{2n(n+1)}',
    '{2\\cdot 2^{\\frac{1}{4}}\\,\\sinh \\pi a}',
  ],
  ['everything', ['fermion n+1 for n >= 0', 'power(-1) n for n >= 1'], 'Z=1', 'Z=1'],
  ['a finite rest', ['fermion n+a for n >= 0', 'power(-1) n+a for n >= 2'], 'Z=a\\;\\left(1+a\\right)', 'Z=a\\,(1+a)'],
  [
    'the Laplacian on S^2',
    ['power(1) n(n+1) times 2n+1 for n >= 1'],
    'Z=\\prod_{n\\ge 2}n^{4n}',
    "Z=e^{-4\\zeta'(-1)}",
  ],
];

describe('formulas of spectra', () => {
  test.each(examples)('%s', (_what, lines, unpaired, closed) => {
    const shown = pieces(lines);
    expect(latexOf(shown, 'closed').startsWith('Z=')).toBe(true);
    expect(latexOf(shown, 'closed')).toContain(closed);
    expect(latexOf(shown, 'unpaired')).toBe(unpaired);
    for (const which of ['product', 'unpaired', 'closed'] as const) {
      const formula = shown.formulas[which];
      if (formula.kind === 'refused') throw new Error(formula.remark.code);
      const all = [formula.latex, ...formula.notes.flatMap((note) => note.match(/(?<=\$)[^$]+(?=\$)/g) ?? [])];
      for (const latex of all) expect(() => katex.renderToString(latex, { throwOnError: true })).not.toThrow();
    }
    for (const { latex } of shown.towers)
      expect(() => katex.renderToString(latex, { throwOnError: true })).not.toThrow();
  });

  test('the pairing table says which tower brings what', () => {
    const { pairing } = pieces(chiral);
    expect(pairing.map(({ factor }) => factor)).toEqual(['n-1+\\Delta-i\\sigma', 'n+1-\\Delta+i\\sigma']);
    expect(pairing[1]?.rows).toEqual([
      { tower: 'complex boson 1', multiplicity: '-n^{2}\\;\\;(n\\ge 1)' },
      { tower: 'fermion 2', multiplicity: 'n(n+1)\\;\\;(n\\ge 1)' },
    ]);
    expect(pairing[1]?.left).toBe('n\\;\\;(n\\ge 1)');
  });

  test('where more cancels at the values of the notebook, it is said', () => {
    const { formulas } = pieces(
      chiral,
      new Map([
        ['Delta', Form.ratio(1, 2)],
        ['sigma', Form.zero],
      ]),
    );
    const notes = formulas.unpaired.kind === 'formula' ? formulas.unpaired.notes : [];
    expect(notes.join()).toContain('\\prod_{n\\ge 1}\\frac{1}{n-\\frac{1}{2}}');
  });

  test('checks hold or not', () => {
    const verdicts = (lines: readonly string[]) => pieces(lines).checks.map(({ id, verdict }) => `${id} ${verdict}`);
    expect(verdicts(chiral)).toEqual(['scale holds', 'anomaly holds', 'closed-form holds']);
    expect(verdicts(['power(1) (n+i*x)(n-i*x) times n for n >= 1'])).toEqual([
      'scale fails',
      'anomaly fails',
      'closed-form holds',
    ]);
  });

  test('what starts far out keeps its start inside a function', () => {
    // The shift of Gamma by whole steps (DLMF 5.5.1) would write each step out.
    const far = latexOf(pieces(['power(1) n+1/2 for n >= 100000']), 'closed');
    expect(far).toBe('Z=\\frac{\\sqrt{\\pi}\\,\\sqrt{2}}{\\Gamma\\left(\\frac{200001}{2}\\right)}');
    expect(latexOf(pieces(['power(1) n^2+n+5 for n >= 100000']), 'closed')).toContain('\\frac{200001}{2}');
    expect(latexOf(pieces(['power(1) n-20000+1/3 for n >= 0']), 'closed')).toBe('spectrum-too-large');
  });

  test('an index letter is none of the parameters', () => {
    expect(latexOf(pieces(['power(1) k+n for k >= 0']), 'unpaired')).toBe('Z=\\prod_{m\\ge 0}\\left(m+n\\right)');
  });
});

describe('sums and multiplicities', () => {
  test.each([
    ['2-Delta+i*sigma', '2-\\Delta+i\\sigma'],
    ['i*sigma-q', '-q+i\\sigma'],
    ['0', '0'],
  ])('%s', (text, latex) => {
    expect(sumLatex(parseForm(text))).toBe(latex);
  });
  test.each([
    ['2*(n+1)*(n+2)', '2(n+1)(n+2)'],
    ['(n+1)*(n+2)*(2*n+3)/6', '\\frac{1}{6}(n+1)(2n+3)(n+2)'],
    ['-n^2', '-n^{2}'],
    ['n+1', 'n+1'],
    ['2*n+2*q', '2n+2q'],
    ['n^2+1', 'n^{2}+1'],
  ])('%s', (text, latex) => {
    expect(multiplicityLatex(polynomialIn(parseForm(text), 'n') ?? [], 'n')).toBe(latex);
  });
});

describe('roots without a name', () => {
  const closedOf = (line: string): string => latexOf(pieces([line]), 'closed');

  test('a cubic eigenvalue is a product of Gamma functions over its roots, confirmed by the series', () => {
    const shown = pieces(['power(1) n^3+n+1 for n >= 1']);
    expect(latexOf(shown, 'closed')).toBe(
      'Z=\\frac{1}{\\prod_{\\rho:\\,\\rho^{3}+\\rho +1=0}\\frac{\\Gamma\\left(1-\\rho\\right)}{\\sqrt{2\\pi}}}',
    );
    expect(shown.checks.find(({ id }) => id === 'closed-form')?.verdict).toBe('holds');
  });

  test.each(['power(1) n^3+2 times (n+1)^2 for n >= 0', 'power(-1) n^4+n+a times n for n >= 1'])('%s', (line) => {
    const latex = closedOf(line);
    expect(latex).toContain('\\Gamma_{2}');
    expect(() => katex.renderToString(latex, { throwOnError: true })).not.toThrow();
    expect(pieces([line]).checks.find(({ id }) => id === 'closed-form')?.verdict).toBe('holds');
  });
});
