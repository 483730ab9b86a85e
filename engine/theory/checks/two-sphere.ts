import { charges } from './charges';
import type { Condition } from './condition';
import { superpotential } from './superpotential';
import { thetaAngle } from './theta-angle';
import { centralCharge, contourInTwo, fiRunning, twistedChirals } from './two-dimensional';

/** What is checked of a two-dimensional N = (2,2) theory, in the order in which it is said. */
export const twoSphereConditions: readonly Condition[] = [
  charges,
  twistedChirals,
  superpotential,
  fiRunning,
  thetaAngle,
  centralCharge,
  contourInTwo,
];
