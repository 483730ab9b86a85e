import { readFileSync } from 'node:fs';
import { expect, test } from 'playwright/test';
import { NotebookPage } from '../pages/notebook-page';

const text = `theory free
  sphere  S3, b = 5/4
  matter      R
  chiral  q   1/3

value one-loop of free, 20 digits
`;

test.beforeEach(async ({ context }) => {
  await context.grantPermissions(['clipboard-read', 'clipboard-write']);
});

const clipboard = (notebook: NotebookPage) => notebook.page.evaluate(() => navigator.clipboard.readText());

test('the formula goes to the clipboard as LaTeX, and the page says so', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(text);
  const theory = notebook.theory('free');
  await expect.poll(() => theory.formula()).toMatch(/s_\{?b/);
  await theory.word(/^LaTeX/).click();
  await expect(notebook.notices).toContainText('The LaTeX of free is on the clipboard');
  expect(await clipboard(notebook)).toMatch(/s_\{?b/);
});

test('the document stands by itself, to copy or to save', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(text);
  await notebook
    .theory('free')
    .word(/^Document/)
    .click();
  const dialog = notebook.dialog('Document of free');
  const shown = await dialog.getByRole('textbox').inputValue();
  expect(shown).toMatch(/\\documentclass[\s\S]*\\begin\{document\}[\s\S]*\\end\{document\}/);
  const saved = page.waitForEvent('download');
  await dialog.getByRole('button', { name: 'Save as free.tex' }).click();
  expect(readFileSync(await (await saved).path(), 'utf8')).toBe(shown);
  await dialog.getByRole('button', { name: 'Copy', exact: true }).click();
  expect(await clipboard(notebook)).toBe(shown);
  await expect(dialog).toHaveCount(0);
});

test('a value is copied as one number though it is shown in groups', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(text);
  const value = notebook.card(/^value/);
  await expect(value.locator('[data-value]')).toHaveText(/^\s*\d+\.\d{15,}/);
  await value.getByRole('button', { name: /^Copy/ }).click();
  expect(await clipboard(notebook)).toMatch(/^\d+\.\d{15,}$/);
});
