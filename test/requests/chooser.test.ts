// Which representations stand in front is a decision of this project; dimensions and indices: Slansky, Phys. Rept. 79
// (1981) 1, and the closed forms of C(n, k).
import { describe, expect, test } from 'vitest';
import { representationChoices } from '../../engine/requests/chooser';
import { representationNamed } from '../lie/named';

const words = (group: string, limit: number): string[] => representationChoices(group, limit).map(({ word }) => word);

describe('the list of representations', () => {
  test('of U(n) begins with what is written most', () => {
    expect(words('U(4)', 16).slice(0, 10)).toEqual([
      ...['1', 'fund', 'anti', 'adj', 'det', 'det^-1'],
      ...['alt2', 'alt2*', 'sym2', 'sym2*'],
    ]);
    // Lambda^2 of U(2) is its determinant.
    expect(words('U(2)', 3).slice(0, 7)).toEqual(['1', 'fund', 'anti', 'det', 'det^-1', 'sym2', 'sym2*']);
  });

  test.each(['U(2)', 'U(3)', 'U(5)', 'SU(5)', 'SU(4)/Z2', 'Spin(8)', 'E6'])(
    'of %s: every word is read back, none twice',
    (group) => {
      const list = representationChoices(group, 40);
      const keys = list.map(({ word }) => representationNamed(group, word).key);
      expect(new Set(keys).size).toBe(list.length);
      for (const { word, dimension, index } of list) {
        const read = representationNamed(group, word);
        expect([`${read.dimension}`, read.index?.toString() ?? '']).toEqual([dimension, index]);
      }
    },
  );

  test('the adjoint of U(3) is the whole one', () => {
    const adjoint = representationChoices('U(3)', 40).find(({ word }) => word === 'adj');
    expect([adjoint?.dimension, adjoint?.index, adjoint?.reality]).toEqual(['9', '6', 'real']);
  });

  test('a quotient offers only what its global form represents', () => {
    expect(words('SU(4)/Z2', 20)).not.toContain('fund');
    expect(words('SU(4)/Z2', 20)).toContain('alt2');
  });
});
