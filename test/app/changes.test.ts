// Changes of a text: laws of our own design, held against plain string operations.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { applyChanges, type Change, changeBetween, mapOffset, mapSpan } from '../../app/state/changes';

const text = fc.string({ maxLength: 40 });

/** A text with changes in it that do not overlap. */
const changed = text.chain((content) =>
  fc
    .array(fc.record({ at: fc.nat(content.length), size: fc.nat(5), insert: fc.string({ maxLength: 5 }) }), {
      maxLength: 4,
    })
    .map((raw) => {
      const changes: Change[] = [];
      let from = 0;
      for (const { at, size, insert } of [...raw].sort((left, right) => left.at - right.at)) {
        const start = Math.max(from, at);
        const to = Math.min(content.length, start + size);
        if (start > content.length || to < start) continue;
        changes.push({ from: start, to, insert });
        from = to + 1;
      }
      return { content, changes };
    }),
);

describe('changes of a text', () => {
  test('are applied like splices from the end', () => {
    fc.assert(
      fc.property(changed, ({ content, changes }) => {
        const spliced = [...changes]
          .reverse()
          .reduce((now, { from, to, insert }) => now.slice(0, from) + insert + now.slice(to), content);
        expect(applyChanges(content, changes)).toBe(spliced);
        expect(applyChanges(content, [...changes].reverse())).toBe(spliced);
      }),
    );
  });

  test('the one change between two texts leads from one to the other', () => {
    fc.assert(
      fc.property(text, text, (before, after) => {
        const change = changeBetween(before, after);
        expect(change === null).toBe(before === after);
        if (change) expect(applyChanges(before, [change])).toBe(after);
      }),
    );
    expect(changeBetween('let r = 1/3', 'let r = 0.4')).toEqual({ from: 8, to: 11, insert: '0.4' });
  });

  test('a span that no change touches holds the same text afterwards', () => {
    fc.assert(
      fc.property(changed, fc.nat(40), fc.nat(10), ({ content, changes }, start, size) => {
        const from = Math.min(start, content.length);
        const to = Math.min(content.length, from + size);
        const span = mapSpan({ from, to }, changes);
        const touched = changes.some((change) => change.from < to && change.to > from);
        if (to > from) expect(span === null).toBe(touched);
        if (span) expect(applyChanges(content, changes).slice(span.from, span.to)).toBe(content.slice(from, to));
      }),
    );
  });

  test('an offset stays before what is inserted at it, and lands behind what replaces it', () => {
    expect(mapOffset(3, [{ from: 3, to: 3, insert: 'ab' }])).toBe(3);
    expect(mapOffset(4, [{ from: 3, to: 3, insert: 'ab' }])).toBe(6);
    expect(mapOffset(4, [{ from: 2, to: 6, insert: 'xyz' }])).toBe(5);
    expect(mapOffset(9, [{ from: 2, to: 6, insert: '' }])).toBe(5);
  });
});
