import { functions } from '../functions/table';
import { centred } from './centre';
import type { Geometry, StepLattice } from './chain';
import type { Factor, Product, WeightSet } from './factor';
import { buckets, gather, join, unfolded } from './gather';
import { pairByShifts } from './pair-by-shifts';
import { reduceElementary } from './reduce-elementary';

/**
 * How far to simplify. `functions`: equal factors are collected and what the reflection laws cancel is dropped, so
 * that only special functions remain that do not cancel; a pair about the centre of an even function stands at the centre
 * where that costs elementary factors only. `elementary`: besides, quotients of one special function at
 * arguments that differ by its periods become elementary.
 */
export type Depth = 'functions' | 'elementary';

/**
 * Simplifies by the laws that each function declares, and by nothing else; the value is the same at every point.
 * `geometry` says what the geometry symbols are exactly, so that R = 1 - b/Q at b = 13/10 is recognised although the
 * R-charge was typed as a number; the result still shows the symbols.
 */
export function simplify<W extends WeightSet>(product: Product<W>, depth: Depth, geometry: Geometry = []): Product<W> {
  // Within one call: the lattice of a function is the same for all its factors and in every round.
  const lattices = new Map<string, StepLattice>();
  let current = gather(centred(gather(product), geometry, lattices).map((factor) => unfolded(factor)));
  if (depth === 'functions') return current;
  for (let round = 0; round < MAXIMAL_ROUNDS; round++) {
    const next = gather(reduceElementary(pairByShifts(current, geometry, lattices)));
    if (next.length === current.length && next.every((f, k) => sameFactor(f, current[k]))) return next;
    current = next;
  }
  return current;
}

/**
 * Equal factors under one power, and factors that are 1 by themselves left out; nothing that stems from different
 * modes is paired.
 */
export function collectEqual<W extends WeightSet>(product: Product<W>): Product<W> {
  return buckets(product).flatMap((bucket) => {
    const collected = new Map<string, Factor<W>>();
    for (const factor of bucket) {
      const present = collected.get(factor.argument.key);
      collected.set(factor.argument.key, present ? join(present, factor, factor.power) : factor);
    }
    return [...collected.values()].filter((factor) => factor.power !== 0 && !isUnity(factor));
  });
}

/** True for a single function at the fixed point of a reflection f(x) f(2c - x) = 1. */
function isUnity(factor: Factor): boolean {
  return functions[factor.name].reflections.some(
    ({ center, power, sign }) =>
      power === -1 && sign === 1 && factor.weights === null && center(factor.parameters).equals(factor.argument),
  );
}

/** Each round removes special functions or leaves the product as it is; two suffice in practice. */
const MAXIMAL_ROUNDS = 6;

function sameFactor(a: Factor, b: Factor | undefined): boolean {
  return (
    b !== undefined &&
    a.name === b.name &&
    a.power === b.power &&
    a.argument.key === b.argument.key &&
    a.weights?.key === b.weights?.key &&
    a.half === b.half
  );
}
