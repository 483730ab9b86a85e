// Rules of this project's own house (DEVELOPERS.md): there is no outside source to check against.
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { projectFiles, read, top } from './project-files';

/** Put together from pieces, so that this file does not break its own rules. */
const word = (...pieces: string[]) => new RegExp(pieces.join(''));

const codeRules: Record<string, RegExp> = {
  'declares any': word(':\\s*', 'any\\b(?!\\s+\\w)'),
  'casts to any': word('\\bas\\s+', 'any\\b'),
  'silences the compiler': word('@ts', '-(?:ignore|nocheck)'),
  'runs one test only': word('\\.', 'only\\('),
  'skips a test': word('\\.', '(?:skip|fixme|todo)\\('),
};

const textRules: Record<string, RegExp> = {
  'names a place on one machine': word('(?:^|[\\s\'"`(=:])/', '(?:home|root|work|tmp|Users|private)/'),
  'names a package registry': word('registry', '\\.[a-z]|npmm', 'irror|files\\.pythonhosted|/-/[\\w.-]+\\.t', 'gz'),
};

const isCode = (path: string) => /\.(?:ts|tsx|mjs|js)$/.test(path) && !generated(path);
const isText = (path: string) => !/\.(?:png|jpg|ico|woff2|webp|gif|pdf|zip|gz)$/.test(path);
const isTest = (path: string) => /\.(?:test|spec)\.ts$/.test(path);
const generated = (path: string) => /\.gen(?:\.terms)?\.ts$/.test(path);

function broken(rules: Record<string, RegExp>, source: string): string[] {
  return source
    .split('\n')
    .flatMap((line, at) =>
      Object.entries(rules).flatMap(([name, rule]) =>
        rule.test(line) ? [`line ${at + 1} ${name}: ${line.trim()}`] : [],
      ),
    );
}

/** Statements only: an expect in a comment asserts nothing. */
const asserts = (source: string) => /\bexpect(?:\.\w+)?\(/.test(source.replace(/\/\*[\s\S]*?\*\/|^\s*\/\/.*$/gm, ''));

const all = projectFiles();
const report = (paths: string[], find: (path: string) => string[]) =>
  paths.flatMap((path) => find(path).map((what) => `${path} ${what}`));

test('code holds the rules', () => {
  const code = all.filter(isCode);
  expect(code.length).toBeGreaterThan(10);
  expect(report(code, (path) => broken(codeRules, read(path)))).toEqual([]);
});

test('no file names a machine or a registry', () => {
  expect(report(all.filter(isText), (path) => broken(textRules, read(path)))).toEqual([]);
});

test('the rules catch what they forbid', () => {
  const a = 'any';
  const lines = [`let x: ${a};`, `y as ${a}`, `// @ts-${'ignore'}`, `test.${'only'}('')`, `test.${'skip'}('')`];
  expect(lines.map((line) => broken(codeRules, line).length)).toEqual([1, 1, 1, 1, 1]);
  const paths = [`'/${'home'}/somebody/x'`, `/${'tmp'}/x`, `https://registry${'.'}example/x`];
  expect(paths.map((line) => broken(textRules, line).length)).toEqual([1, 1, 1]);
  expect(broken(codeRules, "// note: any order will do; import { skip } from './skip';")).toEqual([]);
});

test('every test file asserts something', () => {
  expect(all.filter(isTest).length).toBeGreaterThan(0);
  expect(all.filter((path) => isTest(path) && !asserts(read(path)))).toEqual([]);
  expect(asserts('// expect(1).toBe(1)\ntest("x", () => {});')).toBe(false);
});

test('files of the engine stay short', () => {
  const lengths = all
    .filter((path) => path.startsWith('engine/') && isCode(path))
    .map((path) => ({ path, lines: read(path).split('\n').length }));
  const long = lengths.filter(({ lines }) => lines > 300).map(({ path, lines }) => `${path}: ${lines} lines`);
  if (long.length > 0) console.warn(`over 300 lines, split by meaning:\n${long.join('\n')}`);
  expect(lengths.filter(({ lines }) => lines > 400)).toEqual([]);
});

test('the paths DEVELOPERS.md names exist', () => {
  const guide = existsSync(join(top, 'DEVELOPERS.md')) ? read('DEVELOPERS.md') : '';
  const named = [...guide.matchAll(/`((?:app|engine|workers|test|e2e|public|\.ci)\/[\w./-]*)`/g)].map(
    ([, path]) => path ?? '',
  );
  expect(named.filter((path) => !existsSync(join(top, path)))).toEqual([]);
  expect(existsSync(join(top, 'engine/no-such-folder'))).toBe(false);
});

test('the top folder holds what it should and nothing else', () => {
  const allowed = [
    ...['app', 'engine', 'workers', 'test', 'e2e', 'public', '.ci'],
    ...['package.json', 'package-lock.json', 'tsconfig.json', 'vite.config.ts'],
    ...['README.md', 'DEVELOPERS.md', 'LICENSE', '.npmrc', '.gitignore', '.biome.json'],
  ];
  const found = new Set(all.map((path) => path.split('/')[0] ?? ''));
  expect([...found].filter((name) => !allowed.includes(name))).toEqual([]);
});
