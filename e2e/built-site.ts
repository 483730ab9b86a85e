import { readdirSync, readFileSync, statSync } from 'node:fs';
import { join, posix, relative, resolve, sep } from 'node:path';
import { gzipSync } from 'node:zlib';

const folder = resolve(import.meta.dirname, '../dist/site');

/** Paths of all built files, from the folder of the site. */
export function builtFiles(): string[] {
  return readdirSync(folder, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => relative(folder, join(entry.parentPath, entry.name)).split(sep).join('/'))
    .sort();
}

export function builtText(file: string): string {
  return readFileSync(join(folder, file), 'utf8');
}

export function bytes(files: readonly string[]): number {
  return files.reduce((sum, file) => sum + statSync(join(folder, file)).size, 0);
}

/** Kilobytes after gzip -9, each file by itself, as a server sends them. */
export function zipped(files: readonly string[]): number {
  return files.reduce((sum, file) => sum + gzipSync(readFileSync(join(folder, file)), { level: 9 }).length, 0) / 1000;
}

/** The scripts a first visit fetches: what index.html names, and all that is statically imported from there. */
export function firstLoad(): string[] {
  const named = [...builtText('index.html').matchAll(/(?:src|href)="\.\/([^"]+\.js)"/g)].map(([, file]) => file ?? '');
  const reached = new Set(named);
  for (const file of reached) {
    for (const [, target] of builtText(file).matchAll(/(?:\bfrom|\bimport)\s*["'](\.[^"']+\.js)["']/g)) {
      reached.add(posix.join(posix.dirname(file), target ?? ''));
    }
  }
  return [...reached];
}
