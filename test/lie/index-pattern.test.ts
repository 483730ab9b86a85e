import { describe, expect, test } from 'vitest';
import { expandPattern, type IndexPattern, type WeightVectors } from '../../engine/lie/index-pattern';
import type { WeightOrbit } from '../../engine/lie/orbit';
import { fixture, typeOf } from './fixture';
import { groupNamed, representationNamed, simplyConnected } from './named';

/** Rows as text, over the denominator 2 that serves every weight here except fractional charges. */
function rowSet({ denominator, vectors, width }: WeightVectors, sign = 1): string[] {
  const rows: string[] = [];
  for (let start = 0; start < vectors.length; start += width) {
    rows.push(
      Array.from(vectors.subarray(start, start + width), (entry) => (sign * entry * 2) / denominator + 0).join(),
    );
  }
  return rows;
}

function expanded(patterns: readonly IndexPattern[], width: number): string[] {
  return patterns.flatMap((pattern) => {
    const vectors = expandPattern(pattern, width);
    expect(vectors.vectors.length).toBe(pattern.size * width);
    return rowSet(vectors);
  });
}

/** Removes multiples of (1,..,1) from traceless blocks: equal functions get equal rows. */
function asFunction(row: string, blocks: readonly { kind: string; offset: number; size: number }[]): string {
  const entries = row.split(',').map(Number);
  for (const { kind, offset, size } of blocks) {
    if (kind !== 'traceless') continue;
    const last = entries[offset + size - 1] as number;
    for (let i = offset; i < offset + size; i++) entries[i] = (entries[i] as number) - last;
  }
  return entries.join();
}

/** The orbit from its patterns must be the orbit enumerated by reflections; the half must hold one of each pair. */
function checkOrbit(groupName: string, orbit: WeightOrbit): void {
  const { coordinateCount: width, blocks } = groupNamed(groupName);
  const enumerated = rowSet(orbit.vectors());
  expect(enumerated).toHaveLength(orbit.size);
  const fromPatterns = expanded(orbit.patterns(), width);
  expect(fromPatterns.length).toBe(orbit.size);
  expect(fromPatterns.sort()).toEqual([...enumerated].sort());
  if (!orbit.selfConjugate || orbit.isZero) {
    expect(() => orbit.halfPatterns()).toThrow();
    return;
  }
  const half = rowSet(orbit.halfVectors()).map((row) => asFunction(row, blocks));
  const opposite = rowSet(orbit.halfVectors(), -1).map((row) => asFunction(row, blocks));
  expect([...half, ...opposite].sort()).toEqual(enumerated.map((row) => asFunction(row, blocks)).sort());
  expect(orbit.halfPatterns().reduce((sum, pattern) => sum + pattern.size, 0)).toBe(orbit.size / 2);
}

describe('patterns expand to the Weyl orbit', () => {
  // Outside source: the orbit sizes of the reference file add up to GAP's number of weights.
  const limited = fixture.irreps.filter((row) => row.weights <= 9000);
  test.each(limited)('$type $rank $dynkin', (row) => {
    const name = simplyConnected(typeOf(row));
    const orbits = representationNamed(name, `[${row.dynkin.join()}]`).orbits();
    expect(orbits.reduce((sum, orbit) => sum + orbit.size, 0)).toBe(row.weights);
    expect(orbits.reduce((sum, orbit) => sum + orbit.size * orbit.multiplicity, 0)).toBe(row.dim);
    for (const orbit of orbits) checkOrbit(name, orbit);
  });

  test.each([
    ['U(1)', '3'],
    ['SO(2)', '-1/2+1/2+0'],
    ['U(2)', 'adj+det+fund.det^-1'],
    ['U(3)', '(2,0,-2)+(2,1,0)+(5,5,4)+adj'],
    ['U(6)', '(3,3,3,3,1,0)+alt3+det^-2+(1,1,0,0,-1,-1)'],
    ['SO(3)', 'vector+sym3'],
    ['Spin(3)', 'spinor+[3]'],
    ['SO(4)', 'adj+vector+[2,0]+sym3'],
    ['Spin(4)', 'spinor+cospinor+[3,1]'],
    ['SO(5)', 'vector+adj+sym3'],
    ['SO(6)', 'vector+adj+sym3+alt2'],
    ['Spin(6)', 'spinor+cospinor+[1,1,1]'],
    ['SU(2)', '[5]'],
    ['SU(4)', '[1,1,1]+[0,2,0]+[2,1,2]'],
    ['SU(6)', '[1,0,2,0,1]+[1,1,1,1,1]'],
    ['SU(8)', '[1,0,0,2,0,0,1]'],
  ])('%s: %s', (name, text) => {
    for (const orbit of representationNamed(name, text).orbits()) checkOrbit(name, orbit);
  });
});

/** Patterns in a compact notation, for reading. */
function shown(pattern: IndexPattern): string {
  const terms = pattern.terms.map((term) => {
    const where =
      term.kind === 'index' ? term.index : term.kind === 'coordinate' ? term.coordinate + 1 : `sum${term.range}`;
    return `${term.sign === 'either' ? '±' : ''}${term.coefficient.toString()}s_${where}`;
  });
  const relations = pattern.relations.map(({ kind, indices }) => indices.join(kind));
  const ranges = pattern.indices.map(({ name, offset, range }) => `${name}:${offset + 1}..${offset + range}`);
  const parity = pattern.signs === 'even' || pattern.signs === 'odd' ? ` ${pattern.signs}` : '';
  return `${terms.join(' ')} | ${[...ranges, ...relations].join(' ')}${parity}`;
}

function orbitsShown(group: string, text: string, half: boolean): string[] {
  return representationNamed(group, text)
    .orbits()
    .filter((orbit) => !orbit.isZero)
    .flatMap((orbit) => (half ? orbit.halfPatterns() : orbit.patterns()).map(shown));
}

// The forms on the right are those of the usual product formulas; common practice, no single source.
describe('patterns read as on paper', () => {
  test.each([
    ['SU(5)', 'adj', false, ['1s_i -1s_j | i:1..5 j:1..5 i≠j']],
    ['SU(5)', 'adj', true, ['1s_i -1s_j | i:1..5 j:1..5 i<j']],
    ['SU(5)', '10', false, ['1s_i 1s_j | i:1..5 j:1..5 i<j']],
    ['SU(4)', '6', true, ['1s_i 1s_4 | i:1..3']],
    ['SU(2)', 'adj', true, ['2s_1 | ']],
    ['SU(2)', 'fund', false, ['±1s_1 | ']],
    ['U(3)', 'anti', false, ['-1s_i | i:1..3']],
    ['U(5)', 'det^-1', false, ['-1s_sum5 | ']],
    ['USp(4)', 'adj', true, ['2s_i | i:1..2', '1s_1 ±1s_2 | ']],
    ['SO(5)', 'adj', true, ['1s_1 ±1s_2 | ', '1s_i | i:1..2']],
    ['Spin(10)', '16', false, ['±1/2s_1 ±1/2s_2 ±1/2s_3 ±1/2s_4 ±1/2s_5 |  even']],
    ['G2', 'adj', true, ['1s_i -1s_j | i:1..3 j:1..3 i<j', '1s_i | i:1..3']],
    ['F4', 'fund', true, ['1s_i | i:1..4', '1/2s_1 ±1/2s_2 ±1/2s_3 ±1/2s_4 | ']],
    ['E7', 'fund', true, ['1s_i 1s_j | i:1..8 j:1..8 i<j']],
    ['E7', 'adj', true, ['1s_i -1s_j | i:1..8 j:1..8 i<j', '1s_i 1s_j 1s_k 1s_8 | i:1..7 j:1..7 k:1..7 i<j<k']],
    ['E8', 'adj', true, ['1s_i -1s_j | i:1..9 j:1..9 i<j', '1s_i 1s_j 1s_k | i:1..9 j:1..9 k:1..9 i<j<k']],
    ['E6', 'fund', false, ['1s_i -1s_j | i:1..3 j:7..9', '-1s_i 1s_j | i:4..6 j:7..9', '-1s_i 1s_j | i:1..3 j:4..6']],
  ])('%s %s', (group, text, half, forms) => {
    expect(orbitsShown(group as string, text as string, half as boolean).sort()).toEqual(
      [...(forms as string[])].sort(),
    );
  });
});
