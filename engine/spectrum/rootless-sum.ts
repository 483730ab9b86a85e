import { numberFromFixed } from '../arithmetic/fixed';
import {
  absoluteComplex,
  addComplex,
  divideComplex,
  type FixedComplex,
  integerPowerComplex,
  logComplex,
  multiplyComplex,
  oneComplex,
  scaleComplex,
  subtractComplex,
  zeroComplex,
} from '../arithmetic/fixed-complex';
import { rationalFixed } from '../arithmetic/form-fixed';
import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { type Estimate, farPoint } from '../functions/euler-maclaurin';
import { rootBound } from './complex-roots';
import type { Run } from './expansion';
import { fixedCoefficients, fixedMultiplicity } from './explicit-sum';
import { hurwitzTail, type Partial } from './hurwitz-tail';
import { MAXIMAL_STEPS, rounded, type SumFailure } from './linear-sum';
import { degreeOf, type Polynomial, shiftPolynomial } from './polynomial';
import { log2TotalWeight, type RisingPolynomial, risingPolynomial, sumOfLogarithms } from './power-product';
import { zetaCombination } from './zeta-combination';

/** The series in 1/W starts where the roots are this many times closer than W. */
const SEPARATION = 4;

/** By factors: every linear factor has its own zeta function; by operator: the whole polynomial has one. */
export type Prescription = 'factors' | 'operator';

/**
 * The regularised sum over nu >= from of M(nu) log q(nu) for a monic polynomial q, without its roots. With w = nu + c,
 * log q = r log w + sum_k e_k w^-k (Newton's recursion), M = sum c_m w^m, W the point where the series takes over:
 * sum M log q below W + sum_m c_m (-r zeta'(-m, W) + sum_{k != m+1} e_k zeta(k-m, W) - e_(m+1) psi(W) + t_m),
 * t_m = H_m e_(m+1) by factors and -sum_{k+l=m+1} e_k e_l/(2r) by operator (residue formula; Wodzicki 1987).
 * Imaginary parts are right up to multiples of 2 pi M. Error: after K terms of the series in 1/W at most
 * sum_m |c_m| r (U/|W|)^K ... with U from Fujiwara's bound, truncations of the zeta functions, rounding.
 */
export function rootlessSum(
  q: Polynomial,
  multiplicity: Polynomial,
  run: Run & { readonly to: null },
  bits: number,
  prescription: Prescription,
  offset = 0,
): Estimate | SumFailure {
  const degree = degreeOf(q);
  const rough = fixedCoefficients(q, 64);
  if (rough === null) return 'spectrum-undefined';
  const center = centerOf(rough[degree - 1] as FixedComplex, degree);
  const inW = shiftPolynomial(q, Form.number(center).neg());
  const expansion = shiftPolynomial(multiplicity, Form.number(center).neg());
  // To the precision of the result: roots closer than 2^-64 to their mean count too.
  const fine = bits + 64;
  const roughQ = fixedCoefficients(inW, fine);
  const roughM = fixedCoefficients(expansion, 64);
  if (roughQ === null || roughM === null) return 'spectrum-undefined';
  const radius = rootBound(roughQ.map((c) => ({ re: numberFromFixed(c.re, fine), im: numberFromFixed(c.im, fine) })));
  const reach = Math.max(SEPARATION * radius, 0.14 * (bits + 64) + 8 + expansion.length);
  const start = run.from + center.toNumber();
  const steps = Math.max(0, Math.ceil(reach - start)) + offset;
  if (steps > MAXIMAL_STEPS) return 'spectrum-too-far';
  const size = start + steps + Math.abs(start) + 2;
  const weight = roughM.reduce((sum, c, k) => sum + numberFromFixed(absoluteComplex(c) + 1n, 64) * size ** (k + 1), 0);
  const rising = risingPolynomial(multiplicity, run.from);
  const log2Weight = Math.max(
    Math.log2(1 + weight * degree * (Math.log(size) + 2)),
    rising === null ? 0 : log2TotalWeight(rising, steps),
  );
  const guard = 36 + Math.ceil(log2Weight);
  const working = bits + guard;
  const below = explicitPart(q, multiplicity, rising, run.from, steps, working);
  const coefficients = { q: fixedCoefficients(inW, working), m: fixedCoefficients(expansion, working) };
  if (below === null || coefficients.q === null || coefficients.m === null) return 'spectrum-undefined';
  const at = rationalFixed(center.add(Rational.of(run.from + steps)), working);
  const tail = seriesPart(coefficients.q, coefficients.m, at, radius, working, prescription);
  return rounded(addComplex(below.value, tail.value), below.error + tail.error, guard);
}

/** A multiple of 1/2 next to the real part of the mean of the a_j. */
function centerOf(second: FixedComplex, degree: number): Rational {
  return Rational.of(Math.round((2 * numberFromFixed(second.re, 64)) / degree), 2);
}

function explicitPart(
  q: Polynomial,
  multiplicity: Polynomial,
  rising: RisingPolynomial | null,
  from: number,
  steps: number,
  working: number,
): Partial | null {
  const coefficients = fixedCoefficients(q, working);
  if (coefficients === null) return null;
  const values = Array.from({ length: steps }, (_, j) => withoutZeros(coefficients, BigInt(from + j)));
  // Each coefficient brings one unit in either part, times a power of nu.
  const slip = (j: number): number => 2 * (Math.abs(from + j) + 1) ** (coefficients.length - 1);
  const multiplied = rising && sumOfLogarithms(values, rising, working, slip);
  if (multiplied !== null) return multiplied;
  const factor = fixedMultiplicity(multiplicity, working, Math.abs(from) + steps);
  if (factor === null) return null;
  let value = zeroComplex;
  let error = 0;
  for (const [j, lambda] of values.entries()) {
    value = addComplex(value, factor.times(from + j, logComplex(lambda, working)));
    const distance = numberFromFixed(absoluteComplex(lambda), working);
    error += (factor.size(from + j) + 1) * (4 + slip(j) / distance) + 2 * Math.abs(Math.log(distance)) + 6;
  }
  return { value, error };
}

/** q(nu), or the first derivative over its factorial that does not vanish: the product of the other factors. */
function withoutZeros(coefficients: readonly FixedComplex[], nu: bigint): FixedComplex {
  let rest = coefficients;
  for (;;) {
    let sum = zeroComplex;
    const quotient: FixedComplex[] = [];
    for (let k = rest.length - 1; k >= 0; k--) {
      if (k < rest.length - 1) quotient[k] = sum;
      sum = addComplex({ re: sum.re * nu, im: sum.im * nu }, rest[k] as FixedComplex);
    }
    if (sum.re !== 0n || sum.im !== 0n) return sum;
    rest = quotient;
  }
}

function seriesPart(
  q: readonly FixedComplex[],
  m: readonly FixedComplex[],
  at: bigint,
  radius: number,
  working: number,
  prescription: Prescription,
): Partial {
  const degree = q.length - 1;
  const w = { re: at, im: 0n };
  const point = farPoint(w, working);
  const logarithm = logComplex(w, working);
  const size = 2 ** point.log2Size;
  const scaledM = m.map((c, k) => multiplyComplex(c, integerPowerComplex(w, k, working), working));
  const weights = scaledM.map((c) => numberFromFixed(absoluteComplex(c) + 1n, working));
  const heaviest = Math.log2(weights.reduce((sum, x) => sum + x, 1) * size);
  const ratio = radius / size;
  // r ratio^K/(1 - ratio) times the weights is below one unit after this many terms.
  const terms =
    m.length + (ratio === 0 ? 1 : Math.ceil((working + heaviest + Math.log2(2 * degree)) / -Math.log2(ratio)));
  const e = scaledExpansion(q, w, terms, working);
  const first = 2 - m.length;
  const combined = Array.from({ length: terms - first + 1 }, (_, index) =>
    scaledM.reduce((sum, c, k) => {
      const coefficientOfW = e[first + index + k - 1];
      return coefficientOfW === undefined ? sum : addComplex(sum, multiplyComplex(c, coefficientOfW, working));
    }, zeroComplex),
  );
  const zetas = zetaCombination(point, combined, first, logarithm);
  const derivatives = hurwitzTail(m, w, working);
  let value = subtractComplex(zetas.value, scaleByInteger(derivatives.value, degree));
  // The e_i are within 8 (i + 2) units, their products with the c_m W^m within one more.
  const expansionError = e.reduce((sum, _, i) => sum + 8 * (i + 2) * (size + 1), 0);
  const total = weights.reduce((sum, x) => sum + x + 1, 0);
  let error = 1 + zetas.error + degree * derivatives.error + total * expansionError;
  let harmonic = Rational.zero;
  scaledM.forEach((c, k) => {
    const finite = finitePart(e, k, harmonic, e[k] as FixedComplex, degree, working, prescription);
    harmonic = harmonic.add(Rational.of(1, k + 1));
    value = addComplex(value, multiplyComplex(c, multiplyComplex(finite, w, working), working));
    const height = numberFromFixed(absoluteComplex(finite), working) * size + 1;
    error += 4 * (k + 2) * ((weights[k] as number) + size ** k) * height;
  });
  return { value, error };
}

/** W^(m+1) t_m, a term without a power of W left once c_m W^m stands in front. */
function finitePart(
  e: readonly FixedComplex[],
  m: number,
  harmonic: Rational,
  middle: FixedComplex,
  degree: number,
  working: number,
  prescription: Prescription,
): FixedComplex {
  const at = scaleComplex(middle, rationalFixed(harmonic, working), working);
  if (prescription === 'factors') return at;
  let square = zeroComplex;
  for (let k = 0; k < m; k++) {
    square = addComplex(square, multiplyComplex(e[k] as FixedComplex, e[m - 1 - k] as FixedComplex, working));
  }
  const by = BigInt(2 * degree);
  return { re: -square.re / by, im: -square.im / by };
}

/** e_k W^-k for k = 1 ... terms. */
function scaledExpansion(q: readonly FixedComplex[], w: FixedComplex, terms: number, working: number): FixedComplex[] {
  const degree = q.length - 1;
  const inverse = divideComplex(oneComplex(working), w, working);
  const scaled = Array.from({ length: degree }, (_, k) =>
    multiplyComplex(q[degree - 1 - k] as FixedComplex, integerPowerComplex(inverse, k + 1, working), working),
  );
  const e: FixedComplex[] = [];
  for (let k = 1; k <= terms; k++) {
    let sum = k <= degree ? scaleByInteger(scaled[k - 1] as FixedComplex, k) : zeroComplex;
    for (let i = Math.max(1, k - degree); i < k; i++) {
      const product = multiplyComplex(e[i - 1] as FixedComplex, scaled[k - i - 1] as FixedComplex, working);
      sum = subtractComplex(sum, scaleByInteger(product, i));
    }
    e.push({ re: sum.re / BigInt(k), im: sum.im / BigInt(k) });
  }
  return e;
}

function scaleByInteger(z: FixedComplex, by: number): FixedComplex {
  return { re: z.re * BigInt(by), im: z.im * BigInt(by) };
}
