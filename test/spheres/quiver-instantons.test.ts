import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { evaluateCoefficient } from '../../engine/numeric/coefficient';
import { instantonCoefficient } from '../../engine/spheres/instantons';
import { s4 } from '../../engine/spheres/s4';
import type { SeriesOrder } from '../../engine/spheres/sphere';
import type { Theory } from '../../engine/theory/theory';
import { theoryOf } from '../theory/theory-text';
import { distance, exact, type Point, valuesAt } from './evaluate';
import { row } from './fixture';

const theory = (...lines: string[]) => theoryOf(lines, {}, s4);
const i = (text: string) => Form.i.mul(exact(text));

/** The exact value as text. */
function exactly(of: Theory, order: SeriesOrder, point: Point, exchanged = false): string {
  const sum = instantonCoefficient(of, order, exchanged);
  if (sum.kind === 'refused') throw new Error(sum.message);
  const found = evaluateCoefficient(sum.terms, valuesAt(s4, of, point), 20);
  return found.kind === 'value' ? `${found.exact}` : found.kind;
}

const rational = fc
  .tuple(fc.integer({ min: -20, max: 20 }), fc.integer({ min: 1, max: 9 }))
  .map(([n, d]) => `${n}/${d}`);

// Sources of the rows: test/fixtures/spheres/quivers.json.
describe('closed values', () => {
  // Q/2 - i m is a mass of the conformal block where m stands for i (mass - Q/2).
  const mass = (text: string) => Form.i.mul(exact(text).sub(exact('25/24')));
  const chain = (...bifundamental: string[]) =>
    theory(
      'sphere S4, b = 3/4',
      'gauge G = U(2)',
      'gauge H = U(2), coulomb tau',
      'flavor A = U(2), mass p',
      'flavor B = U(1), mass m',
      'flavor C = U(2), mass r',
      'matter G H A B C',
      'hyper x anti 1 fund 0 1',
      ...bifundamental,
      'hyper z 1 fund 1 0 fund',
    );
  const point: Point = {
    ...{ sigma1: i('-2/7'), sigma2: i('2/7'), tau1: i('-1/5'), tau2: i('1/5') },
    ...{ p1: mass('13/42'), p2: mass('1/42'), m: mass('3/8'), r1: mass('31/99'), r2: mass('13/99') },
  };

  test.each([
    [1, 0],
    [0, 1],
    [1, 1],
    [2, 0],
    [0, 2],
    [2, 1],
    [1, 2],
    [2, 2],
  ] as const)('U(2) x U(2) against a conformal block of five points, orders %i and %i', (j, k) => {
    const wanted = row(`quiver-U2-U2-${j}${k}`).exact;
    expect(exactly(chain('hyper y fund anti 1 1 1'), [j, k], point)).toBe(wanted);
    // A hyper is its conjugate: opposite charge, opposite representation.
    expect(exactly(chain('hyper y anti fund 1 -1 1'), [j, k], point)).toBe(wanted);
  });

  test('U(2) against a conformal block of four points at order 3', () => {
    const of = theory(
      'sphere S4, b = 3/4',
      'gauge G = U(2)',
      'flavor A = U(2), mass p',
      'flavor C = U(2), mass r',
      'matter G A C',
      'hyper x anti fund 1',
      'hyper z fund 1 fund',
    );
    const { sigma1, sigma2, p1, p2, r1, r2 } = point;
    const at = Object.fromEntries(Object.entries({ sigma1, sigma2, p1, p2, r1, r2 }).map(([k, v]) => [k, v ?? '0']));
    expect(exactly(of, 3, at)).toBe(row('quiver-U2-3').exact);
  });

  // Single diagrams diverge on the round sphere; the Virasoro algebra has nothing special there.
  test.each([
    [1, 1],
    [2, 2],
  ] as const)('U(2) x U(2) on the round sphere, orders %i and %i', (j, k) => {
    const round = theoryOf(
      ['gauge G = U(2)', 'gauge H = U(2), coulomb tau', 'flavor A = U(2), mass p', 'flavor B = U(1), mass m']
        .concat('flavor C = U(2), mass r', 'matter G H A B C', 'hyper x anti 1 fund 0 1')
        .concat('hyper y fund anti 1 1 1', 'hyper z 1 fund 1 0 fund'),
      {},
      s4,
    );
    const one = (text: string) => Form.i.mul(exact(text).sub(Form.one));
    const at = {
      ...point,
      ...{ p1: one('13/42'), p2: one('1/42'), m: one('3/8'), r1: one('31/99'), r2: one('13/99') },
    };
    expect(exactly(round, [j, k], at)).toBe(row(`quiver-U2-U2-round-${j}${k}`).exact);
  });

  // What the note beside a value says of the U(1) factor: (M1 + M2)(M3 + M4)/2 with M1 + M2 = 2 Q - 2 m2, M3 + M4 = 2 m0.
  test('SU(2) with four flavours without its U(1) factor is a conformal block', () => {
    const of = theory('sphere S4, b = 3/4', 'gauge G = SU(2)', 'flavor F = U(4)', 'matter G F', 'hyper q fund fund');
    const { r1, r2 } = point;
    // A fundamental of mass m and an antifundamental of mass -m are the same.
    const minus = (value: string) => mass(value).neg();
    const at: Point = {
      sigma: i('2/7'),
      ...{ m1: r1 ?? '0', m2: r2 ?? '0', m3: minus('13/42'), m4: minus('1/42') },
    };
    const halfQ = exact('25/24');
    const entered = [at.m1, at.m2, at.m3, at.m4].map((m) => halfQ.add(Form.i.mul(m as Form)));
    const [one, two, three, four] = entered as [Form, Form, Form, Form];
    const exponent = one.add(two).mul(three.add(four)).scale(Rational.of(1, 2));
    // (1 - q)^-exponent = sum of (exponent)_n/n! q^n.
    const series = [Form.one];
    for (let n = 0; n < 3; n++) {
      const next = (series[n] as Form).mul(exponent.add(Form.number(n))).scale(Rational.of(1, n + 1));
      series.push(next);
    }
    const whole = [Form.one, ...[1, 2, 3].map((k) => exact(exactly(of, k, at)))];
    for (const k of [1, 2, 3]) {
      const quotient = Form.sum(series.slice(0, k + 1).map((term, n) => term.mul(whole[k - n] as Form)));
      expect(`${quotient.toGaussian()}`).toBe(row(`block-${k}`).exact);
    }
  });

  test.each([1, 2, 3])('adjoint matter of U(2) against a conformal block on the torus, %i instantons', (k) => {
    const of = theory('sphere S4, b = 3/4', 'gauge G = U(2)', 'flavor A = U(1)', 'matter G A', 'hyper x adj 1');
    const { sigma1, sigma2, m } = { sigma1: i('-2/7'), sigma2: i('2/7'), m: mass('3/8') };
    expect(exactly(of, k, { sigma1, sigma2, m })).toBe(row(`nekrasov-U2-star-${k}`).exact);
    const special = theory('sphere S4, b = 3/4', 'gauge G = SU(2)', 'flavor A = U(1)', 'matter G A', 'hyper x adj 1');
    expect(exactly(special, k, { sigma: sigma1, m })).toBe(row(`nekrasov-U2-star-${k}`).exact);
  });

  test('SU(2) x SU(2) against a contour integral', () => {
    for (const groups of [
      ['SU(2)', 'SU(2)'],
      ['USp(2)', 'SU(2)'],
    ]) {
      const of = theory(
        'sphere S4, b = 3/4',
        `gauge G = ${groups[0]}`,
        `gauge H = ${groups[1]}, coulomb tau`,
        'flavor A = U(1)',
        'matter G H A',
        'hyper y fund fund 1',
      );
      const at = { sigma: i('-2/7'), tau: i('-1/5'), m: i('-1/3') };
      expect(exactly(of, [1, 1], at)).toBe(row('quiver-SU2-SU2-11').exact);
    }
  });
});

describe('laws', () => {
  const quiver = (b: string, ...rows: string[]) =>
    theory(
      `sphere S4${b}`,
      'gauge G = U(2)',
      'gauge H = U(1), coulomb tau',
      'flavor A = U(1)',
      'flavor F = U(1), mass p',
      'matter G H A F',
      ...rows,
    );
  const matter = ['hyper y fund -1 1 0', 'hyper x fund 0 0 1', 'hyper z 1 1 0 1'];
  const at = fc.record({ sigma1: rational, sigma2: rational, tau: rational, m: rational, p: rational });

  // Weyl group of U(2), and the two directions of the plane: N. Nekrasov, hep-th/0206161.
  test('permuting the colours, and exchanging b with 1/b, changes nothing', () => {
    fc.assert(
      fc.property(at, fc.constantFrom('', ', b = 4/3'), (point, b) => {
        const of = quiver(b, ...matter);
        const value = exactly(of, [1, 1], point);
        expect(exactly(of, [1, 1], { ...point, sigma1: point.sigma2, sigma2: point.sigma1 })).toBe(value);
        expect(exactly(of, [1, 1], point, true)).toBe(value);
      }),
      { numRuns: 8 },
    );
  });

  // Where a group has no instantons its colours are masses of the other: common practice, no source.
  test('at order zero of one group the bifundamental is flavours of the other', () => {
    fc.assert(
      fc.property(at, (point) => {
        const of = quiver(', b = 3/5', ...matter);
        const { sigma1, sigma2, tau, m, p } = point;
        const minus = (x: string, y: string) => exact(x).sub(exact(y));
        const first = theory(
          ...['sphere S4, b = 3/5', 'gauge G = U(2)', 'flavor F = U(2)', 'matter G F', 'hyper q fund fund'],
        );
        expect(exactly(of, [2, 0], point)).toBe(exactly(first, 2, { sigma1, sigma2, m1: minus(m, tau), m2: p }));
        const second = theory(
          ...['sphere S4, b = 3/5', 'gauge G = U(1)', 'flavor F = U(3)', 'matter G F', 'hyper q 1 fund'],
        );
        const masses = { m1: minus(`-${sigma1}`.replace('--', ''), m), m2: minus(`-${sigma2}`.replace('--', ''), m) };
        expect(exactly(of, [0, 2], point)).toBe(exactly(second, 2, { sigma: tau, ...masses, m3: p }));
      }),
      { numRuns: 8 },
    );
  });

  // Limits of single diagrams at b^2 = 2 in floating arithmetic.
  test('exchanging b with 1/b changes nothing at irrational b', () => {
    const of = theoryOf(
      ['sphere S4, b = beta', 'gauge G = SU(2)', 'gauge H = SU(2), coulomb tau', 'flavor A = U(1)'].concat(
        'matter G H A',
        'hyper y fund fund 1',
        'hyper x 2*fund 1 0',
      ),
      { beta: 'sqrt(2)' },
      s4,
    );
    const at = { sigma: Form.call('sqrt', exact('2')).scale(Rational.of(1, 5)), tau: '1/3', m: '1/4' };
    const value = (exchanged: boolean) => {
      const sum = instantonCoefficient(of, 4, exchanged);
      if (sum.kind === 'refused') throw new Error(sum.message);
      const found = evaluateCoefficient(sum.terms, valuesAt(s4, of, at), 20);
      if (found.kind !== 'value') throw new Error(found.kind);
      return found.value;
    };
    expect(distance(value(true), value(false))).toBe(0);
  });

  test('one variable for all groups adds up', () => {
    const of = quiver(', b = 3/5', ...matter);
    const point = { sigma1: '1/3', sigma2: '-2/5', tau: '1/7', m: '2/3', p: '-1/4' };
    const sum = [
      [2, 0],
      [1, 1],
      [0, 2],
    ].map((orders) => instantonCoefficient(of, orders));
    const terms = sum.flatMap((one) => (one.kind === 'sum' ? one.terms : []));
    const found = evaluateCoefficient(terms, valuesAt(s4, of, point), 20);
    expect(exactly(of, 2, point)).toBe(found.kind === 'value' ? `${found.exact}` : '');
    expect(exactly(of, [0, 0], point)).toBe('1');
  });

  // SU(2) has no antifundamental of its own; a hyper is its conjugate; N. Nekrasov, hep-th/0206161.
  test('a bifundamental with SU(2) can be written either way, and as half-hypers', () => {
    const of = (...lines: string[]) =>
      theory('sphere S4, b = 3/5', 'flavor A = U(1)', 'flavor F = SU(2), mass p', ...lines);
    const two = ['gauge G = SU(2)', 'gauge H = SU(3), coulomb tau', 'matter G H A F'];
    const turned = ['gauge H = SU(3), coulomb tau', 'gauge G = SU(2), coulomb sigma', 'matter G H A F'];
    const point = { sigma: '2/7', tau1: '1/3', tau2: '-2/5', m: '1/4' };
    const value = exactly(of(...two, 'hyper y fund fund 1 1'), [1, 1], point);
    expect(exactly(of(...two, 'hyper y fund anti -1 1'), [1, 1], point)).toBe(value);
    expect(exactly(of(...turned, 'hyper y fund fund 1 1'), [1, 1], point)).toBe(value);
    expect(exactly(of(...two, 'hyper y fund anti 1 1'), [1, 1], point)).not.toBe(value);
    const doublets = ['gauge G = SU(2)', 'gauge H = SU(2), coulomb tau', 'matter G H A F'];
    const at = { sigma: '2/7', tau: '1/3', m: '1/4', p: '1/4' };
    const half = exactly(of(...doublets, 'halfhyper y fund fund 0 fund'), [1, 1], at);
    expect(exactly(of(...doublets, 'hyper y fund fund 1 1'), [1, 1], at)).toBe(half);
  });

  // Without matter between them two groups know nothing of each other.
  test('a product of groups without bifundamentals is a product', () => {
    const both = theory('gauge G = SU(2)', 'gauge H = SU(3), coulomb tau');
    const point = { sigma: '1/3', tau1: '1/5', tau2: '-2/7' };
    const one = exactly(theory('gauge G = SU(2)'), 1, { sigma: '1/3' });
    const other = exactly(theory('gauge H = SU(3), coulomb tau'), 1, { tau1: '1/5', tau2: '-2/7' });
    const product = exact(one).mul(exact(other));
    expect(exactly(both, [1, 1], point)).toBe(`${product.toGaussian()}`);
  });
});

describe('what is refused', () => {
  test.each([
    ['a fundamental of one group times an antifundamental of the other; `y` is', [1, 1], ['hyper y fund fund 1']],
    ['the multiplet `y` is none', [1, 1], ['hyper y adj fund 1']],
    ['the multiplet `y` is none', [1, 1], ['hyper y fund anti fund']],
    ['takes one order for each gauge group, here 3 (G, H, K); 1 are given', [1], ['hyper y fund anti 1']],
    ['too many Young diagrams with 30 boxes', 30, ['hyper y fund anti 1']],
    ['too many Young diagrams with 9 boxes', [3, 3, 3], ['hyper y fund anti 1']],
  ] as const)('%s', (words, order, rows) => {
    const of = theory(
      'gauge G = U(2)',
      'gauge H = U(3), coulomb tau',
      'gauge K = SU(2), coulomb rho',
      'matter G H K',
      ...rows,
    );
    const sum = instantonCoefficient(
      of,
      typeof order === 'number' ? order : [...order, ...(order.length === 2 ? [0] : [])],
    );
    expect(sum.kind === 'refused' ? sum.message : '').toContain(words);
  });

  test('a group of the quiver that is neither U(n) nor SU(n)', () => {
    const of = theory('gauge G = U(2)', 'gauge H = USp(4), coulomb tau', 'matter G H', 'hyper y fund fund');
    const sum = instantonCoefficient(of, [1, 0]);
    expect(sum.kind === 'refused' ? sum.message : '').toContain('USp(4) needs other formulas');
  });
});
