// Laws of the definition log det = -zeta'(0) (Voros 1987, Commun. Math. Phys. 110, 439); examples are our own.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Ball } from '../../engine/arithmetic/ball';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { formFixed } from '../../engine/arithmetic/form-fixed';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { determinant } from '../../engine/spectrum/regularised';
import type { Prescription } from '../../engine/spectrum/rootless-sum';
import type { Spectrum, WrittenTower } from '../../engine/spectrum/tower';

const n = Form.symbol('n');
const nowhere = { from: 0, to: 0 };
const DIGITS = 25;
const number = (value: number, over = 1) => Form.ratio(value, over);

function tower(
  eigenvalue: readonly Form[],
  degeneracy: Form,
  from = 0,
  exponent = 1,
  to: number | null = null,
): WrittenTower {
  return {
    kind: 'power',
    exponent: Form.number(exponent),
    eigenvalue: eigenvalue.map((form) => ({ form, power: 1 })),
    degeneracy,
    ranges: [{ name: 'n', from: Form.number(from), to: to === null ? null : Form.number(to), span: nowhere }],
    spans: { row: nowhere, eigenvalue: nowhere, degeneracy: nowhere },
    label: '',
  };
}

function value(towers: readonly WrittenTower[], prescription: Prescription = 'factors') {
  const spectrum: Spectrum = { name: 'own', towers, parameters: new Map() };
  const found = determinant(spectrum, prescription, new Map(), DIGITS);
  if (found.kind !== 'value') throw new Error(found.remark.code);
  return found;
}

/** Distance in units of the two stated errors; imaginary parts modulo pi. */
function gap(a: Ball, b: Ball): number {
  const re = numberFromFixed(a.re - b.re, a.bits);
  const turns = numberFromFixed(a.im - b.im, a.bits) / Math.PI;
  return Math.hypot(re, (turns - Math.round(turns)) * Math.PI) / numberFromFixed(a.error + b.error + 2n, a.bits);
}

const shift = fc
  .record({
    num: fc.integer({ min: 1, max: 40 }),
    den: fc.integer({ min: 1, max: 8 }),
    im: fc.integer({ min: -12, max: 12 }),
  })
  .map(({ num, den, im }) => number(num, den).add(Form.i.scale(Rational.of(im, 5))));
const degeneracy = fc
  .array(fc.integer({ min: 1, max: 6 }), { minLength: 1, maxLength: 3 })
  .map((coefficients) => Form.sum(coefficients.map((c, k) => n.pow(k).scale(c))));
const shifts = fc.array(shift, { minLength: 1, maxLength: 3 });
const runs = { numRuns: 15 };
const linear = (list: readonly Form[]) => list.map((a) => n.add(a));
const at = (form: Form, by: number) => form.substitute((name) => (name === 'n' ? n.add(number(by)) : null));

describe.each(['factors', 'operator'] as const)('by %s', (prescription) => {
  test('renaming the index does not change the value', () => {
    fc.assert(
      fc.property(shifts, degeneracy, fc.integer({ min: 1, max: 5 }), (list, d, by) => {
        const direct = value([tower(linear(list), d)], prescription);
        const moved = value(
          [
            tower(
              linear(list).map((f) => at(f, -by)),
              at(d, -by),
              by,
            ),
          ],
          prescription,
        );
        expect(gap(direct.log, moved.log)).toBeLessThan(1);
        expect(direct.exact.zeta0.key).toBe(moved.exact.zeta0.key);
      }),
      runs,
    );
  });

  test('the first modes may be taken out', () => {
    fc.assert(
      fc.property(shifts, degeneracy, fc.integer({ min: 1, max: 4 }), (list, d, count) => {
        const whole = value([tower(linear(list), d)], prescription);
        const parts = value([tower(linear(list), d, 0, 1, count - 1), tower(linear(list), d, count)], prescription);
        expect(gap(whole.log, parts.log)).toBeLessThan(1);
        expect(whole.exact.scale.key).toBe(parts.exact.scale.key);
      }),
      runs,
    );
  });

  test('multiplying every linear factor by c adds scale log c', () => {
    fc.assert(
      fc.property(shifts, degeneracy, fc.integer({ min: 2, max: 9 }), (list, d, c) => {
        const bare = value([tower(linear(list), d)], prescription);
        const scaled = value(
          [
            tower(
              linear(list).map((f) => f.scale(c)),
              d,
            ),
          ],
          prescription,
        );
        const added = formFixed(bare.exact.scale.mul(Form.call('log', number(c))), bare.log.bits);
        if (added === null) throw new Error('no value');
        const { re, im, bits, error } = bare.log;
        expect(gap({ re: re + added.re, im: im + added.im, bits, error }, scaled.log)).toBeLessThan(1);
      }),
      runs,
    );
  });

  test('bosons and fermions with equal towers cancel', () => {
    fc.assert(
      fc.property(shifts, degeneracy, (list, d) => {
        const { log, exact } = value([tower(linear(list), d), tower(linear(list), d, 0, -1)], prescription);
        expect([log.re, log.im]).toEqual([0n, 0n]);
        expect(exact.scale.isZero() && exact.anomaly.isZero()).toBe(true);
      }),
      runs,
    );
  });

  test('the order of towers does not matter', () => {
    fc.assert(
      fc.property(shifts, shifts, degeneracy, (one, other, d) => {
        const towers = [tower(linear(one), d), tower(linear(other), d, 1, -1), tower(linear(one), number(1))];
        const forth = value(towers, prescription);
        const back = value([...towers].reverse(), prescription);
        expect(gap(forth.log, back.log)).toBeLessThan(1);
        expect(forth.exact.anomaly.key).toBe(back.exact.anomaly.key);
      }),
      runs,
    );
  });

  test('an independent way agrees to all digits', () => {
    fc.assert(
      fc.property(shifts, degeneracy, (list, d) => {
        expect(value([tower(linear(list), d)], prescription).crossCheck?.agreedDigits).toBe(DIGITS);
      }),
      runs,
    );
  });
});

test('by factors, odd and even levels are towers of their own', () => {
  // sum over n of (n + a)^-s is the sum over n = 2m and n = 2m + 1; the degeneracy moves along.
  const a = number(3, 7).add(Form.i.scale(Rational.of(2, 5)));
  const d = n.pow(2).add(number(1));
  const put = (form: Form, add: number) =>
    form.substitute((name) => (name === 'n' ? n.scale(2).add(number(add)) : null));
  const whole = value([tower([n.add(a)], d)]);
  const halves = value([0, 1].map((k) => tower([put(n.add(a), k)], put(d, k))));
  expect(gap(whole.log, halves.log)).toBeLessThan(1);
  expect(whole.exact.zeta0.key).toBe(halves.exact.zeta0.key);
});

test('two towers in two indices that differ by a period leave towers in one index', () => {
  // Barnes 1904: Gamma_2(x) = Gamma_1(x) Gamma_2(x + w).
  const m = Form.symbol('m');
  const w = Form.call('sqrt', number(2));
  const two = (x: Form, exponent: number): WrittenTower => ({
    ...tower([m.add(n.mul(w)).add(x)], Form.one, 0, exponent),
    ranges: ['m', 'n'].map((name) => ({ name, from: Form.zero, to: null, span: nowhere })),
  });
  const x = number(4, 5);
  const { log, exact } = value([two(x, 1), two(x.add(Form.one), -1)]);
  const single = value([tower([n.mul(w).add(x)], Form.one)]);
  expect(gap(log, single.log)).toBeLessThan(1);
  expect(exact.scale.key).toBe(single.exact.scale.key);
});

test('higher precision confirms the stated errors', () => {
  const a = number(1, 3).add(Form.i.scale(7));
  const spectrum: Spectrum = {
    name: 'own',
    towers: [tower([n.pow(2).add(number(50)), n.add(a)], n.pow(3))],
    parameters: new Map(),
  };
  const [low, high] = [20, 60].map((digits) => determinant(spectrum, 'operator', new Map(), digits));
  if (low?.kind !== 'value' || high?.kind !== 'value') throw new Error('refused');
  const drop = BigInt(high.log.bits - low.log.bits);
  const finer = { re: high.log.re >> drop, im: high.log.im >> drop, bits: low.log.bits, error: 1n };
  expect(gap(low.log, finer)).toBeLessThan(1);
});

describe('hard cases', () => {
  const spectrumOf = (towers: readonly WrittenTower[]): Spectrum => ({ name: 'own', towers, parameters: new Map() });

  test.each([10n ** 10n, 10n ** 20n, 10n ** 40n])('roots within 1/%s of each other', (distance) => {
    // Equal to the double root up to terms of second order in the distance: Taylor expansion of log det.
    const square = number(1, 4).sub(Form.number(Rational.of(2n, distance)));
    const close = determinant(
      spectrumOf([tower([n.pow(2).add(n).add(square)], n.add(Form.one))]),
      'operator',
      new Map(),
      50,
    );
    const double = value([tower([n.add(number(1, 2)), n.add(number(1, 2))], n.add(Form.one))], 'operator');
    if (close.kind !== 'value') throw new Error(close.remark.code);
    expect(close.crossCheck?.agreedDigits).toBe(50);
    const gapInDoubles =
      numberFromFixed(close.log.re, close.log.bits) - numberFromFixed(double.log.re, double.log.bits);
    // -d/d(square) log det is a sum of order 10.
    expect(Math.abs(gapInDoubles)).toBeLessThan(40 / Number(distance) + 1e-15);
  });

  test('heavy masses, whose terms cancel over many digits', () => {
    const heavy = tower(
      [n.pow(2).add(n.scale(3)).add(Form.number(10_000))],
      n
        .add(number(1))
        .mul(n.add(number(2)))
        .mul(n.scale(2).add(number(3))),
    );
    const found = determinant(spectrumOf([heavy]), 'operator', new Map(), 40);
    expect(found.kind === 'value' && [found.crossCheck?.route, found.crossCheck?.agreedDigits]).toEqual([
      'rootless',
      40,
    ]);
  });

  test('500 digits', () => {
    const found = determinant(spectrumOf([tower([n.add(number(1, 3))], n.add(Form.one))]), 'factors', new Map(), 500);
    expect(found.kind === 'value' && found.crossCheck?.agreedDigits).toBe(500);
  });
});
