import { defineConfig } from 'playwright/test';

const port = Number(process.env.E2E_PORT ?? 4719);
const executablePath = process.env.CHROMIUM_PATH;

export default defineConfig({
  testDir: './specs',
  testMatch: '**/*.spec.ts',
  outputDir: './.out/results',
  fullyParallel: false,
  forbidOnly: true,
  retries: 0,
  workers: 1,
  // Twice what a quiet machine needs: the suite shares two cores with its own web server.
  timeout: 90_000,
  expect: { timeout: 20_000 },
  reporter: process.env.E2E_REPORT ? [['list'], ['json', { outputFile: process.env.E2E_REPORT }]] : [['list']],
  use: {
    baseURL: `http://127.0.0.1:${port}/`,
    viewport: { width: 1280, height: 800 },
    trace: 'retain-on-failure',
    launchOptions: {
      ...(executablePath ? { executablePath } : {}),
      args: [
        ...(process.getuid?.() === 0 ? ['--no-sandbox'] : []),
        '--disable-background-networking',
        '--disable-component-update',
        '--no-first-run',
        '--disable-gpu',
      ],
    },
  },
  webServer: {
    command: `node node_modules/vite/bin/vite.js preview --host 127.0.0.1 --port ${port} --strictPort`,
    cwd: '..',
    url: `http://127.0.0.1:${port}/`,
    reuseExistingServer: false,
    timeout: 60_000,
  },
});
