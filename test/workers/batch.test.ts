import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { batchCommand } from '../../workers/batch-command';

/*
 * The batch command with the words of a command line; what it writes is caught. Exit codes and JSON are those that the
 * language describes.
 */
let folder = '';

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'batch-test-'));
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

function notebook(text: string, name = 'notebook.lathe'): string {
  const path = join(folder, name);
  writeFileSync(path, text);
  return path;
}

function batch(...words: readonly string[]): { code: number; out: string; error: string } {
  const caught = { out: '', error: '' };
  const code = batchCommand(words, {
    out: (text) => {
      caught.out += text;
    },
    error: (text) => {
      caught.error += text;
    },
  });
  return { code, ...caught };
}

const GOOD = 'theory t\n  sphere S3\n  gauge G = U(1)\n  matter G R\n  chiral q 1 1/3\n\nvalue q of t at sigma = 1\n';

describe('exit codes', () => {
  test('0 when every request was answered', () => {
    const { code, out, error } = batch(notebook(GOOD));
    expect(code).toBe(0);
    const { theories, spectra, results, problems } = JSON.parse(out);
    expect([theories.length, spectra.length, results.length, problems.length]).toEqual([1, 0, 1, 0]);
    expect(results[0].value.re).toMatch(/^-?0\.\d{25,}$/);
    expect(error).toBe('1 of 1: value\n1 of 1: function values\n1 of 1: second route\n');
  });

  test('0 for a notebook without requests', () => {
    expect(batch(notebook('# Prose\n')).code).toBe(0);
  });

  test('1 when a request failed', () => {
    const { code, out } = batch(notebook(`${GOOD}\nvalue p of t at sigma = 1\n`));
    expect(code).toBe(1);
    expect(JSON.parse(out).results[1].failure.message).toMatch(/`p` is no quantity/);
  });

  test('2 when the notebook has errors, with all the rest in the report', () => {
    const { code, out } = batch(notebook(GOOD.replace('U(1)', 'X(1)')));
    expect(code).toBe(2);
    const { problems, results } = JSON.parse(out);
    expect(problems[0]).toMatchObject({ line: 3, column: 13, severity: 'error' });
    expect(results[0].failure.message).toMatch(/errors/);
  });

  test.each([
    [['--colour'], /--colour is no option\.\nUsage: /],
    [['--digits'], /--digits needs a value/],
    [['--digits', 'many'], /a whole number from 1 to \d+, not many/],
    [['--digits', '0'], /a whole number/],
    [[], /No notebook was named/],
    [['a.lathe', 'b.lathe'], /One notebook at a time; b\.lathe/],
    [['no-such-file.lathe'], /no-such-file\.lathe cannot be read/],
  ])('2 for %j', (words, says) => {
    const { code, out, error } = batch(...words);
    expect(code).toBe(2);
    expect(error).toMatch(says);
    expect(out).toBe('');
  });
});

describe('options', () => {
  test('digits for values that do not say how many they want', () => {
    const file = notebook(`${GOOD}\nvalue gamma(1/3), 7 digits\n`);
    const { results } = JSON.parse(batch(file, '--digits', '12').out);
    expect(results.map(({ digits }: { digits: number }) => digits)).toEqual([12, 7]);
  });

  test('the report into a file, and nothing else there', () => {
    const target = join(folder, 'report.json');
    const { code, out } = batch('--out', target, notebook(GOOD));
    expect([code, out]).toEqual([0, '']);
    expect(JSON.parse(readFileSync(target, 'utf8')).results.length).toBe(1);
    const nowhere = batch(notebook(GOOD), '--out', join(folder, 'none', 'report.json'));
    expect(nowhere.code).toBe(2);
    expect(nowhere.error).toMatch(/cannot be written/);
  });
});
