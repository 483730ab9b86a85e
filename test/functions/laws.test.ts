import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { formFixed } from '../../engine/arithmetic/form-fixed';
import { Form } from '../../engine/exact/form';
import type { FunctionName, SpecialFunction } from '../../engine/functions/special-function';
import { functions } from '../../engine/functions/table';
import { exactParameter } from './fixed-text';
import {
  complexForm,
  growthMismatch,
  latticePoints,
  logOf,
  mismatch,
  reflectionMismatch,
  shiftMismatch,
} from './law-checks';

const root = (n: number): Form => Form.call('sqrt', Form.number(n));

/** Parameters to try each function at: round, rational, irrational. */
const PARAMETERS: Record<FunctionName, readonly (readonly Form[])[]> = {
  hyperbolicSine: [[]],
  hyperbolicCosine: [[]],
  linear: [[]],
  exponential: [[]],
  gamma: [[]],
  doubleSine: [[Form.one], [Form.ratio(5, 4)], [root(2)], [Form.ratio(3, 10)]],
  upsilon: [[Form.one], [Form.ratio(4, 5)], [root(2)]],
  fluxGamma: [[Form.zero], [Form.number(3)], [Form.number(-2)]],
  // Of integers only: test/functions/sign.test.ts.
  sign: [],
  tripleSine: [
    [Form.one, Form.one, Form.one],
    [Form.one, root(2), root(3)],
    [Form.ratio(9, 10), Form.one, Form.ratio(5, 4)],
  ],
};

const cases = Object.values(functions).flatMap((declared) =>
  PARAMETERS[declared.name].map(
    (parameters) => [declared.name, parameters.map((p) => p.key).join(', '), declared, parameters] as const,
  ),
);

const coordinate = fc.double({ min: -2.5, max: 2.5, noNaN: true });
/** Imaginary parts stay off the axis by 0.1, real parts by 0.05: zeros and poles lie on the axes. */
const offAxis = (value: number, gap: number): number => value + Math.sign(value || 1) * gap;

function property(runs: number, check: (x: Form) => void): void {
  fc.assert(
    fc.property(coordinate, coordinate, (re, im) => {
      check(complexForm(offAxis(re, 0.05), offAxis(im, 0.1)));
    }),
    { numRuns: runs },
  );
}

/** Errors of some 1e-15 times the logarithms (below 100 here) and their derivatives (below 100). */
const CLOSE = 3e-12;

describe.each(cases)('%s(%s)', (_name, _text, declared: SpecialFunction, parameters) => {
  test('reflections', () => {
    property(60, (x) => expect(reflectionMismatch(declared, x, parameters)).toBeLessThan(CLOSE));
  });

  test('shifts', () => {
    property(60, (x) => expect(shiftMismatch(declared, x, parameters)).toBeLessThan(CLOSE));
  });

  test('growth', () => {
    for (const far of [30, 50]) {
      const mismatched = growthMismatch(declared, complexForm(0.3, 0.2), far, parameters);
      expect(mismatched).toBeLessThan(3e-10);
    }
  });

  test('zeros and poles where they are declared', () => {
    for (const { kind, at } of latticePoints(declared, parameters, 2)) {
      const wanted = kind === 'zero' ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY;
      expect(logOf(declared, at, parameters).re, at.key).toBe(wanted);
      const diagonal = Form.one.add(Form.i);
      const near = logOf(declared, at.add(diagonal.mul(Form.ratio(1, 100_000))), parameters);
      expect(Number.isFinite(near.re), at.key).toBe(true);
      // The order is positive: ten times nearer the logarithm changes by log 10 at least, up to O(1e-4).
      const nearer = logOf(declared, at.add(diagonal.mul(Form.ratio(1, 1_000_000))), parameters);
      expect(kind === 'zero' ? nearer.re < near.re - 2 : nearer.re > near.re + 2, at.key).toBe(true);
    }
  });

  test('both tiers agree within the printed error', () => {
    const bits = 80;
    property(12, (x) => {
      const argument = formFixed(x, bits);
      if (argument === null) throw new Error('no argument');
      const log = declared.precise(argument, parameters.map(exactParameter), bits);
      if (log.kind !== 'value') throw new Error(log.kind);
      const value = { re: numberFromFixed(log.re, bits), im: numberFromFixed(log.im, bits) };
      const bound = numberFromFixed(log.error, bits) + CLOSE;
      expect(mismatch(value, logOf(declared, x, parameters))).toBeLessThan(bound);
    });
  });

  test('the second route agrees with the first', () => {
    const bits = 80;
    const x = complexForm(0.4, 0.3);
    const argument = formFixed(x, bits);
    if (argument === null) throw new Error('no argument');
    const exact = parameters.map(exactParameter);
    const one = declared.precise(argument, exact, bits);
    const two = declared.crossCheck?.(argument, exact, bits) ?? null;
    expect(two === null).toBe(declared.elementary);
    if (two === null) return;
    if (one.kind !== 'value' || two.log.kind !== 'value') throw new Error('no value');
    const a = { re: numberFromFixed(one.re, bits), im: numberFromFixed(one.im, bits) };
    const b = { re: numberFromFixed(two.log.re, bits), im: numberFromFixed(two.log.im, bits) };
    expect(mismatch(a, b)).toBeLessThan(numberFromFixed(one.error + two.log.error, bits) + 1e-15);
  });

  test('every notation prints, and says what it means', () => {
    const print = { form: (form: Form) => form.key };
    for (const notation of declared.notations) {
      expect(notation.latex(Form.symbol('x'), parameters, print)).toContain('x');
      expect(notation.definition(parameters, print).length).toBeGreaterThan(0);
    }
  });
});

describe('a broken law is noticed', () => {
  const x = complexForm(0.4, 0.3);
  const b = [root(2)];
  const { doubleSine } = functions;

  test('reflection with the wrong sign', () => {
    const broken: SpecialFunction = {
      ...doubleSine,
      reflections: doubleSine.reflections.map((law) => ({ ...law, sign: -1 as const })),
    };
    expect(reflectionMismatch(doubleSine, x, b)).toBeLessThan(CLOSE);
    expect(reflectionMismatch(broken, x, b)).toBeGreaterThan(1);
  });

  test('shift by the wrong period', () => {
    const broken: SpecialFunction = {
      ...doubleSine,
      shifts: doubleSine.shifts.map((law) => ({ ...law, step: () => Form.i })),
    };
    expect(shiftMismatch(broken, x, b)).toBeGreaterThan(0.1);
  });

  test('growth with another constant', () => {
    const broken: SpecialFunction = {
      ...doubleSine,
      growth: doubleSine.growth.map((law) => ({
        ...law,
        logarithm: (y: Form, parameters: readonly Form[]) => law.logarithm(y, parameters).add(Form.ratio(1, 1000)),
      })),
    };
    expect(growthMismatch(broken, x, 30, b)).toBeGreaterThan(9e-4);
  });
});
