import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { doubleSineKernel } from '../../engine/functions/double-sine-double';
import type { Complex } from '../../engine/functions/special-function';
import fixture from '../fixtures/functions/double-sine.json';
import { hexadecimalDouble } from './hexadecimal';

/** log s_b at one point. */
function logAt(b: number, re: number, im: number): Complex {
  const outRe = new Float64Array(1);
  const outIm = new Float64Array(1);
  doubleSineKernel(b).addLog(Float64Array.of(re), Float64Array.of(im), 1, outRe, outIm);
  return { re: outRe[0] as number, im: outIm[0] as number };
}

/** Distance of two logarithms of one number: imaginary parts may differ by multiples of 2 pi. */
function distance(a: Complex, b: Complex): number {
  const turns = Math.round((a.im - b.im) / (2 * Math.PI));
  return Math.hypot(a.re - b.re, a.im - b.im - 2 * Math.PI * turns);
}

/** What one rounding of x does to the logarithm, from a difference quotient. */
function sensitivity(b: number, re: number, im: number): number {
  const step = 1e-5 * Math.min(1, b, 1 / b);
  const one = logAt(b, re + step, im);
  const two = logAt(b, re - step, im);
  return (distance(one, two) / (2 * step)) * Math.hypot(re, im);
}

const EPSILON = 2 ** -53;
const period = fc.double({ min: 0.05, max: 4, noNaN: true });
const coordinate = fc.double({ min: -3, max: 3, noNaN: true });

describe('log s_b in doubles', () => {
  // Source: mpmath, another method; see the generator beside the fixture.
  test.each(fixture.rows.map((row) => [row.b, row.x[0], row.x[1], row] as const))(
    'b = %s, x = %s + %s i',
    (_b, _re, _im, row) => {
      const b = hexadecimalDouble(row.b);
      const re = hexadecimalDouble(row.x[0] as string);
      const im = hexadecimalDouble(row.x[1] as string);
      const value = logAt(b, re, im);
      const wanted = { re: Number(row.log[0]), im: Number(row.log[1]) };
      const scale = Math.max(1, Math.hypot(wanted.re, wanted.im), sensitivity(b, re, im));
      expect(Math.hypot(value.re - wanted.re, value.im - wanted.im) / (scale * EPSILON)).toBeLessThan(8);
    },
  );

  test('arrays add power times the logarithm to what is there', () => {
    const re = new Float64Array([1, 2]);
    const im = new Float64Array([0, -1]);
    doubleSineKernel(1.3).addLog(Float64Array.of(0.4, -0.7), Float64Array.of(0.2, 0.1), -3, re, im);
    const one = logAt(1.3, 0.4, 0.2);
    const two = logAt(1.3, -0.7, 0.1);
    expect(re[0]).toBeCloseTo(1 - 3 * one.re, 14);
    expect(im[0]).toBeCloseTo(-3 * one.im, 14);
    expect(re[1]).toBeCloseTo(2 - 3 * two.re, 14);
    expect(im[1]).toBeCloseTo(-1 - 3 * two.im, 14);
  });

  test('a null imaginary array means real arguments', () => {
    const x = Float64Array.of(-0.9, 0, 0.2, 3.1);
    const [a, c, d, e] = [new Float64Array(4), new Float64Array(4), new Float64Array(4), new Float64Array(4)];
    doubleSineKernel(0.8).addLog(x, null, 2, a, c);
    doubleSineKernel(0.8).addLog(x, new Float64Array(4), 2, d, e);
    expect(a).toEqual(new Float64Array(4));
    expect(c).toEqual(e);
  });
});

describe('laws of s_b in doubles', () => {
  const property = (check: (b: number, re: number, im: number) => void): void => {
    fc.assert(
      fc.property(period, coordinate, coordinate, (b, u, v) => {
        const scale = Math.max(1, (b + 1 / b) / 2);
        check(b, u * scale, v * scale);
      }),
      { numRuns: 300 },
    );
  };
  const tolerance = (b: number, re: number, im: number, ...logs: Complex[]): number =>
    24 * EPSILON * Math.max(1, sensitivity(b, re, im), ...logs.map((log) => Math.hypot(log.re, log.im)));
  /** Points where the difference quotient itself is not to be trusted: next to a pole or zero. */
  const tooNear = (b: number, re: number, im: number): boolean => {
    const rest = Math.abs(im) - (b + 1 / b) / 2;
    for (let m = 0; m * b <= rest + 1; m++) {
      const n = Math.max(0, Math.round((rest - m * b) * b));
      if (Math.hypot(re, rest - m * b - n / b) < 1e-3 * Math.min(b, 1 / b)) return true;
    }
    return false;
  };

  test('reflection s_b(x) s_b(-x) = 1', () => {
    property((b, re, im) => {
      const one = logAt(b, re, im);
      const two = logAt(b, -re, -im);
      if (Number.isFinite(one.re)) expect(distance(one, { re: -two.re, im: -two.im })).toBeLessThan(1e-300 + EPSILON);
    });
  });

  test('inversion s_b = s_{1/b}', () => {
    property((b, re, im) => {
      if (tooNear(b, re, im)) return;
      const one = logAt(b, re, im);
      const two = logAt(1 / b, re, im);
      expect(distance(one, two)).toBeLessThan(tolerance(b, re, im, one));
    });
  });

  test.each(['b', '1/b'])('shift s_b(x - i p/2) = 2 cosh(pi p x) s_b(x + i p/2), p = %s', (which) => {
    property((b, re, im) => {
      const p = which === 'b' ? b : 1 / b;
      if (tooNear(b, re, im - p / 2) || tooNear(b, re, im + p / 2)) return;
      const below = logAt(b, re, im - p / 2);
      const above = logAt(b, re, im + p / 2);
      const a = Math.PI * p * re;
      const c = Math.PI * p * im;
      const cosh = { re: 2 * Math.cosh(a) * Math.cos(c), im: 2 * Math.sinh(a) * Math.sin(c) };
      if (!Number.isFinite(cosh.re) || !Number.isFinite(cosh.im)) return;
      const log = { re: Math.log(Math.hypot(cosh.re, cosh.im)), im: Math.atan2(cosh.im, cosh.re) };
      const bound =
        tolerance(b, re, im - p / 2, below, above) +
        tolerance(b, re, im + p / 2) +
        (8 * EPSILON * (1 + Math.hypot(a, c)) * Math.cosh(a)) / Math.hypot(cosh.re / 2, cosh.im / 2);
      expect(distance(below, { re: above.re + log.re, im: above.im + log.im })).toBeLessThan(bound);
    });
  });

  test('conjugation: s_b(conj x) = 1/conj s_b(x)', () => {
    property((b, re, im) => {
      const one = logAt(b, re, im);
      const two = logAt(b, re, -im);
      if (Number.isFinite(one.re)) expect(distance(two, { re: -one.re, im: one.im })).toBeLessThan(1e-300 + EPSILON);
    });
  });

  test('growth (i pi/2)(x^2 + (b^2 + b^-2)/12) far to the right', () => {
    property((b, u, im) => {
      // e^{-2 pi min(b, 1/b) Re x} < 1e-17.
      const re = (7 + Math.abs(u)) / Math.min(b, 1 / b);
      const log = logAt(b, re, im);
      const square = { re: re * re - im * im + (b * b + 1 / (b * b)) / 12, im: 2 * re * im };
      const limit = { re: (-Math.PI / 2) * square.im, im: (Math.PI / 2) * square.re };
      expect(Math.hypot(log.re - limit.re, log.im - limit.im)).toBeLessThan(
        8 * EPSILON * Math.hypot(limit.re, limit.im),
      );
    });
  });
});

describe('poles and zeros of s_b in doubles', () => {
  test('every lattice point is hit, and nothing else', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.1, max: 5, noNaN: true }), fc.nat(6), fc.nat(6), (b, m, n) => {
        const y = (b + 1 / b) / 2 + m * b + n / b;
        expect(logAt(b, 0, y).re).toBe(Number.POSITIVE_INFINITY);
        expect(logAt(b, 0, -y).re).toBe(Number.NEGATIVE_INFINITY);
        for (const off of [1e-6, -1e-6]) {
          expect(Number.isFinite(logAt(b, 0, y + off * Math.min(b, 1 / b)).re)).toBe(true);
          expect(Number.isFinite(logAt(b, off * Math.min(b, 1 / b), y).re)).toBe(true);
        }
      }),
    );
  });

  test('an infinite value has the sign of the power', () => {
    const re = new Float64Array(2);
    const im = new Float64Array(2);
    doubleSineKernel(1).addLog(new Float64Array(2), Float64Array.of(1, -2), -2, re, im);
    expect([...re]).toEqual([Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY]);
  });

  test('residue: s_b(i Q/2 + e) = 1/(2 pi i e) + O(1)', () => {
    // Source: Kharchev, Lebedev, Semenov-Tian-Shansky 2002, hep-th/0102180 (from memory), with s_b(x) s_b(-x) = 1.
    for (const b of [0.3, 1, 1.4]) {
      const e = 1e-6;
      const { re, im } = logAt(b, e, (b + 1 / b) / 2);
      const value = { re: Math.exp(re) * Math.cos(im), im: Math.exp(re) * Math.sin(im) };
      expect(2 * Math.PI * e * value.im).toBeCloseTo(-1, 5);
      expect(2 * Math.PI * e * value.re).toBeCloseTo(0, 4);
    }
  });

  test('on the imaginary axis the value is real', () => {
    for (const y of [0.3, 0.99, 1.3, 2.4, 3.7, -1.6]) {
      const { im } = logAt(0.85, 0, y);
      expect(im === Math.PI * Math.round(im / Math.PI)).toBe(true);
    }
  });
});
