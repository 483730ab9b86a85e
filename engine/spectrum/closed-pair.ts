import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { bernoulliPolynomial } from './bernoulli-polynomial';
import type { ClosedSum } from './closed-form';
import { reduceRoots } from './form-division';
import {
  binomialCoefficients,
  coefficient,
  evaluatePolynomial,
  type Polynomial,
  samePolynomial,
  shiftPolynomial,
} from './polynomial';

/** Linear factors j + start, j >= 0, with a multiplicity in j. */
export interface Ladder {
  readonly start: Form;
  readonly multiplicity: Polynomial;
}

/** Whole steps by which starts may be moved, each a factor of its own in front. */
const MOST_STEPS = 1000;

/**
 * Two ladders whose starts add up to an integer and whose multiplicities are one polynomial on the whole lattice
 * start + Z: a sine, one multiple sine, or polylogarithms (reflection of zeta'(-k, x), Adamchik 1998). False, and
 * nothing added, where they are not, or start so far out that a closed form would be mostly single factors.
 */
export function addPair(sum: ClosedSum, one: Ladder, other: Ladder): boolean {
  if ([one, other].some(({ start }) => Math.abs(rationalPart(start).toNumber()) > MOST_STEPS)) return false;
  const m = shiftPolynomial(one.multiplicity, one.start.neg()).map(reduceRoots);
  const n = shiftPolynomial(other.multiplicity, other.start.neg()).map(reduceRoots);
  const length = Math.max(m.length, n.length);
  const reflected = Array.from({ length }, (_, k) => coefficient(n, k).scale(k % 2 === 0 ? 1 : -1));
  if (!samePolynomial(m, reflected)) return false;
  if (!addMultipleSine(sum, one, other)) addSineType(sum, m, one.start, other.start);
  return true;
}

/** One multiple sine S_N(x|1, ..., 1), N >= 2, times finitely many factors, where the pair is just that. */
function addMultipleSine(sum: ClosedSum, one: Ladder, other: Ladder): boolean {
  const degree = one.multiplicity.length - 1;
  if (degree < 1 || one.start.toRational() !== null) return false;
  const count = degree + 1;
  const total = Number(one.start.add(other.start).toRational()?.numerator ?? 0n);
  // Moves the second ladder until the starts add up to the number of periods.
  const steps = count - total;
  const moved = {
    start: other.start.add(Form.number(steps)),
    multiplicity: shiftPolynomial(other.multiplicity, Form.number(steps)),
  };
  if (!isBinomial(one.multiplicity) || !isBinomial(moved.multiplicity)) return false;
  addModes(sum, other, steps);
  const power = binomialCoefficients(one.multiplicity)[degree] as Form;
  const periods = Array.from({ length: count }, () => Form.one);
  if (count === 2) {
    const argument = Form.i.mul(one.start.sub(Form.one));
    sum.function({ name: 'doubleSine', argument, b: Form.one }, power);
  } else sum.function({ name: 'multipleSine', argument: one.start, periods }, power);
  return true;
}

/** A multiple of binomial(j + degree, degree). */
function isBinomial(p: Polynomial): boolean {
  return binomialCoefficients(p)
    .slice(0, -1)
    .every((q) => q.isZero());
}

/** The first `steps` factors of a ladder; for negative steps the inverses of those before it. */
function addModes(sum: ClosedSum, { start, multiplicity }: Ladder, steps: number): void {
  for (let j = Math.min(0, steps); j < Math.max(0, steps); j++) {
    const power = evaluatePolynomial(multiplicity, Form.number(j));
    sum.number(start.add(Form.number(j)), steps < 0 ? power.neg() : power);
  }
}

/** Multiplicity s(u) on the whole lattice u in start + Z, entered as the two ladders. */
function addSineType(sum: ClosedSum, s: Polynomial, start: Form, otherStart: Form): void {
  const x = fractionalPart(upper(start, otherStart));
  const flipped = x.sub(start).toRational()?.isInteger() !== true;
  // In the variable of the ladder that x belongs to.
  const p = flipped ? s.map((c, k) => c.scale(k % 2 === 0 ? 1 : -1)) : s;
  const [own, opposite] = flipped ? [otherStart, start] : [start, otherStart];
  const one = Form.one.sub(x);
  addModes(sum, { start: x, multiplicity: shiftPolynomial(p, x).map((c) => c.neg()) }, integerOf(own.sub(x)));
  const mirrored = p.map((c, k) => c.scale(k % 2 === 0 ? -1 : 1));
  addModes(sum, { start: one, multiplicity: shiftPolynomial(mirrored, one) }, integerOf(opposite.sub(one)));
  p.forEach((c, k) => {
    addReflection(sum, c.neg(), k, x);
  });
}

/** The one of two arguments that has a positive imaginary part for positive parameters. */
function upper(a: Form, b: Form): Form {
  const imaginary = a.terms.find(({ coefficient: c }) => !c.im.isZero());
  return imaginary !== undefined && imaginary.coefficient.im.sign() < 0 ? b : a;
}

function rationalPart(form: Form): Rational {
  return form.terms.find(({ factors }) => factors.length === 0)?.coefficient.re ?? Rational.zero;
}

/** The form with its rational part reduced to [0, 1). */
function fractionalPart(form: Form): Form {
  return form.sub(Form.number(Rational.of(rationalPart(form).floor())));
}

function integerOf(form: Form): number {
  return Number(form.toRational()?.numerator ?? 0n);
}

/**
 * weight times (zeta'(-k, x) + (-1)^k zeta'(-k, 1 - x)) for 0 <= Re x < 1, Im x >= 0: pi i B_(k+1)(x)/(k+1)
 * + e^(-i pi k/2) k!/(2 pi)^k Li_(k+1)(e^(2 pi i x)). For k = 0 it is -log(2 sin pi x); for real x a Clausen sum.
 */
function addReflection(sum: ClosedSum, weight: Form, k: number, x: Form): void {
  if (weight.isZero()) return;
  if (k === 0) {
    addSine(sum, x, weight.neg());
    return;
  }
  let factor = Form.pi.scale(2).pow(-k);
  for (let i = 2; i <= k; i++) factor = factor.scale(i);
  if (x.toRational() !== null) {
    // e^(-i pi k/2) times i for odd k: (-1)^((k-1)/2); for even k (-1)^(k/2).
    const sign = Math.floor(k / 2) % 2 === 0 ? 1 : -1;
    sum.constant({ name: 'clausen', order: k + 1, argument: x }, weight.mul(factor).scale(sign));
    return;
  }
  const unit = Form.i.pow((4 - (k % 4)) % 4);
  sum.constant({ name: 'polylogarithm', order: k + 1, argument: x }, weight.mul(factor).mul(unit));
  const bernoulli = evaluatePolynomial(bernoulliPolynomial(k + 1), x).scale(Rational.of(1, k + 1));
  sum.constant({ name: 'one' }, weight.mul(bernoulli).mul(Form.pi).mul(Form.i));
}

/** (2 sin pi x)^power, hyperbolic where x is a half-integer plus i times something real. */
function addSine(sum: ClosedSum, x: Form, power: Form): void {
  const rational = rationalPart(x);
  const rest = x.sub(Form.number(rational));
  const imaginary = !rest.isZero() && rest.terms.every(({ coefficient: c }) => c.re.isZero());
  if (!imaginary || rational.denominator > 2n) {
    sum.function({ name: 'sine', argument: x }, power);
    return;
  }
  const argument = rest.mul(Form.i).neg();
  if (rational.isZero()) {
    // 2 sin(i pi y) = i 2 sinh(pi y).
    sum.number(Form.i, power);
    sum.function({ name: 'hyperbolicSine', argument }, power);
  } else sum.function({ name: 'hyperbolicCosine', argument }, power);
}
