import { fixedFromRatio, sqrtFixed } from '../../engine/arithmetic/fixed';
import { Rational } from '../../engine/exact/rational';
import type { ExactParameter, FunctionName } from '../../engine/functions/special-function';
import { parameterOfDouble } from './fixed-text';
import { between, complexOfDoubles, type Random, sign, sized, whole } from './random-points';

/** An argument, exactly two doubles, and parameters. */
export interface KernelPoint {
  readonly re: number;
  readonly im: number;
  readonly parameters: readonly ExactParameter[];
}

/** sqrt(p/q + e) for exact rationals, so that b^2 can lie as near to p/q as wanted. */
function rootParameter(square: Rational): ExactParameter {
  const value = (bits: number): bigint => sqrtFixed(fixedFromRatio(square.numerator, square.denominator, 2 * bits), 0);
  return {
    square,
    value: (bits) => ({ re: value(bits), im: 0n }),
    approx: { re: Math.sqrt(square.toNumber()), im: 0 },
  };
}

/** Distances of b^2 from a rational. */
const CLOSE: readonly string[] = ['1/1000', '1/1000000', `1/1${'0'.repeat(12)}`, `1/1${'0'.repeat(30)}`];

/** b between 0.05 and 20: anywhere, b^2 = p/q with small p and q, and next to such. */
function period(random: Random): ExactParameter {
  const kind = random();
  if (kind < 0.5) return parameterOfDouble(sized(random, 0.05, 20));
  const square = Rational.of(whole(random, 1, 6), whole(random, 1, 6));
  if (kind < 0.6) return rootParameter(square);
  const off = Rational.parse(CLOSE[whole(random, 0, CLOSE.length - 1)] as string);
  if (off === null) throw new Error('no number');
  return rootParameter(random() < 0.5 ? square.add(off) : square.sub(off));
}

/** b with a positive real part, off the real axis. */
function complexPeriod(random: Random): ExactParameter {
  const size = sized(random, 0.2, 5);
  const angle = sign(random) * between(random, 0.02, 1.1);
  return complexOfDoubles(size * Math.cos(angle), size * Math.sin(angle));
}

function off(random: Random, size: number): number {
  return sign(random) * (0.01 + size * random());
}

/** Next to a number: in a direction of its own, at 1e-7 to 0.1. */
function beside(random: Random, re: number, im: number): { readonly re: number; readonly im: number } {
  const gap = sized(random, 1e-7, 0.1);
  const angle = between(random, -Math.PI, Math.PI);
  return { re: re + gap * Math.cos(angle), im: im + gap * Math.sin(angle) };
}

/** Small numbers of periods. */
function few(random: Random): number {
  return whole(random, 0, 3);
}

/** A parameter kept for a few points, since making tables for one takes longer than a value. */
function kept<T>(points: number, make: (random: Random) => T): (random: Random) => T {
  let left = 0;
  let value: T | undefined;
  return (random) => {
    if (left-- > 0 && value !== undefined) return value;
    left = points - 1;
    value = make(random);
    return value;
  };
}

const UPSILON_KINDS = 5;

/** Points of a function of x along the real axis with periods p of sum q: strip, edges, zeros, near and far. */
function realAxisPoint(random: Random, periods: readonly number[], largest: number): { re: number; im: number } {
  const q = periods.reduce((sum, w) => sum + w, 0);
  switch (whole(random, 0, UPSILON_KINDS - 1)) {
    case 0:
      return { re: q * random(), im: off(random, 2 * q) };
    case 1:
      return { re: q / 2, im: off(random, 3 * q) };
    case 2: {
      const zero = periods.reduce((sum, w) => sum + few(random) * w, 0);
      return beside(random, random() < 0.5 ? -zero : q + zero, 0);
    }
    case 3:
      return { re: (random() < 0.5 ? 0 : q) + off(random, 0.05 * q), im: off(random, 0.05 * q) };
    default: {
      const size = sized(random, q, largest);
      const angle = between(random, -Math.PI, Math.PI);
      return { re: size * Math.cos(angle), im: size * Math.sin(angle) };
    }
  }
}

/** A function and where to evaluate it. */
export interface KernelSource {
  readonly name: FunctionName;
  readonly next: (random: Random) => KernelPoint;
}

/** Sources of arguments and parameters of each function that products are made of, each with a memory of its own. */
export function kernelSources(): Readonly<Record<string, KernelSource>> {
  const real = kept(12, period);
  const other = kept(12, period);
  const complex = kept(12, complexPeriod);
  const complexOther = kept(12, complexPeriod);
  const three = kept(12, (random) => [0, 1, 2].map(() => parameterOfDouble(sized(random, 0.2, 5))));
  const threeComplex = kept(40, (random) =>
    [0, 1, 2].map(() => {
      const [size, angle] = [sized(random, 0.5, 2), between(random, -1, 1)];
      return complexOfDoubles(size * Math.cos(angle), size * Math.sin(angle));
    }),
  );
  const doubleSineAt = (random: Random, b: ExactParameter, largest: number): KernelPoint => {
    const periods = [b.approx.re, 1 / b.approx.re];
    const q = b.approx.re + 1 / b.approx.re;
    const { re, im } = realAxisPoint(random, periods, largest);
    // i (x - Q/2): zeros and poles lie on the imaginary axis.
    return { re: -im, im: re - q / 2, parameters: [b] };
  };
  const size = (random: Random): number => sized(random, 1, 1e4);
  return {
    doubleSine: { name: 'doubleSine', next: (random) => doubleSineAt(random, other(random), 1e4) },
    'doubleSine, complex b': {
      name: 'doubleSine',
      next: (random) => {
        const b = complexOther(random);
        const q = Math.hypot(b.approx.re, b.approx.im) + 1 / Math.hypot(b.approx.re, b.approx.im);
        return { re: off(random, 2 * q), im: off(random, 2 * q), parameters: [b] };
      },
    },
    gamma: {
      name: 'gamma',
      next: (random) => {
        if (random() < 0.3) return { ...beside(random, -whole(random, 0, 30), 0), parameters: [] };
        const most = size(random);
        return { re: off(random, most), im: off(random, most), parameters: [] };
      },
    },
    fluxGamma: {
      name: 'fluxGamma',
      next: (random) => {
        const flux = whole(random, -6, 6);
        const near = random() < 0.3;
        const most = near ? 0 : size(random);
        const at = near
          ? beside(random, -Math.abs(flux) / 2 - few(random), 0)
          : { re: off(random, most), im: off(random, most) };
        return { ...at, parameters: [parameterOfDouble(flux)] };
      },
    },
    upsilon: {
      name: 'upsilon',
      next: (random) => {
        const b = real(random);
        return { ...realAxisPoint(random, [b.approx.re, 1 / b.approx.re], 1e4), parameters: [b] };
      },
    },
    'upsilon, complex b': {
      name: 'upsilon',
      next: (random) => {
        const b = complex(random);
        const modulus = Math.hypot(b.approx.re, b.approx.im);
        const most = (modulus + 1 / modulus) * (random() < 0.8 ? 1 : 20);
        return { re: off(random, most), im: off(random, most), parameters: [b] };
      },
    },
    tripleSine: {
      name: 'tripleSine',
      next: (random) => {
        const w = three(random);
        const periods = w.map(({ approx }) => approx.re);
        const q = periods.reduce((sum, value) => sum + value, 0);
        return { ...realAxisPoint(random, periods, random() < 0.9 ? 3 * q : 30 * q), parameters: w };
      },
    },
    'tripleSine, complex periods': {
      name: 'tripleSine',
      next: (random) => ({ re: off(random, 4), im: off(random, 4), parameters: threeComplex(random) }),
    },
    hyperbolicSine: {
      name: 'hyperbolicSine',
      next: (random) => {
        if (random() < 0.3) return { ...beside(random, 0, whole(random, -30, 30)), parameters: [] };
        const most = size(random);
        return { re: off(random, most), im: off(random, most), parameters: [] };
      },
    },
    hyperbolicCosine: {
      name: 'hyperbolicCosine',
      next: (random) => {
        if (random() < 0.3) return { ...beside(random, 0, whole(random, -30, 30) + 0.5), parameters: [] };
        const most = size(random);
        return { re: off(random, most), im: off(random, most), parameters: [] };
      },
    },
    linear: {
      name: 'linear',
      next: (random) => {
        const most = size(random);
        return { re: off(random, most), im: off(random, most), parameters: [] };
      },
    },
  };
}
