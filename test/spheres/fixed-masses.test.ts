import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { withFixedMasses } from '../../engine/spheres/fixed-masses';
import { s2 } from '../../engine/spheres/s2';
import { s3 } from '../../engine/spheres/s3';
import { s4 } from '../../engine/spheres/s4';
import { s5 } from '../../engine/spheres/s5';
import type { Sphere } from '../../engine/spheres/sphere';
import { answer, failureOf, problemsOf } from '../requests/answers';
import { theoryOf } from '../theory/theory-text';
import { distance, exact, type Point, productBall, productOf, valuesAt } from './evaluate';

const CASES: [string, Sphere, string[], readonly string[], Point][] = [
  [
    'S2',
    s2,
    ['gauge G = U(2)', 'flavor F = SU(3)', 'matter G F R', 'chiral q fund fund 1/3', 'chiral p 1 adj 1/2'],
    ['m1', 'm2'],
    { flux1: '2', flux2: '-1' },
  ],
  [
    'S3, one of two flavour groups',
    s3,
    ['sphere S3, b = 6/5', 'gauge G = U(2)', 'flavor F = SU(2)', 'flavor A = U(1), mass mu']
      .concat(['matter G F A R', 'chiral q fund fund 1 1/3', 'chiral p anti 1 -2 1/2'])
      .concat('chiral a adj 1 1 1/5'),
    ['mu'],
    { m: '3/10' },
  ],
  [
    'S4, half-hypers',
    s4,
    ['sphere S4, b = 7/5', 'gauge G = SU(2)', 'flavor F = SO(8)', 'matter G F', 'halfhyper h fund vector'],
    ['m1', 'm2', 'm3', 'm4'],
    {},
  ],
  [
    'S5',
    s5,
    ['gauge G = SU(3)', 'flavor F = U(2)', 'matter G F', 'hyper q fund fund', 'hyper s sym2 1', 'hyper z 1 sym2'],
    ['m1', 'm2'],
    {},
  ],
];

// Nothing outside is needed: the weights of the flavour groups are put in before instead of after.
test.each(CASES)(
  '%s: a product at given masses is the product at these masses',
  (_name, sphere, lines, masses, more) => {
    const of = theoryOf(lines, {}, sphere);
    const raw = productOf(sphere, of, 'one-loop');
    const free = of.groups
      .filter(({ role }) => role === 'gauge')
      .flatMap(({ coordinates, dependent }) => coordinates.filter((name) => !dependent.has(name)));
    // Off the tenths by different thousandths, so that no root or weight vanishes.
    const place = (k: number) => fc.integer({ min: -90, max: 90 }).map((n) => `${(10 * n + 1 + 2 * k * k) / 1000}`);
    const names = [...free, ...masses];
    fc.assert(
      fc.property(fc.tuple(...names.map((_, k) => place(k))), (at) => {
        const point = { ...more, ...Object.fromEntries(names.map((name, k) => [name, at[k] as string])) };
        const fixed = new Map(masses.map((name) => [name, exact(point[name] as string)]));
        const given = withFixedMasses(of, raw, fixed, sphere.geometry(of));
        const values = valuesAt(sphere, of, point);
        const left = given.flatMap(
          ({ weights }) => weights?.parts.map(({ group }) => of.groups[group]?.coordinates) ?? [],
        );
        expect(left.flat().filter((name) => masses.includes(name ?? ''))).toEqual([]);
        expect(distance(productBall(given, values, 18), productBall(raw, values, 18))).toBe(0);
      }),
      { numRuns: 4 },
    );
    const partly = new Map(masses.slice(1).map((name) => [name, Form.zero]));
    if (masses.length > 1) expect(withFixedMasses(of, raw, partly, [])).toEqual(raw);
  },
);

const star = (sphere: string, group: string, ...lines: string[]) => [
  ...lines,
  'theory t',
  `  sphere ${sphere}`,
  `  gauge G = ${group}`,
  '  flavor A = U(1)',
  '  matter G A',
  '  hyper a adj 1',
  '',
];

/** Pieces of the elementary formula, and the first thing said of it. */
function formula(...lines: string[]): { pieces: string[]; note: string } {
  const result = answer(...lines, 'formula t as elementary');
  if (result.kind !== 'formula' || result.formula.kind !== 'formula') throw new Error(failureOf(result));
  return { pieces: result.formula.pieces.map(({ latex }) => latex), note: result.formula.notes[0] ?? '' };
}

describe('an adjoint hyper at special masses', () => {
  // V. Pestun, arXiv:0712.2824, section 4.4; T. Okuda, V. Pestun, arXiv:1004.1222.
  test('on S4 leaves the Vandermonde determinant', () => {
    expect(formula(...star('S4', 'SU(3)', 'let m = 0'))).toEqual({
      pieces: ['\\prod_{a<c}(\\sigma_a-\\sigma_c)^{2}'],
      note: 'Holds at $m=0$.',
    });
    const squashed = (mass: string, beta = 'let beta = 5/4') =>
      formula(...star('S4, b = beta', 'SU(2)', beta, `let m = ${mass}`));
    expect(squashed('i(beta - 1/beta)/2').pieces).toEqual([
      '(2\\sigma)^{2}',
      '\\frac{1}{\\Upsilon_{b}\\left(\\frac{1}{b}\\right)}',
    ]);
    expect(squashed('-i(beta - 1/beta)/2').pieces).toEqual(['(2\\sigma)^{2}', '\\frac{1}{\\Upsilon_{b}(b)}']);
    // For every b: the mass follows the slider.
    expect(squashed('i(beta - 1/beta)/2', 'let beta = 5/4 in 1 .. 2').note).toBe(
      'Holds at $m=\\frac{ib}{2}-\\frac{i}{2b}$.',
    );
    // Typed as numbers, b is printed as a number, too.
    expect(formula(...star('S4, b = 5/4', 'SU(2)', 'let m = 9i/40'))).toEqual({
      pieces: ['(2\\sigma)^{2}', '\\frac{1}{\\Upsilon_{5/4}\\left(\\frac{4}{5}\\right)}'],
      note: 'Holds at $m=\\frac{9i}{40}$.',
    });
    expect(formula(...star('S4', 'SU(2)', 'let x = 1/2', 'let m = x - 1/2')).pieces).toEqual(['(2\\sigma)^{2}']);
  });

  // H.-C. Kim, S. Kim, arXiv:1206.6339.
  test('on S5 leaves a Chern-Simons matrix model', () => {
    expect(formula(...star('S5', 'SU(3)', 'let m = i/2'))).toEqual({
      pieces: [
        '\\prod_{a<c}\\left[2\\sinh\\pi(\\sigma_a-\\sigma_c)\\right]^{2}',
        '\\frac{1}{\\left[S_3(1)\\right]^{2}}',
      ],
      note: 'Holds at $m=\\frac{i}{2}$.',
    });
    const periods = ['let u = 1', 'let v = 6/5', 'let w = 9/10'];
    const named = star('S5, w1 = u, w2 = v, w3 = w', 'SU(2)', ...periods, 'let m = i(u + v - w)/2');
    expect(formula(...named).pieces).toEqual([
      '4\\sinh\\left(\\frac{2\\pi\\sigma}{\\omega_2}\\right)\\,\\sinh\\left(\\frac{2\\pi\\sigma}{\\omega_1}\\right)',
      '\\frac{1}{S_3(\\omega_3\\,|\\,\\omega)}',
    ]);
    const numbers = star('S5, w1 = 1, w2 = 6/5, w3 = 9/10', 'SU(2)', 'let m = 13i/20');
    expect(formula(...numbers).pieces[0]).toBe('4\\sinh\\left(\\frac{5\\pi\\sigma}{3}\\right)\\,\\sinh(2\\pi\\sigma)');
  });

  test('where nothing cancels, or the product is infinite, the mass stays a symbol', () => {
    for (const mass of ['1/7', 'i', '0 in -1 .. 1']) {
      const { pieces, note } = formula(...star('S4', 'SU(2)', `let m = ${mass}`));
      expect(pieces.join(' '), mass).toContain('m\\pm 2\\sigma');
      expect(note, mass).not.toContain('Holds');
    }
  });

  // The neutral component has its zero at m = iQ/2: the definition of Upsilon.
  test('the infinite product is called a pole', () => {
    expect(failureOf(answer(...star('S4', 'SU(2)', 'let m = i'), 'value one-loop of t at sigma = 1'))).toContain(
      'pole',
    );
  });
});

// s_b(x - ib/2)/s_b(x + ib/2) = 2 cosh(pi b x): L. D. Faddeev, R. M. Kashaev, A. Y. Volkov, hep-th/0006156.
test('two chirals on S3 at the mass where they leave a hyperbolic cosine', () => {
  const lines = (parameters: string[], b: string) => [
    ...parameters,
    'theory t',
    `  sphere S3, b = ${b}`,
    '  gauge G = U(1)',
    '  flavor A = U(1)',
    '  matter    G  A  R',
    '  chiral q  1  1  1/2',
    '  chiral p -1  1  1/2',
    '',
  ];
  const named = lines(['let beta = 5/4', 'let m = i(1/beta - beta)/4'], 'beta');
  expect(formula(...named).pieces).toEqual(['\\frac{1}{2\\cosh(\\pi b\\sigma)}']);
  const value = answer(...named, 'value one-loop of t at sigma = 0.3');
  if (value.kind !== 'value') throw new Error(failureOf(value));
  expect(Number(value.value.re)).toBeCloseTo(0.5 / Math.cosh(Math.PI * 1.25 * 0.3), 14);
});

describe('a mass named as a parameter', () => {
  test('has its value in numbers, unless it is set', () => {
    const of = star('S4', 'SU(2)', 'let m = 1/5');
    const value = (lines: string[], request: string) => {
      const result = answer(...lines, request);
      if (result.kind !== 'value') throw new Error(failureOf(result));
      return result;
    };
    const free = star('S4', 'SU(2)');
    const at = value(of, 'value one-loop of t at sigma = 1/3');
    expect(at.value).toEqual(value(free, 'value one-loop of t at sigma = 1/3, m = 1/5').value);
    expect(at.notes.join()).not.toContain('Masses not set');
    const set = value(of, 'value one-loop of t at sigma = 1/3, m = 1/2');
    expect(set.value).toEqual(value(free, 'value one-loop of t at sigma = 1/3, m = 1/2').value);
  });

  test('but no mass that follows from others, and no Coulomb parameter', () => {
    const taken = (group: string, ...lines: string[]) =>
      problemsOf(...lines, 'theory t', '  sphere S4', '  gauge G = SU(2)', `  ${group}`);
    expect(taken('flavor F = SU(2)', 'let m = 1')).toEqual([]);
    expect(taken('flavor F = SU(3)', 'let m1 = 1')).toEqual([]);
    expect(taken('flavor F = SU(3)', 'let m3 = 1')[0]).toMatch(
      /^5:3 error: The coordinates of `F` would be called `m3`/,
    );
    expect(taken('flavor F = SU(2)', 'let sigma = 1')[0]).toMatch(/^4:3 error: The coordinates of `G` would be called/);
  });
});
