import { divideFixed, multiplyFixed, shiftRounded, sqrtFixed } from '../arithmetic/fixed';
import type { FixedComplex } from '../arithmetic/fixed-complex';
import { Rational } from '../exact/rational';
import { periodOfParameter } from './double-sine-period';
import { logDoubleSine } from './double-sine-precise';
import { memoiseByKey } from './kernel-memo';
import type { ExactParameter, PreciseLog } from './special-function';

/** Pure memoisation: one parameter object for equal periods, so that the tables made for it are found again. */
const ratios = memoiseByKey<ExactParameter>(32);

/** sqrt(w1/w2) as a parameter. Its square is rational where w1^2/w2^2 has a rational root. */
function rootOfRatio(w1: ExactParameter, w2: ExactParameter): ExactParameter {
  const quartic = w1.square !== null && w2.square !== null ? w1.square.div(w2.square) : null;
  const square: Rational | null = quartic?.sqrt() ?? null;
  const key = `${w1.value(256).re}|${w2.value(256).re}|${w1.square}|${w2.square}`;
  return ratios(key, () => ({
    square,
    value: (bits) => {
      const working = bits + 16 + Math.ceil(Math.abs(Math.log2(w1.approx.re)) + 2 * Math.abs(Math.log2(w2.approx.re)));
      const ratio = divideFixed(w1.value(2 * working).re, w2.value(2 * working).re, 2 * working);
      return { re: shiftRounded(sqrtFixed(ratio, 2 * working), 2 * working - bits), im: 0n };
    },
    approx: { re: Math.sqrt(w1.approx.re / w2.approx.re), im: 0 },
  }));
}

/**
 * True when the periods agree to the digits that count: b = 1 is then off by less than 2^-(bits + 60), and so is log S_2
 * up to its sensitivity.
 */
function areEqual(w1: ExactParameter, w2: ExactParameter, bits: number): boolean {
  const difference = w1.value(bits + 64).re - w2.value(bits + 64).re;
  return difference <= 2n && difference >= -2n;
}

const UNIT: ExactParameter = {
  square: Rational.one,
  value: (bits) => ({ re: 1n << BigInt(bits), im: 0n }),
  approx: { re: 1, im: 0 },
};

/**
 * log S_2(x | w1, w2) = log s_b(i (x/s - Q/2)), s = sqrt(w1 w2), b = sqrt(w1/w2), for real positive periods.
 * S_2 = prod_{n>=0} (n.w + x)/(n.w + |w| - x).
 */
export function logTwoPeriodSine(x: FixedComplex, periods: readonly ExactParameter[], bits: number): PreciseLog {
  const [w1, w2] = periods as [ExactParameter, ExactParameter];
  const period = periodOfParameter(areEqual(w1, w2, bits) ? UNIT : rootOfRatio(w1, w2));
  if (period === null) return { kind: 'indistinct' };
  const working = bits + 24;
  const scale = sqrtFixed(multiplyFixed(w1.value(working).re, w2.value(working).re, working), working);
  const up = BigInt(working - bits);
  const b = period.value(working);
  const q = b + divideFixed(1n << BigInt(working), b, working);
  const re = divideFixed(x.re << up, scale, working) - (q >> 1n);
  const im = divideFixed(x.im << up, scale, working);
  // i (re + i im); one unit of x is 1/s units here, and rounding adds one.
  const log = logDoubleSine(
    { re: shiftRounded(-im, working - bits), im: shiftRounded(re, working - bits) },
    period,
    bits,
  );
  if (log.kind !== 'value') return log.kind === 'unreachable' ? log : { kind: 'indistinct' };
  const units = 2n + BigInt(Math.ceil(1 / Math.sqrt(w1.approx.re * w2.approx.re)));
  return { ...log, error: log.error * units };
}
