// Laws of our own: sharing never changes a value, only its identity.
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { sameButForPlace, shareStructure } from '../../app/state/share-structure';

const plain = fc.jsonValue({ maxDepth: 4 });

test('the shared value equals the later one', () => {
  fc.assert(
    fc.property(plain, plain, (before, after) => {
      expect(shareStructure(before, after)).toEqual(after);
    }),
  );
});

test('an equal value keeps its identity, and so do equal parts', () => {
  const before = {
    rows: [
      { name: 'q', cells: ['1'] },
      { name: 'p', cells: ['2'] },
    ],
    n: 1,
  };
  const shared = shareStructure(before, structuredClone({ ...before, n: 2 }));
  expect(shared).not.toBe(before);
  expect(shared.rows).toBe(before.rows);
  expect(shareStructure(before, structuredClone(before))).toBe(before);
  const shorter = shareStructure(before, { ...structuredClone(before), rows: before.rows.slice(0, 1) });
  expect(shorter.rows).toHaveLength(1);
  expect(shorter.rows[0]).toBe(before.rows[0]);
});

test('places do not count as differences, anything else does', () => {
  const card = {
    id: 'let:r:1',
    line: 3,
    span: { from: 9, to: 20 },
    latex: 'r',
    rows: [{ lineSpan: { from: 1, to: 2 } }],
  };
  const moved = { ...card, line: 4, span: { from: 10, to: 21 }, rows: [{ lineSpan: { from: 5, to: 6 } }] };
  expect(sameButForPlace(card, moved)).toBe(true);
  expect(sameButForPlace(card, { ...moved, latex: 's' })).toBe(false);
  expect(sameButForPlace(card, { ...moved, rows: [] })).toBe(false);
  expect(sameButForPlace(card, { ...moved, more: 1 })).toBe(false);
  expect(sameButForPlace([1, null], [1, {}])).toBe(false);
});
