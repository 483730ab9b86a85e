// Finds a Chromium for the browser tests, and fetches one where that is possible without asking.
import { execFileSync, spawnSync } from 'node:child_process';
import { existsSync, realpathSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { chromium } from 'playwright';

const names = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable', 'chrome', 'msedge'];

const usualPlaces = {
  linux: [
    '/usr/lib/chromium/chromium',
    '/usr/lib64/chromium-browser/chromium-browser',
    '/snap/bin/chromium',
    '/opt/google/chrome/chrome',
  ],
  darwin: [
    '/Applications/Chromium.app/Contents/MacOS/Chromium',
    '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
    '/Applications/Microsoft Edge.app/Contents/MacOS/Microsoft Edge',
  ],
  win32: [process.env.PROGRAMFILES, process.env['PROGRAMFILES(X86)'], process.env.LOCALAPPDATA]
    .filter(Boolean)
    .flatMap((folder) => [
      join(folder, 'Google/Chrome/Application/chrome.exe'),
      join(folder, 'Chromium/Application/chrome.exe'),
      join(folder, 'Microsoft/Edge/Application/msedge.exe'),
    ]),
};

/** Present and able to start: a launcher whose libraries are missing is as good as none. */
function works(path) {
  if (!path || !existsSync(path)) return false;
  if (process.platform === 'win32') return true;
  return spawnSync(path, ['--version'], { timeout: 30_000, stdio: 'ignore' }).status === 0;
}

function playwrightsOwn() {
  try {
    return chromium.executablePath();
  } catch {
    return undefined;
  }
}

function installed() {
  const onPath = (process.env.PATH ?? '').split(delimiter).flatMap((folder) => names.map((name) => join(folder, name)));
  return [playwrightsOwn(), ...onPath, ...(usualPlaces[process.platform] ?? [])].find(works);
}

function attempt(command, args, env = {}) {
  console.error(`looking for a browser: ${command} ${args.join(' ')}`);
  return spawnSync(command, args, { stdio: ['ignore', 2, 2], env: { ...process.env, ...env } }).status === 0;
}

function installBySystem() {
  if (process.platform !== 'linux' || spawnSync('apt-get', ['--version'], { stdio: 'ignore' }).status !== 0) return;
  const isRoot = process.getuid?.() === 0;
  if (!isRoot && spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' }).status !== 0) return;
  const apt = (...args) => {
    const command = ['env', 'DEBIAN_FRONTEND=noninteractive', 'apt-get', ...args];
    return isRoot ? attempt(command[0], command.slice(1)) : attempt('sudo', ['-n', ...command]);
  };
  apt('update', '-q');
  apt('install', '-y', '-q', '--no-install-recommends', 'chromium');
}

function download() {
  const cli = join(import.meta.dirname, '../node_modules/playwright/cli.js');
  attempt(process.execPath, [cli, 'install', 'chromium']);
}

/** The path of a Chromium that starts, or undefined after every way was tried. */
export function findBrowser() {
  const given = process.env.CHROMIUM_PATH;
  if (given) {
    if (works(given)) return given;
    console.error(`CHROMIUM_PATH is set to ${given}, which does not start.`);
  }
  for (const fetchOne of [() => {}, installBySystem, download]) {
    fetchOne();
    const found = installed();
    if (found) return found;
  }
  return undefined;
}

/** As findBrowser, but ends the process with the remedies when there is none. */
export function requireBrowser() {
  const found = findBrowser();
  if (found) return found;
  console.error(
    [
      'The browser tests need Chromium, and none was found or could be fetched. Any one of these helps:',
      '  1. install Chromium or Chrome with the system (Debian: apt-get install chromium);',
      '  2. set CHROMIUM_PATH to the path of one;',
      '  3. with a connection, run: npx playwright install --with-deps chromium',
    ].join('\n'),
  );
  process.exit(1);
}

if (process.argv[1] && import.meta.filename === realpathSync(process.argv[1])) {
  const path = requireBrowser();
  const version =
    process.platform === 'win32' ? '' : execFileSync(path, ['--version'], { stdio: ['ignore', 'pipe', 'ignore'] });
  console.log(`${path} ${version}`.trim());
}
