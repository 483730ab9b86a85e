import type { Ball } from '../arithmetic/ball';
import { numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  type FixedComplex,
  logComplex,
  multiplyComplex,
  oneComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { formFixed, rationalFixed } from '../arithmetic/form-fixed';
import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { bernoulliNumber } from '../functions/bernoulli';
import { isRemark } from './analyse';
import { scaleLogarithm } from './anomaly';
import { exactNumbers } from './exact-numbers';
import { fixedCoefficients, fixedMultiplicity } from './explicit-sum';
import { guarded } from './guard';
import { type CutOff, cutOffSeveral, pointsBelow } from './partial-several';
import { type Polynomial, polynomialIn, scalePolynomial, shiftPolynomial, zeroPolynomial } from './polynomial';
import { polynomialRoots } from './polynomial-roots';
import { prepare, type Values, withAllValues } from './prepare';
import type { Prescription } from './rootless-sum';
import { type Remark, remark, type Spectrum, type Tower, type WrittenTower } from './tower';

/** The product cut off, with what regularises it. */
export interface PartialProduct {
  readonly cutoff: number;
  /** log of the product of all factors with n <= cutoff. */
  readonly sum: Ball;
  /** The divergent terms that are subtracted, as a number to add. */
  readonly counterterms: Ball;
  /** Their sum: tends to log det as the cutoff grows. */
  readonly regulated: Ball;
}

/** Most factors of towers in several indices that a cut-off may take. */
const MAXIMAL_POINTS = 12_000;

/** Largest cut-off. */
export const MAXIMAL_CUTOFF = 20_000;

/**
 * Regulated partial products. For a factor alpha (n + a), W = cutoff + 1/2 + a and d = sum_k c_k (n + a)^k, what is
 * added is sum_k c_k (-d/ds + log alpha) of those terms of zeta(s - k, W + 1/2) ~ sum_j B_j(1/2)/j! (s-k)_(j-1)
 * W^(1-s+k-j) that do not vanish as W grows, j <= k + 1 (DLMF 25.11.43 about the midpoint); each linear factor in its
 * own W. Towers in several indices are cut off in each of them (partial-several.ts), at those cut-offs that do not take
 * too many factors. By operator the exact anomaly is added.
 */
export function partialProducts(
  spectrum: Spectrum,
  prescription: Prescription,
  values: Values,
  cutoffs: readonly number[],
  digits: number,
): PartialProduct[] | Remark {
  const found = guarded(() => computed(spectrum, prescription, values, cutoffs, digits), null);
  return found;
}

function computed(
  spectrum: Spectrum,
  prescription: Prescription,
  values: Values,
  cutoffs: readonly number[],
  digits: number,
): PartialProduct[] | Remark {
  const largest = Math.max(0, ...cutoffs);
  if (largest > MAXIMAL_CUTOFF) return remark('spectrum-too-far', null, 'row');
  const written = withAllValues(spectrum, values);
  if (isRemark(written)) return written;
  const prepared = prepare(written);
  if (isRemark(prepared)) return prepared;
  const several = prepared.towers.filter(({ indices }) => indices.length > 1);
  const single = prepared.towers.filter(({ indices }) => indices.length === 1);
  const points = (cutoff: number): number => several.reduce((sum, tower) => sum + pointsBelow(tower, cutoff), 0);
  const reached = cutoffs.filter((cutoff) => points(cutoff) <= MAXIMAL_POINTS);
  const degree = Math.max(
    0,
    ...prepared.towers.flatMap((t) => t.indices.map((name) => (polynomialIn(t.degeneracy, name)?.length ?? 0) + 1)),
  );
  const bits = Math.ceil(digits * Math.log2(10) + (degree + 1) * Math.log2(largest + 4)) + 40;
  const pieces: Piece[] = [];
  for (const tower of single) {
    const found = piecesOf(tower, written[tower.place] as WrittenTower, bits);
    if (found === null) return remark('spectrum-undefined', tower.place, 'eigenvalue');
    pieces.push(...found);
  }
  const anomaly =
    prescription === 'operator' ? (exactNumbers(prepared.towers, 'operator')?.anomaly ?? null) : Form.zero;
  if (anomaly === null) return remark('operator-periods', null, 'row');
  const constant = formFixed(anomaly, bits);
  if (constant === null) return remark('spectrum-undefined', null, 'row');
  const products = run(pieces, constant, reached, bits);
  for (const tower of several) {
    for (const [k, cutoff] of reached.entries()) {
      const part = cutOffSeveral(tower, cutoff, bits);
      if (part === null) return remark('spectrum-undefined', tower.place, 'eigenvalue');
      products[k] = added(products[k] as PartialProduct, part, bits);
    }
  }
  return products;
}

function added(product: PartialProduct, part: CutOff, bits: number): PartialProduct {
  const slip = BigInt(Math.ceil(4 * part.error)) + 16n;
  const plus = (ball: Ball, z: FixedComplex): Ball => ({
    bits,
    re: ball.re + z.re,
    im: ball.im + z.im,
    error: ball.error + slip,
  });
  const sum = plus(product.sum, part.sum);
  const counterterms = plus(product.counterterms, part.counterterms);
  const both = addComplex(part.sum, part.counterterms);
  return { cutoff: product.cutoff, sum, counterterms, regulated: plus(product.regulated, both) };
}

/** One linear factor of one tower. */
interface Piece {
  /** n + a = j + a with j from 0. */
  readonly shift: FixedComplex;
  readonly first: number;
  readonly last: number | null;
  readonly multiplicity: ReturnType<typeof fixedMultiplicity> & object;
  /** Of the multiplicity in powers of n + a. */
  readonly expansion: readonly FixedComplex[];
  readonly logarithm: FixedComplex;
}

function piecesOf(tower: Tower, written: WrittenTower, bits: number): Piece[] | null {
  const name = tower.indices[0] as string;
  const degeneracy = scalePolynomial(polynomialIn(tower.degeneracy, name) ?? zeroPolynomial, tower.exponent);
  const from = written.ranges.find((range) => range.name === name)?.from.toRational();
  const pieces: Piece[] = [];
  for (const factor of tower.factors) {
    const roots = factor.kind === 'linear' ? [factor.constant] : polynomialRoots(factor.polynomial, bits);
    if (roots === null) return null;
    const p: Polynomial = scalePolynomial(degeneracy, factor.power);
    for (const a of roots) {
      const shift = formFixed(a, bits);
      const multiplicity = fixedMultiplicity(p, bits, MAXIMAL_CUTOFF);
      const expansion = fixedCoefficients(shiftPolynomial(p, a.neg()), bits);
      const logarithm = formFixed(scaleLogarithm(factor.scale), bits);
      if (shift === null || multiplicity === null || expansion === null || logarithm === null) return null;
      const first = from?.isInteger() ? Number(from.numerator) : 0;
      pieces.push({ shift, first, last: tower.last, multiplicity, expansion, logarithm });
    }
  }
  return pieces;
}

function run(
  pieces: readonly Piece[],
  constant: FixedComplex,
  cutoffs: readonly number[],
  bits: number,
): PartialProduct[] {
  const wanted = new Set(cutoffs);
  const lowest = Math.min(0, ...pieces.map(({ first }) => first));
  const found = new Map<number, PartialProduct>();
  let sum = zeroComplex;
  let count = 0;
  for (let n = lowest; n <= Math.max(...cutoffs); n++) {
    for (const piece of pieces) {
      const j = n - piece.first;
      if (j < 0 || (piece.last !== null && j > piece.last)) continue;
      const z = { re: piece.shift.re + (BigInt(j) << BigInt(bits)), im: piece.shift.im };
      if (z.re === 0n && z.im === 0n) continue;
      const logarithm = addComplex(logComplex(z, bits), piece.logarithm);
      sum = addComplex(sum, piece.multiplicity.times(j, logarithm));
      count += 4 * (piece.multiplicity.size(j) + 1) * (1 + 1 / numberFromFixed(absoluteComplex(z), bits));
    }
    if (!wanted.has(n)) continue;
    const counter = pieces
      .filter(({ last }) => last === null)
      .map((piece) => counterterms(piece, n, bits))
      .reduce(addComplex, constant);
    const error = BigInt(Math.ceil(count * 4)) + 16n;
    const ball = ({ re, im }: FixedComplex): Ball => ({ re, im, bits, error });
    found.set(n, { cutoff: n, sum: ball(sum), counterterms: ball(counter), regulated: ball(addComplex(sum, counter)) });
  }
  return cutoffs.flatMap((n) => found.get(n) ?? []);
}

function counterterms({ shift, first, expansion, logarithm }: Piece, cutoff: number, bits: number): FixedComplex {
  const half = 1n << BigInt(bits - 1);
  const w = { re: shift.re + (BigInt(cutoff - first) << BigInt(bits)) + half, im: shift.im };
  const logW = logComplex(w, bits);
  let total = zeroComplex;
  expansion.forEach((c, k) => {
    total = addComplex(total, multiplyComplex(c, keptTerms(k, w, logW, logarithm, bits), bits));
  });
  return total;
}

/** (-d/ds + log alpha) of the kept terms of zeta(s, W + 1/2) at s = -k. */
function keptTerms(k: number, w: FixedComplex, logW: FixedComplex, logAlpha: FixedComplex, bits: number): FixedComplex {
  const inverse = divideComplex(oneComplex(bits), w, bits);
  let power = w;
  for (let i = 0; i < k; i++) power = multiplyComplex(power, w, bits);
  const both = addComplex(logW, logAlpha);
  const one = (value: Rational): FixedComplex => ({ re: rationalFixed(value, bits), im: 0n });
  // j = 0: W^(k+1) (1/(k+1)^2 - (log W + log alpha)/(k+1)).
  const lead = subtractComplex(
    one(Rational.of(1, (k + 1) ** 2)),
    multiplyComplex(both, one(Rational.of(1, k + 1)), bits),
  );
  let sum = multiplyComplex(power, lead, bits);
  let rising = Rational.one;
  let harmonic = Rational.zero;
  let factorial = Rational.one;
  for (let j = 1; j <= k + 1; j++) {
    factorial = factorial.mul(Rational.of(j));
    if (j >= 2) {
      rising = rising.mul(Rational.of(j - 2 - k));
      harmonic = harmonic.add(Rational.of(1, j - 2 - k));
    }
    power = multiplyComplex(power, inverse, bits);
    const half = bernoulliNumber(j).mul(
      Rational.of(2)
        .pow(1 - j)
        .sub(Rational.one),
    );
    if (j % 2 === 1 || half.isZero()) continue;
    const factor = one(half.mul(rising).div(factorial));
    const bracket = subtractComplex(both, one(harmonic));
    sum = addComplex(sum, multiplyComplex(multiplyComplex(power, bracket, bits), factor, bits));
  }
  return sum;
}
