import { describe, expect, test } from 'vitest';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { parameterOfComplex } from '../../engine/functions/lattice-kernel-double';
import type { FunctionName } from '../../engine/functions/special-function';
import { functions } from '../../engine/functions/table';
import fixture from '../fixtures/functions/complex-periods.json';
import { fixedComplex, fixedFromText, unitsOff } from './fixed-text';
import { hexadecimalDouble } from './hexadecimal';
import { kernelValue } from './kernel-value';

const complex = (pair: readonly string[]) => ({
  re: hexadecimalDouble(pair[0] as string),
  im: hexadecimalDouble(pair[1] as string),
});

const rows = fixture.rows.map((row) => ({
  name: row.function as FunctionName,
  x: complex(row.x),
  periods: row.periods.map(complex),
  log: row.log as [string, string],
}));

// Source of the fixture: mpmath, quadrature of the defining integrals; see the generator beside it.
describe('Upsilon and the triple sine at complex periods', { timeout: 20_000 }, () => {
  test.each([60, 100])('precise, %i bits: the error stated is kept, by both routes', (bits) => {
    for (const { name, x, periods, log } of rows) {
      const at = [fixedComplex(x.re, x.im, bits), periods.map(parameterOfComplex), bits] as const;
      const wanted = { re: fixedFromText(log[0], bits), im: fixedFromText(log[1], bits) };
      const second = functions[name].crossCheck?.(...at)?.log;
      for (const value of [functions[name].precise(...at), second]) {
        if (value?.kind !== 'value') throw new Error(`${name} has no value`);
        const where = `${name} at ${JSON.stringify(x)}; ${JSON.stringify(periods)}`;
        expect(unitsOff(value, wanted, bits, true), where).toBeLessThanOrEqual(Number(value.error));
        expect(Number(value.error), where).toBeLessThan(200);
      }
    }
  });

  test('doubles: within 1e-14 of max(1, |log|)', () => {
    for (const { name, x, periods, log } of rows) {
      const value = kernelValue(functions[name].double(periods), x.re, x.im);
      const [re, im] = [Number(log[0]), Number(log[1])];
      const turns = Math.round((value.im - im) / (2 * Math.PI));
      const off = Math.hypot(value.re - re, value.im - im - 2 * Math.PI * turns);
      expect(off / Math.max(1, Math.hypot(re, value.im)), `${name} at ${JSON.stringify(x)}`).toBeLessThan(1e-14);
    }
  });

  test('outside the domain: words in the precise tier, NaN in doubles', () => {
    const x = fixedComplex(0.3, 0.2, 80);
    for (const b of [
      { re: -1, im: 0.5 },
      { re: 0, im: 1 },
    ]) {
      expect(functions.upsilon.precise(x, [parameterOfComplex(b)], 80).kind).toBe('unreachable');
      expect(kernelValue(functions.upsilon.double([b]), 0.3, 0.2).re).toBeNaN();
    }
    const w = [
      { re: 1, im: 0 },
      { re: -1, im: 1 },
      { re: -1, im: -1 },
    ];
    expect(functions.tripleSine.precise(x, w.map(parameterOfComplex), 80).kind).toBe('unreachable');
    expect(kernelValue(functions.tripleSine.double(w), 0.3, 0.2).re).toBeNaN();
  });
});

describe('far from the middle', () => {
  test('complex b: far out, the expansion and the lattice product agree', () => {
    const bits = 80;
    const b = { re: 0.8, im: 0.3125 };
    for (const [re, im] of [
      [40, 3],
      [60, -20],
      [-50, 10],
      [20, 45],
    ] as const) {
      const at = [fixedComplex(re, im, bits), [parameterOfComplex(b)], bits] as const;
      const [one, two] = [functions.upsilon.precise(...at), functions.upsilon.crossCheck?.(...at)?.log];
      if (one.kind !== 'value' || two?.kind !== 'value') throw new Error('no value');
      expect(unitsOff(one, two, bits, true)).toBeLessThanOrEqual(Number(one.error + two.error));
      const double = kernelValue(functions.upsilon.double([b]), re, im);
      expect(Math.abs(double.re / numberFromFixed(one.re, bits) - 1)).toBeLessThan(1e-13);
    }
  });
});
