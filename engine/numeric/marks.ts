import { type DivisorPoint, divisorOnLine, mergeDivisor } from '../product/divisor';
import type { AffineProduct } from './affine';

/**
 * Zeros (order > 0) and poles of a product of one variable in [from, to]. Entries that are not affine in the variable
 * are exponentials, which have neither, or have moving periods and are not searched.
 */
export function marksOnLine({ affine }: AffineProduct, from: number, to: number): DivisorPoint[] {
  const points = affine.flatMap(({ name, parameters, constant, slopes, power }) => {
    const [slope] = slopes;
    if (!slope) return [];
    const found = divisorOnLine(name, parameters, constant, slope, from, to);
    return found.map(({ at, order }) => ({ at, order: order * power }));
  });
  return mergeDivisor(points);
}
