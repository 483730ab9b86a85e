import { charges } from './charges';
import type { Condition } from './condition';
import { cubicLevel } from './cubic-level';
import { convexity, cubicConvergence } from './five-dimensional';
import { globalAnomalyInFive } from './global-anomaly';
import { halfHypers } from './half-hypers';

/** What is checked of a five-dimensional N = 1 theory, in the order in which it is said. */
export const fiveSphereConditions: readonly Condition[] = [
  cubicLevel,
  globalAnomalyInFive,
  halfHypers,
  charges,
  cubicConvergence,
  convexity,
];
