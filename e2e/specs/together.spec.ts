import { expect, test } from 'playwright/test';
import { NotebookPage } from '../pages/notebook-page';

/** Many short cards, so that both halves are taller than the window. */
const text = Array.from(
  { length: 60 },
  (_, at) => `## Part ${at + 1}\n\nWords of part ${at + 1}.\n\nlet a${at + 1} = ${at + 1}\n\n`,
).join('');

test('the halves scroll together, whichever is scrolled', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.open();
  await notebook.write(text);
  await expect(notebook.sheet.getByRole('heading', { name: 'Part 60' })).toBeAttached();
  const scroller = page.locator('.cm-scroller');
  const top = (name: string) => notebook.sheet.getByRole('heading', { name, exact: true }).boundingBox();

  await scroller.hover();
  await page.mouse.wheel(0, -100_000);
  await expect.poll(() => notebook.sheet.evaluate((sheet) => sheet.scrollTop)).toBeLessThan(40);
  await page.mouse.wheel(0, 1200);
  await expect.poll(() => notebook.sheet.evaluate((sheet) => sheet.scrollTop)).toBeGreaterThan(200);
  const seen = await page.locator('.cm-line', { hasText: /^## Part/ }).evaluateAll((lines) => {
    const first = lines.find((line) => line.getBoundingClientRect().top > 40);
    return first?.textContent?.slice(3) ?? '';
  });
  const place = await top(seen);
  expect(place?.y).toBeGreaterThan(0);
  expect(place?.y).toBeLessThan(300);

  const before = await scroller.evaluate((element) => element.scrollTop);
  await notebook.sheet.hover();
  await page.mouse.wheel(0, 900);
  await expect.poll(() => scroller.evaluate((element) => element.scrollTop)).toBeGreaterThan(before + 100);
});

test('the cursor brings its card into sight', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.open();
  await notebook.write(text);
  await page.keyboard.press('ControlOrMeta+Home');
  const first = notebook.sheet.getByRole('heading', { name: 'Part 1', exact: true });
  await expect(first).toBeInViewport();
  await expect(
    notebook.card('Text').filter({ has: page.getByRole('heading', { name: 'Part 1', exact: true }) }),
  ).toHaveAttribute('aria-current', 'location');
  await page.keyboard.press('ControlOrMeta+End');
  await expect(notebook.sheet.getByRole('heading', { name: 'Part 60', exact: true })).toBeInViewport();
});
