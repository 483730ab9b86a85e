import { expect, test } from 'playwright/test';

test('after one visit the page opens without a connection', async ({ page, context }) => {
  await page.goto('./');
  await page.evaluate(async () => {
    const { serviceWorker } = navigator;
    await serviceWorker.ready;
    if (!serviceWorker.controller) {
      await new Promise((taken) => serviceWorker.addEventListener('controllerchange', taken, { once: true }));
    }
  });
  // What the first page still fetches would be broken off by loading it again.
  await page.waitForLoadState('networkidle');
  const failures: string[] = [];
  page.on('requestfailed', (request) => {
    // A worker may just be asking whether its work is still wanted (workers/stop-token.ts); that needs no connection.
    const leaving = request.failure()?.errorText === 'net::ERR_ABORTED';
    if (!leaving && !request.url().startsWith('blob:')) failures.push(request.url());
  });
  await context.setOffline(true);
  await page.reload();
  await expect(page.getByRole('main')).toBeVisible();
  expect(failures).toEqual([]);
});
