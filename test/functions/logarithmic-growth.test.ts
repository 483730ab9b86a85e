import { describe, expect, test } from 'vitest';
import { formDouble } from '../../engine/arithmetic/form-double';
import { Form } from '../../engine/exact/form';
import type { LogarithmicGrowth, SpecialFunction } from '../../engine/functions/special-function';
import { functions } from '../../engine/functions/table';
import { complexForm, logOf, mismatch } from './law-checks';

const root = (n: number): Form => Form.call('sqrt', Form.number(n));
const double = (form: Form) => formDouble(form, () => null) ?? { re: Number.NaN, im: Number.NaN };

const CASES: [string, SpecialFunction, readonly Form[]][] = [
  ['Gamma', functions.gamma, []],
  ['x', functions.linear, []],
  ['g in flux 0', functions.fluxGamma, [Form.zero]],
  ['g in flux 3', functions.fluxGamma, [Form.number(3)]],
  ['g in flux -2', functions.fluxGamma, [Form.number(-2)]],
  ['Upsilon at b = 1', functions.upsilon, [Form.one]],
  ['Upsilon at b = 4/5', functions.upsilon, [Form.ratio(4, 5)]],
  ['Upsilon at b = sqrt 2', functions.upsilon, [root(2)]],
  ['Upsilon at b = 4/5 + i/4', functions.upsilon, [complexForm(0.8, 0.25)]],
];

/** log f minus its growth at far/direction + an offset; the offset is none of the symmetry axes. */
function beyond(declared: SpecialFunction, law: LogarithmicGrowth, parameters: readonly Form[], far: number): number {
  const x = law.direction.inverse().scale(far).add(complexForm(0.3, 0.2));
  const z = x.sub(law.about(parameters));
  const [at, polynomial, beside] = [z, law.polynomial(z, parameters), law.logarithm(z, parameters)].map(double) as [
    { re: number; im: number },
    { re: number; im: number },
    { re: number; im: number },
  ];
  const log = { re: Math.log(Math.hypot(at.re, at.im)), im: Math.atan2(at.im, at.re) };
  const constant = law.constant?.(parameters.map(double)) ?? { re: 0, im: 0 };
  const growth = {
    re: polynomial.re + beside.re * log.re - beside.im * log.im + constant.re,
    im: polynomial.im + beside.re * log.im + beside.im * log.re + constant.im,
  };
  return mismatch(logOf(declared, x, parameters), growth);
}

// The functions' own values in doubles, which have been compared with mpmath (test/fixtures/functions).
describe.each(CASES)('growth with a logarithm: %s', (_name, declared, parameters) => {
  test('comes near as 1/x', () => {
    const laws = declared.logarithmicGrowth ?? [];
    expect(laws.length).toBeGreaterThan(1);
    for (const law of laws) {
      const [near, far] = [beyond(declared, law, parameters, 40), beyond(declared, law, parameters, 400)];
      expect(near).toBeLessThan(0.1);
      // Rounding of logarithms of the size of 10^6 at the far point.
      expect(far).toBeLessThan(Math.max(near / 8, 3e-9));
    }
  });

  test('a wrong law does not', () => {
    const [law] = declared.logarithmicGrowth ?? [];
    if (!law) throw new Error('No law.');
    const wrong = { ...law, polynomial: (z: Form, p: readonly Form[]) => law.polynomial(z, p).add(Form.ratio(1, 20)) };
    expect(beyond(declared, wrong, parameters, 400)).toBeGreaterThan(0.04);
  });
});
