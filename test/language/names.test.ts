// Greek letters: the Unicode character database (test/fixtures/language/greek.py).
import { describe, expect, test } from 'vitest';
import { listed, spellName } from '../../engine/language/names';
import { parseNotebook } from '../../engine/language/parse';
import greek from '../fixtures/language/greek.json';
import { onlyBlock, problemsOf } from './reading';

describe('Greek letters are spelt', () => {
  test.each(Object.entries(greek.names))('%s is %s', (letter, word) => {
    expect(spellName(letter)).toBe(word);
    expect(spellName(`x${letter}1`)).toBe(`x${word}1`);
    // As a name of a theory, where pi is one as well.
    expect(onlyBlock('theory', `theory ${letter}'\n  sphere S3`).name.name).toBe(`${word}'`);
  });

  test('other letters are refused', () => {
    for (const letter of ['é', 'ß', 'ж', 'א', '漢', '\u03a2', '\u03c3\u0302', '𝔾']) {
      expect(problemsOf(`let ${letter} = 1`)[0]).toMatch(/^unexpected-character 1:[56]$/);
    }
  });

  test('the same name in two spellings is one name', () => {
    expect(parseNotebook('let σ1 = 1\nlet sigma1 = 2').diagnostics.map(({ code }) => code)).toEqual([
      'parameter-twice',
    ]);
  });
});

test('long lists are cut', () => {
  const names = Array.from({ length: 13 }, (_, k) => `q${k}`);
  expect(listed(names.slice(0, 2))).toBe('q0, q1');
  expect(listed(names)).toBe('q0, q1, q2, q3, q4, q5, q6, q7, q8, q9, q10, q11, ...');
  expect(listed([])).toBe('');
});
