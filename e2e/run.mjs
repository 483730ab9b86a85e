// Runs the browser tests against the built page: finds a browser and a free port, then starts the runner.
// Arguments are the runner's, for example: node e2e/run.mjs specs/opens.spec.ts
import { spawnSync } from 'node:child_process';
import { createServer } from 'node:net';
import { join } from 'node:path';
import { requireBrowser } from './browser.mjs';

function freePort() {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.address();
      server.close(() => resolve(port));
    });
  });
}

const env = {
  ...process.env,
  CHROMIUM_PATH: requireBrowser(),
  E2E_PORT: process.env.E2E_PORT ?? String(await freePort()),
};
const cli = join(import.meta.dirname, '../node_modules/playwright/cli.js');
const config = join(import.meta.dirname, 'playwright.config.ts');
const { status } = spawnSync(process.execPath, [cli, 'test', '-c', config, ...process.argv.slice(2)], {
  stdio: 'inherit',
  env,
});
process.exitCode = status ?? 1;
