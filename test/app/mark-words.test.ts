// Words beside the zeros and poles of a curve; where they stand is our own choice, there is no outside source.
import { expect, test } from 'vitest';
import { markWords } from '../../app/charts/mark-words';
import type { PlotMark } from '../../engine/requests/result';

const mark = (kind: 'zero' | 'pole', x: number, order = 1, series = 0): PlotMark => ({ kind, x, order, series });

test('a word that would run into the one before it is left out, whatever the order of the marks', () => {
  const marks = [mark('zero', 0.5, 2), mark('zero', 0.4, 2), mark('zero', 0.9, 2)];
  expect(markWords(marks, (x) => 500 * x)).toEqual(['', 'zero of order 2', 'zero of order 2']);
  expect(markWords(marks, (x) => 2000 * x)).toEqual(['zero of order 2', 'zero of order 2', 'zero of order 2']);
});

test('zeros and poles stand on lines of their own; two curves with one zero name it once', () => {
  const marks = [mark('zero', 0.1), mark('pole', 0.1), mark('zero', 0.1, 1, 1)];
  expect(markWords(marks, (x) => 500 * x)).toEqual(['zero', 'pole', '']);
});
