import { describe, expect, test } from 'vitest';
import { choices } from '../../engine/lie/chooser';
import { nameOfIrrep, youngRows } from '../../engine/lie/naming';
import { parseRepresentation } from '../../engine/lie/representation';
import { term } from '../../engine/lie/terms';
import { fixture, typeOf } from './fixture';
import { groupNamed, representationNamed, simplyConnected } from './named';

describe('lists of representations', () => {
  // OEIS A121736: dimensions of the irreducible representations of E7 (first terms).
  test('E7', () => {
    const dimensions = choices(groupNamed('E7'), 100_000)?.map((choice) => Number(choice.dimension));
    expect(dimensions).toEqual([1, 56, 133, 912, 1463, 1539, 6480, 7371, 8645, 24320, 27664, 40755, 51072, 86184]);
  });

  test('G2 up to 64, with indices of the reference file', () => {
    const list = choices(groupNamed('G2'), 64);
    expect(list?.map((choice) => [choice.labels.join(), `${choice.dimension}`, choice.index?.toString()])).toEqual([
      ['0,0', '1', '0'],
      ['1,0', '7', '2'],
      ['0,1', '14', '8'],
      ['2,0', '27', '18'],
      ['1,1', '64', '64'],
    ]);
  });

  test.each([
    ['SU(2)', 10],
    ['SU(3)', 100],
    ['SU(9)', 400],
    ['SO(3)', 9],
    ['SO(4)', 20],
    ['Spin(4)', 20],
    ['SO(8)', 120],
    ['Spin(8)', 120],
    ['USp(8)', 200],
    ['E6', 1000],
    ['U(3)', 20],
    ['U(1)', 1],
  ])('every row of %s to dimension %d reads back as itself', (name, limit) => {
    const group = groupNamed(name);
    const list = choices(group, limit) ?? [];
    expect(list.length).toBeGreaterThan(4);
    expect(new Set(list.map((choice) => choice.cell)).size).toBe(list.length);
    for (const choice of list) {
      const [only, ...others] = representationNamed(name, choice.cell).irreps;
      expect(others).toEqual([]);
      expect(only?.labels).toEqual(choice.labels);
      expect(only?.charge.equals(choice.charge)).toBe(true);
      expect(only?.multiplicity).toBe(1);
      expect(choice.dimension).toBeLessThanOrEqual(BigInt(limit));
      if (!choice.name) continue;
      const { base, bar } = choice.name;
      expect(representationNamed(name, `${base}${bar ? 'bar' : ''}`).irreps[0]?.labels).toEqual(choice.labels);
    }
  });

  // Which determinant power is offered is a decision of this project: there is no outside source.
  test('U(n) is offered with the shortest highest weights', () => {
    expect(choices(groupNamed('U(3)'), 8)?.map((choice) => choice.cell)).toEqual([
      '1',
      ...['anti', 'fund'],
      ...['(0,0,-2)', 'sym2'],
      '(1,0,-1)',
    ]);
    expect(
      choices(groupNamed('U(4)'), 6)
        ?.map((choice) => choice.cell)
        .sort(),
    ).toEqual(['1', 'alt2', 'anti', 'fund']);
  });

  test('a list that would be too long is refused', () => {
    expect(choices(groupNamed('SU(4)'), 10_000_000)).toBeNull();
  });
});

describe('names', () => {
  test('of the reference file', () => {
    for (const row of fixture.irreps) {
      if (row.name === undefined) continue;
      const { dimension } = nameOfIrrep(groupNamed(simplyConnected(typeOf(row))), term(row.dynkin));
      expect(dimension && `${dimension.base}${dimension.bar ? 'bar' : ''}`).toBe(row.name);
    }
  });

  // Rows of diagrams are the entries of the highest weight in orthogonal coordinates; definitions.
  test.each([
    ['SU(5)', '[0,1,0,1]', [2, 2, 1, 1]],
    ['SU(3)', 'adj', [2, 1]],
    ['SU(3)', '1', []],
    ['U(3)', '(3,1,0)', [3, 1]],
    ['U(3)', 'anti', null],
    ['USp(6)', '[1,0,1]', [2, 1, 1]],
    ['SO(8)', '[0,0,1,1]', [1, 1, 1]],
    ['Spin(8)', 'spinor', null],
    ['Spin(8)', '[0,0,2,0]', null],
    ['Spin(6)', '[0,2,0]', [2]],
    ['E6', 'fund', null],
  ])('rows of %s %s', (name, text, rows) => {
    const [only] = representationNamed(name as string, text as string).irreps;
    expect(only && youngRows(groupNamed(name as string), only)).toEqual(rows);
  });

  test.each([
    ['SU(4)', '[0,2,0]', '[0,2,0]'],
    ['SU(4)', '[0,1,0]', 'alt2'],
    ['SU(4)', '[0,0,1]', 'anti'],
    ['U(2)', 'det^-3', 'det^-3'],
    ['U(2)', 'fund.det', '(2,1)'],
    ['SO(8)', '8v', 'vector'],
    ['Spin(8)', '8c', 'cospinor'],
    ['E8', '248', 'fund'],
    ['U(1)', '-2/3', '-2/3'],
  ])('cell of %s %s', (name, text, cell) => {
    const [only] = representationNamed(name, text).irreps;
    expect(only && nameOfIrrep(groupNamed(name), only).cell).toBe(cell);
    expect(parseRepresentation(groupNamed(name), cell).kind).toBe('representation');
  });
});
