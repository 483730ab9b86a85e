import { numberFromFixed, shiftRounded } from './fixed';
import { ln2Fixed } from './fixed-constants';
import {
  chunkBits,
  exponentialTerms,
  inverseFactorials,
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

interface ExponentialTables {
  readonly chunk: number;
  /** e^(i 2^-(chunk l)), l = 1, 2, 3. */
  readonly levels: readonly [readonly bigint[], readonly bigint[], readonly bigint[]];
  readonly terms: number;
}

function powerTable(working: number, place: number, count: number): bigint[] {
  // Repeated multiplication with 32 more bits: count < 2^9 products err by less than 2^11 ulps of 2^-(working + 32).
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
  const chunk = chunkBits(working);
  const count = 1 << chunk;
  return {
    chunk,
    levels: [
      powerTable(working, chunk, count),
      powerTable(working, 2 * chunk, count),
      powerTable(working, 3 * chunk, count),
    ],
    terms: exponentialTerms(working, 3 * chunk),
  };
});

const exponentialPlan = memoiseBounded(16, (working: number) =>
  planSeries(exponentialTerms(working, 3 * chunkBits(working)), 1n, (k) => BigInt(k)),
);

/** e^y for 0 <= y < 2^-(3 chunk); error below 8 ulps. */
function exponentialOfRest(y: bigint, working: number, terms: number): bigint {
  if (working > LONG_BITS) {
    const plan = exponentialPlan(working);
    return sumPlan(plan, planPowers(y, plan.block, working), working);
  }
  const inverse = inverseFactorials(working);
  const shift = BigInt(working);
  let sum = inverse[terms] ?? 0n;
  for (let n = terms - 1; n >= 0; n--) sum = (inverse[n] as bigint) + ((y * sum) >> shift);
  return sum;
}

/**
 * e^r for 0 <= r < 1, both with `working` fraction bits (from workingBits). Error below 40 working ulps: three table factors
 * (1 ulp each) and three truncated products, all values below e, besides the rest.
 */
export function exponentialWorking(r: bigint, working: number): bigint {
  const { chunk, levels, terms } = exponentialTables(working);
  const mask = (1 << chunk) - 1;
  const top = Number(r >> BigInt(working - 3 * chunk));
  const rest = exponentialOfRest(BigInt.asUintN(working - 3 * chunk, r), working, terms);
  const shift = BigInt(working);
  const fine = (rest * (levels[2][top & mask] as bigint)) >> shift;
  const middle = (fine * (levels[1][(top >> chunk) & mask] as bigint)) >> shift;
  return (middle * (levels[0][top >> (2 * chunk)] as bigint)) >> shift;
}

/** x = exponent ln 2 + r with 0 <= r < ln 2 (up to one working ulp), |x| < 2^40. */
function reduceByLn2(x: bigint, bits: number, working: number): { r: bigint; exponent: number } {
  const ln2 = ln2Fixed(working + REDUCTION_BITS);
  const wide = x << BigInt(working + REDUCTION_BITS - bits);
  let exponent = Math.floor(numberFromFixed(x, bits) / Math.LN2);
  let r = wide - BigInt(exponent) * ln2;
  // The quotient in doubles may be off by one next to a multiple of ln 2.
  if (r < 0n) {
    r += ln2;
    exponent -= 1;
  } else if (r >= ln2) {
    r -= ln2;
    exponent += 1;
  }
  return { r: r >> BigInt(REDUCTION_BITS), exponent };
}

/**
 * e^x as mantissa in [1, 2] and a power of two, both x and mantissa with `bits` fraction bits. Domain |x| < 2^40.
 * Relative error below 0.6 2^-bits, whatever the size of x.
 * Method: reduction by ln 2, three table factors, Taylor series of the rest.
 */
export function expScaled(x: bigint, bits: number): ScaledFixed {
  const working = workingBits(bits);
  const { r, exponent } = reduceByLn2(x, bits, working);
  return { mantissa: shiftRounded(exponentialWorking(r, working), working - bits), exponent };
}

/** e^x with `bits` fraction bits; |error| <= max(1, e^x) ulp. */
export function expFixed(x: bigint, bits: number): bigint {
  const { mantissa, exponent } = expScaled(x, bits);
  return shiftRounded(mantissa, -exponent);
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
