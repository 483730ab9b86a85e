import Decimal from 'decimal.js';
import { fixedFromRatio, integerSqrt } from '../../engine/arithmetic/fixed';
import type { FixedComplex } from '../../engine/arithmetic/fixed-complex';
import type { ExactPeriod } from '../../engine/functions/double-sine-period';
import { logDoubleSine } from '../../engine/functions/double-sine-precise';
import fixture from '../fixtures/functions/double-sine-precise.json' with { type: 'json' };
import { compare } from './functions.bench';
import { arbPeer, EXTRA, mpmathPeer, pariPeer } from './peers';
import type { ComparisonRow } from './timing';
import { log10Difference, timeInTurns } from './timing';

/** b = 2^(1/4): irrational, no double poles. */
const PERIOD: ExactPeriod = {
  square: null,
  value: (bits) => integerSqrt(integerSqrt(2n << BigInt(4 * bits))),
  approx: 2 ** 0.25,
};

const ROUNDS = 9;

/** The point of the fixture, inside the strip, and one where residues alone are summed. */
const NEAR = [3, 10, 1, 5] as const;
const FAR = [3, 2, 1, 5] as const;

/** log s_b(0.3 + 0.2i) by quadrature on R + i pi b/2, no cancellation; log s_b(x) = -log s_b(-x) brings Re x below 0. */
const QUADRATURE = `import mpmath as mp
def double_sine():
    i, b = mp.mpc(0, 1), mp.root(2, 4)
    x = -mp.mpc(mp.mpf(3) / 10, mp.mpf(1) / 5)
    a = mp.pi / b / 2
    def integrand(u):
        w = mp.mpc(u, a)
        return mp.exp(-2 * i * x * w) / (4 * w * mp.sinh(b * w) * mp.sinh(w / b))
    line = mp.quad(integrand, [-mp.inf, 0, mp.inf])
    return -(-i * mp.pi * x ** 2 / 2 - i * mp.pi * (b ** 2 + b ** -2) / 24 + line)`;

/** The same for PARI, which is told how the integrand decays. */
const PARI_SETUP = 'b = sqrtn(2, 4); x = -3/10 - I/5; a = Pi/b/2; rate = b + 1/b - 2/5';
const PARI_QUADRATURE =
  'I*Pi*x^2/2 + I*Pi*(b^2 + b^-2)/24 - intnum(u = [-oo, rate], [oo, rate], w = u + I*a; exp(-2*I*x*w)/(4*w*sinh(b*w)*sinh(w/b)))';

/** Digits up to which the quadratures are run: beyond, a call takes many seconds. */
const MPMATH_MOST = 50;
const PARI_MOST = 200;

function integer(text: string | undefined): bigint {
  if (text === undefined) throw new Error('missing number');
  return text.startsWith('-') ? -BigInt(`0x${text.slice(1)}`) : BigInt(`0x${text}`);
}

interface Reference {
  readonly bits: number;
  readonly x: FixedComplex;
  /** With the fixture's extra bits. */
  readonly log: FixedComplex;
}

/** The fixture's value at 0.3 + 0.2i. */
function referenceFor(digits: number): Reference {
  const row = fixture.rows.find((r) => r.b === 'b = 2^(1/4)' && r.digits === digits && r.where === 'inside');
  if (row === undefined) throw new Error(`no reference for ${digits} digits`);
  return {
    bits: row.bits,
    x: { re: integer(row.x[0]), im: integer(row.x[1]) },
    log: { re: integer(row.log[0]), im: integer(row.log[1]) },
  };
}

function worstError(value: FixedComplex, reference: Reference): number {
  const bits = reference.bits + fixture.extra;
  return Math.max(log10Difference(value.re, reference.log.re, bits), log10Difference(value.im, reference.log.im, bits));
}

/**
 * log s_b at real x in decimal.js by the plain midpoint rule, sum_k w_k sin((2k+1) x h) - pi^2 x/(2h) with 2 pi/h = L/(pi b_min) + 1 and
 * no residues: what the same library user would write. The weights are made beforehand; a call is one Clenshaw sum.
 */
function decimalMidpoint(digits: number): (x: Decimal) => Decimal {
  const Exact = Decimal.clone({ precision: digits + 6 });
  const pi = Exact.acos(-1);
  const b = new Exact(2).pow(0.25);
  const inverse = new Exact(1).div(b);
  const q = b.plus(inverse);
  const length = digits * Math.LN10 + 3;
  const h = new Exact(2 * Math.PI).div(length / (Math.PI * 2 ** -0.25) + 1);
  const weights: Decimal[] = [];
  for (let k = 0; k < length / (q.toNumber() * h.toNumber()); k++) {
    const t = h.times(2 * k + 1).div(2);
    const bottom = new Exact(1)
      .minus(b.times(t).times(-2).exp())
      .times(new Exact(1).minus(inverse.times(t).times(-2).exp()))
      .times(2 * k + 1);
    weights.push(q.times(t).neg().exp().times(4).div(bottom));
  }
  const linear = pi.times(pi).div(h.times(2));
  return (x) => {
    const angle = x.times(h);
    const twice = angle.times(2).cos().times(2);
    let [sum, before] = [new Exact(0), new Exact(0)];
    for (let k = weights.length - 1; k >= 0; k--) {
      [sum, before] = [
        twice
          .times(sum)
          .minus(before)
          .plus(weights[k] as Decimal),
        sum,
      ];
    }
    // Sine series: sin(angle) (B_0 + B_1); log s_b = -i { ... }.
    return linear.times(x).minus(angle.sin().times(sum.plus(before)));
  };
}

function point([a, b, c, d]: readonly [number, number, number, number], bits: number): FixedComplex {
  return {
    re: fixedFromRatio(BigInt(a), BigInt(b), bits),
    im: fixedFromRatio(BigInt(c), BigInt(d), bits),
  };
}

function logAt(x: FixedComplex, period: ExactPeriod, bits: number): FixedComplex {
  const log = logDoubleSine(x, period, bits);
  if (log.kind !== 'value') throw new Error(log.kind);
  return log;
}

/** Ours against quadratures and the same sums in C with Arb (complex x), decimal.js (real x), and what tables cost. */
export function run(): ComparisonRow[] {
  const rows: ComparisonRow[] = [];
  for (const digits of [15, 50, 200, 1000]) {
    const reference = referenceFor(digits);
    const { bits } = reference;
    for (const [name, where, word] of [
      ['log s_b, complex x', NEAR, 'double-sine-near'],
      ['log s_b, complex x, Re x > Q/4', FAR, 'double-sine-far'],
    ] as const) {
      const x = point(where, bits);
      const log = logAt(x, PERIOD, bits);
      const ours = { re: log.re << BigInt(EXTRA), im: log.im << BigInt(EXTRA) };
      const peers = [arbPeer('same sums, Arb', word, (wanted) => point(where, wanted))];
      if (where === NEAR && digits <= PARI_MOST) peers.push(pariPeer('PARI intnum', PARI_SETUP, PARI_QUADRATURE));
      if (where === NEAR && digits <= MPMATH_MOST) peers.push(mpmathPeer('mpmath quad', QUADRATURE, 'double_sine()'));
      rows.push(...compare(name, digits, bits, () => logDoubleSine(x, PERIOD, bits), ours, peers));
    }
    rows.push(...fixtureRow(reference, digits));
    if (digits <= 200) rows.push(...sharedTables(digits, bits));
    if (digits <= 50) rows.push(againstDecimal(digits, reference.x.re, bits));
  }
  return rows;
}

/** The error against mpmath's value of the fixture, as a row without a peer's time. */
function fixtureRow(reference: Reference, digits: number): ComparisonRow[] {
  const { x, bits } = reference;
  const log = logAt(x, PERIOD, bits);
  const up = BigInt(fixture.extra);
  const [microseconds = Number.NaN] = timeInTurns([() => logDoubleSine(x, PERIOD, bits)], ROUNDS);
  const log10Error = worstError({ re: log.re << up, im: log.im << up }, reference);
  const rest = { peerMicroseconds: null, ratio: null, peerLog10Error: null };
  return [{ name: 'log s_b, complex x, fixture', digits, microseconds, peer: 'none', log10Error, ...rest }];
}

/**
 * A thousand points at a new b beside one point at a new b and 999 sums with its table: the ratio is 1 as far as all points
 * share the table.
 */
function sharedTables(digits: number, bits: number): ComparisonRow[] {
  const points = Array.from({ length: 1000 }, (_, k) => point([k + 1, 4000, 1, 5], bits));
  let fresh = 0;
  const newPeriod = (): ExactPeriod => {
    // Another b every time, so that no table is there yet.
    const shift = BigInt(++fresh);
    return { ...PERIOD, value: (wanted) => PERIOD.value(wanted) + ((shift << BigInt(wanted)) >> 40n) };
  };
  const many = (): void => {
    const period = newPeriod();
    for (const x of points) logDoubleSine(x, period, bits);
  };
  const first = points[0] as FixedComplex;
  const warm = (): void => {
    for (let k = 1; k < points.length; k++) logDoubleSine(points[k] as FixedComplex, PERIOD, bits);
  };
  const [all = Number.NaN, one = Number.NaN, sums = Number.NaN] = timeInTurns(
    [many, () => logDoubleSine(first, newPeriod(), bits), warm],
    3,
  );
  const none = { log10Error: null, peerLog10Error: null, digits };
  return [
    {
      name: '1000 points at a new b',
      microseconds: all,
      peer: 'one, and 999 sums',
      peerMicroseconds: one + sums,
      ratio: (one + sums) / all,
      ...none,
    },
    {
      name: 'one point at a new b',
      microseconds: one,
      peer: '1000 points, each',
      peerMicroseconds: all / 1000,
      ratio: all / 1000 / one,
      ...none,
    },
  ];
}

function againstDecimal(digits: number, re: bigint, bits: number): ComparisonRow {
  const midpoint = decimalMidpoint(digits);
  const Wide = Decimal.clone({ precision: digits + 30 });
  const x = new Wide(re.toString()).div(new Wide(2).pow(bits));
  const ours = () => logDoubleSine({ re, im: 0n }, PERIOD, bits);
  const [own = Number.NaN, peer = Number.NaN] = timeInTurns([ours, () => midpoint(x)], ROUNDS);
  const log = ours();
  if (log.kind !== 'value') throw new Error(log.kind);
  // The reference is our own value at 60 more bits, itself checked against mpmath in the tests.
  const fine = logDoubleSine({ re: re << 60n, im: 0n }, PERIOD, bits + 60);
  if (fine.kind !== 'value') throw new Error(fine.kind);
  const scale = new Wide(2).pow(bits + 60);
  const decimal = BigInt(new Wide(midpoint(x).toString()).times(scale).toFixed(0));
  return {
    name: 'log s_b, real x',
    digits,
    microseconds: own,
    peer: 'decimal.js midpoint rule',
    peerMicroseconds: peer,
    ratio: peer / own,
    log10Error: log10Difference(log.im << 60n, fine.im, bits + 60),
    peerLog10Error: log10Difference(decimal, fine.im, bits + 60),
  };
}
