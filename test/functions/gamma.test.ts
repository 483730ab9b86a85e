import { describe, expect, test } from 'vitest';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { gamma } from '../../engine/functions/gamma';
import { logGammaPrecise } from '../../engine/functions/log-gamma-precise';
import { logGammaBySpouge } from '../../engine/functions/log-gamma-spouge';
import fixture from '../fixtures/functions/gamma.json';
import { fixedComplex, fixedFromText, unitsOff } from './fixed-text';
import { hexadecimalDouble } from './hexadecimal';

const rows = fixture.rows.map((row) => ({
  re: hexadecimalDouble(row.z[0] as string),
  im: hexadecimalDouble(row.z[1] as string),
  log: row.log as [string, string],
}));

// Source of the fixture: mpmath.loggamma; see the generator beside it.
describe('log Gamma', () => {
  test('doubles', () => {
    const kernel = gamma.double([]);
    for (const { re, im, log } of rows) {
      const outRe = new Float64Array(1);
      const outIm = new Float64Array(1);
      kernel.addLog(Float64Array.of(re), Float64Array.of(im), 1, outRe, outIm);
      const wanted = log.map(Number) as [number, number];
      const nearest = re > 0.5 ? Number.POSITIVE_INFINITY : Math.hypot(re - Math.min(0, Math.round(re)), im);
      const size = Math.hypot(re, im);
      // |z psi(z)|: what one rounding of z does.
      const sensitivity = size * (Math.abs(Math.log(size)) + 2 / nearest);
      const scale = Math.max(1, Math.hypot(...wanted), sensitivity) * 2 ** -53;
      const off = Math.hypot((outRe[0] as number) - wanted[0], (outIm[0] as number) - wanted[1]);
      expect(off / scale, `z = ${re} + ${im} i`).toBeLessThan(16);
    }
  });

  test.each([60, 170, 400, 660])('precise, %i bits: the error stated is kept', (bits) => {
    for (const { re, im, log } of rows) {
      const z = fixedComplex(re, im, bits);
      // At few bits the fixed point argument is another number than the double; the error stated covers one unit of it.
      const value = logGammaPrecise(z, bits);
      if (value.kind === 'indistinct') continue;
      const wanted = { re: fixedFromText(log[0], bits), im: fixedFromText(log[1], bits) };
      const off = unitsOff(value, wanted, bits);
      expect(off, `z = ${re} + ${im} i`).toBeLessThanOrEqual(value.kind === 'value' ? Number(value.error) : 0);
      expect(value.kind === 'value' && numberFromFixed(value.error, bits)).toBeLessThan(1e-6);
    }
  });

  test.each([60, 170, 400])('the second route agrees, %i bits', (bits) => {
    for (const { re, im } of rows) {
      const z = fixedComplex(re, im, bits);
      const one = logGammaPrecise(z, bits);
      const two = logGammaBySpouge(z, bits);
      if (one.kind !== 'value' || two.kind !== 'value') continue;
      expect(unitsOff(two, one, bits, true), `z = ${re} + ${im} i`).toBeLessThanOrEqual(Number(one.error + two.error));
    }
  });

  test('poles: infinite in doubles, indistinct in fixed point', () => {
    const outRe = new Float64Array(3);
    gamma.double([]).addLog(Float64Array.of(0, -3, -3 + 1e-9), new Float64Array(3), 1, outRe, new Float64Array(3));
    expect(outRe[0]).toBe(Number.POSITIVE_INFINITY);
    expect(outRe[1]).toBe(Number.POSITIVE_INFINITY);
    expect(outRe[2]).toBeLessThan(30);
    expect(logGammaPrecise(fixedComplex(-3, 0, 100), 100).kind).toBe('indistinct');
    expect(logGammaPrecise(fixedComplex(0, 0, 100), 100).kind).toBe('indistinct');
  });
});
