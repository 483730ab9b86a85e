import { expect, test } from 'playwright/test';
import { NotebookPage } from '../pages/notebook-page';

const theory = `# One flavour

theory pair
  sphere  S3, b = 5/4
  gauge   G = U(1)
  matter      G   R
  chiral  q   1   1/3
  chiral  p  -1   1/3
`;

test('a typed theory is read, checked and typeset', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.open();
  await notebook.write(theory);
  const pair = notebook.theory('pair');
  await expect(pair.rows).toHaveCount(2);
  expect(await pair.names()).toEqual(['q', 'p']);
  await expect.poll(() => pair.formula()).toMatch(/s_\{?b/);
  await expect(pair.checks.first()).toBeVisible();
  await expect(notebook.card('Text').getByRole('heading', { name: 'One flavour' })).toBeVisible();
  await expect(page).toHaveTitle(/One flavour/);
});

test('a check opens to its formula and its source', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(theory);
  const check = notebook.theory('pair').checks.first();
  await expect(check.locator('.katex').last()).toBeHidden();
  await check.locator('summary').click();
  await expect(check.locator('.katex').last()).toBeVisible();
  await expect(check.getByText(/\d{4}/)).toBeVisible();
});

test('the form of the formula and its notation are chosen with the keyboard too', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(theory);
  const pair = notebook.theory('pair');
  await expect.poll(() => pair.formula()).toMatch(/s_\{?b/);
  const functions = await pair.formula();
  await pair.form('functions').focus();
  await page.keyboard.press('ArrowLeft');
  await expect(pair.form('unpaired')).toBeChecked();
  await expect.poll(() => pair.formula()).not.toBe(functions);
  await pair.form('functions').check();
  await expect.poll(() => pair.formula()).toBe(functions);
  await pair.root.getByRole('group', { name: 'notation' }).getByRole('radio').nth(1).check();
  await expect.poll(() => pair.formula()).not.toMatch(/s_\{?b/);
});

test('pointing at a multiplet lights its row, its line and its factors', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(theory);
  const pair = notebook.theory('pair');
  await expect(pair.pieces.first()).toBeVisible();
  await pair.row('p').hover();
  await expect(pair.row('p')).toHaveAttribute('data-lit', 'true');
  await expect(pair.row('q')).not.toHaveAttribute('data-lit');
  await expect(page.locator('.cm-lit').first()).toContainText('chiral');
  await expect(pair.root.locator('[data-piece][data-lit]')).toHaveCount(1);
  // By keyboard: the focus lights what it is on.
  await pair.cell('q', 'R').focus();
  await page.mouse.move(0, 0);
  await expect(pair.row('q')).toHaveAttribute('data-lit', 'true');
});
