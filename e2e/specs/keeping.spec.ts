import { readFileSync } from 'node:fs';
import { inflateRawSync } from 'node:zlib';
import { expect, test } from 'playwright/test';
import { NotebookPage } from '../pages/notebook-page';

test('the first visit shows the worked example', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.open();
  await expect(notebook.card('Text').first().getByRole('heading', { level: 1 })).toHaveText('First light');
  await expect(notebook.theory('beacon').pieces.first()).toBeVisible();
});

test('what was typed is there after the page is loaded again', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.open();
  await notebook.write('# Kept\n\nA sentence to keep.\n');
  await expect(page.getByText('saving…')).toHaveCount(0);
  await expect(notebook.saved).toBeVisible();
  await page.reload();
  await expect.poll(() => notebook.text()).toBe('# Kept\n\nA sentence to keep.\n');
});

test('several notebooks are kept, opened, deleted, and a deleted one is brought back', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText('# First of two\n');
  await notebook.word('Notebooks').click();
  await notebook.dialog('Notebooks').getByRole('button', { name: 'New', exact: true }).click();
  await expect.poll(() => notebook.text()).toContain('# New notebook');
  await notebook.write('# Second of two\n');
  await expect(notebook.saved).toBeVisible();

  await page.keyboard.press('ControlOrMeta+o');
  const dialog = notebook.dialog('Notebooks');
  await dialog.getByRole('button', { name: 'First of two', exact: true }).click();
  await expect.poll(() => notebook.text()).toBe('# First of two\n');

  await notebook.word('Notebooks').click();
  await dialog.getByRole('button', { name: 'Delete Second of two' }).click();
  await expect(dialog.getByRole('button', { name: 'Second of two', exact: true })).toHaveCount(0);
  await page.keyboard.press('Escape');
  await expect(dialog).toHaveCount(0);
  await notebook.notices.getByRole('button', { name: 'Undo' }).click();
  await notebook.word('Notebooks').click();
  await expect(dialog.getByRole('button', { name: 'Second of two', exact: true })).toBeVisible();
});

test('a notebook is saved as a file and opened from one', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText('# On paper\n');
  await notebook.word('Notebooks').click();
  const saved = page.waitForEvent('download');
  await notebook.dialog('Notebooks').getByRole('button', { name: 'Save this one as a file' }).click();
  const file = await saved;
  expect(file.suggestedFilename()).toBe('on-paper.lathe');
  expect(readFileSync(await file.path(), 'utf8')).toBe('# On paper\n');

  const picking = page.waitForEvent('filechooser');
  await notebook.dialog('Notebooks').getByRole('button', { name: 'Open a file…' }).click();
  const content = '# From elsewhere\n\nlet r = 1/2\n';
  await (await picking).setFiles({ name: 'x.lathe', mimeType: 'text/plain', buffer: Buffer.from(content) });
  await expect.poll(() => notebook.text()).toBe(content);
});

test('a file dropped on the desk is opened', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText('# Below\n');
  const carried = await page.evaluateHandle(() => {
    const data = new DataTransfer();
    data.items.add(new File(['# Dropped\n'], 'dropped.lathe', { type: 'text/plain' }));
    return data;
  });
  await page.dispatchEvent('main', 'dragover', { dataTransfer: carried });
  await expect(page.getByText('Drop the notebook here')).toBeVisible();
  await page.dispatchEvent('main', 'drop', { dataTransfer: carried });
  await expect.poll(() => notebook.text()).toBe('# Dropped\n');
});

test('a link holds the whole text', async ({ page, context }) => {
  await context.grantPermissions(['clipboard-read', 'clipboard-write']);
  const text = '# Shared\n\nWith $\\sigma$ and σ, ø and — in it.\n';
  const notebook = new NotebookPage(page);
  await notebook.openText(text);
  expect(new URL(page.url()).hash).toBe('');
  await notebook.word('Share').click();
  await expect(notebook.notices).toContainText('link');
  const link = await page.evaluate(() => navigator.clipboard.readText());
  const fragment = new URL(link).hash;
  expect(fragment.slice(0, 2)).toBe('#1');
  expect(inflateRawSync(Buffer.from(fragment.slice(2), 'base64url')).toString('utf8')).toBe(text);
});

test('a browser that keeps nothing is told of, and the notebook works all the same', async ({ page }) => {
  await page.addInitScript(() => {
    IDBFactory.prototype.open = () => {
      throw new DOMException('not allowed here', 'SecurityError');
    };
  });
  const notebook = new NotebookPage(page);
  await notebook.open();
  await expect(notebook.theory('beacon').pieces.first()).toBeVisible();
  await expect(page.getByText('not kept: save it as a file')).toBeVisible();
  await notebook.write('# Typed all the same\n');
  await expect(notebook.card('Text').getByRole('heading')).toHaveText('Typed all the same');
});

test('two tabs on one notebook lose nothing', async ({ page, context }) => {
  const first = new NotebookPage(page);
  await first.openText('# Two tabs\n');
  await expect(first.saved).toBeVisible();
  const second = new NotebookPage(await context.newPage());
  await second.open();
  await expect.poll(() => second.text()).toBe('# Two tabs\n');
  await second.typeAtEndOf(1, ' and more');
  await expect.poll(() => first.text()).toBe('# Two tabs and more\n');
  await expect(first.notices).toContainText('Another tab');
  await first.undo();
  await expect.poll(() => first.text()).toBe('# Two tabs\n');
});
