import { numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  type FixedComplex,
  logComplex,
  multiplyComplex,
  oneComplex,
  scaleComplex,
  squareComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { type BarnesSeries, barnesSeries } from './barnes-series';
import { doubleSine } from './double-sine';
import { latticeRadius, latticeReach, latticeTable, TOO_MANY_POINTS, WIDEST } from './lattice-table';
import { argumentShare } from './precise-log';
import type { ExactParameter, PreciseLog } from './special-function';

type Periods = readonly [ExactParameter, ExactParameter];

/** True where the expansion of Gamma_2 at infinity reaches the bits; z with Re z >= 0. */
export function isFarOut(z: FixedComplex, periods: Periods, bits: number): boolean {
  const re = numberFromFixed(z.re, bits);
  const im = numberFromFixed(z.im, bits);
  const needed = latticeReach(bits);
  return periods.every(({ approx: p }) => {
    const norm = p.re * p.re + p.im * p.im;
    const ratio = (re * p.re + im * p.im) / norm;
    const size = Math.hypot(re, im) / Math.sqrt(norm);
    // |z/p| cos(arg/2), as for the far points of the table.
    return ratio > -WIDEST * size && size * (size + ratio) >= 2 * needed * needed;
  });
}

/**
 * log Upsilon_b(Q/2 + z) far out, Re z >= 0, from the expansion of the double Gamma function (Ruijsenaars 2000, Adv. Math.
 * 156, 107) and the double sine Gamma_2(Q - x)/Gamma_2(x) = s_b(iz):
 *   log Upsilon = 2 log Gamma_2(Q/2) - 2 log Gamma_2(Q/2 + z) - log s_b(iz),
 *   log Gamma_2(Q/2 + z) = (3/2 - log z) z^2/2 - d_1 log z + sum_{i>=2} d_i (2i-3)! z^{2-2i},
 * sum d_i t^{2i} = (t/2)^2/(sinh(bt/2) sinh(t/2b)). `offset` gives z with any number of fraction bits.
 */
export function farUpsilon(offset: (bits: number) => FixedComplex, periods: Periods, bits: number): PreciseLog {
  const rough = offset(bits);
  const [b, inverse] = periods;
  const sine = doubleSine.precise({ re: -rough.im, im: rough.re }, [b], bits);
  if (sine.kind === 'pole') return { kind: 'zero', order: sine.order };
  if (sine.kind !== 'value') return sine.kind === 'zero' ? { kind: 'indistinct' } : sine;
  const size = numberFromFixed(absoluteComplex(rough), bits);
  const log2Size = Math.log2(size + 2);
  const working = bits + 32 * Math.ceil((2 * log2Size + Math.log2(log2Size + 2) + 20) / 32);
  const total = { re: b.approx.re + inverse.approx.re, im: b.approx.im + inverse.approx.im };
  const table = latticeTable(periods, latticeRadius(0, Math.hypot(total.re, total.im)), working);
  if (table === null) return { kind: 'unreachable', says: TOO_MANY_POINTS };
  const center = table.center();
  const values = periods.map((w) => w.value(working));
  const sorted = values.sort((v, w) => (absoluteComplex(v) < absoluteComplex(w) ? 1 : -1));
  const gamma = farDoubleGamma(offset(working), barnesSeries(sorted, working), working);
  const fine = { re: center.re >> BigInt(table.bits - working), im: center.im >> BigInt(table.bits - working) };
  const difference = (part: 're' | 'im'): bigint => shiftRounded(2n * (fine[part] - gamma[part]), working - bits);
  return {
    kind: 'value',
    re: difference('re') - sine.re,
    im: difference('im') - sine.im,
    // z is rounded once more than x.
    error: 2n * sine.error + argumentShare(4 * size * (Math.log(size + 2) + 2)),
  };
}

/** log Gamma_2(|w|/2 + z) for two periods with product 1. */
function farDoubleGamma(z: FixedComplex, { coefficients, unit }: BarnesSeries, bits: number): FixedComplex {
  const log = logComplex(z, bits);
  const square = squareComplex(z, bits);
  const bracket = { re: (3n << BigInt(bits - 1)) - log.re, im: -log.im };
  const lead = multiplyComplex(square, bracket, bits);
  const second = multiplyComplex(scaleComplex(coefficients[1] as FixedComplex, unit, bits), log, bits);
  // Terms d_i (2i-3)! z^{2-2i} with scaled d_i: (W/2 pi)^2 times powers of (W/(2 pi z))^2.
  const step = divideComplex({ re: unit, im: 0n }, square, bits);
  let power = scaleComplex(step, unit, bits);
  let sum = zeroComplex;
  let smallest = absoluteComplex(oneComplex(bits)) << 64n;
  for (let i = 2; i < coefficients.length; i++) {
    const size = absoluteComplex(power);
    if (size <= 1n || size > smallest) break;
    smallest = size;
    sum = addComplex(sum, multiplyComplex(coefficients[i] as FixedComplex, power, bits));
    const next = multiplyComplex(power, step, bits);
    const factor = BigInt((2 * i - 2) * (2 * i - 1));
    power = { re: next.re * factor, im: next.im * factor };
  }
  return {
    re: (lead.re >> 1n) - second.re + sum.re,
    im: (lead.im >> 1n) - second.im + sum.im,
  };
}
