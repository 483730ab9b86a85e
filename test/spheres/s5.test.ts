import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { productLatex } from '../../engine/latex/product';
import { evaluatePrecise } from '../../engine/numeric/precise';
import { simplify } from '../../engine/product/simplify';
import { isOpen } from '../../engine/spheres/quantity';
import { s5 } from '../../engine/spheres/s5';
import type { Theory } from '../../engine/theory/theory';
import { theoryOf } from '../theory/theory-text';
import { ballAt, distance, grid, logAt, type Point, productBall, productOf, realProgram, valuesAt } from './evaluate';
import { reference, row } from './fixture';

const theory = (...lines: string[]) => theoryOf(lines, {}, s5);
const SQUASHED = 'sphere S5, w1 = 1, w2 = 6/5, w3 = 9/10';

const expectRow = (value: number, id: string, tolerance: number) =>
  expect(Math.abs(value / reference(id).re - 1), `${id}: ${value}`).toBeLessThan(tolerance);

/** S_3'(0)/2 pi on the round sphere, for each Cartan direction. */
const CARTAN = reference('s5-cartan').re / (2 * Math.PI);

/** Z of a theory of rank 1: its integral over the Cartan algebra with the constants of the measure. */
function rankOne(of: Theory, point: Point): number {
  const step = 1 / 24;
  const sigma = grid(6, step);
  const { re } = realProgram(productOf(s5, of, 'integrand'), ['sigma'], valuesAt(s5, of, point))([sigma]);
  return (CARTAN / 2) * step * re.reduce((sum, value) => sum + value, 0);
}

// Sources of the rows: test/fixtures/spheres/spheres.json.
describe('perturbative partition functions', () => {
  test('SU(2) without and with one flavour at infinite coupling', () => {
    expectRow(Math.log(rankOne(theory('gauge G = SU(2)'), {})), 's5-SU2-Nf0', 1e-13);
    const one = theory('gauge G = USp(2)', 'matter G', 'hyper q fund');
    expectRow(Math.log(rankOne(one, {})), 's5-SU2-Nf1', 1e-13);
  });

  test('N = 1* at the mass i/2 is a Chern-Simons matrix model', () => {
    const star = theory('gauge G = SU(2), coupling g', 'flavor A = U(1)', 'matter G A', 'hyper a adj 1');
    const point = { g: Form.call('sqrt', Form.number(8)), m: Form.i.mul(Form.ratio(1, 2)) };
    // The neutral component gives 1/S_3(1) = 2 pi/S_3'(0), so that the constant of the measure drops out.
    expectRow(rankOne(star, point), 's5-N1-star', 1e-12);
  });

  test('SU(3) at infinite coupling', () => {
    const of = theory('gauge G = SU(3)');
    const step = 1 / 10;
    const axis = grid(5, step);
    const x = Float64Array.from({ length: axis.length ** 2 }, (_, k) => axis[k % axis.length] as number);
    const y = Float64Array.from(x, (_, k) => axis[Math.floor(k / axis.length)] as number);
    const { re } = realProgram(productOf(s5, of, 'integrand'), ['sigma1', 'sigma2'], valuesAt(s5, of, {}))([x, y]);
    const sum = re.reduce((total, value) => total + value, 0);
    expectRow(Math.log(((CARTAN * step) ** 2 * sum) / 6), 's5-SU3', 1e-13);
  });
});

describe('hypers', () => {
  const digitsOf = (of: Theory) => {
    const result = evaluatePrecise(productOf(s5, of, 'one-loop'), valuesAt(s5, of, {}), 34);
    if (result.kind !== 'value') throw new Error(result.kind);
    // F = -log Z.
    return `${(-result.log.re * 10n ** 32n) >> BigInt(result.log.bits)}`.slice(0, 28);
  };
  const wanted = (id: string) => (row(id).value ?? [''])[0].replace('0.', '').slice(0, 28);

  test('free, on the round and on a squashed sphere, to 27 digits', () => {
    expect(digitsOf(theory('matter', 'hyper q'))).toBe(wanted('s5-free-hyper'));
    expect(digitsOf(theory(SQUASHED, 'matter', 'hyper q'))).toBe(wanted('s5-squashed-hyper'));
  });

  // K. Intriligator, D. R. Morrison, N. Seiberg, hep-th/9702198: a heavy hyper of charge 1 shifts the level by -1/2
  // times the sign of its mass, up to e^{-2 pi |m|}; exp(-(pi k/3) sigma^3) has the third derivative -2 pi k.
  test.each([1, -1])('a heavy one shifts the level, sign of the mass %i', (side) => {
    const of = theory('gauge G = U(1)', 'flavor A = U(1)', 'matter G A', 'hyper q 1 1');
    const h = 1 / 64;
    const log = (sigma: number) => logAt(s5, of, 'q', { sigma: `${sigma}`, m: `${8 * side}` }, 40);
    const third = (log(2 * h) - 2 * log(h) + 2 * log(-h) - log(-2 * h)) / (2 * h ** 3);
    expect(-third / (2 * Math.PI)).toBeCloseTo(-0.5 * side, 6);
  });

  test('one and its conjugate are the same, two halves are one', () => {
    const of = (...lines: string[]) => theory(SQUASHED, 'gauge G = USp(4)', 'flavor A = U(1)', ...lines);
    const at = { sigma1: '0.3', sigma2: '-1.1', m: '0.2' };
    const value = (...lines: string[]) => ballAt(s5, of(...lines), 'one-loop', at);
    expect(distance(value('matter G A', 'hyper q fund 1'), value('matter G A', 'hyper q fund -1'))).toBe(0);
    expect(
      distance(value('matter G', 'hyper q alt2'), value('matter G', 'hyper q alt2', 'hyper p fund')),
    ).toBeGreaterThan(0.1);
    expect(distance(value('matter G', 'halfhyper q 2*fund'), value('matter G', 'hyper q fund'))).toBe(0);
  });
});

describe('classical part', () => {
  const at = (lines: string[], point: Point) => logAt(s5, theory(...lines), 'classical', point);

  // C.-M. Chang, M. Fluder, Y.-H. Lin, Y. Wang, arXiv:1710.08418, section 2, in the normalisation of the notebook.
  test('Tr sigma^2 and Tr sigma^3 over the fundamental representation, over the product of the periods', () => {
    const point = { sigma1: '0.5', sigma2: '-0.2', g: '2' };
    const square = 0.25 + 0.04 + 0.09;
    const cube = 0.125 - 0.008 - 0.027;
    const lines = ['gauge G = SU(3), coupling g, level 2'];
    const wanted = Math.PI ** 3 * square + ((2 * Math.PI) / 3) * cube;
    expect(at(lines, point)).toBeCloseTo(-wanted, 13);
    expect(at([SQUASHED, ...lines], point)).toBeCloseTo(-wanted / (1.2 * 0.9), 13);
    expect(at(['gauge G = USp(4), coupling g'], point)).toBeCloseTo(-(Math.PI ** 3) * 2 * 0.29, 12);
  });

  // SU(2), USp(n), SO(n) and the exceptional groups have no symmetric cubic form on these coordinates: lie algebra.
  test('a level does nothing where the cubic trace vanishes', () => {
    for (const group of ['SU(2)', 'USp(4)', 'SO(7)', 'G2']) {
      expect(productOf(s5, theory(`gauge G = ${group}, level 1`), 'classical')).toEqual([]);
    }
  });
});

describe('laws', () => {
  const lines = [
    'gauge G = SU(3), level 1/2, coupling g',
    'flavor F = SU(2)',
    'matter G F',
    'hyper q fund fund',
    'hyper s sym2 1',
  ];
  const point = { sigma1: '0.3', sigma2: '-0.8', m: '0.25', g: '3' };
  const value = (sphere: string, where: Point = point) =>
    ballAt(s5, theory(`sphere S5${sphere}`, ...lines), 'integrand', where, 20);

  test('the order of the periods does not matter', () => {
    const reference = value(', w1 = 1, w2 = 6/5, w3 = 9/10');
    expect(distance(value(', w1 = 9/10, w2 = 1, w3 = 6/5'), reference)).toBe(0);
    expect(distance(value(', w1 = 6/5, w2 = 1, w3 = 9/10'), reference)).toBe(0);
    expect(distance(value(', w1 = 6/5, w2 = 1, w3 = 1'), reference)).toBeGreaterThan(1e-3);
  });

  test('one scale of the periods, of sigma and of 1/g^2 drops out', () => {
    const scaled = {
      sigma1: '0.6',
      sigma2: '-1.6',
      m: '0.5',
      g: Form.number(3).mul(Form.call('sqrt', Form.ratio(1, 2))),
    };
    // Multiple sines of equal weights are homogeneous; the cubic term scales by itself.
    expect(distance(value(', w1 = 2, w2 = 2, w3 = 2', scaled), value(''))).toBe(0);
  });

  test('Weyl groups of gauge and flavour act trivially', () => {
    expect(distance(value('', { ...point, sigma1: '-0.8', sigma2: '0.3' }), value(''))).toBe(0);
    expect(distance(value('', { ...point, sigma1: '0.5', sigma2: '-0.8' }), value(''))).toBe(0);
    expect(distance(value('', { ...point, m: '-0.25' }), value(''))).toBe(0);
    expect(distance(value('', { ...point, sigma1: '-0.3', sigma2: '0.8' }), value(''))).toBeGreaterThan(1e-3);
  });
});

// S_3(z)/S_3(z + w3) = S_2(z | w1, w2), and S_2(iy | w1, w2) S_2(-iy | w1, w2) = 4 sinh(pi y/w1) sinh(pi y/w2):
// N. Kurokawa, S. Koyama, Forum Math. 15 (2003) 839; the matrix model: H.-C. Kim, S. Kim, arXiv:1206.6339.
describe('N = 2', () => {
  const reduced = (...lines: string[]) => {
    const of = theory(...lines);
    const left = simplify(productOf(s5, of, 'one-loop'), 'elementary', s5.geometry(of));
    const latex = productLatex(of.groups, left, { kind: 'function', notation: 0 }).map((piece) => piece.latex);
    return { left, latex };
  };

  test.each(['SU(2)', 'SU(3)', 'U(2)', 'USp(4)', 'SO(7)', 'G2'])(
    '%s leaves hyperbolic sines and a constant',
    (group) => {
      const { left } = reduced('supersymmetry 2', `gauge G = ${group}`);
      expect(left.filter(isOpen)).toEqual([]);
      const sines = left.filter(({ name }) => name === 'hyperbolicSine');
      expect(sines.length).toBeGreaterThan(0);
      expect(
        sines.every(({ power, half, argument }) => power === 2 && half && argument.equals(Form.symbol('@w'))),
      ).toBe(true);
    },
  );

  test('in print', () => {
    expect(reduced('supersymmetry 2', 'gauge G = SU(3)').latex).toEqual([
      '\\prod_{a<c}\\left[2\\sinh\\pi(\\sigma_a-\\sigma_c)\\right]^{2}',
      '\\frac{1}{\\left[S_3(1)\\right]^{2}}',
    ]);
    expect(reduced(SQUASHED, 'supersymmetry 2', 'gauge G = SU(2)').latex).toEqual([
      '4\\sinh\\left(\\frac{2\\pi\\sigma}{\\omega_2}\\right)\\,\\sinh\\left(\\frac{2\\pi\\sigma}{\\omega_1}\\right)',
      '\\frac{1}{S_3(\\omega_3\\,|\\,\\omega)}',
    ]);
  });

  test.each(['', ', w1 = 1, w2 = 6/5, w3 = 9/10'])('is the adjoint hyper of its mass%s', (squashing) => {
    const lines = [`sphere S5${squashing}`, 'gauge G = SU(3)'];
    const star = theory(...lines, 'flavor A = U(1)', 'matter G A', 'hyper a adj 1');
    const mass = Form.i.mul(squashing === '' ? Form.ratio(1, 2) : Form.ratio(13, 20));
    const at = { sigma1: '0.3', sigma2: '-0.8', m: mass };
    const two = theory('supersymmetry 2', ...lines);
    expect(distance(ballAt(s5, star, 'one-loop', at, 20), ballAt(s5, two, 'one-loop', at, 20))).toBe(0);
    const { left } = reduced('supersymmetry 2', ...lines);
    const reference = productBall(left, valuesAt(s5, two, at), 20);
    expect(distance(ballAt(s5, two, 'one-loop', at, 20), reference)).toBe(0);
  });
});
