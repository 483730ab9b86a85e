// Edits of the charge table as edits of the text; the layout rules are our own, there is no outside source.
import { describe, expect, test } from 'vitest';
import { applyChanges, type Change } from '../../app/state/changes';
import { addedRow, cellChange, copiedRow, freshName, movedRow, removedRow } from '../../app/table/row-edits';
import type { TheoryCard } from '../../engine/requests/result';

const table = [
  '  matter       G      F     R',
  '  chiral   q   fund   1     1/3   % a remark',
  '  chiral   p   anti   adj   r',
  '',
].join('\n');

function card(text: string): TheoryCard {
  const lines = [...text.matchAll(/^ +chiral.*\n?/gm)];
  const rows = lines.map((line) => {
    const words = [...line[0].replace(/%.*/, '').matchAll(/\S+/g)].map((word) => ({
      text: word[0],
      span: { from: line.index + word.index, to: line.index + word.index + word[0].length },
      latex: word[0],
    }));
    const name = words[1];
    if (!name) throw new Error('a row without a name');
    const lineSpan = { from: line.index, to: line.index + line[0].length };
    return {
      kind: 'chiral',
      name: name.text,
      latex: name.text,
      span: lineSpan,
      lineSpan,
      nameSpan: name.span,
      cells: words.slice(2),
    };
  });
  const headSpan = { from: 0, to: 0 };
  const refused = { kind: 'refused', message: '' } as const;
  return {
    kind: 'theory',
    id: 'theory:t:1',
    span: { from: 0, to: text.length },
    line: 1,
    name: 't',
    nameSpan: { from: 0, to: 0 },
    sphereLatex: '',
    supersymmetry: '',
    columns: [
      { name: 'G', latex: 'G', role: 'gauge', group: 'SU(3)', headSpan, typed: null },
      { name: 'F', latex: 'F', role: 'flavor', group: 'SU(2)', headSpan, typed: null },
      { name: 'R', latex: 'R', role: 'R', group: null, headSpan, typed: null },
    ],
    rows,
    multipletKinds: ['chiral'],
    insertRowAt: text.length,
    insertGroupAt: null,
    indent: '  ',
    checks: [],
    formulas: { modes: refused, unpaired: refused, functions: refused, elementary: refused },
    preferredForm: 'functions',
    notations: [],
    parameters: ['r'],
  };
}

const lines = (text: string, changes: readonly Change[] | null) => applyChanges(text, changes ?? []).split('\n');

describe('a cell', () => {
  const cell = card(table).rows[0]?.cells[0];
  if (!cell) throw new Error('the table has no cell');

  test.each([
    ['adj', '  chiral   q   adj    1     1/3   % a remark'],
    ['sym2*', '  chiral   q   sym2*  1     1/3   % a remark'],
    ['fund.det^-1', '  chiral   q   fund.det^-1  1     1/3   % a remark'],
  ])('takes %s and keeps the columns in line as far as the blanks allow', (content, line) => {
    expect(lines(table, [cellChange(table, cell.span, content)])[1]).toBe(line);
  });

  test('at the end of a line leaves no blanks behind', () => {
    const last = card(table).rows[1]?.cells[2];
    if (!last) throw new Error('the table has no last cell');
    expect(lines(table, [cellChange(table, last.span, '')])[2]).toBe('  chiral   p   anti   adj   ');
    expect(lines(table, [cellChange(table, last.span, '1/4')])[2]).toBe('  chiral   p   anti   adj   1/4');
  });
});

describe('a row', () => {
  test('is added in the columns of the one above, with a name of its own', () => {
    const change = addedRow(table, card(table), 'chiral');
    expect(lines(table, change && [change])).toEqual([
      ...table.trimEnd().split('\n'),
      '  chiral   x   fund   1     1/2',
      '',
    ]);
  });

  test('is added under a header alone, and at the end of a text without a line break', () => {
    const header = '  matter       G      F     R';
    const change = addedRow(header, card(header), 'chiral');
    expect(lines(header, change && [change])).toEqual([header, '  chiral  x    fund   1     1/2']);
    expect(addedRow(table, { ...card(table), insertRowAt: null }, 'chiral')).toBeNull();
  });

  test('is copied under itself with everything but its name', () => {
    expect(lines(table, copiedRow(table, card(table), 0))[2]).toBe('  chiral   x   fund   1     1/3   % a remark');
  });

  test('changes places with its neighbour, remark and all, also when the last line has no break', () => {
    const text = table.trimEnd();
    const [, first = '', second = ''] = text.split('\n');
    expect(lines(text, movedRow(text, card(text), 1, -1)).slice(1)).toEqual([second, first]);
    expect(movedRow(text, card(text), 1, 1)).toBeNull();
  });

  test('is removed with its line', () => {
    expect(lines(table, removedRow(card(table), 0))).toEqual([table.split('\n')[0], table.split('\n')[2], '']);
  });
});

test('a fresh name is one nobody has', () => {
  expect(freshName(['x', 'y'])).toBe('z');
  expect(freshName(['x', 'y', 'z', 'p', 'q', 'u', 'v', 'w', 'x1'])).toBe('x2');
});
