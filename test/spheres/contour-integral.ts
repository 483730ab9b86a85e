import { elementary } from '../../engine/spheres/quantity';
import { s3 } from '../../engine/spheres/s3';
import type { Theory } from '../../engine/theory/theory';
import { complexProgram, grid, type Point, productOf, realProgram, valuesAt } from './evaluate';

/**
 * Lines sigma = e^{-i angle} t for all Coulomb parameters, t in steps to both sides. The trapezoid rule on a line
 * converges geometrically: its error is e^{-2 pi d/step}, d the distance to the nearest singularity.
 */
export interface Contour {
  readonly angle: number;
  readonly reach: number;
  readonly step: number;
}

/**
 * The partition function (1/|W|) int d sigma of the integrand, unit measure on the cocharacter lattice, by the
 * trapezoid rule in doubles.
 */
export function partitionFunction(
  theory: Theory,
  at: Point,
  { angle, reach, step }: Contour,
): { re: number; im: number } {
  const gauge = theory.groups.filter(({ role }) => role === 'gauge');
  const names = gauge.flatMap(({ coordinates, dependent }) => coordinates.filter((name) => !dependent.has(name)));
  const product = productOf(s3, theory, 'integrand');
  const values = valuesAt(s3, theory, at);
  const points = cube(grid(reach, step), names.length);
  const turned = (factor: number) => points.map((axis) => axis.map((t) => t * factor));
  // On the real line as it is plotted: simplified, and in real variables.
  const { re, im } =
    angle === 0
      ? realProgram(elementary(s3, theory, product).product, names, values)(points)
      : complexProgram(product, names, values).at(turned(Math.cos(angle)), turned(-Math.sin(angle)));
  const measure = gauge.reduce(
    (product, { group }) => (product * group.unitMeasure.toNumber()) / Number(group.weylOrder),
    step ** names.length,
  );
  const phase = -angle * names.length;
  const [x, y] = [measure * total(re), measure * total(im)];
  return { re: x * Math.cos(phase) - y * Math.sin(phase), im: x * Math.sin(phase) + y * Math.cos(phase) };
}

/** The integral over a box by the trapezoid rule; the integrand is asked for all points at once. */
export function integral(
  axes: readonly [Axis, Axis],
  integrand: (points: readonly [Float64Array, Float64Array]) => { re: Float64Array; im: Float64Array },
): { re: number; im: number } {
  const [first, second] = axes.map(({ reach, step }) => grid(reach, step)) as [Float64Array, Float64Array];
  const size = first.length * second.length;
  const x = Float64Array.from({ length: size }, (_, k) => first[k % first.length] as number);
  const y = Float64Array.from({ length: size }, (_, k) => second[Math.floor(k / first.length)] as number);
  const { re, im } = integrand([x, y]);
  const cell = axes[0].step * axes[1].step;
  return { re: cell * total(re), im: cell * total(im) };
}

interface Axis {
  readonly reach: number;
  readonly step: number;
}

/** All points of a grid in some dimensions, one array a coordinate. */
function cube(axis: Float64Array, dimension: number): Float64Array[] {
  const size = axis.length ** dimension;
  return Array.from({ length: dimension }, (_, d) =>
    Float64Array.from({ length: size }, (_unused, k) => axis[Math.floor(k / axis.length ** d) % axis.length] as number),
  );
}

/** The sum with its rounding errors carried along (Kahan 1965, Comm. ACM 8, 40). */
function total(terms: Float64Array): number {
  let sum = 0;
  let lost = 0;
  for (const term of terms) {
    const next = term - lost;
    const larger = sum + next;
    lost = larger - sum - next;
    sum = larger;
  }
  return sum;
}
