import { describe, expect, test } from 'vitest';
import { analyse } from '../../engine/requests/analysis';
import { representationChoices } from '../../engine/requests/chooser';
import { latexOut } from '../../engine/requests/document';
import { hoverAt } from '../../engine/requests/hover';
import { outline } from '../../engine/requests/outline';
import type { Card, RequestCard, TheoryCard } from '../../engine/requests/result';

/** The example of the language's description, with every kind of block. */
const NOTEBOOK = `# Electric notes

Two flavours and an *adjoint*; $r$ is free.

let r = 1/3 in 1/5 .. 1/2
let m0 = 0.2 in -2 .. 2
let c = 2

theory electric
  sphere   S3, b = 5/4
  gauge    G = U(2), coulomb sigma, level 1, fi zeta
  flavor   F = SU(3), mass m
  flavor   A = U(1), mass mu
  matter         G      F      A    R
  chiral   q     fund   anti   1    r     % quarks
  chiral   qt    anti   1      1    r
  chiral   phi   adj    1      -2   2-2r
  superpotential  phi q qt

spectrum dirac
  index    n >= 0
  fermion  n + 3/2  times 2(n+1)(n+2)

formula electric as unpaired

value one-loop of electric at sigma1 = 0.3,
  sigma2 = -1, m1 = m0, 40 digits   % as asked

plot abs one-loop of electric, arg one-loop of electric over sigma1 = -3 .. 3 at sigma2 = 0.4

representation SU(3): fund x sym2

integrate electric, 12 digits

extremize electric over r

compare electric with electric over zeta = 0 .. 1
`;

const analysis = analyse(NOTEBOOK);
const { title, cards, problems } = outline(analysis, {});

function theoryCard(list: readonly Card[]): TheoryCard {
  const found = list.find((card): card is TheoryCard => card.kind === 'theory');
  if (!found) throw new Error('No theory.');
  return found;
}

const requests = cards.filter((card): card is RequestCard => card.kind === 'request');
const at = (text: string) => NOTEBOOK.indexOf(text);

describe('cards in the order of the text', () => {
  test('kinds, names and lines', () => {
    expect(cards.map(({ id, line }) => [id, line])).toEqual([
      ['prose::1', 1],
      ['let:r:1', 5],
      ['let:m0:1', 6],
      ['let:c:1', 7],
      ['theory:electric:1', 9],
      ['spectrum:dirac:1', 20],
      ['formula::1', 24],
      ['value::1', 26],
      ['plot::1', 29],
      ['representation::1', 31],
      ['integrate::1', 33],
      ['extremize::1', 35],
      ['compare::1', 37],
    ]);
    expect(title).toBe('Electric notes');
    expect(problems.filter(({ severity }) => severity === 'error')).toEqual([]);
  });

  test('every span holds the text of its block', () => {
    for (const { span, line } of cards) {
      expect(NOTEBOOK.slice(0, span.from).split('\n').length).toBe(line);
    }
    expect(NOTEBOOK.slice(cards[4]?.span.from, cards[4]?.span.to).startsWith('theory electric')).toBe(true);
  });

  test('cards survive JSON as they are', () => {
    expect(JSON.parse(JSON.stringify(cards))).toEqual(cards);
  });
});

describe('parameters', () => {
  test('value, range, and the place that a slider edits', () => {
    const [r, m0, c] = cards.filter((card) => card.kind === 'let');
    expect(r).toMatchObject({ name: 'r', latex: 'r=\\frac{1}{3}', valueText: '1/3', range: { from: 0.2, to: 0.5 } });
    expect(r?.value).toBeCloseTo(1 / 3, 15);
    expect(NOTEBOOK.slice(m0?.valueSpan.from, m0?.valueSpan.to)).toBe('0.2');
    expect(c?.range).toBeNull();
  });
});

describe('the theory', () => {
  const card = theoryCard(cards);

  test('caption and columns', () => {
    expect(card.sphereLatex).toBe('S^3_b,\\ b=\\frac{5}{4}');
    expect(card.supersymmetry).toBe('N = 2');
    expect(card.columns.map(({ name, role, group }) => [name, role, group])).toEqual([
      ['G', 'gauge', 'U(2)'],
      ['F', 'flavor', 'SU(3)'],
      ['A', 'flavor', 'U(1)'],
      ['R', 'R', null],
    ]);
    expect(card.columns[0]?.latex).toMatch(/U.*\(2\).*_\{?1/);
  });

  test('rows as they print', () => {
    expect(card.rows.map(({ kind, name, cells }) => [kind, name, ...cells.map(({ latex }) => latex)])).toEqual([
      ['chiral', 'q', '\\mathbf{2}', '\\overline{\\mathbf{3}}', '1', 'r'],
      ['chiral', 'qt', '\\overline{\\mathbf{2}}', '\\mathbf{1}', '1', 'r'],
      ['chiral', 'phi', '\\mathbf{adj}', '\\mathbf{1}', '-2', '2-2r'],
    ]);
  });

  test('places for editing: cells, names, whole lines, where a row goes', () => {
    const [q, , phi] = card.rows;
    expect(NOTEBOOK.slice(q?.nameSpan.from, q?.nameSpan.to)).toBe('q');
    expect(NOTEBOOK.slice(q?.lineSpan.from, q?.lineSpan.to)).toBe(
      '  chiral   q     fund   anti   1    r     % quarks\n',
    );
    expect(phi?.cells.map(({ span }) => NOTEBOOK.slice(span.from, span.to))).toEqual(['adj', '1', '-2', '2-2r']);
    expect(card.insertRowAt).toBe(at('  superpotential'));
    expect(card.indent).toBe('  ');
    expect(card.multipletKinds).toEqual(['chiral', 'hyper', 'halfhyper']);
  });

  test('parameters it uses, checks, formulas, notations', () => {
    expect(card.parameters).toEqual(['r']);
    expect(card.checks.length).toBeGreaterThan(0);
    expect(card.checks.every(({ id, says, source }) => id !== '' && says !== '' && source !== '')).toBe(true);
    expect(card.formulas.modes.kind).toBe('refused');
    expect(card.formulas.functions.kind).toBe('formula');
    expect(card.notations.length).toBe(6);
  });

  test('another notation, by the name of the theory', () => {
    const view = theoryCard(outline(analysis, { electric: 1 }).cards).formulas.functions;
    expect(view.kind === 'formula' && view.latex.includes('S_2')).toBe(true);
    const other = theoryCard(outline(analysis, { magnetic: 1 }).cards).formulas.functions;
    expect(other).toEqual(card.formulas.functions);
  });

  test('while a cell is wrong the card stays, with the text of that cell', () => {
    const broken = theoryCard(outline(analyse(NOTEBOOK.replace('fund   anti', 'fond   anti')), {}).cards);
    expect(broken.rows[0]?.cells.map(({ text, latex }) => [text, latex])).toEqual([
      ['fond', null],
      ['anti', '\\overline{\\mathbf{3}}'],
      ['1', '1'],
      ['r', 'r'],
    ]);
    expect(broken.formulas.functions.kind).toBe('refused');
    expect(broken.checks).toEqual([]);
  });

  test('a second theory of the same name is told to be renamed', () => {
    const twice = outline(analyse(`${NOTEBOOK}\ntheory electric\n  sphere S3\n`), {}).cards.at(-1);
    expect(twice?.kind === 'theory' && twice.formulas.functions).toMatchObject({ kind: 'refused' });
    expect(twice?.id).toBe('theory:electric:2');
  });
});

describe('requests', () => {
  test('captions and conditions', () => {
    expect(requests.map(({ caption }) => caption)).toEqual([
      'formula of electric, unpaired',
      'one-loop of electric',
      'abs one-loop of electric, arg one-loop of electric',
      'SU(3): fund x sym2',
      'integrate electric',
      'extremize electric',
      'electric with electric',
    ]);
    expect(requests[1]?.conditions).toBe('\\sigma_1=\\frac{3}{10},\\ \\sigma_2=-1,\\ m_1=m_0');
    expect(requests[2]?.conditions).toBe('-3\\le \\sigma_1\\le 3,\\ \\sigma_2=\\frac{2}{5}');
  });

  test('as typed, comments dropped, blanks folded', () => {
    expect(requests[1]?.text).toBe('value one-loop of electric at sigma1 = 0.3, sigma2 = -1, m1 = m0, 40 digits');
  });

  test('sliders that the answer depends on', () => {
    expect(requests[1]?.parameters).toEqual(['r', 'm0']);
    expect(requests[3]?.parameters).toEqual([]);
  });
});

describe('keys change exactly when an answer may change', () => {
  const keys = (text: string) =>
    outline(analyse(text), {}).cards.flatMap((card) => (card.kind === 'request' ? [card.key] : []));
  const before = keys(NOTEBOOK);

  test.each([
    ['prose', NOTEBOOK.replace('Two flavours', 'Three words')],
    ['a line more above', `Foreword.\n\n${NOTEBOOK}`],
    ['a comment', NOTEBOOK.replace('% as asked', '% as I asked')],
    ['blanks', NOTEBOOK.replace('sigma2 = -1, m1', 'sigma2 = -1,    m1')],
    ['another theory', `${NOTEBOOK}\ntheory magnetic\n  sphere S3\n`],
  ])('not by %s', (_what, text) => {
    expect(keys(text)).toEqual(before);
  });

  test.each<[string, string, readonly number[]]>([
    ['a cell of the theory', NOTEBOOK.replace('-2   2-2r', '-2   2-r'), [0, 1, 2, 4, 5, 6]],
    ['the squashing', NOTEBOOK.replace('b = 5/4', 'b = 4/3'), [0, 1, 2, 4, 5, 6]],
    ['the point', NOTEBOOK.replace('sigma2 = -1', 'sigma2 = -2'), [1]],
    ['the digits', NOTEBOOK.replace('40 digits', '50 digits'), [1]],
    ['a parameter', NOTEBOOK.replace('m0 = 0.2', 'm0 = 0.3'), [0, 1, 2, 3, 4, 5, 6]],
  ])('by %s', (_what, text, changed) => {
    const after = keys(text);
    expect(after.flatMap((key, k) => (key === before[k] ? [] : [k]))).toEqual(changed);
  });
});

describe('help on a word', () => {
  const hover = (word: string, offset = 0) => hoverAt(analysis, at(word) + offset);

  // Dimensions and indices of SU(3): R. Slansky, Phys. Rept. 79 (1981) 1, table 23.
  test('a representation, a group, an R-charge, a parameter', () => {
    expect(hover('anti   1    r')?.title).toBe('anti of SU(3)');
    expect(hover('anti   1    r')?.lines.join(' ')).toMatch(/dimension 3, complex.*I_2=1\$, 3 distinct weights/);
    expect(hover('SU(3), mass')?.lines[0]).toMatch(/dimension 8, rank 2, 3 positive roots.*order 6/);
    expect(hover('2-2r')?.lines).toEqual(['$R=2-2r$']);
    expect(hover('m0 = 0.2')?.lines).toEqual(['$m_0=\\frac{1}{5}$']);
    expect(hover('Two flavours')).toBeNull();
  });
});

describe('the chooser of representations', () => {
  // Irreducible representations of SU(3) up to dimension 8: 1, 3, 3*, 6, 6*, 8 (Slansky, table 23).
  test('all up to a dimension', () => {
    const choices = representationChoices('SU(3)', 8);
    expect(choices.map(({ dimension }) => dimension).sort()).toEqual(['1', '3', '3', '6', '6', '8']);
    expect(choices.every(({ word, latex }) => word !== '' && latex !== '')).toBe(true);
    expect(representationChoices('SX(3)', 8)).toEqual([]);
  });
});

describe('LaTeX to take away', () => {
  test('a snippet and a document with formula, table, definitions and sources', () => {
    const out = latexOut(analysis, 'electric', 'functions', 0);
    if (out.kind !== 'latex') throw new Error(out.message);
    expect(out.document).toContain(out.snippet);
    for (const part of ['\\begin{tabular}', '\\title{electric}', 'Definitions:', 'Conventions:', '\\bibitem{']) {
      expect(out.document).toContain(part);
    }
    expect(out.document).toContain('\\mathbf{2}');
  });

  test('a refusal in words', () => {
    expect(latexOut(analysis, 'electric', 'modes', 0)).toMatchObject({ kind: 'refused' });
    expect(latexOut(analysis, 'nowhere', 'functions', 0)).toEqual({
      kind: 'refused',
      message: 'There is no theory `nowhere` in this notebook.',
    });
  });
});
