import { fixedFromNumber, numberFromFixed } from '../arithmetic/fixed';
import {
  addComplex,
  divideComplex,
  expComplex,
  type FixedComplex,
  logComplex,
  multiplyComplex,
  oneComplex,
  scaleComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { logFixed } from '../arithmetic/fixed-log';
import { formFixed } from '../arithmetic/form-fixed';
import { Form } from '../exact/form';
import { Gaussian } from '../exact/gaussian';
import { Rational } from '../exact/rational';
import { barnesZetaAtZero } from './barnes-polynomial';

/** Half-width below the real axis, in u, of the strip without singularities; above, they start at 1. */
const STRIP = 0.85;

/** Most steps that bring x into the region where the integrand decays fast. */
const MAXIMAL_STEPS = 64;

/** Most points of the quadrature. */
const MAXIMAL_POINTS = 20_000;

/**
 * log Gamma_N(x|w) by a contour integral (Ruijsenaars 2000, Adv. Math. 156, 107, eq. (3.14), the term with Euler's
 * constant put under the integral): 1/(2 pi i) times the integral of
 *   [e^(-xt)/product of (1 - e^(-w_i t)) - zeta_N(0, x|w) e^(-t)] log(-t)/t
 * from +infinity above the real axis around 0 and back below, Re w_i > 0. The contour is the parabola
 * t = -mu (1 + iu)^2, mu so small that the poles 2 pi i k/w_i stay outside, the rule the midpointless trapezoid in u.
 * Small or oblique x are moved by Gamma_N(x) = Gamma_(N-1)(x|the others) Gamma_N(x + w).
 * Periods that lie askew are turned first: log Gamma_N(x|w) = log Gamma_N(cx|cw) + zeta_N(0, x|w) log c.
 * The quadrature error falls as exp(-2 pi STRIP/h); it is chosen below 2^-bits but not proved: for comparison only.
 * Imaginary parts are right up to multiples of 2 pi. Null where periods span nearly a half plane, and where x is out of
 * reach.
 */
export function logBarnesByContour(x: Form, periods: readonly Form[], bits: number): FixedComplex | null {
  const rough = periods.map(approximate);
  if (!rough.every((w) => w !== null)) return null;
  if (rough.every(isRight)) return moved(x, periods, bits, 0);
  const turn = turnOf(rough);
  const found =
    turn &&
    moved(
      x.mul(turn),
      periods.map((w) => w.mul(turn)),
      bits,
      0,
    );
  const zeta = formFixed(barnesZetaAtZero(x, periods), bits + TURN_GUARD);
  const log = turn && formFixed(Form.call('log', turn), bits + TURN_GUARD);
  if (!found || zeta === null || !log) return null;
  const added = multiplyComplex(zeta, log, bits + TURN_GUARD);
  const by = BigInt(TURN_GUARD);
  return addComplex(found, { re: added.re >> by, im: added.im >> by });
}

const TURN_GUARD = 32;

/** Near enough to the positive axis for the poles to stay outside a parabola of some width. */
function isRight({ re, im }: Rough): boolean {
  return re > Math.abs(im) / 4;
}

/** A number close to 1 in size that turns the middle of the periods to the positive axis; null if that does not help. */
function turnOf(periods: readonly Rough[]): Form | null {
  const sum = periods.reduce(
    (total, { re, im }) => {
      const size = Math.hypot(re, im);
      return { re: total.re + re / size, im: total.im + im / size };
    },
    { re: 0, im: 0 },
  );
  const size = Math.hypot(sum.re, sum.im);
  const [re, im] = [Math.round((16 * sum.re) / size) / 16, Math.round((-16 * sum.im) / size) / 16];
  const turned = periods.map((w) => ({ re: w.re * re - w.im * im, im: w.re * im + w.im * re }));
  if (!(size > 0) || !turned.every(isRight)) return null;
  return Form.gaussian(Gaussian.of(Rational.of(Math.round(16 * re), 16), Rational.of(Math.round(16 * im), 16)));
}

function moved(x: Form, periods: readonly Form[], bits: number, steps: number): FixedComplex | null {
  const at = formFixed(x, bits);
  if (at === null || steps > MAXIMAL_STEPS) return null;
  const last = periods.at(-1);
  if (last === undefined) {
    const log = logComplex(at, bits);
    return { re: -log.re, im: -log.im };
  }
  const rough = periods.map((w) => approximate(w));
  const place = approximate(x);
  if (place === null || !rough.every((w) => w !== null)) return null;
  const largest = Math.max(...rough.map((w) => w?.re ?? 0));
  if (place.re >= 0.7 * largest && Math.abs(place.im) <= 1.5 * place.re) return onParabola(x, periods, bits);
  const others = moved(x, periods.slice(0, -1), bits, steps);
  const rest = moved(x.add(last), periods, bits, steps + 1);
  return others === null || rest === null ? null : addComplex(others, rest);
}

interface Rough {
  readonly re: number;
  readonly im: number;
}

function approximate(form: Form): Rough | null {
  const value = formFixed(form, 80);
  return value && { re: numberFromFixed(value.re, 80), im: numberFromFixed(value.im, 80) };
}

/** The largest mu for which the poles next to 0 lie below the strip: Re sqrt(-t/mu) > 1 + STRIP at t = +-2 pi i/w. */
function largestMu(periods: readonly Rough[]): number {
  const reach = 1.1 + STRIP;
  return Math.min(
    ...periods.map((w) => {
      // -t is at the angle pi/2 -+ arg w; the wider one is the closer.
      const angle = Math.PI / 2 + Math.abs(Math.atan2(w.im, w.re));
      return ((2 * Math.PI) / Math.hypot(w.re, w.im)) * (Math.cos(angle / 2) / reach) ** 2;
    }),
  );
}

function onParabola(x: Form, periods: readonly Form[], bits: number): FixedComplex | null {
  const place = approximate(x) as Rough;
  const rough = periods.map((w) => approximate(w) as Rough);
  const nats = (bits + 16) * Math.LN2;
  const mu = Math.min(largestMu(rough), nats / (8 * (place.re + place.im ** 2 / place.re)));
  const growth = mu * (place.re + place.im ** 2 / place.re);
  const smallest = mu * Math.min(1, ...rough.map((w) => Math.hypot(w.re, w.im)));
  const poles = (periods.length + 1) * Math.log(1 / (0.02 * Math.min(1, smallest)));
  const step = (2 * Math.PI * STRIP) / (nats + growth * (1 + STRIP) ** 2 + poles + 12);
  const decay = mu * Math.min(1, place.re, ...rough.map((w) => w.re));
  const end = 2 * Math.abs(place.im / place.re) + Math.sqrt((nats + growth + poles) / decay + 1);
  const count = Math.ceil(end / step);
  if (count > MAXIMAL_POINTS) return null;
  const working = bits + Math.ceil((growth + poles) / Math.LN2 + 2 * Math.log2(count)) + 24;
  const all = [x, ...periods].map((form) => formFixed(form, working));
  const zeta = formFixed(barnesZetaAtZero(x, periods), working);
  if (zeta === null || !all.every((value) => value !== null)) return null;
  const [at, ...w] = all as FixedComplex[];
  const grid: Grid = { mu: fixedFromNumber(mu, working), step: fixedFromNumber(step, working), working };
  const forward = branch(grid, at as FixedComplex, w, zeta, count, 1);
  const real = all.every(({ im }) => im === 0n);
  const back = real ? conjugate(forward) : branch(grid, at as FixedComplex, w, zeta, count, -1);
  const middle = bracket(grid, at as FixedComplex, w, zeta);
  const sum = addComplex(addComplex(forward, back), middle);
  const factor = (grid.step << BigInt(working)) / piFixed(working);
  const value = scaleComplex(sum, factor, working);
  const by = BigInt(working - bits);
  return { re: value.re >> by, im: value.im >> by };
}

interface Grid {
  readonly mu: bigint;
  readonly step: bigint;
  readonly working: number;
}

/** e^(-a t) at the points of the parabola, which are quadratic in their number: two products each. */
class Powers {
  private readonly working: number;
  private value: FixedComplex;
  private ratio: FixedComplex;
  private readonly second: FixedComplex;

  constructor(a: FixedComplex, { mu, step, working }: Grid, direction: 1 | -1) {
    const shift = BigInt(working);
    const square = (((mu * step) >> shift) * step) >> shift;
    const slope = { re: square, im: BigInt(-2 * direction) * ((mu * step) >> shift) };
    const power = (t: FixedComplex): FixedComplex => {
      const { re, im } = multiplyComplex(a, t, working);
      return expComplex({ re: -re, im: -im }, working);
    };
    this.working = working;
    this.value = power({ re: -mu, im: 0n });
    this.ratio = power(slope);
    this.second = power({ re: 2n * square, im: 0n });
  }

  next(): FixedComplex {
    this.value = multiplyComplex(this.value, this.ratio, this.working);
    this.ratio = multiplyComplex(this.ratio, this.second, this.working);
    return this.value;
  }

  now(): FixedComplex {
    return this.value;
  }
}

/** The sum over u = +-h, +-2h, .... */
function branch(
  grid: Grid,
  x: FixedComplex,
  w: readonly FixedComplex[],
  zeta: FixedComplex,
  count: number,
  direction: 1 | -1,
): FixedComplex {
  const { mu, step, working } = grid;
  const one = oneComplex(working);
  const top = new Powers(x, grid, direction);
  const plain = new Powers(one, grid, direction);
  const below = w.map((period) => new Powers(period, grid, direction));
  const logMu = logFixed(mu, working);
  let sum = zeroComplex;
  for (let k = 1; k <= count; k++) {
    const bottom = below.reduce((p, power) => multiplyComplex(p, subtractComplex(one, power.next()), working), one);
    const inner = subtractComplex(
      divideComplex(top.next(), bottom, working),
      multiplyComplex(zeta, plain.next(), working),
    );
    const u = { re: one.re, im: BigInt(direction * k) * step };
    const log = logComplex(u, working);
    const weight = divideComplex({ re: logMu + 2n * log.re, im: 2n * log.im }, u, working);
    sum = addComplex(sum, multiplyComplex(inner, weight, working));
  }
  return sum;
}

/** The summand at u = 0. */
function bracket(grid: Grid, x: FixedComplex, w: readonly FixedComplex[], zeta: FixedComplex): FixedComplex {
  const { mu, working } = grid;
  const one = oneComplex(working);
  const at = (a: FixedComplex): FixedComplex => new Powers(a, grid, 1).now();
  const bottom = w.reduce((p, period) => multiplyComplex(p, subtractComplex(one, at(period)), working), one);
  const inner = subtractComplex(divideComplex(at(x), bottom, working), multiplyComplex(zeta, at(one), working));
  return scaleComplex(inner, logFixed(mu, working), working);
}

function conjugate({ re, im }: FixedComplex): FixedComplex {
  return { re, im: -im };
}
