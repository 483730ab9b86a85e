import {
  absoluteComplex,
  addComplex,
  divideComplex,
  type FixedComplex,
  multiplyComplex,
  oneComplex,
  scaleComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { memoiseBounded } from '../arithmetic/memo';
import { listBits, scaledBernoulli } from './euler-maclaurin';

/** What the expansion of a multiple zeta function at infinity needs of its periods. */
export interface BarnesSeries {
  /** Half the sum of the periods. */
  readonly half: FixedComplex;
  /** 1 over their product. */
  readonly inverseVolume: FixedComplex;
  /** (W/(2 pi))^2, W the largest modulus. */
  readonly unit: bigint;
  /** d_2j (2 pi/W)^(2j), product of (w_i t/2)/sinh(w_i t/2) = sum d_2j t^2j; of the order of 1. */
  readonly coefficients: readonly FixedComplex[];
}

/** The first period has the largest modulus; all have `bits` fraction bits. */
export function barnesSeries(periods: readonly FixedComplex[], bits: number): BarnesSeries {
  return seriesOf([bits, ...periods.flatMap(({ re, im }) => [re, im])].join());
}

const seriesOf = memoiseBounded(32, (key: string): BarnesSeries => {
  const [first = '0', ...rest] = key.split(',');
  const bits = Number(first);
  const periods = Array.from({ length: rest.length / 2 }, (_, k) => ({
    re: BigInt(rest[2 * k] as string),
    im: BigInt(rest[2 * k + 1] as string),
  }));
  const largest = absoluteComplex(periods[0] as FixedComplex);
  const sum = periods.reduce(addComplex, zeroComplex);
  const volume = periods.reduce((product, w) => multiplyComplex(product, w, bits), oneComplex(bits));
  const turn = (largest << BigInt(bits)) / (2n * piFixed(bits));
  const series = periods
    .map((w) => divideComplex(w, { re: largest, im: 0n }, bits))
    .map((v) => hyperbolicSeries(v, bits));
  return {
    half: { re: sum.re >> 1n, im: sum.im >> 1n },
    inverseVolume: divideComplex(oneComplex(bits), volume, bits),
    unit: (turn * turn) >> BigInt(bits),
    coefficients: series.reduce((a, b) => productOf(a, b, bits)),
  };
});

/** Coefficients of s^2j in (pi v s)/sinh(pi v s): -(1 - 2^(1-2j)) (2 pi)^(2j) B_2j/(2j)! v^2j (DLMF 4.19.4). */
function hyperbolicSeries(v: FixedComplex, bits: number): FixedComplex[] {
  const list = scaledBernoulli(listBits(bits));
  const square = multiplyComplex(v, v, bits);
  const result = [oneComplex(bits)];
  let power = oneComplex(bits);
  list.forEach((b, k) => {
    power = multiplyComplex(power, square, bits);
    const factor = (b >> BigInt(2 * k + 1)) - b;
    result.push(scaleComplex(power, factor, listBits(bits)));
  });
  return result;
}

function productOf(a: readonly FixedComplex[], b: readonly FixedComplex[], bits: number): FixedComplex[] {
  if (alternates(a) && alternates(b)) return realProduct(a, b, bits);
  const shift = BigInt(bits);
  return a.map((_, k) => {
    let re = 0n;
    let im = 0n;
    for (let i = 0; i <= k; i++) {
      const x = a[i] as FixedComplex;
      const y = b[k - i] as FixedComplex;
      re += x.re * y.re - x.im * y.im;
      im += x.re * y.im + x.im * y.re;
    }
    return { re: re >> shift, im: im >> shift };
  });
}

/** True for a real period; an imaginary one has real coefficients, too, but of one sign. */
function alternates(list: readonly FixedComplex[]): boolean {
  return list.every(({ re, im }, k) => im === 0n && (k % 2 === 0 ? re >= 0n : re <= 0n));
}

/**
 * The same for real periods, where the coefficients of 1/sinh alternate in sign: their sizes as the digits of two long
 * numbers, multiplied at once (Kronecker's substitution; von zur Gathen and Gerhard, Modern Computer Algebra, 8.4).
 */
function realProduct(a: readonly FixedComplex[], b: readonly FixedComplex[], bits: number): FixedComplex[] {
  // Sizes are below 4, and fewer than 2^20 products are added up. Four bits make a digit.
  const width = Math.ceil((2 * bits + 24) / 4);
  const packed = (list: readonly FixedComplex[]): bigint => {
    const digits = list.map(({ re }) => (re < 0n ? -re : re).toString(16).padStart(width, '0'));
    return BigInt(`0x${digits.reverse().join('')}`);
  };
  const text = (packed(a) * packed(b)).toString(16).padStart((a.length + b.length) * width, '0');
  return a.map((_, k) => {
    const size = BigInt(`0x${text.slice(text.length - (k + 1) * width, text.length - k * width)}`) >> BigInt(bits);
    return { re: k % 2 === 0 ? size : -size, im: 0n };
  });
}
