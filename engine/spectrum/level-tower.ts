import { Form } from '../exact/form';
import type { TowerKind } from '../language/tree';
import { polynomialIn } from './polynomial';
import { exponentOf } from './read';
import type { WrittenTower } from './tower';

/** The index of spectra that no text stands behind. */
export const LEVEL = 'n';

const nowhere = { from: 0, to: 0 };

/** eigenvalue^multiplicity over the level n >= from; a multiplicity with a negative leading coefficient stands below. */
export function multiplicityTower(eigenvalue: Form, multiplicity: Form, from: number, label: string): WrittenTower {
  const top = polynomialIn(multiplicity, LEVEL)?.at(-1)?.toRational();
  const sign = top?.sign() === -1 ? -1 : 1;
  return {
    ...levelTower('fermion', [eigenvalue], multiplicity.scale(sign), from, label),
    kind: 'power',
    exponent: Form.number(sign),
  };
}

/** A tower over the level n >= from that no text stands behind. */
export function levelTower(
  kind: Exclude<TowerKind, 'power'>,
  eigenvalue: readonly Form[],
  degeneracy: Form,
  from: number,
  label: string,
): WrittenTower {
  return {
    kind,
    exponent: exponentOf(kind),
    eigenvalue: eigenvalue.map((form) => ({ form, power: 1 })),
    degeneracy,
    ranges: [{ name: LEVEL, from: Form.number(from), to: null, span: nowhere }],
    spans: { row: nowhere, eigenvalue: nowhere, degeneracy: nowhere },
    label,
  };
}
