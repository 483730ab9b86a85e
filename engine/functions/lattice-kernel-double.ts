import { fixedFromNumber, numberFromFixed } from '../arithmetic/fixed';
import { latticeRadius, latticeTable } from './lattice-table';
import type { Complex, ExactParameter } from './special-function';

/** Bits of the tables that doubles are cut from. */
export const TABLE_BITS = 62;

/** A lattice table cut to doubles; see `LatticeTable`. */
interface DoubleTable {
  readonly radius: number;
  readonly squaresRe: Float64Array;
  readonly squaresIm: Float64Array;
  /** Coefficients of (z/radius)^2, (z/radius)^4, ... */
  readonly seriesRe: Float64Array;
  readonly seriesIm: Float64Array;
}

/** A pair of doubles, exactly, as a parameter of the precise tier. */
export function parameterOfComplex({ re, im }: Complex): ExactParameter {
  return {
    square: null,
    value: (bits) => ({ re: fixedFromNumber(re, bits), im: fixedFromNumber(im, bits) }),
    approx: { re, im },
  };
}

function doubleTable(periods: readonly ExactParameter[], radius: number): DoubleTable | null {
  const table = latticeTable(periods, radius, TABLE_BITS);
  if (table === null) return null;
  const { bits, roughRe, roughIm, coefficients } = table;
  return {
    radius,
    squaresRe: roughRe,
    squaresIm: roughIm,
    seriesRe: Float64Array.from(coefficients, ({ re }) => numberFromFixed(re, bits)),
    seriesIm: Float64Array.from(coefficients, ({ im }) => numberFromFixed(im, bits)),
  };
}

/** log Gamma_N at half the sum of the periods; null where it is out of reach. */
export function latticeCenter(periods: readonly ExactParameter[]): Complex | null {
  const table = latticeTable(periods, latticeRadius(0, totalSize(periods)), TABLE_BITS);
  if (table === null) return null;
  const { re, im } = table.center();
  return { re: numberFromFixed(re, table.bits), im: numberFromFixed(im, table.bits) };
}

function totalSize(periods: readonly ExactParameter[]): number {
  const re = periods.reduce((sum, { approx }) => sum + approx.re, 0);
  const im = periods.reduce((sum, { approx }) => sum + approx.im, 0);
  return Math.hypot(re, im);
}

/** Distance from a zero that counts as none, relative to its size. */
const ZERO_WIDTH = 16 * 2 ** -53;

/**
 * log prod (1 - z^2/l^2), regularised as in `latticeTable`, in doubles for complex periods: sum of principal logarithms of
 * the factors. Tables are made when an argument first needs them. -Infinity at a zero, NaN where too many points would be
 * needed. Error: about 1e-15 times the number of factors' root, of max(1, |log|, |z d log/dz|).
 */
export function latticeLogarithm(periods: readonly ExactParameter[]): (re: number, im: number) => Complex {
  const total = totalSize(periods);
  const tables = new Map<number, DoubleTable | null>();
  return (re, im) => {
    const radius = latticeRadius(Math.hypot(re, im), total);
    let table = tables.get(radius);
    if (table === undefined) {
      table = Number.isFinite(radius) ? doubleTable(periods, radius) : null;
      tables.set(radius, table);
    }
    return table === null ? { re: Number.NaN, im: Number.NaN } : evaluate(table, re, im);
  };
}

function evaluate({ radius, squaresRe, squaresIm, seriesRe, seriesIm }: DoubleTable, re: number, im: number): Complex {
  const squareRe = (re - im) * (re + im);
  const squareIm = 2 * re * im;
  let modulus = 1;
  let logarithm = 0;
  let angle = 0;
  for (let k = 0; k < squaresRe.length; k++) {
    const baseRe = squaresRe[k] as number;
    const baseIm = squaresIm[k] as number;
    const norm = baseRe * baseRe + baseIm * baseIm;
    const offRe = baseRe - squareRe;
    const offIm = baseIm - squareIm;
    // (l^2 - z^2)/l^2.
    const factorRe = (offRe * baseRe + offIm * baseIm) / norm;
    const factorIm = (offIm * baseRe - offRe * baseIm) / norm;
    const size = factorRe * factorRe + factorIm * factorIm;
    if (size <= ZERO_WIDTH * ZERO_WIDTH) return { re: Number.NEGATIVE_INFINITY, im: 0 };
    angle += Math.atan2(factorIm, factorRe);
    modulus *= size;
    if (modulus > 1e100 || modulus < 1e-100) {
      logarithm += Math.log(modulus);
      modulus = 1;
    }
  }
  const yRe = squareRe / (radius * radius);
  const yIm = squareIm / (radius * radius);
  let sumRe = 0;
  let sumIm = 0;
  for (let j = seriesRe.length - 1; j >= 0; j--) {
    const addedRe = sumRe + (seriesRe[j] as number);
    const addedIm = sumIm + (seriesIm[j] as number);
    sumRe = addedRe * yRe - addedIm * yIm;
    sumIm = addedRe * yIm + addedIm * yRe;
  }
  return { re: 0.5 * (logarithm + Math.log(modulus)) + sumRe, im: angle + sumIm };
}
