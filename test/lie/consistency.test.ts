import { describe, expect, test } from 'vitest';
import { Rational } from '../../engine/exact/rational';
import { dot } from '../../engine/lie/coordinates';
import type { Representation } from '../../engine/lie/representation';
import { rootSystem } from '../../engine/lie/root-system';
import { type ConsistencyRow, type Counted, fixture, typeOf } from './fixture';
import { groupNamed, representationNamed, simplyConnected } from './named';

/*
 * Sums over the matter of invented theories, from test/fixtures/lie/lie.json: the indices, cubic anomalies and charges
 * that level quantisation, beta functions and anomalies are made of.
 */

const rows = <K extends ConsistencyRow['kind']>(kind: K): Extract<ConsistencyRow, { kind: K }>[] =>
  fixture.consistency.filter((row): row is Extract<ConsistencyRow, { kind: K }> => row.kind === kind);

function matter(group: string, list: readonly Counted[]): { representation: Representation; count: number }[] {
  return list.map(([labels, count]) => ({ representation: representationNamed(group, `[${labels.join()}]`), count }));
}

const indexSum = (group: string, list: readonly Counted[]): number =>
  matter(group, list).reduce((sum, one) => sum + one.count * (one.representation.index?.toNumber() ?? Number.NaN), 0);

const cubicSum = (group: string, list: readonly Counted[]): number =>
  matter(group, list).reduce((sum, one) => sum + one.count * Number(one.representation.cubic), 0);

describe('sums over matter', () => {
  test.each(rows('3d-parity'))('three dimensions: $type $rank $chirals', (row) => {
    const sum = indexSum(simplyConnected(typeOf(row)), row.chirals);
    expect(sum).toBe(row.sumI2);
    expect(sum % 2 === 0 ? 'Z' : 'Z+1/2').toBe(row.level);
  });

  test.each(rows('4d-N2'))('four dimensions, N=2: $type $rank $hypers $halfHypers', (row) => {
    const name = simplyConnected(typeOf(row));
    const half = indexSum(name, row.halfHypers);
    const b = 2 * rootSystem(typeOf(row)).dualCoxeter - indexSum(name, row.hypers) - half / 2;
    expect(b).toBe(row.b);
    for (const { representation } of matter(name, row.halfHypers)) expect(representation.isQuaternionic).toBe(true);
    const symplectic = row.type === 'C' || (row.type === 'A' && row.rank === 1);
    expect(symplectic && half % 2 === 1).toBe(row.wittenAnomaly);
  });

  test.each(rows('4d-N1'))('four dimensions, N=1: $type $rank $chirals', (row) => {
    const name = simplyConnected(typeOf(row));
    expect(3 * rootSystem(typeOf(row)).dualCoxeter - indexSum(name, row.chirals) / 2).toBe(row.b);
    if (row.cubic !== undefined) expect(cubicSum(name, row.chirals)).toBe(row.cubic);
  });

  test.each(rows('5d-level'))('five dimensions: $type $rank $hypers', (row) => {
    const sum = cubicSum(simplyConnected(typeOf(row)), row.hypers);
    expect(sum).toBe(row.sumCubic);
    expect((row.kappaTimes2 + sum) % 2 === 0).toBe(row.allowed);
  });

  // The lattice form: K(x,y) + (1/2) sum w(x)w(y) over a basis of the cocharacter lattice, coroots even.
  test.each(rows('3d-parity-U'))('U($N) at twice the level $kTimes2, $kPrimeTimes2', (row) => {
    const name = `U(${row.N})`;
    const { cocharacters, simpleCoroots } = groupNamed(name);
    const text = [
      ...(row.fund > 0 ? [`${row.fund}*fund`] : []),
      ...(row.antifund > 0 ? [`${row.antifund}*anti`] : []),
      ...row.detCharges.map(([q, count]) => `${count}*det^${q}`),
    ].join(' + ');
    const orbits = text === '' ? [] : representationNamed(name, text).orbits();
    const k = Rational.of(row.kTimes2, 2);
    const abelian = Rational.of(row.kPrimeTimes2 - row.kTimes2, 2 * row.N);
    const trace = (x: readonly Rational[]): Rational => x.reduce((sum, entry) => sum.add(entry), Rational.zero);
    const effective = (x: readonly Rational[], y: readonly Rational[]): Rational => {
      let sum = Rational.zero;
      for (const orbit of orbits) {
        const { denominator, vectors, width } = orbit.vectors();
        for (let start = 0; start < vectors.length; start += width) {
          const w = Array.from(vectors.subarray(start, start + width), (entry) => Rational.of(entry, denominator));
          sum = sum.add(dot(w, x).mul(dot(w, y)).mul(Rational.of(orbit.multiplicity)));
        }
      }
      return k
        .mul(dot(x, y))
        .add(abelian.mul(trace(x)).mul(trace(y)))
        .add(sum.div(Rational.of(2)));
    };
    const integral = cocharacters.every((x) => cocharacters.every((y) => effective(x, y).isInteger()));
    const even = simpleCoroots.every((x) => effective(x, x).div(Rational.of(2)).isInteger());
    expect(integral && even).toBe(row.allowed);
  });

  test.each(rows('2d-FI'))('two dimensions: U($N) $chirals', (row) => {
    // The sum of all weights is a multiple of the trace: dimension times charge over N.
    const sum = row.chirals.reduce((total, [rowLabels, power, count]) => {
      const entries = new Array<number>(row.N).fill(power);
      rowLabels.forEach((label, i) => {
        for (let j = 0; j <= i; j++) entries[j] = (entries[j] as number) + label;
      });
      const text = row.N === 1 ? `${entries[0]}` : `(${entries.join()})`;
      const representation = representationNamed(`U(${row.N})`, text);
      const [irrep] = representation.irreps;
      const charge = irrep?.charge.toNumber() ?? Number.NaN;
      return total + (count * Number(representation.dimension) * charge) / row.N;
    }, 0);
    expect(sum).toBe(row.coefficient);
    expect(sum === 0).toBe(row.calabiYau);
  });

  test('every row of the reference file was used', () => {
    const kinds = ['3d-parity', '4d-N2', '4d-N1', '5d-level', '3d-parity-U', '2d-FI'] as const;
    expect(kinds.reduce((sum, kind) => sum + rows(kind).length, 0)).toBe(fixture.consistency.length);
    expect(fixture.consistency.length).toBe(43);
  });
});
