import { betaFunction } from './beta-function';
import { charges } from './charges';
import type { Condition } from './condition';
import { conformalAnomaly } from './conformal-anomaly';
import { globalAnomaly } from './global-anomaly';
import { halfHypers } from './half-hypers';

/** What is checked of a four-dimensional N = 2 theory, in the order in which it is said. */
export const fourSphereConditions: readonly Condition[] = [
  globalAnomaly,
  halfHypers,
  charges,
  betaFunction,
  conformalAnomaly,
];
