import { numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import { atan2Fixed } from '../arithmetic/fixed-atan';
import {
  absoluteComplex,
  divideComplex,
  type FixedComplex,
  logModulus,
  multiplyComplex,
  squareComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
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
  const factors =
    table.real && square.im === 0n ? realFactors(table, square.re, closest) : complexFactors(table, square, closest);
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

interface Factors {
  /** The product of l^2 - z^2 is mantissa 2^exponent. */
  readonly mantissa: FixedComplex;
  readonly exponent: number;
  /** Sum of the principal arguments of 1 - z^2/l^2. */
  readonly angle: number;
  /** Sum of 2/|l^2 - z^2|. */
  readonly slope: number;
}

/** Beyond a factor of 2^16 from 1 the running product is brought back. */
const DRIFT = 65536;

function realFactors({ bits, squares, roughRe }: LatticeTable, square: bigint, closest: bigint): Factors | null {
  const rough = numberFromFixed(square, bits);
  const shift = BigInt(bits);
  let mantissa = 1n << shift;
  let size = 1;
  let exponent = 0;
  let negative = 0;
  let slope = 0;
  for (let k = 0; k < squares.length; k++) {
    const factor = (squares[k] as FixedComplex).re - square;
    let distance = Math.abs((roughRe[k] as number) - rough);
    if (distance < CANCELLING * rough) {
      if (factor <= closest && -factor <= closest) return null;
      distance = Math.abs(numberFromFixed(factor, bits));
    }
    if (factor < 0n) negative++;
    slope += 2 / distance;
    mantissa = (mantissa * factor) >> shift;
    size *= distance;
    if (size > DRIFT || size < 1 / DRIFT) {
      const by = Math.round(Math.log2(size));
      mantissa = by > 0 ? mantissa >> BigInt(by) : mantissa << BigInt(-by);
      exponent += by;
      size *= 2 ** -by;
    }
  }
  return { mantissa: { re: mantissa, im: 0n }, exponent, angle: Math.PI * negative, slope };
}

/** Differences of doubles below this share of their size are taken from the exact numbers. */
const CANCELLING = 1e-6;

function complexFactors(table: LatticeTable, square: FixedComplex, closest: bigint): Factors | null {
  const { bits, squares, roughRe, roughIm, real } = table;
  const shift = BigInt(bits);
  const re = numberFromFixed(square.re, bits);
  const im = numberFromFixed(square.im, bits);
  const narrow = CANCELLING * Math.hypot(re, im);
  let product: FixedComplex = { re: 1n << shift, im: 0n };
  let size = 1;
  let exponent = 0;
  let angle = 0;
  let slope = 0;
  for (let k = 0; k < squares.length; k++) {
    const exact = squares[k] as FixedComplex;
    const factor = { re: exact.re - square.re, im: exact.im - square.im };
    const [baseRe, baseIm] = [roughRe[k] as number, roughIm[k] as number];
    let [offRe, offIm] = [baseRe - re, baseIm - im];
    let distance = Math.hypot(offRe, offIm);
    if (distance < narrow) {
      if (absoluteComplex(factor) <= closest) return null;
      [offRe, offIm] = [numberFromFixed(factor.re, bits), numberFromFixed(factor.im, bits)];
      distance = Math.hypot(offRe, offIm);
    }
    angle += real
      ? Math.atan2(offIm, offRe)
      : Math.atan2(offIm * baseRe - offRe * baseIm, offRe * baseRe + offIm * baseIm);
    slope += 2 / distance;
    product = multiplyComplex(product, factor, bits);
    size *= distance;
    if (size > DRIFT || size < 1 / DRIFT) {
      const by = Math.round(Math.log2(size));
      product = { re: shiftRounded(product.re, by), im: shiftRounded(product.im, by) };
      exponent += by;
      size *= 2 ** -by;
    }
  }
  return { mantissa: product, exponent, angle, slope };
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
