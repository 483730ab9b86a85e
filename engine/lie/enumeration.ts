import type { RootSystem } from './root-system';

/** Representations by dimension, complete up to `limit`. */
interface Catalogue {
  readonly limit: number;
  readonly bySize: ReadonlyMap<number, readonly (readonly number[])[]>;
}

/** No catalogue holds more representations than this; a list to choose from would be of no use, either. */
const CATALOGUE_LIMIT = 20_000;

// Pure memoisation: the largest catalogue asked for so far.
const catalogues = new WeakMap<RootSystem, Catalogue>();

/** Catalogue of dimensions up to at least `limit`, or null when it would be too long. */
export function catalogue(system: RootSystem, limit: number): Catalogue | null {
  const known = catalogues.get(system);
  if (known && known.limit >= limit) return known;
  const found = labelsUpToDimension(system, limit, CATALOGUE_LIMIT);
  if (!found) return null;
  const bySize = new Map<number, number[][]>();
  for (const { labels, size } of found) {
    const same = bySize.get(size);
    if (same) same.push(labels);
    else bySize.set(size, [labels]);
  }
  const made: Catalogue = { limit, bySize };
  catalogues.set(system, made);
  return made;
}

/**
 * Dynkin labels of all irreducible representations of dimension at most `limit` (below 2^50), by a walk that stops a
 * branch once the dimension, which grows with every label, exceeds it. Null when there are more than `most`.
 */
export function labelsUpToDimension(
  system: RootSystem,
  limit: number,
  most: number,
): { readonly labels: number[]; readonly size: number }[] | null {
  const { rank } = system;
  const rows = system.positiveRoots.map(({ coordinates }) => {
    const scaled = coordinates.map((c, i) => c * (system.scaledHalfNorms[i] as number));
    return { scaled, rho: scaled.reduce((sum, c) => sum + c, 0) };
  });
  const labels = new Array<number>(rank).fill(0);
  // Ratios of small integers multiplied in doubles: the relative error stays below 120 roots times 2^-52.
  const size = (): number =>
    Math.round(
      rows.reduce((product, { scaled, rho }) => {
        const shifted = scaled.reduce((sum, c, i) => sum + c * (labels[i] as number), rho);
        return (product * shifted) / rho;
      }, 1),
    );
  const found: { labels: number[]; size: number }[] = [];
  const walk = (node: number): boolean => {
    if (node === rank) {
      if (found.length === most) return false;
      found.push({ labels: [...labels], size: size() });
      return true;
    }
    for (labels[node] = 0; size() <= limit; labels[node] = (labels[node] as number) + 1) {
      if (!walk(node + 1)) return false;
    }
    labels[node] = 0;
    return true;
  };
  return walk(0) ? found : null;
}
