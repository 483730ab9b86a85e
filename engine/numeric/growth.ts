import { type DoubleValue, formDouble } from '../arithmetic/form-double';
import { functions } from '../functions/table';
import { type AffineEntry, type AffineProduct, ARGUMENT } from './affine';
import { compileAffine } from './program';

/**
 * Log of the modulus of the leading growth of a product as its one variable goes to +infinity (`end` 1) or -infinity,
 * at the given points; null where some factor has no simple growth there. Differs from the product by terms that vanish
 * at that end.
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
    const polynomial = growthOf(entry, end);
    if (polynomial === null) return null;
    addReal(polynomial, entry, points, re);
  }
  return re.every((x) => Number.isFinite(x)) ? re : null;
}

/** Coefficients of 1, x, x^2, ... of the leading log of a function at one end of its line. */
function growthOf({ name, parameters, slopes }: AffineEntry, end: 1 | -1): DoubleValue[] | null {
  const slope = slopes[0] as DoubleValue;
  for (const { direction, logarithm } of functions[name].growth) {
    const along = formDouble(direction, () => null);
    if (along === null || (along.re * slope.re - along.im * slope.im) * end <= 0) continue;
    let rest = logarithm(ARGUMENT, parameters);
    const coefficients: DoubleValue[] = [];
    // The polynomial's coefficients by powers of the argument; laws of growth have degree three at most.
    for (let degree = 0; degree <= MAXIMAL_DEGREE; degree++) {
      const same = rest.split().filter((term) => degreeOf(term.key) === degree);
      const sum = same.reduce((total, term) => total.add(term), rest.sub(rest));
      const value = formDouble(
        sum.substitute((symbol) => (symbol === '@x' ? UNIT : null)),
        () => null,
      );
      if (value === null) return null;
      coefficients.push(value);
      rest = rest.sub(sum);
    }
    return rest.isZero() ? coefficients : null;
  }
  return null;
}

const MAXIMAL_DEGREE = 3;
const UNIT = ARGUMENT.div(ARGUMENT);

/** Power of @x in the key of a single term. */
function degreeOf(key: string): number {
  const found = /@x(?:\^(-?\d+))?/.exec(key);
  if (!found) return 0;
  return found[1] === undefined ? 1 : Number(found[1]);
}

/** Adds power * Re P(constant + slope t) to out. */
function addReal(
  polynomial: readonly DoubleValue[],
  entry: AffineEntry,
  points: Float64Array,
  out: Float64Array,
): void {
  const { constant, power } = entry;
  const slope = entry.slopes[0] as DoubleValue;
  for (let k = 0; k < points.length; k++) {
    const t = points[k] as number;
    const xRe = constant.re + slope.re * t;
    const xIm = constant.im + slope.im * t;
    let re = 0;
    let im = 0;
    for (let n = polynomial.length - 1; n >= 0; n--) {
      const next = re * xRe - im * xIm + (polynomial[n] as DoubleValue).re;
      im = re * xIm + im * xRe + (polynomial[n] as DoubleValue).im;
      re = next;
    }
    out[k] = (out[k] as number) + power * re;
  }
}
