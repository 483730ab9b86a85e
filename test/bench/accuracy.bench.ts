import type { ValueFunctionWord } from '../../engine/functions/values';
import { kernelSources } from '../functions/random-kernels';
import { seeded, valuePoints } from '../functions/random-points';
import { type WorstRatio, worstOfDouble, worstOfPrecise, worstOfValue } from '../functions/worst-ratio';

export interface AccuracyRow extends WorstRatio {
  readonly name: string;
  /** Fraction bits of the precise tier, or doubles. */
  readonly tier: string;
}

/** Fraction bits of the precise tier that are tried, and the share of the points that each gets: they cost more. */
const TIERS: readonly (readonly [bits: number, share: number])[] = [
  [64, 1],
  [180, 0.1],
];

/**
 * Every function at random points of its domain, or those whose name begins with `only`: the error stated against the
 * difference from twice the bits, and doubles against the precise tier.
 */
export function* run(points: number, only = ''): Generator<AccuracyRow> {
  const words = (Object.keys(valuePoints) as ValueFunctionWord[]).filter((word) => word.startsWith(only));
  const sources = Object.keys(kernelSources()).filter((name) => name.startsWith(only));
  for (const name of sources) {
    const source = kernelSources()[name];
    if (source) yield { name: `log ${name}`, tier: 'doubles', ...worstOfDouble(source, points, seeded(1)) };
  }
  for (const [bits, share] of TIERS) {
    const count = Math.max(1, Math.round(points * share));
    for (const word of words) {
      yield { name: word, tier: `${bits} bits`, ...worstOfValue(word, bits, count, seeded(1)) };
    }
    for (const name of sources) {
      const source = kernelSources()[name];
      if (source)
        yield { name: `log ${name}`, tier: `${bits} bits`, ...worstOfPrecise(source, bits, count, seeded(1)) };
    }
  }
}
