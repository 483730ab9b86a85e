import { absolute, bitLength, numberFromFixed, shiftRounded } from './fixed';
import { piFixed } from './fixed-constants';
import { shortSeries, sumShortSeries } from './fixed-short-series';
import { chunkBits, LONG_BITS, planPowers, planSeries, sumPlan, workingBits } from './fixed-working';
import { memoiseBounded } from './memo';

export interface SinCos {
  readonly sin: bigint;
  readonly cos: bigint;
}

/** Number of terms of the cosine and sine series at an argument below 2^-reduction. */
function trigonometricTerms(bits: number, reduction: number): number {
  let k = 0;
  for (let reached = 0; reached <= bits + 2; k++) reached += 2 * reduction + Math.log2((2 * k + 1) * (2 * k + 2));
  return k;
}

interface TrigonometricTables {
  readonly chunk: number;
  /** (cos, sin)(i 2^-(chunk l)), l = 1, 2, 3. */
  readonly levels: readonly [readonly SinCos[], readonly SinCos[], readonly SinCos[]];
}

function rotationTable(working: number, place: number, count: number): SinCos[] {
  const bits = working + 32;
  const shift = BigInt(bits);
  const one = 1n << shift;
  let c = one;
  let s = 0n;
  for (let term = one >> BigInt(place), n = 1; term !== 0n; n++) {
    if (n % 2 === 1) s += n % 4 === 1 ? term : -term;
    else c += n % 4 === 0 ? term : -term;
    term = (term >> BigInt(place)) / BigInt(n + 1);
  }
  const table: SinCos[] = [];
  for (let i = 0, x = one, y = 0n; i < count; i++) {
    table.push({ cos: x >> 32n, sin: y >> 32n });
    [x, y] = [(x * c - y * s) >> shift, (x * s + y * c) >> shift];
  }
  return table;
}

const trigonometricTables = memoiseBounded(16, (working: number): TrigonometricTables => {
  const chunk = chunkBits(working);
  const count = 1 << chunk;
  return {
    chunk,
    levels: [
      // |r| <= pi/4 + 2^-20 after the reduction: only these entries of the first level are reached.
      rotationTable(working, chunk, Math.ceil(count * 0.79) + 1),
      rotationTable(working, 2 * chunk, count),
      rotationTable(working, 3 * chunk, count),
    ],
  };
});

const trigonometricPlans = memoiseBounded(16, (working: number) => {
  const terms = trigonometricTerms(working, 3 * chunkBits(working));
  return {
    cosine: planSeries(terms, -1n, (k) => BigInt(2 * k - 1) * BigInt(2 * k)),
    sine: planSeries(terms, -1n, (k) => BigInt(2 * k) * BigInt(2 * k + 1)),
  };
});

/** (-1)^n m!. */
function alternatingFactorial(n: number, m: number): bigint {
  let product = n % 2 === 0 ? 1n : -1n;
  for (let k = 2; k <= m; k++) product *= BigInt(k);
  return product;
}

/** cos and sin(y)/y in y^2. */
const trigonometricSeries = memoiseBounded(16, (working: number) => {
  const reduction = 6 * chunkBits(working);
  return {
    cosine: shortSeries(working, reduction, (n) => alternatingFactorial(n, 2 * n)),
    sine: shortSeries(working, reduction, (n) => alternatingFactorial(n, 2 * n + 1)),
  };
});

/** cos y and sin y for 0 <= y < 2^-(3 chunk); error below 8 ulps (6 of a plan, 4 of a short series, 2 for y^2 and y). */
function sinCosOfRest(y: bigint, working: number): SinCos {
  const shift = BigInt(working);
  const square = (y * y) >> shift;
  if (working > LONG_BITS) {
    const { cosine, sine } = trigonometricPlans(working);
    const powers = planPowers(square, cosine.block, working);
    return { cos: sumPlan(cosine, powers, working), sin: (y * sumPlan(sine, powers, working)) >> shift };
  }
  const { cosine, sine } = trigonometricSeries(working);
  const rough = numberFromFixed(square, working);
  return { cos: sumShortSeries(cosine, square, rough), sin: (y * sumShortSeries(sine, square, rough)) >> shift };
}

/**
 * sin and cos of x with `working` fraction bits (from workingBits); error below 40 working ulps. As complex numbers of modulus
 * 1: table entries sqrt 2 each, the rest 8 sqrt 2 at most, three rotations sqrt 2 each for their cuts, which adds up to 20;
 * the reduced argument 1 for its cut and less than 1 for pi/2.
 */
export function sinCosWorking(x: bigint, working: number): SinCos {
  // pi/2 with as many more bits as the quotient has, so that the multiple subtracted is right to one working ulp.
  const rough = numberFromFixed(x, working);
  const extra = Math.abs(rough) < 100 ? 16 : Math.max(16, bitLength(x) - working + 8);
  const halfPi = piFixed(working + extra + 1) >> 2n;
  const wide = x << BigInt(extra);
  const close = Math.round(rough * (2 / Math.PI));
  const quotient = Math.abs(close) < 2 ** 20 ? BigInt(close) : floorDivide(2n * wide + halfPi, 2n * halfPi);
  const r = (wide - quotient * halfPi) >> BigInt(extra);
  const { cos, sin } = sinCosReduced(absolute(r), working);
  const signed = r < 0n ? -sin : sin;
  switch (Number(BigInt.asUintN(2, quotient))) {
    case 0:
      return { sin: signed, cos };
    case 1:
      return { sin: cos, cos: -signed };
    case 2:
      return { sin: -signed, cos: -cos };
    default:
      return { sin: -cos, cos: signed };
  }
}

/** Integer part of a quotient, towards minus infinity; BigInt division goes towards zero. */
function floorDivide(a: bigint, b: bigint): bigint {
  const quotient = a / b;
  return a < 0n && quotient * b !== a ? quotient - 1n : quotient;
}

/** Fraction bits of the angles whose sine and cosine are a product of table entries alone. */
export function angleGridBits(working: number): number {
  return 3 * chunkBits(working);
}

/** sin and cos of cell 2^-angleGridBits for an integer cell, 0 to pi/4; error below 8 ulps: three entries, two cuts. */
export function sinCosOnGrid(cell: number, working: number): SinCos {
  const { chunk, levels } = trigonometricTables(working);
  const mask = (1 << chunk) - 1;
  const shift = BigInt(working);
  const rough = levels[0][cell >> (2 * chunk)] as SinCos;
  const fine = rotated(levels[1][(cell >> chunk) & mask] as SinCos, levels[2][cell & mask] as SinCos, shift);
  return rotated(rough, fine, shift);
}

function rotated(a: SinCos, b: SinCos, shift: bigint): SinCos {
  return { cos: (a.cos * b.cos - a.sin * b.sin) >> shift, sin: (a.cos * b.sin + a.sin * b.cos) >> shift };
}

/** sin and cos for 0 <= r <= pi/4 (a little more is allowed): two table rotations and the series, then one more rotation. */
function sinCosReduced(r: bigint, working: number): SinCos {
  const tables = trigonometricTables(working);
  const { chunk, levels } = tables;
  const mask = (1 << chunk) - 1;
  const shift = BigInt(working);
  const top = Number(r >> BigInt(working - 3 * chunk));
  const a = levels[0][top >> (2 * chunk)] as SinCos;
  const b = levels[1][(top >> chunk) & mask] as SinCos;
  const c = levels[2][top & mask] as SinCos;
  const d = sinCosOfRest(BigInt.asUintN(working - 3 * chunk, r), working);
  return rotated(rotated(a, b, shift), rotated(c, d, shift), shift);
}

/** sin x and cos x with `bits` fraction bits for any x; |error| <= 1 ulp each. */
export function sinCosFixed(x: bigint, bits: number): SinCos {
  const working = workingBits(bits);
  const { sin, cos } = sinCosWorking(x << BigInt(working - bits), working);
  return { sin: shiftRounded(sin, working - bits), cos: shiftRounded(cos, working - bits) };
}

/**
 * tan x with `bits` fraction bits; |error| <= max(1, tan^2 x) ulp (the inherent growth with one ulp of x).
 * x is never an odd multiple of pi/2, being a fraction; the quotient of two numbers that both vanish is not met.
 */
export function tanFixed(x: bigint, bits: number): bigint {
  return quotientOf(x, bits, (value) => [value.sin, value.cos]);
}

/** cot x with `bits` fraction bits for x != 0; |error| <= max(1, cot^2 x) ulp. */
export function cotFixed(x: bigint, bits: number): bigint {
  if (x === 0n) throw new RangeError('cotangent of zero');
  return quotientOf(x, bits, (value) => [value.cos, value.sin]);
}

function quotientOf(x: bigint, bits: number, parts: (value: SinCos) => [bigint, bigint]): bigint {
  for (let guard = 6; ; guard *= 2) {
    const working = bits + guard;
    const [numerator, denominator] = parts(sinCosFixed(x << BigInt(guard), working));
    // A small denominator has lost digits: more guard bits until 2^6 ulps of it are noise of the quotient's last ulp.
    if (bitLength(denominator) + guard >= working + 6 && bitLength(denominator) > 8) {
      return shiftRounded((numerator << BigInt(working)) / denominator, guard);
    }
  }
}
