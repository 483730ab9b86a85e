import { numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import { type FixedComplex, logComplex, oneComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { logFixed } from '../arithmetic/fixed-log';
import { type Estimate, farPoint, stepsToFarPoint } from './euler-maclaurin';
import { scaledHurwitzDerivative } from './hurwitz-derivative';
import { logTwoSinh } from './hyperbolic-precise';
import { LogProduct } from './log-product';
import type { PreciseLog } from './special-function';

/**
 * log Gamma(z), on the branch that is analytic off the negative axis (there the limit from above).
 * Re z < 1/2: reflection (DLMF 5.5.3). Else shifts, multiplied out so that one logarithm serves all, and Stirling's
 * series with its remainder bound (DLMF 5.11.1, 5.11(ii)): log Gamma(z) = zeta'(0, z) + log(2 pi)/2.
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
  const { value, error } = logGammaRight(z, bits);
  // |psi(z)| <= |log z| + 2 for Re z >= 1/2.
  const slope = Math.abs(Math.log(Math.hypot(numberFromFixed(z.re, bits), numberFromFixed(z.im, bits)))) + 4;
  return { kind: 'value', re: value.re, im: value.im, error: error + BigInt(Math.ceil(1.5 * slope)) };
}

/** log Gamma(z) for Re z >= 1/2, exactly given; the error covers rounding and the remainder. */
export function logGammaRight(z: FixedComplex, bits: number): Estimate {
  const approximate = { re: numberFromFixed(z.re, bits), im: numberFromFixed(z.im, bits) };
  const steps = stepsToFarPoint(approximate, 0, bits);
  const size = Math.max(2, Math.hypot(approximate.re + steps, approximate.im));
  const guard = Math.ceil(Math.log2(size) + Math.log2(Math.log2(size) + 4) + Math.log2(steps + 2)) + 12;
  const working = bits + guard;
  const one = oneComplex(working).re;
  let at: FixedComplex = { re: z.re << BigInt(guard), im: z.im << BigInt(guard) };
  const product = new LogProduct(working);
  for (let k = 0; k < steps; k++) {
    product.multiply(at);
    at = { re: at.re + one, im: at.im };
  }
  const point = farPoint(at, working);
  const far = scaledHurwitzDerivative(point, 0, logComplex(at, working), 0);
  const below = product.logarithm();
  const re = far.value.re + shiftRounded(logFixed(2n * piFixed(working), working), 1) - below.value.re;
  const im = far.value.im - below.value.im;
  const rounding = far.error + below.error + 4n;
  return {
    value: { re: shiftRounded(re, guard), im: shiftRounded(im, guard) },
    error: (rounding >> BigInt(guard)) + 2n,
  };
}
