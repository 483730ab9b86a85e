import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { functions } from '../../engine/functions/table';
import type { FormulaForm } from '../../engine/language/tree';
import { displayLatex, printer } from '../../engine/latex/product';
import { analyse } from '../../engine/requests/analysis';
import { formulaView } from '../../engine/requests/formula';
import { printableTheory } from '../../engine/requests/formula-request';
import { evaluateLatex } from './evaluate-latex';

function view(lines: readonly string[], form: FormulaForm, notation = 0) {
  const text = ['let r = 1/3', 'theory t', ...lines.map((line) => `  ${line}`), ''].join('\n');
  const printable = printableTheory(analyse(text), 't', notation);
  const made = printable && formulaView(printable, form);
  if (made?.kind !== 'formula') throw new Error(text);
  return made;
}

const pieces = (lines: readonly string[], form: FormulaForm, notation = 0) =>
  view(lines, form, notation).pieces.map(({ latex }) => latex);

// Products over weights in the coordinates of N. Bourbaki, Lie groups, plates I-IX; the rest is how papers set them.
describe('weights on paper', () => {
  const of = (group: string, cell: string) =>
    pieces(['sphere S3', `gauge G = ${group}`, 'matter G R', `chiral q ${cell} r`], 'functions').slice(
      pieces(['sphere S3', `gauge G = ${group}`], 'functions').filter((latex) => latex !== '1').length,
    );
  const s = (argument: string) => `s_{b=1}(i(1-r)${argument})`;

  test.each([
    ['U(2)', 'fund', [`\\prod_{a=1}^{2}${s('-\\sigma_a')}`]],
    ['U(2)', 'anti', [`\\prod_{a=1}^{2}${s('+\\sigma_a')}`]],
    ['U(2)', 'adj', [`\\prod_{a\\neq c}${s('-\\sigma_a+\\sigma_c')}`, `\\left[${s('')}\\right]^{2}`]],
    ['U(2)', 'det^-1', [s('+\\operatorname{tr}\\sigma')]],
    ['SU(3)', 'sym2', [`\\prod_{a=1}^{3}${s('-2\\sigma_a')}`, `\\prod_{a=1}^{3}${s('+\\sigma_a')}`]],
    ['SU(4)', 'alt2', [`\\prod_{a<c}${s('-\\sigma_a-\\sigma_c')}`]],
    ['USp(4)', 'fund', [`\\prod_{a=1}^{2}\\prod_{\\pm}${s('\\mp \\sigma_a')}`]],
    ['USp(4)', 'alt2', [`\\prod_{\\pm}${s('\\mp \\sigma_1\\mp \\sigma_2')}`, s('')]],
    [
      'USp(6)',
      'alt2',
      [`\\prod_{a<c}\\prod_{\\pm}${s('\\mp \\sigma_a\\mp \\sigma_c')}`, `\\left[${s('')}\\right]^{2}`],
    ],
    ['SO(5)', 'vector', [`\\prod_{a=1}^{2}\\prod_{\\pm}${s('\\mp \\sigma_a')}`, s('')]],
    [
      'Spin(8)',
      'spinor',
      [
        `\\prod_{\\pm,\\text{ even}}s_{b=1}\\left(i(1-r)${[1, 2, 3, 4].map((k) => `\\mp \\frac{\\sigma_${k}}{2}`).join('')}\\right)`,
      ],
    ],
    [
      'Spin(8)',
      'cospinor',
      [
        `\\prod_{\\pm,\\text{ odd}}s_{b=1}\\left(i(1-r)${[1, 2, 3, 4].map((k) => `\\mp \\frac{\\sigma_${k}}{2}`).join('')}\\right)`,
      ],
    ],
    ['G2', '7', [`\\prod_{a=1}^{3}${s('-\\sigma_a')}`, `\\prod_{a=1}^{3}${s('+\\sigma_a')}`, s('')]],
  ])('%s %s', (group, cell, expected) => {
    expect(of(group, cell)).toEqual(expected);
  });

  test('a bifundamental, and a charge under a flavour group', () => {
    const lines = [
      ...['sphere S3, b = 5/4', 'gauge G = U(2)', 'gauge H = U(3)', 'flavor A = U(1), mass mu'],
      ...['matter G H A R', 'chiral q fund anti -2 r'],
    ];
    expect(pieces(lines, 'functions').at(-1)).toBe(
      "\\prod_{a=1}^{2}\\prod_{j=1}^{3}s_{b}\\left(\\frac{iQ}{2}(1-r)-\\sigma_a+\\sigma'_j+2\\mu\\right)",
    );
  });

  test('no index is called as the squashing', () => {
    const lines = ['sphere S3, b = 5/4', 'gauge G = U(3)', 'matter G R', 'chiral q adj r'];
    expect(view(lines, 'functions').latex).not.toMatch(/_b\b|\{b[<=]|<b|neq b/);
  });

  test('independent signs of several groups stand under one product', () => {
    const lines = [
      'sphere S3',
      'gauge G = USp(4)',
      'flavor F = SU(2), mass mu',
      'matter G F R',
      'chiral q fund fund r',
    ];
    expect(pieces(lines, 'functions').at(-1)).toBe(
      '\\prod_{a=1}^{2}\\prod_{\\pm}s_{b=1}(i(1-r)\\mp \\sigma_a\\mp \\mu)',
    );
  });
});

describe('vector multiplets', () => {
  test('on the round sphere a square, on the squashed one two sinh', () => {
    expect(pieces(['sphere S3', 'gauge G = SU(2)'], 'functions')).toEqual(['\\left[2\\sinh(2\\pi\\sigma)\\right]^{2}']);
    expect(pieces(['sphere S3, b = 2', 'gauge G = SU(2)'], 'functions')).toEqual([
      '4\\sinh(2\\pi b\\sigma)\\,\\sinh\\left(\\frac{2\\pi\\sigma}{b}\\right)',
    ]);
  });

  // Kapustin, Willett, Yaakov 2009, arXiv:0909.4559: the Vandermonde factor is the square of the root, 2 sigma here.
  test('the Vandermonde factor in front of the modes', () => {
    expect(pieces(['sphere S3', 'gauge G = SU(2)'], 'modes')[0]).toMatch(/^\(2\\sigma\)\^2\\,\\prod_\{n\\ge1\}/);
    expect(pieces(['sphere S3', 'gauge G = SO(3)'], 'modes')[0]).toMatch(/^\{\\sigma\}\^2\\,/);
    const two = pieces(['sphere S3', 'gauge G = U(1)', 'gauge H = SO(5)'], 'modes');
    expect(two.at(-1)).toMatch(/^\\prod_\{j=1\}\^\{2\}\{\\sigma'_j\}\^2\\,/);
  });
});

describe('every weight written out', () => {
  test('of a pattern, as many as it has', () => {
    const { pieces: all } = view(['sphere S3', 'gauge G = G2', 'matter G R', 'chiral q 7 r'], 'functions');
    const counts = all.map(({ expanded }) => (expanded === null ? null : expanded.split('\\;').length));
    // Long roots, short roots, the three weights and their negatives, and zero.
    expect(counts).toEqual([3, 3, 3, 3, null]);
  });

  test('not for one weight, nor for too many to read', () => {
    const { pieces: all } = view(['sphere S3', 'gauge G = USp(8)', 'matter G R', 'chiral q alt4 r'], 'functions');
    expect(all.filter(({ expanded }) => expanded === null).length).toBeGreaterThan(0);
    expect(all.every(({ expanded }) => expanded === null || expanded.split('\\;').length <= 24)).toBe(true);
  });
});

describe('the whole formula', () => {
  test('short ones on a line, long ones with a piece a line', () => {
    const piece = (latex: string) => ({ latex, from: [], expanded: null });
    expect(displayLatex('Z=', [])).toBe('Z=1');
    expect(displayLatex('Z=', [piece('x'), piece('y')])).toBe('Z=x\\;y');
    expect(displayLatex('Z=', [piece('x'), piece('y'), piece('z')])).toBe(
      '\\begin{aligned}\nZ={}&x \\\\\n&\\times y \\\\\n&\\times z\n\\end{aligned}',
    );
  });

  test('the left-hand side names the Coulomb parameters', () => {
    expect(view(['sphere S3', 'gauge G = U(2)', 'gauge H = U(1), coulomb x'], 'functions').lead).toBe(
      'Z_{\\text{1-loop}}(\\sigma,x)=',
    );
    expect(view(['sphere S3', 'matter R', 'chiral q r'], 'functions').lead).toBe('Z_{\\text{1-loop}}=');
  });

  test('multiplets are named behind every piece', () => {
    const lines = ['sphere S3', 'gauge G = U(2)', 'matter G R', 'chiral q fund r', 'chiral p anti r'];
    expect(view(lines, 'functions').pieces.map(({ from }) => from)).toEqual([['vector'], ['q'], ['p']]);
  });

  test('elementary formulas say where they hold and what is left', () => {
    const lines = ['sphere S3', 'gauge G = U(1)', 'matter G R', 'chiral q 1 3r/2', 'chiral p -1 1/2'];
    expect(view(lines, 'elementary').notes[0]).toBe('Holds at $r=\\frac{1}{3}$.');
    expect(view(lines.slice(0, 4), 'elementary').notes[0]).toMatch(/^What is left in \$s_b\$/);
  });
});

/*
 * The definitions of the notations relate them to s_b: Kurokawa, Koyama 2003, Forum Math. 15, 839 (S_2); van de Bult
 * 2007 (Gamma_h). Here the printed argument is read back.
 */
describe('definitions', () => {
  const S2 = functions.doubleSine.notations.findIndex(({ label }) => label === 'S_2');

  test.each([Form.one, Form.symbol('@b')])('S_2(z) = s_b of the printed argument, at b = %s', (period) => {
    const b = period.equals(Form.one) ? 1 : 1.25;
    const definition = functions.doubleSine.notations[S2]?.definition([period], printer) ?? '';
    const tail = /=(s_\{[^}]*\}.*?)(?:,\\quad.*)?$/.exec(definition)?.[1] ?? '';
    const meaning = { values: { z: 0.37 }, b };
    const found = evaluateLatex(tail, meaning);
    const wanted = evaluateLatex('S_2(z\\,|\\,b,b)', meaning);
    expect(found.re).toBeCloseTo(wanted.re, 12);
    expect(found.im).toBeCloseTo(wanted.im, 12);
    // s_b is not even: the argument of the other sign gives the inverse.
    expect(Math.abs(wanted.re - 1)).toBeGreaterThan(0.1);
  });

  test('every notation defines itself by a formula with an equals sign', () => {
    for (const { definition } of functions.doubleSine.notations) {
      expect(definition([Form.symbol('@b')], printer)).toContain('=');
    }
  });
});
