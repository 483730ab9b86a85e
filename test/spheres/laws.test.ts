import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { s2 } from '../../engine/spheres/s2';
import { s4 } from '../../engine/spheres/s4';
import { s5 } from '../../engine/spheres/s5';
import type { Sphere } from '../../engine/spheres/sphere';
import type { Theory } from '../../engine/theory/theory';
import { theoryOf } from '../theory/theory-text';
import { ballAt, distance, exact, logAt, numberOf, type Point } from './evaluate';

/*
 * Laws that hold at every point, tried at random ones. Each has a neighbour that does not hold, so that a test that
 * could not fail would be seen. Sources: the sphere files; the asymptotics beside the tests.
 */
const RUNS = { numRuns: 6 };

/** Off the tenths by `k`^2 thousandths and one, so that no root, weight or mass vanishes. */
const place = (k: number, size = 90) =>
  fc.integer({ min: -size, max: size }).map((n) => `${(10 * n + 1 + 2 * k * k) / 1000}`);
const flux = fc.integer({ min: -4, max: 4 }).map(String);
const period = fc.integer({ min: 7, max: 14 }).map((n) => `${n}/10`);
const at = (sphere: Sphere, of: Theory, point: Point) => ballAt(sphere, of, 'one-loop', point, 18);
const plus = (x: string, y: string) => `${(Math.round(Number(x) * 1000) + Math.round(Number(y) * 1000)) / 1000}`;
const minus = (x: string) => plus('0', `${-Number(x)}`);

const U3: readonly (readonly [string, Sphere, readonly string[]])[] = [
  ['S2', s2, ['matter G A R', 'chiral q fund 1 1/3', 'chiral p anti 2 2/7', 'chiral a adj 0 1/5']],
  ['S4', s4, ['matter G A', 'hyper q fund 1', 'hyper s sym2 3', 'hyper a adj 0']],
  ['S5', s5, ['matter G A', 'hyper q fund 1', 'hyper s sym2 3']],
];

describe.each(U3)('%s', (name, sphere, rows) => {
  const of = theoryOf(['gauge G = U(3)', 'flavor A = U(1)', ...rows], {}, sphere);
  const fluxes = name === 'S2';
  const points = fc
    .tuple(place(0), place(1), place(2), place(3), flux, flux, flux)
    .map(([sigma1, sigma2, sigma3, m, flux1, flux2, flux3]) => ({
      ...{ sigma1, sigma2, sigma3, m },
      ...(fluxes ? { flux1, flux2, flux3 } : {}),
    }));

  test('the Weyl group acts trivially', () => {
    fc.assert(
      fc.property(points, (point) => {
        const { sigma1, sigma2, sigma3 } = point;
        const turned = { ...point, sigma1: sigma2, sigma2: sigma3, sigma3: sigma1 };
        const { flux1, flux2, flux3 } = { flux1: '0', flux2: '0', flux3: '0', ...point };
        const moved = fluxes ? { ...turned, flux1: flux2, flux2: flux3, flux3: flux1 } : turned;
        const value = at(sphere, of, point);
        expect(distance(at(sphere, of, moved), value)).toBe(0);
        expect(distance(at(sphere, of, { ...point, sigma1: plus(sigma1, '0.05') }), value)).toBeGreaterThan(1e-9);
      }),
      RUNS,
    );
  });

  // U(1) of the centre: charge 1 of `q`, -1 of `p`, 2 of `s` moves with the mass of charges 1, 2, 3.
  test('a common shift of the Coulomb parameters is a shift of the masses', () => {
    const charges = fluxes ? '-1 0 1' : '2';
    const two = theoryOf(
      fluxes
        ? [
            ...['gauge G = U(3)', 'flavor A = U(1)', 'flavor B = U(1), mass mu', 'matter G A B R'],
            ...['chiral q fund 1 1 1/3', 'chiral p anti 2 -1 2/7', 'chiral a adj 0 0 1/5'],
          ]
        : [
            ...['gauge G = U(3)', 'flavor A = U(1)', 'flavor B = U(1), mass mu', 'matter G A B'],
            ...['hyper q fund 1 1', `hyper s sym2 3 ${charges}`, ...(name === 'S4' ? ['hyper a adj 0 0'] : [])],
          ],
      {},
      sphere,
    );
    fc.assert(
      fc.property(points, place(4), (point, shift) => {
        const { sigma1, sigma2, sigma3 } = point;
        const shifted = { sigma1: plus(sigma1, shift), sigma2: plus(sigma2, shift), sigma3: plus(sigma3, shift) };
        const value = at(sphere, of, { ...point, ...shifted });
        expect(distance(at(sphere, two, { ...point, mu: shift }), value)).toBe(0);
        expect(distance(at(sphere, two, { ...point, mu: plus(shift, '0.05') }), value)).toBeGreaterThan(1e-9);
      }),
      RUNS,
    );
  });
});

describe.each([
  ['S4', s4],
  ['S5', s5],
] as const)('hypers on %s', (name, sphere) => {
  const lines = ['gauge G = SU(3)', 'flavor A = U(1)', 'matter G A'];
  const of = (row: string) => theoryOf([...lines, row], {}, sphere);

  test('a hyper is its conjugate', () => {
    fc.assert(
      fc.property(place(0), place(1), place(3), (sigma1, sigma2, m) => {
        const point = { sigma1, sigma2, m };
        const value = ballAt(sphere, of('hyper q sym2 1'), 'q', point, 18);
        expect(distance(ballAt(sphere, of('hyper q sym2* -1'), 'q', point, 18), value)).toBe(0);
        expect(distance(ballAt(sphere, of('hyper q sym2* 1'), 'q', point, 18), value)).toBeGreaterThan(1e-9);
      }),
      RUNS,
    );
  });

  test('signs of single Coulomb parameters of USp(4) do not matter', () => {
    const usp = theoryOf(['gauge G = USp(4)', 'matter G', 'hyper q fund', 'hyper a alt2'], {}, sphere);
    fc.assert(
      fc.property(place(0), place(2), (sigma1, sigma2) => {
        const value = at(sphere, usp, { sigma1, sigma2 });
        expect(distance(at(sphere, usp, { sigma1: minus(sigma1), sigma2 }), value)).toBe(0);
        expect(distance(at(sphere, usp, { sigma1: sigma2, sigma2: sigma1 }), value), name).toBe(0);
      }),
      RUNS,
    );
  });
});

describe('squashing', () => {
  // N. Hama, K. Hosomichi, arXiv:1206.6359: only b + 1/b matters.
  test('S4: b and 1/b are alike', () => {
    const lines = (b: string) => [`sphere S4, b = ${b}`, 'gauge G = SU(2)', 'matter G', 'hyper q 3*fund'];
    fc.assert(
      fc.property(fc.integer({ min: 7, max: 19 }), place(0), (n, sigma) => {
        const value = at(s4, theoryOf(lines(`${n}/13`), {}, s4), { sigma });
        expect(distance(at(s4, theoryOf(lines(`13/${n}`), {}, s4), { sigma }), value)).toBe(0);
        if (n !== 13) {
          expect(distance(at(s4, theoryOf(lines('1'), {}, s4), { sigma }), value)).toBeGreaterThan(1e-12);
        }
      }),
      RUNS,
    );
  });

  // Y. Imamura, arXiv:1210.6308: a function of the three periods without order, homogeneous of degree 0 at no coupling.
  test('S5: periods in any order, and their common scale', () => {
    const of = (...w: string[]) =>
      theoryOf(
        [`sphere S5, w1 = ${w[0]}, w2 = ${w[1]}, w3 = ${w[2]}`, 'gauge G = SU(2)', 'matter G', 'hyper q 3*fund'],
        {},
        s5,
      );
    fc.assert(
      fc.property(period, period, period, place(0), (u, v, w, sigma) => {
        const value = at(s5, of(u, v, w), { sigma });
        expect(distance(at(s5, of(w, u, v), { sigma }), value)).toBe(0);
        expect(distance(at(s5, of(v, u, w), { sigma }), value)).toBe(0);
        const doubled = of(`2*${u}`, `2*${v}`, `2*${w}`);
        expect(distance(at(s5, doubled, { sigma: plus(sigma, sigma) }), value)).toBe(0);
        expect(distance(at(s5, doubled, { sigma }), value)).toBeGreaterThan(1e-12);
      }),
      RUNS,
    );
  });
});

// V. Pestun, arXiv:0712.2824, section 4.4; T. Okuda, V. Pestun, arXiv:1004.1222: exp(-(8 pi^2/g^2)(a, a)) times the
// Vandermonde determinant, and 1/Upsilon(1/b) for each Cartan direction.
test.each([
  [
    'SU(3)',
    (x: number, y: number) => [x - y, 2 * x + y, x + 2 * y],
    (x: number, y: number) => 2 * (x * x + y * y + x * y),
  ],
  ['USp(4)', (x: number, y: number) => [x - y, x + y, 2 * x, 2 * y], (x: number, y: number) => 2 * (x * x + y * y)],
] as const)('N = 4 on S4 is a Gaussian matrix model: %s', (group, roots, square) => {
  fc.assert(
    fc.property(fc.integer({ min: 8, max: 16 }), place(0), place(1), (n, sigma1, sigma2) => {
      const b = `${n}/10`;
      const lines = [`sphere S4, b = ${b}`, `gauge G = ${group}, coupling g`];
      const four = theoryOf(['supersymmetry 4', ...lines], {}, s4);
      const [x, y] = [Number(sigma1), Number(sigma2)];
      const single = theoryOf([lines[0] ?? '', 'flavor A = U(1)', 'matter A', 'hyper a 1'], {}, s4);
      // Q/2 + i m = 1/b at m = i (b - 1/b)/2.
      const m = Form.i.mul(exact(b).sub(exact(b).inverse())).mul(Form.ratio(1, 2));
      const cartan = n === 10 ? 1 : numberOf(ballAt(s4, single, 'a', { m }, 18)).re;
      const vandermonde = roots(x, y).reduce((product, root) => product * root * root, 1);
      const gauss = Math.exp(-((8 * Math.PI ** 2) / 9) * square(x, y));
      const value = numberOf(ballAt(s4, four, 'integrand', { sigma1, sigma2, g: '3' }, 18)).re;
      expect(value / (gauss * vandermonde * cartan ** 2)).toBeCloseTo(1, 11);
    }),
    RUNS,
  );
});

describe('a heavy multiplet decouples', () => {
  // log Upsilon(Q/2 + iy) = -y^2 log y + (3/2) y^2 - ((b^2 + b^-2)/12) log y + const + O(1/y^2), from its integral,
  // A. Zamolodchikov, Al. Zamolodchikov, hep-th/9506136: a hyper of mass M moves 8 pi^2/g^2 by -log M for each w.sigma^2.
  test('S4: it runs the coupling by log M, up to 1/M^2', () => {
    const of = theoryOf(
      ['sphere S4, b = 6/5', 'gauge G = SU(2)', 'flavor A = U(1)', 'matter G A', 'hyper q fund 1', 'hyper p adj 1'],
      {},
      s4,
    );
    fc.assert(
      fc.property(fc.integer({ min: 40, max: 120 }), place(0), (mass, sigma) => {
        // Sum of w.sigma^2: 2 sigma^2 of the doublet, 8 sigma^2 of the adjoint.
        const square = 10 * Number(sigma) ** 2;
        const off = (m: number) => {
          const log = (s: string) =>
            logAt(s4, of, 'q', { sigma: s, m: `${m}` }) + logAt(s4, of, 'p', { sigma: s, m: `${m}` });
          return Math.abs(log(sigma) - log('0') - square * Math.log(m));
        };
        // The next terms: sum of (w.sigma)^4/(12 M^2) and (b^2 + b^-2)/12 times the squares over 2 M^2.
        const next = 40 * (Number(sigma) ** 4 + Number(sigma) ** 2);
        expect(off(mass)).toBeLessThan(next / mass ** 2);
        expect(off(mass)).toBeGreaterThan(8 * off(4 * mass) - 1e-12);
      }),
      RUNS,
    );
  });

  // B_33 in A. Narukawa, math/0306164: log S_3(|w|/2 + iy) = -(pi y/6)(y^2 + (w1^2 + w2^2 + w3^2)/4)/(w1 w2 w3) up to
  // e^{-2 pi y/max w}. The cubic term is half a level: K. Intriligator, D. R. Morrison, N. Seiberg, hep-th/9702198.
  test('S5: it leaves a polynomial of third order, up to exponentials', () => {
    fc.assert(
      fc.property(period, period, period, fc.integer({ min: -60, max: 60 }), fc.boolean(), (u, v, w, n, sign) => {
        const of = theoryOf(
          [
            `sphere S5, w1 = ${u}, w2 = ${v}, w3 = ${w}`,
            'gauge G = U(1)',
            'flavor A = U(1)',
            'matter G A',
            'hyper q 2 1',
          ],
          {},
          s5,
        );
        const sigma = n / 100;
        const log = logAt(s5, of, 'q', { sigma: `${sigma}`, m: sign ? '9' : '-9' }, 30);
        const y = Math.abs((sign ? 9 : -9) + 2 * sigma);
        const [a, b, c] = [u, v, w].map((text) => Number(text.split('/')[0]) / 10) as [number, number, number];
        const wanted = ((Math.PI * y) / 6 / (a * b * c)) * (y * y + (a * a + b * b + c * c) / 4);
        const rest = Math.exp((-2 * Math.PI * y) / Math.max(a, b, c)) * y * y;
        expect(Math.abs(log - wanted)).toBeLessThan(rest + 1e-13 * wanted);
      }),
      RUNS,
    );
  });

  // Gamma(z + a)/Gamma(z + b) ~ z^{a-b} (DLMF 5.11.12): charge Q moves xi by Q log|M|/2 pi and theta by -(pi/2) Q sign M.
  test('S2: it moves xi and theta in proportion to its charge, up to 1/M', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(1, -1, 2, -3),
        place(0, 40),
        fc.integer({ min: -3, max: 3 }),
        fc.boolean(),
        (charge, sigma, n, positive) => {
          const of = theoryOf(
            ['gauge G = U(1)', 'flavor A = U(1)', 'matter G A R', `chiral q ${charge} 1 1/3`],
            {},
            s2,
          );
          const mass = positive ? 1e6 : -1e6;
          const at = (s: string, k: number) =>
            numberOf(ballAt(s2, of, 'q', { sigma: s, flux: `${k}`, m: `${mass}` }, 30));
          const [one, zero] = [at(sigma, n), at('0', 0)];
          const norm = zero.re ** 2 + zero.im ** 2;
          const re = (one.re * zero.re + one.im * zero.im) / norm;
          const im = (one.im * zero.re - one.re * zero.im) / norm;
          // exp(-4 pi i xi sigma - i theta n).
          const angle = -2 * charge * Math.log(1e6) * Number(sigma) + (Math.PI / 2) * charge * n * Math.sign(mass);
          expect(Math.hypot(re - Math.cos(angle), im - Math.sin(angle))).toBeLessThan(3e-5);
        },
      ),
      RUNS,
    );
  });
});
