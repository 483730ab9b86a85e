import { describe, expect, test } from 'vitest';
import { answer, failureOf, problemsOf } from './answers';

// What a user is told is this project's own wording; each sentence has a place, a reason and a remedy. The physics
// behind the reasons: the sources of the sphere files.

const theory = (...lines: string[]) => ['theory t', ...lines.map((line) => `  ${line}`), ''];
const problems = (...lines: string[]) => problemsOf(...theory(...lines));

describe('options that a sphere does not take', () => {
  test.each([
    [
      ['sphere S2', 'gauge G = U(1), level 1'],
      '3:19 error: `level` is no option of a gauge group on S2: there is no Chern-Simons term in two dimensions; `theta` ' +
        'sets the theta angle. It takes `coulomb`, `fi`, `theta`.',
    ],
    [
      ['sphere S4', 'gauge G = SU(2), fi z'],
      '3:20 error: `fi` is no option of a gauge group on S4: a simple gauge group has no FI term, and the one of a U(1) ' +
        'breaks the R-symmetry that puts an N = 2 theory on the four-sphere. It takes `coulomb`, `coupling`.',
    ],
    [
      ['sphere S4', 'gauge G = SU(2), level 1'],
      '3:20 error: `level` is no option of a gauge group on S4: there is no Chern-Simons term in four dimensions. It ' +
        'takes `coulomb`, `coupling`.',
    ],
    [
      ['sphere S5', 'gauge G = USp(4), theta t'],
      '3:21 error: `theta` is no option of a gauge group on S5: the theta angle of USp(2n) is invisible in the ' +
        'perturbative part. It takes `coulomb`, `level`, `coupling`.',
    ],
    [
      ['sphere S5', 'gauge G = U(2), level 1, abelian 2'],
      '3:28 error: `abelian` is no option of a gauge group on S5: the cubic level of U(n) is one number; write `level`. ' +
        'It takes `coulomb`, `level`, `coupling`.',
    ],
    [
      ['sphere S2', 'gauge G = SU(2), theta t'],
      '3:20 error: SU(2) has no U(1) factor, so there is no theta term here. Leave out `theta`, or use U(n).',
    ],
    [
      ['sphere S4', 'gauge G = U(1)', 'gauge H = U(1)', 'mixed G H = 1'],
      '5:3 error: There is no mixed level on S4: there is no Chern-Simons term in four dimensions. Leave the line out.',
    ],
    [
      ['sphere S2', 'supersymmetry 4', 'gauge G = U(1)'],
      '3:3 error: S2 takes `supersymmetry 2`; `4` is not known here.',
    ],
  ])('%j', (lines, sentence) => {
    expect(problems(...lines)).toEqual([sentence]);
  });
});

describe('multiplets that a sphere does not take', () => {
  test.each([
    [
      'S2',
      'hyper q 1',
      '5:3 error: `hyper` does not exist on S2: it would be two chirals, one in the conjugate representation; write them ' +
        'as such; there are `chiral`, `twisted`.',
    ],
    [
      'S4',
      'chiral q 1',
      '5:3 error: `chiral` does not exist on S4: with eight supercharges matter comes in hypers, a chiral and its ' +
        'conjugate in each; there are `hyper`, `halfhyper`.',
    ],
    [
      'S5',
      'twisted q 1',
      '5:3 error: `twisted` does not exist on S5: twisted multiplets are peculiar to two dimensions; there are `hyper`, ' +
        '`halfhyper`.',
    ],
    [
      'S4',
      'halfhyper q 1',
      '5:3 error: A half-hyper needs a pseudoreal representation; the weights of `q` do not come in pairs. Write `hyper`.',
    ],
  ])('%s: %s', (sphere, row, sentence) => {
    expect(problems(`sphere ${sphere}`, 'gauge G = U(1)', 'matter G', row)).toEqual([sentence]);
  });

  test('an R-charge where it is fixed', () => {
    for (const sphere of ['S4', 'S5']) {
      expect(problems(`sphere ${sphere}`, 'gauge G = SU(2)', 'matter G R', 'hyper q fund 1/2')).toEqual([
        '5:16 error: The R-charge `1/2` is not possible here: this multiplet has R = 0. Leave it at that.',
      ]);
    }
  });
});

describe('squashings', () => {
  const halfPlane = (name: string) =>
    `the squashing may be complex, such as \`${name} = 5/4 + i/3\`, where it has one.`;
  const advice = (name: string) => `the squashing has to be a positive number, such as \`${name} = 5/4\`.`;

  test.each([
    ['S5, w1 = 0', `2:19 error: \`w1\` is zero: ${advice('w1')}`],
    ['S5, w2 = -1/2', `2:19 error: \`w2 = -1/2\` is negative: ${advice('w2')}`],
    ['S5, w3 = 2i', `2:19 error: \`w3 = 2i\` does not have a positive real part: ${halfPlane('w3')}`],
    ['S5, w1 = -1 + i', `2:19 error: \`w1 = -1 + i\` does not have a positive real part: ${halfPlane('w1')}`],
    ['S4, b = i', `2:18 error: \`b = i\` does not have a positive real part: ${halfPlane('b')}`],
    ['S3, b = 1 + i', `2:18 error: \`b = 1 + i\` is complex: ${advice('b')}`],
    [
      'S5, w1 = 1, w2 = 1/1000',
      '2:27 error: `w2 = 1/1000` is out of reach: the squashing has to lie between 1/100 and 100.',
    ],
    ['S4, b = -1', `2:18 error: \`b = -1\` is negative: ${advice('b')}`],
    ['S4, w1 = 1', '2:14 error: `w1` is no parameter of S4; it takes `b`.'],
    ['S2, b = 2', '2:14 error: `b` is no parameter of S2; it takes no parameter.'],
  ])('%s', (sphere, sentence) => {
    expect(problems(`sphere ${sphere}`, 'gauge G = SU(2)')).toEqual([sentence]);
  });
});

describe('fluxes', () => {
  const u1 = theory('sphere S2', 'gauge G = U(1)', 'matter G R', 'chiral q 1 1/2');
  const asked = (request: string, lines = u1) => failureOf(answer(...lines, request));

  test('have to be given, and to be integers', () => {
    expect(asked('value one-loop of t at sigma = 0')).toBe('Without a value: flux. Add `at flux = 1`.');
    expect(asked('value one-loop of t at sigma = 0, flux = 1/2')).toBe(
      'The flux `flux` has to be an integer; `1/2` is none.',
    );
    expect(asked('plot one-loop of t over flux = 0 .. 1 at sigma = 1')).toBe(
      'The flux `flux` takes integers only and is no axis of a plot.',
    );
  });

  test('exist on the two-sphere only', () => {
    const four = theory('sphere S4', 'gauge G = SU(2)');
    expect(asked('value one-loop of t at sigma = 1, flux = 1', four)).toBe(
      'This theory has no `flux`; what can be set is `sigma`.',
    );
  });

  // SO(5) has all integers, its double cover those of even sum: the spinor has weights (+-1/2, +-1/2).
  test('lie on the lattice of the group', () => {
    const lines = (group: string) => theory('sphere S2', `gauge G = ${group}`);
    const at = 'value vector of t at sigma1 = 0.3, sigma2 = 1, flux1 = 1, flux2 = 0';
    expect(asked(at, lines('SO(5)'))).toBe('value');
    expect(asked(at, lines('Spin(5)'))).toBe(
      '`flux1 = 1`, `flux2 = 0` is no flux of Spin(5): a weight of one of its representations would not be an integer on it.',
    );
    expect(asked(at.replace('flux2 = 0', 'flux2 = 3'), lines('Spin(5)'))).toBe('value');
    expect(asked(at.replace('flux2 = 0', 'flux2 = 1/2'), lines('SO(5)'))).toContain(
      'The flux `flux2` has to be an integer',
    );
  });

  test('times a fractional charge have no sign', () => {
    const half = theory('sphere S2', 'gauge G = U(1)', 'matter G R', 'chiral q 1/2 1/2');
    expect(asked('value one-loop of t at sigma = 0, flux = 1', half)).toBe(
      '(-1)^x has no value at x = 1/2: charges times fluxes are integers. Change the charges, or the fluxes.',
    );
  });
});

describe('points', () => {
  test('couplings, zeros and poles', () => {
    const four = theory('sphere S4', 'gauge G = SU(2), coupling g', 'flavor A = U(1)', 'matter G A', 'hyper q fund 1');
    expect(failureOf(answer(...four, 'value integrand of t at sigma = 1'))).toBe(
      'The coupling has no value: add `at g = 1`.',
    );
    expect(failureOf(answer(...four, 'value one-loop of t at sigma = 0.3, m = 0.3 + i'))).toBe(
      'The point is a pole of order 1: there is no value. Move it off the pole.',
    );
    const zero = answer(...four, 'value one-loop of t at sigma = 0');
    expect(zero.notes).toContain('The point is a zero of order 2.');
  });
});
