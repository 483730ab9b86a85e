import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { coulombBranch } from '../../engine/theory/checks/coulomb-branch';
import { weightSums } from '../../engine/theory/checks/gauge-weights';
import { growthOf } from '../../engine/theory/checks/growth';
import { lowestMonopole } from '../../engine/theory/checks/lowest-monopole';
import { monopoles } from '../../engine/theory/checks/monopoles';
import type { Theory } from '../../engine/theory/theory';
import { says, theoryOf, verdict } from './theory-text';

const four = (group: string, ...hypers: string[]) =>
  theoryOf([
    'supersymmetry 4',
    `gauge G = ${group}`,
    'matter G R',
    ...hypers.map((cell, k) => `hyper q${k} ${cell} 1/2`),
  ]);

const kind = (theory: Theory) => /The theory is (good|ugly|bad)/.exec(says(monopoles, theory)[0] ?? '')?.[1];

// D. Gaiotto, E. Witten, arXiv:0807.3720: U(N), SU(N), USp(2N), SO(N) with N_f fundamentals; G2 from its weights.
describe('good, ugly and bad', () => {
  test.each([
    ['U(1)', 'fund', 2, 1],
    ['U(2)', 'fund', 4, 3],
    ['U(3)', 'fund', 6, 5],
    ['U(4)', 'fund', 8, 7],
    ['SU(2)', 'fund', 3, null],
    ['SU(3)', 'fund', 5, null],
    ['SU(5)', 'fund', 9, null],
    ['USp(4)', 'fund', 5, null],
    ['USp(6)', 'fund', 7, null],
    ['SO(5)', 'vector', 4, null],
    ['SO(6)', 'vector', 5, null],
    ['SO(8)', 'vector', 7, null],
    ['G2', 'fund', 4, null],
  ])('%s with %s: good from %i on', (group, cell, good, ugly) => {
    const matter = (count: number) => (group === 'U(1)' ? `${count}*1` : `${count}*${cell}`);
    expect(kind(four(group, matter(good)))).toBe('good');
    expect(kind(four(group, matter(good - 1)))).toBe(ugly === null ? 'bad' : 'ugly');
    if (ugly !== null && ugly > 1) expect(kind(four(group, matter(ugly - 1)))).toBe('bad');
  });

  test('the dimension and the flux are named', () => {
    expect(says(monopoles, four('U(2)', '2*fund'))).toEqual([
      'fails: The theory is bad: the bare monopole operator has $\\Delta=0$ at flux $(1,0)$, below the bound ' +
        '$\\frac{1}{2}$; the R-symmetry at low energy is another one.',
    ]);
    expect(says(monopoles, four('SU(2)', '3*fund'))).toEqual([
      'holds: The theory is good: the smallest monopole operator has $\\Delta=1$ at flux $1$.',
    ]);
  });

  // Balanced linear quivers U(1) - U(2) - [3] are good; with a flavour less at the end they are not.
  test('a linear quiver', () => {
    const quiver = (flavours: number) =>
      theoryOf([
        ...['supersymmetry 4', 'gauge G = U(1)', 'gauge H = U(2)', 'matter G H R'],
        ...['hyper a 1 anti 1/2', `hyper b 0 ${flavours}*fund 1/2`],
      ]);
    expect([kind(quiver(3)), kind(quiver(2)), kind(quiver(1))]).toEqual(['good', 'ugly', 'bad']);
  });

  test('only of N = 4 theories without levels', () => {
    const lines = ['gauge G = U(1)', 'matter G R', 'hyper q 1 1/2'];
    expect(says(monopoles, theoryOf(lines))).toEqual([]);
    expect(verdict(monopoles, theoryOf(['supersymmetry 4', ...lines]))).toBe('holds');
    const levelled = ['supersymmetry 4', 'gauge G = U(1), level 1', ...lines.slice(1)];
    expect(says(monopoles, theoryOf(levelled))).toEqual([]);
  });
});

// All dominant fluxes of a box, one after the other.
test('no flux of a large box has a smaller R-charge', () => {
  const matter: Record<string, string[]> = {
    'U(2)': ['fund', 'adj', 'det', 'sym2'],
    'SU(3)': ['fund', 'adj', 'sym2'],
    'USp(4)': ['fund', 'alt2', 'adj'],
    'SO(4)': ['vector', 'adj'],
    G2: ['fund', 'adj'],
  };
  const cases = fc.constantFrom(...Object.keys(matter)).chain((group) =>
    fc.record({
      group: fc.constant(group),
      cells: fc.array(fc.constantFrom(...(matter[group] as string[])), { minLength: 1, maxLength: 2 }),
      copies: fc.integer({ min: 1, max: 5 }),
    }),
  );
  fc.assert(
    fc.property(cases, ({ group, cells, copies }) => {
      const theory = four(group, ...cells.map((cell, k) => (k === 0 ? `${copies}*${cell}` : cell)));
      const branch = coulombBranch(theory);
      if (branch === null) throw new Error('No Coulomb branch.');
      const growth = growthOf(theory, branch);
      const lowest = lowestMonopole(branch, growth);
      let least = Number.POSITIVE_INFINITY;
      for (let x = -6; x <= 6; x++) {
        for (let y = -6; y <= 6; y++) {
          const flux = [x, y];
          const walls = branch.chamber.walls.map((wall) => (wall[0] as number) * x + (wall[1] as number) * y);
          const dominant = walls.every((value, k) => branch.chamber.free[k] === true || value >= 0);
          if (!dominant || (x === 0 && y === 0)) continue;
          const sums = branch.matter.map(({ weights }) => weightSums(weights, flux));
          least = Math.min(least, growth.monopole(flux, sums));
        }
      }
      if (lowest === null) throw new Error('No monopole.');
      if (least > 0) expect(lowest).toMatchObject({ value: least, complete: true });
      else expect(lowest.value).toBeLessThanOrEqual(0);
    }),
    { numRuns: 60 },
  );
});
