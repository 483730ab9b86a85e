import { Form } from '../exact/form';
import { Gaussian } from '../exact/gaussian';
import { gcd, Rational } from '../exact/rational';
import { complexRoots, type Point } from './complex-roots';
import { exactSquareRoot, quotient } from './form-division';
import { divideByRoot, divideExactly, evaluatePolynomial, leadingCoefficient, type Polynomial } from './polynomial';

/** p = leading * product of (n + shift)^power * product of monic polynomials without linear factor. */
export interface Factorisation {
  readonly leading: Form;
  readonly linear: readonly { readonly shift: Form; readonly power: number }[];
  readonly irreducible: readonly { readonly polynomial: Polynomial; readonly power: number }[];
}

/**
 * Splits a polynomial of degree >= 1 into linear factors over Q(i) and the parameters where it splits: every Gaussian
 * rational root; roots of quadratics whose discriminant is a square; roots that are affine in the parameters. What is
 * left is kept whole, split into quadratics where these have Gaussian rational coefficients.
 */
export function factorise(p: Polynomial): Factorisation {
  const leading = leadingCoefficient(p);
  const monic = p.map((c, k) => (k === p.length - 1 ? Form.one : quotient(c, leading)));
  const shifts: Form[] = [];
  const whole: Polynomial[] = [];
  splitMonic(monic, shifts, whole);
  return {
    leading,
    linear: gather(shifts, (shift) => shift.key).map(({ item, count }) => ({ shift: item, power: count })),
    irreducible: gather(whole, (q) => q.map((c) => c.key).join(';')).map(({ item, count }) => ({
      polynomial: item,
      power: count,
    })),
  };
}

function splitMonic(monic: Polynomial, shifts: Form[], whole: Polynomial[]): void {
  let rest = monic;
  while (rest.length > 1) {
    const root = findRoot(rest);
    if (root === null) break;
    shifts.push(root.neg());
    rest = divideByRoot(rest, root);
  }
  while (rest.length > 4) {
    const quadratic = findQuadratic(rest);
    const left = quadratic === null ? null : divideExactly(rest, quadratic);
    if (quadratic === null || left === null) break;
    whole.push(quadratic);
    rest = left;
  }
  if (rest.length > 1) whole.push(rest);
}

function findRoot(monic: Polynomial): Form | null {
  if (monic.length === 2) return (monic[0] as Form).neg();
  const numbers = gaussianCoefficients(monic);
  if (numbers !== null) {
    const root = gaussianRoots(numbers)[0];
    return root === undefined ? null : Form.gaussian(root);
  }
  if (monic.length === 3) return rootOfQuadratic(monic);
  return affineRoot(monic);
}

function rootOfQuadratic(monic: Polynomial): Form | null {
  const [c, b] = monic as [Form, Form];
  const root = exactSquareRoot(b.mul(b).sub(c.scale(4)));
  return root === null ? null : root.sub(b).scale(Rational.of(1, 2));
}

function gaussianCoefficients(p: Polynomial): Gaussian[] | null {
  const numbers = p.map((c) => c.toGaussian());
  return numbers.every((c) => c !== null) ? numbers : null;
}

/**
 * Roots in Q(i) of a polynomial with Gaussian rational coefficients, each verified exactly. The leading coefficient
 * (after clearing denominators) times such a root is a Gaussian integer, so rounding an approximate root finds it.
 */
function gaussianRoots(coefficients: readonly Gaussian[]): Gaussian[] {
  const clear = Rational.of(commonDenominator(coefficients));
  const top = (coefficients[coefficients.length - 1] as Gaussian).mul(Gaussian.of(clear));
  const p = coefficients.map((c) => Form.gaussian(c));
  return complexRoots(coefficients.map(approximate)).flatMap((root) => {
    const candidate = nearestMultiple(root, top);
    return candidate !== null && evaluatePolynomial(p, Form.gaussian(candidate)).isZero() ? [candidate] : [];
  });
}

/** A monic quadratic factor with Gaussian rational coefficients, from pairs of approximate roots; verified by division. */
function findQuadratic(monic: Polynomial): Polynomial | null {
  const numbers = gaussianCoefficients(monic);
  if (numbers === null) return null;
  const top = Gaussian.of(Rational.of(commonDenominator(numbers)));
  const roots = complexRoots(numbers.map(approximate));
  for (const [k, z] of roots.entries()) {
    for (const w of roots.slice(k + 1)) {
      const b = nearestMultiple({ re: -z.re - w.re, im: -z.im - w.im }, top);
      const c = nearestMultiple({ re: z.re * w.re - z.im * w.im, im: z.re * w.im + z.im * w.re }, top);
      if (b === null || c === null) continue;
      const quadratic = [Form.gaussian(c), Form.gaussian(b), Form.one];
      if (divideExactly(monic, quadratic) !== null) return quadratic;
    }
  }
  return null;
}

function commonDenominator(coefficients: readonly Gaussian[]): bigint {
  let common = 1n;
  for (const { re, im } of coefficients) {
    for (const { denominator } of [re, im]) common = (common * denominator) / gcd(common, denominator);
  }
  return common;
}

function approximate(z: Gaussian): Point {
  return { re: z.re.toNumber(), im: z.im.toNumber() };
}

/** The Gaussian number g / top, g a Gaussian integer, next to an approximate value; null beyond doubles. */
function nearestMultiple(value: Point, top: Gaussian): Gaussian | null {
  const by = approximate(top);
  const re = Math.round(value.re * by.re - value.im * by.im);
  const im = Math.round(value.re * by.im + value.im * by.re);
  if (!Number.isSafeInteger(re) || !Number.isSafeInteger(im)) return null;
  return Gaussian.of(re, im).mul(top.inverse());
}

/** More candidates than this are not tried for an affine root. */
const MAXIMAL_CANDIDATES = 2000;

/**
 * A root r0 + r1 p1 + r2 p2 + ... affine in the parameters, with Gaussian rational coefficients. The roots at one
 * point of the parameters and at its neighbours (one parameter moved by 1) give all candidates for r1, r2, ...
 */
function affineRoot(monic: Polynomial): Form | null {
  const names = [...new Set(monic.flatMap((c) => c.symbols()))].sort();
  const base = new Map(names.map((name, k) => [name, Form.number(2 + 3 * k)]));
  const atBase = rootsAt(monic, base);
  const moved = names.map((name) => {
    const shifted = new Map(base).set(name, (base.get(name) as Form).add(Form.one));
    return rootsAt(monic, shifted);
  });
  const count = moved.reduce((product, roots) => product * roots.length, atBase.length);
  if (count === 0 || count > MAXIMAL_CANDIDATES) return null;
  for (const start of atBase) {
    let candidates = [Form.gaussian(start)];
    names.forEach((name, k) => {
      const symbol = Form.symbol(name).sub(base.get(name) as Form);
      const slopes = (moved[k] as Gaussian[]).map((root) => root.add(start.neg()));
      candidates = candidates.flatMap((c) => slopes.map((slope) => c.add(symbol.scale(slope))));
    });
    const root = candidates.find((candidate) => evaluatePolynomial(monic, candidate).isZero());
    if (root !== undefined) return root;
  }
  return null;
}

function rootsAt(monic: Polynomial, values: ReadonlyMap<string, Form>): Gaussian[] {
  const numbers = gaussianCoefficients(monic.map((c) => c.substitute((name) => values.get(name) ?? null)));
  if (numbers === null) return [];
  return gather(gaussianRoots(numbers), (z) => z.toString()).map(({ item }) => item);
}

function gather<T>(items: readonly T[], key: (item: T) => string): { item: T; count: number }[] {
  const found = new Map<string, { item: T; count: number }>();
  for (const item of items) {
    const known = found.get(key(item));
    if (known) known.count++;
    else found.set(key(item), { item, count: 1 });
  }
  return [...found.values()];
}
