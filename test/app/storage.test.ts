// What is kept and shared. A share link is raw DEFLATE (RFC 1951) in base64url (RFC 4648, section 5), held against zlib.
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { deflateRawSync, inflateRawSync } from 'node:zlib';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { readSettings } from '../../app/state/settings';
import { plainView, readView } from '../../app/state/view';
import { fileName } from '../../app/storage/files';
import { titleOf } from '../../app/storage/library';
import { fragmentOf, textInFragment } from '../../app/storage/share-link';
import { parseNotebook } from '../../engine/language/parse';
import { top } from '../project-files';

describe('a share link', () => {
  test('is read by others, reads theirs, and goes round', async () => {
    await fc.assert(
      fc.asyncProperty(fc.string({ unit: 'grapheme', maxLength: 300 }), async (text) => {
        const fragment = await fragmentOf(text);
        expect(fragment).toMatch(/^1[\w-]+$/);
        expect(inflateRawSync(Buffer.from(fragment.slice(1), 'base64url')).toString('utf8')).toBe(text);
        expect(await textInFragment(`#${fragment}`)).toBe(text);
        expect(await textInFragment(`1${deflateRawSync(Buffer.from(text)).toString('base64url')}`)).toBe(text);
      }),
      { numRuns: 15 },
    );
  });

  test.each(['', '#', '#2abc', '#1', '#1!!', '#1AAAA_', '#section'])('%j holds no text', async (fragment) => {
    expect(await textInFragment(fragment)).toBeNull();
  });
});

describe('what was stored by any version', () => {
  test('settings that are not understood are as usual', () => {
    const usual = readSettings(null);
    expect(readSettings('nonsense {')).toEqual(usual);
    expect(readSettings('[1]')).toEqual(usual);
    expect(readSettings(JSON.stringify({ theme: 'dark', split: 55, pane: 'text', notebook: 'n', more: 1 }))).toEqual({
      theme: 'dark',
      split: 55,
      pane: 'text',
      notebook: 'n',
    });
    expect(readSettings(JSON.stringify({ theme: 'pink', split: 99 }))).toEqual(usual);
  });

  test('a view keeps what is understood', () => {
    expect(readView(undefined)).toEqual(plainView);
    expect(
      readView({
        forms: { t: 'modes', u: 'nonsense' },
        notation: { t: 2, u: -1, v: '3' },
        spectrumForms: { d: 'closed' },
      }),
    ).toEqual({ forms: { t: 'modes' }, notation: { t: 2 }, spectrumForms: { d: 'closed' } });
  });
});

test('a notebook is called by its first heading', () => {
  expect(titleOf('some prose\n\n## A name ##\n\n# Another')).toBe('A name');
  expect(titleOf('#no heading\n')).toBe('Notebook without a heading');
  expect(fileName('Über σ: a Name!', 'lathe')).toBe('uber-a-name.lathe');
  expect(fileName('σ', 'tex')).toBe('notebook.tex');
});

test('the list of examples names the files there are, and each is read without a problem', () => {
  const folder = join(top, 'public/examples');
  const list: readonly { readonly file: string }[] = JSON.parse(readFileSync(join(folder, 'list.json'), 'utf8'));
  const files = readdirSync(folder).filter((file) => file.endsWith('.lathe'));
  expect(list.map(({ file }) => file).sort()).toEqual(files.sort());
  expect(files.length).toBeGreaterThan(0);
  for (const file of files) {
    const { blocks, diagnostics } = parseNotebook(readFileSync(join(folder, file), 'utf8'));
    expect(diagnostics, file).toEqual([]);
    expect(blocks.length, file).toBeGreaterThan(1);
  }
});
