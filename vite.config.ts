import { createHash } from 'node:crypto';
import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join, relative, resolve, sep } from 'node:path';
import react from '@vitejs/plugin-react';
import { defineConfig, type Plugin, type ViteUserConfig } from 'vitest/config';

const top = import.meta.dirname;
const siteFolder = resolve(top, 'dist/site');

/** Fetched and cached when first used: too big to load ahead for a reader who never explores a plot. */
const cachedWhenUsed = /^assets\/plotly-/;

/** KaTeX's style sheet offers every font in three formats; all browsers served here read WOFF2. */
function woff2Only(): Plugin {
  return {
    name: 'woff2-only',
    enforce: 'pre',
    transform(code, id) {
      if (!/katex(\.min)?\.css/.test(id)) return null;
      return { code: code.replace(/,\s*url\([^)]*\.(?:woff|ttf)\)\s*format\([^)]*\)/g, ''), map: null };
    },
  };
}

function filesBelow(folder: string): string[] {
  return readdirSync(folder, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => relative(folder, join(entry.parentPath, entry.name)).split(sep).join('/'))
    .sort();
}

/**
 * Writes sw.js from workers/offline.js. Its revision is a hash over every built file, so that any change is a new
 * version, and the same build twice is not.
 */
function offlineCache(): Plugin {
  return {
    name: 'offline-cache',
    apply: 'build',
    writeBundle() {
      const files = filesBelow(siteFolder).filter((file) => file !== 'sw.js');
      const source = readFileSync(resolve(top, 'workers/offline.js'), 'utf8');
      const hash = createHash('sha256').update(source);
      for (const file of files) hash.update(file).update(readFileSync(join(siteFolder, file)));
      const facts = {
        revision: hash.digest('hex').slice(0, 16),
        ahead: files.filter((file) => !cachedWhenUsed.test(file)),
        whenUsed: files.filter((file) => cachedWhenUsed.test(file)),
      };
      writeFileSync(
        join(siteFolder, 'sw.js'),
        source.replace('__BUILD__', () => JSON.stringify(facts)),
      );
    },
  };
}

/** One file for Node, without dependencies at run time. */
function nodeBundle(entry: string, name: string): ViteUserConfig {
  return {
    root: top,
    publicDir: false,
    ssr: { noExternal: true },
    build: {
      ssr: entry,
      target: 'node20',
      outDir: resolve(top, 'dist', name),
      emptyOutDir: true,
      rolldownOptions: { output: { entryFileNames: `${name}.js`, codeSplitting: false } },
    },
  };
}

const site: ViteUserConfig = {
  root: resolve(top, 'app'),
  base: './',
  publicDir: resolve(top, 'public'),
  plugins: [react(), woff2Only(), offlineCache()],
  worker: { format: 'es' },
  build: {
    outDir: siteFolder,
    emptyOutDir: true,
    assetsInlineLimit: 0,
    chunkSizeWarningLimit: 5000,
    rolldownOptions: {
      output: {
        codeSplitting: {
          groups: [
            // Higher priority: the page needs the parser at once, and must not pull the editor in with it.
            { name: 'lezer', test: /node_modules[\\/]@lezer[\\/](?:lr|common|highlight)[\\/]/, priority: 20 },
            { name: 'katex', test: /node_modules[\\/]katex[\\/]/, priority: 10 },
            { name: 'react', test: /node_modules[\\/](?:react|react-dom|scheduler)[\\/]/, priority: 10 },
            { name: 'plotly', test: /node_modules[\\/]plotly\.js-dist-min[\\/]/, priority: 10 },
            {
              name: 'codemirror',
              test: /node_modules[\\/](?:codemirror|@codemirror|style-mod|w3c-keyname|crelt)[\\/]/,
              priority: 5,
            },
          ],
        },
      },
    },
  },
  test: {
    root: top,
    dir: resolve(top, 'test'),
    include: ['**/*.test.ts'],
    environment: 'node',
    setupFiles: [resolve(top, 'test/setup.ts')],
  },
};

export default defineConfig(({ mode }) => {
  if (mode === 'batch') return nodeBundle('workers/batch.ts', 'batch');
  if (mode === 'bench') return nodeBundle('test/bench/bench.ts', 'bench');
  return site;
});
