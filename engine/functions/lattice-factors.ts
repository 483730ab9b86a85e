import { numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import { atan2Fixed } from '../arithmetic/fixed-atan';
import { absoluteComplex, type FixedComplex, logModulus, zeroComplex } from '../arithmetic/fixed-complex';

/** The part of a lattice table that makes factors. */
export interface FactorTable {
  /** Fraction bits of everything here. */
  readonly bits: number;
  /** l^2 of the points taken as factors, and about the same in doubles. */
  readonly squares: readonly FixedComplex[];
  readonly roughRe: Float64Array;
  readonly roughIm: Float64Array;
  /** All numbers here are real. */
  readonly real: boolean;
}

/** The product of l^2 - z^2. */
export interface Factors {
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

function realFactors({ bits, squares, roughRe }: FactorTable, square: bigint, closest: bigint): Factors | null {
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

/** A running product mantissa 2^exponent whose size is followed in doubles. */
class Running {
  private readonly bits: number;
  private size = 1;
  exponent = 0;
  mantissa: FixedComplex;

  constructor(bits: number) {
    this.bits = bits;
    this.mantissa = { re: 1n << BigInt(bits), im: 0n };
  }

  /** `size` is about |factor|. */
  multiply(factor: FixedComplex, size: number): void {
    this.mantissa = threeProducts(this.mantissa, factor, this.bits);
    this.size *= size;
    if (this.size <= DRIFT && this.size >= 1 / DRIFT) return;
    const by = Math.round(Math.log2(this.size));
    const { re, im } = this.mantissa;
    this.mantissa = { re: shiftRounded(re, by), im: shiftRounded(im, by) };
    this.exponent += by;
    this.size *= 2 ** -by;
  }
}

/** A complex product by three real ones: above some hundred bits products are what takes the time. */
function threeProducts(a: FixedComplex, b: FixedComplex, bits: number): FixedComplex {
  const one = a.re * b.re;
  const two = a.im * b.im;
  const three = (a.re + a.im) * (b.re + b.im);
  const shift = BigInt(bits);
  return { re: (one - two) >> shift, im: (three - one - two) >> shift };
}

function complexFactors(table: FactorTable, square: FixedComplex, closest: bigint): Factors | null {
  const { bits, squares, roughRe, roughIm, real } = table;
  const re = numberFromFixed(square.re, bits);
  const im = numberFromFixed(square.im, bits);
  const narrow = CANCELLING * Math.hypot(re, im);
  const running = new Running(bits);
  const shift = BigInt(bits);
  const imSquare = (square.im * square.im) >> shift;
  let angle = 0;
  let slope = 0;
  // At real periods two factors (u - iy)(v - iy) = uv - y^2 - iy(u + v) are put together.
  let waiting: { readonly re: bigint; readonly size: number } | null = null;
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
    if (!real || distance < narrow) running.multiply(factor, distance);
    else if (waiting === null) waiting = { re: factor.re, size: distance };
    else {
      const both = {
        re: ((waiting.re * factor.re) >> shift) - imSquare,
        im: -((square.im * (waiting.re + factor.re)) >> shift),
      };
      running.multiply(both, distance * waiting.size);
      waiting = null;
    }
  }
  if (waiting !== null) running.multiply({ re: waiting.re, im: -square.im }, waiting.size);
  return { mantissa: running.mantissa, exponent: running.exponent, angle, slope };
}

/**
 * The product over the factors of a table at `square` = z^2. Null where one is at most `closest` in size, in units of the
 * table's last place.
 */
export function latticeFactors(table: FactorTable, square: FixedComplex, closest: bigint): Factors | null {
  return table.real && square.im === 0n
    ? realFactors(table, square.re, closest)
    : complexFactors(table, square, closest);
}

/** log prod l^2 over the factors of a table, the imaginary part modulo 2 pi. */
export function logOfSquares(table: FactorTable): FixedComplex {
  const { bits } = table;
  const factors = latticeFactors(table, zeroComplex, -1n);
  if (factors === null) throw new RangeError('a lattice point is 0');
  const { mantissa, exponent } = factors;
  return { re: logModulus(mantissa, bits - exponent, bits), im: atan2Fixed(mantissa.im, mantissa.re, bits) };
}
