// Centres and minuscule coweights: Bourbaki, Lie, ch. VI, plates I-IX. Isomorphisms SU(2)/Z2 = SO(3), USp(4)/Z2 = SO(5),
// SU(4)/Z2 = SO(6): standard. Levels: the lattice test of the condition, by hand where it says so.
import { describe, expect, test } from 'vitest';
import { Rational } from '../../engine/exact/rational';
import { dot } from '../../engine/lie/coordinates';
import { allowsLabels, parseGroup } from '../../engine/lie/group';
import { parseRepresentation } from '../../engine/lie/representation';
import { levels } from '../../engine/theory/checks/level';
import { monopoles } from '../../engine/theory/checks/monopoles';
import { isCocharacter } from '../../engine/theory/flux-lattice';
import { problemsOf } from '../requests/answers';
import { says, theoryOf, verdict } from '../theory/theory-text';
import { groupNamed } from './named';

const QUOTIENTS = [
  ['SU(2)/Z2', 2],
  ['SU(4)/Z2', 2],
  ['SU(4)/Z4', 4],
  ['SU(6)/Z3', 3],
  ['SU(9)/Z9', 9],
  ['USp(6)/Z2', 2],
  ['Spin(7)/Z2', 2],
  ['Spin(10)/Z4', 4],
  ['SO(8)/Z2', 2],
  ['E6/Z3', 3],
  ['E7/Z2', 2],
] as const;

function coverOf(name: string): string {
  return name.slice(0, name.indexOf('/'));
}

/** Dynkin labels with entries below `order` on as many nodes as are soon listed, 0 on the others. */
function smallLabels(rank: number, order: number): number[][] {
  if (rank === 0) return [[]];
  const entries = Array.from({ length: order ** rank > 1e5 ? 1 : order }, (_, label) => label);
  return smallLabels(rank - 1, order).flatMap((rest) => entries.map((label) => [...rest, label]));
}

describe('quotients by a subgroup of the centre', () => {
  test.each(QUOTIENTS)('%s: the lattice is finer by the order, roots stay integral', (name, order) => {
    const [group, cover] = [groupNamed(name), groupNamed(coverOf(name))];
    expect(group.unitMeasure.div(cover.unitMeasure).toString()).toBe(`${order}`);
    expect(group.quotient?.order).toBe(order);
    for (const x of group.cocharacters) {
      for (const root of group.simpleRoots) {
        expect(
          dot(
            root.map((entry) => Rational.of(2 * entry, 2)),
            x,
          ).isInteger(),
        ).toBe(true);
      }
    }
  });

  test.each(QUOTIENTS)('%s: one in so many classes of representations is allowed', (name, order) => {
    const group = groupNamed(name);
    const labels = smallLabels(group.system.rank, order);
    const allowed = labels.filter((one) => allowsLabels(group, one));
    const cover = labels.filter((one) => allowsLabels(groupNamed(coverOf(name)), one));
    // Sums of allowed labels are allowed, and the order is the index of the sublattice.
    expect(allowed.length / cover.length).toBeCloseTo(1 / order, 12);
    const [a = [], b = []] = allowed.slice(-2);
    expect(
      allowsLabels(
        group,
        a.map((label, k) => label + (b[k] ?? 0)),
      ),
    ).toBe(true);
  });

  // N-ality of SU(n): boxes modulo the order.
  test('SU(6)/Z3 allows what has a multiple of three boxes', () => {
    const group = groupNamed('SU(6)/Z3');
    for (const labels of smallLabels(5, 3)) {
      const boxes = labels.reduce((sum, label, k) => sum + (k + 1) * label, 0);
      expect(allowsLabels(group, labels)).toBe(boxes % 3 === 0);
    }
  });

  test('a representation may be allowed although its parts are not', () => {
    const group = groupNamed('SU(4)/Z2');
    const read = (text: string) => {
      const result = parseRepresentation(group, text);
      return result.kind === 'refusal' ? result.code : `${result.representation.dimension}`;
    };
    expect([read('fund'), read('fund x fund'), read('fund x anti'), read('adj'), read('6')]).toEqual([
      'global-form',
      '16',
      '16',
      '15',
      '6',
    ]);
    const refused = parseRepresentation(group, 'fund');
    expect(refused.kind === 'refusal' && [refused.what, refused.why, refused.remedy]).toEqual([
      "'fund' is not a representation of SU(4)/Z2.",
      'The subgroup Z2 of the centre of SU(4) acts on it.',
      'Take SU(4) instead, or a representation such as adj.',
    ]);
  });
});

describe('levels of quotients', () => {
  const allowed = (group: string, matter: readonly string[] = []): number[] =>
    Array.from({ length: 13 }, (_, k) => k).filter(
      (k) =>
        verdict(
          levels,
          theoryOf([
            `gauge G = ${group}, level ${k}`,
            'matter G R',
            ...matter.map((cell, j) => `chiral q${j} ${cell} 1/2`),
          ]),
        ) === 'holds',
    );

  test.each([
    ['SU(2)/Z2', [0, 2, 4, 6, 8, 10, 12]],
    ['SU(3)/Z3', [0, 3, 6, 9, 12]],
    // (x, x) = 1: SU(4)/Z2 is SO(6), whose level is any integer.
    ['SU(4)/Z2', [0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12]],
    ['SU(4)/Z4', [0, 4, 8, 12]],
    ['USp(6)/Z2', [0, 2, 4, 6, 8, 10, 12]],
    ['E6/Z3', [0, 3, 6, 9, 12]],
    ['E7/Z2', [0, 2, 4, 6, 8, 10, 12]],
    ['SO(10)/Z2', [0, 4, 8, 12]],
    ['Spin(10)/Z4', [0, 4, 8, 12]],
    ['Spin(7)/Z2', [0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12]],
  ])('%s', (group, expected) => {
    expect(allowed(group)).toEqual(expected);
  });

  test('the same groups under two names allow the same levels', () => {
    expect(allowed('SU(4)/Z2', ['alt2', 'adj'])).toEqual(allowed('SO(6)', ['vector', 'adj']));
    expect(allowed('USp(4)/Z2', ['alt2'])).toEqual(allowed('SO(5)', ['vector']));
    // SO(3)_k = SU(2)_2k.
    expect(allowed('SU(2)/Z2', ['adj'])).toEqual(allowed('SO(3)', ['adj']).flatMap((k) => (2 * k < 13 ? [2 * k] : [])));
  });
});

describe('fluxes of quotients', () => {
  // Printed with one coordinate, weights +-sigma.
  const half = [Rational.of(1, 2)];

  test('the half flux of SU(2) is one of SU(2)/Z2', () => {
    expect([isCocharacter(groupNamed('SU(2)'), half), isCocharacter(groupNamed('SU(2)/Z2'), half)]).toEqual([
      false,
      true,
    ]);
  });

  // Gaiotto and Witten, arXiv:0807.3720: two adjoint hypers have Delta = 4h - 2h at the flux (h, -h).
  test.each([
    ['SU(2)', '2'],
    ['SU(2)/Z2', '1'],
  ])('the smallest monopole operator of %s with two adjoint hypers has Delta = %s', (group, delta) => {
    const theory = theoryOf([`gauge G = ${group}`, 'supersymmetry 4', 'matter G', 'hyper q 2*adj']);
    expect(says(monopoles, theory)[0]).toContain(`$\\Delta=${delta}$`);
  });
});

describe('what is refused, in words', () => {
  test.each([
    ['SU(4)/Z3', 'The centre of SU(4) is Z4.'],
    ['U(3)/Z3', 'rescale the charges'],
    ['SU(4)/Z1', 'The centre of SU(4) is Z4.'],
    ['G2/Z2', 'The centre of G2 is trivial.'],
    ['Spin(8)/Z2', 'half-spin groups, which are not offered'],
    ['SO(7)/Z2', 'The centre of SO(7) is trivial.'],
    ['SO(4)/Z2', 'from n = 5 on'],
  ])('%s', (name, words) => {
    const result = parseGroup(name);
    expect(result.kind === 'refusal' ? `${result.what} ${result.why} ${result.remedy}` : result.kind).toContain(words);
  });

  const problemsWith = (group: string): string[] =>
    problemsOf('theory lamp', '  sphere S3', `  gauge G = ${group}`, '  matter G R', '  chiral q adj 1/2');

  test('products are no groups here, and a divisor is cyclic', () => {
    expect(problemsWith('(SU(2) x U(1))/Z2')[0]).toMatch(/^3:13 error: Quotients of products/);
    expect(problemsWith('SU(4)/2')[0]).toMatch(/^3:19 error: After `SU\(4\)\/` the name of a cyclic group is missing/);
    expect(problemsWith('SU(4)/Z2')).toEqual([]);
  });
});
