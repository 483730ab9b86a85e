import { Form } from '../exact/form';
import { type BuiltinRequest, builtinSpectrum, DIMENSIONS } from '../spectrum/builtin';
import { formText } from '../spectrum/form-text';
import type { WrittenTower } from '../spectrum/tower';

/** A block of text that can be put into a notebook: the spectrum of a field on a unit sphere. */
export interface BuiltinBlock {
  /** `scalar on S^3, conformal`. */
  readonly label: string;
  readonly text: string;
  readonly source: string;
}

/** Name of the parameter that stands for a coupling, mass or charge in a block; its `let` comes with the block. */
const PARAMETERS = { coupling: 'xi', mass: 'm', charge: 'q' } as const;

/** Spectra of the fields on S^2 to S^7, and with monopole flux on S^2, as text. */
export function builtinBlocks(): readonly BuiltinBlock[] {
  const coupling = Form.symbol(PARAMETERS.coupling);
  const mass = Form.symbol(PARAMETERS.mass);
  const q = Form.symbol(PARAMETERS.charge);
  const fields = DIMENSIONS.flatMap((dimension): [string, string, BuiltinRequest, string?][] => [
    [
      `scalar on S^${dimension}, conformal`,
      `scalar${dimension}`,
      { field: 'scalar', dimension, coupling: 'conformal', complex: false },
    ],
    [
      `scalar on S^${dimension}, any coupling`,
      `scalar${dimension}`,
      { field: 'scalar', dimension, coupling, complex: false },
      `let ${PARAMETERS.coupling} = 1`,
    ],
    [`spinor on S^${dimension}`, `spinor${dimension}`, { field: 'spinor', dimension, mass: Form.zero }],
    [
      `spinor on S^${dimension} with a mass`,
      `spinor${dimension}`,
      { field: 'spinor', dimension, mass },
      `let ${PARAMETERS.mass} = 1/2`,
    ],
    ...Array.from({ length: dimension - 1 }, (_, k): [string, string, BuiltinRequest] => {
      const degree = k + 1;
      const name = degree === 1 ? 'one-form' : `${degree}-form`;
      return [`coexact ${name} on S^${dimension}`, `form${dimension}`, { field: 'form', dimension, degree }];
    }),
  ]);
  const charged: [string, string, BuiltinRequest, string?][] = [
    [
      'scalar on S^2 in flux',
      'charged',
      { field: 'charged scalar', q, coupling: Form.ratio(1, 4) },
      `let ${PARAMETERS.charge} = 1`,
    ],
    ['spinor on S^2 in flux', 'charged', { field: 'charged spinor', q }, `let ${PARAMETERS.charge} = 1`],
  ];
  return [...fields, ...charged].flatMap(([label, name, request, parameter]) => {
    const builtin = builtinSpectrum(request);
    if (builtin === null) return [];
    const towers = builtin.spectrum.towers.map(towerText);
    const lines = [...(parameter ? [parameter, ''] : []), `spectrum ${name}`, ...towers.map((line) => `  ${line}`)];
    return [{ label, text: `${lines.join('\n')}\n`, source: builtin.source }];
  });
}

function towerText({ kind, exponent, eigenvalue, degeneracy, ranges }: WrittenTower): string {
  const word = kind === 'power' ? `power(${formText(exponent)})` : kind;
  const factors = eigenvalue.map(({ form, power }) => `(${formText(form)})${power === 1 ? '' : `^${power}`}`);
  const own = ranges.map(({ name, from, to }) =>
    to === null ? `${name} >= ${formText(from)}` : `${name} = ${formText(from)} .. ${formText(to)}`,
  );
  return `${word}  ${factors.join('')}  times ${formText(degeneracy)}  for ${own.join(', ')}`;
}
