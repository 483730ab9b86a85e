// The same argument with more bits: what the coarser value is off by must be within the bound stated at the function.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { absolute, numberFromFixed } from '../../engine/arithmetic/fixed';
import { atan2Fixed, atanFixed } from '../../engine/arithmetic/fixed-atan';
import {
  divideComplex,
  expComplex,
  type FixedComplex,
  logComplex,
  multiplyComplex,
  powComplex,
  sinCosComplex,
  sinhCoshComplex,
  sqrtComplex,
} from '../../engine/arithmetic/fixed-complex';
import { expFixed, exponentialWorking, expScaled, sinhCoshFixed, tanhFixed } from '../../engine/arithmetic/fixed-exp';
import { log1pFixed, logFixed, logScaled } from '../../engine/arithmetic/fixed-log';
import { powerSum } from '../../engine/arithmetic/fixed-series';
import { cotFixed, sinCosFixed, sinCosWorking, tanFixed } from '../../engine/arithmetic/fixed-trig';
import { workingBits } from '../../engine/arithmetic/fixed-working';
import { arbitraryFixed } from '../functions/arbitrary-fixed';

/** Bits by which the comparison value is finer, at least. */
const FINER = 120;
const RUNS = { numRuns: 150 };

/** Short and long kernels (the border is at 1000 bits), and precisions that fill or just overflow a digit. */
const arbitraryBits = fc.oneof(
  fc.integer({ min: 48, max: 420 }),
  fc.integer({ min: 650, max: 1100 }),
  fc.constantFrom(50, 110, 114, 174, 178, 238, 242, 938, 990, 3000),
);

type Values = readonly bigint[];
type Evaluate = (x: Values, bits: number) => Values;
/** The bound in ulps from the finer values and the arguments, as doubles. */
type Bound = (values: readonly number[], x: readonly number[]) => number;

const parts = ({ re, im }: FixedComplex): Values => [re, im];
const pair = (x: Values, at = 0): FixedComplex => ({ re: x[at] as bigint, im: x[at + 1] as bigint });
const size = (values: readonly number[]): number => Math.max(1, Math.hypot(...values));

interface Case {
  readonly domain: readonly fc.Arbitrary<(bits: number) => bigint>[];
  readonly allowed?: (x: Values) => boolean;
  readonly evaluate: Evaluate;
  readonly bound: Bound;
}

const plane = [arbitraryFixed(-20, 20), arbitraryFixed(-20, 20)];
const notZero = (x: Values): boolean => x.some((value) => value !== 0n);

const CASES: Readonly<Record<string, Case>> = {
  exp: { domain: [arbitraryFixed(-60, 60)], evaluate: ([x = 0n], p) => [expFixed(x, p)], bound: size },
  'exp, scaled': {
    domain: [arbitraryFixed(-1_000_000, 1_000_000)],
    // The mantissa is below 2, and 0.6 is relative.
    evaluate: ([x = 0n], p) => [expScaled(x, p).mantissa],
    bound: ([m = 1]) => 0.6 * m,
  },
  'sinh, cosh': {
    domain: [arbitraryFixed(-30, 30)],
    evaluate: ([x = 0n], p) => [sinhCoshFixed(x, p).sinh, sinhCoshFixed(x, p).cosh],
    bound: ([, cosh = 1]) => cosh,
  },
  tanh: { domain: [arbitraryFixed(-50, 50)], evaluate: ([x = 0n], p) => [tanhFixed(x, p)], bound: () => 1 },
  'sin, cos': {
    domain: [arbitraryFixed(-100_000, 100_000)],
    evaluate: ([x = 0n], p) => [sinCosFixed(x, p).sin, sinCosFixed(x, p).cos],
    bound: () => 1,
  },
  tan: {
    domain: [arbitraryFixed(-30, 30)],
    evaluate: ([x = 0n], p) => [tanFixed(x, p)],
    bound: ([v = 0]) => Math.max(1, v * v),
  },
  cot: {
    domain: [arbitraryFixed(-30, 30)],
    allowed: notZero,
    evaluate: ([x = 0n], p) => [cotFixed(x, p)],
    bound: ([v = 0]) => Math.max(1, v * v),
  },
  log: {
    domain: [arbitraryFixed(0, 1_000_000)],
    allowed: ([x = 0n]) => x > 0n,
    evaluate: ([x = 0n], p) => [logFixed(x, p)],
    bound: () => 1,
  },
  'log(1 + x)': {
    domain: [arbitraryFixed(0, 3)],
    evaluate: ([x = 0n], p) => [log1pFixed(x, p)],
    bound: () => 1,
  },
  'log of an integer': {
    domain: [fc.bigInt({ min: 1n, max: 1n << 200n }).map((n) => () => n)],
    // The argument is no fixed point number: it is not lifted.
    evaluate: ([n = 1n], p) => [logScaled(n, 0, p)],
    bound: () => 1,
  },
  'argument of x + iy': {
    domain: plane,
    allowed: notZero,
    evaluate: ([y = 0n, x = 0n], p) => [atan2Fixed(y, x, p)],
    bound: () => 1,
  },
  atan: { domain: [arbitraryFixed(-30, 30)], evaluate: ([x = 0n], p) => [atanFixed(x, p)], bound: () => 1 },
  'complex log': {
    domain: plane,
    allowed: notZero,
    evaluate: (x, p) => parts(logComplex(pair(x), p)),
    bound: () => 1,
  },
  'complex exp': { domain: plane, evaluate: (x, p) => parts(expComplex(pair(x), p)), bound: (v) => 4 * size(v) },
  'complex sin': {
    domain: plane,
    evaluate: (x, p) => parts(sinCosComplex(pair(x), p).sin),
    bound: (_, [, y = 0]) => 4 * Math.cosh(y),
  },
  'complex cosh': {
    domain: plane,
    evaluate: (x, p) => parts(sinhCoshComplex(pair(x), p).cosh),
    bound: (_, [x = 0]) => 4 * Math.cosh(x),
  },
  'complex root': { domain: plane, evaluate: (x, p) => parts(sqrtComplex(pair(x), p)), bound: () => 2 },
  'complex quotient': {
    domain: [...plane, ...plane],
    allowed: (x) => notZero(x.slice(2)),
    evaluate: (x, p) => parts(divideComplex(pair(x), pair(x, 2), p)),
    bound: () => 1,
  },
  'complex product': {
    domain: [...plane, ...plane],
    evaluate: (x, p) => parts(multiplyComplex(pair(x), pair(x, 2), p)),
    bound: () => 1,
  },
  'complex power': {
    domain: [...plane, arbitraryFixed(-4, 4), arbitraryFixed(-4, 4)],
    allowed: notZero,
    evaluate: (x, p) => parts(powComplex(pair(x), pair(x, 2), p)),
    bound: (v, [, , u = 0, w = 0]) => (6 + 2 * Math.hypot(u, w)) * size(v),
  },
};

describe('every kernel keeps its bound at random arguments', () => {
  test.each(Object.entries(CASES))('%s', (name, { domain, allowed, evaluate, bound }) => {
    fc.assert(
      fc.property(arbitraryBits, fc.tuple(...domain), (bits, made) => {
        const x = made.map((number) => number(bits));
        if (allowed !== undefined && !allowed(x)) return;
        const up = name === 'log of an integer' ? 0n : BigInt(FINER);
        const coarse = evaluate(x, bits);
        const fine = evaluate(
          x.map((value) => value << up),
          bits + FINER,
        );
        const allowedUlps = bound(
          fine.map((value) => numberFromFixed(value, bits + FINER)),
          x.map((value) => numberFromFixed(value, bits)),
        );
        coarse.forEach((value, k) => {
          const gap = absolute((value << BigInt(FINER)) - (fine[k] as bigint));
          expect(numberFromFixed(gap, FINER)).toBeLessThanOrEqual(allowedUlps * (1 + 1e-9));
        });
      }),
      RUNS,
    );
  });
});

describe('bounds in working ulps, before the last rounding', () => {
  const unit = arbitraryFixed(0, 1);

  test('e^r for r in [0, 1) within 40', () => {
    fc.assert(
      fc.property(arbitraryBits, unit, (bits, made) => {
        const working = workingBits(bits);
        const finer = workingBits(working + FINER);
        const r = made(working);
        if (r >= 1n << BigInt(working)) return;
        const up = BigInt(finer - working);
        const gap = absolute((exponentialWorking(r, working) << up) - exponentialWorking(r << up, finer));
        expect(numberFromFixed(gap, finer - working)).toBeLessThan(40);
      }),
      RUNS,
    );
  });

  test('sin and cos within 40', () => {
    fc.assert(
      fc.property(arbitraryBits, arbitraryFixed(-50, 50), (bits, made) => {
        const working = workingBits(bits);
        const finer = workingBits(working + FINER);
        const x = made(working);
        const up = BigInt(finer - working);
        const [coarse, fine] = [sinCosWorking(x, working), sinCosWorking(x << up, finer)];
        for (const part of ['sin', 'cos'] as const) {
          const gap = absolute((coarse[part] << up) - fine[part]);
          expect(numberFromFixed(gap, finer - working)).toBeLessThan(40);
        }
      }),
      RUNS,
    );
  });

  test('power sums: 2 a step over (1 - |z|)^2', () => {
    const bits = 150;
    fc.assert(
      fc.property(
        fc.array(arbitraryFixed(-3, 3), { maxLength: 60 }),
        fc.double({ min: 0, max: 0.9, noNaN: true }),
        fc.double({ min: -4, max: 4, noNaN: true }),
        (made, radius, angle) => {
          const part = (value: number): bigint => BigInt(Math.round(value * 2 ** 50)) << BigInt(bits - 50);
          const z = { re: part(radius * Math.cos(angle)), im: part(radius * Math.sin(angle)) };
          const coefficients = made.map((number) => number(bits));
          const up = BigInt(FINER);
          const coarse = powerSum(coefficients, coefficients.length, z, bits);
          const fine = powerSum(
            coefficients.map((value) => value << up),
            coefficients.length,
            { re: z.re << up, im: z.im << up },
            bits + FINER,
          );
          // The cut of |z|^2 meets sums of up to 4 |coefficients|/(1 - |z|)^2 in every step, the others one unit each.
          const gain = 1 / (1 - radius - 2 ** -40) ** 2;
          for (const key of ['re', 'im'] as const) {
            const gap = numberFromFixed(absolute((coarse[key] << up) - fine[key]), FINER);
            expect(gap).toBeLessThanOrEqual(gain * (2 + 4 * gain) + 2);
          }
        },
      ),
      RUNS,
    );
  });
});
