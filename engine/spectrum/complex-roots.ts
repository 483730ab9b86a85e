import { sqrt } from '../arithmetic/double-complex';

/** A complex number in doubles. */
export interface Point {
  readonly re: number;
  readonly im: number;
}

/** Sweeps of the simultaneous iteration; simple roots converge in about ten, tenfold roots linearly. */
const SWEEPS = 200;

/**
 * All roots of a polynomial with complex coefficients (of n^0, n^1, ...; the last not 0) in doubles, by the
 * simultaneous iteration of Aberth 1973 (Math. Comp. 27, 339). A simple, well separated root is right to about
 * 1e-14 of the largest root; a root of multiplicity m to about 1e-14^(1/m). Used as a first guess only.
 */
export function complexRoots(coefficients: readonly Point[]): Point[] {
  const degree = coefficients.length - 1;
  const top = coefficients[degree] as Point;
  const norm = top.re * top.re + top.im * top.im;
  const monic = coefficients.map(({ re, im }) => ({
    re: (re * top.re + im * top.im) / norm,
    im: (im * top.re - re * top.im) / norm,
  }));
  if (degree === 1) return [{ re: -(monic[0] as Point).re, im: -(monic[0] as Point).im }];
  if (degree === 2) return rootsOfQuadratic(monic[1] as Point, monic[0] as Point);
  const radius = rootBound(monic);
  if (radius === 0) return Array.from({ length: degree }, () => ({ re: 0, im: 0 }));
  let roots: Point[] = Array.from({ length: degree }, (_, k) => ({
    // An angle off every symmetry axis: a start symmetric about the real axis could not leave it.
    re: radius * Math.cos((2 * Math.PI * k) / degree + 0.4),
    im: radius * Math.sin((2 * Math.PI * k) / degree + 0.4),
  }));
  for (let sweep = 0; sweep < SWEEPS; sweep++) {
    let moved = 0;
    roots = roots.map((z, k) => {
      const step = aberthStep(monic, roots, z, k);
      moved = Math.max(moved, Math.hypot(step.re, step.im));
      return { re: z.re - step.re, im: z.im - step.im };
    });
    if (moved <= 1e-16 * radius) break;
  }
  return roots;
}

/** Fujiwara 1916: every root lies within 2 max_k |q_k|^(1/k), q_k the coefficient of n^(degree - k). */
export function rootBound(monic: readonly Point[]): number {
  const degree = monic.length - 1;
  let largest = 0;
  for (let k = 1; k <= degree; k++) {
    const q = monic[degree - k] as Point;
    largest = Math.max(largest, Math.hypot(q.re, q.im) ** (1 / k));
  }
  return 2 * largest;
}

/** Roots of n^2 + b n + c; the larger one first, the other by the product, so that none cancels. */
function rootsOfQuadratic(b: Point, c: Point): Point[] {
  const half = { re: -b.re / 2, im: -b.im / 2 };
  const root = sqrt({ re: half.re * half.re - half.im * half.im - c.re, im: 2 * half.re * half.im - c.im });
  const sign = half.re * root.re + half.im * root.im < 0 ? -1 : 1;
  const larger = { re: half.re + sign * root.re, im: half.im + sign * root.im };
  const size = larger.re * larger.re + larger.im * larger.im;
  if (size === 0) return [larger, larger];
  return [
    larger,
    { re: (c.re * larger.re + c.im * larger.im) / size, im: (c.im * larger.re - c.re * larger.im) / size },
  ];
}

/** Newton step corrected for the other roots. */
function aberthStep(monic: readonly Point[], roots: readonly Point[], z: Point, place: number): Point {
  let value = { re: 0, im: 0 };
  let slope = { re: 0, im: 0 };
  for (let k = monic.length - 1; k >= 0; k--) {
    const c = monic[k] as Point;
    slope = { re: slope.re * z.re - slope.im * z.im + value.re, im: slope.re * z.im + slope.im * z.re + value.im };
    value = { re: value.re * z.re - value.im * z.im + c.re, im: value.re * z.im + value.im * z.re + c.im };
  }
  if (value.re === 0 && value.im === 0) return value;
  let repulsion = { re: 0, im: 0 };
  roots.forEach((other, k) => {
    const dx = z.re - other.re;
    const dy = z.im - other.im;
    const size = dx * dx + dy * dy;
    if (k === place || size === 0) return;
    repulsion = { re: repulsion.re + dx / size, im: repulsion.im - dy / size };
  });
  // step = value / (slope - value * repulsion)
  const re = slope.re - (value.re * repulsion.re - value.im * repulsion.im);
  const im = slope.im - (value.re * repulsion.im + value.im * repulsion.re);
  const size = re * re + im * im;
  if (size === 0) return { re: 0, im: 0 };
  return { re: (value.re * re + value.im * im) / size, im: (value.im * re - value.re * im) / size };
}
