import { describe, expect, test } from 'vitest';
import { Rational } from '../../engine/exact/rational';
import { countWeights, type DominantCharacter, dominantCharacter } from '../../engine/lie/character';
import {
  centreClass,
  cubicAnomaly,
  dimension,
  doubledCasimir,
  dynkinIndices,
  fourthMoment,
  realityOf,
} from '../../engine/lie/invariants';
import { rootSystem } from '../../engine/lie/root-system';
import { conjugateLabels } from '../../engine/lie/weyl';
import { fixture, typeOf } from './fixture';

const FROBENIUS_SCHUR = { real: 1, complex: 0, pseudoreal: -1 };

function rows(character: DominantCharacter, rank: number): [number[], number][] {
  return Array.from({ length: character.count }, (_, k) => [
    [...character.labels.subarray(k * rank, (k + 1) * rank)],
    character.multiplicities[k] as number,
  ]);
}

const byLabels = (a: [number[], number], b: [number[], number]): number => a[0].join().localeCompare(b[0].join());

describe('irreducible representations against GAP', () => {
  test.each(fixture.irreps)('$type $rank $dynkin', (row) => {
    const system = rootSystem(typeOf(row));
    const character = dominantCharacter(system, row.dynkin) as DominantCharacter;
    expect(dimension(system, row.dynkin)).toBe(BigInt(row.dim));
    expect(dynkinIndices(system, row.dynkin)).toEqual([BigInt(row.i2)]);
    expect(doubledCasimir(system, row.dynkin).div(Rational.of(2)).toString()).toBe(row.c2);
    expect(cubicAnomaly(system, row.dynkin)).toEqual(row.cubic === null ? null : BigInt(row.cubic));
    expect(FROBENIUS_SCHUR[realityOf(system, row.dynkin)]).toBe(row.fs);
    expect(conjugateLabels(system, row.dynkin)).toEqual(row.conjugate);
    expect(centreClass(system, row.dynkin)).toEqual(row.class);
    expect(fourthMoment(system, character).toString()).toBe(row.q4);
    expect(character.weights).toBe(row.weights);
    expect(rows(character, row.rank).sort(byLabels)).toEqual([...row.dominant].sort(byLabels));
  });

  test('the number of weights is counted without multiplicities, and refused above the limit', () => {
    const e8 = rootSystem({ series: 'E', rank: 8 });
    const labels = [0, 1, 0, 0, 0, 0, 0, 0];
    expect(countWeights(e8, labels, 26401)).toBe(26401);
    expect(countWeights(e8, labels, 26400)).toBeNull();
    expect(dominantCharacter(e8, labels, 26400)).toBeNull();
  });
});
