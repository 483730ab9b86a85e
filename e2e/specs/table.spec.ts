import { expect, test } from 'playwright/test';
import { NotebookPage } from '../pages/notebook-page';

const text = `# Table

theory gauge2
  sphere  S3
  gauge   G = SU(2)
  matter      G      R
  chiral  q   fund   1/2
  chiral  p   fund   1/3
`;

const line = (content: string, number: number) => content.split('\n')[number - 1];

test('a cell edited on the page is an edit of the text, and undo takes it back', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(text);
  const theory = notebook.theory('gauge2');
  await expect.poll(() => theory.formula()).toContain('s_');
  const before = await theory.formula();

  await theory.edit('q', 'R', '1/4');
  await expect.poll(async () => line(await notebook.text(), 7)).toBe('  chiral  q   fund   1/4');
  await expect.poll(() => theory.formula()).not.toBe(before);
  await expect(theory.cell('q', 'R')).toBeFocused();

  await notebook.undo();
  await expect.poll(() => notebook.text()).toBe(text);
  await expect.poll(() => theory.formula()).toBe(before);
});

test('a longer word keeps the columns in line, Escape keeps the cell', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(text);
  const theory = notebook.theory('gauge2');
  await theory.edit('q', 'G', 'adj');
  await expect.poll(async () => line(await notebook.text(), 7)).toBe('  chiral  q   adj    1/2');
  await theory.cell('p', 'G').focus();
  await page.keyboard.press('ArrowRight');
  await expect(theory.cell('p', 'R')).toBeFocused();
  await page.keyboard.press('Enter');
  await theory.field('p', 'R').fill('7');
  await page.keyboard.press('Escape');
  await expect(theory.cell('p', 'R')).toBeFocused();
  expect(line(await notebook.text(), 8)).toBe('  chiral  p   fund   1/3');
});

test('multiplets are added, copied, moved and removed', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(text);
  const theory = notebook.theory('gauge2');
  await theory.word('+ chiral').click();
  await expect.poll(async () => line(await notebook.text(), 9)).toBe('  chiral  x   fund   1/2');
  await theory.row('q').hover();
  await theory.change('Copy', 'q').click();
  await expect.poll(() => theory.names()).toEqual(['q', 'y', 'p', 'x']);
  await theory.row('p').hover();
  await theory.move('p', 'up').click();
  await expect.poll(() => theory.names()).toEqual(['q', 'p', 'y', 'x']);
  await theory.row('q').hover();
  await theory.change('Remove', 'q').click();
  await expect.poll(() => theory.names()).toEqual(['p', 'y', 'x']);
  await expect(theory.root.getByRole('button', { name: /^Name of p/ })).toBeFocused();
  for (let step = 0; step < 4; step += 1) await notebook.undo();
  await expect.poll(() => notebook.text()).toBe(text);
});

test('groups are added and changed', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(text);
  const theory = notebook.theory('gauge2');
  await theory.word('+ flavor group').click();
  await expect
    .poll(() => notebook.text())
    .toBe(`# Table

theory gauge2
  sphere  S3
  gauge   G = SU(2)
  flavor  F = U(1)
  matter      G      F   R
  chiral  q   fund   0   1/2
  chiral  p   fund   0   1/3
`);
  await theory.edit('q', 'F', '1');
  await theory.editGroup('G', 'SU(3)');
  await expect.poll(async () => line(await notebook.text(), 5)).toBe('  gauge   G = SU(3)');
  await expect.poll(() => theory.formula()).toContain('-m');
  await theory.word('+ gauge group').click();
  await expect.poll(async () => line(await notebook.text(), 7)).toBe('  gauge   H = U(1)');
  for (let step = 0; step < 4; step += 1) await notebook.undo();
  await expect.poll(() => notebook.text()).toBe(text);
});

test('a representation is chosen from the list', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(text.replace('SU(2)', 'SU(3)'));
  const theory = notebook.theory('gauge2');
  await theory.cell('p', 'G').click();
  await theory.word('choose…').click();
  const chooser = notebook.dialog('Representations of SU(3)');
  await expect(chooser.getByRole('row').nth(3)).toBeVisible();
  await chooser.getByRole('searchbox').fill('8');
  const row = chooser.getByRole('row').filter({ hasText: '[1,1]' });
  await expect(row).toHaveCount(1);
  const word = (await row.getByRole('button').textContent()) ?? '';
  await row.getByRole('button').click();
  await expect(chooser).toHaveCount(0);
  await expect.poll(async () => line(await notebook.text(), 8)?.split(/\s+/)).toEqual(['', 'chiral', 'p', word, '1/3']);
  await expect(theory.cell('p', 'G')).toBeVisible();
});
