// Two signs never meet in print. Common practice of typesetting, no source.
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { analyse } from '../../engine/requests/analysis';
import { report } from '../../engine/requests/report';
import { anyTheory, notebook } from './random-theory';

const FORMS = ['modes', 'unpaired', 'functions', 'elementary'];
/** Also across an opening brace; `^{-1}` and `^{+}` stand for themselves. */
const MEETING = /(?:[+-]|\\[pm][pm])\s*(?:[+-]|\\[pm][pm])/;

test('the pattern finds signs that meet', () => {
  for (const bad of ['n+\\pm i', 'a--b', 'a+-b', 'x-\\mp y']) expect(bad).toMatch(MEETING);
  for (const good of ['n\\pm i', 'a-b', '\\prod_{\\pm}n', 'x^{-1}-y']) expect(good).not.toMatch(MEETING);
});

test('in no form of a formula, nor in a table of pairing', () => {
  let tables = 0;
  fc.assert(
    fc.property(anyTheory, (theory) => {
      const text = [notebook(theory), ...FORMS.map((form) => `formula t as ${form}\n`)].join('\n');
      const surroundings = { now: () => 0, progress: () => true, digits: 15 };
      const printed = JSON.stringify(report(analyse(text), surroundings).output.results);
      if (printed.includes('"pairing"')) tables += 1;
      // In JSON every backslash stands twice.
      const formulas = printed.replaceAll('\\\\', '\\').match(/"(?:latex|factor|unpaired|left)":"[^"]*"/g) ?? [];
      expect(formulas.length).toBeGreaterThan(0);
      for (const formula of formulas) expect(formula).not.toMatch(MEETING);
    }),
    { numRuns: 20 },
  );
  expect(tables).toBeGreaterThan(0);
}, 60_000);
