import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { subtractBalls } from '../../engine/arithmetic/ball';
import { formDouble } from '../../engine/arithmetic/form-double';
import { formFixed } from '../../engine/arithmetic/form-fixed';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import type { SpecialFunction } from '../../engine/functions/special-function';
import { functions } from '../../engine/functions/table';
import { exactParameter } from '../../engine/numeric/precise';
import { exactOrder } from '../../engine/product/divisor';
import {
  BITS,
  ballOf,
  beyondGrowth,
  checkAdditive,
  checkExactValue,
  checkMirror,
  checkOrder,
  checkPowers,
  checkReflections,
  checkShifts,
  doubleOf,
  IRRATIONAL_PERIODS,
  isDiscrete,
  latticePoint,
  logDistance,
  logInDoubles,
  logOf,
  PERIODS,
  parametersOf,
  pointOf,
  stiffness,
  vanishes,
} from './laws';

/*
 * The laws that a function declares are those of the handbooks named in its file; here they are compared with its
 * values, which other tests compare with references made outside the project.
 */
const all = Object.values(functions);
const allPeriods = [...PERIODS, ...IRRATIONAL_PERIODS];

describe.each(all.map((declared) => [declared.name, declared] as const))('%s', (_name, declared) => {
  const parameters = parametersOf(declared, allPeriods);
  const anyPoint = pointOf(declared);
  const doubles = parametersOf(declared, PERIODS);

  test('reflections and shifts', () => {
    fc.assert(
      fc.property(anyPoint, parameters, (x, periods) => {
        expect(() => checkReflections(declared, x, periods)).not.toThrow();
        expect(() => checkShifts(declared, x, periods)).not.toThrow();
      }),
      { numRuns: 25 },
    );
  });

  if (declared.mirror) {
    test('complex conjugation', () => {
      fc.assert(
        fc.property(anyPoint, parameters, (x, periods) => {
          expect(checkMirror(declared, x, periods)).toBe(true);
        }),
        { numRuns: 25 },
      );
    });
  }

  if (!isDiscrete(declared)) {
    test('zeros and poles, with their orders', () => {
      const counts = fc.array(fc.integer({ min: 0, max: 2 }), { minLength: 3, maxLength: 3 });
      const lattice = fc.nat().map((k) => declared.zeros[k % Math.max(1, declared.zeros.length)]);
      fc.assert(
        fc.property(lattice, counts, parameters, (one, at, periods) => {
          const point = one ? latticePoint(one, periods, at) : Form.zero;
          const order = exactOrder(declared.name, point, periods);
          if (one) expect(Math.sign(order)).toBe(one.kind === 'zero' ? 1 : -1);
          checkOrder(declared, point, periods, order);
        }),
        { numRuns: 12 },
      );
    });

    test('no zeros or poles besides the declared ones', () => {
      // Halves of the steps: the points beside which a zero would be forgotten first.
      const halves = fc.tuple(fc.integer({ min: -8, max: 8 }), fc.integer({ min: -8, max: 8 }));
      fc.assert(
        fc.property(halves, parameters, ([re, im], periods) => {
          const point = Form.ratio(re, 4).add(Form.i.mul(Form.ratio(im, 4)));
          checkOrder(declared, point, periods, exactOrder(declared.name, point, periods));
        }),
        { numRuns: 12 },
      );
    });
  }

  test('a logarithm of twice the digits lies within the error', () => {
    fc.assert(
      fc.property(anyPoint, parameters, (x, periods) => {
        const short = ballOf(declared, x, periods);
        const long = ballOf(declared, x, periods, 2 * BITS);
        fc.pre(short !== null && long !== null);
        if (!short || !long) return;
        const { re, im, error } = subtractBalls(short, long, 4 * BITS);
        expect(re * re + im * im <= error * error, `${x}`).toBe(true);
        // What is claimed is worth claiming: at least two thirds of the bits.
        expect(short.error < 1n << BigInt(BITS / 3)).toBe(true);
      }),
      { numRuns: 20 },
    );
  });

  test('a second algorithm, where there is one, agrees within both errors', () => {
    let compared = 0;
    fc.assert(
      fc.property(anyPoint, parameters, (x, periods) => {
        const at = formFixed(x, BITS);
        const first = logOf(declared, x, periods);
        const second = at && declared.crossCheck?.(at, periods.map(exactParameter), BITS)?.log;
        if (first.kind !== 'value' || second?.kind !== 'value') return;
        compared++;
        // A second route may be right up to whole turns only.
        const difference = { re: first.re - second.re, im: first.im - second.im, bits: BITS };
        expect(vanishes({ ...difference, error: first.error + second.error }), `${x}`).toBe(true);
      }),
      { numRuns: 6 },
    );
    expect(compared > 0).toBe(declared.crossCheck !== null);
  });

  test('both tiers agree', () => {
    fc.assert(
      fc.property(anyPoint, doubles, (x, periods) => {
        const ball = ballOf(declared, x, periods);
        const at = formDouble(x, () => null);
        fc.pre(ball !== null && at !== null && exactOrder(declared.name, x, periods) === 0);
        if (!ball || !at) return;
        const precise = doubleOf(ball);
        const double = logInDoubles(declared, at, periods);
        // What every kernel states: five units of 1e-15 of the logarithm, or of what one rounding of x does to it.
        const size = Math.max(1, Math.hypot(precise.re, precise.im), stiffness(declared, x, periods));
        expect(logDistance(double, precise), `${x} at ${periods}`).toBeLessThanOrEqual(5e-15 * size);
      }),
      { numRuns: 40 },
    );
  });

  test('in doubles a zero is -Infinity, a pole +Infinity, and nothing is not a number', () => {
    const counts = fc.array(fc.integer({ min: 0, max: 2 }), { minLength: 3, maxLength: 3 });
    fc.assert(
      fc.property(fc.nat(), counts, doubles, anyPoint, (k, at, periods, other) => {
        const one = declared.zeros[k % Math.max(1, declared.zeros.length)];
        if (one) {
          const point = formDouble(latticePoint(one, periods, at), () => null);
          const { re, im } = logInDoubles(declared, point ?? { re: Number.NaN, im: 0 }, periods);
          expect(re).toBe(one.kind === 'zero' ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY);
          expect(im).not.toBeNaN();
        }
        const somewhere = logInDoubles(declared, formDouble(other, () => null) ?? { re: 0, im: 0 }, periods);
        expect([somewhere.re, somewhere.im]).not.toContain(Number.NaN);
      }),
      { numRuns: 40 },
    );
  });

  test('arrays: powers multiply, sums add up, real arguments need no imaginary parts', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -3, max: 3, noNaN: true }), { maxLength: 9 }), doubles, (xs, periods) => {
        const kernel = declared.double(periods.map((form) => formDouble(form, () => null) ?? { re: 1, im: 0 }));
        const x = Float64Array.from(xs);
        const zeros = new Float64Array(x.length);
        const [re, im] = [new Float64Array(x.length), new Float64Array(x.length)];
        const [once, onceIm] = [new Float64Array(x.length), new Float64Array(x.length)];
        kernel.addLog(x, null, 1, once, onceIm);
        kernel.addLog(x, zeros, 2, re, im);
        kernel.addLog(x, null, -1, re, im);
        for (let k = 0; k < x.length; k++) {
          const regular = Number.isFinite(once[k] as number);
          if (!regular) continue;
          const scale = 1e-13 * (1 + Math.abs(once[k] as number) + Math.abs(onceIm[k] as number));
          expect(Math.abs((re[k] as number) - (once[k] as number))).toBeLessThanOrEqual(scale);
          expect(Math.abs(Math.sin(((im[k] as number) - (onceIm[k] as number)) / 2))).toBeLessThanOrEqual(scale);
        }
      }),
      { numRuns: 20 },
    );
  });

  test('growth is reached, and ever better', () => {
    fc.assert(
      fc.property(anyPoint, parameters, (offset, periods) => {
        for (const growth of declared.growth) {
          const outward = growth.direction.inverse();
          const near = beyondGrowth(declared, growth, offset.add(outward.scale(8)), periods);
          const far = beyondGrowth(declared, growth, offset.add(outward.scale(16)), periods);
          expect(far).toBeLessThan(1e-5);
          expect(far).toBeLessThanOrEqual(Math.max(near, 1e-11));
        }
      }),
      { numRuns: 20 },
    );
    expect(declared.growth.every(({ direction }) => !direction.isZero())).toBe(true);
  });

  test('sums of arguments, and powers of numbers among them', () => {
    const logarithms = [2, 3, 5].map((n) => Form.call('log', Form.number(n)));
    let taken = 0;
    fc.assert(
      fc.property(anyPoint, anyPoint, fc.array(fc.integer({ min: -3, max: 3 }), { maxLength: 3 }), (x, y, powers) => {
        expect(() => checkAdditive(declared, x, y)).not.toThrow();
        const sum = Form.sum([x, ...powers.map((n, k) => (logarithms[k] as Form).scale(n))]);
        if (!isDiscrete(declared)) taken += checkPowers(declared, sum);
      }),
      { numRuns: 20 },
    );
    expect(taken > 0).toBe(declared.powers !== undefined);
  });

  test('exact values, where there are some, are the values', () => {
    const twelfths = Array.from({ length: 49 }, (_, k) => Form.number(Rational.of(k - 24, 12)));
    const special = [...twelfths, ...twelfths.map((x) => Form.i.mul(x))];
    const found = special.filter((x) =>
      checkExactValue(
        declared,
        x,
        declared.parameters.map(() => Form.one),
      ),
    );
    expect(found.length > 0).toBe(declared.exactValue !== undefined);
  });
});

describe('a law that does not hold is caught', () => {
  const x = Form.ratio(3, 7).add(Form.i.mul(Form.ratio(1, 5)));
  const b = [Form.ratio(5, 4)];
  const { doubleSine, hyperbolicSine, hyperbolicCosine } = functions;
  const broken = (declared: SpecialFunction, change: Partial<SpecialFunction>): SpecialFunction => ({
    ...declared,
    ...change,
  });

  test('a reflection of the wrong sign, power, or centre', () => {
    checkReflections(doubleSine, x, b);
    const wrong = doubleSine.reflections.flatMap((one) => [
      { ...one, power: 1 as const },
      { ...one, sign: -1 as const },
      { ...one, center: () => Form.ratio(1, 10) },
    ]);
    for (const one of wrong) {
      expect(() => checkReflections(broken(doubleSine, { reflections: [one] }), x, b)).toThrow(/reflection/);
    }
  });

  test('a mirror with the wrong sign', () => {
    expect(checkMirror(doubleSine, x, b)).toBe(true);
    expect(() => checkMirror(broken(doubleSine, { mirror: (y) => y.conjugate() }), x, b)).toThrow(/mirrored/);
  });

  test('a shift of the wrong sign or step', () => {
    checkShifts(doubleSine, x, b);
    checkShifts(hyperbolicSine, x, []);
    for (const declared of [doubleSine, hyperbolicSine, hyperbolicCosine, functions.gamma]) {
      const periods = declared.parameters.length === 0 ? [] : b;
      const [shift] = declared.shifts;
      if (!shift) throw new Error('No shift.');
      const inverted = {
        ...shift,
        quotient: (at: Form, p: readonly Form[]) => [...shift.quotient(at, p), ...shift.quotient(at, p)],
      };
      const longer = { ...shift, step: (p: readonly Form[]) => shift.step(p).scale(3).div(Form.number(2)) };
      const check = (shifts: SpecialFunction['shifts']) => () => checkShifts(broken(declared, { shifts }), x, periods);
      expect(check([longer])).toThrow(/shift/);
      // The square of -1 is 1: of the elementary functions only the half step can be wrong in this way.
      if (!declared.elementary) expect(check([inverted])).toThrow(/shift/);
    }
  });

  test('a zero of the wrong order or in the wrong place', () => {
    checkOrder(hyperbolicSine, Form.i, [], 1);
    expect(() => checkOrder(hyperbolicSine, Form.i, [], 2)).toThrow(/order/);
    expect(() => checkOrder(hyperbolicSine, Form.i.scale(Rational.of(1, 2)), [], 1)).toThrow(/order/);
    expect(() => checkOrder(doubleSine, Form.i.neg(), [Form.one], 2)).toThrow(/order/);
  });

  test('a wrong sum and a wrong power', () => {
    const { exponential } = functions;
    const two = Form.call('log', Form.number(2));
    expect(checkPowers(exponential, x.add(two))).toBe(1);
    const halved = broken(exponential, { additive: (sum) => sum.scale(Rational.of(1, 2)) });
    expect(() => checkAdditive(halved, x, x)).toThrow(/sum/);
    const forgetful = broken(exponential, { powers: (sum) => ({ rest: sum.sub(two), bases: [] }) });
    expect(() => checkPowers(forgetful, x.add(two))).toThrow(/powers/);
  });

  test('a wrong growth and a wrong exact value', () => {
    const [growth] = doubleSine.growth;
    if (!growth) throw new Error('No growth.');
    const far = Form.number(16);
    expect(beyondGrowth(doubleSine, growth, far, b)).toBeLessThan(1e-11);
    const wrong = { ...growth, logarithm: (at: Form, p: readonly Form[]) => growth.logarithm(at, p).neg() };
    expect(beyondGrowth(doubleSine, wrong, far, b)).toBeGreaterThan(1e-3);
    const third = Form.i.mul(Form.ratio(1, 3));
    expect(checkExactValue(hyperbolicCosine, third, [])).toBe(true);
    const lying = broken(hyperbolicCosine, { exactValue: () => Form.one.neg() });
    expect(() => checkExactValue(lying, third, [])).toThrow(/exact value/);
  });
});
