// What the built site may weigh. The limits are decisions of this project, in kilobytes after gzip -9: a first visit
// over a slow line, and a plotting library that must not stand in its way. There is no outside source.
import { expect, test } from 'playwright/test';
import { builtFiles, builtText, bytes, firstLoad, zipped } from '../built-site';

const all = builtFiles();
const chunks = (name: RegExp) => all.filter((file) => name.test(file));

test('the first visit fetches at most 200 kB of script', () => {
  const first = firstLoad();
  expect(first.length).toBeGreaterThan(0);
  expect(zipped(first)).toBeLessThanOrEqual(200);
});

test('the first visit fetches neither the editor nor the plotting library, nor decimal arithmetic', () => {
  const first = firstLoad();
  expect(first.filter((file) => /plotly|codemirror/.test(file))).toEqual([]);
  expect(first.filter((file) => builtText(file).includes('DecimalError'))).toEqual([]);
  expect(builtText('index.html')).not.toMatch(/plotly|codemirror/);
});

// A chunk that is not built weighs nothing: what must be there is checked by the specs that use it.
for (const { name, limit } of [
  { name: /^assets\/codemirror-.*\.js$/, limit: 130 },
  // Loaded after the first paint, off the page's thread: groups, spheres, spectra and both tiers of every function.
  { name: /^assets\/engine\.worker-.*\.js$/, limit: 240 },
  { name: /^assets\/plotly-.*\.js$/, limit: 1450 },
]) {
  test(`chunks ${name.source} weigh at most ${limit} kB`, () => {
    expect(zipped(chunks(name))).toBeLessThanOrEqual(limit);
  });
}

test('the site takes at most 7 MB on disk, fonts in one format', () => {
  expect(all).toContain('index.html');
  expect(bytes(all)).toBeLessThanOrEqual(7_000_000);
  expect(chunks(/\.(?:woff|ttf)$/)).toEqual([]);
});

test('the offline cache knows every built file', () => {
  const cache = builtText('sw.js');
  expect(cache).toMatch(/"revision":"[0-9a-f]{16}"/);
  expect(all.filter((file) => file !== 'sw.js' && !cache.includes(JSON.stringify(file)))).toEqual([]);
});
