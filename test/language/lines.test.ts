// Lines end as in the editor's documents (LF, CR or CR LF); the counts are read off the texts below.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { LineIndex } from '../../engine/language/lines';

describe('line and column', () => {
  test('start at 1 and count code units', () => {
    const lines = new LineIndex('ab\nσ\t𝔾x\n');
    expect(lines.place(0)).toEqual({ line: 1, column: 1 });
    expect(lines.place(2)).toEqual({ line: 1, column: 3 });
    expect(lines.place(3)).toEqual({ line: 2, column: 1 });
    expect(lines.place(7)).toEqual({ line: 2, column: 5 });
    expect(lines.place(9)).toEqual({ line: 3, column: 1 });
    expect(lines.lineCount).toBe(3);
  });

  test('know every line end', () => {
    const lines = new LineIndex('a\r\nb\rc\nd');
    expect([0, 3, 5, 7].map((offset) => lines.place(offset))).toEqual([
      { line: 1, column: 1 },
      { line: 2, column: 1 },
      { line: 3, column: 1 },
      { line: 4, column: 1 },
    ]);
  });

  test('stay inside the text', () => {
    const lines = new LineIndex('ab');
    expect(lines.place(-5)).toEqual({ line: 1, column: 1 });
    expect(lines.place(99)).toEqual({ line: 1, column: 3 });
    expect(new LineIndex('').place(0)).toEqual({ line: 1, column: 1 });
  });

  test('agree with splitting the text', () => {
    const text = fc
      .array(fc.constantFrom('a', 'σ', '\t', '\n', '\r\n', '\r', '\ud835\udd3e'))
      .map((parts) => parts.join(''));
    fc.assert(
      fc.property(text, fc.nat(100), (whole, k) => {
        // Not between CR and LF, where splitting sees a line end that is none.
        const offset = Math.min(k, whole.length);
        fc.pre(!(whole[offset] === '\n' && whole[offset - 1] === '\r'));
        const before = whole.slice(0, offset).split(/\r\n|\r|\n/);
        const place = new LineIndex(whole).place(offset);
        expect(place).toEqual({ line: before.length, column: (before.at(-1) ?? '').length + 1 });
      }),
    );
  });
});
