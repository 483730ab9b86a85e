import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { analyse } from '../engine/requests/analysis';
import { report } from '../engine/requests/report';
import { top } from './project-files';

// The project's own notebooks: there is nothing outside to compare them with but that they run.
const folder = join(top, 'public/examples');
const list: readonly { file: string; title: string; says: string }[] = JSON.parse(
  readFileSync(join(folder, 'list.json'), 'utf8'),
);

test('the list names every notebook, and nothing else', () => {
  const files = readdirSync(folder).filter((name) => name.endsWith('.lathe'));
  expect(list.map(({ file }) => file).sort()).toEqual(files.sort());
  expect(new Set(list.map(({ title }) => title)).size).toBe(list.length);
});

describe.each(list)('$file', ({ file, title }) => {
  const text = readFileSync(join(folder, file), 'utf8');
  const { output, failed } = report(analyse(text), { now: () => 0, progress: () => true, digits: 30 });

  test('begins with its title and holds theories and requests', () => {
    expect(text.split('\n')[0]).toBe(`# ${title}`);
    expect(output.theories.length + output.spectra.length).toBeGreaterThan(0);
    expect(output.results.length).toBeGreaterThan(0);
  });

  test('runs without problems and failures', () => {
    expect(output.problems).toEqual([]);
    expect(output.results.filter((result) => JSON.stringify(result).includes('"failure"'))).toEqual([]);
    expect(failed).toBe(false);
  });

  test('prints every formula but modes, and no check fails', () => {
    for (const { name, latex, checks } of output.theories) {
      for (const form of ['unpaired', 'functions', 'elementary']) expect(latex[form], `${name} ${form}`).toBeTruthy();
      expect(checks.filter(({ verdict }) => verdict === 'fails')).toEqual([]);
    }
  });
});
