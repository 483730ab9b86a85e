import { numberFromFixed, shiftRounded } from './fixed';
import { ln2Fixed } from './fixed-constants';
import { shortSeries, sumShortSeries } from './fixed-short-series';
import {
  exponentialChunk,
  exponentialTerms,
  LONG_BITS,
  planPowers,
  planSeries,
  sumPlan,
  workingBits,
} from './fixed-working';
import { memoiseBounded } from './memo';

/** The number mantissa / 2^bits * 2^exponent. */
export interface ScaledFixed {
  readonly mantissa: bigint;
  readonly exponent: number;
}

/** Extra bits of ln 2 in the argument reduction; exponents up to 2^40 then cost less than one working ulp. */
const REDUCTION_BITS = 44;

/** Leading bits of a remainder that choose the table entries and the tail of the series: an exact double. */
const TOP_BITS = 52;

interface ExponentialTables {
  readonly chunk: number;
  /** e^(i 2^-(chunk l)), l = 1, 2, 3. */
  readonly levels: readonly [readonly bigint[], readonly bigint[], readonly bigint[]];
  /** Shifts as big integers, which are dear to make: working, working - TOP_BITS. */
  readonly shift: bigint;
  readonly topShift: bigint;
  /** 2^(3 chunk). */
  readonly cells: number;
}

/** e^(i 2^-place), i < count; each entry off by less than 1 ulp. */
function powerTable(working: number, place: number, count: number): bigint[] {
  // Repeated multiplication with 32 more bits: count < 2^12 products err by less than 2^14 ulps of 2^-(working + 32).
  const bits = working + 32;
  const shift = BigInt(bits);
  const one = 1n << shift;
  let base = one;
  for (let term = one >> BigInt(place), n = 2n; term !== 0n; n++) {
    base += term;
    term = (term >> BigInt(place)) / n;
  }
  const table: bigint[] = [];
  for (let value = one, i = 0; i < count; i++) {
    table.push(value >> 32n);
    value = (value * base) >> shift;
  }
  return table;
}

const exponentialTables = memoiseBounded(16, (working: number): ExponentialTables => {
  const chunk = exponentialChunk(working);
  const count = 1 << chunk;
  return {
    chunk,
    levels: [
      powerTable(working, chunk, count),
      powerTable(working, 2 * chunk, count),
      powerTable(working, 3 * chunk, count),
    ],
    shift: BigInt(working),
    topShift: BigInt(working - TOP_BITS),
    cells: 2 ** (3 * chunk),
  };
});

const exponentialPlan = memoiseBounded(16, (working: number) =>
  planSeries(exponentialTerms(working, 3 * exponentialChunk(working)), 1n, (k) => BigInt(k)),
);

function factorialOf(n: number): bigint {
  let product = 1n;
  for (let k = 2; k <= n; k++) product *= BigInt(k);
  return product;
}

const exponentialSeries = memoiseBounded(16, (working: number) =>
  shortSeries(working, 3 * exponentialChunk(working), factorialOf),
);

/** e^y for 0 <= y < 2^-(3 chunk), `rough` the same to 2^-52; error below 8 ulps (4 of the short series, 6 of the plan). */
function exponentialOfRest(y: bigint, rough: number, working: number): bigint {
  if (working <= LONG_BITS) return sumShortSeries(exponentialSeries(working), y, rough);
  const plan = exponentialPlan(working);
  return sumPlan(plan, planPowers(y, plan.block, working), working);
}

/**
 * e^r for 0 <= r < 1, both with `working` fraction bits (from workingBits). Error below 40 working ulps: the rest 8, the factor near 1 of the third level adds 1 for its entry and 1 for the cut, the second likewise on top of 1.02 times
 * that, the first e times that and 2 more: e (1.02 (8 + 2) + 2) + 3 < 37. For r <= ln 2 it is 27.
 */
export function exponentialWorking(r: bigint, working: number): bigint {
  const tables = exponentialTables(working);
  return exponentialOfSplit(r, Number(r >> tables.topShift) * 2 ** -TOP_BITS, working, tables);
}

/** The same with r in doubles, cut to TOP_BITS. */
function exponentialOfSplit(r: bigint, top: number, working: number, tables: ExponentialTables): bigint {
  const { chunk, levels, shift, cells } = tables;
  const cell = Math.floor(top * cells);
  const mask = (1 << chunk) - 1;
  const rest = exponentialOfRest(BigInt.asUintN(working - 3 * chunk, r), top - cell / cells, working);
  const fine = (rest * (levels[2][cell & mask] as bigint)) >> shift;
  const middle = (fine * (levels[1][(cell >> chunk) & mask] as bigint)) >> shift;
  return (middle * (levels[0][cell >> (2 * chunk)] as bigint)) >> shift;
}

/** Fraction bits of the arguments whose exponential is a product of table entries alone. */
export function gridBits(working: number): number {
  return 3 * exponentialChunk(working);
}

/** e^(cell 2^-gridBits) for an integer 0 <= cell < 2^gridBits, below e^0.7; error below 10 ulps: three entries, two cuts. */
export function exponentialOnGrid(cell: number, working: number): bigint {
  const { chunk, levels, shift } = exponentialTables(working);
  const mask = (1 << chunk) - 1;
  const middle = ((levels[2][cell & mask] as bigint) * (levels[1][(cell >> chunk) & mask] as bigint)) >> shift;
  return (middle * (levels[0][cell >> (2 * chunk)] as bigint)) >> shift;
}

/** What the reduction of an argument with `bits` fraction bits needs. */
interface Reduction {
  readonly working: number;
  readonly tables: ExponentialTables;
  readonly ln2: bigint;
  readonly up: bigint;
}

const reductions = memoiseBounded(32, (bits: number): Reduction => {
  const working = workingBits(bits);
  const tables = exponentialTables(working);
  return {
    working,
    tables,
    ln2: ln2Fixed(working + REDUCTION_BITS),
    up: BigInt(working + REDUCTION_BITS - bits),
  };
});

const REDUCTION_SHIFT = BigInt(REDUCTION_BITS);

/** A remainder below this, cut to TOP_BITS, is below ln 2. */
const SURELY_BELOW = Math.LN2 - 2 ** -50;

/**
 * e^x as a mantissa in [1, 2] (up to rounding) with `working` fraction bits, and a power of two; |x| < 2^40. Reduction
 * x = exponent ln 2 + r, 0 <= r < ln 2: one working ulp for the cut and 2^40 2^-44 for ln 2, so 42 ulps of the mantissa in all.
 */
function expWorking(x: bigint, bits: number): ScaledFixed & { readonly working: number } {
  const { working, tables, ln2, up } = reductions(bits);
  const wide = x << up;
  let exponent = Math.floor(numberFromFixed(x, bits) / Math.LN2);
  let r = (exponent === 0 ? wide : wide - BigInt(exponent) * ln2) >> REDUCTION_SHIFT;
  let top = Number(r >> tables.topShift) * 2 ** -TOP_BITS;
  // The quotient in doubles may be off by one next to a multiple of ln 2.
  if (top < 0 || top >= SURELY_BELOW) {
    const off = top < 0 ? -1 : r >= ln2 >> REDUCTION_SHIFT ? 1 : 0;
    if (off !== 0) {
      exponent += off;
      r = (wide - BigInt(exponent) * ln2) >> REDUCTION_SHIFT;
      // Within one ulp of 0 the cut value of ln 2 may be a unit too large.
      if (r < 0n) r = 0n;
      top = Number(r >> tables.topShift) * 2 ** -TOP_BITS;
    }
  }
  return { mantissa: exponentialOfSplit(r, top, working, tables), exponent, working };
}

/**
 * e^x as mantissa in [1, 2] and a power of two, both x and mantissa with `bits` fraction bits. Domain |x| < 2^40.
 * Relative error below 0.6 2^-bits, whatever the size of x: half an ulp for the last rounding, 42 working ulps before, at
 * least 10 bits below (KERNEL_GUARD).
 * Method: reduction by ln 2, three table factors, Taylor series of the rest.
 */
export function expScaled(x: bigint, bits: number): ScaledFixed {
  const { mantissa, exponent, working } = expWorking(x, bits);
  return { mantissa: shiftRounded(mantissa, working - bits), exponent };
}

/** e^x with `bits` fraction bits; |error| <= max(1, e^x) ulp. */
export function expFixed(x: bigint, bits: number): bigint {
  const { mantissa, exponent, working } = expWorking(x, bits);
  return shiftRounded(mantissa, working - bits - exponent);
}

/** cosh x and sinh x with `bits` fraction bits; |error| <= max(1, cosh x) ulp each. */
export function sinhCoshFixed(x: bigint, bits: number): { readonly sinh: bigint; readonly cosh: bigint } {
  const size = x < 0n ? -x : x;
  const guarded = bits + 2;
  const grown = expFixed(size << 2n, guarded);
  const decayed = (1n << BigInt(2 * guarded)) / grown;
  const sinh = shiftRounded(grown - decayed, 3);
  return { sinh: x < 0n ? -sinh : sinh, cosh: shiftRounded(grown + decayed, 3) };
}

/** tanh x with `bits` fraction bits; |error| <= 1 ulp. */
export function tanhFixed(x: bigint, bits: number): bigint {
  const guarded = bits + 4;
  const size = x < 0n ? -x : x;
  // tanh = (1 - q) / (1 + q), q = e^(-2 |x|) <= 1.
  const q = expFixed(-size << 5n, guarded);
  const one = 1n << BigInt(guarded);
  const value = shiftRounded(((one - q) << BigInt(guarded)) / (one + q), 4);
  return x < 0n ? -value : value;
}
