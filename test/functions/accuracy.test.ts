import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import type { FunctionName } from '../../engine/functions/special-function';
import { functions } from '../../engine/functions/table';
import { fixedComplex, parameterOfDouble } from './fixed-text';
import { kernelValue } from './kernel-value';
import { mismatch } from './law-checks';

/**
 * Random arguments and parameters: doubles against 90 bits, whose values are held against mpmath elsewhere. The error is
 * measured in units of max(1, |log f|, |x d log f/dx|), the last by a difference quotient.
 */
function worstError(name: FunctionName, parameters: readonly number[], re: number, im: number): number {
  const bits = 90;
  const declared = functions[name];
  const kernel = declared.double(parameters.map((value) => ({ re: value, im: 0 })));
  const value = kernelValue(kernel, re, im);
  const exact = declared.precise(fixedComplex(re, im, bits), parameters.map(parameterOfDouble), bits);
  if (exact.kind !== 'value') throw new Error(`${name} ${parameters}: ${exact.kind} at ${re} + ${im} i`);
  const wanted = { re: numberFromFixed(exact.re, bits), im: numberFromFixed(exact.im, bits) };
  const step = 1e-6 * Math.hypot(re, im);
  const slope = mismatch(kernelValue(kernel, re + step, im), kernelValue(kernel, re - step, im)) / (2 * step);
  const scale = Math.max(
    1,
    Math.hypot(wanted.re, wanted.im),
    Math.hypot(value.re, value.im),
    Math.hypot(re, im) * slope,
  );
  return mismatch(value, wanted) / scale;
}

const period = fc.double({ min: Math.log(0.05), max: Math.log(20), noNaN: true }).map(Math.exp);
const near = fc.double({ min: -2, max: 2, noNaN: true });
/** Off the axes, where the zeros and poles are. */
const off = (value: number): number => value + Math.sign(value || 1) * 0.01;

describe('claimed errors of the kernels in doubles', () => {
  test('double sine: 2e-15', () => {
    fc.assert(
      fc.property(period, near, near, (b, u, v) => {
        const q = b + 1 / b;
        expect(worstError('doubleSine', [b], off(u) * q, off(v) * q)).toBeLessThan(2e-15);
      }),
      { numRuns: 150 },
    );
  });

  test('Gamma: 3e-15', () => {
    fc.assert(
      fc.property(near, near, fc.constantFrom(1, 5, 30), (u, v, size) => {
        expect(worstError('gamma', [], off(u) * size, off(v) * size)).toBeLessThan(3e-15);
      }),
      { numRuns: 200 },
    );
  });

  test('Upsilon: 5e-15', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.2, max: 4, noNaN: true }), near, near, (b, u, v) => {
        expect(worstError('upsilon', [b], off(u) * 3, off(v) * 3)).toBeLessThan(5e-15);
      }),
      { numRuns: 100 },
    );
  });

  test('triple sine: 2e-15', () => {
    const w = fc.double({ min: 0.4, max: 2.5, noNaN: true });
    fc.assert(
      fc.property(w, w, w, near, near, (w1, w2, w3, u, v) => {
        expect(worstError('tripleSine', [w1, w2, w3], off(u) * 3, off(v) * 3)).toBeLessThan(2e-15);
      }),
      { numRuns: 60 },
    );
  });

  test('hyperbolic functions: 1e-15', () => {
    fc.assert(
      fc.property(near, near, fc.constantFrom('hyperbolicSine' as const, 'hyperbolicCosine' as const), (u, v, name) => {
        expect(worstError(name, [], off(u), off(v))).toBeLessThan(1e-15);
      }),
      { numRuns: 200 },
    );
  });
});
