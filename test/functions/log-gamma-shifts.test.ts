import fc from 'fast-check';
import { expect, test } from 'vitest';
import { absoluteComplex, subtractComplex } from '../../engine/arithmetic/fixed-complex';
import { logGammaByShifts } from '../../engine/functions/log-gamma-precise';
import { logGammaBySpouge } from '../../engine/functions/log-gamma-spouge';
import { RisingProduct } from '../../engine/functions/rising-product';
import { stirlingReach, stirlingSeries } from '../../engine/functions/stirling-series';
import { arbitraryFixed } from './arbitrary-fixed';

/** Twice the bits and the same point: the difference is what the coarser one errs by. */
const FINER = 2;

test('log Gamma by shifts errs by no more than stated, poles at a distance of 2^-40 included', () => {
  fc.assert(
    fc.property(arbitraryFixed(-30, 60), arbitraryFixed(-40, 40), fc.integer({ min: 60, max: 260 }), (x, y, bits) => {
      const z = { re: x(bits), im: y(bits) };
      if (z.re <= 0n && z.im === 0n && BigInt.asUintN(bits, z.re) === 0n) return;
      const up = BigInt((FINER - 1) * bits);
      const coarse = logGammaByShifts(z, bits);
      const fine = logGammaByShifts({ re: z.re << up, im: z.im << up }, FINER * bits);
      const gap = absoluteComplex(
        subtractComplex({ re: coarse.value.re << up, im: coarse.value.im << up }, fine.value),
      );
      expect(gap).toBeLessThanOrEqual((coarse.error << up) + fine.error);
    }),
  );
});

test('z (z + 1) ... (z + n - 1): logarithm and turns as of single factors', () => {
  fc.assert(
    fc.property(arbitraryFixed(-20, 30), arbitraryFixed(-20, 20), fc.integer({ min: 0, max: 40 }), (x, y, n) => {
      const bits = 120;
      const z = { re: x(bits), im: y(bits) };
      const factors = Array.from({ length: n }, (_, k) => ({ re: z.re + (BigInt(k) << BigInt(bits)), im: z.im }));
      if (factors.some(({ re, im }) => re === 0n && im === 0n)) return;
      const together = new RisingProduct(bits);
      together.multiplyRising(z, n);
      const single = new RisingProduct(bits);
      for (const factor of factors) single.multiplyAny(factor);
      const [one, two] = [together.logarithm(), single.logarithm()];
      expect(absoluteComplex(subtractComplex(one.value, two.value))).toBeLessThanOrEqual(one.error + two.error);
    }),
  );
});

test("Stirling's series errs by no more than stated from its least distance on", () => {
  fc.assert(
    fc.property(
      fc.double({ min: 0, max: 1.57, noNaN: true }),
      fc.double({ min: 1.0001, max: 30, noNaN: true }),
      fc.integer({ min: 60, max: 400 }),
      (angle, stretch, bits) => {
        const size = (stretch * stirlingReach(bits + 80)) / Math.cos(angle / 2);
        const part = (value: number): bigint => BigInt(Math.round(value * 2 ** 40)) << BigInt(bits - 40);
        const z = { re: part(size * Math.cos(angle)), im: part(size * Math.sin(angle)) };
        const coarse = stirlingSeries(z, bits);
        const fine = stirlingSeries({ re: z.re << 80n, im: z.im << 80n }, bits + 80);
        const gap = absoluteComplex(
          subtractComplex({ re: coarse.value.re << 80n, im: coarse.value.im << 80n }, fine.value),
        );
        expect(gap).toBeLessThanOrEqual((coarse.error << 80n) + fine.error);
      },
    ),
  );
});

test.each([1000, 1300, 3400])('log Gamma by shifts with %s bits, where doubles underflow', (bits) => {
  for (const [re, im] of [
    [7n, 0n],
    [4n, 6n],
    [-5n, 1n],
    [900n, 0n],
  ] as const) {
    const at = (wanted: number) => ({ re: (re << BigInt(wanted)) / 3n, im: (im << BigInt(wanted)) / 3n });
    const z = at(bits);
    const coarse = logGammaByShifts(z, bits);
    const fine = logGammaByShifts({ re: z.re << 100n, im: z.im << 100n }, bits + 100);
    const gap = absoluteComplex(
      subtractComplex({ re: coarse.value.re << 100n, im: coarse.value.im << 100n }, fine.value),
    );
    expect(gap).toBeLessThanOrEqual((coarse.error << 100n) + fine.error);
    if (bits > 2000) continue;
    const spouge = logGammaBySpouge(z, bits);
    if (re < 0n || spouge.kind !== 'value') continue;
    const off = coarse.value.re - spouge.re;
    expect(off < 0n ? -off : off).toBeLessThanOrEqual(coarse.error + spouge.error);
  }
});
