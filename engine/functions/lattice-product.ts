import { numberFromFixed } from '../arithmetic/fixed';
import { atan2Fixed } from '../arithmetic/fixed-atan';
import {
  divideComplex,
  type FixedComplex,
  logModulus,
  multiplyComplex,
  squareComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { latticeFactors } from './lattice-factors';
import type { LatticeTable } from './lattice-table';

/** A logarithm with the table's fraction bits, and a bound of its derivative by z. */
export interface LatticeLogarithm {
  readonly value: FixedComplex;
  readonly slope: number;
}

/**
 * log prod (1 - z^2/l^2), regularised as in `latticeTable`, principal logarithms of the factors added up: the branch
 * that is 0 at z = 0 and analytic off the rays from the points +-l outwards. z has the table's fraction bits, |z| is
 * at most its radius. Null where z cannot be told from a point: `closest` is the squared distance l^2 - z^2 that counts
 * as none, in units of the table's last place.
 */
export function logLatticeProduct(table: LatticeTable, z: FixedComplex, closest: bigint): LatticeLogarithm | null {
  const { bits, logSquares } = table;
  const square = squareComplex(z, bits);
  const factors = latticeFactors(table, square, closest);
  if (factors === null) return null;
  const { mantissa, exponent, angle } = factors;
  const principal = atan2Fixed(mantissa.im, mantissa.re, bits) - logSquares.im;
  const turns = BigInt(Math.round((angle - numberFromFixed(principal, bits)) / (2 * Math.PI)));
  const re = logModulus(mantissa, bits - exponent, bits) - logSquares.re;
  const series = seriesAt(table, square);
  const size = Math.hypot(numberFromFixed(z.re, bits), numberFromFixed(z.im, bits));
  return {
    value: { re: re + series.re, im: principal + 2n * turns * piFixed(bits) + series.im },
    slope: size * factors.slope + seriesSlope(table, size),
  };
}

/** (z/radius)^2. */
function relative({ bits, radiusSquare }: LatticeTable, square: FixedComplex): FixedComplex {
  return divideComplex(square, { re: radiusSquare, im: 0n }, bits);
}

function seriesAt(table: LatticeTable, square: FixedComplex): FixedComplex {
  const { bits, coefficients, real } = table;
  const y = relative(table, square);
  if (real && y.im === 0n) {
    const shift = BigInt(bits);
    let sum = 0n;
    for (let j = coefficients.length - 1; j >= 0; j--)
      sum = ((sum + (coefficients[j] as FixedComplex).re) * y.re) >> shift;
    return { re: sum, im: 0n };
  }
  let sum: FixedComplex = { re: 0n, im: 0n };
  for (let j = coefficients.length - 1; j >= 0; j--) {
    const coefficient = coefficients[j] as FixedComplex;
    sum = multiplyComplex({ re: sum.re + coefficient.re, im: sum.im + coefficient.im }, y, bits);
  }
  return sum;
}

/** Bound of the derivative of the series: its coefficients fall at least like 4^-j beyond the first terms. */
function seriesSlope({ bits, coefficients, radius }: LatticeTable, size: number): number {
  const ratio = size / radius;
  let sum = 0;
  let power = ratio;
  for (let j = 0; j < Math.min(coefficients.length, 24); j++) {
    const { re, im } = coefficients[j] as FixedComplex;
    sum += 2 * (j + 1) * power * Math.hypot(numberFromFixed(re, bits), numberFromFixed(im, bits));
    power *= ratio * ratio;
  }
  return sum / radius;
}
