import { readFileSync } from 'node:fs';
import { expect, test } from 'playwright/test';
import { NotebookPage } from '../pages/notebook-page';

const text = `theory free
  sphere  S3
  flavor  A = U(1), mass m
  flavor  B = U(1), mass v
  matter      A   B   R
  chiral  q   1   0   1/2
  chiral  p   0   1   1/2

plot re one-loop of free, im one-loop of free over m = -1 .. 1

plot abs one-loop of free over m = -1 .. 1, v = -2 .. 2
`;

test('curves are drawn, read by keyboard, told in numbers and saved', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(text);
  const plot = notebook.plot(/^plot re/);
  await expect(plot.curves).toHaveCount(2);
  await expect(plot.root.getByRole('list', { name: 'Lines' }).getByRole('listitem')).toHaveCount(2);

  await plot.readout.focus();
  await page.keyboard.press('Home');
  await expect(plot.readout).toHaveAttribute('aria-valuetext', /^m = −1, re one-loop = .*, im one-loop = /);
  await page.keyboard.press('End');
  await expect(plot.readout).toHaveAttribute('aria-valuetext', /^m = 1, /);

  await plot.root.getByText('Table of values').click();
  await expect(plot.root.getByRole('row')).toHaveCount(26);

  const csv = await plot.take('CSV');
  const lines = readFileSync(await csv.path(), 'utf8')
    .trim()
    .split('\n');
  expect(lines[0]).toMatch(/^m,re one-loop,im one-loop/);
  expect(lines.length).toBeGreaterThan(100);
  expect(
    lines[1]
      ?.split(',')
      .slice(0, 3)
      .every((cell) => Number.isFinite(Number(cell))),
  ).toBe(true);

  const svg = readFileSync(await (await plot.take('SVG')).path(), 'utf8');
  expect(svg).toMatch(/^<svg[^>]+xmlns="http:\/\/www\.w3\.org\/2000\/svg"/);
  expect(svg).not.toContain('var(--');
  const png = readFileSync(await (await plot.take('PNG')).path());
  expect(png.subarray(1, 4).toString('latin1')).toBe('PNG');
  expect(png.length).toBeGreaterThan(3000);
});

test('a map is drawn with its scale in numbers and read by keyboard', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(text);
  const map = notebook.plot(/^plot abs/);
  await expect(map.root.locator('svg image')).toHaveAttribute('href', /^data:image\/png/);
  await expect(map.root.getByRole('list', { name: /^Colour scale/ }).getByRole('listitem')).toHaveCount(5);
  await map.readout.focus();
  await page.keyboard.press('ArrowUp');
  await expect(map.readout).toHaveAttribute('aria-valuetext', /^m = .*, v = .*: /);
  expect((await map.take('CSV')).suggestedFilename()).toMatch(/\.csv$/);
});

test('the exploring library comes when asked for, and not before', async ({ page }) => {
  // Evaluating it takes seconds of one busy core.
  test.setTimeout(90_000);
  const asked: string[] = [];
  page.on('request', (request) => asked.push(request.url()));
  const notebook = new NotebookPage(page);
  await notebook.openText(text);
  const plot = notebook.plot(/^plot re/);
  await expect(plot.curves).toHaveCount(2);
  await page.waitForTimeout(500);
  expect(asked.filter((url) => /plotly/.test(url))).toEqual([]);
  await plot.root.getByRole('button', { name: 'Explore' }).click();
  await expect(plot.root.locator('.main-svg').first()).toBeVisible({ timeout: 60_000 });
  expect(asked.filter((url) => /plotly/.test(url))).toHaveLength(1);
  await plot.root.getByRole('button', { name: 'Back to the drawing' }).click();
  await expect(plot.curves).toHaveCount(2);
});

test('the part shown is a word in the text', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(text);
  const map = notebook.card(/^plot abs/);
  await map.getByRole('radio', { name: 'arg' }).click();
  await expect.poll(() => notebook.text()).toContain('plot arg one-loop of free over m = -1 .. 1, v');
});
