import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { simplify } from '../../engine/product/simplify';
import { s4 } from '../../engine/spheres/s4';
import { s5 } from '../../engine/spheres/s5';
import { answer, failureOf } from '../requests/answers';
import { theoryOf } from '../theory/theory-text';
import { ballAt, distance, logAt, numberOf, productBall, productOf, realProgram, valuesAt } from './evaluate';
import { row } from './fixture';

const PERIODS = 'w1 = 1, w2 = exp(i/2), w3 = exp(-2i/5)';
const matter = ['gauge G = SU(2)', 'matter G', 'hyper q 3*fund'];

/** Digits of a decimal text without sign, point and leading zeros. */
const digits = (text: string) => text.replace('-', '').replace('.', '').replace(/^0+/, '');

// Sources of the rows: test/fixtures/spheres/spheres.json.
test.each([
  ['s5-complex-sine', ['value triplesine(0.8 + 0.1i; 1, exp(0.5i), exp(-0.4i)), 30 digits']],
  [
    's5-complex-one-loop',
    [
      'theory t',
      `  sphere S5, ${PERIODS}`,
      ...matter.map((line) => `  ${line}`),
      '',
      'value one-loop of t at sigma = 3/10, 30 digits',
    ],
  ],
])('%s', (id, lines) => {
  const result = answer(...lines);
  if (result.kind !== 'value') throw new Error(failureOf(result));
  const wanted = row(id).value ?? ['', ''];
  expect(digits(result.value.re).slice(0, 27)).toBe(digits(wanted[0]).slice(0, 27));
  expect(digits(result.value.im).slice(0, 27)).toBe(digits(wanted[1]).slice(0, 27));
  expect(result.crossCheck?.agrees).toBe('30 digits');
});

const angle = fc.integer({ min: -6, max: 6 }).map((n) => `exp(${n}i/10)`);
const place = fc.integer({ min: -90, max: 90 }).map((n) => `${(10 * n + 3) / 1000}`);

describe('laws', () => {
  // Y. Imamura, arXiv:1210.6308: a function of the three periods without order.
  test('S5: periods in any order, and conjugate periods', () => {
    const of = (...w: string[]) => theoryOf([`sphere S5, w1 = ${w[0]}, w2 = ${w[1]}, w3 = ${w[2]}`, ...matter], {}, s5);
    fc.assert(
      fc.property(angle, angle, place, (u, v, sigma) => {
        const value = ballAt(s5, of(u, v, '6/5'), 'one-loop', { sigma }, 18);
        expect(distance(ballAt(s5, of('6/5', u, v), 'one-loop', { sigma }, 18), value)).toBe(0);
        expect(distance(ballAt(s5, of(v, u, '6/5'), 'one-loop', { sigma }, 18), value)).toBe(0);
        const turned = (text: string) => text.replace('exp(', 'exp(-').replace('--', '');
        const conjugate = ballAt(s5, of(turned(u), turned(v), '6/5'), 'one-loop', { sigma }, 18);
        expect(distance({ ...conjugate, im: -conjugate.im }, value)).toBe(0);
      }),
      { numRuns: 3 },
    );
  });

  // N. Hama, K. Hosomichi, arXiv:1206.6359: only b + 1/b matters; at |b| = 1 it is real.
  test('S4: b and 1/b are alike, and b on the unit circle gives real numbers', () => {
    const of = (b: string) => theoryOf([`sphere S4, b = ${b}`, ...matter], {}, s4);
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 6 }), fc.integer({ min: 8, max: 12 }), place, (n, size, sigma) => {
        const b = `${size}/10*exp(${n}i/10)`;
        const value = ballAt(s4, of(b), 'one-loop', { sigma }, 18);
        expect(distance(ballAt(s4, of(`1/(${b})`), 'one-loop', { sigma }, 18), value)).toBe(0);
        const { re, im } = numberOf(value);
        if (size === 10) expect(Math.abs(im)).toBeLessThan(1e-17 * Math.abs(re));
        else expect(Math.abs(im)).toBeGreaterThan(1e-12 * Math.abs(re));
      }),
      { numRuns: 6 },
    );
  });

  // The precise tier states its error.
  test.each([
    ['S5', s5, `sphere S5, ${PERIODS}`],
    ['S4', s4, 'sphere S4, b = 6/5*exp(i/3)'],
  ] as const)('doubles agree with the precise tier: %s', (_name, sphere, line) => {
    const of = theoryOf([line, ...matter], {}, sphere);
    const raw = productOf(sphere, of, 'one-loop');
    const simple = simplify(raw, 'elementary', sphere.geometry(of));
    const program = realProgram(simple, ['sigma'], valuesAt(sphere, of, {}));
    fc.assert(
      fc.property(place, (sigma) => {
        const wanted = numberOf(productBall(raw, valuesAt(sphere, of, { sigma }), 18));
        const { re, im } = program([Float64Array.of(Number(sigma))]);
        const off = Math.hypot((re[0] as number) - wanted.re, (im[0] as number) - wanted.im);
        expect(off / Math.hypot(wanted.re, wanted.im)).toBeLessThan(1e-12);
      }),
      { numRuns: 8 },
    );
  });
});

// Growth of S_3, A. Narukawa, math/0306164: exp(-2 pi F sigma^3/(w1 w2 w3)), F = (8 - 3)/6 for SU(2) with three flavours.
test.each(['1', '1 + i/2', '1 + i'])('the integrand falls off as the prepotential says: three periods %s', (w) => {
  const of = theoryOf([`sphere S5, w1 = ${w}, w2 = ${w}, w3 = ${w}`, ...matter], {}, s5);
  const tall = (sigma: string) => logAt(s5, of, 'one-loop', { sigma });
  const turn = { '1': 1, '1 + i/2': 1 - 3 / 4, '1 + i': -2 }[w] ?? Number.NaN;
  const size = { '1': 1, '1 + i/2': 1.25 ** 3, '1 + i': 8 }[w] ?? Number.NaN;
  const wanted = (((-2 * Math.PI * 5) / 6) * turn) / size;
  // Third difference of the logarithm, over 6 h^3; what is left out is e^{-2 pi sigma Re 1/w}, 4e-6 at its largest.
  const h = 1;
  const third = (tall('7') - 3 * tall('6') + 3 * tall('5') - tall('4')) / (6 * h ** 3);
  expect(third / wanted).toBeCloseTo(1, 4);
});

test('special masses at complex periods', () => {
  const result = answer(
    ...['let u = exp(i/2)', 'let v = 1', 'let w = exp(-2i/5)', 'let m = i(u + v - w)/2', 'theory t'],
    ...[
      '  sphere S5, w1 = u, w2 = v, w3 = w',
      '  gauge G = SU(2)',
      '  flavor A = U(1)',
      '  matter G A',
      '  hyper a adj 1',
    ],
    ...['', 'formula t as elementary'],
  );
  if (result.kind !== 'formula' || result.formula.kind !== 'formula') throw new Error(failureOf(result));
  expect(result.formula.pieces.map(({ latex }) => latex).join('')).toContain(
    '\\sinh\\left(\\frac{2\\pi\\sigma}{\\omega_2}',
  );
});
