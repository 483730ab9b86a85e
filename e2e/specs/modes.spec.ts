import { expect, test } from 'playwright/test';
import { NotebookPage } from '../pages/notebook-page';

test('the modes of a theory come with the table of their pairs', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(`theory lamp
  sphere  S3
  gauge   G = SU(2)
  matter      G      R
  chiral  q   fund   1/3

formula lamp as modes
`);
  const card = notebook.card(/^formula/);
  const pairs = card.getByRole('table', { name: /^Pairs of modes of q/ });
  await expect(pairs.getByRole('columnheader')).toHaveText(['factor', 'levels', 'bosons', 'fermions', 'left']);
  await expect(pairs.getByRole('row')).toHaveCount(4);
  await expect(pairs.locator('tfoot annotation')).toHaveText(/\\frac\{n\+\\frac\{2\}\{3\}/);
  await expect(card.getByRole('table', { name: /^Pairs of modes of vector/ })).toBeVisible();
});

test('all weights of a large factor are listed, page by page', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(`theory eight
  sphere  S3
  gauge   G = SU(8)
  matter      G                 R
  chiral  q   [1,1,1,0,0,0,0]   1/3
`);
  const { root } = notebook.theory('eight');
  // The highest orbit: an ordered choice of three of eight coordinates, 336 weights.
  await root.locator('[data-piece] button[aria-expanded]').nth(1).click();
  const where = root.getByRole('status');
  await expect(where).toHaveText(/^Weights 1 to 200 of 336$/);
  await root.getByRole('button', { name: 'Next' }).click();
  await expect(where).toHaveText(/^Weights 201 to 336 of 336$/);
  await root.getByRole('button', { name: 'Previous' }).click();
  await expect(where).toHaveText(/^Weights 1 to 200 of 336$/);
});
