import { describe, expect, test } from 'vitest';
import { parseRepresentation } from '../../engine/lie/representation';
import { rootSystem } from '../../engine/lie/root-system';
import { unitaryWeight } from '../../engine/lie/terms';
import { fixture, typeOf } from './fixture';
import { groupNamed, representationNamed, simplyConnected } from './named';

/** Parts as labels (highest weights for U(n), charges for U(1)), largest dimension first. */
function parts(group: string, text: string): string[] {
  const { family, isAbelian } = groupNamed(group);
  return representationNamed(group, text).irreps.map((irrep) => {
    const name = isAbelian ? irrep.charge.toString() : (family === 'U' ? unitaryWeight(irrep) : irrep.labels).join();
    return irrep.multiplicity === 1 ? name : `${irrep.multiplicity}*${name}`;
  });
}

describe('words', () => {
  // Highest weights of tensors and spinors: Bourbaki, Lie groups and Lie algebras, ch. VIII, par. 13 (fundamental weights
  // as tensor and spinor representations); the words themselves are this notebook's language.
  test.each([
    ['SU(5)', 'fund', ['1,0,0,0']],
    ['SU(5)', 'anti', ['0,0,0,1']],
    ['SU(5)', 'fund*', ['0,0,0,1']],
    ['SU(5)', 'fund**', ['1,0,0,0']],
    ['SU(5)', 'adj', ['1,0,0,1']],
    ['SU(5)', 'sym3*', ['0,0,0,3']],
    ['SU(5)', 'alt2', ['0,1,0,0']],
    ['SU(5)', 'alt5', ['0,0,0,0']],
    ['SU(5)', 'fund+anti', ['1,0,0,0', '0,0,0,1']],
    ['SU(5)', '2*fund + 10*', ['2*1,0,0,0', '0,0,1,0']],
    ['SU(5)', '5bar', ['0,0,0,1']],
    ['SU(2)', 'fund', ['1']],
    ['SU(2)', 'adj', ['2']],
    ['SU(2)', '8', ['7']],
    ['SU(3)', '3*', ['0,1']],
    ['SU(3)', '6bar', ['0,2']],
    ['SU(3)', "15'", ['4,0']],
    ['SU(3)', "15'*", ['0,4']],
    ['SU(4)', '6', ['0,1,0']],
    ['USp(6)', 'fund', ['1,0,0']],
    ['USp(6)', 'adj', ['2,0,0']],
    ['USp(6)', 'alt2', ['0,1,0']],
    ['USp(6)', "14'", ['0,0,1']],
    ['USp(2)', 'sym3', ['3']],
    ['SO(3)', 'vector', ['2']],
    ['SO(3)', 'sym2', ['4']],
    ['SO(3)', 'alt2', ['2']],
    ['SO(4)', 'vector', ['1,1']],
    ['SO(4)', 'adj', ['2,0', '0,2']],
    ['SO(4)', 'sym2', ['2,2']],
    ['Spin(4)', 'spinor', ['0,1']],
    ['Spin(4)', 'cospinor', ['1,0']],
    ['SO(5)', 'fund', ['1,0']],
    ['SO(5)', 'alt2', ['0,2']],
    ['SO(5)', 'alt3', ['0,2']],
    ['SO(6)', 'vector', ['0,1,0']],
    ['SO(6)', 'adj', ['1,0,1']],
    ['Spin(6)', 'spinor', ['1,0,0']],
    ['Spin(6)', 'cospinor', ['0,0,1']],
    ['SO(7)', 'alt3', ['0,0,2']],
    ['Spin(7)', '8', ['0,0,1']],
    ['SO(8)', '8v', ['1,0,0,0']],
    ['SO(8)', '8', ['1,0,0,0']],
    ['SO(8)', 'alt3', ['0,0,1,1']],
    ['SO(8)', 'alt5', ['0,0,1,1']],
    ['SO(8)', 'alt8', ['0,0,0,0']],
    ['Spin(8)', '8s', ['0,0,0,1']],
    ['Spin(8)', '8c', ['0,0,1,0']],
    ['Spin(10)', '16', ['0,0,0,0,1']],
    ['Spin(10)', '16bar', ['0,0,0,1,0']],
    ['Spin(10)', 'spinor', ['0,0,0,0,1']],
    ['G2', 'fund', ['1,0']],
    ['G2', '14', ['0,1']],
    ['F4', 'adj', ['1,0,0,0']],
    ['E6', '27*', ['0,0,0,0,0,1']],
    ['E6', 'anti', ['0,0,0,0,0,1']],
    ['E6', "351'", ['2,0,0,0,0,0']],
    ['E7', '56', ['0,0,0,0,0,0,1']],
    ['E7', '912', ['0,1,0,0,0,0,0']],
    ['E8', '248', ['0,0,0,0,0,0,0,1']],
    ['E8', '147250', ['0,1,0,0,0,0,0,0']],
    ['U(3)', 'fund', ['1,0,0']],
    ['U(3)', 'anti', ['0,0,-1']],
    ['U(3)', 'adj', ['1,0,-1', '0,0,0']],
    ['U(3)', 'sym2*', ['0,0,-2']],
    ['U(3)', 'alt3', ['1,1,1']],
    ['U(3)', 'det', ['1,1,1']],
    ['U(3)', 'det^-2', ['-2,-2,-2']],
    ['U(3)', 'fund.det^-1', ['0,-1,-1']],
    ['U(3)', '(2,1,0)+1', ['2,1,0', '0,0,0']],
    ['U(1)', '3', ['3']],
    ['U(1)', '-1/2', ['-1/2']],
    ['U(1)', '0.25', ['1/4']],
    ['U(1)', '1+-1', ['1', '-1']],
    ['U(1)', '2*1 + 0', ['2*1', '0']],
    ['U(1)', '3*', ['-3']],
    ['U(1)', 'anti', ['-1']],
    ['U(1)', 'adj', ['0']],
  ])('%s: %s', (group, text, expected) => {
    expect(parts(group as string, text as string)).toEqual(expected);
  });

  test('names of the reference file', () => {
    for (const row of fixture.irreps) {
      if (row.name === undefined) continue;
      expect(parts(simplyConnected(typeOf(row)), row.name)).toEqual([row.dynkin.join()]);
    }
  });
});

describe('products and powers', () => {
  // Slansky, Phys. Rept. 79 (1981) 1, and McKay, Patera, Tables of dimensions (1981); the same products stand in lie.json.
  test.each([
    ['SU(3)', 'fund x sym2', ['3,0', '1,1']],
    ['SU(3)', '3 × 3*', ['1,1', '0,0']],
    ['SU(3)', 'adj x adj', ['2,2', '3,0', '0,3', '2*1,1', '0,0']],
    ['SU(3)', 'sym^3(fund)', ['3,0']],
    ['SU(3)', 'alt^2(adj)', ['3,0', '0,3', '1,1']],
    ['SU(3)', '[1,1] + 3*', ['1,1', '0,1']],
    ['SU(3)', '(3 + 3*) x 3', ['1,1', '2,0', '0,1', '0,0']],
    ['SU(3)', 'alt^2(3+1)', ['1,0', '0,1']],
    ['E8', 'alt^2(248)', ['0,0,0,0,0,0,1,0', '0,0,0,0,0,0,0,1']],
    ['E8', 'sym^2(248)', ['0,0,0,0,0,0,0,2', '1,0,0,0,0,0,0,0', '0,0,0,0,0,0,0,0']],
    ['U(2)', 'fund x anti', ['1,-1', '0,0']],
    ['U(2)', 'sym^2(fund.det)', ['4,2']],
    ['U(2)', 'alt^2(fund)', ['1,1']],
    ['U(1)', '2 x -1/2', ['3/2']],
    ['U(1)', 'sym^3(1+-1)', ['3', '1', '-1', '-3']],
    ['SO(4)', 'vector x vector', ['2,2', '2,0', '0,2', '0,0']],
    ['SO(4)', 'alt^2(vector)', ['2,0', '0,2']],
    ['Spin(4)', 'spinor x cospinor', ['1,1']],
  ])('%s: %s', (group, text, expected) => {
    expect(parts(group as string, text as string).sort()).toEqual([...(expected as string[])].sort());
  });

  test.each(fixture.tensor)('$type $rank $a x $b', (row) => {
    const group = simplyConnected(typeOf(row));
    const product = representationNamed(group, `[${row.a.join()}] x [${row.b.join()}]`);
    const found = product.irreps.map(({ labels, multiplicity }) => `${multiplicity}*${labels.join()}`);
    expect(found.sort()).toEqual(row.result.map(([labels, times]) => `${times}*${labels.join()}`).sort());
    expect(product.dimension).toBe(BigInt(row.dims[0]) * BigInt(row.dims[1]));
  });

  test.each(fixture.powers)('$kind^$power of $type $rank $dynkin', (row) => {
    const group = simplyConnected(typeOf(row));
    const power = representationNamed(group, `${row.kind}^${row.power}([${row.dynkin.join()}])`);
    const found = power.irreps.map(({ labels, multiplicity }) => `${multiplicity}*${labels.join()}`);
    expect(found.sort()).toEqual(row.result.map(([labels, times]) => `${times}*${labels.join()}`).sort());
  });
});

describe('invariants of sums', () => {
  // Closed forms of the index and the cubic anomaly: Banks, Georgi, Phys. Rev. D14 (1976) 1159 (cubic); binomials below.
  test('SU(n) tensors', () => {
    const binomial = (n: number, k: number): number => (k === 0 ? 1 : (binomial(n - 1, k - 1) * n) / k);
    for (let n = 3; n <= 9; n++) {
      for (let k = 1; k < Math.min(n, 5); k++) {
        const alt = representationNamed(`SU(${n})`, `alt${k}`);
        const sym = representationNamed(`SU(${n})`, `sym${k}`);
        expect(alt.index?.toNumber()).toBe(binomial(n - 2, k - 1));
        expect(sym.index?.toNumber()).toBe(binomial(n + k, n + 1));
        const factorial = (m: number): number => (m < 2 ? 1 : m * factorial(m - 1));
        const cubicAlt = ((n - 2 * k) * factorial(n - 3)) / (factorial(n - k - 1) * factorial(k - 1));
        const cubicSym = ((n + 2 * k) * factorial(n + k)) / (factorial(n + 2) * factorial(k - 1));
        expect(Number(alt.cubic)).toBeCloseTo(cubicAlt, 9);
        expect(Number(sym.cubic)).toBeCloseTo(cubicSym, 9);
        expect(Number(alt.conjugate().cubic)).toBeCloseTo(-cubicAlt, 9);
      }
    }
  });

  // Georgi, Glashow, Phys. Rev. D6 (1972) 429: one family of SU(5).
  test('the SU(5) family 5bar + 10 is free of the cubic anomaly', () => {
    const family = representationNamed('SU(5)', '5bar+10');
    expect(family.cubic).toBe(0n);
    expect(family.dimension).toBe(15n);
    expect(family.index?.toString()).toBe('4');
    expect(family.reality).toBe('complex');
  });

  test('reality of sums', () => {
    expect(representationNamed('SU(3)', 'fund+anti').reality).toBe('real');
    expect(representationNamed('SU(3)', 'fund+anti').isQuaternionic).toBe(true);
    expect(representationNamed('SU(2)', 'fund').reality).toBe('pseudoreal');
    expect(representationNamed('SU(2)', '2*fund').reality).toBe('real');
    expect(representationNamed('SU(2)', 'fund+adj').reality).toBe('mixed');
    expect(representationNamed('USp(6)', "14'").isQuaternionic).toBe(true);
    expect(representationNamed('SO(5)', 'vector').isQuaternionic).toBe(false);
    expect(representationNamed('U(2)', 'fund').reality).toBe('complex');
    expect(representationNamed('U(2)', 'adj').reality).toBe('real');
    expect(representationNamed('U(1)', '1+-1').reality).toBe('real');
    expect(representationNamed('U(1)', '0').reality).toBe('real');
  });

  test('indices of groups that are not simple', () => {
    expect(representationNamed('SO(4)', 'vector').index?.toString()).toBe('2');
    expect(representationNamed('SO(4)', '[2,0]').index).toBeNull();
    expect(representationNamed('SO(4)', '[2,0]').indices).toEqual([4n, 0n]);
    expect(representationNamed('U(1)', '1/2+3').index?.toString()).toBe('37/4');
    expect(representationNamed('U(3)', 'sym2').index?.toString()).toBe('5');
    expect(representationNamed('SO(6)', 'vector').cubic).toBe(0n);
    expect(representationNamed('Spin(6)', 'spinor').cubic).toBe(1n);
  });

  test('adjoint: twice the dual Coxeter number, dimension of the group, one zero weight a rank', () => {
    for (const row of fixture.groups) {
      const group = simplyConnected(typeOf(row));
      const adjoint = representationNamed(group, 'adj');
      expect(adjoint.index?.toNumber()).toBe(2 * row.dualCoxeter);
      expect(adjoint.dimension).toBe(BigInt(row.dim));
      expect(adjoint.orbits().find((orbit) => orbit.isZero)?.multiplicity).toBe(row.rank);
      expect(adjoint.reality).toBe('real');
      expect(rootSystem(typeOf(row)).positiveRoots.length * 2 + 1).toBe(adjoint.weightCount);
    }
    expect(
      representationNamed('U(4)', 'adj')
        .orbits()
        .find((orbit) => orbit.isZero)?.multiplicity,
    ).toBe(4);
  });
});

describe('refusals', () => {
  test.each([
    ['SO(5)', 'anti', 'representation-absent'],
    ['USp(4)', 'anti', 'representation-absent'],
    ['E8', 'anti', 'representation-absent'],
    ['SO(10)', 'spinor', 'global-form'],
    ['SO(10)', '16', 'global-form'],
    ['SO(7)', '[0,0,1]', 'global-form'],
    ['SO(3)', '[1]', 'global-form'],
    ['SO(4)', '[1,0]', 'global-form'],
    ['Spin(7)', 'cospinor', 'representation-absent'],
    ['SU(3)', 'spinor', 'representation-absent'],
    ['SU(3)', 'vector', 'representation-absent'],
    ['SU(3)', 'alt4', 'representation-absent'],
    ['SU(3)', 'det', 'representation-absent'],
    ['USp(4)', 'alt3', 'representation-absent'],
    ['SO(8)', 'alt4', 'representation-reducible'],
    ['SO(4)', 'alt2', 'representation-reducible'],
    ['E6', 'sym2', 'representation-absent'],
    ['SU(3)', 'funk', 'representation-unknown'],
    ['SU(3)', '7', 'representation-absent'],
    ['SU(3)', '8bar', 'representation-absent'],
    ['Spin(8)', '8', 'representation-ambiguous'],
    ['E6', '351**)', 'representation-syntax'],
    ['SU(4)', "20'''", 'representation-unknown'],
    ['U(2)', '2', 'representation-ambiguous'],
    ['U(2)', '[1]', 'labels-wrong'],
    ['U(2)', '(1,2)', 'labels-wrong'],
    ['U(2)', '(1,0,0)', 'labels-wrong'],
    ['SU(3)', '(1,0,0)', 'labels-wrong'],
    ['SU(3)', '[1]', 'labels-wrong'],
    ['SU(3)', '[-1,0]', 'labels-wrong'],
    ['U(1)', '[1]', 'labels-wrong'],
    ['U(1)', 'sym2', 'representation-absent'],
    ['U(1)', '1/0', 'representation-syntax'],
    ['SU(3)', '', 'representation-syntax'],
    ['SU(3)', 'fund+', 'representation-syntax'],
    ['SU(3)', 'fund anti', 'representation-syntax'],
    ['SU(3)', '0*fund', 'labels-wrong'],
    ['SU(2)', '[1001]', 'label-too-large'],
    ['SU(2)', 'sym2000', 'label-too-large'],
    ['U(1)', '2000000000', 'label-too-large'],
    ['SU(8)', '[1,1,1,1,1,1,1]', 'too-many-weights'],
    ['E8', '[9,9,9,9,9,9,9,9]', 'too-many-weights'],
    ['E8', '[1,1,1,1,1,1,1,1] x [1,1,1,1,1,1,1,1]', 'product-too-large'],
    ['E8', 'sym^9(147250)', 'product-too-large'],
    ['SU(2)', 'sym^41(fund)', 'product-too-large'],
  ])('%s: %s is refused: %s', (group, text, code) => {
    const result = parseRepresentation(groupNamed(group), text);
    expect(result).toMatchObject({ kind: 'refusal', code });
  });

  test('a refused size is known without weights when no weights are asked for', () => {
    const result = parseRepresentation(groupNamed('SU(8)'), '[1,1,1,1,1,1,1]', Number.POSITIVE_INFINITY);
    expect(result.kind).toBe('representation');
    if (result.kind !== 'representation') return;
    expect(result.representation.dimension).toBe(268435456n);
    expect(result.representation.hasWeightsWithin(561_948)).toBe(true);
    expect(result.representation.hasWeightsWithin(561_947)).toBe(false);
  });

  test('the same text gives the same object', () => {
    const g = groupNamed('E8');
    expect(parseRepresentation(g, 'adj')).toBe(parseRepresentation(g, 'adj'));
  });
});
