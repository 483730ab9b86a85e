import { describe, expect, test } from 'vitest';
import { ln2Fixed } from '../../engine/arithmetic/fixed-constants';
import { upsilonByDoubleGamma } from '../../engine/functions/barnes-routes';
import { logGammaPrecise } from '../../engine/functions/log-gamma-precise';
import { upsilonKernel } from '../../engine/functions/upsilon-double';
import { logUpsilon } from '../../engine/functions/upsilon-precise';
import fixture from '../fixtures/functions/upsilon.json';
import { fixedComplex, fixedFromText, parameterOfDouble, unitsOff } from './fixed-text';
import { hexadecimalDouble } from './hexadecimal';
import { kernelValue } from './kernel-value';

const rows = fixture.rows.map((row) => ({
  b: hexadecimalDouble(row.b),
  re: hexadecimalDouble(row.x[0] as string),
  im: hexadecimalDouble(row.x[1] as string),
  log: row.log as [string, string],
}));

// Source of the fixture: mpmath, double exponential quadrature; see the generator beside it.
describe('log Upsilon_b', () => {
  test('doubles: within 5e-15 of max(1, |log|, |x d log/dx|)', () => {
    for (const { b, re, im, log } of rows) {
      const kernel = upsilonKernel(b);
      const value = kernelValue(kernel, re, im);
      const wanted = { re: Number(log[0]), im: Number(log[1]) };
      const step = 1e-5;
      const right = kernelValue(kernel, re + step, im);
      const left = kernelValue(kernel, re - step, im);
      const slope = Math.abs(right.re - left.re) / (2 * step) + Math.abs(Math.sin(right.im - left.im)) / (2 * step);
      const scale = Math.max(1, Math.hypot(wanted.re, value.im), Math.hypot(re, im) * slope);
      const turns = Math.round((value.im - wanted.im) / (2 * Math.PI));
      const off = Math.hypot(value.re - wanted.re, value.im - wanted.im - 2 * Math.PI * turns);
      expect(off / scale, `b = ${b}, x = ${re} + ${im} i`).toBeLessThan(5e-15);
    }
  });

  test.each([60, 190])('precise, %i bits: the error stated is kept', (bits) => {
    for (const { b, re, im, log } of rows) {
      const value = logUpsilon(fixedComplex(re, im, bits), parameterOfDouble(b), bits);
      const wanted = { re: fixedFromText(log[0], bits), im: fixedFromText(log[1], bits) };
      const bound = value.kind === 'value' ? Number(value.error) : 0;
      expect(unitsOff(value, wanted, bits, true), `b = ${b}, x = ${re} + ${im} i`).toBeLessThanOrEqual(bound);
      expect(bound).toBeLessThan(20_000);
    }
  });

  test('precise: twice the bits give the same digits', () => {
    for (const [b, re, im] of [
      [1, 1, 1.3],
      [0.75, 0.4, 0.9],
      [1.5, -0.3, 2],
    ] as const) {
      const low = logUpsilon(fixedComplex(re, im, 170), parameterOfDouble(b), 170);
      const high = logUpsilon(fixedComplex(re, im, 340), parameterOfDouble(b), 340);
      if (low.kind !== 'value' || high.kind !== 'value') throw new Error('no value');
      const cut = { re: high.re >> 170n, im: high.im >> 170n };
      expect(unitsOff(low, cut, 170)).toBeLessThanOrEqual(Number(low.error) + 1);
    }
  });

  test('second route: double Gamma functions agree', () => {
    const bits = 120;
    for (const { b, re, im } of rows.filter((_, k) => k % 6 === 0)) {
      const x = fixedComplex(re, im, bits);
      const one = logUpsilon(x, parameterOfDouble(b), bits);
      const two = upsilonByDoubleGamma(x, parameterOfDouble(b), bits);
      if (one.kind !== 'value' || two?.log.kind !== 'value') throw new Error('no value');
      expect(unitsOff(one, two.log, bits, true)).toBeLessThanOrEqual(Number(one.error + two.log.error));
    }
  });

  test('far up: the asymptotic series joins the quadrature and agrees with double Gamma functions', () => {
    const bits = 80;
    for (const [b, re, im] of [
      [1, 1, 15],
      [0.8, 0.3, 30],
      [1.3, 7, -40],
    ] as const) {
      const x = fixedComplex(re, im, bits);
      const one = logUpsilon(x, parameterOfDouble(b), bits);
      const two = upsilonByDoubleGamma(x, parameterOfDouble(b), bits);
      if (one.kind !== 'value' || two?.log.kind !== 'value') throw new Error('no value');
      expect(unitsOff(one, two.log, bits, true)).toBeLessThanOrEqual(Number(one.error + two.log.error));
    }
  });

  test('zeros -(m b + n/b) and Q + m b + n/b', () => {
    for (const b of [1, 0.7, 0.3]) {
      const kernel = upsilonKernel(b);
      for (const [m, n] of [
        [0, 0],
        [3, 0],
        [0, 2],
        [4, 1],
      ] as const) {
        const at = m * b + n / b;
        expect(kernelValue(kernel, -at, 0).re).toBe(Number.NEGATIVE_INFINITY);
        expect(kernelValue(kernel, b + 1 / b + at, 0).re).toBe(Number.NEGATIVE_INFINITY);
        expect(Number.isFinite(kernelValue(kernel, -at - 1e-7 * b, 0).re)).toBe(true);
        expect(Number.isFinite(kernelValue(kernel, -at, 1e-7).re)).toBe(true);
      }
    }
    expect(logUpsilon(fixedComplex(-1, 0, 100), parameterOfDouble(1), 100).kind).toBe('indistinct');
  });
});

describe('Upsilon where it took minutes, or could not be had', () => {
  // Upsilon_1(x + 1) = Gamma(x)/Gamma(1 - x) Upsilon_1(x) (Zamolodchikov and Zamolodchikov 1996, hep-th/9506136).
  test.each([60, 190])('%i bits: a thousand periods out, by the shift', (bits) => {
    const far = logUpsilon(fixedComplex(1000.25, 0.5, bits), parameterOfDouble(1), bits);
    const near = logUpsilon(fixedComplex(990.25, 0.5, bits), parameterOfDouble(1), bits);
    if (far.kind !== 'value' || near.kind !== 'value') throw new Error('no value');
    let { re, im, error } = near;
    for (let k = 0; k < 10; k++) {
      const above = logGammaPrecise(fixedComplex(990.25 + k, 0.5, bits), bits);
      const below = logGammaPrecise(fixedComplex(-989.25 - k, -0.5, bits), bits);
      if (above.kind !== 'value' || below.kind !== 'value') throw new Error('no value');
      re += above.re - below.re;
      im += above.im - below.im;
      error += above.error + below.error;
    }
    expect(unitsOff(far, { re, im }, bits, true)).toBeLessThanOrEqual(Number(far.error + error));
  });

  test('b = 1/128 at the edge of the strip: two lattice sums, and the shift by 1/b', () => {
    const bits = 190;
    const b = parameterOfDouble(2 ** -7);
    const x = 97 / 256;
    const one = logUpsilon(fixedComplex(x, 0, bits), b, bits);
    const two = logUpsilon(fixedComplex(x, 0, bits), b, bits, 1.3);
    const shifted = logUpsilon(fixedComplex(x + 128, 0, bits), b, bits);
    // u = x/b.
    const above = logGammaPrecise(fixedComplex(48.5, 0, bits), bits);
    const below = logGammaPrecise(fixedComplex(-47.5, 0, bits), bits);
    if (one.kind !== 'value' || two.kind !== 'value' || shifted.kind !== 'value') throw new Error('no value');
    if (above.kind !== 'value' || below.kind !== 'value') throw new Error('no value');
    expect(unitsOff(one, two, bits, true)).toBeLessThanOrEqual(Number(one.error + two.error));
    // Upsilon(x + 1/b) = Gamma(u)/Gamma(1 - u) b^{2u - 1} Upsilon(x), b = 2^-7.
    const re = one.re + above.re - below.re - 7n * 96n * ln2Fixed(bits);
    const bound = one.error + shifted.error + above.error + below.error + 700n;
    expect(unitsOff(shifted, { re, im: one.im + above.im - below.im }, bits, true)).toBeLessThanOrEqual(Number(bound));
  });

  test('five hundred digits: two lattice sums agree', () => {
    const bits = 1700;
    const x = fixedComplex(0.5, 1, bits);
    const b = parameterOfDouble(0.75);
    const [one, two] = [logUpsilon(x, b, bits), logUpsilon(x, b, bits, 1.2)];
    if (one.kind !== 'value' || two.kind !== 'value') throw new Error('no value');
    expect(unitsOff(one, two, bits)).toBeLessThanOrEqual(Number(one.error + two.error));
  });

  test('too many lattice points: refused at once, with the reason', () => {
    const log = logUpsilon(fixedComplex(0.25, 900, 190), parameterOfDouble(1 / 64), 190);
    expect(log).toEqual({ kind: 'unreachable', says: 'more than 400000 lattice points would be needed' });
  });
});
