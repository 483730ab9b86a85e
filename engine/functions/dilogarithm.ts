import { numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import {
  absoluteComplex,
  divideComplex,
  type FixedComplex,
  logComplex,
  negateComplex,
  oneComplex,
  squareComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { dilogarithmFixed } from './dilogarithm-precise';
import { polylogarithm } from './polylogarithm-precise';
import type { ExactParameter } from './special-function';
import type { FunctionValue, ValueFunction } from './value-function';

/** Extra bits of the argument: its share of the error, |log(1 - z)/z| units, then vanishes except next to z = 1. */
const GUARD = 32;

/**
 * Li_2(z) = sum z^n/n^2, principal branch cut along [1, oo), on the cut the value from below. Error below 4 units.
 */
export const dilogarithm: ValueFunction = {
  least: 1,
  most: 1,
  definition: '\\mathrm{Li}_2(z)=\\sum_{n\\ge1}\\frac{z^n}{n^2}',
  evaluate: ([z], bits) => value(z as ExactParameter, bits, (point) => dilogarithmFixed(point, bits + GUARD)),
  crossCheck: ([z], bits) => ({
    route: 'expansion in log z',
    value: value(z as ExactParameter, bits, (point) => byLogarithm(point, bits + GUARD)),
  }),
  sources: [{ key: 'DLMF-25.12', text: 'NIST Digital Library of Mathematical Functions, 25.12' }],
};

function value(z: ExactParameter, bits: number, compute: (z: FixedComplex) => FixedComplex | null): FunctionValue {
  const point = z.value(bits + GUARD);
  const one = 1n << BigInt(bits + GUARD);
  // Across the cut the value jumps: the side must be known.
  if (point.re > one && z.approx.im !== 0 && point.im >= -2n && point.im <= 2n) return { kind: 'indistinct' };
  const result = compute(z.approx.im === 0 ? { re: point.re, im: 0n } : point);
  if (result === null) return { kind: 'indistinct' };
  const near = numberFromFixed(absoluteComplex({ re: one - point.re, im: point.im }) + 1n, bits + GUARD);
  const slope = Math.abs(Math.log(near)) + 5;
  return {
    kind: 'value',
    of: 'value',
    re: shiftRounded(result.re, GUARD),
    im: shiftRounded(result.im, GUARD),
    error: 2n + BigInt(Math.ceil(slope * 2 ** (4 - GUARD))),
  };
}

/** |z| <= 1 by `polylogarithm`, else Li_2(z) = -pi^2/6 - log^2(-z)/2 - Li_2(1/z) (DLMF 25.12.4). */
function byLogarithm(z: FixedComplex, bits: number): FixedComplex | null {
  if (absoluteComplex(z) <= 1n << BigInt(bits)) return polylogarithm(2, z, bits)?.value ?? null;
  const inverse = polylogarithm(2, divideComplex(oneComplex(bits), z, bits), bits);
  if (inverse === null) return null;
  // On the cut, from below, -z is just above the negative axis: argument +pi, as `logComplex` has it.
  const square = squareComplex(logComplex(negateComplex(z), bits), bits);
  const constant = (piFixed(bits) * piFixed(bits)) >> BigInt(bits);
  return {
    re: -constant / 6n - (square.re >> 1n) - inverse.value.re,
    im: -(square.im >> 1n) - inverse.value.im,
  };
}
