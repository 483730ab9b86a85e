// Source: mpmath by another method (integral), test/fixtures/spectra/generate.py; laws: Barnes 1904, Ruijsenaars 2000.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { absoluteComplex, type FixedComplex, subtractComplex } from '../../engine/arithmetic/fixed-complex';
import { formFixed } from '../../engine/arithmetic/form-fixed';
import { logBarnesGammaEqual } from '../../engine/functions/barnes-equal';
import { logBarnesGamma } from '../../engine/functions/barnes-gamma';
import { barnesGammaDouble } from '../../engine/functions/barnes-gamma-double';
import fixture from '../fixtures/spectra/mpmath.json';
import { parseForm } from '../spectrum/parse-form';
import { arbitraryFixed } from './arbitrary-fixed';
import { decimalFixed } from './decimal-fixed';

const BITS = 160;

function fixed(text: string): FixedComplex {
  const value = formFixed(parseForm(text), BITS);
  if (value === null) throw new Error(text);
  return value;
}

function logGamma(x: FixedComplex, periods: readonly FixedComplex[], further = 0) {
  const found = logBarnesGamma(x, periods, BITS, further);
  if (found === null) throw new Error('too many points');
  return found;
}

const rough = ({ re, im }: FixedComplex) => ({ re: numberFromFixed(re, BITS), im: numberFromFixed(im, BITS) });

describe('log Gamma_N', () => {
  test.each(fixture.gamma.map((row) => [row.x, row.periods.join(', '), row] as const))(
    'at %s, periods %s',
    (_x, _w, row) => {
      const x = fixed(row.x);
      const periods = row.periods.map(fixed);
      const { value } = logGamma(x, periods);
      const wanted = { re: decimalFixed(row.value.re, BITS), im: decimalFixed(row.value.im, BITS) };
      // The integrals are printed with 20 digits.
      expect(Math.abs(numberFromFixed(value.re - wanted.re, BITS))).toBeLessThan(1e-18);
      expect(Math.abs(numberFromFixed(value.im - wanted.im, BITS))).toBeLessThan(1e-18);
      const double = barnesGammaDouble(periods.map(rough))(rough(x));
      expect(double.re).toBeCloseTo(Number(row.value.re), 11);
      expect(double.im).toBeCloseTo(Number(row.value.im), 11);
    },
  );

  const period = fc.integer({ min: 10, max: 60 }).map((k) => `${k}/20`);
  const argument = fc
    .record({ re: fc.integer({ min: 1, max: 80 }), im: fc.integer({ min: -80, max: 80 }) })
    .map(({ re, im }) => fixed(`${re}/20+${im}/20*i`));

  test('one step along a period is a function of the others', () => {
    fc.assert(
      fc.property(argument, period, period, (x, one, other) => {
        const [w, v] = [fixed(one), fixed(other)];
        const here = logGamma(x, [w, v]);
        const next = logGamma({ re: x.re + w.re, im: x.im }, [w, v]);
        const rest = logGamma(x, [v]);
        const allowed = Number(here.error + next.error + rest.error) + 4;
        expect(Math.abs(Number(here.value.re - next.value.re - rest.value.re))).toBeLessThan(allowed);
        expect(Math.abs(Number(here.value.im - next.value.im - rest.value.im))).toBeLessThan(allowed);
      }),
      { numRuns: 10 },
    );
  });

  test('the number of steps does not matter, for complex periods too', () => {
    const periods = [fixed('1'), fixed('-1/5+11/10*i')];
    const x = fixed('2/3+i/7');
    const few = logGamma(x, periods);
    const many = logGamma(x, periods, 6);
    expect(Math.abs(Number(few.value.re - many.value.re))).toBeLessThan(Number(few.error + many.error));
    expect(Math.abs(Number(few.value.im - many.value.im))).toBeLessThan(Number(few.error + many.error));
  });

  test('errs by no more than stated: the same point with twice the bits', () => {
    const real = fc.tuple(arbitraryFixed(1, 6), fc.constantFrom(0n, 1n)).map(
      ([x, narrow]) =>
        (bits: number) =>
          x(bits) >> narrow,
    );
    fc.assert(
      fc.property(
        arbitraryFixed(-8, 20),
        arbitraryFixed(-20, 20),
        fc.array(real, { minLength: 1, maxLength: 2 }),
        fc.integer({ min: 60, max: 200 }),
        (re, im, w, bits) => {
          const x = { re: re(bits), im: im(bits) };
          // Off the real line, no lattice point is met.
          if (x.re < 1n && -8n < x.im && x.im < 8n) return;
          const periods = w.map((period) => ({ re: period(bits), im: 0n }));
          const coarse = logBarnesGamma(x, periods, bits);
          const lift = (z: FixedComplex): FixedComplex => ({ re: z.re << BigInt(bits), im: z.im << BigInt(bits) });
          const fine = logBarnesGamma(lift(x), periods.map(lift), 2 * bits);
          if (coarse === null || fine === null) throw new Error('too many points');
          expect(coarse.proved).toBe(true);
          const gap = absoluteComplex(subtractComplex(lift(coarse.value), fine.value));
          expect(gap).toBeLessThanOrEqual((coarse.error << BigInt(bits)) + fine.error);
        },
      ),
      { numRuns: 30 },
    );
  });

  test('equal periods: derivatives of the Hurwitz zeta function agree with rows of lattice points', () => {
    fc.assert(
      fc.property(
        arbitraryFixed(-8, 20),
        arbitraryFixed(-20, 20),
        arbitraryFixed(1, 6),
        fc.integer({ min: 1, max: 3 }),
        fc.integer({ min: 60, max: 200 }),
        (re, im, w, count, bits) => {
          const x = { re: re(bits), im: im(bits) };
          if (x.re < 1n && -8n < x.im && x.im < 8n) return;
          const periods = Array.from({ length: count }, () => ({ re: w(bits), im: 0n }));
          const closed = logBarnesGammaEqual(x, periods, bits);
          const rows = logBarnesGamma(x, periods, bits);
          if (closed === null || rows === null) throw new Error('too many points');
          const gap = absoluteComplex(subtractComplex(closed.value, rows.value));
          expect(gap).toBeLessThanOrEqual(closed.error + rows.error);
        },
      ),
      { numRuns: 40 },
    );
    expect(logBarnesGammaEqual(fixed('1'), [fixed('1'), fixed('2')], BITS)).toBe(null);
    expect(logBarnesGammaEqual(fixed('1'), [fixed('i'), fixed('i')], BITS)).toBe(null);
  });

  test('1150 bits, where doubles underflow', () => {
    const bits = 1150;
    const x = { re: (7n << BigInt(bits)) / 3n, im: 0n };
    const periods = [1n, 1n].map((w) => ({ re: w << BigInt(bits), im: 0n }));
    const closed = logBarnesGammaEqual(x, periods, bits);
    const rows = logBarnesGamma(x, periods, bits);
    if (closed === null || rows === null) throw new Error('too many points');
    expect(absoluteComplex(subtractComplex(closed.value, rows.value))).toBeLessThanOrEqual(closed.error + rows.error);
  });
});
