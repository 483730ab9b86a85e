import { fixedFromRatio, log2Above, numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  type FixedComplex,
  logComplex,
  multiplyComplex,
  oneComplex,
  squareComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { powerSum } from '../arithmetic/fixed-series';
import { Rational } from '../exact/rational';
import { barnesSeries } from './barnes-series';
import type { Estimate } from './euler-maclaurin';
import { factorial } from './factorial';
import { memoiseByKey } from './kernel-memo';

/**
 * The expansion of log Gamma_N at infinity: with y = x - |w|/2, Y = 2 pi y/W, W the largest modulus, c_j (W/2 pi)^2j the
 * coefficients of product of (w_i t/2)/sinh(w_i t/2) = sum_j c_j (W/2 pi)^2j t^2j, and S = (W/2 pi)^N/product of w_i,
 *   S [ (-1)^N sum_{2j <= N} c_j (H_(N-2j) - log y) Y^(N-2j)/(N-2j)! + sum_{2j > N} c_j (2j-N-1)! Y^(N-2j) ].
 * The second sum runs in u = v^2, v = rho/Y with a fixed rho = 2^log2Radius <= |Y|/2.
 *
 * Remainder for positive periods and Re y >= 0, at most the first neglected term times sec^(2j-N)(arg y/2): the product is
 * E[exp(-t^2 X)] for a positive random number X (1/(1 + s a) is that of an exponential one), whose Taylor polynomials err by
 * at most the next term where Re t^2 >= 0, and the integral of t^(-1-N) e^(-yt) over t with arg t = -arg(y)/2 is a Gamma
 * function. For other periods no bound is known; three neighbouring terms stand for it.
 */
export interface BarnesFar {
  readonly count: number;
  readonly half: FixedComplex;
  readonly scale: FixedComplex;
  readonly turn: bigint;
  readonly log2Radius: number;
  /** c_0, c_1, ... for 2j <= N. */
  readonly polynomial: readonly FixedComplex[];
  /** c_j (2j-N-1)! rho^(N-2j) for the j beyond, each off by less than 1 unit a part, and at least log2 of their moduli. */
  readonly tail: readonly FixedComplex[];
  readonly log2: readonly number[];
  /** The real parts alone where all periods are real. */
  readonly realTail: readonly bigint[] | null;
  /** All periods are positive: the remainder is proved. */
  readonly positive: boolean;
}

/** How far out, in units of the largest period, an expansion with `bits` bits starts; 0.11 bits would do for one period. */
export function barnesReach(bits: number, count: number): number {
  return 0.14 * bits + 6 + count;
}

const tables = memoiseByKey<BarnesFar>(32);

/** The periods with `bits` fraction bits, the first of the largest modulus. */
export function barnesFar(periods: readonly FixedComplex[], bits: number): BarnesFar {
  const key = [bits, ...periods.map(({ re, im }) => `${re.toString(32)}|${im.toString(32)}`)].join();
  return tables(key, () => buildFar(periods, bits));
}

/** Bits by which coefficients are made finer: their sums of products then stay below one unit. */
const FINER = 40;

function buildFar(periods: readonly FixedComplex[], bits: number): BarnesFar {
  const count = periods.length;
  const wide = bits + FINER;
  const up = BigInt(FINER);
  const { half, coefficients } = barnesSeries(
    periods.map(({ re, im }) => ({ re: re << up, im: im << up })),
    wide,
  );
  const largest = absoluteComplex(periods[0] as FixedComplex);
  const circle = 2n * piFixed(bits);
  const ratios = periods.map((w) => divideComplex({ re: largest, im: 0n }, w, bits));
  const product = ratios.reduce((a, b) => multiplyComplex(a, b, bits), oneComplex(bits));
  const below = Array.from({ length: count }).reduce<bigint>(
    (power) => (power * circle) >> BigInt(bits),
    1n << BigInt(bits),
  );
  const log2Far = Math.log2(2 * Math.PI * barnesReach(bits, count));
  const log2Radius = Math.floor(log2Far) - 1;
  const first = Math.floor(count / 2) + 1;
  const tail: FixedComplex[] = [];
  const log2: number[] = [];
  let gamma = 1n;
  const real = periods.every(({ im }) => im === 0n);
  const positive = real && periods.every(({ re }) => re > 0n);
  // Off the positive axis single coefficients may vanish: every other one for the periods 1 and i.
  const patience = positive ? 1 : 3;
  let small = 0;
  for (let j = first; j < coefficients.length; j++) {
    const order = 2 * j - count;
    if (j > first) gamma *= BigInt(order - 2) * BigInt(order - 1);
    const c = coefficients[j] as FixedComplex;
    const grown = { re: c.re * gamma, im: c.im * gamma };
    const drop = log2Radius * order;
    tail.push({ re: grown.re >> BigInt(FINER + drop), im: grown.im >> BigInt(FINER + drop) });
    // A modulus cut to whole units is one more at most.
    const size = log2Above((absoluteComplex(grown) >> BigInt(drop)) + 1n, wide);
    log2.push(size);
    small = size + order * (log2Radius - log2Far) + 1 < -bits - 2 ? small + 1 : 0;
    if (small === patience) break;
  }
  return {
    count,
    half: { re: half.re >> up, im: half.im >> up },
    scale: divideComplex(product, { re: below, im: 0n }, bits),
    turn: (circle << BigInt(bits)) / largest,
    log2Radius,
    polynomial: coefficients.slice(0, first).map(({ re, im }) => ({ re: re >> up, im: im >> up })),
    tail,
    log2,
    realTail: real ? tail.map(({ re }) => re) : null,
    positive,
  };
}

/** The expansion at x; see BarnesFar. Rounding is counted as the numbers come, in doubles. */
export function barnesFarValue(far: BarnesFar, x: FixedComplex, bits: number): Estimate {
  const { count } = far;
  const y = subtractComplex(x, far.half);
  const logarithm = logComplex(y, bits);
  const size = (z: FixedComplex): number => numberFromFixed(absoluteComplex(z), bits);
  const yTurned = { re: (y.re * far.turn) >> BigInt(bits), im: (y.im * far.turn) >> BigInt(bits) };
  const turnedSize = size(yTurned);
  // half is off by one unit, the turn by one.
  const yError = 1.5 + size(y) + numberFromFixed(far.turn, bits);
  let sum = zeroComplex;
  let error = 0;
  let power = oneComplex(bits);
  for (let order = 0; order <= count; order++) {
    if ((count - order) % 2 === 0) {
      const c = far.polynomial[(count - order) / 2] as FixedComplex;
      const { numerator, denominator } = harmonic(order);
      const bracket = subtractComplex({ re: fixedFromRatio(numerator, denominator, bits), im: 0n }, logarithm);
      const part = multiplyComplex(multiplyComplex(power, bracket, bits), c, bits);
      const below = factorial(order).numerator;
      sum = addComplex(sum, { re: part.re / below, im: part.im / below });
      // The power errs by order (yError + 1.5) |Y|^(order-1), the bracket by 2.5 and y's own unit, c by 2, each product by 1.5.
      const bracketSize = size(bracket) + 1;
      const powerError = order * (yError + 1.5) * turnedSize ** Math.max(0, order - 1);
      const inner = bracketSize * powerError + 4 * turnedSize ** order + 1.5;
      error += ((size(c) + 1) * inner + 2 * bracketSize * turnedSize ** order) / Number(below) + 2;
    }
    power = multiplyComplex(power, yTurned, bits);
  }
  const value = count % 2 === 0 ? sum : { re: -sum.re, im: -sum.im };
  const { tail, error: tailError } = tailValue(far, yTurned, yError, bits);
  const inside = addComplex(value, tail);
  const scaleSize = size(far.scale);
  // The scale errs by 4 N units relatively and 2 in all.
  const total = scaleSize * (error + tailError) + (size(inside) + 1) * (4 * count * scaleSize + 2) + 1.5;
  return { value: multiplyComplex(inside, far.scale, bits), error: BigInt(Math.ceil(total * (1 + 1e-9))) };
}

/** The terms with negative powers; the error in units, a double. */
function tailValue(
  far: BarnesFar,
  y: FixedComplex,
  yError: number,
  bits: number,
): { readonly tail: FixedComplex; readonly error: number } {
  const re = numberFromFixed(y.re, bits);
  const size = Math.hypot(re, numberFromFixed(y.im, bits));
  const log2Ratio = far.log2Radius - Math.log2(size) + (far.positive ? -Math.log2((1 + re / size) / 2) / 2 : 0);
  const firstOrder = 2 * far.polynomial.length - far.count;
  let used = 0;
  let remainder = Number.POSITIVE_INFINITY;
  for (; used < far.log2.length; used++) {
    remainder = neglected(far, used) + (firstOrder + 2 * used) * log2Ratio;
    if (remainder < -bits) break;
  }
  const v = divideComplex({ re: 1n << BigInt(bits + far.log2Radius), im: 0n }, y, bits);
  const u = squareComplex(v, bits);
  const sum = far.realTail === null ? complexSum(far.tail, used, u, bits) : powerSum(far.realTail, used, u, bits);
  const lead = firstOrder === 1 ? v : u;
  // v errs by 1.5 and |v| yError/|Y|, u by twice that and 1.5, slopes are below 2; the sums err by 7 (|u| <= 1/4).
  const rounding = 16 + (4 * yError) / size;
  return { tail: multiplyComplex(lead, sum, bits), error: rounding + 2 ** (remainder + bits) };
}

/** log2 of the first neglected coefficient; without a proof, of the largest of three with a factor 4. */
function neglected({ log2, positive }: BarnesFar, k: number): number {
  const own = log2[k] as number;
  return positive ? own : 2 + Math.max(own, log2[k + 1] ?? own, log2[k - 1] ?? own);
}

function complexSum(coefficients: readonly FixedComplex[], count: number, u: FixedComplex, bits: number): FixedComplex {
  let sum = zeroComplex;
  for (let k = count - 1; k >= 0; k--) sum = addComplex(coefficients[k] as FixedComplex, multiplyComplex(u, sum, bits));
  return sum;
}

function harmonic(n: number): Rational {
  let sum = Rational.zero;
  for (let k = 1; k <= n; k++) sum = sum.add(Rational.of(1, k));
  return sum;
}
