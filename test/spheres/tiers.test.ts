import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { affineProduct } from '../../engine/numeric/affine';
import { asymptote } from '../../engine/numeric/growth';
import { compileAffine } from '../../engine/numeric/program';
import { simplify } from '../../engine/product/simplify';
import { s2 } from '../../engine/spheres/s2';
import { s4 } from '../../engine/spheres/s4';
import { s5 } from '../../engine/spheres/s5';
import type { Sphere } from '../../engine/spheres/sphere';
import { theoryOf } from '../theory/theory-text';
import { distance, logAt, numberOf, type Point, productBall, productOf, realProgram, valuesAt } from './evaluate';

const CASES: [string, Sphere, string[], Point][] = [
  [
    'S2, U(3)',
    s2,
    [
      ...['gauge G = U(3)', 'flavor F = SU(2)', 'matter G F R'],
      ...['chiral q fund fund 1/3', 'chiral p anti 1 1/2', 'chiral d det^-2 1 1', 'chiral a adj 1 1/5'],
    ],
    { flux1: '2', flux2: '-1', flux3: '3', m: '0.4' },
  ],
  [
    'S2, SU(2) and U(1)',
    s2,
    ['gauge G = SU(2)', 'gauge H = U(1)', 'matter G H R', 'chiral q fund 3 1/3'],
    { flux: '1', "flux'": '-2' },
  ],
  [
    'S4, SU(3)',
    s4,
    ['gauge G = SU(3)', 'flavor F = U(1)', 'matter G F', 'hyper q sym2 1', 'hyper a adj 0'],
    { m: '0.3' },
  ],
  [
    'S4 squashed, USp(4)',
    s4,
    ['sphere S4, b = 7/5', 'gauge G = USp(4)', 'matter G', 'hyper q fund', 'hyper a alt2', 'halfhyper h 2*fund'],
    {},
  ],
  [
    'S5, SU(3)',
    s5,
    ['gauge G = SU(3)', 'flavor F = U(1)', 'matter G F', 'hyper q fund 1', 'hyper s sym2 1'],
    { m: '0.3' },
  ],
  [
    'S5 squashed, SU(2)',
    s5,
    ['sphere S5, w1 = 1, w2 = 6/5, w3 = 9/10', 'gauge G = SU(2)', 'matter G', 'hyper q 3*fund'],
    {},
  ],
];

/** At a distance of 100 logarithms of the size of 10^6 cancel in part. */
const CANCELLED = 2e-8;

describe.each(CASES)('%s', (_name, sphere, lines, fixed) => {
  const theory = theoryOf(lines, {}, sphere);
  const names = theory.groups
    .filter(({ role }) => role === 'gauge')
    .flatMap(({ coordinates, dependent }) => coordinates.filter((name) => !dependent.has(name)));
  const raw = productOf(sphere, theory, 'one-loop');
  const simple = simplify(raw, 'elementary', sphere.geometry(theory));
  // Off the tenths by 1, 3, 9 thousandths, so that no root or weight vanishes.
  const place = fc.integer({ min: -300, max: 300 });
  const points = fc.tuple(...names.map(() => place)).map((list) => list.map((n, k) => (10 * n + 1 + 2 * k * k) / 1000));

  // The precise tier states its error, and is tested against mpmath by itself.
  test('doubles agree with the precise tier', () => {
    const program = realProgram(simple, names, valuesAt(sphere, theory, fixed));
    fc.assert(
      fc.property(points, (at) => {
        const point = { ...fixed, ...Object.fromEntries(names.map((name, k) => [name, `${at[k]}`])) };
        const values = valuesAt(sphere, theory, point);
        const ball = productBall(simple, values, 18);
        expect(distance(productBall(raw, values, 18), ball)).toBe(0);
        const wanted = numberOf(ball);
        const { re, im } = program(at.map((x) => Float64Array.of(x)));
        const off = Math.hypot((re[0] as number) - wanted.re, (im[0] as number) - wanted.im);
        const size = Math.abs(logAt(sphere, theory, 'one-loop', point, 15)) + 10;
        expect(off / Math.hypot(wanted.re, wanted.im)).toBeLessThan(4e-14 * size);
      }),
      { numRuns: 8 },
    );
  });

  test('the curve comes to its growth at both ends', () => {
    const [first, ...others] = names as [string, ...string[]];
    const set = Object.fromEntries(others.map((name, k) => [name, `${(k + 1) / 7}`]));
    const values = valuesAt(sphere, theory, { ...fixed, ...set });
    const entries = affineProduct(simple, [first], (name) => (name === first ? null : values(name)));
    const program = compileAffine(entries, [first]);
    for (const end of [1, -1] as const) {
      const x = Float64Array.of(10 * end, 100 * end);
      const re = new Float64Array(2);
      program.addLog([x], re, new Float64Array(2));
      const growth = asymptote(entries, first, end, x);
      const off = [...re].map((log, k) => Math.abs(log - (growth?.[k] ?? Number.NaN)));
      expect(off[0]).toBeLessThan(1);
      expect(off[1]).toBeLessThan(Math.max((off[0] as number) / 5, CANCELLED));
    }
  });
});
