import { expect, test } from 'playwright/test';
import { NotebookPage } from '../pages/notebook-page';

/** Dozens of double sine functions at many digits: seconds of work on any machine. */
const text = `theory heavy
  sphere  S3, b = 7/5
  gauge   G = SU(4)
  matter      G     R
  chiral  p   adj   1/3
  chiral  q   adj   1/5
  chiral  u   sym2  1/7
  chiral  v   sym2* 1/7

value one-loop of heavy at sigma1 = 1/3, sigma2 = 1/5, sigma3 = 1/7, 1000 digits

value gamma(1/3), 20 digits
`;

test('long work can be stopped; what waits behind it is done, and it can be started again', async ({ page }) => {
  const notebook = new NotebookPage(page);
  const workers: string[] = [];
  page.on('worker', (worker) => workers.push(worker.url()));
  await notebook.openText(text);
  const heavy = notebook.card(/^value one-loop/);
  await heavy.getByRole('button', { name: 'Stop' }).click();
  await expect(heavy.getByText(/^Stopped/)).toBeVisible();
  await expect(notebook.card(/^value gamma/).locator('[data-value]')).toContainText('2.67893');
  // The stopped work ended by itself: its worker, with its tables, is still the same.
  expect(workers.length).toBe(2);
  await heavy.getByRole('button', { name: 'Start again' }).click();
  await expect(heavy.getByRole('progressbar')).toBeVisible();
  // The page stays at hand meanwhile.
  await notebook.typeAtEndOf(13, '# Written meanwhile');
  await expect(notebook.card('Text').getByRole('heading')).toHaveText('Written meanwhile');
});
