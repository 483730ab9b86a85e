import AxeBuilder from '@axe-core/playwright';
import { expect, type Page, test } from 'playwright/test';
import { NotebookPage } from '../pages/notebook-page';

// Reading a whole page for accessibility takes many seconds on a busy machine.
test.describe.configure({ timeout: 150_000 });

const tags = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];

async function violations(page: Page): Promise<readonly string[]> {
  const { violations: found, passes } = await new AxeBuilder({ page }).withTags(tags).analyze();
  expect(passes.length).toBeGreaterThan(10);
  return found.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 120)).join(' | ')}`);
}

async function worked(page: Page): Promise<NotebookPage> {
  const notebook = new NotebookPage(page);
  await notebook.open();
  await expect(notebook.theory('beacon').pieces.first()).toBeVisible();
  await expect(notebook.plot(/^plot abs/).curves.first()).toBeVisible();
  return notebook;
}

for (const theme of ['light', 'dark'] as const) {
  test(`the page is accessible in ${theme}`, async ({ page }) => {
    const notebook = await worked(page);
    await notebook.theme(theme);
    await expect(page.locator('html')).toHaveAttribute('data-theme', theme);
    expect(await violations(page)).toEqual([]);
    await page.screenshot({ path: `e2e/screenshots/desk-${theme}.png` });
    await notebook.word('Keys').click();
    await expect(notebook.dialog('Keys')).toBeVisible();
    expect(await violations(page)).toEqual([]);
    await page.keyboard.press('Escape');
    await notebook.word('Notebooks').click();
    await expect(notebook.dialog('Notebooks').getByRole('button', { name: 'First light' }).first()).toBeVisible();
    expect(await violations(page)).toEqual([]);
  });
}

test('forced colours are accessible and keep the focus visible', async ({ page }) => {
  await page.emulateMedia({ forcedColors: 'active' });
  const notebook = await worked(page);
  expect(await violations(page)).toEqual([]);
  await notebook.theory('beacon').cell('q', 'R').focus();
  await page.keyboard.press('ArrowDown');
  const outline = await notebook
    .theory('beacon')
    .cell('p', 'R')
    .evaluate((cell) => getComputedStyle(cell).outlineStyle);
  expect(outline).not.toBe('none');
});

test('the theme follows the system until it is chosen, and the choice is kept', async ({ page }) => {
  const ground = () => page.evaluate(() => getComputedStyle(document.documentElement).backgroundColor);
  await page.emulateMedia({ colorScheme: 'light' });
  const notebook = await worked(page);
  const light = await ground();
  await page.emulateMedia({ colorScheme: 'dark' });
  const dark = await ground();
  expect(dark).not.toBe(light);
  await notebook.theme('light');
  expect(await ground()).toBe(light);
  await page.reload();
  await expect.poll(ground).toBe(light);
});

test('a narrow screen shows one half at a time and never scrolls sideways', async ({ page }) => {
  await page.setViewportSize({ width: 320, height: 640 });
  const notebook = new NotebookPage(page);
  await page.goto('./');
  await expect(notebook.theory('beacon').pieces.first()).toBeVisible({ timeout: 15_000 });
  await expect(notebook.editor).toBeHidden();
  const wider = () =>
    page.evaluate(
      () =>
        document.documentElement.scrollWidth > innerWidth ||
        (document.querySelector('main')?.scrollWidth ?? 0) > innerWidth,
    );
  expect(await wider()).toBe(false);
  expect(await violations(page)).toEqual([]);
  await page.screenshot({ path: 'e2e/screenshots/narrow-page.png' });
  await page.getByRole('radio', { name: 'Text' }).check({ force: true });
  await expect(notebook.editor).toBeVisible();
  await expect(notebook.sheet).toBeHidden();
  expect(await wider()).toBe(false);
  await page.screenshot({ path: 'e2e/screenshots/narrow-text.png' });
});

test('the border between the halves moves by keyboard and by pointer', async ({ page }) => {
  await worked(page);
  const border = page.getByRole('separator');
  const before = await border.boundingBox();
  await border.focus();
  await page.keyboard.press('ArrowRight');
  await expect(border).toHaveAttribute('aria-valuenow', '42');
  expect((await border.boundingBox())?.x ?? 0).toBeGreaterThan(before?.x ?? 0);
  await page.keyboard.press('Home');
  await expect(border).toHaveAttribute('aria-valuenow', '20');
  const place = await border.boundingBox();
  if (!place) throw new Error('the border has no place');
  await page.mouse.move(place.x, place.y + 200);
  await page.mouse.down();
  await page.mouse.move(640, place.y + 200, { steps: 4 });
  await page.mouse.up();
  await expect(border).toHaveAttribute('aria-valuenow', /^(?:49|50)/);
});

test('print is clean paper: the page in full, no desk around it', async ({ page }) => {
  const notebook = await worked(page);
  await page.emulateMedia({ media: 'print' });
  await expect(page.getByRole('banner')).toBeHidden();
  await expect(notebook.editor).toBeHidden();
  await expect(notebook.theory('beacon').pieces.first()).toBeVisible();
  await expect(notebook.theory('beacon').form('functions')).toBeHidden();
  const tall = await notebook.sheet.evaluate((sheet) => sheet.scrollHeight <= sheet.clientHeight + 1);
  expect(tall).toBe(true);
});

test('a click on a card leads the cursor to its text, and the bar shows where it is', async ({ page }) => {
  const notebook = await worked(page);
  const value = notebook.card(/^value/);
  await value.getByText('second route').click();
  await expect(value).toHaveAttribute('aria-current', 'location');
  await notebook.theory('beacon').word('beacon').first().click();
  await expect(notebook.editor).toBeFocused();
  await expect(notebook.theory('beacon').root).toHaveAttribute('aria-current', 'location');
  await page.keyboard.press('F6');
  await expect(notebook.sheet).toBeFocused();
});
