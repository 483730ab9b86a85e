// Groups added and changed in the charge table, as edits of the text; the layout rules are our own, no outside source.
import { describe, expect, test } from 'vitest';
import { applyChanges } from '../../app/state/changes';
import { addedGroup, changedGroup } from '../../app/table/group-edits';
import { analyse } from '../../engine/requests/analysis';
import { outline } from '../../engine/requests/outline';
import type { TheoryCard } from '../../engine/requests/result';

function cardOf(text: string): TheoryCard {
  const card = outline(analyse(text), {}).cards.find(({ kind }) => kind === 'theory');
  if (card?.kind !== 'theory') throw new Error('No theory.');
  return card;
}

const text = `theory t
  sphere  S3
  gauge   G = SU(2), level = 1   % a remark
  matter      G      R
  chiral  q   fund   1/2   % another
  chiral  F   adj    1/3
`;

describe('a group is added', () => {
  test('with a neutral column before R, under a name that is free', () => {
    const changes = addedGroup(text, cardOf(text), 'flavor');
    const after = applyChanges(text, changes ?? []);
    expect(after).toBe(`theory t
  sphere  S3
  gauge   G = SU(2), level = 1   % a remark
  flavor  A = U(1)
  matter      G      A   R
  chiral  q   fund   0   1/2   % another
  chiral  F   adj    0   1/3
`);
    const { columns, rows } = cardOf(after);
    expect(columns.map(({ name, role, group }) => [name, role, group])).toEqual([
      ['G', 'gauge', 'SU(2)'],
      ['A', 'flavor', 'U(1)'],
      ['R', 'R', null],
    ]);
    expect(rows.map(({ cells }) => cells.map((cell) => cell.text))).toEqual([
      ['fund', '0', '1/2'],
      ['adj', '0', '1/3'],
    ]);
  });

  test('after the sphere where there is none yet, and again and again without a problem', () => {
    let now = 'theory t\n  sphere S3\n  matter     R\n  chiral x   1/3';
    for (const role of ['gauge', 'gauge', 'flavor', 'gauge', 'gauge', 'flavor'] as const) {
      now = applyChanges(now, addedGroup(now, cardOf(now), role) ?? []);
    }
    const analysis = analyse(now);
    expect(cardOf(now).columns.map(({ name }) => name)).toEqual(['G', 'H', 'F', 'K', 'G1', 'A', 'R']);
    expect(outline(analysis, {}).problems).toEqual([]);
  });

  test('with its line alone where there is no table, and not where there is no sphere', () => {
    const bare = 'theory t\n  sphere S3';
    expect(applyChanges(bare, addedGroup(bare, cardOf(bare), 'gauge') ?? [])).toBe(`${bare}\n  gauge   G = U(1)`);
    const nothing = 'theory t\n';
    expect(addedGroup(nothing, cardOf(nothing), 'gauge')).toBeNull();
  });
});

test('a group is changed where it is typed, its options kept; R has none', () => {
  const card = cardOf(text);
  expect(applyChanges(text, changedGroup(text, card, 0, 'USp(4)') ?? [])).toContain('gauge   G = USp(4), level = 1');
  expect(changedGroup(text, card, 1, 'U(1)')).toBeNull();
});
