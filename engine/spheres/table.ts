import type { SphereName } from '../language/tree';
import { s2 } from './s2';
import { s3 } from './s3';
import { s4 } from './s4';
import { s5 } from './s5';
import type { Sphere } from './sphere';

/** The spheres that can be computed on. */
export const spheres: Readonly<Record<SphereName, Sphere>> = { S2: s2, S3: s3, S4: s4, S5: s5 };
