import { expect, test } from 'playwright/test';
import { NotebookPage } from '../pages/notebook-page';

const sound = `# Sound

theory free
  sphere  S3
  matter      R
  chiral  q   1/3

value one-loop of free, 20 digits
`;

test('a broken notebook shows its problems and goes on working', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(sound.replace('S3', 'S7').replace('of free', 'of nothing'));
  await expect(page.locator('.cm-lintRange').first()).toBeVisible();
  const problem = notebook.sheet.getByRole('button', { name: /^Error, line 4/ });
  await expect(problem).toBeVisible();
  await problem.click();
  await expect(notebook.editor).toBeFocused();
  await notebook.write(sound);
  await expect(notebook.card(/^value/).locator('[data-value]')).toBeVisible();
  await expect(page.locator('.cm-lintRange')).toHaveCount(0);
});

test('while the text is broken the last formula stays, marked as older', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(sound);
  const theory = notebook.theory('free');
  await expect(theory.pieces.first()).toBeVisible();
  await theory.edit('q', 'R', '1/0');
  await expect(theory.root.getByText(/as it was before/)).toBeVisible();
  await expect(theory.pieces.first()).toBeVisible();
  await notebook.undo();
  await expect(theory.root.getByText(/as it was before/)).toHaveCount(0);
});

test('nothing at all, and prose alone, are notebooks too', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText('# A\n');
  await notebook.write('');
  await page.keyboard.press('Delete');
  await expect(notebook.sheet.getByText(/empty notebook/)).toBeVisible();
  await notebook.write('A *word* and $x^2$, no <b>markup</b>, no ![picture](https://example.org/x.png).\n');
  await expect(notebook.sheet.locator('em')).toHaveText('word');
  await expect(notebook.sheet.locator('.katex')).toHaveCount(1);
  await expect(notebook.sheet.locator('b, img')).toHaveCount(0);
});
