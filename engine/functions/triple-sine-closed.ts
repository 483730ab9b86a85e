import { divideFixed, numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import {
  absoluteComplex,
  expComplex,
  type FixedComplex,
  logComplex,
  multiplyComplex,
  squareComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { polylogarithm } from './polylogarithm-precise';
import { argumentError, isIndistinct } from './precise-log';
import type { ExactParameter, PreciseLog } from './special-function';

/**
 * log S_3(x | w, w, w) in closed form: with x in units of w, z = x - 3/2, e = e^{2 pi i x}, Im x >= 0,
 *   log S_3 = -(i pi/2)(z^3/3 - z/4) + (1/2)(z^2 - 1/4) log(1 - e) + z Li_2(e)/(2 pi i) + Li_3(e)/(4 pi^2)
 * (Kurokawa and Koyama 2003, Forum Math. 15, 839). The imaginary part is right up to a multiple of 2 pi. No quadrature:
 * an independent check of the main route. Null unless the periods agree to the digits that count.
 */
export function logTripleSineRound(x: FixedComplex, w: readonly ExactParameter[], bits: number): PreciseLog | null {
  const values = w.map((period) => period.value(bits + 64).re);
  const first = values[0] as bigint;
  if (values.some((value) => value - first > 2n || first - value > 2n)) return null;
  const size = Math.log2(numberFromFixed(absoluteComplex(x), bits) / (w[0]?.approx.re as number) + 2);
  const up = 32 * Math.ceil((3 * size + 24) / 32);
  const working = bits + up;
  const period = (w[0] as ExactParameter).value(working).re;
  const flipped = x.im < 0n;
  const point = {
    re: divideFixed(x.re << BigInt(up), period, working),
    im: divideFixed((flipped ? -x.im : x.im) << BigInt(up), period, working),
  };
  // Zeros of S_3 and the singular points of the single terms are the integers.
  const nearest = shiftRounded(point.re, working) << BigInt(working);
  const offset = { re: (point.re - nearest) >> BigInt(up), im: point.im >> BigInt(up) };
  if (isIndistinct(offset)) return { kind: 'indistinct' };
  const pi = piFixed(working);
  const one = 1n << BigInt(working);
  const z = { re: point.re - 3n * (one >> 1n), im: point.im };
  const square = squareComplex(z, working);
  const cubic = multiplyComplex(z, { re: square.re / 3n - (one >> 2n), im: square.im / 3n }, working);
  const phase = { re: (pi * cubic.im) >> BigInt(working + 1), im: -((pi * cubic.re) >> BigInt(working + 1)) };
  const turn = {
    re: (-2n * pi * point.im) >> BigInt(working),
    im: (2n * pi * (point.re - nearest)) >> BigInt(working),
  };
  const e = expComplex(turn, working);
  const log = logComplex({ re: one - e.re, im: -e.im }, working);
  const middle = multiplyComplex({ re: (square.re - (one >> 2n)) >> 1n, im: square.im >> 1n }, log, working);
  const two = polylogarithm(2, e, working);
  const three = polylogarithm(3, e, working);
  if (two === null || three === null) return { kind: 'indistinct' };
  const dilog = multiplyComplex(z, two.value, working);
  const piSquare = (pi * pi) >> BigInt(working);
  const re =
    phase.re +
    middle.re +
    divideFixed(dilog.im, 2n * pi, working) +
    divideFixed(three.value.re, 4n * piSquare, working);
  const im =
    phase.im +
    middle.im -
    divideFixed(dilog.re, 2n * pi, working) +
    divideFixed(three.value.im, 4n * piSquare, working);
  // d log S_3/dx = (pi/2)(x - 1)(x - 2) cot(pi x), per unit of w.
  const reach = numberFromFixed(absoluteComplex(z), working) + 1;
  const units = BigInt(Math.ceil(reach * reach * (1 + 1 / (w[0] as ExactParameter).approx.re)));
  return {
    kind: 'value',
    re: shiftRounded(re, up),
    im: shiftRounded(flipped ? -im : im, up),
    error: units * (6n + argumentError(offset, bits)),
  };
}
