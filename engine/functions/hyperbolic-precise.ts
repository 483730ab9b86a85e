import { bitLength, shiftRounded } from '../arithmetic/fixed';
import { expComplex, type FixedComplex, logComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { argumentError, isIndistinct } from './precise-log';
import type { PreciseLog } from './special-function';

/**
 * log 2 sinh(pi x): pi x + log(1 - e^{-2 pi x}) with the principal logarithm for Re x >= 0, log 2 sinh(-pi x) + i pi
 * for Re x < 0. Error: 2 units of rounding and (pi + 1/d) sqrt(2) for the argument's unit, d the distance to the next zero.
 */
export function logTwoSinh(x: FixedComplex, bits: number): PreciseLog {
  const right = x.re >= 0n;
  const log = logRightHalf(right ? x : { re: -x.re, im: -x.im }, bits);
  if (right || log.kind !== 'value') return log;
  return { ...log, im: log.im + piFixed(bits), error: log.error + 1n };
}

/** log 2 cosh(pi x): pi x + log(1 + e^{-2 pi x}) with the principal logarithm for Re x >= 0; even. */
export function logTwoCosh(x: FixedComplex, bits: number): PreciseLog {
  const half = 1n << BigInt(bits - 1);
  const right = x.re >= 0n ? x : { re: -x.re, im: -x.im };
  // 2 cosh(pi x) = 2 sinh(pi (x + i/2)) / i.
  const log = logRightHalf({ re: right.re, im: right.im + half }, bits);
  if (log.kind !== 'value') return log;
  return { ...log, im: log.im - shiftRounded(piFixed(bits), 1), error: log.error + 1n };
}

function logRightHalf(x: FixedComplex, bits: number): PreciseLog {
  const turns = shiftRounded(x.im, bits);
  const rest: FixedComplex = { re: x.re, im: x.im - (turns << BigInt(bits)) };
  if (isIndistinct(rest)) return { kind: 'indistinct' };
  // Near a zero 1 - e^{-2 pi x} loses as many bits as the distance is small.
  const size = Math.max(bitLength(rest.re), bitLength(rest.im));
  const working = bits + 16 + Math.max(0, bits - size);
  const whole = Math.max(bitLength(x.re), bitLength(x.im)) - bits;
  const pi = piFixed(working + Math.max(0, whole));
  const up = BigInt(working - bits);
  const exponent = times(rest, -2n * pi, working + Math.max(0, whole), up);
  const factor = expComplex(exponent, working);
  const log = logComplex({ re: (1n << BigInt(working)) - factor.re, im: -factor.im }, working);
  const lead = times(x, pi, working + Math.max(0, whole), up);
  return {
    kind: 'value',
    re: shiftRounded(lead.re + log.re, working - bits),
    im: shiftRounded(lead.im + log.im, working - bits),
    error: 8n + argumentError(rest, bits),
  };
}

/** x factor with `up` more fraction bits than x has. */
function times(x: FixedComplex, factor: bigint, factorBits: number, up: bigint): FixedComplex {
  return { re: ((x.re << up) * factor) >> BigInt(factorBits), im: ((x.im << up) * factor) >> BigInt(factorBits) };
}
