import type { SphereName } from '../language/tree';
import { s3 } from './s3';
import type { Sphere } from './sphere';

/** The spheres that can be computed on. */
export const spheres: Readonly<Partial<Record<SphereName, Sphere>>> = { S3: s3 };
