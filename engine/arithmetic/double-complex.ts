/** Complex arithmetic in doubles on plain pairs. Hot loops work on arrays instead; this is for set-up and for single values. */
export interface DoubleComplex {
  readonly re: number;
  readonly im: number;
}

export function complex(re: number, im = 0): DoubleComplex {
  return { re, im };
}

export function add(a: DoubleComplex, b: DoubleComplex): DoubleComplex {
  return { re: a.re + b.re, im: a.im + b.im };
}

export function subtract(a: DoubleComplex, b: DoubleComplex): DoubleComplex {
  return { re: a.re - b.re, im: a.im - b.im };
}

export function negate(a: DoubleComplex): DoubleComplex {
  return { re: -a.re, im: -a.im };
}

export function conjugate(a: DoubleComplex): DoubleComplex {
  return { re: a.re, im: -a.im };
}

export function scale(a: DoubleComplex, factor: number): DoubleComplex {
  return { re: a.re * factor, im: a.im * factor };
}

export function multiply(a: DoubleComplex, b: DoubleComplex): DoubleComplex {
  return { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re };
}

/** Quotient by the larger part of the divisor (Smith 1962), so that no square overflows. Division by 0 gives NaN or infinities. */
export function divide(a: DoubleComplex, b: DoubleComplex): DoubleComplex {
  if (Math.abs(b.re) >= Math.abs(b.im)) {
    const ratio = b.im / b.re;
    const size = b.re + b.im * ratio;
    return { re: (a.re + a.im * ratio) / size, im: (a.im - a.re * ratio) / size };
  }
  const ratio = b.re / b.im;
  const size = b.re * ratio + b.im;
  return { re: (a.re * ratio + a.im) / size, im: (a.im * ratio - a.re) / size };
}

export function absolute(a: DoubleComplex): number {
  return Math.hypot(a.re, a.im);
}

export function exp(z: DoubleComplex): DoubleComplex {
  const size = Math.exp(z.re);
  return { re: size * Math.cos(z.im), im: size * Math.sin(z.im) };
}

/** e^z - 1 without cancellation for small z: Re = expm1(x) cos y - 2 sin^2(y/2). */
export function expm1(z: DoubleComplex): DoubleComplex {
  const half = Math.sin(z.im / 2);
  return { re: Math.expm1(z.re) * Math.cos(z.im) - 2 * half * half, im: Math.exp(z.re) * Math.sin(z.im) };
}

/** Principal logarithm; -Infinity at 0. */
export function log(z: DoubleComplex): DoubleComplex {
  const size = Math.hypot(z.re, z.im);
  // Near the unit circle the logarithm of a rounded modulus would lose digits.
  const re = size > 0.5 && size < 2 ? log1pOfModulus(z.re - 1, z.im) : Math.log(size);
  return { re, im: Math.atan2(z.im, z.re) };
}

/** Principal log(1 + z), accurate for small z. */
export function log1p(z: DoubleComplex): DoubleComplex {
  return { re: log1pOfModulus(z.re, z.im), im: Math.atan2(z.im, 1 + z.re) };
}

/** log |1 + x + i y| = log1p(x (2 + x) + y^2) / 2; away from the unit circle the plain form. */
function log1pOfModulus(x: number, y: number): number {
  const excess = x * (2 + x) + y * y;
  return excess > -0.5 && excess < 3 ? Math.log1p(excess) / 2 : Math.log(Math.hypot(1 + x, y));
}

/** Principal square root, real part >= 0. */
export function sqrt(z: DoubleComplex): DoubleComplex {
  if (z.re === 0 && z.im === 0) return { re: 0, im: z.im };
  const larger = Math.sqrt((Math.abs(z.re) + Math.hypot(z.re, z.im)) / 2);
  const smaller = z.im / (2 * larger);
  if (z.re >= 0) return { re: larger, im: smaller };
  return { re: Math.abs(smaller), im: z.im < 0 || Object.is(z.im, -0) ? -larger : larger };
}

export function sin(z: DoubleComplex): DoubleComplex {
  return { re: Math.sin(z.re) * Math.cosh(z.im), im: Math.cos(z.re) * Math.sinh(z.im) };
}

export function cos(z: DoubleComplex): DoubleComplex {
  return { re: Math.cos(z.re) * Math.cosh(z.im), im: -Math.sin(z.re) * Math.sinh(z.im) };
}

export function sinh(z: DoubleComplex): DoubleComplex {
  return { re: Math.sinh(z.re) * Math.cos(z.im), im: Math.cosh(z.re) * Math.sin(z.im) };
}

export function cosh(z: DoubleComplex): DoubleComplex {
  return { re: Math.cosh(z.re) * Math.cos(z.im), im: Math.sinh(z.re) * Math.sin(z.im) };
}
