import { Form, FormTooLargeError } from '../exact/form';
import { Rational } from '../exact/rational';
import { type ClosedForm, ClosedSum } from './closed-form';
import { addPair, type Ladder } from './closed-pair';
import { addRational } from './closed-rational';
import { addSeveral } from './closed-several';
import type { ModeClass, Pairing, Stretch } from './pairing';
import { binomialCoefficients, evaluatePolynomial, shiftPolynomial } from './polynomial';

/** Longest finite run that is written out factor by factor. */
const WRITTEN_MODES = 64;

/**
 * The determinant by factors in known functions, exactly: elementary numbers for whole and half-integer roots, sines,
 * multiple sines and polylogarithms for pairs of classes that complement each other, Gamma, Barnes G and multiple
 * Gamma functions for the rest; over the roots of an irreducible polynomial of degree above 2, which have no names.
 * Null for a long finite run.
 */
export function recognise(pairing: Pairing): ClosedForm | null {
  const sum = new ClosedSum();
  const ladders: Ladder[] = [];
  for (const found of pairing.classes) {
    const shifts = shiftsOf(found);
    if (shifts === null) {
      if (!addOverRoots(sum, found)) return null;
      continue;
    }
    for (const shift of shifts) {
      for (const stretch of found.left) {
        if (stretch.to !== null && stretch.to - stretch.from >= WRITTEN_MODES) return null;
        const ladder = readStretch(sum, shift, stretch);
        if (ladder !== null) ladders.push(ladder);
      }
    }
  }
  addLadders(sum, ladders);
  addSeveral(sum, pairing.several);
  for (const { base, exponent } of pairing.constants) sum.number(base, exponent);
  return sum.finish();
}

/**
 * A class of irreducible polynomials of degree above 2: a ladder from nu = from on, with M(from + j) = sum of q_m
 * binomial(j + m, m), is the product over the roots rho of Gamma_(m+1)(from - rho|1, ..., 1)^-q_m.
 */
function addOverRoots(sum: ClosedSum, { polynomial, left }: ModeClass): boolean {
  for (const { from, to, multiplicity } of left) {
    if (to !== null) {
      if (to - from >= WRITTEN_MODES) return false;
      for (let nu = from; nu <= to; nu++) {
        const at = Form.number(nu);
        sum.number(evaluatePolynomial(polynomial, at), evaluatePolynomial(multiplicity, at));
      }
      continue;
    }
    binomialCoefficients(shiftPolynomial(multiplicity, Form.number(from))).forEach((q, m) => {
      sum.function({ name: 'overRoots', argument: Form.number(from), order: m + 1, polynomial }, q.neg());
    });
  }
  return true;
}

/** The a_j of the class; square roots for irreducible quadratics. */
function shiftsOf({ polynomial, left }: ModeClass): Form[] | null {
  if (left.length === 0) return [];
  if (polynomial.length === 2) return [polynomial[0] as Form];
  if (polynomial.length !== 3) return null;
  const [c, b] = polynomial as [Form, Form, Form];
  const center = b.scale(Rational.of(1, 2));
  const rest = c.sub(center.mul(center));
  // The root of something that looks positive: i sqrt(a^2) is written where sqrt(-a^2) is meant.
  const negative = rest.terms.every(({ coefficient }) => coefficient.isReal() && coefficient.re.sign() < 0);
  const distance = negative ? rootOf(rest.neg()) : Form.i.mul(rootOf(rest));
  return [center.add(distance), center.sub(distance)];
}

/** Largest denominator that is taken out of a square root. */
const MAXIMAL_DENOMINATOR = 64;

/** sqrt(x) with whole numbers below the root: sqrt(1/4 + q^2) is 1/2 sqrt(1 + 4 q^2). */
function rootOf(x: Form): Form {
  for (let k = 1; k <= MAXIMAL_DENOMINATOR; k++) {
    const scaled = x.scale(k * k);
    if (scaled.terms.every(({ coefficient }) => coefficient.re.isInteger() && coefficient.im.isInteger())) {
      return Form.call('sqrt', scaled).scale(Rational.of(1, k));
    }
  }
  return Form.call('sqrt', x);
}

/** Most single factors that a closed form writes out. */
const MOST_WRITTEN = 1000;
/** Whole steps from 1 or 1/2 up to which a start is written by logarithms; functions keep starts beyond. */
const MOST_STEPS = 64;

/** Finite runs and vanishing starts as numbers, the endless rest as a ladder. */
function readStretch(sum: ClosedSum, shift: Form, { from, to, multiplicity }: Stretch): Ladder | null {
  const last = to ?? Math.floor(-(shift.toRational()?.toNumber() ?? Number.POSITIVE_INFINITY));
  if (last - from >= MOST_WRITTEN) throw new FormTooLargeError(last - from + 1);
  const add = (nu: number): void =>
    sum.number(shift.add(Form.number(nu)), evaluatePolynomial(multiplicity, Form.number(nu)));
  if (to !== null) {
    for (let nu = from; nu <= to; nu++) add(nu);
    return null;
  }
  let first = from;
  // Rational roots: everything up to zero stands in front, so that the ladder starts in (0, 1] or later.
  const rational = shift.toRational();
  for (; rational !== null && rational.add(Rational.of(first)).sign() <= 0; first++) {
    if (!rational.add(Rational.of(first)).isZero()) add(first);
  }
  return { start: shift.add(Form.number(first)), multiplicity: shiftPolynomial(multiplicity, Form.number(first)) };
}

function addLadders(sum: ClosedSum, ladders: readonly Ladder[]): void {
  const open: Ladder[] = [];
  for (const ladder of ladders) {
    const start = ladder.start.toRational();
    if (start !== null && start.denominator <= 2n && start.compare(Rational.of(MOST_STEPS)) <= 0) {
      addRational(sum, shiftPolynomial(ladder.multiplicity, ladder.start.neg()), start);
    } else open.push(ladder);
  }
  // The one with the positive power first, so that the function stands in the numerator.
  open.sort((a, b) => signOf(b) - signOf(a));
  for (let one = open.shift(); one !== undefined; one = open.shift()) {
    const { start } = one;
    const place = open.findIndex((other) => start.add(other.start).toRational()?.isInteger() === true);
    const partner = open[place];
    if (partner !== undefined && addPair(sum, one, partner)) open.splice(place, 1);
    else addAlone(sum, one);
  }
}

function signOf({ multiplicity }: Ladder): number {
  return multiplicity.at(-1)?.toRational()?.sign() ?? 0;
}

/** sum of -q_N log Gamma_N(start|1, ..., 1) by the binomial basis; Gamma and Barnes G for N = 1, 2. */
function addAlone(sum: ClosedSum, { start, multiplicity }: Ladder): void {
  const half = Rational.of(1, 2);
  binomialCoefficients(multiplicity).forEach((q, m) => {
    if (q.isZero()) return;
    if (m === 0) {
      // Gamma_1(x|1) = Gamma(x)/sqrt(2 pi).
      sum.function({ name: 'gamma', argument: start }, q.neg());
      sum.number(Form.pi.scale(2), q.scale(half));
    } else if (m === 1) {
      // log Gamma_2(x|1,1) = zeta'(-1) + (x - 1)/2 log 2 pi - log G(x).
      sum.function({ name: 'barnesG', argument: start }, q);
      sum.constant({ name: 'zetaPrime', order: 1 }, q.neg());
      sum.number(Form.pi.scale(2), q.mul(Form.one.sub(start)).scale(half));
    } else {
      const periods = Array.from({ length: m + 1 }, () => Form.one);
      sum.function({ name: 'multipleGamma', argument: start, periods }, q.neg());
    }
  });
}
