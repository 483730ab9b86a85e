import { Form } from '../exact/form';
import type { TowerKind } from '../language/tree';
import { exponentOf } from './read';
import type { WrittenTower } from './tower';

/** The index of spectra that no text stands behind. */
export const LEVEL = 'n';

const nowhere = { from: 0, to: 0 };

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
