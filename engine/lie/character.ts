import { LabelIndex } from './label-index';
import type { RootSystem } from './root-system';
import { makeDominant, orbitSize, parabolicOrder, zeroMask } from './weyl';

/**
 * The dominant weights of an irreducible representation with their multiplicities, the highest first.
 * Row k of `labels` is the k-th weight; multiplicities are exact integers below 2^53.
 */
export interface DominantCharacter {
  readonly count: number;
  readonly labels: Int16Array;
  readonly multiplicities: Float64Array;
  readonly orbitSizes: Float64Array;
  /** Number of distinct weights, all orbits together. */
  readonly weights: number;
}

/** More dominant weights than this are refused whatever their orbits: the recursion's time grows with their strings. */
const DOMINANT_LIMIT = 20_000;

interface DominantWeights {
  readonly index: LabelIndex;
  /** Row k: the highest weight minus weight k on the simple roots. */
  readonly descents: Int32Array;
  /** Row numbers in order of increasing height of the descent. */
  readonly order: Int32Array;
}

/**
 * All dominant weights below `highest` (Moody, Patera, Bull. Amer. Math. Soc. 7 (1982) 237): a dominant weight covered by
 * another is reached by subtracting one positive root. Null as soon as their orbits hold more than `limit` weights or
 * they are more than DOMINANT_LIMIT themselves.
 */
function dominantWeightsBelow(system: RootSystem, highest: readonly number[], limit: number): DominantWeights | null {
  const rank = system.rank;
  const index = new LabelIndex(rank);
  const scratch = Int16Array.from(highest);
  index.add(scratch);
  let descents = new Int32Array(16 * rank);
  const heights: number[] = [0];
  let weights = orbitSize(system, scratch);
  for (let row = 0; row < index.count; row++) {
    if (weights > limit || index.count > DOMINANT_LIMIT) return null;
    for (const root of system.positiveRoots) {
      let dominant = true;
      for (let i = 0; i < rank && dominant; i++) {
        const label = (index.rows[row * rank + i] as number) - (root.labels[i] as number);
        scratch[i] = label;
        dominant = label >= 0;
      }
      if (!dominant) continue;
      const before = index.count;
      const found = index.add(scratch);
      if (found < before) continue;
      weights += orbitSize(system, scratch);
      if ((found + 1) * rank > descents.length) {
        const grown = new Int32Array(2 * descents.length);
        grown.set(descents);
        descents = grown;
      }
      let height = 0;
      for (let i = 0; i < rank; i++) {
        const c = (descents[row * rank + i] as number) + (root.coordinates[i] as number);
        descents[found * rank + i] = c;
        height += c;
      }
      heights[found] = height;
    }
  }
  if (weights > limit) return null;
  const order = Int32Array.from(heights.keys()).sort((a, b) => (heights[a] as number) - (heights[b] as number));
  return { index, descents, order };
}

/** Number of distinct weights of an irreducible representation, or null when it exceeds `limit`. */
export function countWeights(system: RootSystem, highest: readonly number[], limit: number): number | null {
  const below = dominantWeightsBelow(system, highest, limit);
  if (!below) return null;
  let weights = 0;
  for (let row = 0; row < below.index.count; row++) weights += orbitSize(system, below.index.rows, row * system.rank);
  return weights;
}

interface StringStart {
  readonly root: Int16Array;
  /** Coefficients on the simple roots times scaled half norms: (w, root) = sum w_i pairing_i / scale. */
  readonly pairing: Int32Array;
  /** How many roots of either sign the representative stands for. */
  readonly copies: number;
}

/**
 * Representatives of all roots under the stabiliser of a dominant weight whose labels vanish on `mask`. Orbits inside
 * the stabiliser's own root system contain both signs, the others only positive roots and count twice.
 */
function stringStarts(system: RootSystem, mask: number): StringStart[] {
  const starts: StringStart[] = [];
  for (const { labels, coordinates } of system.positiveRoots) {
    if (labels.some((label, i) => label < 0 && (mask >> i) & 1)) continue;
    const inside = coordinates.every((c, i) => c === 0 || (mask >> i) & 1);
    const orbit = parabolicOrder(system, mask) / parabolicOrder(system, mask & zeroMask(labels, system.rank));
    starts.push({
      root: Int16Array.from(labels),
      pairing: Int32Array.from(coordinates, (c, i) => c * (system.scaledHalfNorms[i] as number)),
      copies: inside ? orbit : 2 * orbit,
    });
  }
  return starts;
}

// Pure memoisation; starts are shared by all weights with the same zero labels, characters by all later uses.
const startsBySystem = new WeakMap<RootSystem, Map<number, StringStart[]>>();
const characters = new WeakMap<RootSystem, Map<string, DominantCharacter>>();
const CHARACTERS_KEPT = 400;

/**
 * Multiplicities of the dominant weights by Freudenthal's recursion with the reduction of root sums to stabiliser
 * orbits (Moody, Patera 1982). Null when there are more than `limit` distinct weights, or 20 000 dominant ones. Integer arithmetic throughout.
 */
export function dominantCharacter(
  system: RootSystem,
  highest: readonly number[],
  limit = Number.POSITIVE_INFINITY,
): DominantCharacter | null {
  let kept = characters.get(system);
  if (!kept) {
    kept = new Map();
    characters.set(system, kept);
  }
  const key = highest.join();
  const known = kept.get(key);
  if (known) return known.weights > limit ? null : known;
  const character = freudenthal(system, highest, limit);
  if (character) {
    if (kept.size >= CHARACTERS_KEPT) kept.clear();
    kept.set(key, character);
  }
  return character;
}

/** The recursion itself, without memory of earlier characters. */
export function freudenthal(
  system: RootSystem,
  highest: readonly number[],
  limit = Number.POSITIVE_INFINITY,
): DominantCharacter | null {
  const below = dominantWeightsBelow(system, highest, limit);
  if (!below) return null;
  let allStarts = startsBySystem.get(system);
  if (!allStarts) {
    allStarts = new Map();
    startsBySystem.set(system, allStarts);
  }
  const rank = system.rank;
  const { index, descents, order } = below;
  const multiplicity = new Float64Array(index.count);
  multiplicity[0] = 1;
  const moving = new Int16Array(rank);
  const image = new Int16Array(rank);
  for (let k = 1; k < order.length; k++) {
    const row = order[k] as number;
    const offset = row * rank;
    const mask = zeroMask(index.rows, rank, offset);
    let starts = allStarts.get(mask);
    if (!starts) {
      starts = stringStarts(system, mask);
      allStarts.set(mask, starts);
    }
    let total = 0;
    for (const { root, pairing, copies } of starts) {
      let product = 0;
      let step = 0;
      for (let i = 0; i < rank; i++) {
        const label = index.rows[offset + i] as number;
        moving[i] = label;
        product += label * (pairing[i] as number);
        step += (root[i] as number) * (pairing[i] as number);
      }
      let string = 0;
      for (;;) {
        product += step;
        for (let i = 0; i < rank; i++) {
          const label = (moving[i] as number) + (root[i] as number);
          moving[i] = label;
          image[i] = label;
        }
        makeDominant(system, image);
        const found = index.find(image);
        if (found < 0) break;
        string += (multiplicity[found] as number) * product;
      }
      total += copies * string;
    }
    // (highest - w, highest + w + 2 rho) from the descent on the simple roots.
    let denominator = 0;
    for (let i = 0; i < rank; i++) {
      const sum = (index.rows[i] as number) + (index.rows[offset + i] as number) + 2;
      denominator += (descents[offset + i] as number) * (system.scaledHalfNorms[i] as number) * sum;
    }
    const value = total / denominator;
    if (!Number.isInteger(value) || !Number.isSafeInteger(total)) {
      throw new Error(
        `Multiplicity ${total}/${denominator} in ${system.name} [${highest.join()}] is not an exact integer.`,
      );
    }
    multiplicity[row] = value;
  }
  return sorted(system, below, multiplicity);
}

function sorted(system: RootSystem, below: DominantWeights, multiplicity: Float64Array): DominantCharacter {
  const { index, order } = below;
  const rank = system.rank;
  const labels = new Int16Array(index.count * rank);
  const multiplicities = new Float64Array(index.count);
  const orbitSizes = new Float64Array(index.count);
  let weights = 0;
  order.forEach((row, k) => {
    labels.set(index.rows.subarray(row * rank, (row + 1) * rank), k * rank);
    multiplicities[k] = multiplicity[row] as number;
    const size = orbitSize(system, labels, k * rank);
    orbitSizes[k] = size;
    weights += size;
  });
  return { count: index.count, labels, multiplicities, orbitSizes, weights };
}
