import { readdirSync, readFileSync } from 'node:fs';
import { join, relative, resolve, sep } from 'node:path';

export const top = resolve(import.meta.dirname, '..');

const notOurs = new Set(['node_modules', 'dist', '.git', '.out']);

function walk(folder: string): string[] {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    if (notOurs.has(entry.name) || entry.name.endsWith('.log')) return [];
    const path = join(folder, entry.name);
    if (entry.isDirectory()) return walk(path);
    return entry.isFile() ? [relative(top, path).split(sep).join('/')] : [];
  });
}

/** Paths from the top folder, with `/`, of all files of the repository that lie in the given folders. */
export function projectFiles(...folders: string[]): string[] {
  return (folders.length > 0 ? folders.flatMap((folder) => walk(join(top, folder))) : walk(top)).sort();
}

export function read(path: string): string {
  return readFileSync(join(top, path), 'utf8');
}
