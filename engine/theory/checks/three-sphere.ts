import type { Condition } from './condition';
import { levels } from './level';
import { superpotential } from './superpotential';

/** What is checked of a three-dimensional theory, in the order in which it is said. */
export const threeSphereConditions: readonly Condition[] = [levels, superpotential];
