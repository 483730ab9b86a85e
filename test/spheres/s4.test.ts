import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { productLatex } from '../../engine/latex/product';
import { simplify } from '../../engine/product/simplify';
import { isSpecial } from '../../engine/spheres/quantity';
import { s4 } from '../../engine/spheres/s4';
import type { Theory } from '../../engine/theory/theory';
import { theoryOf } from '../theory/theory-text';
import { ballAt, distance, grid, logAt, numberOf, type Point, productOf, realProgram, valuesAt } from './evaluate';
import { reference } from './fixture';

const theory = (...lines: string[]) => theoryOf(lines, {}, s4);
const root = (n: number) => Form.call('sqrt', Form.number(n));

const expectRow = (value: number, id: string, tolerance: number) =>
  expect(Math.abs(value / reference(id).re - 1), `${id}: ${value}`).toBeLessThan(tolerance);

/** Integral of the integrand of an SU(2) theory over the Cartan algebra, over 2 for the Weyl group. */
function integral(of: Theory, point: Point, weight: (sigma: number) => number = () => 1): number {
  const step = 1 / 24;
  const sigma = grid(5, step);
  const { re } = realProgram(productOf(s4, of, 'integrand'), ['sigma'], valuesAt(s4, of, point))([sigma]);
  return (step / 2) * sigma.reduce((sum, s, k) => sum + (re[k] as number) * weight(s), 0);
}

// Sources of the rows: test/fixtures/spheres/spheres.json.
describe('integrals over SU(2), without instantons', () => {
  const g = root(10);
  const gauge = 'gauge G = SU(2), coupling g';

  test('N = 4: the Gaussian matrix model, and its Wilson loop', () => {
    for (const lines of [
      [gauge, 'matter G', 'hyper a adj'],
      ['supersymmetry 4', gauge],
    ]) {
      const z = integral(theory(...lines), { g });
      expectRow(z, 's4-N4', 1e-12);
      const loop = integral(theory(...lines), { g }, (s) => Math.cosh(2 * Math.PI * s));
      expectRow(loop / z, 's4-Wilson', 1e-12);
    }
  });

  test('the vector multiplet alone', () => {
    expectRow(integral(theory(gauge), { g }), 's4-SU2', 1e-12);
  });

  test('four flavours', () => {
    const of = theory(gauge, 'flavor F = U(4)', 'matter G F', 'hyper q fund fund');
    expectRow(integral(of, { g, m1: '0.1', m2: '0.2', m3: '-0.3', m4: '0.5' }), 's4-SU2-Nf4', 1e-12);
  });
});

// A. Zamolodchikov, Al. Zamolodchikov, hep-th/9506136; L. F. Alday, D. Gaiotto, Y. Tachikawa, arXiv:0906.3219.
test('Liouville structure constants at b^2 = 2', () => {
  const of = theoryOf(
    ['sphere S4, b = beta', 'gauge G = SU(2)', 'flavor F = U(4)', 'matter G F', 'hyper q fund fund'],
    { beta: 'sqrt(2)' },
    s4,
  );
  const masses = { m1: '0.35', m2: '-0.09', m3: '0.09', m4: '-0.71' };
  const at = (sigma: string) => numberOf(ballAt(s4, of, 'one-loop', { ...masses, sigma }, 20)).re;
  expectRow(at('0.7') / at('0.4'), 's4-Liouville', 1e-14);
});

describe('laws', () => {
  const squashed = theory(
    ...['sphere S4, b = 7/5', 'gauge G = SU(3)', 'flavor F = SU(2)', 'flavor A = U(1), mass mu', 'matter G F A'],
    ...['hyper q fund fund 1', 'hyper s sym2 1 0'],
  );
  const point = { sigma1: '0.3', sigma2: '-1.1', m: '0.25', mu: '-0.4' };
  const at = (of: Theory, where: Point) => ballAt(s4, of, 'one-loop', where);

  test('Weyl groups of gauge and flavour act trivially', () => {
    const value = at(squashed, point);
    expect(distance(at(squashed, { ...point, sigma1: '-1.1', sigma2: '0.3' }), value)).toBe(0);
    expect(distance(at(squashed, { ...point, sigma1: '0.8', sigma2: '0.3' }), value)).toBe(0);
    expect(distance(at(squashed, { ...point, m: '-0.25' }), value)).toBe(0);
    expect(distance(at(squashed, { ...point, mu: '0.4' }), value)).toBeGreaterThan(0.01);
  });

  // N. Hama, K. Hosomichi, arXiv:1206.6359: only b + 1/b matters.
  test('b and 1/b are alike', () => {
    const lines = (b: string) => [
      `sphere S4, b = ${b}`,
      'gauge G = USp(4)',
      'matter G',
      'hyper q fund',
      'hyper a alt2',
    ];
    const where = { sigma1: '0.3', sigma2: '-1.1' };
    const value = at(theory(...lines('7/5')), where);
    expect(distance(at(theory(...lines('5/7')), where), value)).toBe(0);
    expect(distance(at(theory(...lines('6/5')), where), value)).toBeGreaterThan(1e-3);
  });

  test('a common shift of sigma is a shift of the masses', () => {
    const lines = [
      'sphere S4, b = 7/5',
      'gauge G = U(2)',
      'flavor A = U(1)',
      'matter G A',
      'hyper q 3*fund 1',
      'hyper p sym2 0',
    ];
    const of = theory(...lines, 'flavor B = U(1), mass mu');
    const charged = theory(
      ...lines.slice(0, 3),
      'flavor B = U(1), mass mu',
      'matter G A B',
      'hyper q 3*fund 1 0',
      'hyper p sym2 0 1',
    );
    const value = at(of, { sigma1: '0.5', sigma2: '-0.9', m: '0.1' });
    expect(distance(at(charged, { sigma1: '0.3', sigma2: '-1.1', m: '0.3', mu: '0.4' }), value)).toBe(0);
  });

  test('a hyper and its conjugate are the same', () => {
    const of = (...cells: string[]) => theory('gauge G = SU(3)', 'flavor A = U(1)', 'matter G A', ...cells);
    const where = { sigma1: '0.3', sigma2: '-1.1', m: '0.25' };
    expect(distance(at(of('hyper q fund 1'), where), at(of('hyper q anti -1'), where))).toBe(0);
    expect(distance(at(of('hyper q fund 1'), where), at(of('hyper q anti 1'), where))).toBeGreaterThan(1e-3);
  });

  // Counted once in each pair of weights: V. Pestun, arXiv:0712.2824 for the hyper.
  test('two half-hypers are a hyper', () => {
    const of = (row: string) => theory('sphere S4, b = 6/5', 'gauge G = USp(6)', 'matter G', row);
    const where = { sigma1: '0.3', sigma2: '-1.1', sigma3: '0.7' };
    expect(distance(at(of('halfhyper h 2*alt3'), where), at(of('hyper h alt3'), where))).toBe(0);
  });

  // From log Upsilon(Q/2 + iy) = -y^2 log y + (3/2) y^2 + ...: a heavy pair of masses m, -m moves the coefficient of
  // sum w.sigma^2 by 2 log m (the running of the coupling), up to 1/m^2.
  test('a heavy hyper runs the coupling', () => {
    const of = theory('sphere S4, b = 6/5', 'gauge G = SU(2)', 'flavor A = U(1)', 'matter G A', 'hyper q fund 1');
    const off = (mass: string) => {
      const log = (sigma: string) => logAt(s4, of, 'q', { sigma, m: mass });
      return Math.abs(log('0.5') - log('0.2') - 2 * (0.25 - 0.04) * Math.log(Number(mass)));
    };
    expect(off('40')).toBeLessThan(2e-4);
    expect(off('40')).toBeGreaterThan(off('160') * 8);
  });
});

// V. Pestun, arXiv:0712.2824, section 4.4, at b = 1; T. Okuda, V. Pestun, arXiv:1004.1222, at any b.
describe('N = 4 is a Vandermonde determinant', () => {
  const latexOf = (of: Theory) => {
    const left = simplify(productOf(s4, of, 'one-loop'), 'elementary', s4.geometry(of));
    return {
      left,
      latex: productLatex(of.groups, left, { kind: 'function', notation: 0 }).map((piece) => piece.latex),
    };
  };

  test.each(['SU(3)', 'U(2)', 'USp(4)', 'G2', 'SO(7)'])('round, %s', (group) => {
    for (const lines of [
      ['supersymmetry 4', `gauge G = ${group}`],
      [`gauge G = ${group}`, 'matter G', 'hyper a adj'],
    ]) {
      const { left } = latexOf(theory(...lines));
      expect(left.filter(isSpecial)).toEqual([]);
      expect(left.every(({ name, power, half }) => name === 'linear' && power === 2 && half)).toBe(true);
    }
  });

  test('in print', () => {
    expect(latexOf(theory('supersymmetry 4', 'gauge G = SU(3)')).latex).toEqual([
      '\\prod_{a<c}(\\sigma_a-\\sigma_c)^{2}',
    ]);
    expect(latexOf(theory('sphere S4, b = 5/4', 'supersymmetry 4', 'gauge G = SU(3)')).latex).toEqual([
      '\\prod_{a<c}(\\sigma_a-\\sigma_c)^{2}',
      '\\frac{1}{\\left[\\Upsilon_{b}\\left(\\frac{1}{b}\\right)\\right]^{2}}',
    ]);
  });

  // V. Pestun, arXiv:0712.2824, section 4.4: alpha^2 H(i alpha)^2 over the positive roots, 1/H(i w) over the weights.
  test('the round vector multiplet in H', () => {
    const of = theory('gauge G = SU(2)', 'matter G', 'hyper q 4*fund');
    const left = simplify(productOf(s4, of, 'one-loop'), 'functions', s4.geometry(of));
    const pieces = productLatex(of.groups, left, { kind: 'function', notation: 1 }).map((piece) => piece.latex);
    expect(pieces).toEqual([
      '(2\\sigma)^{2}\\,\\left[H(2i\\sigma)\\right]^{2}',
      '\\frac{1}{\\left[H(i\\sigma)\\right]^{8}}',
    ]);
  });

  test('on the ellipsoid, at the mass i(b - 1/b)/2 too', () => {
    const lines = ['sphere S4, b = 5/4', 'gauge G = SU(3)'];
    const star = theory(...lines, 'flavor A = U(1)', 'matter G A', 'hyper a adj 1');
    const four = theory('supersymmetry 4', ...lines);
    const where = { sigma1: '0.3', sigma2: '-1.1', m: Form.i.scale(0).add(Form.i.mul(Form.ratio(9, 40))) };
    const value = ballAt(s4, four, 'one-loop', where);
    expect(distance(ballAt(s4, star, 'one-loop', where), value)).toBe(0);
    const upsilon = ballAt(s4, theory('sphere S4, b = 5/4', 'flavor A = U(1)', 'matter A', 'hyper a 1'), 'a', {
      m: where.m,
    });
    const squares = 1.4 ** 2 * 0.5 ** 2 * 1.9 ** 2;
    expect(numberOf(value).re / (squares * numberOf(upsilon).re ** 2)).toBeCloseTo(1, 13);
  });
});
