import { expect, test } from 'playwright/test';
import { NotebookPage } from '../pages/notebook-page';

const text = `let r = 1/2 in 1/10 .. 9/10

theory free
  sphere  S3
  flavor  A = U(1), mass m
  matter      A   R
  chiral  q   1   r

plot abs one-loop of free over m = -2 .. 2
`;

test('the curve follows a dragged slider, and the text takes its value when it is let go', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(text);
  const plot = notebook.plot(/^plot abs/);
  await expect.poll(() => plot.path()).not.toBe('');
  const first = await plot.path();
  const slider = plot.slider('r');
  await slider.scrollIntoViewIfNeeded();
  const box = await slider.boundingBox();
  if (!box) throw new Error('the slider has no place');
  const y = box.y + box.height / 2;
  await page.mouse.move(box.x + box.width / 2, y);
  await page.mouse.down();
  await page.mouse.move(box.x + box.width * 0.8, y, { steps: 8 });
  await expect.poll(() => plot.path()).not.toBe(first);
  expect(await notebook.text()).toBe(text);
  await page.mouse.up();
  await expect.poll(() => notebook.text()).toMatch(/^let r = 0\.7\d* in 1\/10 \.\. 9\/10/);
  await notebook.undo();
  await expect.poll(() => notebook.text()).toBe(text);
  await expect.poll(() => plot.path()).toBe(first);
});

test('the arrow keys move a slider, one step of undo a press', async ({ page }) => {
  const notebook = new NotebookPage(page);
  await notebook.openText(text);
  const plot = notebook.plot(/^plot abs/);
  await expect.poll(() => plot.path()).not.toBe('');
  await plot.slider('r').focus();
  await page.keyboard.press('ArrowRight');
  await expect.poll(() => notebook.text()).toContain('let r = 0.505 in');
  await page.keyboard.press('ArrowRight');
  await expect.poll(() => notebook.text()).toContain('let r = 0.51 in');
  await notebook.undo();
  await expect.poll(() => notebook.text()).toContain('let r = 0.505 in');
});
