import { quantity } from '../../engine/spheres/quantity';
import { s3 } from '../../engine/spheres/s3';
import type { TheoryProduct } from '../../engine/spheres/sphere';
import type { Theory } from '../../engine/theory/theory';
import { theoryOf } from '../theory/theory-text';

/** Theories made up for these tests: every kind of group, squashings, levels, masses. */
export const THEORIES: Readonly<Record<string, readonly string[]>> = {
  'U(2) with an adjoint': [
    'sphere S3, b = 5/4',
    'gauge G = U(2), level 1, fi 1/7',
    'flavor F = SU(2), mass m',
    'matter G F R',
    'chiral q fund fund 2/5',
    'chiral p anti fund 2/5',
    'chiral phi adj 1 1/3',
  ],
  'SU(3) with eight supercharges': [
    'sphere S3',
    'supersymmetry 4',
    'gauge G = SU(3)',
    'flavor F = U(2), mass m',
    'matter G F',
    'hyper q fund fund',
  ],
  'USp(4) with an antisymmetric': [
    'sphere S3, b = sqrt(2)',
    'gauge G = USp(4), level 2',
    'flavor A = U(1), mass m',
    'matter G A R',
    'chiral q fund 1 3/10',
    'chiral a alt2 -2 1/2',
  ],
  'SO(5) with vectors': [
    'sphere S3, b = 3/4',
    'gauge G = SO(5), level -1',
    'matter G R',
    'chiral v 2*vector 1/3',
    'chiral s sym2 1/4',
  ],
  'G2 with sevens': [
    'sphere S3, b = 6/5',
    'gauge G = G2',
    'flavor F = SU(2), mass m',
    'matter G F R',
    'chiral v 7 fund 2/7',
  ],
  'U(1) x U(1)': [
    'sphere S3, b = 4/3',
    'gauge G = U(1), level 1/2, coulomb x, fi 1/3',
    'gauge H = U(1), level -1, coulomb y',
    'mixed G H = 1/2',
    'matter G H R',
    'chiral p 1 -1 1/2',
    'chiral t 2 0 1/3',
  ],
};

export interface Ready {
  readonly theory: Theory;
  readonly integrand: TheoryProduct;
  /** Coordinates that are set by themselves, Coulomb parameters first. */
  readonly names: readonly string[];
  readonly coulomb: readonly string[];
}

export function ready(lines: readonly string[]): Ready {
  const theory = theoryOf(lines);
  const integrand = quantity(s3, theory, 'integrand');
  if (integrand === null) throw new Error('No integrand.');
  const names = (role: 'gauge' | 'flavor') =>
    theory.groups
      .filter((group) => group.role === role)
      .flatMap(({ coordinates, dependent }) => coordinates.filter((name) => !dependent.has(name)));
  return { theory, integrand, names: [...names('gauge'), ...names('flavor')], coulomb: names('gauge') };
}
