// Edit distance with swaps of neighbours: Damerau, Commun. ACM 7 (1964) 171, by the usual table (common practice).
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { nearest, oneEditApart } from '../../engine/language/near-words';
import { WORK_WORDS } from '../../engine/language/words';

function distance(a: string, b: string): number {
  const table: number[][] = [];
  for (let i = 0; i <= a.length; i++) {
    const row: number[] = [];
    table.push(row);
    for (let j = 0; j <= b.length; j++) {
      const at = (k: number, l: number) => table[k]?.[l] ?? Number.POSITIVE_INFINITY;
      const swapped = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1];
      row.push(
        i === 0 || j === 0
          ? i + j
          : Math.min(
              at(i - 1, j) + 1,
              at(i, j - 1) + 1,
              at(i - 1, j - 1) + (a[i - 1] === b[j - 1] ? 0 : 1),
              swapped ? at(i - 2, j - 2) + 1 : Number.POSITIVE_INFINITY,
            ),
      );
    }
  }
  return table[a.length]?.[b.length] ?? Number.NaN;
}

test('one edit apart is distance one', () => {
  const word = fc.string({ unit: fc.constantFrom('a', 'b', 'c'), maxLength: 6 });
  fc.assert(
    fc.property(word, word, (a, b) => {
      expect(oneEditApart(a, b)).toBe(distance(a, b) === 1);
    }),
    { numRuns: 2000 },
  );
});

test('the nearest word is found, case apart', () => {
  expect(nearest('thoery', WORK_WORDS)).toBe('theory');
  expect(nearest('Theory', WORK_WORDS)).toBe('theory');
  expect(nearest('PLOTT', WORK_WORDS)).toBe('plot');
  expect(nearest('theory', WORK_WORDS)).toBe(null);
  expect(nearest('something', WORK_WORDS)).toBe(null);
});
