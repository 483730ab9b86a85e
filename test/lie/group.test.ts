import { describe, expect, test } from 'vitest';
import { Rational } from '../../engine/exact/rational';
import { dot } from '../../engine/lie/coordinates';
import { parseGroup } from '../../engine/lie/group';
import { rootSystem } from '../../engine/lie/root-system';
import { typeName } from '../../engine/lie/simple-type';
import { fixture, typeOf } from './fixture';
import { groupNamed as group, simplyConnected } from './named';

const all = [
  ...fixture.groups.map(({ type, rank }) => simplyConnected({ series: type, rank })),
  ...['U(1)', 'U(2)', 'U(5)', 'U(9)', 'SO(2)', 'SO(3)', 'SO(4)', 'SO(5)', 'SO(6)', 'SO(7)', 'SO(16)', 'SO(17)'],
  ...['Spin(3)', 'Spin(4)', 'Spin(6)', 'USp(2)'],
];

describe('groups', () => {
  // Types, h_dual and Weyl orders: lie.json; the rest of the table are definitions of the low-rank isomorphisms.
  test('the simply connected groups of the reference list have its types and measures', () => {
    for (const row of fixture.groups) {
      const g = group(simplyConnected(typeOf(row)));
      expect(g.simple.map(typeName)).toEqual([`${row.type}${row.rank}`]);
      expect(g.weylOrder).toBe(BigInt(row.weylOrder));
      expect(g.dimension).toBe(row.dim);
      expect(g.unitMeasure.toNumber()).toBe(row.unitMeasureFactorSimplyConnected);
      expect(g.basicScale.toNumber()).toBe(
        row.basicFormFactor === 1 && row.type === 'A' && row.rank === 1 ? 2 : row.basicFormFactor,
      );
    }
  });

  test.each(all)('%s: the simple roots reproduce the Cartan matrix, long roots have norm 2', (name) => {
    const g = group(name);
    const roots = g.simpleRoots.map((root) => root.map((entry) => Rational.of(2 * entry, 2)));
    // <alpha_i, alpha_j^vee>, computed as alpha_i evaluated on the coroot.
    const cartan = roots.map((root) => g.simpleCoroots.map((coroot) => dot(root, coroot).toNumber()));
    expect(cartan).toEqual(g.system.cartan.map((row) => [...row]));
    // Coroots of long roots have norm 2 in the basic form.
    g.simpleCoroots.forEach((coroot, i) => {
      const norm = dot(coroot, coroot).mul(g.basicScale);
      expect(norm.toString()).toBe(Rational.of(2 * g.system.scale, g.system.scaledHalfNorms[i] as number).toString());
    });
  });

  test.each(all)('%s: roots and coroots fit the cocharacter lattice', (name) => {
    const g = group(name);
    for (const cocharacter of g.cocharacters) {
      for (const root of g.simpleRoots) {
        expect(
          dot(
            root.map((entry) => Rational.of(2 * entry, 2)),
            cocharacter,
          ).isInteger(),
        ).toBe(true);
      }
      // Relations among the printed coordinates hold on the lattice.
      for (const { coordinate, terms } of g.dependent) {
        const sum = terms.reduce(
          (s, t) => s.add(t.coefficient.mul(cocharacter[t.coordinate] as Rational)),
          Rational.zero,
        );
        expect(sum.equals(cocharacter[coordinate] as Rational)).toBe(true);
      }
    }
    expect(g.cocharacters).toHaveLength(g.rank);
    expect(g.independent.length + g.dependent.length).toBe(g.coordinateCount);
  });

  test('low-rank orthogonal groups keep the coordinates of the vector', () => {
    expect(group('SO(3)').simple).toEqual([{ series: 'A', rank: 1 }]);
    expect(group('SO(3)').levelScale.toString()).toBe('1');
    expect(group('SO(3)').basicScale.toString()).toBe('1/2');
    expect(group('SO(4)').simple.map(typeName)).toEqual(['A1', 'A1']);
    expect(group('SO(6)').simple.map(typeName)).toEqual(['A3']);
    expect(group('SO(6)').coordinateCount).toBe(3);
    expect(group('SO(2)').isAbelian).toBe(true);
    expect(group('SO(7)').unitMeasure.toString()).toBe('1');
    expect(group('Spin(7)').unitMeasure.toString()).toBe('1/2');
  });

  test('printed coordinates', () => {
    expect(group('SU(3)').coordinateCount).toBe(3);
    expect(group('SU(3)').independent).toEqual([0, 1]);
    expect(group('SU(3)').quadraticForm.map((row) => row.map(String))).toEqual([
      ['2', '1'],
      ['1', '2'],
    ]);
    expect(group('SU(2)').coordinateCount).toBe(1);
    expect(group('SU(2)').quadraticForm.map((row) => row.map(String))).toEqual([['2']]);
    expect(group('E6').coordinateCount).toBe(9);
    expect(group('E6').dependent.map((relation) => relation.coordinate)).toEqual([2, 5, 8]);
    expect(group('E8').independent).toHaveLength(8);
    expect(group(' U( 3 ) ').name).toBe('U(3)');
    expect(group('U(3)')).toBe(group('U(3)'));
  });

  test.each([
    ['Sp(4)', 'group-ambiguous'],
    ['Sp(3)', 'group-ambiguous'],
    ['Spin(2)', 'group-ambiguous'],
    ['USp(3)', 'group-unknown'],
    ['SU(1)', 'group-trivial'],
    ['U(0)', 'group-trivial'],
    ['SO(1)', 'group-trivial'],
    ['U(10)', 'group-too-large'],
    ['SU(10)', 'group-too-large'],
    ['SO(18)', 'group-too-large'],
    ['USp(18)', 'group-too-large'],
    ['E9', 'group-unknown'],
    ['O(3)', 'group-unknown'],
    ['su(3)', 'group-unknown'],
  ])('%s is refused: %s', (name, code) => {
    const result = parseGroup(name);
    expect(result).toMatchObject({ kind: 'refusal', code });
  });
});

test('rootSystem of the group is shared', () => {
  expect(group('SU(3)').system).toBe(rootSystem({ series: 'A', rank: 2 }));
});
