import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { simplify } from '../../engine/product/simplify';
import { s2 } from '../../engine/spheres/s2';
import { theoryOf } from '../theory/theory-text';
import { ballAt, distance, numberOf, type Point, productBall, productOf, valuesAt } from './evaluate';
import { reference, row } from './fixture';
import { type Complex, moment, nodes, times } from './two-sphere-sum';

const theory = (...lines: string[]) => theoryOf(lines, {}, s2);

/** A gauge group with chirals `[representation, R, copies]`, each with a mass m0, m1, .. of its own. */
function withMasses(group: string, ...chirals: [string, string, number?][]) {
  return theory(
    `gauge G = ${group}, fi xi, theta t`,
    ...chirals.map((_, k) => `flavor F${k} = U(1), mass m${k}`),
    `matter G ${chirals.map((_, k) => `F${k}`).join(' ')} R`,
    ...chirals.map(([cell, r, copies = 1], k) => {
      const flavors = chirals.map((_, j) => (j === k ? `${copies}*1` : '0'));
      return `chiral q${k} ${cell} ${flavors.join(' ')} ${r}`;
    }),
  );
}

function expectRow({ re, im }: Complex, id: string, tolerance: number): void {
  const wanted = reference(id);
  const off = Math.hypot(re - wanted.re, im - wanted.im) / Math.hypot(wanted.re, wanted.im);
  expect(off, `${id}: ${re} ${im}`).toBeLessThan(tolerance);
}

// Sources of the rows: test/fixtures/spheres/spheres.json.
describe('sums over fluxes', () => {
  const zero = { m0: '0', m1: '0' };

  test.each([
    ['s2-CP1', '0'],
    ['s2-CP1-theta', '7/10'],
  ])('%s: two chirals of charge 1', (id, t) => {
    const list = nodes(
      withMasses('U(1)', ['1', '2/5', 2]),
      { xi: '1/5', t, ...zero },
      { fluxes: 26, reach: 14, step: 0.04 },
    );
    expectRow(moment(list), id, 1e-12);
  });

  test('with masses', () => {
    const cp1 = withMasses('U(1)', ['1', '3/5'], ['1', '3/5']);
    const point: Point = { xi: '1/5', t: '7/10', m0: '1/4', m1: '-1/4' };
    expectRow(moment(nodes(cp1, point, { fluxes: 26, reach: 14, step: 0.05 })), 's2-CP1-masses', 1e-12);
    const cp2 = withMasses('U(1)', ['1', '3/5'], ['1', '3/5'], ['1', '3/5']);
    const three: Point = { xi: '1/10', t: '7/10', m0: '1/4', m1: '-2/5', m2: '1/10' };
    expectRow(moment(nodes(cp2, three, { fluxes: 50, reach: 24, step: 0.03 })), 's2-CP2-masses', 1e-12);
  });

  test('a free meson', () => {
    const list = nodes(
      withMasses('U(1)', ['1', '3/10'], ['-1', '1/2']),
      { xi: '3/25', t: '9/10', ...zero },
      { fluxes: 50, reach: 22, step: 0.03 },
    );
    expectRow(moment(list), 's2-SQED1', 1e-12);
  });

  test('Calabi-Yau manifolds', () => {
    const cubic = withMasses('U(1)', ['1', '3/10', 3], ['-3', '11/10']);
    const list = nodes(cubic, { xi: '3/4', t: Form.pi, ...zero }, { fluxes: 16, reach: 8, step: 0.025 });
    expectRow(moment(list), 's2-cubic', 1e-11);
    const quintic = withMasses('U(1)', ['1', '1/5', 5], ['-5', '1']);
    const wide = nodes(quintic, { xi: '31/20', t: '4/5', ...zero }, { fluxes: 12, reach: 6, step: 0.015 });
    expectRow(moment(wide), 's2-quintic', 1e-11);
  });

  // U(2): the vector factor (z1 - z2)(w1 - w2), z = sigma + i n/2, w = sigma - i n/2, turns the double integral into moments.
  test('three fundamentals of U(2)', () => {
    const chirals: [string, string][] = [
      ['2/5', '1/4'],
      ['1/2', '-2/5'],
      ['3/5', '1/10'],
    ];
    const masses = Object.fromEntries(chirals.map(([, m], k) => [`m${k}`, m]));
    const one = withMasses('U(1)', ...chirals.map(([r]): [string, string] => ['1', r]));
    const two = withMasses('U(2)', ...chirals.map(([r]): [string, string] => ['fund', r]));
    // The reference has no sign (-1)^{a.n}, here part of the vector factor: theta + pi.
    const t = Form.ratio(7, 10).add(Form.pi);
    const point: Point = { xi: '3/20', t, ...masses };
    const factorised = (s: string, n: string, u: string, m: string) => {
      const parts = [
        ballAt(s2, one, 'integrand', { ...point, sigma: s, flux: n }),
        ballAt(s2, one, 'integrand', { ...point, sigma: u, flux: m }),
      ];
      const [a, b] = parts.map(numberOf) as [Complex, Complex];
      const [x, y] = [Number(s) - Number(u), Number(n) - Number(m)];
      const vector = (y % 2 === 0 ? 1 : -1) * (x * x + (y * y) / 4);
      const product = times(a, b);
      return { re: vector * product.re, im: vector * product.im };
    };
    for (const [s, n, u, m] of [
      ['0.3', '2', '-0.7', '-1'],
      ['-1.25', '0', '0.5', '3'],
    ] as const) {
      const whole = numberOf(ballAt(s2, two, 'integrand', { ...point, sigma1: s, flux1: n, sigma2: u, flux2: m }));
      const split = factorised(s, n, u, m);
      expect(Math.hypot(whole.re - split.re, whole.im - split.im) / Math.hypot(split.re, split.im)).toBeLessThan(1e-13);
    }
    // With theta + pi the sign of each flux is in the U(1) integrands already.
    const list = nodes(one, point, { fluxes: 40, reach: 20, step: 0.03 });
    const shifted = list.map((node) =>
      node.flux % 2 === 0 ? node : { ...node, value: times(node.value, { re: -1, im: 0 }) },
    );
    const [m00, m11, m10, m01] = [moment(shifted), moment(shifted, 1, 1), moment(shifted, 1, 0), moment(shifted, 0, 1)];
    const [left, right] = [times(m11, m00), times(m10, m01)];
    expectRow({ re: left.re - right.re, im: left.im - right.im }, 's2-Gr23', 1e-11);
  });
});

describe('single multiplets', () => {
  test('a chiral of R = 1/2 to 35 digits', () => {
    const ball = ballAt(s2, theory('matter R', 'chiral q 1/2'), 'one-loop', {}, 36);
    const { value } = row('s2-chiral');
    const wanted = (value ?? ['', ''])[0].replace('.', '').slice(0, 35);
    expect(`${(ball.re * 10n ** 34n) >> BigInt(ball.bits)}`).toBe(wanted.slice(0, 35));
  });

  // The Hankel transform of the mirror: DLMF 10.22.43. One unit of flux with charge -1 makes the printed Gammas those.
  test('the Bessel integral of the mirror', () => {
    const { re, im } = numberOf(
      ballAt(s2, withMasses('U(1)', ['-1', '3/5']), 'q0', { sigma: '0', flux: '1', m0: '0' }),
    );
    expectRow({ re, im }, 's2-Landau-Ginzburg', 1e-14);
  });

  // F. Benini, S. Cremonesi, arXiv:1206.2356: twisted chirals only enter the superpotential.
  test('a twisted chiral has no determinant', () => {
    expect(productOf(s2, theory('matter R', 'twisted y 0'), 'one-loop')).toEqual([]);
  });
});

describe('laws', () => {
  const u3 = withMasses('U(3)', ['fund', '1/3'], ['anti', '2/7'], ['adj', '1/5']);
  const masses = { m0: '0.3', m1: '-0.2', m2: '0.45' };
  const point = { sigma1: '0.31', sigma2: '-0.77', sigma3: '1.2', flux1: '2', flux2: '-1', flux3: '0', ...masses };

  test('permuting the Cartan directions with their fluxes changes nothing', () => {
    const moved = { ...point, sigma1: '1.2', sigma2: '0.31', sigma3: '-0.77', flux1: '0', flux2: '2', flux3: '-1' };
    expect(distance(ballAt(s2, u3, 'one-loop', moved), ballAt(s2, u3, 'one-loop', point))).toBe(0);
    const wrong = { ...moved, flux1: '2', flux2: '0' };
    expect(distance(ballAt(s2, u3, 'one-loop', wrong), ballAt(s2, u3, 'one-loop', point))).toBeGreaterThan(0.01);
  });

  test('a common shift of sigma is a shift of the masses', () => {
    const moved = { ...point, sigma1: '0.41', sigma2: '-0.67', sigma3: '1.3' };
    const masses = { ...point, m0: '0.4', m1: '-0.3' };
    expect(distance(ballAt(s2, u3, 'one-loop', moved), ballAt(s2, u3, 'one-loop', masses))).toBe(0);
  });

  // Gamma(z) Gamma(1 - z) = pi/sin(pi z) (DLMF 5.5.3): R and 2 - R of opposite charges leave (-1)^{w.n}.
  test.each(['U(1)', 'U(2)'])('a massive pair of %s is a sign', (group) => {
    const pair = theory(
      `gauge G = ${group}`,
      'flavor F = U(1)',
      'matter G F R',
      'chiral q fund 1 1/3',
      'chiral p anti -1 5/3',
    );
    const matter = [...productOf(s2, pair, 'q'), ...productOf(s2, pair, 'p')];
    const left = simplify(matter, 'functions', s2.geometry(pair));
    expect(left.map(({ name, argument }) => `${name} ${argument}`)).toEqual(['sign 1*@f']);
    const at: Point = { sigma: '0.3', sigma1: '0.3', sigma2: '-1.1', flux: '3', flux1: '3', flux2: '-4', m: '0.2' };
    expect(numberOf(productBall(matter, valuesAt(s2, pair, at), 20))).toEqual({ re: -1, im: 0 });
  });

  // Gamma(z + a)/Gamma(z + b) ~ z^{a-b} (DLMF 5.11.12): a heavy chiral of charge 1 moves xi by log|m|/2 pi, theta by
  // -(pi/2) sign m, up to terms 1/m.
  test.each([1, -1])('a heavy chiral moves xi and theta, sign of the mass %i', (side) => {
    const heavy = withMasses('U(1)', ['1', '1/3']);
    const off = (size: number) => {
      const at = (sigma: string, flux: string) => ballAt(s2, heavy, 'q0', { sigma, flux, m0: `${side * size}` }, 30);
      const [a, b] = [numberOf(at('0.4', '1')), numberOf(at('0', '0'))];
      const norm = b.re * b.re + b.im * b.im;
      const quotient = { re: (a.re * b.re + a.im * b.im) / norm, im: (a.im * b.re - a.re * b.im) / norm };
      const angle = -2 * Math.log(size) * 0.4 + (Math.PI / 2) * side;
      return Math.hypot(quotient.re - Math.cos(angle), quotient.im - Math.sin(angle));
    };
    expect(off(1e4)).toBeLessThan(1e-4);
    expect(off(1e6)).toBeLessThan(1e-6);
    expect(off(1e4)).toBeGreaterThan(1e-6);
  });
});
