import { multiplyFixed, numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import { addComplex, divideComplex, expComplex, type FixedComplex, multiplyComplex } from '../arithmetic/fixed-complex';
import { expFixed } from '../arithmetic/fixed-exp';
import { memoiseByKey } from './kernel-memo';
import { liftPoint, reachClass } from './kernel-nodes';
import type { ExactParameter } from './special-function';

/** More nodes than this are not attempted. */
const MAXIMAL_NODES = 60_000;
/** Lines and steps are multiples of 2^-DYADIC, exact in doubles and in fixed point. */
const DYADIC = 40;

/** Nodes u_k = (k + 1/2) h + i c, k >= 0; their mirror images -conj(u_k) are not stored. */
interface ContourTable {
  readonly bits: number;
  readonly step: bigint;
  readonly line: bigint;
  /** |w|. */
  readonly total: bigint;
  /** e^{|w| (k + 1/2) h/2}/(u_k prod_i sinh(w_i u_k)), of modulus falling as e^{-|w| k h/2}. */
  readonly re: readonly bigint[];
  readonly im: readonly bigint[];
}

const tables = memoiseByKey<ContourTable>(12);

/**
 * log S_3(|w|/2 + z | w) for |Re z| <= |w|/4 by the midpoint rule off the real line,
 *   log S_3 = -(1/8) int_{R + ic} du cosh(2zu)/(u prod sinh(w_i u)),  0 < c < pi/max w,
 * half way between the pole of order four at 0 and the next: no pole is subtracted, all is complex, and nothing is
 * shared with the rule on the real line but the integrand. Error below 2^-(bits+10) by the rate of the rule; null where
 * more than 60 000 nodes would be needed. Source: Narukawa 2004, math/0306164.
 */
export function tripleSineByContour(
  x: FixedComplex,
  periods: readonly ExactParameter[],
  bits: number,
): FixedComplex | null {
  const table = tableFor(x, periods, bits);
  if (table === null) return null;
  const { bits: working, step, line, total } = table;
  const lifted = liftPoint(x, bits, working);
  const z = { re: lifted.re - (total >> 1n), im: lifted.im };
  const [forward, backward] = [1n, -1n].map((sign) => powerSums(table, { re: sign * z.re, im: sign * z.im })) as [
    PowerSums,
    PowerSums,
  ];
  // e^{2izc} and e^{-2izc} at the nodes, the other way round at their conjugates.
  const turn = { re: -2n * multiplyFixed(z.im, line, working), im: 2n * multiplyFixed(z.re, line, working) };
  const [up, down] = [turn, { re: -turn.re, im: -turn.im }].map((exponent) => expComplex(exponent, working)) as [
    FixedComplex,
    FixedComplex,
  ];
  const parts = [
    multiplyComplex(up, addComplex(forward.direct, backward.conjugate), working),
    multiplyComplex(down, addComplex(forward.conjugate, backward.direct), working),
  ] as const;
  const sum = addComplex(parts[0], parts[1]);
  const scaled = { re: multiplyFixed(step, sum.re, working), im: multiplyFixed(step, sum.im, working) };
  return { re: shiftRounded(-scaled.re, working - bits + 4), im: shiftRounded(-scaled.im, working - bits + 4) };
}

interface PowerSums {
  /** Sum of the weights times e^{2z (k + 1/2) h} without what was taken into the weights. */
  readonly direct: FixedComplex;
  /** The same with conjugate weights. */
  readonly conjugate: FixedComplex;
}

function powerSums({ bits, step, total, re, im }: ContourTable, z: FixedComplex): PowerSums {
  // 2z - |w|/2 has a negative real part, so that the powers fall off.
  const rate = { re: 2n * z.re - (total >> 1n), im: 2n * z.im };
  const half = { re: multiplyFixed(rate.re, step, bits + 1), im: multiplyFixed(rate.im, step, bits + 1) };
  let power = expComplex(half, bits);
  const ratio = expComplex({ re: 2n * half.re, im: 2n * half.im }, bits);
  const shift = BigInt(bits);
  let [realRe, realIm, imaginaryRe, imaginaryIm] = [0n, 0n, 0n, 0n];
  for (let k = 0; k < re.length; k++) {
    const [u, v] = [re[k] as bigint, im[k] as bigint];
    realRe += u * power.re;
    realIm += u * power.im;
    imaginaryRe += v * power.re;
    imaginaryIm += v * power.im;
    power = {
      re: (power.re * ratio.re - power.im * ratio.im) >> shift,
      im: (power.re * ratio.im + power.im * ratio.re) >> shift,
    };
  }
  return {
    direct: { re: (realRe - imaginaryIm) >> shift, im: (realIm + imaginaryRe) >> shift },
    conjugate: { re: (realRe + imaginaryIm) >> shift, im: (realIm - imaginaryRe) >> shift },
  };
}

function tableFor(x: FixedComplex, periods: readonly ExactParameter[], bits: number): ContourTable | null {
  const approx = periods.map((w) => w.approx.re);
  const total = approx.reduce((sum, w) => sum + w, 0);
  const height = Math.PI / Math.max(...approx);
  const reach = reachClass(numberFromFixed(x.im, bits) * height);
  const depth = (bits + 12) * Math.LN2;
  const dyadic = (value: number): number => Math.floor(value * 2 ** DYADIC) * 2 ** -DYADIC;
  const line = dyadic(height / 2);
  // On the lines through the poles cosh(2zu) has grown by e^{reach} either way; a tenth is left for the poles themselves.
  const step = dyadic((2 * Math.PI * line) / (1.1 * (depth + 2 * reach + 12)));
  const count = Math.ceil((2 * (depth + reach)) / total / step) + 2;
  if (!(step > 0) || count > MAXIMAL_NODES) return null;
  const first = approx.reduce((product, w) => product / Math.sin(w * line), 1 / line);
  const guard = 2 * Math.log2(count) + Math.max(0, Math.log2(first)) + reach / Math.LN2 + 24;
  const working = bits + 32 * Math.ceil(guard / 32);
  const exact = periods.map((w) => w.value(working).re);
  return tables([bits, reach, ...exact].join('|'), () => build(exact, step, line, count, working));
}

function build(periods: readonly bigint[], step: number, line: number, count: number, bits: number): ContourTable {
  const fixed = (value: number): bigint => BigInt(value * 2 ** DYADIC) << BigInt(bits - DYADIC);
  const [h, c] = [fixed(step), fixed(line)];
  const one = 1n << BigInt(bits);
  const total = periods.reduce((sum, w) => sum + w, 0n);
  const falling = (rate: bigint): bigint => expFixed(-multiplyFixed(rate, h, bits), bits);
  const unit = (rate: bigint): FixedComplex => expComplex({ re: 0n, im: -multiplyFixed(rate, c, bits) }, bits);
  // e^{-2 w u_k} is a real geometric sequence times e^{-2iwc}.
  const steps = periods.map((w) => falling(2n * w));
  const powers = periods.map((w) => falling(w));
  const units = periods.map((w) => unit(2n * w));
  const lead = unit(total);
  // e^{-|w| u_k} e^{|w| (k + 1/2) h/2}, and the eight of three sinh.
  let decay = 8n * falling(total >> 2n);
  const decayStep = falling(total >> 1n);
  const re: bigint[] = [];
  const im: bigint[] = [];
  for (let k = 0; k < count; k++) {
    let below: FixedComplex = { re: (BigInt(2 * k + 1) * h) >> 1n, im: c };
    powers.forEach((power, i) => {
      const turned = units[i] as FixedComplex;
      const factor = { re: one - multiplyFixed(power, turned.re, bits), im: -multiplyFixed(power, turned.im, bits) };
      below = multiplyComplex(below, factor, bits);
      powers[i] = multiplyFixed(power, steps[i] as bigint, bits);
    });
    const above = { re: multiplyFixed(decay, lead.re, bits), im: multiplyFixed(decay, lead.im, bits) };
    const weight = divideComplex(above, below, bits);
    re.push(weight.re);
    im.push(weight.im);
    decay = multiplyFixed(decay, decayStep, bits);
  }
  return { bits, step: h, line: c, total, re, im };
}
