import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fixedFromNumber } from '../../engine/arithmetic/fixed';
import type { FixedComplex } from '../../engine/arithmetic/fixed-complex';
import { addComplex, expComplex, logComplex, multiplyComplex } from '../../engine/arithmetic/fixed-complex';
import { piFixed } from '../../engine/arithmetic/fixed-constants';
import type { ExactPeriod } from '../../engine/functions/double-sine-period';
import { orderedPeriods, periodOfSquare } from '../../engine/functions/double-sine-period';
import { logDoubleSine, logDoubleSineByOtherStep } from '../../engine/functions/double-sine-precise';
import { periods } from './double-sine-periods';

/*
 * Laws: oddness, conjugation, b <-> 1/b, both shifts, two steps of the rule agree; all within the printed errors. Arguments are points of a
 * coarse grid, exact in fixed point, so the shifted arguments are off by one ulp at most, which the errors include.
 */
const BITS = 120;

const anyPeriod: fc.Arbitrary<ExactPeriod> = fc.oneof(
  fc.constantFrom(...Object.values(periods)),
  fc
    .tuple(fc.integer({ min: 1, max: 40 }), fc.integer({ min: 1, max: 40 }))
    .map(([p, q]) => periodOfSquare(BigInt(p), BigInt(q))),
);

const coordinate = (size: number) => fc.integer({ min: -4096, max: 4096 }).map((k) => (k * size) / 4096);
const anyPoint = fc.record({ re: coordinate(4), im: coordinate(4) });

function fixed(point: { re: number; im: number }): FixedComplex {
  return { re: fixedFromNumber(point.re, BITS), im: fixedFromNumber(point.im, BITS) };
}

interface Value extends FixedComplex {
  readonly error: bigint;
}

/** The value; poles, zeros and refusals leave the property. */
function valueAt(x: FixedComplex, b: ExactPeriod): Value {
  const log = logDoubleSine(x, b, BITS);
  fc.pre(log.kind === 'value');
  return log as Value;
}

function expectClose(a: FixedComplex, b: FixedComplex, error: bigint): void {
  const distance = (a.re - b.re) ** 2n + (a.im - b.im) ** 2n;
  expect(distance <= error * error, `distance^2 ${distance}, error ${error}`).toBe(true);
}

/** log 2cosh(w) = w + log(1 + e^-2w), Re w > 0, with 8 ulps of error at most beside what an ulp of w makes. */
function log2Cosh(w: FixedComplex): FixedComplex {
  const decay = expComplex({ re: -2n * w.re, im: -2n * w.im }, BITS);
  return addComplex(w, logComplex({ re: (1n << BigInt(BITS)) + decay.re, im: decay.im }, BITS));
}

describe('laws of log s_b', () => {
  test('s_b(x) s_b(-x) = 1, exactly', () => {
    fc.assert(
      fc.property(anyPeriod, anyPoint, (b, point) => {
        // On the axis beyond the strip both values are limits from the right.
        fc.pre(point.re !== 0);
        const x = fixed(point);
        const value = valueAt(x, b);
        const other = valueAt({ re: -x.re, im: -x.im }, b);
        expect(other).toEqual({ ...value, re: -value.re, im: -value.im });
      }),
      { numRuns: 60 },
    );
  });

  test('conjugation: log s_b of the conjugate is minus the conjugate', () => {
    fc.assert(
      fc.property(anyPeriod, anyPoint, (b, point) => {
        fc.pre(point.re !== 0);
        const x = fixed(point);
        const value = valueAt(x, b);
        const other = valueAt({ re: x.re, im: -x.im }, b);
        expectClose(other, { re: -value.re, im: value.im }, value.error + other.error);
      }),
      { numRuns: 60 },
    );
  });

  test('s_b = s_{1/b}', () => {
    fc.assert(
      fc.property(anyPeriod, anyPoint, (b, point) => {
        const inverse: ExactPeriod = {
          square: b.square && { numerator: b.square.denominator, denominator: b.square.numerator },
          value: (bits) => (1n << BigInt(2 * bits + 40)) / b.value(bits + 40),
          approx: 1 / b.approx,
        };
        const value = valueAt(fixed(point), b);
        const other = valueAt(fixed(point), inverse);
        expectClose(value, other, value.error + other.error);
      }),
      { numRuns: 60 },
    );
  });

  test.each(['small', 'large'] as const)('shift by the %s period', (which) => {
    fc.assert(
      fc.property(anyPeriod, anyPoint, (b, point) => {
        // The logarithm is analytic in Re x > 0, so the law holds there for the logarithms themselves.
        fc.pre(point.re > 0.01);
        const beta = orderedPeriods(b, BITS)[which];
        const x = fixed(point);
        const low = valueAt({ re: x.re, im: x.im - (beta >> 1n) }, b);
        const high = valueAt({ re: x.re, im: x.im - (beta >> 1n) + beta }, b);
        const scaled = multiplyComplex({ re: beta, im: 0n }, x, BITS);
        const w = multiplyComplex({ re: piFixed(BITS), im: 0n }, scaled, BITS);
        // Products and pi cost up to 4 |w| ulps; tanh is below 1/(pi beta 0.01) + 1 here.
        const slack = BigInt(Math.ceil(100 + 4000 * (1 + 4 * b.approx + 4 / b.approx)));
        expectClose(low, addComplex(log2Cosh(w), high), low.error + high.error + slack);
      }),
      { numRuns: 60 },
    );
  });

  test('another step of the rule gives the same value', () => {
    fc.assert(
      fc.property(anyPeriod, anyPoint, (b, point) => {
        const value = valueAt(fixed(point), b);
        const other = logDoubleSineByOtherStep(fixed(point), b, BITS);
        // Both take the same argument, so only the rounding of the last place may differ.
        if (other?.kind !== 'value') throw new Error(`${other?.kind}`);
        expectClose(value, other, 1n + 1n);
      }),
      { numRuns: 40 },
    );
  });

  test('an argument off by an ulp in both parts stays within the error', () => {
    const far = fc.record({ re: coordinate(400), im: coordinate(4) });
    fc.assert(
      fc.property(anyPeriod, fc.oneof(anyPoint, far), fc.constantFrom(-1n, 1n), (b, point, step) => {
        fc.pre(point.re !== 0);
        const x = fixed(point);
        const value = valueAt(x, b);
        const moved = valueAt({ re: x.re + step, im: x.im + 1n }, b);
        // The error covers the method as well; one ulp each is the rounding of the two values.
        expectClose(value, moved, value.error + 1n);
        // And it is not idle: at most some ten times the change, or a few Q.
        const change = Math.hypot(Number(value.re - moved.re), Number(value.im - moved.im));
        expect(Number(value.error)).toBeLessThan(50 * (change + 2 + b.approx + 1 / b.approx));
      }),
      { numRuns: 80 },
    );
  });

  test('a wrong law is caught', () => {
    const b = Object.values(periods)[1] as ExactPeriod;
    const x = fixed({ re: 0.3, im: 0.2 });
    const value = valueAt(x, b);
    const distance = value.re ** 2n + (2n * value.im) ** 2n;
    expect(distance > (2n * value.error) ** 2n).toBe(true);
    expect(() => expectClose(value, { re: value.re + 3n * value.error, im: value.im }, value.error)).toThrow();
  });
});
