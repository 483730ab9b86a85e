import { describe, expect, test } from 'vitest';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import type { FixedComplex } from '../../engine/arithmetic/fixed-complex';
import { logComplex } from '../../engine/arithmetic/fixed-complex';
import { ln2Fixed, piFixed } from '../../engine/arithmetic/fixed-constants';
import { logDoubleSineClosed } from '../../engine/functions/double-sine-closed';
import { periodOfSquare } from '../../engine/functions/double-sine-period';
import { logDoubleSine, logDoubleSineByOtherStep } from '../../engine/functions/double-sine-precise';
import { logDoubleSineByProduct } from '../../engine/functions/double-sine-product';
import type { PreciseLog } from '../../engine/functions/special-function';
import complexFixture from '../fixtures/functions/double-sine-complex.json' with { type: 'json' };
import fixture from '../fixtures/functions/double-sine-precise.json' with { type: 'json' };
import { period, periods } from './double-sine-periods';

function integer(text: string | undefined): bigint {
  if (text === undefined) throw new Error('missing number');
  return text.startsWith('-') ? -BigInt(`0x${text.slice(1)}`) : BigInt(`0x${text}`);
}

interface Row {
  readonly bits: number;
  readonly x: readonly string[];
  readonly log: readonly string[];
}

/** |value - reference| in ulps, and the bound claimed. */
function compare(log: PreciseLog | null, row: Row): { error: number; bound: number } {
  if (log === null || log.kind !== 'value') throw new Error(`no value: ${log?.kind}`);
  const extra = BigInt(fixture.extra);
  const re = Number((log.re << extra) - integer(row.log[0]));
  const im = Number((log.im << extra) - integer(row.log[1]));
  return { error: Math.hypot(re, im) * 2 ** -fixture.extra, bound: Number(log.error) };
}

const argument = (row: Row): FixedComplex => ({ re: integer(row.x[0]), im: integer(row.x[1]) });
const label = (row: Row & { where: string; digits: number }) => `${row.where}, ${row.digits} digits, x = ${row.x}`;

describe('log s_b against mpmath (trapezoidal rule without residues, see the generator)', () => {
  test.each(Object.keys(periods))('%s', (name) => {
    const rows = fixture.rows.filter((row) => row.b === name);
    expect(rows.length).toBeGreaterThan(40);
    for (const row of rows) {
      const { error, bound } = compare(logDoubleSine(argument(row), period(name), row.bits), row);
      expect(error, label(row)).toBeLessThanOrEqual(bound);
      // The arguments of the fixture are exact, so that only rounding to the last place may be left of the error.
      expect(error, label(row)).toBeLessThan(1);
    }
  });

  test('the bound is a few ulps inside the strip, and follows the distance to a pole', () => {
    for (const row of fixture.rows.filter(({ where, b }) => where === 'inside' && b !== 'b = 1/20' && b !== 'b = 20')) {
      expect(compare(logDoubleSine(argument(row), period(row.b), row.bits), row).bound).toBeLessThan(20);
    }
    const near = fixture.rows.filter(({ where }) => where === 'near a pole on the axis');
    expect(near.length).toBeGreaterThan(20);
    for (const row of near) {
      // An ulp of x at 10^-9 from a simple pole moves the logarithm by 10^9 ulps, times sqrt 2 for both parts.
      const { bound } = compare(logDoubleSine(argument(row), period(row.b), row.bits), row);
      expect(bound).toBeGreaterThan(1.4e9);
      expect(bound).toBeLessThan(2.9e9);
    }
  });
});

describe('second routes against the same values', () => {
  test('another step', () => {
    let reached = 0;
    for (const row of fixture.rows.filter(({ digits }) => digits < 1000)) {
      const log = logDoubleSineByOtherStep(argument(row), period(row.b), row.bits);
      if (log === null) {
        expect(row.where).toMatch(/^far/);
        continue;
      }
      const { error, bound } = compare(log, row);
      expect(error, label(row)).toBeLessThanOrEqual(Math.min(bound, 1));
      reached += 1;
    }
    expect(reached).toBeGreaterThan(400);
  });

  test.each(['b = 1', 'b = 5/4', 'b = sqrt 2', 'b^2 = 2/3', 'b = 3/10'])('closed form, %s', (name) => {
    let reached = 0;
    for (const row of fixture.rows.filter(({ b, digits }) => b === name && digits < 1000)) {
      const log = logDoubleSineClosed(argument(row), period(name), row.bits);
      // On the axis a logarithm of the closed form may vanish where the function does not.
      if (log?.kind === 'indistinct') continue;
      const { error, bound } = compare(log, row);
      expect(error, label(row)).toBeLessThanOrEqual(Math.min(bound, 1));
      reached += 1;
    }
    expect(reached).toBeGreaterThan(40);
  });

  test('closed form: not for irrational b^2, not for large p + q', () => {
    const x = { re: 1n << 60n, im: 0n };
    expect(logDoubleSineClosed(x, period('b = 2^(1/4)'), 60)).toBeNull();
    expect(logDoubleSineClosed(x, period('b = 101/100'), 60)).toBeNull();
  });

  test('products for complex b, against mpmath quad', () => {
    for (const row of complexFixture.rows) {
      const parts = row.b.map((text) => text.split('/').map(BigInt) as [bigint, bigint]);
      const value = (bits: number) => {
        const [re = 0n, im = 0n] = parts.map(([numerator, denominator]) => (numerator << BigInt(bits)) / denominator);
        return { re, im };
      };
      const approx = { re: numberFromFixed(value(60).re, 60), im: numberFromFixed(value(60).im, 60) };
      const { error, bound } = compare(logDoubleSineByProduct(argument(row), { value, approx }, row.bits), row);
      expect(error, `b = ${row.b} x = ${row.x}`).toBeLessThanOrEqual(Math.min(bound, 1));
      expect(bound).toBeLessThan(200);
    }
    expect(complexFixture.rows.length).toBe(32);
  });

  test('products need b^2 away from the real axis', () => {
    const value = (bits: number) => ({ re: 1n << BigInt(bits), im: 1n << BigInt(bits - 20) });
    expect(logDoubleSineByProduct({ re: 0n, im: 0n }, { value, approx: { re: 1, im: 2 ** -20 } }, 60)).toBeNull();
  });
});

describe('zeros and poles', () => {
  const bits = 100;
  const one = 1n << BigInt(bits);
  const b1 = period('b = 1');
  const b23 = period('b^2 = 2/3');
  const root = period('b = 2^(1/4)');
  const at = (im: bigint, re = 0n) => ({ re, im });

  test('b = 1: i n has order n', () => {
    for (const n of [1n, 2n, 7n]) {
      expect(logDoubleSine(at(n * one), b1, bits)).toEqual({ kind: 'pole', order: Number(n) });
      expect(logDoubleSine(at(-n * one), b1, bits)).toEqual({ kind: 'zero', order: Number(n) });
      expect(logDoubleSineClosed(at(n * one), b1, bits)).toEqual({ kind: 'pole', order: Number(n) });
    }
  });

  test('b^2 = 2/3: Q/2 + 3b = Q/2 + 2/b has order 2, its neighbours order 1', () => {
    /** Q/2 + m b + n/b to one ulp. */
    const pole = (m: bigint, n: bigint) => {
      const small = b23.value(bits + 10);
      const large = (1n << BigInt(2 * bits + 20)) / small;
      return ((2n * m + 1n) * small + (2n * n + 1n) * large) >> 11n;
    };
    expect(logDoubleSine(at(pole(3n, 0n)), b23, bits)).toEqual({ kind: 'pole', order: 2 });
    expect(logDoubleSine(at(pole(1n, 2n)), b23, bits)).toEqual({ kind: 'pole', order: 2 });
    expect(logDoubleSine(at(-pole(6n, 1n)), b23, bits)).toEqual({ kind: 'zero', order: 3 });
    expect(logDoubleSine(at(pole(1n, 0n)), b23, bits)).toEqual({ kind: 'pole', order: 1 });
    expect(logDoubleSine(at(-pole(2n, 1n)), b23, bits)).toEqual({ kind: 'zero', order: 1 });
    expect(logDoubleSine(at(pole(-1n, 0n)), b23, bits).kind).toBe('value');
    // Next to a double pole the logarithm grows twice as fast.
    const growth = (im: bigint) => {
      const [near, nearer] = [1n << 40n, 1n << 30n].map((e) => logDoubleSine(at(im, e), b23, bits));
      if (near?.kind !== 'value' || nearer?.kind !== 'value') throw new Error('no value');
      return numberFromFixed(nearer.re - near.re, bits) / (10 * Math.LN2);
    };
    expect(growth(pole(1n, 0n))).toBeCloseTo(1, 8);
    expect(growth(pole(3n, 0n))).toBeCloseTo(2, 8);
    expect(growth(pole(6n, 1n))).toBeCloseTo(3, 8);
  });

  test('an ulp off the axis, or several different poles within an ulp, are refused', () => {
    expect(logDoubleSine(at(one, 1n), b1, bits)).toEqual({ kind: 'indistinct' });
    expect(logDoubleSine(at(one, -3n), b1, bits)).toEqual({ kind: 'indistinct' });
    // b^2 = 1 + 2^-200: the poles i(Q/2 + b), i(Q/2 + 1/b) differ by 2^-200.
    const close = periodOfSquare((1n << 200n) + 1n, 1n << 200n);
    expect(logDoubleSine(at(2n * one), close, bits)).toEqual({ kind: 'indistinct' });
    expect(logDoubleSine(at(one), close, bits)).toEqual({ kind: 'pole', order: 1 });
    expect(logDoubleSine(at(one / 3n, one / 5n), close, bits).kind).toBe('value');
  });

  test('leading term at the first pole: s_b(iQ/2 + e) = 1/(2 pi i e)', () => {
    // S_2'(0 | b, 1/b) = 2 pi (Kurokawa and Koyama, Forum Math. 15 (2003) 839).
    const small = root.value(bits);
    const half = (small + (one * one) / small) / 2n;
    const e = 1n << 50n;
    const log = logDoubleSine(at(half, e), root, bits);
    const twoPi = logComplex({ re: 2n * piFixed(bits), im: 0n }, bits).re;
    const expected = { re: -twoPi - logComplex({ re: e, im: 0n }, bits).re, im: -(piFixed(bits) >> 1n) };
    if (log.kind !== 'value') throw new Error(log.kind);
    // Corrections are of relative size e = 2^-50, and the pole is off by an ulp, 2^-50 e.
    expect(Math.abs(numberFromFixed(log.re - expected.re, bits))).toBeLessThan(2 ** -46);
    expect(Math.abs(numberFromFixed(log.im - expected.im, bits))).toBeLessThan(2 ** -46);
  });

  test('a hypermultiplet of the round sphere: s_1(i/2)^2 = 1/2', () => {
    // Kapustin, Willett, Yaakov 2009, arXiv:0909.4559: 1/(2 cosh pi m) at m = 0.
    const log = logDoubleSine(at(one / 2n), b1, bits);
    if (log.kind !== 'value') throw new Error(log.kind);
    expect(Math.abs(Number(2n * log.re + ln2Fixed(bits)))).toBeLessThanOrEqual(3);
    expect(log.im).toBe(0n);
  });
});

test('b^2 closer to a rational number than can be resolved is refused, close ones are not', () => {
  const x = { re: 1n << 59n, im: 1n << 58n };
  const limit = logDoubleSine(x, period('b = 1'), 60);
  for (const [power, kind] of [
    [50n, 'value'],
    [1000n, 'value'],
    [20000n, 'unreachable'],
  ] as const) {
    const log = logDoubleSine(x, periodOfSquare((1n << power) + 1n, 1n << power), 60);
    expect(log.kind).toBe(kind);
    if (log.kind === 'value' && limit.kind === 'value' && power > 70n) {
      expect(Number(log.re - limit.re) ** 2 + Number(log.im - limit.im) ** 2).toBeLessThanOrEqual(2);
    }
  }
});
