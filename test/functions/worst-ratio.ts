import { fixedFromNumber, numberFromFixed } from '../../engine/arithmetic/fixed';
import { piFixed } from '../../engine/arithmetic/fixed-constants';
import type { Complex, DoubleKernel, ExactParameter, PreciseLog } from '../../engine/functions/special-function';
import { functions } from '../../engine/functions/table';
import { type ValueFunctionWord, valueFunctions } from '../../engine/functions/values';
import { fixedComplex } from './fixed-text';
import { kernelValue } from './kernel-value';
import type { KernelSource } from './random-kernels';
import { complexOfDoubles, type Random, valuePoints } from './random-points';

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

/** |value - finer|/error in units of 2^-bits; `finer` has twice the bits. Logarithms modulo 2 pi i. */
function share(value: Stated, finer: Stated, bits: number, modulo: boolean): number {
  let im = (value.im << BigInt(bits)) - finer.im;
  if (modulo) {
    const turns = Math.round(numberFromFixed(im, 2 * bits) / (2 * Math.PI));
    im -= (2n * BigInt(turns) * piFixed(2 * bits + 64)) >> 64n;
  }
  const re = (value.re << BigInt(bits)) - finer.re;
  const off = Math.hypot(numberFromFixed(re, bits), numberFromFixed(im, bits));
  return off === 0 ? 0 : off / Number(value.error);
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
export function worstOfPrecise(source: KernelSource, bits: number, count: number, random: Random): WorstRatio {
  return worst(count, () => {
    const { re, im, parameters } = source.next(random);
    const log = (precision: number): PreciseLog =>
      functions[source.name].precise(fixedComplex(re, im, precision), parameters, precision);
    const [value, finer] = [log(bits), log(2 * bits)];
    if (value.kind !== 'value' || finer.kind !== 'value') return { ratio: null, at: where(re, im, parameters) };
    return { ratio: share(value, finer, bits, true), at: where(re, im, parameters) };
  });
}

/** Bits that doubles are held against: any double between 1e-9 and 1e5 with some digits more than a slope needs. */
const DOUBLE_BITS = 130;
/** log2 of the relative step that slopes are taken with. */
const STEP = -40;

/** The double tier against the precise one, in units of max(1, |log f|, |x d log f/dx|) times the error stated. */
export function worstOfDouble(source: KernelSource, count: number, random: Random): WorstRatio {
  const declared = functions[source.name];
  const known = new Map<ExactParameter | undefined, DoubleKernel>();
  return worst(count, () => {
    const point = source.next(random);
    const { re, im } = point;
    // The parameters that doubles see, exactly.
    const parameters = point.parameters.map(({ approx }) => complexOfDoubles(approx.re, approx.im));
    const at = where(re, im, parameters);
    // Tables are kept as long as the source keeps its parameters.
    const [first] = point.parameters;
    let kernel = known.get(first);
    if (kernel === undefined) {
      known.clear();
      kernel = declared.double(point.parameters.map(({ approx }) => approx));
      known.set(first, kernel);
    }
    const value = kernelValue(kernel, re, im);
    const x = fixedComplex(re, im, DOUBLE_BITS);
    const exact = declared.precise(x, parameters, DOUBLE_BITS);
    const size = Math.hypot(re, im);
    const step = fixedFromNumber(size * 2 ** STEP, DOUBLE_BITS);
    const moved = declared.precise({ re: x.re + step, im: x.im }, parameters, DOUBLE_BITS);
    if (exact.kind !== 'value' || moved.kind !== 'value') return { ratio: null, at };
    const slope = distance(number(exact), number(moved)) / (size * 2 ** STEP);
    const wanted = number(exact);
    const scale = Math.max(1, Math.hypot(wanted.re, wanted.im), Math.hypot(value.re, value.im), size * slope);
    if (Number.isNaN(value.re)) return { ratio: null, at };
    return {
      ratio: distance(value, wanted) / scale / declared.doubleError(parameters.map(({ approx }) => approx)),
      at,
    };
  });
}

function number({ re, im }: Stated): Complex {
  return { re: numberFromFixed(re, DOUBLE_BITS), im: numberFromFixed(im, DOUBLE_BITS) };
}

/** Of logarithms, modulo 2 pi i. */
function distance(a: Complex, b: Complex): number {
  const im = a.im - b.im;
  return Math.hypot(a.re - b.re, im - 2 * Math.PI * Math.round(im / (2 * Math.PI)));
}

function where(re: number, im: number, parameters: readonly ExactParameter[]): string {
  return `${re},${im}; ${parameters.map(({ approx }) => `${approx.re},${approx.im}`).join('; ')}`;
}
