import { expect, test } from 'playwright/test';

test('the page opens, asks no other origin for anything and logs no error', async ({ page, baseURL }) => {
  const foreign: string[] = [];
  const errors: string[] = [];
  const own = new URL(baseURL ?? '').origin;
  page.on('request', (request) => {
    const url = new URL(request.url());
    if (url.protocol.startsWith('http') && url.origin !== own) foreign.push(request.url());
  });
  page.on('console', (message) => {
    if (message.type() === 'error') errors.push(message.text());
  });
  page.on('pageerror', (error) => errors.push(String(error)));

  await page.goto('./');
  await expect(page.getByRole('main')).toBeVisible();
  await expect(page).toHaveTitle(/Spherelathe/);
  await page.waitForLoadState('networkidle');

  expect(foreign).toEqual([]);
  expect(errors).toEqual([]);
});
