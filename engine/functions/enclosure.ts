import { type Ball, ballFromRatio, exactBall, integerPowerBall, rescaleBall } from '../arithmetic/ball';
import { bitLength } from '../arithmetic/fixed';
import { ln2Fixed, piFixed } from '../arithmetic/fixed-constants';
import type { Rational } from '../exact/rational';
import { exactRational } from './exact-rational';
import type { ExactParameter } from './special-function';
import type { FunctionValue } from './value-function';

/** Bits above those asked for at the start, and how often they are raised before an error is taken as it is. */
const FIRST_GUARD = 32;
const ATTEMPTS = 4;
/** An error of so many units is small enough. */
const ENOUGH = 8n;

/**
 * A value with `bits` fraction bits from a computation with balls that keeps `precision` bits: repeated with more of
 * them while the error is above some units. The error stated is the radius of the ball, hence proved. `compute` answers
 * null where a ball holds a singular point.
 */
export function enclosed(bits: number, compute: (precision: number) => Ball | null): FunctionValue {
  let precision = bits + FIRST_GUARD;
  let ball: Ball | null = null;
  for (let attempt = 0; attempt < ATTEMPTS; attempt++) {
    const found = compute(precision);
    ball = found && rescaleBall(found, bits);
    if (ball !== null && ball.error <= ENOUGH) break;
    precision += ball === null ? bits : bitLength(ball.error) + 8;
  }
  if (ball === null) return { kind: 'indistinct' };
  return { kind: 'value', of: 'value', re: ball.re, im: ball.im, error: ball.error };
}

/** The argument as a ball: exact for whole numbers, exactly real for real ones. */
export function argumentBall(argument: ExactParameter, precision: number): Ball {
  const whole = wholeNumber(argument);
  if (whole !== null) return exactBall(BigInt(whole));
  const { re, im } = argument.value(precision);
  return argument.approx.im === 0 ? { re, im: 0n, bits: precision, error: 1n } : { re, im, bits: precision, error: 2n };
}

/** The argument as a whole number; null where it is none. */
export function wholeNumber(argument: ExactParameter): number | null {
  const exact = exactRational(argument);
  return exact?.isInteger() ? Number(exact.numerator) : null;
}

/** Real by declaration; a value that merely comes out real does not count. */
export function isReal(argument: ExactParameter): boolean {
  return argument.approx.im === 0;
}

export function rationalBall(value: Rational, precision: number): Ball {
  return ballFromRatio(value.numerator, value.denominator, precision);
}

export function piBall(precision: number): Ball {
  return { re: piFixed(precision), im: 0n, bits: precision, error: 1n };
}

export function ln2Ball(precision: number): Ball {
  return { re: ln2Fixed(precision), im: 0n, bits: precision, error: 1n };
}

/** The ball with every point within `radius` (in units of 2^-bits) added. */
export function widened(ball: Ball, radius: bigint, bits: number): Ball {
  const up = rescaleBall(ball, Math.max(ball.bits, bits));
  return { ...up, error: up.error + (radius << BigInt(up.bits - bits)) };
}

/** a^{-n}; null when n > 0 and the ball holds 0. */
export function inversePower(a: Ball, n: number, precision: number): Ball | null {
  return integerPowerBall(a, -n, precision);
}

/** 1/2. */
export const halfBall: Ball = { re: 1n, im: 0n, bits: 1, error: 0n };

/** A value known to be 0. */
export const exactZero: FunctionValue = { kind: 'value', of: 'value', re: 0n, im: 0n, error: 0n };
