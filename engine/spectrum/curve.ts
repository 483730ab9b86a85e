import { add, type DoubleComplex, multiply, negate, scale } from '../arithmetic/double-complex';
import { formDouble } from '../arithmetic/form-double';
import { Form } from '../exact/form';
import { barnesGammaDouble } from '../functions/barnes-gamma-double';
import { isRemark } from './analyse';
import { logarithmOf } from './anomaly';
import { complexRoots } from './complex-roots';
import { linearSumDouble } from './double-sum';
import { exactNumbers } from './exact-numbers';
import { guarded } from './guard';
import { inspectTowers } from './inspect';
import type { Pairing } from './pairing';
import type { Polynomial } from './polynomial';
import { openNames, prepare, substituteTowers, type Values } from './prepare';
import { isRefusal } from './read';
import type { Prescription } from './rootless-sum';
import { type Remark, remark, type Spectrum } from './tower';

/** log det along a line of values: -Infinity where the determinant vanishes, +Infinity where it is infinite. */
export interface DeterminantCurve {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/**
 * log det in doubles as one name runs over values; the other names have theirs. About 12 digits for degeneracies of
 * low degree, see linearSumDouble; imaginary parts as principal logarithms of the factors add up.
 */
export function logDeterminantCurve(
  spectrum: Spectrum,
  prescription: Prescription,
  name: string,
  xs: Float64Array,
  values: Values,
): DeterminantCurve | Remark {
  const found = guarded(() => compile(spectrum, prescription, name, values), null);
  if (isRemark(found)) return found;
  const re = new Float64Array(xs.length);
  const im = new Float64Array(xs.length);
  xs.forEach((x, k) => {
    const value = found((symbol) => (symbol === name ? { re: x, im: 0 } : null));
    re[k] = value.re;
    // At a zero or a pole there is no phase.
    im[k] = Math.abs(value.re) === Number.POSITIVE_INFINITY ? 0 : value.im;
  });
  return { re, im };
}

type Lookup = (name: string) => DoubleComplex | null;

/** The determinant as a function of one open name. */
function compile(
  spectrum: Spectrum,
  prescription: Prescription,
  name: string,
  values: Values,
): ((lookup: Lookup) => DoubleComplex) | Remark {
  // The running name keeps no value from the notebook.
  const free = { ...spectrum, parameters: new Map([...spectrum.parameters].filter(([symbol]) => symbol !== name)) };
  const written = substituteTowers(free, new Map([...values].filter(([symbol]) => symbol !== name)), true);
  const open = openNames(written).filter((symbol) => symbol !== name);
  if (open.length > 0) return remark('spectrum-names-unset', null, 'row', { names: open.join(', ') });
  const prepared = prepare(written);
  if (isRemark(prepared)) return prepared;
  const refusal = inspectTowers(prepared.towers, null).find(isRefusal);
  if (refusal) return refusal;
  const numbers = exactNumbers(prepared.towers, prescription);
  if (numbers === null) return remark('operator-periods', null, 'row');
  const anomaly = prescription === 'operator' ? numbers.anomaly : Form.zero;
  return (lookup) => add(pairingDouble(prepared.pairing, lookup), formValue(anomaly, lookup));
}

const UNDEFINED: DoubleComplex = { re: Number.NaN, im: Number.NaN };

function formValue(form: Form, lookup: Lookup): DoubleComplex {
  return formDouble(form, lookup) ?? UNDEFINED;
}

/** log det by factors of a paired spectrum in doubles; NaN where a name has no value. */
export function pairingDouble(pairing: Pairing, lookup: Lookup): DoubleComplex {
  let total: DoubleComplex = { re: 0, im: 0 };
  for (const { polynomial, left } of pairing.classes) {
    for (const shift of shiftsDouble(polynomial, lookup)) {
      for (const stretch of left) {
        const m = stretch.multiplicity.map((c) => formValue(c, lookup));
        total = add(total, linearSumDouble(shift, m, stretch));
      }
    }
  }
  for (const { periods, left } of pairing.several) {
    const logGamma = barnesGammaDouble(periods.map((w) => formValue(w, lookup)));
    for (const { shift, multiplicity } of left) {
      total = add(total, negate(multiply(formValue(multiplicity, lookup), logGamma(formValue(shift, lookup)))));
    }
  }
  for (const { base, exponent } of pairing.constants) {
    total = add(total, multiply(formValue(exponent, lookup), formValue(logarithmOf(base), lookup)));
  }
  return total;
}

/** The a_j of q = product of (nu + a_j). */
function shiftsDouble(q: Polynomial, lookup: Lookup): DoubleComplex[] {
  const values = q.map((c) => formValue(c, lookup));
  if (values.some(({ re, im }) => Number.isNaN(re + im))) return [UNDEFINED];
  return values.length === 2 ? [values[0] as DoubleComplex] : complexRoots(values).map((z) => scale(z, -1));
}
