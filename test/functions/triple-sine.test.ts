import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { tripleSineSecondRoute } from '../../engine/functions/barnes-routes';
import { tripleSine } from '../../engine/functions/triple-sine';
import { tripleSineByContour } from '../../engine/functions/triple-sine-contour';
import { tripleSineKernel } from '../../engine/functions/triple-sine-double';
import { logTripleSine } from '../../engine/functions/triple-sine-precise';
import fixture from '../fixtures/functions/triple-sine.json';
import { fixedComplex, fixedFromText, parameterOfDouble, unitsOff } from './fixed-text';
import { hexadecimalDouble } from './hexadecimal';
import { kernelValue } from './kernel-value';

const rows = fixture.rows.map((row) => ({
  w: row.w.map(hexadecimalDouble) as [number, number, number],
  re: hexadecimalDouble(row.x[0] as string),
  im: hexadecimalDouble(row.x[1] as string),
  log: row.log as [string, string],
}));

// Source of the fixture: mpmath, contour integrals; see the generator beside it.
describe('log S_3', () => {
  test('doubles: within 3e-15 of max(1, |log|, |x d log/dx|)', () => {
    for (const { w, re, im, log } of rows) {
      const kernel = tripleSineKernel(...w);
      const value = kernelValue(kernel, re, im);
      const wanted = { re: Number(log[0]), im: Number(log[1]) };
      const step = 1e-5;
      const right = kernelValue(kernel, re + step, im);
      const left = kernelValue(kernel, re - step, im);
      const slope = Math.abs(right.re - left.re) / (2 * step) + Math.abs(Math.sin(right.im - left.im)) / (2 * step);
      const scale = Math.max(1, Math.hypot(wanted.re, value.im), Math.hypot(re, im) * slope);
      const turns = Math.round((value.im - wanted.im) / (2 * Math.PI));
      const off = Math.hypot(value.re - wanted.re, value.im - wanted.im - 2 * Math.PI * turns);
      expect(off / scale, `w = ${w}, x = ${re} + ${im} i`).toBeLessThan(3e-15);
    }
  });

  test.each([
    [60, 'on the real line', undefined],
    [190, 'on the real line', undefined],
    [60, 'off the real line', tripleSineByContour],
    [190, 'off the real line', tripleSineByContour],
  ] as const)('precise, %i bits, nodes %s: the error stated is kept', (bits, _where, rule) => {
    for (const { w, re, im, log } of rows) {
      const value = logTripleSine(fixedComplex(re, im, bits), w.map(parameterOfDouble), bits, rule);
      const wanted = { re: fixedFromText(log[0], bits), im: fixedFromText(log[1], bits) };
      const bound = value.kind === 'value' ? Number(value.error) : 0;
      expect(unitsOff(value, wanted, bits, true), `w = ${w}, x = ${re} + ${im} i`).toBeLessThanOrEqual(bound);
      expect(bound).toBeLessThan(10_000);
    }
  });

  test('second routes: polylogarithms for equal periods, another contour else', () => {
    const bits = 90;
    const routes = new Set<string>();
    for (const { w, re, im } of rows.filter(({ im }, k) => im !== 0 && (k < 9 || k % 9 === 1))) {
      const x = fixedComplex(re, im, bits);
      const periods = w.map(parameterOfDouble);
      const one = logTripleSine(x, periods, bits);
      const two = tripleSineSecondRoute(x, periods, bits);
      if (one.kind !== 'value' || two?.log.kind !== 'value') throw new Error('no value');
      routes.add(two.route);
      expect(unitsOff(one, two.log, bits, true)).toBeLessThanOrEqual(Number(one.error + two.log.error));
    }
    expect(routes.size).toBe(2);
  });

  test('round, 200 digits: quadrature and polylogarithms agree', () => {
    const bits = 680;
    const periods = [1, 1, 1].map(parameterOfDouble);
    for (const [re, im] of [
      [1.5, 0.4],
      [0, 1.25],
    ] as const) {
      const x = fixedComplex(re, im, bits);
      const one = tripleSine.precise(x, periods, bits);
      const two = tripleSineSecondRoute(x, periods, bits);
      if (one.kind !== 'value' || two?.log.kind !== 'value') throw new Error('no value');
      expect(two.route).toBe('midpoint rule');
      expect(unitsOff(one, two.log, bits, true)).toBeLessThanOrEqual(Number(one.error + two.log.error));
    }
  });

  test('log S_3(3/2) = -(2 log 2 + 3 zeta(3)/pi^2)/16', () => {
    // Source: Kurokawa and Koyama 2003 (special values; the derivation at 3/2 from memory). zeta(3) from DLMF 25.6.
    const zeta3 = 1.2020569031595942;
    const wanted = -(2 * Math.LN2 + (3 * zeta3) / Math.PI ** 2) / 16;
    expect(kernelValue(tripleSineKernel(1, 1, 1), 1.5, 0).re).toBeCloseTo(wanted, 15);
  });

  test('the stated bound of the derivative holds with room', () => {
    // The precise tier counts 2 (|z| + |w|)^2/(w1 w2 w3) + 4 (|z| + |w|)/min(w)^2 for one unit of x in the middle half.
    const period = fc.double({ min: 0.2, max: 3, noNaN: true });
    fc.assert(
      fc.property(
        period,
        period,
        period,
        fc.double({ min: -1, max: 1, noNaN: true }),
        fc.double({ min: 0, max: 8, noNaN: true }),
        (u, v, w, across, up) => {
          const kernel = tripleSineKernel(u, v, w);
          const total = u + v + w;
          const a = total / 2 + (across * total) / 4;
          const step = 1e-4;
          const right = kernelValue(kernel, a, up + step);
          const left = kernelValue(kernel, a, up - step);
          const slope = Math.hypot(right.re - left.re, right.im - left.im) / (2 * step);
          const size = Math.hypot(a, up) + total;
          const bound = (2 * size * size) / (u * v * w) + (4 * size) / Math.min(u, v, w) ** 2;
          expect(slope).toBeLessThan(bound / 1.5 + 1e-6);
        },
      ),
      { numRuns: 300 },
    );
  });

  test('zeros -n.w and |w| + n.w', () => {
    const kernel = tripleSineKernel(1, 1.3, 0.4);
    for (const at of [0, 1, 1.3, 0.8, 1 + 2.6 + 0.4]) {
      expect(kernelValue(kernel, -at, 0).re).toBe(Number.NEGATIVE_INFINITY);
      expect(kernelValue(kernel, 2.7 + at, 0).re).toBe(Number.NEGATIVE_INFINITY);
      expect(Number.isFinite(kernelValue(kernel, -at + 1e-7, 0).re)).toBe(true);
    }
    expect(logTripleSine(fixedComplex(-2, 0, 100), [1, 1, 1].map(parameterOfDouble), 100).kind).toBe('indistinct');
  });
});
