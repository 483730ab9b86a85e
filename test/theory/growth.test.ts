import { describe, expect, test } from 'vitest';
import { formDouble } from '../../engine/arithmetic/form-double';
import { Form } from '../../engine/exact/form';
import { compile } from '../../engine/numeric/program';
import { s3 } from '../../engine/spheres/s3';
import { coulombBranch } from '../../engine/theory/checks/coulomb-branch';
import { weightSums } from '../../engine/theory/checks/gauge-weights';
import { growthOf } from '../../engine/theory/checks/growth';
import { printedVector } from '../../engine/theory/checks/lattice';
import type { Theory } from '../../engine/theory/theory';
import { theoryOf } from './theory-text';

// The second route is the integrand itself, evaluated by the special functions of the engine, whose own asymptotics are
// tested against DLMF and mpmath: sigma = r n with r large.

interface Direction {
  readonly theory: Theory;
  readonly point: readonly number[];
}

/** Away from the walls, where the vector multiplet vanishes; a shift changes neither slope nor bend. */
const SHIFTS = (k: number) => 0.11 / (k + 1);

function logIntegrand({ theory, point }: Direction, radii: readonly number[]): { re: Float64Array; im: Float64Array } {
  const branch = coulombBranch(theory);
  if (branch === null) throw new Error('No Coulomb branch.');
  const names: string[] = [];
  const slopes: number[] = [];
  let offset = 0;
  for (const { group, index } of branch.groups) {
    const owner = theory.groups[index];
    const printed = printedVector(group, point.slice(offset, offset + group.rank));
    offset += group.rank;
    for (const place of group.independent) {
      names.push(owner?.coordinates[place] ?? '');
      slopes.push(printed[place]?.toNumber() ?? Number.NaN);
    }
  }
  const product = [
    ...s3.vector(theory),
    ...theory.multiplets.flatMap((multiplet) => s3.multiplet(theory, multiplet)),
    ...s3.classical(theory),
  ];
  const b = theory.geometry.get('@b') as Form;
  const geometry: Record<string, Form> = { '@b': b, '@Q': b.add(b.inverse()) };
  const masses = new Set(
    theory.groups.filter(({ role }) => role === 'flavor').flatMap(({ coordinates }) => coordinates),
  );
  const values = (name: string): Form | null => (masses.has(name) ? Form.zero : (geometry[name] ?? null));
  const program = compile(product, names, values);
  const re = new Float64Array(radii.length);
  const im = new Float64Array(radii.length);
  program.addLog(
    slopes.map((slope, k) => Float64Array.from(radii, (r) => slope * r + SHIFTS(k))),
    re,
    im,
  );
  return { re, im };
}

function predicted({ theory, point }: Direction): { exponent: number; level: number } {
  const branch = coulombBranch(theory);
  if (branch === null) throw new Error('No Coulomb branch.');
  const growth = growthOf(theory, branch);
  const sums = branch.matter.map(({ weights }) => weightSums(weights, point));
  const phase = growth.phase(point, sums);
  const level = phase.reduce((sum, entry, k) => sum + entry * (point[k] as number), 0) / growth.phaseScale;
  return { exponent: growth.exponent(point, sums) / growth.scale, level };
}

const theories: [string, string[], number[][]][] = [
  [
    'U(1), charges 1 and -2',
    ['gauge G = U(1), level 1/2', 'matter G R', 'chiral q 1 1/3', 'chiral p -2 3/5'],
    [[1], [-1]],
  ],
  [
    'U(2) with a determinant and two levels',
    ['gauge G = U(2), level 1, abelian 2', 'matter G R', 'chiral q 2*fund 1/4', 'chiral d det 2/3', 'chiral a adj 1/3'],
    [
      [1, 0],
      [1, 1],
      [3, -2],
      [0, -1],
    ],
  ],
  [
    'SU(3), squashed',
    ['sphere S3, b = 5/4', 'gauge G = SU(3), level 1', 'matter G R', 'chiral q sym2 2/5', 'chiral p anti 1/5'],
    [
      [1, 1],
      [2, 1],
      [1, 2],
      [5, 3],
    ],
  ],
  [
    'G2',
    ['gauge G = G2, level 1', 'matter G R', 'chiral q fund 2/5'],
    [
      [1, 2],
      [2, 3],
      [3, 5],
    ],
  ],
  [
    'SO(5) and Spin(5)',
    ['gauge G = Spin(5), level 1', 'matter G R', 'chiral s spinor 1/3', 'chiral v vector 1/5'],
    [
      [1, 1],
      [3, 2],
    ],
  ],
  [
    'two groups, a mixed level, an imaginary FI parameter',
    [
      ...['sphere S3, b = 3/4', 'gauge G = U(1), level 1, fi i/5', 'gauge H = U(2), level 1/2', 'mixed G H = 1/2'],
      ...[
        'flavor F = SU(2)',
        'matter G H F R',
        'chiral b 1 anti fund 1/3',
        'hyper h 0 fund 1 1/2',
        'chiral c 2 1 1 4/5',
      ],
    ],
    [
      [1, 0, 0],
      [0, 1, 0],
      [2, 1, -1],
      [-1, 0, -2],
    ],
  ],
];

describe.each(theories)('%s', (_name, lines, points) => {
  test.each(points.map((point) => [point]))('along %j', (point) => {
    const direction = { theory: theoryOf(lines), point };
    const { exponent, level } = predicted(direction);
    const b = formDouble(direction.theory.geometry.get('@b') as Form, () => null)?.re as number;
    // Corrections are of order exp(-2 pi r min(b, 1/b)), and the phase is quadratic in r.
    const { re, im } = logIntegrand(direction, [5, 5.05, 5.1]);
    const slope = ((re[2] as number) - (re[0] as number)) / 0.1;
    expect(slope).toBeCloseTo(-Math.PI * (b + 1 / b) * exponent, 6);
    const bend = (im[0] as number) - 2 * (im[1] as number) + (im[2] as number);
    const turns = (bend + 2 * Math.PI * level * 0.05 ** 2) / (2 * Math.PI);
    expect(Math.abs(turns - Math.round(turns))).toBeLessThan(1e-8);
  });
});
