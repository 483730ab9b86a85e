// Codes and places of problems: decisions of this project. Every code the parser has is produced below.
import { describe, expect, test } from 'vitest';
import { parseNotebook } from '../../engine/language/parse';
import { say, wording } from '../../engine/language/wording';
import { syntaxWording } from '../../engine/language/wording-syntax';
import { problemsOf } from './reading';

type Cases = Record<string, string[]>;

const theory = (...lines: string[]) => ['theory A', '  sphere S3', ...lines.map((line) => `  ${line}`)].join('\n');
const table = (...lines: string[]) => theory('gauge G = U(1)', 'matter G R', ...lines);
const spectrum = (...lines: string[]) => ['spectrum s', ...lines.map((line) => `  ${line}`)].join('\n');

const expressions: Cases = {
  'let r =': ['expression-missing 1:7'],
  'let r = 3 +': ['expression-missing 1:11'],
  'let r == 3': ['expression-expected 1:8'],
  'let r = *3': ['expression-expected 1:9'],
  'let r = in 2': ['expression-expected 1:9'],
  'let r = a b': ['missing-operator 1:11'],
  'let r = (a b)': ['missing-operator 1:12'],
  'let r = 2 3': ['missing-operator 1:11'],
  'let r = (a)2': ['missing-operator 1:12'],
  'let r = 1.2.3': ['missing-operator 1:12'],
  'let r = (((1)': ['parenthesis-open 1:10'],
  'let r = (2,1)': ['unexpected-text 1:11'],
  'let r = 3)': ['unexpected-text 1:10'],
  'let r = []': ['expression-expected 1:9'],
  'let r = 1 ? 2': ['unexpected-character 1:11'],
  'let r = ?': ['unexpected-character 1:9'],
  'let r = é': ['unexpected-character 1:9'],
  'let r = sqrt 2': ['function-without-argument 1:9'],
  'let r = sqrt()': ['expression-expected 1:14'],
  'let r = sqrt(1, 2)': ['unexpected-text 1:15'],
  'let r = sqr(2)': ['function-unknown 1:9'],
  'let r = Sin(2)': ['function-unknown 1:9'],
  'let r = 1 + gamma(2)': ['special-function-inside 1:13'],
  'let r = 1/0': ['division-by-zero 1:11'],
  'let r = 1/(a-a)': ['division-by-zero 1:11'],
  'let r = 0^-1': ['division-by-zero 1:9'],
  'let r = log(0)': ['log-of-zero 1:9'],
  'let r = 1/2r': ['product-after-division 1:12 warning'],
  'let r = 1/2 r': [],
  'let r = a/2b/2c': ['product-after-division 1:12 warning'],
  'let r = x^2y': ['product-after-power 1:12 warning'],
  'let r = x^2(y+1)': [],
  [`let r = ${'('.repeat(66)}`]: ['expression-too-deep 1:74'],
  'let r = (a+b+c)^99': ['expression-too-large 1:9'],
  'let r = 1e2000': ['number-too-large 1:9'],
  'let r = 1e20000': ['number-too-long 1:9'],
  'let r = 2^257': ['exponent-too-large 1:9'],
};

const parameters: Cases = {
  let: ['name-missing 1:1'],
  'let % nothing': ['name-missing 1:1'],
  'let r': ['line-ends 1:5'],
  'let 2r = 3': ['unexpected-text 1:5'],
  'let pi = 3': ['reserved-name 1:5'],
  'let e = 3': ['reserved-name 1:5'],
  'let π = 3': ['reserved-name 1:5'],
  'let at = 3': ['reserved-name 1:5'],
  'let sin = 3': ['reserved-name 1:5'],
  'let r = 1 over 2': ['unexpected-text 1:11'],
  'let r = 3 in': ['expression-missing 1:11'],
  'let r = 3 in 1': ['line-ends 1:14'],
  'let r = 3 in 2 .. 1': ['range-empty 1:14'],
  'let r = 3 in 1 .. 1': ['range-empty 1:14'],
  'let r = 3 in 1 .. 2, 3': ['unexpected-text 1:20'],
  'let r = 1\n\nlet r = 2': ['parameter-twice 3:5'],
  'let σ = 1\nlet sigma = 2': ['parameter-twice 2:5'],
};

const theories: Cases = {
  theory: ['name-missing 1:1'],
  'theory\n  gauge': ['name-missing 1:1', 'group-name-missing 2:3'],
  'theory one-loop\n  sphere S3': ['block-name 1:8'],
  'theory seiberg-dual(2) A\n  sphere S3': ['block-name 1:8'],
  'theory A B\n  sphere S3': ['unexpected-text 1:10'],
  'theory A': ['sphere-missing 1:8'],
  'theory A\n  spere S3': ['sphere-missing 1:8', 'theory-line-unknown 2:3'],
  [`${theory()}\n${theory()}`]: ['block-twice 3:8'],
  [`${theory()}\nspectrum A`]: ['block-twice 3:10'],
  [theory('sphere S2')]: ['line-twice 3:3'],
  [theory('matter', 'matter')]: ['line-twice 4:3'],
  'theory A\n  sphere': ['sphere-word-missing 2:3'],
  'theory A\n  sphere S6': ['sphere-unknown 2:10'],
  'theory A\n  sphere S3 b = 2': ['comma-missing 2:13'],
  'theory A\n  sphere S3 2': ['unexpected-text 2:13'],
  'theory A\n  sphere S3,': ['sphere-option-missing 2:12'],
  'theory A\n  sphere S3, b': ['line-ends 2:14'],
  'theory A\n  sphere S3, b = , b = 2, b = 3': ['expression-expected 2:18', 'option-twice 2:27'],
  [theory('= 3')]: ['theory-line-unknown 3:3'],
  [theory('\u0000')]: ['unexpected-character 3:3'],
  [theory('gauge')]: ['group-name-missing 3:3'],
  [theory('gauge R = U(1)')]: ['group-named-r 3:9'],
  [theory('gauge G')]: ['line-ends 3:9'],
  [theory('gauge G =')]: ['group-missing 3:11'],
  [theory('gauge G = 3')]: ['unexpected-text 3:13'],
  [theory('gauge G = U(N)')]: ['group-rank 3:15'],
  [theory('gauge G = U(')]: ['group-rank 3:14'],
  [theory('gauge G = U(2')]: ['line-ends 3:15'],
  [theory('gauge G = (SU(2) x U(1))/Z2')]: ['group-product 3:13'],
  [theory('gauge G = SU(4)/2')]: ['group-divisor 3:19'],
  [theory('gauge G = SU(4)/')]: ['group-divisor 3:18'],
  [theory('gauge G = U(2),')]: ['option-missing 3:17'],
  [theory('gauge G = U(2), levl 2, fi, fi z')]: ['option-unknown 3:19', 'option-value-missing 3:27'],
  [theory('gauge G = U(2), coulomb, coulomb e, coulomb s')]: ['unexpected-text 3:26', 'reserved-name 3:36'],
  [theory('gauge G = U(2), coulomb')]: ['option-value-missing 3:19'],
  [theory('gauge G = U(2) level 2 fi z, level 3')]: ['comma-missing 3:18', 'comma-missing 3:26', 'option-twice 3:32'],
  [theory('gauge G = U(2), mass m')]: ['option-role 3:19'],
  [theory('flavor G = U(2), coulomb m, level 1')]: ['option-role 3:20'],
  [theory('gauge G = U(2) x U(1), level 1')]: ['unexpected-text 3:18'],
  [theory('gauge G = U(1)', 'flavor G = U(1)')]: ['group-twice 4:10'],
  [theory('mixed')]: ['mixed-incomplete 3:3'],
  [theory('mixed G')]: ['mixed-incomplete 3:9'],
  [theory('supersymmetry')]: ['supersymmetry-value 3:3'],
  [theory('supersymmetry four')]: ['supersymmetry-value 3:17'],
};

const tables: Cases = {
  [theory('gauge G = U(1)', 'chiral q 1', 'chiral p 1')]: ['matter-missing 4:3'],
  [theory('gauge G = U(1)', 'chiral q 1', 'matter G', 'chiral p 1')]: ['matter-missing 4:3'],
  [theory('matter G G-H R 3')]: ['column-name 3:12', 'column-name 3:18'],
  [theory('matter R R')]: ['column-twice 3:12'],
  [theory('gauge G = U(1)', 'matter G G')]: ['column-twice 4:12'],
  [theory('gauge G = U(1)', 'flavor F = U(1)', 'matter R', 'chiral q 1')]: ['column-missing 5:3 warning'],
  [theory('gauge G = U(1)', 'flavor F = U(1)', 'matter R')]: [],
  [theory('flavor', 'gauge G = U(1)', 'matter R', 'chiral q 1')]: [
    'group-name-missing 3:3',
    'column-missing 5:3 warning',
  ],
  [table('chiral')]: ['multiplet-name-missing 5:3'],
  [table('chiral q-1 1 1')]: ['multiplet-name 5:10'],
  [table('chiral 1 1')]: ['multiplet-name 5:10'],
  [table('chiral vector 1 1')]: ['multiplet-name-taken 5:10'],
  [table('chiral determinant 1 1')]: ['multiplet-name-taken 5:10'],
  [table('chiral q 1 1', 'hyper q 1 1')]: ['multiplet-twice 6:9'],
  [table('chiral q 1')]: ['cell-missing 5:12'],
  [table('chiral q')]: ['cell-missing 5:10'],
  [table('chiral q 1 2 - 2r')]: ['cell-surplus 5:16'],
  [table('chiral q 1/0 1')]: ['division-by-zero 5:14'],
  [table('chiral q 1 1/2r')]: ['product-after-division 5:17 warning'],
  [table('chiral q ~q 1')]: ['unexpected-character 5:12'],
  [table('chiral q 1 1', 'superpotential')]: ['superpotential-empty 6:3'],
  [table('chiral q 1 1', 'superpotential 2q, -q')]: [
    'superpotential-coefficient 6:18',
    'superpotential-coefficient 6:22',
  ],
  [table('chiral q 1 1', 'superpotential q +')]: ['monomial-missing 6:20'],
  [table('chiral q 1 1', 'superpotential q + , q')]: ['monomial-missing 6:22'],
  [table('chiral q 1 1', 'superpotential q^2 q^0, q^r, q^')]: [
    'field-power 6:24',
    'field-power 6:29',
    'field-power 6:33',
  ],
  [table('chiral q 1 1', 'superpotential q*, (q)')]: ['field-missing 6:19', 'unexpected-text 6:22'],
};

const spectra: Cases = {
  spectrum: ['name-missing 1:1'],
  [spectrum('index')]: ['name-missing 2:3'],
  [spectrum('index i >= 0')]: ['reserved-name 2:9'],
  [spectrum('index n')]: ['index-range-missing 2:9'],
  [spectrum('index n > 0')]: ['index-relation 2:11'],
  [spectrum('index n = 3')]: ['line-ends 2:13'],
  [spectrum('index n >= 0, m >= 0')]: ['unexpected-text 2:15'],
  [spectrum('index n >= 0', 'index n >= 1')]: ['index-twice 3:9'],
  [spectrum('bosun n')]: ['spectrum-line-unknown 2:3'],
  [spectrum('?')]: ['unexpected-character 2:3'],
  [spectrum('complex fermion n')]: ['tower-kind 2:11'],
  [spectrum('real')]: ['tower-kind 2:3'],
  [spectrum('power n')]: ['tower-exponent 2:9'],
  [spectrum('power(2 n')]: ['line-ends 2:11'],
  [spectrum('boson')]: ['eigenvalue-missing 2:3'],
  [spectrum('boson times 2')]: ['expression-expected 2:9'],
  [spectrum('boson n times')]: ['expression-missing 2:11'],
  [spectrum('boson n times 2 times 3')]: ['clause-twice 2:19'],
  [spectrum('boson n for n >= 1, n >= 2')]: ['index-twice 2:23'],
  [spectrum('boson n with 2')]: ['unexpected-text 2:11'],
  [spectrum('boson n/0', 'boson (n^16)^17', 'boson n*(1/0)')]: [
    ...['division-by-zero 2:11', 'exponent-too-large 3:10', 'division-by-zero 4:14'],
  ],
};

const requests: Cases = {
  value: ['quantity-missing 1:1'],
  'value log': ['quantity-missing 1:7'],
  'value 2 + 2': ['quantity-expected 1:7'],
  'value ?': ['unexpected-character 1:7'],
  'value one-loop': ['of-missing 1:11'],
  'value one-loop electric': ['of-missing 1:16'],
  'value one - loop of A': ['of-missing 1:11'],
  'value one-loop of': ['subject-missing 1:16'],
  'value one-loop of 3': ['unexpected-text 1:19'],
  'value one-loop of A foo': ['unexpected-text 1:21'],
  'value one-loop of A over x = 1 .. 2': ['unexpected-text 1:21'],
  'value one-loop of A,': ['comma-last 1:20'],
  'value one-loop of A at': ['name-missing 1:21'],
  'value one-loop of A at x': ['line-ends 1:24'],
  'value one-loop of A at i = 1': ['reserved-name 1:24'],
  'value one-loop of A at x = 1, x = 2': ['set-twice 1:31'],
  'value one-loop of A at x = 1 at y = 2': ['clause-twice 1:30'],
  'value one-loop of A, 0 digits': ['digits-value 1:22'],
  'value one-loop of A, 2.5 digits': ['digits-value 1:22'],
  'value one-loop of A, 999999 digits': ['digits-value 1:22'],
  'value foo(1)': ['special-function-unknown 1:7'],
  'value instanton(1, 2) A': ['special-function-unknown 1:7'],
  'value instanton(1, x) of A': ['order-expected 1:20'],
  'value instanton(1, -1) of A': ['order-expected 1:20'],
  'value instanton(100) of A': ['order-expected 1:17'],
  'value instanton() of A': ['order-expected 1:17'],
  'value instanton(1 2) of A': ['unexpected-text 1:19'],
  'value instanton(1, 2) of': ['subject-missing 1:23'],
  'value constructor(1)': ['special-function-unknown 1:7'],
  'value doublesine(1)': ['argument-count 1:7'],
  'value dilog(1, 2)': ['argument-count 1:7'],
  'value doublesine(1, 2': ['parenthesis-open 1:17'],
  'value doublesine(': ['expression-missing 1:17'],
  'value determinant of s by': ['prescription-unknown 1:24'],
  'value determinant of s by magic': ['prescription-unknown 1:27'],
  formula: ['subject-missing 1:1'],
  'formula A as': ['formula-form-unknown 1:11'],
  'formula A as you like': ['formula-form-unknown 1:14'],
  'formula A, B': ['unexpected-text 1:10'],
  'plot one-loop of A': ['over-missing 1:18'],
  'plot one-loop of A over': ['name-missing 1:20'],
  'plot one-loop of A over x = 1': ['line-ends 1:29'],
  'plot one-loop of A over x = 1 .. 0': ['range-empty 1:29'],
  'plot one-loop of A over x = 0 .. 1, y = 0 .. 1, z = 0 .. 1': ['ranges-too-many 1:49'],
  representation: ['group-missing 1:1'],
  'representation SU(3)': ['line-ends 1:20'],
  'representation SU(3):': ['representation-missing 1:21'],
  'representation SU(3): 3 ⊗ 3': ['unexpected-character 1:25'],
  integrate: ['subject-missing 1:1'],
  'extremize A': ['over-missing 1:11'],
  'extremize A over r, r': ['set-twice 1:21'],
  'compare A': ['with-missing 1:9'],
  'compare A and B': ['with-missing 1:11'],
  'compare A with': ['subject-missing 1:11'],
};

const hints: Cases = {
  'theori electric': ['hint-work-word 1:1 hint'],
  'thoery electric\n  sphere S3': ['hint-work-word 1:1 hint'],
  'Theory electric': ['hint-work-word 1:1 hint'],
  'theory: electric': ['hint-work-word 1:1 hint'],
  'vaule of nothing': ['hint-work-word 1:1 hint'],
  'Let r = 1': ['hint-work-word 1:1 hint'],
  'Extremise electric over r': ['hint-work-word 1:1 hint'],
  'Let us see': [],
  'Values of r above 1 are excluded.': [],
  'Some text\nlett r = 1': [],
  'Text\n  goes on': ['hint-paragraph-indented 1:1 hint'],
  '# Title\ntext\n\tgoes on': ['hint-paragraph-indented 2:1 hint'],
  '- item\n  goes on': [],
  '3. item\n   goes on': [],
  '> quoted\n  goes on': [],
  'Text\n\n    indented code': [],
  '  let r = 1': ['hint-work-indented 1:3 hint'],
  '% a comment': ['hint-comment-in-prose 1:1 hint'],
  [`${theory()} % here\ngauge G = U(1)`]: ['hint-line-not-indented 3:1 hint'],
  [`${theory()}\r\ngauge G = U(1)`]: ['hint-line-not-indented 3:1 hint'],
  [`${theory()}\n\ngauge theories are fun`]: [],
  [`${spectrum()}\nindex n >= 0`]: ['hint-line-not-indented 2:1 hint'],
};

const all = { expressions, parameters, theories, tables, spectra, requests, hints };

describe.each(Object.entries(all))('%s', (_, cases) => {
  test.each(Object.entries(cases))('%j', (text, problems) => {
    expect(problemsOf(text)).toEqual(problems);
  });
});

describe('wording', () => {
  const found = Object.values(all).flatMap((cases) =>
    Object.keys(cases).flatMap((text) => parseNotebook(text).diagnostics),
  );

  test('every code of the parser is produced above', () => {
    const produced = new Set(found.map(({ code }) => code));
    expect(Object.keys(syntaxWording).filter((code) => !produced.has(code))).toEqual([]);
  });

  test('every problem is a sentence, with all its words', () => {
    for (const diagnostic of found) {
      expect(say(diagnostic), diagnostic.code).toMatch(/^[`A-Z].*[.?]$/);
      expect(say(diagnostic), diagnostic.code).not.toMatch(/undefined|NaN|``/);
    }
  });

  test('names what was typed and what is allowed', () => {
    const sentences = (text: string) => parseNotebook(text).diagnostics.map(say);
    expect(sentences('theory A\n  sphere S6')[0]).toContain('`S6`');
    expect(sentences(theory('gauge G = U(1), levle 2'))).toEqual([
      '`levle` is no option of a group. Did you mean `level`? Known are `coulomb`, `mass`, `level`, `abelian`, `fi`, `theta`, `coupling`.',
    ]);
    expect(sentences('let r = 1\n\nlet r = 2')).toEqual([
      'The parameter `r` is already set on line 1. Delete or rename one of them.',
    ]);
    expect(sentences(table('chiral q'))).toEqual([
      'The row `q` has no cell for G, R. Write `1` for the trivial representation, `0` for no charge.',
    ]);
  });

  test('an unknown code is said, not thrown', () => {
    const unknown = { code: 'toString', span: { from: 0, to: 0 }, severity: 'error', data: {} } as const;
    expect(say(unknown)).toBe('Problem `toString`.');
    expect(Object.hasOwn(wording, 'toString')).toBe(false);
  });
});
