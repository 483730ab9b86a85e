import { type DoubleValue, formDouble } from '../arithmetic/form-double';
import { Form } from '../exact/form';
import { functions } from '../functions/table';
import { type AffineEntry, type AffineProduct, ARGUMENT } from './affine';
import { compileAffine } from './program';

/**
 * Log of the modulus of the leading growth of a product as its one variable goes to +infinity (`end` 1) or -infinity,
 * at the given points; null where some factor has no simple growth there. Differs from the product by terms that vanish
 * at that end. On the other side of zero the values mean nothing.
 */
export function asymptote(
  { affine, others }: AffineProduct,
  variable: string,
  end: 1 | -1,
  points: Float64Array,
): Float64Array | null {
  if (others.some(({ name, parameters }) => name !== 'exponential' || parameters.length > 0)) return null;
  const moving = affine.filter(({ slopes }) => slopes.some(({ re, im }) => re !== 0 || im !== 0));
  const re = new Float64Array(points.length);
  const im = new Float64Array(points.length);
  const still = affine.filter((entry) => !moving.includes(entry));
  compileAffine({ affine: still, others, unset: [] }, [variable]).addLog([points], re, im);
  for (const entry of moving) {
    const law = growthOf(entry, end);
    if (law === null) return null;
    addReal(law, entry, points, end, re);
  }
  return re.every((value, k) => end * (points[k] as number) <= 0 || Number.isFinite(value)) ? re : null;
}

/** P(z) + L(z) log z with z = x - about; coefficients of 1, z, z^2, ... */
interface Law {
  readonly about: DoubleValue;
  readonly polynomial: readonly DoubleValue[];
  readonly logarithm: readonly DoubleValue[];
}

const ZERO: DoubleValue = { re: 0, im: 0 };

/** The leading log of a function at one end of its line. */
function growthOf({ name, parameters, slopes }: AffineEntry, end: 1 | -1): Law | null {
  const slope = slopes[0] as DoubleValue;
  const leads = (direction: Form): boolean => {
    const along = formDouble(direction, () => null);
    return along !== null && (along.re * slope.re - along.im * slope.im) * end > 0;
  };
  const { growth, logarithmicGrowth } = functions[name];
  const plain = growth.find(({ direction }) => leads(direction));
  if (plain) {
    const polynomial = coefficientsOf(plain.logarithm(ARGUMENT, parameters));
    return polynomial && { about: ZERO, polynomial, logarithm: [] };
  }
  const law = logarithmicGrowth?.find(({ direction }) => leads(direction));
  const about = law ? formDouble(law.about(parameters), () => null) : null;
  const periods = parameters.flatMap((form) => formDouble(form, () => null) ?? []);
  if (!law || about === null || periods.length < parameters.length) return null;
  const polynomial = coefficientsOf(law.polynomial(ARGUMENT, parameters));
  const logarithm = coefficientsOf(law.logarithm(ARGUMENT, parameters));
  if (polynomial === null || logarithm === null) return null;
  const further = law.constant?.(periods) ?? ZERO;
  const constant = { re: (polynomial[0]?.re ?? 0) + further.re, im: (polynomial[0]?.im ?? 0) + further.im };
  return { about, polynomial: [constant, ...polynomial.slice(1)], logarithm };
}

/** Coefficients of a polynomial in the argument; null where the degree is higher than any law's or one has no value. */
function coefficientsOf(polynomial: Form): DoubleValue[] | null {
  let rest = polynomial;
  const coefficients: DoubleValue[] = [];
  for (let degree = 0; degree <= MAXIMAL_DEGREE; degree++) {
    const same = rest.split().filter((term) => degreeOf(term.key) === degree);
    const sum = Form.sum(same);
    const value = formDouble(
      sum.substitute((symbol) => (symbol === '@x' ? Form.one : null)),
      () => null,
    );
    if (value === null) return null;
    coefficients.push(value);
    rest = rest.sub(sum);
  }
  return rest.isZero() ? coefficients : null;
}

const MAXIMAL_DEGREE = 3;

/** Power of @x in the key of a single term. */
function degreeOf(key: string): number {
  const found = /@x(?:\^(-?\d+))?/.exec(key);
  if (!found) return 0;
  return found[1] === undefined ? 1 : Number(found[1]);
}

/** Adds power * Re (P + L log) at constant + slope t to out. */
function addReal(law: Law, entry: AffineEntry, points: Float64Array, end: 1 | -1, out: Float64Array): void {
  const { constant, power } = entry;
  const slope = entry.slopes[0] as DoubleValue;
  for (let k = 0; k < points.length; k++) {
    const t = points[k] as number;
    if (end * t <= 0) continue;
    const z = { re: constant.re - law.about.re + slope.re * t, im: constant.im - law.about.im + slope.im * t };
    const { re } = polynomialAt(law.polynomial, z);
    const beside = polynomialAt(law.logarithm, z);
    // Where L vanishes there is no logarithm to be taken.
    const logarithm =
      law.logarithm.length === 0
        ? 0
        : beside.re * Math.log(Math.hypot(z.re, z.im)) - beside.im * Math.atan2(z.im, z.re);
    out[k] = (out[k] as number) + power * (re + logarithm);
  }
}

/** Horner's rule. */
function polynomialAt(coefficients: readonly DoubleValue[], z: DoubleValue): DoubleValue {
  let { re, im } = ZERO;
  for (let n = coefficients.length - 1; n >= 0; n--) {
    const next = re * z.re - im * z.im + (coefficients[n] as DoubleValue).re;
    im = re * z.im + im * z.re + (coefficients[n] as DoubleValue).im;
    re = next;
  }
  return { re, im };
}
