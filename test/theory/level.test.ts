import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { levels } from '../../engine/theory/checks/level';
import type { Theory, TheoryGroup } from '../../engine/theory/theory';
import { consistencyRows } from './consistency-rows';
import { says, theoryOf, verdict } from './theory-text';

// Sums over the weights of every representation, made with GAP: test/fixtures/lie/README.md.
describe('levels allowed by the parity anomaly', () => {
  test.each(consistencyRows('3d-parity'))('$group with $matter', ({ group, matter, row }) => {
    const at = (level: string) =>
      verdict(
        levels,
        theoryOf([
          `gauge G = ${group}, level ${level}`,
          'matter G R',
          ...matter.map((cell, k) => `chiral q${k} ${cell} 1/2`),
        ]),
      );
    const [whole, half] = row.level === 'Z' ? ['holds', 'fails'] : ['fails', 'holds'];
    expect([at('0'), at('-1'), at('1/2'), at('-3/2')]).toEqual([whole, whole, half, half]);
  });

  test.each(consistencyRows('3d-parity-U'))(
    "$group with $matter at 2k = $row.kTimes2, 2k' = $row.kPrimeTimes2",
    (one) => {
      const { group, matter, row } = one;
      const abelian = row.N === 1 ? '' : `, abelian ${row.kPrimeTimes2}/2`;
      const theory = theoryOf([
        `gauge G = ${group}, level ${row.kTimes2}/2${abelian}`,
        'matter G R',
        ...matter.map((cell, k) => `chiral q${k} ${cell} 1/2`),
      ]);
      expect(verdict(levels, theory)).toBe(row.allowed ? 'holds' : 'fails');
    },
  );
});

describe('in words', () => {
  // k + (1/2) sum I2 for U(2) with three fundamentals: arithmetic by hand.
  test('the sum, and the levels that would do', () => {
    const theory = theoryOf(['gauge G = U(2), level 1', 'matter G R', 'chiral q 3*fund 1/2']);
    expect(says(levels, theory)).toEqual([
      'fails: Level of $G=\\mathrm{U}(2)$: $k+\\frac{1}{2}\\sum I_2=1+\\frac{3}{2}=\\frac{5}{2}$ is not an integer; ' +
        '$k=\\frac{1}{2}$ or $\\frac{3}{2}$ would do.',
    ]);
  });

  // U(2)_{1,1} with two fundamentals and one determinant: k' = 0 or 2, worked out with the lattice by hand.
  test('the level of the U(1) of U(n)', () => {
    const theory = theoryOf(['gauge G = U(2), level 1', 'matter G R', 'chiral q 2*fund 1/2', 'chiral d det 1/2']);
    expect(says(levels, theory)[1]).toMatch(/^fails: .*abelian part.*\$k'=0\$ or \$2\$ would do\.$/);
  });

  // Two U(1) and a bifundamental of charges (1, -1): K_12 = -1/2, so that the mixed level is half-integral.
  test('a mixed level of two gauge groups', () => {
    const matter = ['matter G H R', 'chiral b 1 -1 1/2'];
    const groups = ['gauge G = U(1), level 1/2', 'gauge H = U(1), level 1/2'];
    expect(verdict(levels, theoryOf([...groups, ...matter]))).toBe('fails');
    expect(verdict(levels, theoryOf([...groups, 'mixed G H = 1/2', ...matter]))).toBe('holds');
  });

  // Closset et al., arXiv:1206.5218: levels of gauge and background fields together obey the anomaly rule.
  test('a half-integral mixed level with a background fails', () => {
    const lines = ['gauge G = U(1), level 1/2', 'flavor A = U(1)', 'matter G A R', 'chiral q 1 1 1/2'];
    expect(verdict(levels, theoryOf(lines))).toBe('fails');
    expect(says(levels, theoryOf(lines))[1]).toContain("k_{GG'}=-\\frac{1}{2}$ or $\\frac{1}{2}$ would do");
    expect(verdict(levels, theoryOf([...lines, 'mixed A G = 1/2']))).toBe('holds');
    // The same theory with the charge of q moved from A to the background's mixing with G.
    const moved = [
      'gauge G = U(1), level 1/2',
      'flavor A = U(1)',
      'mixed A G = -1/2',
      'matter G A R',
      'chiral q 1 0 1/2',
    ];
    expect(verdict(levels, theoryOf(moved))).toBe('fails');
  });

  test('hypers never shift a level by a half, half-hypers count as one chiral', () => {
    const usp = (row: string) => verdict(levels, theoryOf(['gauge G = USp(4)', 'matter G R', row]));
    expect(usp('hyper q fund 1/2')).toBe('holds');
    expect(usp('halfhyper q fund 1/2')).toBe('fails');
  });

  // SO(3)_k = SU(2)_{2k}, with k an integer on spin manifolds; Spin(3) is SU(2).
  test.each([
    ['SO(3)', '1', '1', 'holds'],
    ['SO(3)', '1/2', '1', 'fails'],
    ['SO(3)', '0', 'vector', 'holds'],
    ['Spin(3)', '1/2', '1', 'holds'],
    ['Spin(3)', '1/4', '2', 'holds'],
    ['Spin(3)', '0', '2', 'fails'],
    ['SO(4)', '0', '[2,0]', 'holds'],
    ['Spin(4)', '0', '[1,0]', 'fails'],
    ['Spin(4)', '0', '[1,1]', 'holds'],
    ['Spin(4)', '1/2', '[1,0]+[0,1]', 'holds'],
  ])('%s at level %s with %s', (group, level, cell, expected) => {
    const theory = theoryOf([`gauge G = ${group}, level ${level}`, 'matter G R', `chiral q ${cell} 1/2`]);
    expect(verdict(levels, theory)).toBe(expected);
  });
});

test('the order of groups and multiplets does not matter', () => {
  const cells = fc.record({
    a: fc.constantFrom('1', 'fund', 'anti', 'det', 'sym2', 'adj', 'fund.det^-1'),
    b: fc.constantFrom('1', 'fund', '[2]', '[3]'),
    c: fc.integer({ min: -2, max: 2 }),
  });
  const level = fc.integer({ min: -4, max: 4 });
  fc.assert(
    fc.property(fc.array(cells, { minLength: 1, maxLength: 4 }), level, level, level, (rows, k, l, m) => {
      const group = {
        A: `gauge A = U(2), level ${k}/2`,
        B: `gauge B = SU(2), level ${l}/2`,
        C: `gauge C = U(1), level ${m}/2`,
      };
      const forward = [
        ...[group.A, group.B, group.C, 'matter A B C R'],
        ...rows.map(({ a, b, c }, i) => `chiral q${i} ${a} ${b} ${c} 1/2`),
      ];
      const backward = [
        ...[group.C, group.A, group.B, 'matter R C B A'],
        ...rows.map(({ a, b, c }, i) => `chiral q${i} 1/2 ${c} ${b} ${a}`).reverse(),
      ];
      const verdicts = (lines: string[]) =>
        says(levels, theoryOf(lines))
          .map((line) => line.split(':')[0])
          .sort();
      expect(verdicts(backward)).toEqual(verdicts(forward));
    }),
    { numRuns: 40 },
  );
});

// The condition in full: K_eff is an integer on all pairs of the cocharacter basis, half of it on the simple coroots;
// summed over every weight in printed coordinates.
test('the sums for each group say the same as the whole lattice', () => {
  const cells: Record<string, string[]> = {
    'U(2)': ['fund', 'anti', 'det', 'sym2', 'sym2.det^-1', 'adj', '(3,0)'],
    'U(3)': ['fund', 'alt2', 'det^2', 'adj', 'sym2'],
    'SU(4)': ['fund', 'alt2', 'sym2'],
    'SO(3)': ['vector', '[4]'],
    'Spin(3)': ['[1]', '[2]', '[3]'],
    'SO(4)': ['[2,0]', '[0,2]', '[1,1]', '[3,1]'],
    'Spin(4)': ['[1,0]', '[0,1]', '[1,1]', '[3,0]'],
    'SO(5)': ['vector', 'adj'],
    'Spin(5)': ['spinor', 'vector'],
    'Spin(6)': ['spinor', 'vector'],
    'USp(6)': ['fund', 'alt3', 'alt2'],
    G2: ['fund'],
  };
  const cases = fc.constantFrom(...Object.keys(cells)).chain((group) =>
    fc.record({
      group: fc.constant(group),
      matter: fc.array(fc.constantFrom(...(cells[group] as string[])), { maxLength: 3 }),
      level: fc.integer({ min: -6, max: 6 }),
      abelian: fc.integer({ min: -6, max: 6 }),
    }),
  );
  fc.assert(
    fc.property(cases, ({ group, matter, level, abelian }) => {
      const options = `level ${level}/4${group.startsWith('U(') ? `, abelian ${abelian}/2` : ''}`;
      const theory = theoryOf([
        `gauge G = ${group}, ${options}`,
        'matter G R',
        ...matter.map((cell, k) => `chiral q${k} ${cell} 1/2`),
      ]);
      expect(verdict(levels, theory)).toBe(onWholeLattice(theory) ? 'holds' : 'fails');
    }),
    { numRuns: 150 },
  );
});

function onWholeLattice(theory: Theory): boolean {
  const { group, level, abelianLevel } = theory.groups[0] as TheoryGroup;
  const k = level?.toRational()?.toNumber() ?? 0;
  const own = abelianLevel?.toRational()?.toNumber() ?? k;
  const numbers = (vector: readonly { toNumber(): number }[]) => vector.map((entry) => entry.toNumber());
  const dot = (a: readonly number[], b: readonly number[]) => a.reduce((sum, x, i) => sum + x * (b[i] as number), 0);
  const sum = (a: readonly number[]) => a.reduce((total, x) => total + x, 0);
  const effective = (x: readonly number[], y: readonly number[]): number => {
    let total = k * group.levelScale.toNumber() * dot(x, y);
    if (abelianLevel !== null) total += ((own - k) / x.length) * sum(x) * sum(y);
    for (const { representations } of theory.multiplets) {
      for (const orbit of representations[0]?.orbits() ?? []) {
        const { denominator, vectors, width } = orbit.vectors();
        for (let row = 0; row < vectors.length; row += width) {
          const weight = Array.from(vectors.subarray(row, row + width), (entry) => entry / denominator);
          total += (orbit.multiplicity * dot(weight, x) * dot(weight, y)) / 2;
        }
      }
    }
    return total;
  };
  const isInteger = (value: number) => Math.abs(value - Math.round(value)) < 1e-9;
  const basis = group.cocharacters.map(numbers);
  const coroots = group.simpleCoroots.map(numbers);
  return (
    basis.every((x) => basis.every((y) => isInteger(effective(x, y)))) &&
    coroots.every((coroot) => isInteger(effective(coroot, coroot) / 2))
  );
}
