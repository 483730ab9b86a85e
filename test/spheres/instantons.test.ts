import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { Gaussian } from '../../engine/exact/gaussian';
import { evaluateCoefficient } from '../../engine/numeric/coefficient';
import { instantonCoefficient } from '../../engine/spheres/instantons';
import { type InstantonData, nekrasovTerms } from '../../engine/spheres/nekrasov';
import { s4 } from '../../engine/spheres/s4';
import { arm, boxesOf, countYoungTuples, leg, youngTuples } from '../../engine/spheres/young-diagrams';
import type { Theory } from '../../engine/theory/theory';
import { theoryOf } from '../theory/theory-text';
import { distance, exact, type Point, valuesAt } from './evaluate';
import { row } from './fixture';

const theory = (...lines: string[]) => theoryOf(lines, {}, s4);
const i = (text: string) => Form.i.mul(exact(text));

function coefficientAt(of: Theory, order: number, point: Point, exchanged = false) {
  const sum = instantonCoefficient(of, order, exchanged);
  if (sum.kind === 'refused') throw new Error(sum.message);
  return evaluateCoefficient(sum.terms, valuesAt(s4, of, point), 20);
}

/** The exact value as text. */
function exactly(of: Theory, order: number, point: Point): string {
  const found = coefficientAt(of, order, point);
  return found.kind === 'value' ? `${found.exact}` : found.kind;
}

// Partitions: 1, 1, 2, 3, 5, 7, 11, 15, 22, 30, 42 (Euler); conjugation swaps arms and legs.
test('Young diagrams', () => {
  expect([0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10].map((n) => youngTuples(1, n).length)).toEqual([
    1, 1, 2, 3, 5, 7, 11, 15, 22, 30, 42,
  ]);
  for (const [count, boxes] of [
    [2, 5],
    [3, 4],
    [4, 3],
  ] as const) {
    expect(youngTuples(count, boxes).length).toBe(countYoungTuples(count, boxes));
  }
  // Hook lengths of (3, 1): 4, 2, 1, 1.
  const hooks = boxesOf([3, 1]).map(({ row: p, column: q }) => arm([3, 1], p, q) + leg([3, 1], p, q) + 1);
  expect(hooks).toEqual([4, 2, 1, 1]);
});

// Sources of the rows: test/fixtures/spheres/spheres.json.
describe('closed values', () => {
  const b = 'sphere S4, b = 3/5';

  test.each([1, 2, 3])('U(1) without matter, %i instantons', (k) => {
    expect(exactly(theory(b, 'gauge G = U(1)'), k, { sigma: '1/3' })).toBe(row(`nekrasov-U1-${k}`).exact);
    // On the round sphere single diagrams diverge; there e1 e2 is 1, too.
    expect(exactly(theory('gauge G = U(1)'), k, { sigma: '1/3' })).toBe(row(`nekrasov-U1-${k}`).exact);
  });

  test.each([1, 2])('SU(2) without matter against the Virasoro algebra, %i instantons', (k) => {
    for (const group of ['SU(2)', 'USp(2)']) {
      expect(exactly(theory(b, `gauge G = ${group}`), k, { sigma: i('2/7') })).toBe(row(`nekrasov-SU2-${k}`).exact);
    }
  });

  test.each([1, 2])('U(2) with four flavours against a conformal block, %i instantons', (k) => {
    const of = theory(
      'sphere S4, b = 3/4',
      'gauge G = U(2)',
      'flavor F = U(2)',
      'flavor H = U(2), mass mu',
      'matter G F H',
      'hyper q fund fund 1',
      'hyper p anti 1 fund',
    );
    // Q/2 + i m = Q - m1 -+ mt1 for fundamentals; Q/2 - i mu = m0 +- mt0 for antifundamentals.
    const half = exact('25/24');
    const fundamental = (mass: string) => Form.i.mul(exact(mass).sub(half));
    const anti = (mass: string) => Form.i.mul(exact(mass).sub(half));
    const point: Point = {
      sigma1: i('-2/7'),
      sigma2: i('2/7'),
      m1: fundamental('31/99'),
      m2: fundamental('13/99'),
      mu1: anti('12/35'),
      mu2: anti('2/35'),
    };
    expect(exactly(of, k, point)).toBe(row(`nekrasov-U2-Nf4-${k}`).exact);
  });

  test.each([1, 2, 3, 4])('adjoint matter of U(1), %i instantons', (k) => {
    const data: InstantonData = {
      nodes: [{ colours: [Form.zero], fundamental: [], adjoint: [exact('1/3')] }],
      bifundamental: [],
      epsilon1: exact('3/5'),
      epsilon2: exact('5/3'),
    };
    const found = evaluateCoefficient(nekrasovTerms(data, [[k]]) ?? [], () => null, 20);
    expect(found.kind === 'value' ? `${found.exact}` : found.kind).toBe(row(`nekrasov-U1-star-${k}`).exact);
  });

  // The adjoint mass at which all but the number of diagrams cancels; U(3) on the round sphere and on an ellipsoid.
  test.each(['', ', b = 3/5'])('adjoint matter of U(3) at the mass iQ/2%s', (squashing) => {
    const of = theory(`sphere S4${squashing}`, 'gauge G = U(3)', 'flavor A = U(1)', 'matter G A', 'hyper a adj 1');
    const m = squashing === '' ? i('1') : i('17/15');
    for (const k of [1, 2, 3]) {
      expect(exactly(of, k, { sigma1: '1/3', sigma2: '-1/7', sigma3: '2', m })).toBe(
        row(`nekrasov-U3-star-${k}`).exact,
      );
    }
  });

  // T. Okuda, V. Pestun, arXiv:1004.1222: no instanton corrections.
  test('N = 4 has none', () => {
    for (const squashing of ['', ', b = 3/5']) {
      const four = theory(`sphere S4${squashing}`, 'supersymmetry 4', 'gauge G = SU(3)');
      expect(exactly(four, 2, { sigma1: '1/3', sigma2: '-1/7' })).toBe('0');
    }
    const star = theory('gauge G = SU(3)', 'flavor A = U(1)', 'matter G A', 'hyper a adj 1');
    expect(exactly(star, 2, { sigma1: '1/3', sigma2: '-1/7', m: '0' })).toBe('0');
  });
});

describe('laws', () => {
  const flavoured = (squashing: string) =>
    theory(`sphere S4${squashing}`, 'gauge G = U(2)', 'flavor F = U(2)', 'matter G F', 'hyper q fund fund');

  // Weyl group of U(2), and the two directions of the plane: N. Nekrasov, hep-th/0206161.
  test('permuting the colours, and exchanging b with 1/b, changes nothing', () => {
    const rational = fc
      .tuple(fc.integer({ min: -20, max: 20 }), fc.integer({ min: 1, max: 9 }))
      .map(([n, d]) => `${n}/${d}`);
    fc.assert(
      fc.property(rational, rational, rational, rational, fc.constantFrom('', ', b = 4/3'), (s, t, m, n, squashing) => {
        const of = flavoured(squashing);
        const point = { sigma1: s, sigma2: t, m1: m, m2: n };
        const value = exactly(of, 2, point);
        expect(exactly(of, 2, { ...point, sigma1: t, sigma2: s })).toBe(value);
        const other = coefficientAt(of, 2, point, true);
        expect(other.kind === 'value' ? `${other.exact}` : other.kind).toBe(value);
      }),
      { numRuns: 12 },
    );
  });

  // Single diagrams diverge on the round sphere and at equal colours; the sum is continuous.
  test('the limit of the round sphere and of equal colours', () => {
    const lines = ['gauge G = SU(2)', 'flavor F = U(1)', 'matter G F', 'hyper q 2*fund 1'];
    const near = (b: string, sigma: string) => {
      const found = coefficientAt(theory(`sphere S4, b = ${b}`, ...lines), 3, { sigma, m: '1/5' });
      return found.kind === 'value' ? (found.exact?.re.toNumber() ?? Number.NaN) : Number.NaN;
    };
    const limit = near('1', '0');
    expect(Math.abs(limit)).toBeGreaterThan(0);
    for (const size of ['1e-3', '1e-4']) {
      const value = near(`1+${size}`, size);
      expect(Math.abs(value / limit - 1)).toBeLessThan(40 * Number(size));
      expect(value).not.toBe(limit);
    }
  });

  // sqrt(2)^2 and 2 are one number: floating arithmetic against the exact one.
  test('values at irrational points', () => {
    const at = (b: string, sigma: Form) => {
      const of = theoryOf(['sphere S4, b = beta', 'gauge G = SU(2)'], { beta: b }, s4);
      const found = coefficientAt(of, 2, { sigma });
      if (found.kind !== 'value') throw new Error(found.kind);
      return found;
    };
    const root = Form.call('sqrt', exact('2'));
    const irrational = at('sqrt(2)', root);
    expect(irrational.exact).toBe(null);
    // Z depends on e1 e2 = 1, (e1 + e2)^2 = 9/2, a^2 = -2 alone: the pure coefficient as a rational function of them.
    const [s2, a2] = [4.5, -2];
    const delta = s2 / 4 - a2;
    const c = 1 + 6 * s2;
    const inverse = (4 * delta + c / 2) / (4 * delta * (2 * delta + 1) * (4 * delta + c / 2) - 36 * delta * delta);
    expect(Number(irrational.value.re) * 2 ** -irrational.value.bits).toBeCloseTo(inverse, 14);
    expect(distance(at('sqrt(1/2)', root).value, irrational.value)).toBe(0);
  });

  // A factor Q/2 + i m + .. for every box: N. Nekrasov, hep-th/0206161; the scale of the gauge group without the flavour
  // is q i m.
  test('a heavy flavour decouples, up to 1/m', () => {
    const lines = ['sphere S4, b = 3/5', 'gauge G = SU(2)'];
    const flavoured = theory(...lines, 'flavor A = U(1)', 'matter G A', 'hyper q fund 1');
    for (const k of [1, 2, 3]) {
      const pure = coefficientAt(theory(...lines), k, { sigma: '2/7' });
      const off = (size: number) => {
        const heavy = coefficientAt(flavoured, k, { sigma: '2/7', m: `${size}` });
        if (pure.kind !== 'value' || heavy.kind !== 'value' || !pure.exact || !heavy.exact) throw new Error(heavy.kind);
        const scale = Gaussian.i.mul(Gaussian.of(size));
        const scaled = Array.from({ length: k }).reduce<Gaussian>((value) => value.mul(scale.inverse()), heavy.exact);
        const { re, im } = scaled.mul(pure.exact.inverse());
        return Math.hypot(re.toNumber() - 1, im.toNumber());
      };
      expect(off(1e6)).toBeLessThan(1e-5);
      // One instanton of SU(2) has no correction at all.
      if (k === 1) expect(off(1e6)).toBe(0);
      else expect(off(1e6)).toBeGreaterThan(off(1e8) * 50);
    }
  });

  test('a pole of the whole coefficient is called one', () => {
    // e1 + e2 = 2 a at k = 1: N. Nekrasov, hep-th/0206161.
    expect(exactly(theory('gauge G = SU(2)'), 1, { sigma: i('1') })).toBe('pole');
  });
});

describe('what is refused', () => {
  test.each([
    ['USp(4) needs other formulas', ['gauge G = USp(4)']],
    ['this theory has no gauge group', ['matter', 'hyper q']],
    ['the multiplet `s` is none', ['gauge G = SU(3)', 'matter G', 'hyper q fund', 'hyper s sym2']],
    ['the multiplet `h` is none', ['gauge G = SU(2)', 'matter G', 'halfhyper h fund']],
  ])('%s', (words, lines) => {
    const sum = instantonCoefficient(theory(...lines), 1);
    expect(sum.kind === 'refused' ? sum.message : '').toContain(words);
  });

  test('too many diagrams', () => {
    const sum = instantonCoefficient(theory('gauge G = SU(3)'), 20);
    expect(sum.kind === 'refused' ? sum.message : '').toMatch(/too many Young diagrams with 20 boxes/);
  });

  // Eight half-hypers of SU(2) in the vector of SO(8) are four hypers with its four masses.
  test('half-hypers in pairs are hypers', () => {
    const half = theory('gauge G = SU(2)', 'flavor F = SO(8)', 'matter G F', 'halfhyper h fund vector');
    const whole = theory('gauge G = SU(2)', 'flavor F = U(4)', 'matter G F', 'hyper h fund fund');
    const point = { sigma: '1/3', m1: '1/2', m2: '-1/5', m3: '2/7', m4: '1' };
    expect(exactly(half, 2, point)).toBe(exactly(whole, 2, point));
  });
});
