import { absolute, bitLength, numberFromFixed } from '../arithmetic/fixed';
import { atan2Fixed } from '../arithmetic/fixed-atan';
import { absoluteComplex, type FixedComplex, logModulus, multiplyComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import type { Estimate } from './euler-maclaurin';

/** Orders up to which k + 1 products a step are quicker than one logarithm. */
const LARGEST_ORDER = 4;
/** Angles are added in doubles: their sum must stay far below 2^52. */
const LARGEST_ANGLE = 2 ** 40;

/** True where `powerWeightedLogarithms` applies. */
export function canWeigh(steps: number, k: number): boolean {
  return k <= LARGEST_ORDER && Math.PI * (steps + 1) ** (k + 1) < LARGEST_ANGLE;
}

/** mantissa 2^exponent with |mantissa| about 1. */
interface Partial {
  re: bigint;
  im: bigint;
  exponent: number;
  /** log2 |mantissa| in doubles. */
  log2: number;
  /** The sum of the principal arguments of its factors, in doubles. */
  angle: number;
  /** Relative, in units. */
  error: number;
}

/**
 * sum_{n < steps} (a + n)^k log(a + n), principal logarithms, none of the a + n being 0; a exactly given, k >= 1 and
 * canWeigh(steps, k). Products from the last factor down, Q_0 = prod (a + n), Q_j = the product of all values that Q_(j-1)
 * had on the way, are Q_j = prod (a + n)^binomial(n + j, j): k + 1 logarithms in the end instead of one a step.
 * (a + n)^k = sum_j beta_j binomial(n + j, j) with beta_j = (-1)^j times the j-th difference at 0 of (a - 1 - x)^k.
 */
export function powerWeightedLogarithms(a: FixedComplex, steps: number, k: number, bits: number): Estimate {
  const partials = Array.from({ length: k + 1 }, (): Partial => {
    return { re: 1n << BigInt(bits), im: 0n, exponent: 0, log2: 0, angle: 0, error: 0 };
  });
  for (let n = steps - 1; n >= 0; n--) {
    let factor = normalised({ re: a.re + (BigInt(n) << BigInt(bits)), im: a.im }, bits);
    for (const partial of partials) {
      multiplyInto(partial, factor, bits);
      factor = partial;
    }
  }
  let value: FixedComplex = { re: 0n, im: 0n };
  let error = 0;
  weights(a, k, bits).forEach((weight, j) => {
    const partial = partials[j] as Partial;
    const log = logarithmOf(partial, bits);
    const part = multiplyComplex(weight, log, bits);
    value = { re: value.re + part.re, im: value.im + part.im };
    const size = (z: FixedComplex): number => numberFromFixed(absoluteComplex(z), bits) + 1;
    // The weight is cut (1.5); the logarithm has the relative error, 1.5 of its own and pi's share.
    error += size(weight) * (1.01 * partial.error + 3 + Math.abs(partial.angle)) + 1.5 * size(log) + 1.5;
  });
  return { value, error: BigInt(Math.ceil(error)) };
}

function normalised(z: FixedComplex, bits: number): Partial {
  const drop = bitLength(absolute(z.re) | absolute(z.im)) - bits;
  // Cutting a number above 1 costs 1.5 units next to at least 1/2; shifting up is exact.
  const cut = (value: bigint): bigint => (drop > 0 ? value >> BigInt(drop) : value << BigInt(-drop));
  const [re, im] = [cut(z.re), cut(z.im)];
  const rough = [numberFromFixed(re, bits), numberFromFixed(im, bits)] as const;
  const angle = Math.atan2(rough[1], rough[0]);
  return { re, im, exponent: drop, log2: Math.log2(Math.hypot(...rough)), angle, error: drop > 0 ? 3 : 0 };
}

function multiplyInto(partial: Partial, factor: Partial, bits: number): void {
  const log2 = partial.log2 + factor.log2;
  const grown = Math.round(log2);
  const shift = BigInt(bits + grown);
  if (partial.im === 0n && factor.im === 0n) {
    partial.re = (partial.re * factor.re) >> shift;
  } else {
    const re = (partial.re * factor.re - partial.im * factor.im) >> shift;
    partial.im = (partial.re * factor.im + partial.im * factor.re) >> shift;
    partial.re = re;
  }
  partial.exponent += factor.exponent + grown;
  partial.log2 = log2 - grown;
  partial.angle += factor.angle;
  // Both parts are cut, next to a modulus above 2^(-1/2).
  partial.error += factor.error + 2.01;
}

function logarithmOf({ re, im, exponent, angle }: Partial, bits: number): FixedComplex {
  const principal = atan2Fixed(im, re, bits);
  const turns = BigInt(Math.round((angle - numberFromFixed(principal, bits)) / (2 * Math.PI)));
  return { re: logModulus({ re, im }, bits - exponent, bits), im: principal + 2n * turns * piFixed(bits) };
}

/** beta_0, ..., beta_k: exact differences, cut at the end. */
function weights(a: FixedComplex, k: number, bits: number): FixedComplex[] {
  const one = 1n << BigInt(bits);
  let row = Array.from({ length: k + 1 }, (_, i): FixedComplex => {
    const base = { re: a.re - BigInt(i + 1) * one, im: a.im };
    let power: FixedComplex = { re: 1n, im: 0n };
    for (let n = 0; n < k; n++) {
      power = { re: power.re * base.re - power.im * base.im, im: power.re * base.im + power.im * base.re };
    }
    return power;
  });
  const down = BigInt((k - 1) * bits);
  const list: FixedComplex[] = [];
  for (let j = 0; j <= k; j++) {
    const first = row[0] as FixedComplex;
    const sign = j % 2 === 0 ? 1n : -1n;
    list.push({ re: (sign * first.re) >> down, im: (sign * first.im) >> down });
    row = row.slice(1).map((z, i) => {
      const before = row[i] as FixedComplex;
      return { re: z.re - before.re, im: z.im - before.im };
    });
  }
  return list;
}
