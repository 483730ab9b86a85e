import { Form } from '../exact/form';
import { builtinSpectrum, type SpinLabels } from './builtin';
import { LEVEL } from './level-tower';
import { polynomialIn } from './polynomial';
import type { WrittenTower } from './tower';

/** The fields on S^3 whose modes have spins: degeneracy of each representation, and the middle of the eigenvalues. */
const FIELDS: readonly { readonly field: Parameters<typeof builtinSpectrum>[0]; readonly middle: Form }[] = [
  { field: { field: 'scalar', dimension: 3, coupling: 'conformal', complex: false }, middle: Form.one },
  { field: { field: 'spinor', dimension: 3, mass: Form.zero }, middle: Form.ratio(3, 2) },
  { field: { field: 'form', dimension: 3, degree: 1 }, middle: Form.one },
];

/** Levels may be counted from elsewhere, by so many steps at most. */
const LARGEST_SHIFT = 3;

/**
 * SU(2) x SU(2) spins of the modes of a tower that is one of a field on the unit S^3 by its eigenvalues and degeneracies,
 * as forms in its index: -Laplacian + constant of scalars and transverse vectors, the Dirac operator and its square with
 * a mass. Several where both signs are counted; of a single sign of the Dirac operator they are those of the positive
 * one, `alternate` those of the negative one. Null for other towers.
 */
export function spinsOnThreeSphere(tower: WrittenTower, alternate: boolean): readonly SpinLabels[] | null {
  const [range, ...more] = tower.ranges;
  if (range === undefined || more.length > 0) return null;
  const eigenvalue = tower.eigenvalue.reduce((product, { form, power }) => product.mul(form.pow(power)), Form.one);
  const degree = (polynomialIn(eigenvalue, range.name)?.length ?? 0) - 1;
  if (degree !== 1 && degree !== 2) return null;
  for (let shift = -LARGEST_SHIFT; shift <= LARGEST_SHIFT; shift++) {
    const index = Form.symbol(range.name).add(Form.number(shift));
    const at = (form: Form): Form => form.substitute((name) => (name === LEVEL ? index : null));
    for (const { field, middle } of FIELDS) {
      const rest = eigenvalue.sub(index.add(middle).pow(degree));
      if (rest.symbols().includes(range.name) || (degree === 1 && !rest.isZero())) continue;
      const labels = labelsOf(field, tower.degeneracy, degree, alternate, at);
      if (labels !== null) return labels.map(({ left, right }) => ({ left: at(left), right: at(right) }));
    }
  }
  return null;
}

function labelsOf(
  field: Parameters<typeof builtinSpectrum>[0],
  degeneracy: Form,
  degree: number,
  alternate: boolean,
  at: (form: Form) => Form,
): readonly SpinLabels[] | null {
  const first = field.field === 'spinor' ? 1 : 2;
  if (degree < first) return null;
  const labels = builtinSpectrum(field)?.labels ?? [];
  const dimension = ({ left, right }: SpinLabels): Form =>
    left.scale(2).add(Form.one).mul(right.scale(2).add(Form.one));
  if (degeneracy.equals(at(Form.sum(labels.map(dimension))))) return labels;
  const one = labels[alternate ? 1 : 0];
  return one !== undefined && field.field === 'spinor' && degeneracy.equals(at(dimension(one))) ? [one] : null;
}
