import { numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import { type FixedComplex, logComplex, multiplyComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { logFixed } from '../arithmetic/fixed-log';
import { memoiseBounded } from '../arithmetic/memo';
import { type Estimate, stepsToReach } from './euler-maclaurin';
import { logTwoSinh } from './hyperbolic-precise';
import { RisingProduct } from './rising-product';
import type { PreciseLog } from './special-function';
import { stirlingReach, stirlingSeries } from './stirling-series';

/** More guard bits than any argument below 10^9 needs. */
const SPARE = 40;

/**
 * log Gamma(z), on the branch that is analytic off the negative axis (there the limit from above).
 * Re z < 1/2: reflection (DLMF 5.5.3). Else shifts, multiplied out so that one logarithm serves all, and Stirling's
 * series with its remainder bound (DLMF 5.11.1, 5.11(ii)).
 * The error covers rounding, remainder and one unit in each part of z; 'indistinct' within 4 units of a pole.
 */
export function logGammaPrecise(z: FixedComplex, bits: number): PreciseLog {
  if (z.im < 0n) {
    const log = logGammaPrecise({ re: z.re, im: -z.im }, bits);
    return log.kind === 'value' ? { ...log, im: -log.im } : log;
  }
  const one = 1n << BigInt(bits);
  if (2n * z.re < one) {
    // log 2pi - log(2 sin pi z) - log Gamma(1 - z), with 2 sin(pi z) = i 2 sinh(-i pi z).
    const sine = logTwoSinh({ re: z.im, im: -z.re }, bits);
    if (sine.kind !== 'value') return { kind: 'indistinct' };
    const other = logGammaPrecise({ re: one - z.re, im: -z.im }, bits);
    if (other.kind !== 'value') return other;
    const pi = piFixed(bits);
    return {
      kind: 'value',
      re: logFixed(2n * pi, bits) - sine.re - other.re,
      im: -sine.im - shiftRounded(pi, 1) - other.im,
      error: sine.error + other.error + 4n,
    };
  }
  const { value, error } = logGammaByShifts(z, bits);
  // |psi(z)| <= |log z| + 2 for Re z >= 1/2.
  const slope = Math.abs(Math.log(Math.hypot(numberFromFixed(z.re, bits), numberFromFixed(z.im, bits)))) + 4;
  return { kind: 'value', re: value.re, im: value.im, error: error + BigInt(Math.ceil(1.5 * slope)) };
}

/**
 * log Gamma(z) for an exactly given z that is not 0, -1, -2, ...: the continuation along Re z -> +infinity with principal
 * logarithms of z, z + 1, .... The error covers rounding and the remainder.
 */
export function logGammaByShifts(z: FixedComplex, bits: number): Estimate {
  const approximate = { re: numberFromFixed(z.re, bits), im: numberFromFixed(z.im, bits) };
  // The guard bits lengthen the series by little: the reach of eight more holds for any of them.
  const steps = stepsToReach(approximate, stirlingReach(bits + SPARE));
  const size = Math.hypot(approximate.re + steps, approximate.im);
  // 3 units a step and 2 |Z|, see below: all is brought under an eighth of a unit. Fours, so that tables serve many points.
  const guard = 4 * Math.ceil((Math.log2(3 * steps + 2 * size + 32) + 3) / 4);
  const working = bits + guard;
  const exact = { re: z.re << BigInt(guard), im: z.im << BigInt(guard) };
  const product = new RisingProduct(working);
  product.multiplyRising(exact, steps);
  const below = product.logarithm();
  const far = stirlingAt({ re: exact.re + (BigInt(steps) << BigInt(working)), im: exact.im }, working);
  return {
    value: {
      re: shiftRounded(far.value.re + halfLogTwoPi(working) - below.value.re, guard),
      im: shiftRounded(far.value.im - below.value.im, guard),
    },
    error: ((far.error + below.error + 2n) >> BigInt(guard)) + 2n,
  };
}

/** (Z - 1/2) log Z - Z and Stirling's series, at a far point: the logarithm errs by sqrt 2, times |Z|, the product by 2. */
export function stirlingAt(z: FixedComplex, bits: number): Estimate {
  const series = stirlingSeries(z, bits);
  const half = { re: z.re - (1n << BigInt(bits - 1)), im: z.im };
  const log = z.im === 0n ? { re: logFixed(z.re, bits), im: 0n } : logComplex(z, bits);
  const lead = z.im === 0n ? { re: (half.re * log.re) >> BigInt(bits), im: 0n } : multiplyComplex(half, log, bits);
  const size = Math.hypot(numberFromFixed(z.re, bits), numberFromFixed(z.im, bits));
  return {
    value: { re: lead.re - z.re + series.value.re, im: lead.im - z.im + series.value.im },
    error: series.error + BigInt(Math.ceil(1.42 * size) + 3),
  };
}

/** log(2 pi)/2, |error| <= 1 unit. */
export const halfLogTwoPi: (bits: number) => bigint = memoiseBounded(32, (bits: number) =>
  shiftRounded(logFixed(piFixed(bits + 4) << 1n, bits + 4), 5),
);
