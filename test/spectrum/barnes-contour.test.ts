import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { formFixed } from '../../engine/arithmetic/form-fixed';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { logBarnesGamma } from '../../engine/functions/barnes-gamma';
import { logBarnesByContour } from '../../engine/spectrum/barnes-contour';
import { determinant } from '../../engine/spectrum/regularised';
import type { WrittenTower } from '../../engine/spectrum/tower';

const BITS = 120;

describe('the contour integral of log Gamma_N', () => {
  test("log Gamma_2(13/10|1, 1) by mpmath 1.2.1: zeta'(-1) + 3/20 log 2 pi - log G(13/10)", () => {
    // DLMF 5.17 for G; the relation of G and Gamma_2 in Adamchik 2003, math/0308086.
    const expected = Rational.parse('0.04275805176608521442666464815187386') as Rational;
    const value = logBarnesByContour(Form.ratio(13, 10), [Form.one, Form.one], BITS);
    const exact = (expected.numerator << BigInt(BITS)) / expected.denominator;
    expect(Math.abs(numberFromFixed((value?.re ?? 0n) - exact, BITS))).toBeLessThan(1e-33);
  });

  test('agrees with steps and the expansion at infinity', () => {
    const part = fc.integer({ min: 1, max: 40 });
    fc.assert(
      fc.property(
        part,
        fc.integer({ min: -20, max: 20 }),
        fc.array(part, { minLength: 1, maxLength: 3 }),
        (re, im, w) => {
          const x = Form.ratio(re, 10).add(Form.i.scale(Rational.of(im, 10)));
          const periods = w.map((p, k) => Form.ratio(p + 10, 20).add(Form.i.scale(Rational.of(k, 20))));
          const contour = logBarnesByContour(x, periods, BITS);
          const [at, ...fixed] = [x, ...periods].map((form) => formFixed(form, BITS));
          const steps =
            at &&
            logBarnesGamma(
              at,
              fixed.flatMap((p) => p ?? []),
              BITS,
            );
          if (!contour || !steps) throw new Error('no value');
          const gap = Math.hypot(Number(contour.re - steps.value.re), Number(contour.im - steps.value.im));
          expect(gap).toBeLessThan(Number(steps.error) + 2 ** 12);
        },
      ),
      { numRuns: 25 },
    );
  });

  test.each([
    ['one upwards', [Form.one, Form.i]],
    ['both upwards', [Form.i.scale(2), Form.i.add(Form.ratio(-1, 3))]],
    ['downwards', [Form.one.sub(Form.i.scale(5)), Form.ratio(1, 2).sub(Form.i)]],
  ])('turns periods that lie askew: %s', (_, periods) => {
    const x = Form.ratio(7, 10).add(Form.i.scale(Rational.of(1, 5)));
    const contour = logBarnesByContour(x, periods, BITS);
    const [at, ...fixed] = [x, ...periods].map((form) => formFixed(form, BITS));
    const steps =
      at &&
      logBarnesGamma(
        at,
        fixed.flatMap((p) => p ?? []),
        BITS,
      );
    if (!contour || !steps) throw new Error('no value');
    const turns = numberFromFixed(contour.im - steps.value.im, BITS) / (2 * Math.PI);
    expect(Math.abs(Number(contour.re - steps.value.re))).toBeLessThan(Number(steps.error) + 2 ** 12);
    expect(Math.abs(turns - Math.round(turns))).toBeLessThan(1e-15);
  });

  test('is refused where the periods span nearly a half plane', () => {
    const far = Form.number(-20).add(Form.i);
    expect(logBarnesByContour(Form.one, [Form.one, far], BITS)).toBeNull();
  });
});

test('a determinant in two indices is confirmed by the integral', () => {
  const n = Form.symbol('n');
  const k = Form.symbol('k');
  const nowhere = { from: 0, to: 0 };
  const tower: WrittenTower = {
    kind: 'power',
    exponent: Form.one,
    eigenvalue: [{ form: n.add(k.scale(Rational.of(5, 4))).add(Form.ratio(1, 3)), power: 1 }],
    degeneracy: n.add(Form.one),
    ranges: ['n', 'k'].map((name) => ({ name, from: Form.zero, to: null, span: nowhere })),
    spans: { row: nowhere, eigenvalue: nowhere, degeneracy: nowhere },
    label: '',
  };
  const found = determinant({ name: 'own', towers: [tower], parameters: new Map() }, 'factors', new Map(), 30);
  expect(found.kind === 'value' && [found.crossCheck?.route, found.crossCheck?.agreedDigits]).toEqual(['contour', 30]);
});
