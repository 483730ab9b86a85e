import Decimal from 'decimal.js';
import type { Ball } from './ball';
import { exactBall, integerPowerBall, multiplyBalls, rescaleBall } from './ball';
import { absolute, bitLength, numberFromFixed } from './fixed';

/**
 * Decimal text in and out. This is the only module that imports decimal.js; its constructor is cloned, so that no setting made
 * elsewhere reaches it. Values cross as exact integers, and every rounding states its direction.
 */
const Text = Decimal.clone({ toExpNeg: -7, toExpPos: 21, maxE: 9e15, minE: -9e15 });

/** Largest decimal exponent accepted in a number typed by a user: beyond it the exact fraction fills megabytes. */
export const LARGEST_DECIMAL_EXPONENT = 100_000;

const DECIMAL = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;

/** An exact fraction in lowest powers of ten (not reduced); denominator > 0. */
export interface ExactDecimal {
  readonly numerator: bigint;
  readonly denominator: bigint;
}

/** Exact value of decimal text such as `-1.25e-3`; null when it is no decimal number or its exponent is beyond the limit. */
export function parseDecimal(text: string): ExactDecimal | null {
  if (!DECIMAL.test(text)) return null;
  const value = new Text(text);
  if (value.isZero()) return { numerator: 0n, denominator: 1n };
  if (!value.isFinite() || Math.abs(value.e) > LARGEST_DECIMAL_EXPONENT) return null;
  const places = Math.max(0, value.decimalPlaces());
  return { numerator: BigInt(value.toFixed().replace('.', '')), denominator: 10n ** BigInt(places) };
}

export interface PrintedBall {
  readonly re: string;
  readonly im: string;
  /** Upper bound of |true - printed| (complex modulus), one significant digit, rounded up; `0` when the text is exact. */
  readonly error: string;
}

/**
 * A ball in decimal digits: at most `digits` significant ones of the larger part, cut where the error starts, so that each part is
 * right to one unit of its last digit. Both parts end at the same decimal place; a part that rounds to nothing there prints `0`.
 * Values outside [1e-6, 1e21) are in scientific notation.
 */
export function formatBall(ball: Ball, digits: number): PrintedBall {
  const larger = largerPart(ball);
  if (larger === 0n && ball.error === 0n) return { re: '0', im: '0', error: '0' };
  const exponent = decimalExponentAbove(larger > 0n ? larger : ball.error, ball.bits);
  if (Math.abs(exponent) <= LARGEST_EXACT_EXPONENT) return formatAt(ball, larger, digits, 0);
  // 10^-exponent to so many bits that its rounding is far below an ulp; exactly it would fill megabytes.
  const precision = bitLength(larger) + bitLength(ball.error) + 64;
  const power = integerPowerBall(exactBall(10n), -exponent, precision);
  if (power === null) throw new RangeError('10 is not 0');
  const scaled = multiplyBalls(ball, power, precision);
  return formatAt(scaled, largerPart(scaled), digits, exponent);
}

function largerPart({ re, im }: Ball): bigint {
  let larger = absolute(re);
  if (larger < absolute(im)) larger = absolute(im);
  return larger;
}

/** Decimal exponents up to which powers of ten are formed exactly. */
const LARGEST_EXACT_EXPONENT = 3000;

/** The ball times 10^exponent; `larger` is the larger part of the ball. */
function formatAt(ball: Ball, larger: bigint, digits: number, exponent: number): PrintedBall {
  const places = [
    larger === 0n ? Number.NEGATIVE_INFINITY : decimalExponentAbove(larger, ball.bits) - digits,
    ball.error === 0n ? Number.NEGATIVE_INFINITY : decimalExponentAbove(2n * ball.error, ball.bits),
  ];
  const place = Math.max(...places);
  // Finer ulps than the last place, so that the rounding is measured well.
  const finer = Math.max(0, Math.ceil(-place * Math.log2(10)) + 8 - ball.bits);
  const { re, im, bits, error } = rescaleBall(ball, ball.bits + finer);
  const x = roundToPlace(re, bits, place);
  const y = roundToPlace(im, bits, place);
  const exact = error === 0n && x.slip === 0n && y.slip === 0n;
  return {
    re: printInteger(x.rounded, place + exponent, exact),
    im: printInteger(y.rounded, place + exponent, exact),
    error: exact ? '0' : printBound(error + x.slip + y.slip, bits, exponent),
  };
}

/** Smallest (up to one) integer p with value 2^-bits <= 10^p. */
function decimalExponentAbove(value: bigint, bits: number): number {
  const length = bitLength(value);
  // value < top 2^(length - bits) with top in [1/2, 1]; the double has 15 digits, so the ceiling errs by one at most, upwards.
  const logarithm = Math.log10(numberFromFixed(value, length)) + (length - bits) * Math.log10(2);
  return Math.ceil(logarithm + 1e-9);
}

/** value 2^-bits 10^-place as a fraction. */
function ratioAtPlace(value: bigint, bits: number, place: number): { numerator: bigint; denominator: bigint } {
  const power = 10n ** BigInt(Math.abs(place));
  const numerator = (bits > 0 ? value : value << BigInt(-bits)) * (place > 0 ? 1n : power);
  const denominator = (bits > 0 ? 1n << BigInt(bits) : 1n) * (place > 0 ? power : 1n);
  return { numerator, denominator };
}

function ceilingOf(numerator: bigint, denominator: bigint): bigint {
  const cut = numerator / denominator;
  return cut * denominator < numerator ? cut + 1n : cut;
}

/** Nearest multiple of 10^place, and |value - it| in ulps of 2^-bits rounded up. */
function roundToPlace(value: bigint, bits: number, place: number): { rounded: bigint; slip: bigint } {
  const { numerator, denominator } = ratioAtPlace(value, bits, place);
  const rounded = ceilingOf(2n * numerator - denominator, 2n * denominator);
  const difference = absolute(numerator - rounded * denominator);
  // difference = (|value - it| 2^-bits 10^-place) denominator; one ulp is ratioAtPlace(1) in the same units.
  return { rounded, slip: ceilingOf(difference, ratioAtPlace(1n, bits, place).numerator) };
}

function printInteger(value: bigint, place: number, exact: boolean): string {
  if (value === 0n) return '0';
  const number = new Text(`${value}e${place}`);
  if (exact) return plainExponent(number.toString());
  const plain = place <= 0 && number.e >= -6 && number.e < 21;
  return plain ? number.toFixed(-place) : plainExponent(number.toExponential(absolute(value).toString().length - 1));
}

/** value 2^-bits 10^exponent > 0 rounded up to one significant digit. */
function printBound(value: bigint, bits: number, exponent: number): string {
  const place = decimalExponentAbove(value, bits) - 1;
  const { numerator, denominator } = ratioAtPlace(value, bits, place);
  return plainExponent(new Text(`${ceilingOf(numerator, denominator)}e${place + exponent}`).toString());
}

/** decimal.js writes 1e+30; here it is 1e30. */
function plainExponent(text: string): string {
  return text.replace('e+', 'e');
}
