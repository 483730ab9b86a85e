import { charges } from './charges';
import type { Condition } from './condition';
import { convergence } from './convergence';
import { halfHypers } from './half-hypers';
import { levels } from './level';
import { monopoles } from './monopoles';
import { pureChernSimons } from './pure-chern-simons';
import { contour, unitarity } from './r-charges';
import { superpotential } from './superpotential';

/** What is checked of a three-dimensional theory, in the order in which it is said. */
export const threeSphereConditions: readonly Condition[] = [
  levels,
  charges,
  halfHypers,
  superpotential,
  pureChernSimons,
  convergence,
  contour,
  monopoles,
  unitarity,
];
