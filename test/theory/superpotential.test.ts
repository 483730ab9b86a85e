import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { superpotential } from '../../engine/theory/checks/superpotential';
import { says, theoryOf, verdict } from './theory-text';

/** Verdicts on neutrality and on R of each monomial, in order. */
function verdicts(lines: string[], parameters: Record<string, string> = {}): string[] {
  return says(superpotential, theoryOf(lines, parameters)).map((line) => line.split(':')[0] as string);
}

// Invariant tensors as listed by R. Slansky, Phys. Rept. 79 (1981) 1.
describe('invariants of simple groups', () => {
  test.each([
    ['E6', ['27', '27', '27'], 'a b c', 'holds'],
    ['E6', ['27', '27*', '27'], 'a b c', 'fails'],
    ['E6', ['27'], 'a^3', 'holds'],
    ['E7', ['56'], 'a^2', 'fails'],
    ['E7', ['56'], 'a^4', 'holds'],
    ['E8', ['248'], 'a^2', 'holds'],
    ['SU(5)', ['alt2', 'alt2', 'fund'], 'a b c', 'holds'],
    ['SU(5)', ['alt2', 'anti'], 'a b^2', 'fails'],
    ['SU(5)', ['alt2', '2*anti'], 'a b^2', 'holds'],
    ['SU(3)', ['fund', 'fund', 'fund'], 'a b c', 'holds'],
    ['SU(3)', ['fund'], 'a^3', 'fails'],
    ['SU(3)', ['sym2'], 'a^3', 'holds'],
    ['Spin(10)', ['16', '16', '10'], 'a b c', 'holds'],
    ['Spin(8)', ['8v', '8s', '8c'], 'a b c', 'holds'],
    ['USp(4)', ['fund'], 'a^2', 'fails'],
    ['USp(4)', ['2*fund'], 'a^2', 'holds'],
    ['USp(6)', ['fund', 'alt2'], 'a^2 b', 'fails'],
    ['SO(7)', ['vector'], 'a^2', 'holds'],
    ['G2', ['7', '7', '7'], 'a b c', 'holds'],
    ['G2', ['7'], 'a^3', 'fails'],
    ['F4', ['26'], 'a^3', 'holds'],
  ])('%s with %j: %s %s', (group, cells, monomial, expected) => {
    const rows = cells.map((cell, k) => `chiral ${'abc'[k]} ${cell} 2/3`);
    expect(verdicts([`gauge G = ${group}`, 'matter G R', ...rows, `superpotential ${monomial}`])[0]).toBe(expected);
  });
});

describe('several groups', () => {
  // The quartic of the conifold, epsilon epsilon Tr A B A B: I. Klebanov, E. Witten, hep-th/9807080.
  const conifold = [
    'gauge G = U(2)',
    'gauge H = U(2)',
    'flavor S = SU(2)',
    'flavor T = SU(2)',
    'matter G H S T R',
    'chiral A fund anti fund 1 1/2',
    'chiral B anti fund 1 fund 1/2',
  ];

  test('squares of bifundamentals are symmetrised', () => {
    expect(verdicts([...conifold, 'superpotential A^2 B^2'])).toEqual(['holds', 'holds']);
  });

  test('what is missing is named', () => {
    const [neutral] = says(superpotential, theoryOf([...conifold, 'superpotential A^2 B']));
    expect(neutral).toBe(
      'fails: $A^{2}\\,B$ is not neutral: its charge under $G=\\mathrm{U}(2)$ is $2\\cdot 1-1=1$, its charge under ' +
        '$H=\\mathrm{U}(2)$ is $2\\cdot (-1)+1=-1$ and it has no singlet of $T=\\mathrm{SU}(2)$.',
    );
  });

  test('higher powers of bifundamentals are left open where there are singlets', () => {
    expect(verdicts([...conifold, 'superpotential A^4 B^4'])[0]).toBe('unknown');
    expect(verdicts([...conifold, 'superpotential A^3 B^4'])[0]).toBe('fails');
  });

  test('the name of a hyper stands for either of its chirals', () => {
    const lines = ['gauge G = U(1)', 'matter G R', 'hyper q 1 1/2', 'chiral s 0 1'];
    expect(verdicts([...lines, 'superpotential s q^2'])).toEqual(['holds', 'holds']);
    expect(verdicts([...lines, 'superpotential s q'])).toEqual(['fails', 'fails']);
  });
});

// R(W) = 2; sums by hand.
describe('R-charge', () => {
  const lines = (r: string) => [
    'gauge G = U(1)',
    'matter G R',
    `chiral q 1 r`,
    'chiral p -1 r',
    `chiral s 0 ${r}`,
    'superpotential s p q',
  ];
  const sentence = (r: string, values: Record<string, string>) => says(superpotential, theoryOf(lines(r), values))[1];

  test('holds as an identity', () => {
    expect(sentence('2-2r', { r: '1/7' })).toBe('holds: $s\\,p\\,q$ has $R=(2-2r)+r+r=2$.');
  });

  test('holds at the given values only', () => {
    expect(sentence('1', { r: '1/2' })).toMatch(/^holds: .*which is \$2\$ at the given values\.$/);
  });

  test('fails by how much', () => {
    expect(sentence('1', { r: '2/5' })).toMatch(/^fails: .*\$\\frac\{1\}\{5\}\$ too little at the given values\.$/);
    expect(sentence('3/2', { r: 'sqrt(2)/2' })).toMatch(
      /^fails: .*\$\\approx 0\.91421\$ too much at the given values\.$/,
    );
  });

  test('exact irrational values are compared exactly', () => {
    expect(sentence('2-sqrt(2)', { r: 'sqrt(2)/2' })).toMatch(/^holds/);
  });
});

test('the order of fields and groups does not matter', () => {
  const cell = fc.constantFrom('1', 'fund', 'adj', 'sym2');
  const charge = fc.integer({ min: -2, max: 2 });
  const field = fc.record({ cell, charge, power: fc.integer({ min: 1, max: 2 }) });
  fc.assert(
    fc.property(fc.array(field, { minLength: 2, maxLength: 3 }), (fields) => {
      const row = (k: number, a: string, b: string) => `chiral f${k} ${a} ${b} 1/2`;
      const monomial = fields.map(({ power }, k) => `f${k}^${power}`);
      const one = theoryOf([
        ...['gauge G = SU(2)', 'gauge H = U(1)', 'matter G H R'],
        ...fields.map((f, k) => row(k, f.cell, `${f.charge}`)),
        `superpotential ${monomial.join(' ')}`,
      ]);
      const other = theoryOf([
        ...['gauge H = U(1)', 'gauge G = SU(2)', 'matter H G R'],
        ...fields.map((f, k) => row(k, `${f.charge}`, f.cell)).reverse(),
        `superpotential ${monomial.reverse().join(' ')}`,
      ]);
      expect(verdict(superpotential, other)).toBe(verdict(superpotential, one));
    }),
    { numRuns: 60 },
  );
});
