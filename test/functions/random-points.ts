import { fixedFromNumber } from '../../engine/arithmetic/fixed';
import { Rational } from '../../engine/exact/rational';
import type { ExactParameter } from '../../engine/functions/special-function';
import type { ValueFunctionWord } from '../../engine/functions/values';
import { parameterOfDouble } from './fixed-text';

/** A source of numbers in [0, 1); seeded, so that failures can be repeated (mulberry32, common practice, no source). */
export type Random = () => number;

export function seeded(seed: number): Random {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

export const between = (random: Random, low: number, high: number): number => low + (high - low) * random();
export const whole = (random: Random, low: number, high: number): number => Math.floor(between(random, low, high + 1));
export const sign = (random: Random): number => (random() < 0.5 ? -1 : 1);
/** Of any size between the two, evenly in the logarithm. */
export const sized = (random: Random, low: number, high: number): number =>
  Math.exp(between(random, Math.log(low), Math.log(high)));
/** A little off 0. */
const gap = (random: Random): number => sign(random) * sized(random, 1e-8, 0.1);

/** re + i im, both exactly. */
export function complexOfDoubles(re: number, im: number): ExactParameter {
  if (im === 0) return parameterOfDouble(re);
  return {
    square: null,
    value: (bits) => ({ re: fixedFromNumber(re, bits), im: fixedFromNumber(im, bits) }),
    approx: { re, im },
  };
}

function wholeParameter(value: number): ExactParameter {
  return {
    square: Rational.of(value * value),
    value: (bits) => ({ re: BigInt(value) << BigInt(bits), im: 0n }),
    approx: { re: value, im: 0 },
  };
}

/** A third each: anywhere in the square, next to a whole number up to `nearest`, and large. */
function plane(random: Random, reach: number, largest: number, nearest: number): ExactParameter {
  const kind = whole(random, 0, 3);
  if (kind === 0) return complexOfDoubles(between(random, -reach, reach), between(random, -reach, reach));
  if (kind === 1)
    return complexOfDoubles(whole(random, -reach, nearest) + gap(random), random() < 0.5 ? 0 : gap(random));
  if (kind === 2) return complexOfDoubles(between(random, -reach, reach) + 1 / 128, 0);
  const size = sized(random, reach, largest);
  return complexOfDoubles(size * between(random, 0, 1), sign(random) * size * random());
}

function disc(random: Random, radius: number): ExactParameter {
  const size = radius * Math.sqrt(random());
  const angle = between(random, -Math.PI, Math.PI);
  return random() < 0.3
    ? complexOfDoubles(sign(random) * size, 0)
    : complexOfDoubles(size * Math.cos(angle), size * Math.sin(angle));
}

/** Arguments in the domain of each function that is a value: all over it, near singular points, and large ones. */
export const valuePoints: Readonly<Record<ValueFunctionWord, (random: Random) => readonly ExactParameter[]>> = {
  barnesg: (random) => [plane(random, 6, 1e4, 3)],
  barnesgamma: (random) => [
    complexOfDoubles(sized(random, 0.01, 10), between(random, -3, 3)),
    parameterOfDouble(sized(random, 0.3, 3)),
    parameterOfDouble(sized(random, 0.3, 3)),
  ],
  clausen: (random) => [
    wholeParameter(whole(random, 1, 9)),
    parameterOfDouble(random() < 0.3 ? gap(random) : between(random, -1e4, 1e4)),
  ],
  digamma: (random) => [plane(random, 12, 1e4, 0)],
  dilog: (random) => [random() < 0.3 ? complexOfDoubles(1 + gap(random), gap(random)) : disc(random, 4)],
  hurwitz: (random) => [plane(random, 8, 60, 1), complexOfDoubles(sized(random, 0.01, 900), between(random, -30, 30))],
  polygamma: (random) => [wholeParameter(whole(random, 0, 8)), plane(random, 12, 1e3, 0)],
  polylog: (random) => [
    wholeParameter(whole(random, -6, 9)),
    random() < 0.3 ? complexOfDoubles(1 + gap(random), gap(random)) : disc(random, 6),
  ],
  qpochhammer: (random) => [disc(random, random() < 0.5 ? 1 : 30), disc(random, 0.95)],
  riemannzeta: (random) => [plane(random, 12, 120, 1)],
  zetaprime: (random) => [wholeParameter(whole(random, 0, 6)), plane(random, 8, 9e3, 0)],
};
