import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { piFixed } from '../../engine/arithmetic/fixed-constants';
import type { FunctionName, PreciseLog } from '../../engine/functions/special-function';
import { functions } from '../../engine/functions/table';
import { type ValueFunctionWord, valueFunctions } from '../../engine/functions/values';
import { fixedComplex, parameterOfDouble } from './fixed-text';
import { kernelPoints, type Random, valuePoints } from './random-points';

/** The largest error found, as a share of the error stated, where it was found, and how many points had values. */
export interface WorstRatio {
  readonly ratio: number;
  readonly at: string;
  readonly held: number;
  /** Points where no value was given: poles, arguments that cannot be told from one, refusals. */
  readonly refused: number;
}

interface Sample {
  readonly ratio: number | null;
  readonly at: string;
}

function worst(count: number, sample: () => Sample): WorstRatio {
  let found: WorstRatio = { ratio: 0, at: '', held: 0, refused: 0 };
  for (let k = 0; k < count; k++) {
    const { ratio, at } = sample();
    if (ratio === null) found = { ...found, refused: found.refused + 1 };
    else found = { ...found, held: found.held + 1, ...(ratio > found.ratio ? { ratio, at } : {}) };
  }
  return found;
}

interface Stated {
  readonly re: bigint;
  readonly im: bigint;
  readonly error: bigint;
}

/** |value - finer|/(error + 1/2) in units of 2^-bits; `finer` has twice the bits. Logarithms modulo 2 pi i. */
function share(value: Stated, finer: Stated, bits: number, modulo: boolean): number {
  let im = (value.im << BigInt(bits)) - finer.im;
  if (modulo) {
    const turns = Math.round(numberFromFixed(im, 2 * bits) / (2 * Math.PI));
    im -= (2n * BigInt(turns) * piFixed(2 * bits + 64)) >> 64n;
  }
  const re = (value.re << BigInt(bits)) - finer.re;
  const off = Math.hypot(numberFromFixed(re, bits), numberFromFixed(im, bits));
  return off / (Number(value.error) + 0.5);
}

/** A function that is a value, with `bits`, against itself with twice as many. */
export function worstOfValue(word: ValueFunctionWord, bits: number, count: number, random: Random): WorstRatio {
  return worst(count, () => {
    const args = valuePoints[word](random);
    const at = args.map(({ approx }) => `${approx.re},${approx.im}`).join('; ');
    const value = valueFunctions[word].evaluate(args, bits);
    const finer = valueFunctions[word].evaluate(args, 2 * bits);
    if (value.kind !== 'value' || finer.kind !== 'value') return { ratio: null, at };
    return { ratio: share(value, finer, bits, value.of === 'logarithm'), at };
  });
}

/** A function that products are made of, with `bits`, against itself with twice as many. */
export function worstOfPrecise(name: FunctionName, bits: number, count: number, random: Random): WorstRatio {
  const points = kernelPoints[name];
  if (!points) throw new Error(`No points for ${name}`);
  return worst(count, () => {
    const { re, im, parameters } = points(random);
    const at = `${re},${im}; ${parameters}`;
    const log = (precision: number): PreciseLog =>
      functions[name].precise(fixedComplex(re, im, precision), parameters.map(parameterOfDouble), precision);
    const value = log(bits);
    const finer = log(2 * bits);
    if (value.kind !== 'value' || finer.kind !== 'value') return { ratio: null, at };
    return { ratio: share(value, finer, bits, true), at };
  });
}
