// The order of folders is a decision of this project (DEVELOPERS.md): there is no outside source to check against.
import { describe, expect, test } from 'vitest';
import { importsOf, importViolations } from './imports';
import { projectFiles, read } from './project-files';

const isSource = (path: string) => /\.tsx?$/.test(path) && !path.endsWith('.d.ts');
const sources = new Map(
  projectFiles('engine', 'workers', 'app')
    .filter(isSource)
    .map((path) => [path, read(path)]),
);

test('imports run along the pipeline, without circles', () => {
  expect(sources.size).toBeGreaterThan(0);
  expect(importViolations(sources)).toEqual([]);
});

test('every form of import is seen, and types are told from values', () => {
  const source = [
    "import type { A } from './a';",
    "import { type B, b } from './b';",
    "import './c';",
    "export type { D } from './d';",
    "export * from './e';",
    "const later = () => import('./f');",
    "// import './not-this';",
  ].join('\n');
  expect(importsOf('app/x.ts', source)).toEqual([
    { specifier: './a', isType: true },
    { specifier: './b', isType: false },
    { specifier: './c', isType: false },
    { specifier: './d', isType: true },
    { specifier: './e', isType: false },
    { specifier: './f', isType: false },
  ]);
});

describe('a planted violation is caught', () => {
  const planted = (files: Record<string, string>) => importViolations(new Map(Object.entries(files)));
  const cases: Record<string, Record<string, string>> = {
    'no files at all': {},
    'a folder imports a later one': {
      'engine/exact/a.ts': "import { b } from '../product/b';",
      'engine/product/b.ts': 'export const b = 1;',
    },
    'a value of the syntax tree in theory': {
      'engine/theory/a.ts': "import { t } from '../language/tree';",
      'engine/language/tree.ts': 'export const t = 1;',
    },
    'the type of the syntax tree before theory': {
      'engine/lie/a.ts': "import type { T } from '../language/tree';",
      'engine/language/tree.ts': 'export type T = 1;',
    },
    'language imports a theory': {
      'engine/language/a.ts': "import { t } from '../theory/t';",
      'engine/theory/t.ts': 'export const t = 1;',
    },
    'a file outside the folders': {
      'engine/a.ts': "import { b } from './exact/b';",
      'engine/exact/b.ts': 'export const b = 1;',
    },
    'the engine imports the page': {
      'engine/exact/a.ts': "import { b } from '../../app/b';",
      'app/b.ts': 'export const b = 1;',
    },
    'the engine imports a package': { 'engine/latex/a.ts': "import katex from 'katex';" },
    'the engine imports a module of the runtime': { 'engine/exact/a.ts': "import { join } from 'node:path';" },
    'decimal.js in a second module': { 'engine/arithmetic/other.ts': "import { Decimal } from 'decimal.js';" },
    'decimal.js in the page': { 'app/a.ts': "import type { Decimal } from 'decimal.js';" },
    'a value of the engine in the page': {
      'app/page/a.ts': "import { b } from '../../engine/exact/b';",
      'engine/exact/b.ts': 'export const b = 1;',
    },
    'a late import of the engine in the page': {
      'app/page/a.ts': "const b = import('../../engine/requests/b');",
      'engine/requests/b.ts': 'export const b = 1;',
    },
    'a carrier reaches behind requests': {
      'workers/a.ts': "import type { B } from '../engine/product/b';",
      'engine/product/b.ts': 'export type B = 1;',
    },
    'a carrier imports the page': {
      'workers/a.ts': "import { b } from '../app/b';",
      'app/b.ts': 'export const b = 1;',
    },
    'an import that leads nowhere': { 'app/a.ts': "import { b } from './gone';" },
    'a circle of three': {
      'engine/exact/a.ts': "import { b } from './b';",
      'engine/exact/b.ts': "export { c as b } from './c';",
      'engine/exact/c.ts': "import type { A } from './a';",
    },
  };
  test.each(Object.entries(cases))('%s', (_name, files) => {
    expect(planted(files)).toHaveLength(1);
  });

  test('and what is allowed is not', () => {
    expect(
      planted({
        'engine/exact/a.ts': 'export const a = 1;',
        'engine/arithmetic/decimal-text.ts': "import { Decimal } from 'decimal.js';",
        'engine/language/tree.ts': "import type { A } from '../exact/a';",
        'engine/language/parse.ts': "import { LRParser } from '@lezer/lr';\nimport { a } from '../exact/a';",
        'engine/theory/t.ts': "import type { T } from '../language/tree';\nimport { a } from '../exact/a';",
        'engine/requests/run.ts': "import { p } from '../language/parse';\nimport { t } from '../theory/t';",
        'workers/batch.ts': "import { run } from '../engine/requests/run';\nimport { readFileSync } from 'node:fs';",
        'app/editor/e.ts': "import { parse } from '../../engine/language/parse';\nimport './e.css';",
        'app/page/p.tsx': "import type { A } from '../../engine/exact/a';\nimport { run } from '../../workers/client';",
        'workers/client.ts': "import { wrap } from 'comlink';",
      }),
    ).toEqual([]);
  });
});
