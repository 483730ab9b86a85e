import { posix } from 'node:path';
import { parseSync } from 'vite';

/** The folders of engine/ in the order of the pipeline: each imports from itself and from those before it. */
export const pipeline = [
  'exact',
  'arithmetic',
  'functions',
  'product',
  'lie',
  'theory',
  'spheres',
  'spectrum',
  'latex',
  'numeric',
  'integral',
  'language',
  'requests',
] as const;

type Stage = (typeof pipeline)[number];

/** What stands outside the order: the syntax tree's types are wanted from theory on, language needs little. */
const treeFile = 'engine/language/tree.ts';
const languageMayUse: readonly Stage[] = ['exact', 'arithmetic', 'language'];
const workersMayUse: readonly Stage[] = ['requests', 'language'];

/** Values of the engine the page may import itself: highlighting needs the parser on every key stroke. */
const pageMayUse: readonly { readonly from: string; readonly to: string }[] = [
  { from: 'app/editor/', to: 'engine/language/' },
];

const decimalFile = 'engine/arithmetic/decimal-text.ts';

export interface Import {
  readonly specifier: string;
  /** `import type` or `export type`: gone from the built code. */
  readonly isType: boolean;
}

/** Every static and dynamic import of a source text, and every re-export. */
export function importsOf(path: string, source: string): Import[] {
  const { module, errors } = parseSync(path, source);
  if (errors.length > 0) throw new Error(`${path} does not parse: ${errors[0]?.message}`);
  const found: Import[] = [];
  for (const statement of module.staticImports) {
    const text = source.slice(statement.start, statement.end);
    found.push({ specifier: statement.moduleRequest.value, isType: /^import\s+type\b/.test(text) });
  }
  for (const statement of module.staticExports) {
    const text = source.slice(statement.start, statement.end);
    for (const entry of statement.entries) {
      if (entry.moduleRequest) {
        found.push({ specifier: entry.moduleRequest.value, isType: /^export\s+type\b/.test(text) });
      }
    }
  }
  for (const { moduleRequest } of module.dynamicImports) {
    const text = source.slice(moduleRequest.start, moduleRequest.end);
    found.push({ specifier: text.replace(/^['"`]|['"`]$/g, ''), isType: false });
  }
  return found;
}

function isStage(name: string | undefined): name is Stage {
  return pipeline.some((stage) => stage === name);
}

function stageOf(path: string): Stage | undefined {
  const [, folder, file] = path.split('/');
  return file !== undefined && isStage(folder) ? folder : undefined;
}

function mayFollow(from: Stage, to: Stage, path: string, isType: boolean): boolean {
  if (from === 'language') return languageMayUse.includes(to);
  if (pipeline.indexOf(to) <= pipeline.indexOf(from)) return true;
  return isType && path === treeFile && pipeline.indexOf(from) >= pipeline.indexOf('theory');
}

/** Why a file may not import another file of the project; undefined if it may. */
function objectionToFile(from: string, to: string, isType: boolean): string | undefined {
  const [target] = to.split('/');
  const [home] = from.split('/');
  if (home === 'engine') {
    if (target !== 'engine') return 'the engine imports nothing outside engine/';
    const [fromStage, toStage] = [stageOf(from), stageOf(to)];
    if (!fromStage || !toStage) return 'every file of engine/ lies in a folder of the pipeline';
    return mayFollow(fromStage, toStage, to, isType) ? undefined : `${fromStage}/ comes before ${toStage}/`;
  }
  if (home === 'workers') {
    if (target === 'workers') return undefined;
    const stage = stageOf(to);
    return stage && workersMayUse.includes(stage)
      ? undefined
      : 'workers/ uses engine/requests and engine/language only';
  }
  if (target !== 'engine' || isType) return undefined;
  const listed = pageMayUse.some((pair) => from.startsWith(pair.from) && to.startsWith(pair.to));
  return listed ? undefined : 'app/ reaches the engine through workers/, types excepted';
}

function objectionToPackage(from: string, name: string): string | undefined {
  if (name === 'decimal.js') return from === decimalFile ? undefined : `decimal.js is imported in ${decimalFile} only`;
  if (!from.startsWith('engine/')) return undefined;
  if (from.startsWith('engine/language/') && name.startsWith('@lezer/')) return undefined;
  return 'the engine imports no package but decimal.js and, in language/, the parser';
}

const asset = /\.(?:css|json|svg|png|lathe|md)(?:\?.*)?$/;

function resolveFile(from: string, specifier: string, files: ReadonlyMap<string, string>): string | undefined {
  const base = posix.join(posix.dirname(from), specifier.replace(/\?.*$/, ''));
  return [base, `${base}.ts`, `${base}.tsx`, `${base}/index.ts`, `${base}/index.tsx`].find((path) => files.has(path));
}

/** The first circle met when walking the arrows, as the files on it. */
function circle(arrows: ReadonlyMap<string, readonly string[]>): string[] | undefined {
  const done = new Set<string>();
  const walk = (path: string, trail: readonly string[]): string[] | undefined => {
    const at = trail.indexOf(path);
    if (at >= 0) return [...trail.slice(at), path];
    if (done.has(path)) return undefined;
    for (const next of arrows.get(path) ?? []) {
      const found = walk(next, [...trail, path]);
      if (found) return found;
    }
    done.add(path);
    return undefined;
  };
  for (const path of arrows.keys()) {
    const found = walk(path, []);
    if (found) return found;
  }
  return undefined;
}

/**
 * What breaks the rules of the road among the given files (path from the top folder, with `/`, to source text).
 * An empty set of files is itself a violation: a check that read nothing has shown nothing.
 */
export function importViolations(files: ReadonlyMap<string, string>): string[] {
  if (files.size === 0) return ['no file was read'];
  const violations: string[] = [];
  const arrows = new Map<string, string[]>();
  for (const [path, source] of files) {
    const targets: string[] = [];
    for (const { specifier, isType } of importsOf(path, source)) {
      if (specifier.startsWith('.') && asset.test(specifier)) continue;
      const target = specifier.startsWith('.') ? resolveFile(path, specifier, files) : undefined;
      if (target) targets.push(target);
      const objection = target
        ? objectionToFile(path, target, isType)
        : specifier.startsWith('.')
          ? 'leads to no file of engine/, workers/ or app/'
          : objectionToPackage(path, specifier);
      if (objection) violations.push(`${path} imports ${specifier}: ${objection}`);
    }
    arrows.set(path, targets);
  }
  const found = circle(arrows);
  if (found) violations.push(`circle of imports: ${found.join(' -> ')}`);
  return violations;
}
