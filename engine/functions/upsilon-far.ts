import { divideFixed, multiplyFixed, numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import {
  absoluteComplex,
  divideComplex,
  type FixedComplex,
  logComplex,
  multiplyComplex,
  squareComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { logBarnesGamma } from './barnes-gamma';
import { memoiseByKey } from './kernel-memo';
import { liftPoint } from './kernel-nodes';
import type { ExactParameter } from './special-function';
import { kernelSeries } from './upsilon-corrections';

/** True where the asymptotic series in 1/z^2 reaches the bits: its smallest term is about e^{-2 pi min(b, 1/b) |Im z|}. */
export function isFarUp(x: FixedComplex, b: ExactParameter, bits: number): boolean {
  const height = Math.abs(numberFromFixed(x.im, bits));
  return 2 * Math.PI * Math.min(b.approx.re, 1 / b.approx.re) * height > (bits + 40) * Math.LN2;
}

interface FarTable {
  readonly half: bigint;
  /** 2 log Gamma_2(Q/2 | b, 1/b). */
  readonly constant: bigint;
  /** (b^2 + b^-2)/12. */
  readonly logarithmic: bigint;
  /** (2 pi small)^2. */
  readonly square: bigint;
  readonly series: readonly bigint[];
}

const tables = memoiseByKey<FarTable | null>(8);

/**
 * log Upsilon_b(Q/2 + z) for Im z > 0 far up, from the expansion of the double Gamma function (Ruijsenaars 2000, Adv. Math.
 * 156, 107):
 *   z^2 (log(-iz) - 3/2) - ((b^2 + b^-2)/12) log(-iz) + 2 log Gamma_2(Q/2) - sum_{m>=2} d_m (2m-3)!/(2 (2z)^{2m-2}),
 * sum d_m t^{2m} = t^2/(sinh bt sinh t/b). Error below 4 units where `isFarUp` holds; null where the constant is out of reach.
 */
export function farUpsilon(x: FixedComplex, b: ExactParameter, bits: number): FixedComplex | null {
  const size = Math.log2(numberFromFixed(absoluteComplex(x), bits) + 2);
  const working = bits + 32 * Math.ceil((2 * size + Math.log2(size + 2) + 16) / 32);
  const table = farTable(b, working);
  if (table === null) return null;
  const lifted = liftPoint(x, bits, working);
  const z = { re: lifted.re - table.half, im: lifted.im };
  const square = squareComplex(z, working);
  const log = logComplex({ re: z.im, im: -z.re }, working);
  const threeHalves = 3n << BigInt(working - 1);
  const lead = multiplyComplex(square, { re: log.re - threeHalves, im: log.im }, working);
  const y = {
    re: multiplyFixed(table.square, square.re, working),
    im: multiplyFixed(table.square, square.im, working),
  };
  // Terms -(1/2) rho^-2 (delta_m (2m-3)!)/y^{m-1}, rho = pi small, y = (2 rho z)^2.
  let power = divideComplex({ re: 1n << BigInt(working), im: 0n }, y, working);
  let tailRe = 0n;
  let tailIm = 0n;
  for (let m = 2; m < table.series.length; m++) {
    const coefficient = table.series[m] as bigint;
    const re = multiplyFixed(coefficient, power.re, working);
    const im = multiplyFixed(coefficient, power.im, working);
    tailRe += re;
    tailIm += im;
    if (re >> 2n === 0n && im >> 2n === 0n) break;
    const next = divideComplex(power, y, working);
    const factor = BigInt((2 * m - 2) * (2 * m - 1));
    power = { re: next.re * factor, im: next.im * factor };
  }
  const scale = divideFixed(2n << BigInt(working), table.square, working);
  const re =
    lead.re -
    multiplyFixed(table.logarithmic, log.re, working) +
    table.constant -
    multiplyFixed(scale, tailRe, working);
  const im = lead.im - multiplyFixed(table.logarithmic, log.im, working) - multiplyFixed(scale, tailIm, working);
  return { re: shiftRounded(re, working - bits), im: shiftRounded(im, working - bits) };
}

function farTable(b: ExactParameter, working: number): FarTable | null {
  const exact = b.value(working).re;
  return tables(`${working}|${exact}`, () => {
    const inverse = divideFixed(1n << BigInt(working), exact, working);
    const constant = logBarnesGamma({ re: (exact + inverse) >> 1n, im: 0n }, [real(exact), real(inverse)], working);
    if (constant === null) return null;
    const periods = exact < inverse ? [exact, inverse] : [inverse, exact];
    const rho = multiplyFixed(piFixed(working), periods[0] as bigint, working);
    const squares = multiplyFixed(exact, exact, working) + multiplyFixed(inverse, inverse, working);
    // The terms fall until 2m = 2 rho |2z|, which is more than the bits.
    const count = Math.ceil((working * Math.LN2) / 2) + 8;
    return {
      half: (exact + inverse) >> 1n,
      constant: 2n * constant.value.re,
      logarithmic: squares / 12n,
      square: 4n * multiplyFixed(rho, rho, working),
      series: kernelSeries(periods, count, working),
    };
  });
}

function real(value: bigint): FixedComplex {
  return { re: value, im: 0n };
}
