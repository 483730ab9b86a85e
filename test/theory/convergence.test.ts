import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { convergence } from '../../engine/theory/checks/convergence';
import { says, theoryOf, verdict } from './theory-text';

const rows = (...cells: string[]) => ['matter G R', ...cells.map((cell, k) => `chiral q${k} ${cell}`)];

// Where the integral begins to converge: B. Willett, I. Yaakov, arXiv:1104.0487 for U(N), N_f (1 - R) > N - 1; the
// bounds for the other groups and for an adjoint come from the same R-charge of the monopole operators, by hand.
describe('bounds on R', () => {
  test.each([
    ['U(1), N_f = 1: R < 1', 'U(1)', (r: string) => [`1 ${r}`, `-1 ${r}`], '9/10', '1'],
    ['U(2), N_f = 3: R < 2/3', 'U(2)', (r: string) => [`3*fund ${r}`, `3*anti ${r}`], '65/100', '2/3'],
    ['U(3), N_f = 4: R < 1/2', 'U(3)', (r: string) => [`4*fund ${r}`, `4*anti ${r}`], '49/100', '1/2'],
    [
      'U(3), N_f = 1, adjoint 1/3: R < 1/3',
      'U(3)',
      (r: string) => [`fund ${r}`, `anti ${r}`, 'adj 1/3'],
      '33/100',
      '1/3',
    ],
    ['SU(3), 3 + 3: R < 1/3', 'SU(3)', (r: string) => [`3*fund ${r}`, `3*anti ${r}`], '33/100', '1/3'],
    ['USp(4), 6 fundamentals: R < 1/3', 'USp(4)', (r: string) => [`6*fund ${r}`], '33/100', '1/3'],
    ['SO(5), 5 vectors: R < 2/5', 'SO(5)', (r: string) => [`5*vector ${r}`], '39/100', '2/5'],
    ['G2, 4 x 7: R < 1/4', 'G2', (r: string) => [`4*fund ${r}`], '24/100', '1/4'],
    ['E8, 3 adjoints: R < 2/3', 'E8', (r: string) => [`3*adj ${r}`], '66/100', '2/3'],
  ])('%s', (_name, group, matter, below, at) => {
    const verdictAt = (r: string) => verdict(convergence, theoryOf([`gauge G = ${group}`, ...rows(...matter(r))]));
    expect([verdictAt(below), verdictAt(at)]).toEqual(['holds', 'fails']);
  });
});

describe('in words', () => {
  test('how fast it falls, and where', () => {
    const theory = theoryOf(['sphere S3, b = 5/4', 'gauge G = U(2)', ...rows('3*fund 1/2', '3*anti 1/2')]);
    expect(says(convergence, theory)).toEqual([
      'holds: The integral over the Coulomb parameters converges absolutely; it falls slowest along ' +
        '$(\\sigma_1,\\sigma_2)=(1,0)\\,r$, as $e^{-\\pi Q R_V r}$ with $R_V=\\frac{1}{2}$.',
    ]);
  });

  // The N = 2 theory of one flavour with R = 11/10 has R_V = 1 - R = -1/10 both ways.
  test('where it diverges, and by how much', () => {
    expect(says(convergence, theoryOf(['gauge G = U(1)', ...rows('1 11/10', '-1 11/10')]))).toEqual([
      'fails: The integral over the Coulomb parameters diverges along $\\sigma=r$: $R_V=-\\frac{1}{10}$ is not positive, ' +
        'and no level turns the phase there.',
    ]);
  });

  test('nothing to say without gauge groups', () => {
    expect(says(convergence, theoryOf(['matter R', 'chiral x 1/3']))).toEqual([]);
  });
});

describe('oscillating integrals', () => {
  // k_eff = k + q^2 for two chirals of charge one at one end and k - q^2 at the other: level 1 turns the phase where
  // sigma > 0 only; level 2 everywhere.
  test.each([
    ['1', '13/10', 'fails'],
    ['2', '13/10', 'holds'],
    ['-2', '13/10', 'holds'],
    ['1', '9/10', 'holds'],
  ])('U(1) at level %s with two chirals of R = %s', (level, r, expected) => {
    expect(verdict(convergence, theoryOf([`gauge G = U(1), level ${level}`, ...rows(`2*1 ${r}`)]))).toBe(expected);
  });

  // A. Kapustin, B. Willett, I. Yaakov, arXiv:0909.4559: Gaussian integrals for every k other than zero.
  test.each(['SU(2)', 'U(3)', 'USp(4)', 'Spin(7)', 'G2', 'E6'])('pure Chern-Simons theory of %s', (group) => {
    const at = (level: number) => says(convergence, theoryOf([`gauge G = ${group}, level ${level}`, 'matter G R']))[0];
    expect(at(2)).toMatch(/^holds: .* by oscillation only/);
    expect(at(-3)).toMatch(/^holds: .* by oscillation only/);
    expect(at(0)).toMatch(/^fails/);
  });

  // A level matrix with a null vector, which lies inside a cone and not on a ray of the Coulomb branch.
  test.each([
    ['1', '1', '1', 'fails'],
    ['1', '1', '2', 'holds'],
    ['4', '1', '-2', 'fails'],
    ['4', '1', '2', 'fails'],
    ['0', '0', '1', 'holds'],
  ])('U(1) x U(1) with levels %s, %s and mixed level %s', (k, l, mixed, expected) => {
    const groups = [`gauge G = U(1), level ${k}`, `gauge H = U(1), level ${l}`, `mixed G H = ${mixed}`];
    expect(verdict(convergence, theoryOf([...groups, 'matter G H R']))).toBe(expected);
  });

  // O. Aharony, O. Bergman, D. Jafferis, J. Maldacena, arXiv:0806.1218: flat for equal fluxes, turned by the levels.
  test('U(2) x U(2) at opposite levels with two bifundamental hypers', () => {
    const abjm = (k: number, l: number) =>
      theoryOf([
        ...[`gauge G = U(2), level ${k}`, `gauge H = U(2), level ${l}`, 'matter G H R'],
        ...['hyper a fund anti 1/2', 'hyper b fund anti 1/2'],
      ]);
    expect(says(convergence, abjm(1, -1))[0]).toMatch(/^holds: .* by oscillation only/);
    expect(verdict(convergence, abjm(0, 0))).toBe('fails');
    // One level is enough: only equal fluxes are flat.
    expect(verdict(convergence, abjm(1, 0))).toBe('holds');
  });
});

describe('FI parameters', () => {
  // exp(2 pi i zeta sigma) with zeta = i t adds 2 t / Q to R_V in one direction and takes it away in the other.
  test.each([
    ['0.3i', 'holds'],
    ['0.5i', 'fails'],
    ['-0.5i', 'fails'],
    ['0.7', 'holds'],
    ['0.7 - 0.49i', 'holds'],
  ])('U(1) with one flavour of R = 1/2 and zeta = %s', (fi, expected) => {
    expect(verdict(convergence, theoryOf([`gauge G = U(1), fi ${fi}`, ...rows('1 1/2', '-1 1/2')]))).toBe(expected);
  });

  test('names without a value count as zero', () => {
    expect(verdict(convergence, theoryOf(['gauge G = U(1), fi zeta', ...rows('1 1/2', '-1 1/2')]))).toBe('holds');
  });
});

// The limits on weights and denominators are this project's own.
test('what would take too long is left open', () => {
  const large = theoryOf(['gauge G = SU(9)', ...rows('[2,1,0,0,0,0,0,1] 1/2')]);
  const fine = theoryOf(['gauge G = U(1)', ...rows('1/1009 1/2')]);
  expect([verdict(convergence, large), verdict(convergence, fine)]).toEqual(['unknown', 'unknown']);
});

test('irrational R-charges are left open at the border only', () => {
  const at = (r: string) => verdict(convergence, theoryOf(['gauge G = U(1)', ...rows('1 2-r', '-1 r')], { r }));
  // (1/2)(1 - (2 - r)) + (1/2)(1 - r) = 0, which doubles cannot tell.
  expect(at('sqrt(2)/2')).toBe('unknown');
  const off = (r: string) => verdict(convergence, theoryOf(['gauge G = U(1)', ...rows('1 r', '-1 r')], { r }));
  expect([off('sqrt(2)/2'), off('sqrt(2)')]).toEqual(['holds', 'fails']);
});

test('neither the order of groups and multiplets nor charge conjugation matters', () => {
  const dual: Record<string, string> = {
    fund: 'anti',
    anti: 'fund',
    adj: 'adj',
    det: 'det^-1',
    'det^-1': 'det',
    '1': '1',
  };
  const row = fc.record({
    a: fc.constantFrom(...Object.keys(dual)),
    b: fc.integer({ min: -2, max: 2 }),
    r: fc.integer({ min: 1, max: 11 }),
    kind: fc.constantFrom('chiral', 'hyper'),
  });
  const level = fc.integer({ min: -2, max: 2 });
  fc.assert(
    fc.property(fc.array(row, { minLength: 1, maxLength: 4 }), level, level, level, (matter, k, l, m) => {
      const groups = [`gauge A = U(2), level ${k}`, `gauge B = U(1), level ${l}`];
      const line = ({ kind, a, b, r }: (typeof matter)[number], i: number, conjugate = false) => {
        const cell = conjugate ? (dual[a] ?? '') : a;
        return `${kind} q${i} ${cell} ${conjugate ? -b : b} ${kind === 'hyper' ? '1/2' : `${r}/10`}`;
      };
      const mixed = `mixed A B = ${m}`;
      const one = verdict(
        convergence,
        theoryOf([...groups, mixed, 'matter A B R', ...matter.map((q, i) => line(q, i))]),
      );
      const turned = [...groups, mixed, 'matter A B R', ...matter.map((q, i) => line(q, i, true)).reverse()];
      const swapped = [...groups.toReversed(), mixed, 'matter A B R', ...matter.map((q, i) => line(q, i))];
      expect(verdict(convergence, theoryOf(turned))).toBe(one);
      expect(verdict(convergence, theoryOf(swapped))).toBe(one);
    }),
    { numRuns: 30 },
  );
});
