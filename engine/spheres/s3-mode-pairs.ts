import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import type { FieldModes, ModePair } from './sphere';

const n = Form.symbol('n');
const one = Form.one;
const half = Rational.of(1, 2);

/** Spin (n + shift)/2. */
function spin(shift: number): Form {
  return n.add(Form.number(shift)).scale(half);
}

/** Modes of a field with spins (n + left)/2 and (n + right)/2. */
function modes(field: string, left: number, right: number): FieldModes {
  const dimension = (shift: number): Form => n.add(Form.number(shift + 1));
  return { field, left: spin(left), right: spin(right), multiplicity: dimension(left).mul(dimension(right)) };
}

/**
 * Pairs of the chiral multiplet of R-charge R and weight w, z = R - i w.sigma. The Killing spinors of the left-invariant
 * frame have spins (0, 1/2): supersymmetry keeps SU(2)_L and moves SU(2)_R by 1/2. Scalars have spins (n/2, n/2), spinors
 * (n/2, (n+1)/2) and ((n+1)/2, n/2) (harmonics on S^3 = SU(2): Camporesi and Higuchi 1996, gr-qc/9505009). So scalars of
 * level n meet spinors of level n in n + 2 - z and spinors of level n - 1 in n + z, and n + 1 modes stay alone.
 */
export function chiralPairs(rCharge: Form, weight: Form): readonly ModePair[] {
  const z = rCharge.sub(Form.i.mul(weight));
  const scalar = modes('scalar', 0, 0);
  return [
    { eigenvalue: n.add(Form.number(2)).sub(z), start: 0, boson: scalar, fermion: modes('spinor', 0, 1) },
    { eigenvalue: n.add(z), start: 0, boson: scalar, fermion: modes('spinor', 0, -1) },
  ];
}

/**
 * Pairs of the vector multiplet for one pair of roots +-a, x = a.sigma: transverse vectors with spins ((n-1)/2, (n+1)/2)
 * and ((n+1)/2, (n-1)/2), gaugini with the same SU(2)_L spin and n/2 of SU(2)_R. n vectors of the one kind and n + 2
 * gaugini of the other stay alone; since they share the factor, two gaugini a level are left.
 */
export function vectorPairs(weight: Form): readonly ModePair[] {
  return [Form.i.mul(weight), Form.i.mul(weight).neg()].flatMap((ix): ModePair[] => [
    { eigenvalue: n.add(one).add(ix), start: 1, boson: modes('vector', -1, 1), fermion: modes('gaugino', -1, 0) },
    { eigenvalue: n.add(one).add(ix), start: 0, boson: modes('vector', 1, -1), fermion: modes('gaugino', 1, 0) },
  ]);
}
