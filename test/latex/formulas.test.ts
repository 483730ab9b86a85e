import fc from 'fast-check';
import katex from 'katex';
import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { functions } from '../../engine/functions/table';
import { symbolLatex } from '../../engine/latex/symbol';
import { stemOf } from '../../engine/latex/weights';
import { evaluatePrecise } from '../../engine/numeric/precise';
import { analyse } from '../../engine/requests/analysis';
import { latexOut } from '../../engine/requests/document';
import { FORMS, formulaView } from '../../engine/requests/formula';
import { printableTheory } from '../../engine/requests/formula-request';
import { outline } from '../../engine/requests/outline';
import { s3 } from '../../engine/spheres/s3';
import { numberOf } from '../spheres/evaluate';
import { type Complex, evaluateLatex, type Meaning } from './evaluate-latex';
import { anyTheory, notebook, type RandomTheory } from './random-theory';

/** A point in general position, as exact numbers: the k-th coordinate of all. */
const coordinate = (k: number) => Rational.of(17 + 29 * k, 97 + 40 * k).mul(Rational.of(k % 2 === 0 ? 1 : -1));

function prepare(theory: RandomTheory, notation: number) {
  const analysis = analyse(notebook(theory));
  const printable = printableTheory(analysis, 't', notation);
  if (!printable) throw new Error(notebook(theory));
  const { groups } = printable.theory;
  const names = groups.flatMap(({ coordinates, dependent }) => coordinates.filter((name) => !dependent.has(name)));
  const set = new Map(names.map((name, k) => [name, Form.number(coordinate(k))]));
  const at = (name: string): Form | null => set.get(name) ?? analysis.values.get(name) ?? null;
  const geometry = s3.geometry(printable.theory);
  const exact = evaluatePrecise(
    printable.oneLoop,
    (name) => at(name) ?? geometry.reduce((form, stage) => form.substitute(stage), Form.symbol(name)),
    16,
  );
  return { analysis, printable, meaning: meaningOf(printable.theory.groups, at), exact };

  function meaningOf(all: typeof groups, values: typeof at): Meaning {
    const table: Record<string, number | number[]> = { r: 3 / 7 };
    for (const group of all) {
      const stem = symbolLatex(stemOf(group));
      const numbers = group.coordinates.map(
        (name) =>
          (group.dependent.get(name) ?? Form.symbol(name)).substitute(values).toRational()?.toNumber() ?? Number.NaN,
      );
      table[stem] = group.coordinates.length === 1 ? (numbers[0] as number) : numbers;
    }
    const b = { 'sphere S3': 1, 'sphere S3, b = 5/4': 5 / 4, 'sphere S3, b = sqrt(2)': Math.SQRT2 };
    const [sphere = ''] = theory.lines;
    return { values: table, b: (b as Record<string, number>)[sphere] ?? 13 / 10 };
  }
}

function expectClose(found: Complex, wanted: Complex, what: string): void {
  const size = Math.hypot(wanted.re, wanted.im);
  expect(Math.hypot(found.re - wanted.re, found.im - wanted.im) / size, what).toBeLessThan(1e-9);
}

// What is printed is read back by a reader of its own and compared with the precise tier.
describe('printed formulas have the value of the product', () => {
  const cases = functions.doubleSine.notations.map(({ label }, notation) => ({ label, notation }));

  test.each(cases)('written with $label', ({ notation }) => {
    fc.assert(
      fc.property(anyTheory, fc.constantFrom('functions' as const, 'elementary' as const), (theory, form) => {
        const { printable, meaning, exact } = prepare(theory, notation);
        // Products of hundreds of factors leave the doubles.
        fc.pre(exact.kind === 'value' && Math.abs(numberOf(exact.log).re) < 300);
        if (exact.kind !== 'value') return;
        const view = formulaView(printable, form);
        if (view.kind !== 'formula') throw new Error(view.message);
        const whole = view.latex.slice(view.latex.indexOf('=') + 1).replace('{}&', '');
        expectClose(evaluateLatex(whole.replace('\\end{aligned}', ''), meaning), numberOf(exact.value), whole);
        const written = view.pieces.map(({ latex, expanded }) => expanded ?? latex).join('\\;');
        expectClose(evaluateLatex(written, meaning), numberOf(exact.value), written);
      }),
      { numRuns: notation === 0 ? 20 : 5 },
    );
  });
});

describe('signs that are bound beside signs that are free', () => {
  const theoryWith = (groups: readonly [string, string], cells: string): RandomTheory => ({
    lets: [],
    lines: ['sphere S3', `gauge G = ${groups[0]}`, `gauge H = ${groups[1]}`, 'matter G H R', `chiral q ${cells} 1/3`],
  });
  const CASES: readonly (readonly [RandomTheory, RegExp])[] = [
    [theoryWith(['Spin(8)', 'SU(2)'], 'spinor fund'), /epsilon_1\\epsilon_2\\epsilon_3\\epsilon_4=1\}\\prod_\{\\pm\}/],
    [theoryWith(['Spin(8)', 'SU(2)'], 'cospinor fund'), /epsilon_4=-1\}/],
    [theoryWith(['Spin(6)', 'USp(4)'], 'spinor fund'), /epsilon_3=1\}/],
    [theoryWith(['Spin(4)', 'Spin(4)'], 'spinor cospinor'), /epsilon_2=1\}.*eta_2=-1\}/],
    [theoryWith(['SU(2)', 'Spin(8)'], 'fund spinor'), /\\prod_\{\\pm\}.*_4=1\}/],
  ];

  test.each(CASES)('%j', (theory, expected) => {
    const { printable, meaning, exact } = prepare(theory, 0);
    const view = formulaView(printable, 'functions');
    if (exact.kind !== 'value' || view.kind !== 'formula') throw new Error('no value');
    expect(view.latex).toMatch(expected);
    const whole = view.latex.slice(view.latex.indexOf('=') + 1).replace('{}&', '');
    expectClose(evaluateLatex(whole.replace('\\end{aligned}', ''), meaning), numberOf(exact.value), whole);
    expect(() =>
      katex.renderToString(view.latex, { throwOnError: true, displayMode: true, strict: 'error' }),
    ).not.toThrow();
  });
});

describe('KaTeX', () => {
  const render = (latex: string) =>
    katex.renderToString(latex, { throwOnError: true, displayMode: true, strict: 'error' });

  test('renders every formula, caption, cell and note of any theory', () => {
    fc.assert(
      fc.property(anyTheory, fc.nat({ max: 5 }), (theory, notation) => {
        const analysis = analyse(notebook(theory));
        for (const form of FORMS) {
          const printable = printableTheory(analysis, 't', notation);
          const view = printable && formulaView(printable, form);
          if (view?.kind !== 'formula') continue;
          expect(() => render(view.latex), view.latex).not.toThrow();
          for (const { latex, expanded } of view.pieces) {
            expect(() => render(latex), latex).not.toThrow();
            if (expanded !== null) expect(() => render(expanded), expanded).not.toThrow();
          }
          for (const note of view.notes) {
            for (const [, inside = ''] of note.matchAll(/\$([^$]+)\$/g))
              expect(() => render(inside), inside).not.toThrow();
          }
        }
        for (const card of outline(analysis, { t: notation }).cards) {
          if (card.kind !== 'theory') continue;
          const cells = card.rows.flatMap((row) => [row.latex, ...row.cells.map(({ latex }) => latex ?? '')]);
          const checks = card.checks.flatMap(({ formula, says }) => [
            formula,
            ...[...says.matchAll(/\$([^$]+)\$/g)].map(([, inside = '']) => inside),
          ]);
          for (const latex of [card.sphereLatex, ...card.columns.map((c) => c.latex), ...cells, ...checks]) {
            expect(() => render(latex), latex).not.toThrow();
          }
        }
      }),
      { numRuns: 8 },
    );
  });

  test('a document is balanced, and asks for amsmath alone', () => {
    fc.assert(
      fc.property(anyTheory, fc.nat({ max: 5 }), fc.constantFrom(...FORMS), (theory, notation, form) => {
        const out = latexOut(analyse(notebook(theory)), 't', form, notation);
        if (out.kind === 'refused') {
          expect([form, theory.lines[0]?.includes('b =')]).toEqual(['modes', true]);
          return;
        }
        const { document } = out;
        expect(document.match(/\\usepackage\{[^}]*\}/g)).toEqual(['\\usepackage{amsmath}']);
        const open: string[] = [];
        for (const [, kind, name] of document.matchAll(/\\(begin|end)\{([^}]*)\}/g)) {
          if (kind === 'begin') open.push(name as string);
          else expect(open.pop()).toBe(name);
        }
        expect(open).toEqual([]);
        const bare = document.replace(/\\[{}]/g, '');
        expect(bare.split('{').length).toBe(bare.split('}').length);
        expect(document.split('\\left').length).toBe(document.split('\\right').length);
        for (const [, formula = ''] of document.matchAll(/\\begin\{equation\*\}\n([\s\S]*?)\n\\end\{equation\*\}/g)) {
          expect(() => render(formula), formula).not.toThrow();
        }
        for (const [, formula = ''] of document.matchAll(/\$([^$]+)\$/g)) {
          expect(() => render(formula), formula).not.toThrow();
        }
      }),
      { numRuns: 8 },
    );
  });
});
