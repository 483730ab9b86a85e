import { absolute, divideFixed, shiftRounded } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  type FixedComplex,
  logComplex,
  multiplyComplex,
  subtractComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { logBarnesGammaEqual } from './barnes-equal';
import { logBarnesGamma } from './barnes-gamma';
import type { Estimate } from './euler-maclaurin';
import { logGammaBySpouge } from './log-gamma-spouge';
import type { Complex, ExactParameter } from './special-function';
import type { FunctionValue, ValueFunction } from './value-function';

/** Extra bits for the arguments, so that their share of the error does not count next to a pole at some distance. */
const GUARD = 48;
/** Steps added for the second value whose difference measures the remainder. */
const FURTHER = 5;

/**
 * The multiple Gamma function Gamma_N(z | w_1, ..., w_N) = exp d/ds zeta_N(s, z | w) at s = 0 (Barnes 1904, normalised as
 * Ruijsenaars 2000, Adv. Math. 156, 107), as its logarithm. Poles at z = -n.w. The periods must lie in an open half
 * plane. Equal positive periods: derivatives of the Hurwitz zeta function, else rows of lattice points and an expansion,
 * which are also the second route of the former. Error: proved for positive periods; for others that of the expansion, and
 * the difference of a second value with more steps.
 */
export const barnesGamma: ValueFunction = {
  least: 2,
  most: Number.POSITIVE_INFINITY,
  definition: '\\Gamma_N(z|w)=\\exp\\left.\\frac{d}{ds}\\sum_{n_1,\\dots,n_N\\ge0}(z+n\\cdot w)^{-s}\\right|_{s=0}',
  evaluate: (args, bits) => {
    const [z, ...periods] = args as readonly [ExactParameter, ...ExactParameter[]];
    const refused = refusal(z, periods);
    if (refused) return refused;
    const working = bits + GUARD;
    const point = z.value(working);
    const values = periods.map((w) => w.value(working));
    const equal = logBarnesGammaEqual(point, values, working);
    if (equal !== null) return logarithm(equal, 0n, GUARD);
    const one = logBarnesGamma(point, values, working);
    // A bound of the remainder needs no second value.
    const two = one?.proved ? one : logBarnesGamma(point, values, working, FURTHER);
    if (one === null || two === null) return { kind: 'outside', says: 'too many lattice points would be needed' };
    const gap = absoluteComplex(subtractComplex(one.value, two.value));
    return logarithm(one, gap, GUARD);
  },
  crossCheck: (args, bits) => {
    const [z, ...periods] = args as readonly [ExactParameter, ...ExactParameter[]];
    if (refusal(z, periods)) return null;
    const working = bits + GUARD;
    const point = z.value(working);
    const values = periods.map((w) => w.value(working));
    if (values.length === 1) {
      return { route: "Spouge's approximation", value: simple(point, values[0] as FixedComplex, working) };
    }
    if (logBarnesGammaEqual(point, values, working) !== null) {
      const rows = logBarnesGamma(point, values, working);
      return rows && { route: 'rows of lattice points', value: logarithm(rows, 0n, GUARD) };
    }
    // Gamma_N(z) = Gamma_{N-1}(z | without w) Gamma_N(z + w) along the smallest period; the main route takes the largest.
    const sizes = periods.map(({ approx }) => Math.hypot(approx.re, approx.im));
    const index = sizes.indexOf(Math.min(...sizes));
    const others = values.filter((_, k) => k !== index);
    const lower = logBarnesGamma(point, others, working);
    const moved = logBarnesGamma(addComplex(point, values[index] as FixedComplex), values, working);
    if (lower === null || moved === null) return null;
    const total = { value: addComplex(lower.value, moved.value), error: lower.error + moved.error };
    return { route: 'shift along the smallest period', value: logarithm(total, 0n, GUARD) };
  },
  sources: [{ key: 'Ruijsenaars-2000', text: 'S. N. M. Ruijsenaars, Adv. Math. 156 (2000) 107' }],
};

function logarithm({ value, error }: Estimate, gap: bigint, guard: number): FunctionValue {
  return {
    kind: 'value',
    of: 'logarithm',
    re: shiftRounded(value.re, guard),
    im: shiftRounded(value.im, guard),
    error: ((error + gap) >> BigInt(guard)) + 3n,
  };
}

/** Gamma_1(z | w) = w^{z/w - 1/2} Gamma(z/w)/sqrt(2 pi). */
function simple(z: FixedComplex, w: FixedComplex, bits: number): FunctionValue {
  const ratio = divideComplex(z, w, bits);
  const gamma = logGammaBySpouge(ratio, bits);
  if (gamma.kind !== 'value') return { kind: 'indistinct' };
  const half = { re: ratio.re - (1n << BigInt(bits - 1)), im: ratio.im };
  const power = multiplyComplex(half, logComplex(w, bits), bits);
  const root = logComplex({ re: 2n * piFixed(bits), im: 0n }, bits).re >> 1n;
  const value = { re: gamma.re + power.re - root, im: gamma.im + power.im };
  return logarithm(
    {
      value,
      error: gamma.error * (2n + absolute(divideFixed(1n << BigInt(bits), absoluteComplex(w), bits) >> BigInt(bits))),
    },
    0n,
    GUARD,
  );
}

/** How many lattice points are compared with -z. */
const COMPARED = 20_000;

function refusal(z: ExactParameter, periods: readonly ExactParameter[]): FunctionValue | null {
  const units = periods.map(({ approx }) => {
    const size = Math.hypot(approx.re, approx.im);
    return { re: approx.re / size, im: approx.im / size };
  });
  const direction = units.reduce((sum, u) => ({ re: sum.re + u.re, im: sum.im + u.im }), { re: 0, im: 0 });
  const along = (value: Complex): number => value.re * direction.re + value.im * direction.im;
  if (!periods.every(({ approx }) => along(approx) > 1e-9)) {
    return { kind: 'outside', says: 'the periods must lie in an open half plane' };
  }
  if (along(z.approx) > 1e-9) return null;
  let left = COMPARED;
  const near = (k: number, re: number, im: number): boolean => {
    if (left-- <= 0) return false;
    const w = periods[k];
    if (!w) return Math.hypot(re, im) < 1e-12 * (1 + Math.hypot(z.approx.re, z.approx.im));
    const most = Math.floor(-along({ re, im }) / along(w.approx) + 1e-9);
    for (let n = 0; n <= most; n++) if (near(k + 1, re + n * w.approx.re, im + n * w.approx.im)) return true;
    return false;
  };
  return near(0, z.approx.re, z.approx.im) ? { kind: 'indistinct' } : null;
}
