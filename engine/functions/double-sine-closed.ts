import { absolute, numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import type { FixedComplex } from '../arithmetic/fixed-complex';
import { expComplex, logComplex, multiplyComplex } from '../arithmetic/fixed-complex';
import { piFixed } from '../arithmetic/fixed-constants';
import { sinCosFixed } from '../arithmetic/fixed-trig';
import { memoiseBounded } from '../arithmetic/memo';
import { dilogarithmFixed } from './dilogarithm-precise';
import { placeOnLattice } from './double-sine-lattice';
import type { ExactPeriod } from './double-sine-period';
import { orderedPeriods, reducedSquare } from './double-sine-period';
import type { PreciseLog } from './special-function';

/** p + q beyond this would take that many logarithms and (p + q)^2 products for the coefficients. */
const LARGEST_SUM = 200;

const GUARD = 32;

/** A root zeta = e^(i pi (2j + parity)/modulus) and the coefficient A of log(1 - zeta e^(-2 pi beta x)). */
interface RootTerm {
  readonly root: FixedComplex;
  readonly coefficient: FixedComplex;
}

/**
 * A_j = (1/q) sum_{r=1}^{q-1} (-1)^r zeta_j^-r / (2 sin(pi r p/q)) for zeta_j^q = (-1)^(p+q); key `p q bits`.
 */
const rootTerms = memoiseBounded(32, (key: string): readonly RootTerm[] => {
  const [p = 1, q = 1, bits = 64] = key.split(' ').map(Number);
  const turns = Array.from({ length: 2 * q }, (_, k) => sinCosFixed((BigInt(k) * piFixed(bits)) / BigInt(q), bits));
  const terms: RootTerm[] = [];
  for (let j = 0; j < q; j++) {
    const step = 2 * j + ((p + q) % 2);
    let re = 0n;
    let im = 0n;
    for (let r = 1; r < q; r++) {
      const sine = turns[(r * p) % (2 * q)]?.sin ?? 1n;
      const turn = turns[(step * r) % (2 * q)] ?? { sin: 0n, cos: 0n };
      const sign = r % 2 === 0 ? 1n : -1n;
      re += ((sign * turn.cos) << BigInt(bits - 1)) / sine;
      im -= ((sign * turn.sin) << BigInt(bits - 1)) / sine;
    }
    const root = turns[step % (2 * q)] ?? { sin: 0n, cos: 0n };
    terms.push({
      root: { re: root.cos, im: root.sin },
      coefficient: { re: re / BigInt(q), im: im / BigInt(q) },
    });
  }
  return terms;
});

/**
 * log s_b(x) for b^2 = p/q in closed form, for Re x > 0 with s = sqrt(pq), w = (-1)^(p+q) e^(-2 pi x s):
 *   log s_b = i { (pi/2)(x^2 + (b^2 + b^-2)/12) + (x/s) log(1 - w) - Li2(w)/(2 pi p q)
 *                 - sum_{beta = b, 1/b} sum_j A_j log(1 - zeta_j e^(-2 pi beta x)) },
 * all logarithms principal (arguments inside the unit disc), no shift into the strip. Everything else as logDoubleSine, of which this
 * is an independent check: no quadrature, no table. Null for irrational b^2 and for p + q > 200.
 * Source: b = 1 Jafferis 2010 (arXiv:1012.3210); rational b^2 compare Garoufalidis and Kashaev 2015 (arXiv:1411.6062).
 */
export function logDoubleSineClosed(x: FixedComplex, b: ExactPeriod, bits: number): PreciseLog | null {
  const square = reducedSquare(b);
  if (square === null || square.p + square.q > BigInt(LARGEST_SUM)) return null;
  if (x.re === 0n) {
    const place = placeOnLattice(x.im < 0n ? -x.im : x.im, b, bits);
    if (place.kind === 'on') return { kind: x.im > 0n ? 'pole' : 'zero', order: place.order };
    if (place.kind === 'indistinct') return { kind: 'indistinct' };
    if (x.im === 0n)
      return { kind: 'value', re: 0n, im: 0n, error: BigInt(Math.ceil(Math.SQRT2 * 2.1 * (b.approx + 1 / b.approx))) };
  }
  const negative = x.re < 0n;
  const log = closedRight(negative ? { re: -x.re, im: -x.im } : x, b, Number(square.p), Number(square.q), bits);
  return log.kind !== 'value' || !negative ? log : { ...log, re: -log.re, im: -log.im };
}

function closedRight(x: FixedComplex, b: ExactPeriod, p: number, q: number, bits: number): PreciseLog {
  const real = numberFromFixed(x.re, bits);
  const size = Math.hypot(real, numberFromFixed(x.im, bits));
  const grown = Math.ceil(Math.log2(2 + size));
  const precision = bits + GUARD + grown;
  const wide = precision + grown + 16;
  const up = BigInt(precision - bits);
  const point = { re: x.re << up, im: x.im << up };
  const { small, large } = orderedPeriods(b, wide);
  const pi = piFixed(wide);
  const one = 1n << BigInt(precision);
  const decay = (factor: bigint): FixedComplex =>
    expComplex({ re: -((point.re * factor) >> BigInt(wide)), im: -((point.im * factor) >> BigInt(wide)) }, precision);
  const root = small * BigInt(q);
  const sign = (p + q) % 2 === 0 ? 1n : -1n;
  const turned = decay((2n * pi * root) >> BigInt(wide));
  const w = { re: sign * turned.re, im: sign * turned.im };
  let smallest = Number.POSITIVE_INFINITY;
  /** log(1 - z), remembering how near z comes to 1. */
  const logOneMinus = (z: FixedComplex): FixedComplex | null => {
    const rest = { re: one - z.re, im: -z.im };
    smallest = Math.hypot(numberFromFixed(rest.re, precision), numberFromFixed(rest.im, precision));
    return rest.re === 0n && rest.im === 0n ? null : logComplex(rest, precision);
  };
  const first = logOneMinus(w);
  if (first === null) return { kind: 'indistinct' };
  const over = multiplyComplex(point, first, precision);
  const dilogarithm = dilogarithmFixed(w, precision);
  const divisor = 2n * pi * BigInt(p * q);
  const constant = ((small * small + large * large) >> BigInt(2 * (wide - precision))) / 12n;
  const shift = BigInt(wide + precision + 1);
  let re = ((point.re * point.re - point.im * point.im + constant) * pi) >> shift;
  let im = (2n * point.re * point.im * pi) >> shift;
  re += (over.re << BigInt(wide)) / root - (dilogarithm.re << BigInt(wide)) / divisor;
  im += (over.im << BigInt(wide)) / root - (dilogarithm.im << BigInt(wide)) / divisor;
  // Relative change of 1 - w per unit of x; rounding of w is 8 ulps, of a coefficient up to q^2.
  let slope = Math.PI * size + (2 * Math.PI * size) / smallest;
  let error = 8 + ((12 * size) / numberFromFixed(root, wide) + 2) * (1 + 1 / smallest);
  const lattices = [
    { beta: small, modulus: q, numerator: p },
    { beta: large, modulus: p, numerator: q },
  ];
  for (const { beta, modulus, numerator } of lattices) {
    const falling = decay((2n * pi * beta) >> BigInt(wide));
    const approx = numberFromFixed(beta, wide);
    for (const { root: zeta, coefficient } of rootTerms(`${numerator} ${modulus} ${precision}`)) {
      // Some coefficients vanish (for modulus 2 and more): what is left of them is rounding, up to modulus^2 ulps.
      const noise = 16n * BigInt(modulus * modulus);
      if (absolute(coefficient.re) < noise && absolute(coefficient.im) < noise) continue;
      const weight = Math.hypot(numberFromFixed(coefficient.re, precision), numberFromFixed(coefficient.im, precision));
      const log = logOneMinus(multiplyComplex(zeta, falling, precision));
      if (log === null) return { kind: 'indistinct' };
      const term = multiplyComplex(coefficient, log, precision);
      re -= term.re;
      im -= term.im;
      slope += (2 * Math.PI * approx * weight) / smallest;
      error += (weight * 12) / smallest + 4 * modulus * modulus * (1 + Math.abs(Math.log(smallest))) + 2;
    }
  }
  const total = error * 2 ** (bits - precision) + Math.SQRT2 * slope * 1.01;
  // Beyond this the argument's ulp is not small against the distance to a zero or pole.
  if (!(total < 2 ** (bits - 3))) return { kind: 'indistinct' };
  return {
    kind: 'value',
    re: shiftRounded(-im, precision - bits),
    im: shiftRounded(re, precision - bits),
    error: BigInt(Math.ceil(total + 1)),
  };
}
