import type { FunctionName } from '../../engine/functions/special-function';
import type { ValueFunctionWord } from '../../engine/functions/values';
import { kernelPoints, seeded, valuePoints } from '../functions/random-points';
import { type WorstRatio, worstOfPrecise, worstOfValue } from '../functions/worst-ratio';

export interface AccuracyRow extends WorstRatio {
  readonly name: string;
  readonly bits: number;
}

/** Fraction bits of the precise tier that are tried, and the share of the points that each gets: they cost more. */
const TIERS: readonly (readonly [bits: number, share: number])[] = [
  [64, 1],
  [180, 0.1],
];

/** Every function at random points of its domain: the error stated against the difference from twice the bits. */
export function* run(points: number): Generator<AccuracyRow> {
  for (const [bits, share] of TIERS) {
    const count = Math.max(1, Math.round(points * share));
    for (const word of Object.keys(valuePoints) as ValueFunctionWord[]) {
      yield { name: word, bits, ...worstOfValue(word, bits, count, seeded(1)) };
    }
    for (const name of Object.keys(kernelPoints) as FunctionName[]) {
      yield { name: `log ${name}`, bits, ...worstOfPrecise(name, bits, count, seeded(1)) };
    }
  }
}
