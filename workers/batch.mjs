// Starts the batch command: bundles workers/batch.ts when a source is newer than the bundle, then runs it.
import { mkdirSync, readdirSync, renameSync, rmSync, statSync, utimesSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { pathToFileURL } from 'node:url';

const top = resolve(import.meta.dirname, '..');
const bundle = join(top, 'dist/batch/batch.js');

function changedAt(path) {
  return statSync(path, { throwIfNoEntry: false })?.mtimeMs ?? 0;
}

function newestSource() {
  let newest = Math.max(changedAt(join(top, 'vite.config.ts')), changedAt(join(top, 'package-lock.json')));
  for (const folder of ['engine', 'workers']) {
    for (const entry of readdirSync(join(top, folder), { recursive: true, withFileTypes: true })) {
      newest = Math.max(newest, changedAt(join(entry.parentPath, entry.name)));
    }
  }
  return newest;
}

/** Built beside its place and moved there in one step, so that several commands started at once do no harm. */
async function bundleAgain() {
  const startedAt = new Date();
  const aside = join(top, 'dist', `batch-${process.pid}`);
  try {
    const { build } = await import('vite');
    await build({
      configFile: join(top, 'vite.config.ts'),
      mode: 'batch',
      logLevel: 'silent',
      build: { outDir: aside },
    });
    utimesSync(join(aside, 'batch.js'), startedAt, startedAt);
    mkdirSync(join(top, 'dist/batch'), { recursive: true });
    renameSync(join(aside, 'batch.js'), bundle);
  } finally {
    rmSync(aside, { recursive: true, force: true });
  }
}

try {
  if (changedAt(bundle) < newestSource()) await bundleAgain();
  // npm starts scripts in the top folder; file names belong to the folder the user stands in.
  if (process.env.INIT_CWD) process.chdir(process.env.INIT_CWD);
  process.argv[1] = bundle;
  await import(pathToFileURL(bundle).href);
} catch (error) {
  console.error(error);
  process.exitCode = 3;
}
