import fc from 'fast-check';
import { expect, test } from 'vitest';
import { piFixed } from '../../engine/arithmetic/fixed-constants';
import { dilogarithmFixed } from '../../engine/functions/dilogarithm-precise';
import fixture from '../fixtures/functions/double-sine-complex.json' with { type: 'json' };
import { arbitraryFixed } from './arbitrary-fixed';

function integer(text: string | undefined): bigint {
  if (text === undefined) throw new Error('missing number');
  return text.startsWith('-') ? -BigInt(`0x${text.slice(1)}`) : BigInt(`0x${text}`);
}

test('Li2 is within two ulps of mpmath', () => {
  const extra = BigInt(fixture.extra);
  for (const row of fixture.dilogarithm) {
    const value = dilogarithmFixed({ re: integer(row.z[0]), im: integer(row.z[1]) }, row.bits);
    const re = Number((value.re << extra) - integer(row.value[0])) * 2 ** -fixture.extra;
    const im = Number((value.im << extra) - integer(row.value[1])) * 2 ** -fixture.extra;
    expect(Math.hypot(re, im), `bits ${row.bits} z ${row.z}`).toBeLessThanOrEqual(2);
  }
  expect(fixture.dilogarithm.length).toBe(56);
});

test('Li2(1) = pi^2/6 (DLMF 25.12.2), Li2(2) from below the cut has imaginary part -pi log 2 (DLMF 25.12.4)', () => {
  const bits = 150;
  const one = 1n << 150n;
  const pi = piFixed(bits);
  const sixth = (pi * pi) / (6n * one);
  expect(Number(dilogarithmFixed({ re: one, im: 0n }, bits).re - sixth)).toBeCloseTo(0, -1);
  const two = dilogarithmFixed({ re: 2n * one, im: 0n }, bits);
  // Re Li2(2) = pi^2/4.
  expect(Number(two.re - (3n * sixth) / 2n)).toBeCloseTo(0, -1);
  expect(Number(two.im) / Number(one)).toBeCloseTo(-Math.PI * Math.LN2, 14);
});

test('errs by at most 2 ulps: the same point with more bits', () => {
  fc.assert(
    fc.property(
      arbitraryFixed(-4, 4),
      arbitraryFixed(-4, 4),
      fc.oneof(fc.integer({ min: 60, max: 300 }), fc.constantFrom(700, 1000)),
      (re, im, bits) => {
        const z = { re: re(bits), im: im(bits) };
        const coarse = dilogarithmFixed(z, bits);
        const fine = dilogarithmFixed({ re: z.re << 80n, im: z.im << 80n }, bits + 80);
        for (const part of ['re', 'im'] as const) {
          const gap = (coarse[part] << 80n) - fine[part];
          expect(gap < 0n ? -gap : gap).toBeLessThanOrEqual(2n << 80n);
        }
      },
    ),
  );
});
