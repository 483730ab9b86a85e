// Harmonics on S^3 = SU(2): Rubin and Ordonez 1984, J. Math. Phys. 25, 2888 (scalars); Camporesi and Higuchi 1996,
// gr-qc/9505009 (spinors); Elizalde, Lygren and Vassilevich 1996, hep-th/9602113 (one-forms).
import { describe, expect, test } from 'vitest';
import { Form } from '../../engine/exact/form';
import { type BuiltinRequest, builtinSpectrum, DIMENSIONS } from '../../engine/spectrum/builtin';
import { spinsOnThreeSphere } from '../../engine/spectrum/sphere-spins';
import type { WrittenTower } from '../../engine/spectrum/tower';

const m = Form.symbol('m');
const FIELDS = [
  { field: 'scalar', dimension: 3, coupling: 'conformal', complex: true },
  { field: 'scalar', dimension: 3, coupling: m, complex: false },
  { field: 'scalar', dimension: 3, coupling: Form.zero, complex: false },
  { field: 'spinor', dimension: 3, mass: Form.zero },
  { field: 'spinor', dimension: 3, mass: m },
  { field: 'form', dimension: 3, degree: 1 },
] satisfies readonly BuiltinRequest[];

function towersOf(request: BuiltinRequest): readonly WrittenTower[] {
  return builtinSpectrum(request)?.spectrum.towers ?? [];
}

/** The same tower counted from `by` on. */
function shifted(tower: WrittenTower, by: number): WrittenTower {
  const at = (form: Form): Form =>
    form.substitute((name) => (name === 'n' ? Form.symbol('k').sub(Form.number(by)) : null));
  return {
    ...tower,
    eigenvalue: tower.eigenvalue.map(({ form, power }) => ({ form: at(form), power })),
    degeneracy: at(tower.degeneracy),
    ranges: tower.ranges.map((range) => ({ ...range, name: 'k', from: range.from.add(Form.number(by)) })),
  };
}

describe('spins of the fields on S^3', () => {
  test.each(FIELDS)('fill the degeneracy: $field', (request) => {
    const towers = towersOf(request);
    expect(towers.length).toBeGreaterThan(0);
    for (const tower of [...towers, ...towers.map((one) => shifted(one, 2))]) {
      const spins = spinsOnThreeSphere(tower, false) ?? [];
      const dimensions = spins.map(({ left, right }) => left.scale(2).add(Form.one).mul(right.scale(2).add(Form.one)));
      expect(Form.sum(dimensions).equals(tower.degeneracy)).toBe(true);
    }
  });

  test('the two signs of the Dirac operator have opposite spins', () => {
    const [tower] = towersOf({ field: 'spinor', dimension: 3, mass: Form.zero });
    const [plus, minus] = [false, true].map((alternate) => spinsOnThreeSphere(tower as WrittenTower, alternate)?.[0]);
    const n = Form.symbol('n');
    expect(plus?.left.scale(2).equals(n) && plus.right.scale(2).equals(n.add(Form.one))).toBe(true);
    expect(minus?.right.scale(2).equals(n) && minus.left.scale(2).equals(n.add(Form.one))).toBe(true);
  });

  test('of other spheres and of other towers there are none', () => {
    const others = DIMENSIONS.filter((d) => d !== 3).flatMap((dimension) => [
      ...towersOf({ field: 'scalar', dimension, coupling: m, complex: false }),
      ...towersOf({ field: 'spinor', dimension, mass: Form.zero }),
    ]);
    expect(others.map((tower) => spinsOnThreeSphere(tower, false))).toEqual(others.map(() => null));
  });
});
