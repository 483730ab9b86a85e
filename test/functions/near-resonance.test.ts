import { describe, expect, test } from 'vitest';
import { fixedFromRatio, numberFromFixed, sqrtFixed } from '../../engine/arithmetic/fixed';
import { Rational } from '../../engine/exact/rational';
import { doubleSine } from '../../engine/functions/double-sine';
import { logDoubleSineClosed } from '../../engine/functions/double-sine-closed';
import { periodOfSquare } from '../../engine/functions/double-sine-period';
import type { ExactParameter } from '../../engine/functions/special-function';
import { fixedComplex, unitsOff } from './fixed-text';

function root(square: Rational): ExactParameter {
  return {
    square,
    value: (bits) => ({ re: sqrtFixed(fixedFromRatio(square.numerator, square.denominator, 2 * bits), 0), im: 0n }),
    approx: { re: Math.sqrt(square.toNumber()), im: 0 },
  };
}

/**
 * b^2 within 10^-k of p/q, where two poles of the integrand nearly meet and their residues are large and opposite. Against
 * the closed form in dilogarithms at p/q, from which the value differs by about 10^-k, and the midpoint rule without residues.
 */
describe('double sine at b^2 next to a rational number', () => {
  const bits = 190;
  const points = [fixedComplex(0.3125, 0.1875, bits), fixedComplex(2.5, -0.375, bits)];
  test.each([
    [1n, 1n],
    [2n, 3n],
    [5n, 7n],
  ])('%i/%i', (p, q) => {
    const base = Rational.of(p, q);
    for (const k of [10, 20, 30, 40, 50]) {
      const off = Rational.parse(`1/1${'0'.repeat(k)}`) as Rational;
      for (const b of [root(base.add(off)), root(base.sub(off))]) {
        for (const x of points) {
          const value = doubleSine.precise(x, [b], bits);
          const closed = logDoubleSineClosed(x, periodOfSquare(p, q), bits);
          if (value.kind !== 'value' || closed?.kind !== 'value') throw new Error('no value');
          const distance = unitsOff(value, closed, bits);
          const allowed = Number(value.error + closed.error);
          expect(distance).toBeLessThanOrEqual(allowed + 30 * 10 ** -k * 2 ** bits);
          // It is not the value at p/q either; at b = 1 the first order vanishes by s_b = s_{1/b}.
          if (k < 40 && p !== q) expect(distance).toBeGreaterThan(1e-3 * 10 ** -k * 2 ** bits);
          const second = doubleSine.crossCheck?.(x, [b], bits);
          expect(second?.route).toBe('midpoint rule without residues');
          if (second?.log.kind !== 'value') throw new Error('no second value');
          expect(unitsOff(value, second.log, bits)).toBeLessThanOrEqual(Number(value.error + second.log.error));
          expect(numberFromFixed(value.error, 0)).toBeLessThan(100);
        }
      }
    }
  });
});
