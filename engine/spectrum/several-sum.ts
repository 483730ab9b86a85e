import type { FixedComplex } from '../arithmetic/fixed-complex';
import { formFixed } from '../arithmetic/form-fixed';
import { Form } from '../exact/form';
import { type BarnesEstimate, logBarnesGamma } from '../functions/barnes-gamma';
import type { Estimate } from '../functions/euler-maclaurin';
import { logBarnesByContour } from './barnes-contour';
import { barnesZetaAtZero } from './barnes-polynomial';
import type { SumFailure } from './linear-sum';
import { estimateOf, scaleEstimate, sizeOf, sumOf } from './total';

/** Bits beyond those asked for: errors of shift and periods grow with the number of lattice points used. */
const GUARD = 48;

/** Bits beyond those asked for in a quadrature, which has no such errors. */
const QUADRATURE_GUARD = 16;

/** Further steps of a second value. */
const FURTHER_STEPS = 5;

/** log Gamma_N of a shift and periods in the right half plane, at `working` bits. */
type LogGamma = (shift: Form, periods: readonly Form[], working: number) => Estimate | SumFailure;

/**
 * multiplicity times the regularised sum of log(w.n + shift), that is -multiplicity log Gamma_N(shift|periods). When
 * all periods point to the left, log(-1) = i pi is taken out. For positive periods the error is proved; for others it
 * holds the difference of two values with different numbers of steps.
 */
export function severalSum(
  shift: Form,
  periods: readonly Form[],
  multiplicity: Form,
  bits: number,
): Estimate | SumFailure {
  return timesLogGamma(bySteps, shift, periods, multiplicity, bits);
}

/** The same by a contour integral, for a cross-check; null where the integral is out of reach. */
export function severalSumByContour(
  shift: Form,
  periods: readonly Form[],
  multiplicity: Form,
  bits: number,
): Estimate | SumFailure {
  return timesLogGamma(byContour, shift, periods, multiplicity, bits, QUADRATURE_GUARD);
}

/** One value with further steps, for a cross-check where nothing else is at hand. */
export function severalSumFurther(
  shift: Form,
  periods: readonly Form[],
  multiplicity: Form,
  bits: number,
): Estimate | SumFailure {
  return timesLogGamma(
    (x, w, working) => estimateAt(x, w, working, 2 * FURTHER_STEPS),
    shift,
    periods,
    multiplicity,
    bits,
  );
}

function bySteps(shift: Form, periods: readonly Form[], working: number): Estimate | SumFailure {
  const first = estimateAt(shift, periods, working, 0);
  if (isFailed(first) || first.proved) return first;
  const second = estimateAt(shift, periods, working, FURTHER_STEPS);
  if (isFailed(second)) return second;
  return { value: second.value, error: first.error + second.error + sizeOf(difference(first.value, second.value)) };
}

function estimateAt(
  shift: Form,
  periods: readonly Form[],
  working: number,
  further: number,
): BarnesEstimate | SumFailure {
  const x = formFixed(shift, working);
  const w = periods.map((p) => formFixed(p, working));
  if (x === null || !w.every((p) => p !== null)) return 'spectrum-undefined';
  return logBarnesGamma(x, w, working, further) ?? 'spectrum-too-far';
}

function byContour(shift: Form, periods: readonly Form[], working: number): Estimate | SumFailure {
  const value = logBarnesByContour(shift, periods, working);
  return value === null ? 'spectrum-too-far' : { value, error: 0n };
}

function isFailed(found: Estimate | SumFailure): found is SumFailure {
  return typeof found === 'string';
}

function timesLogGamma(
  logGamma: LogGamma,
  shift: Form,
  periods: readonly Form[],
  multiplicity: Form,
  bits: number,
  guard = GUARD,
): Estimate | SumFailure {
  const rough = periods.map((w) => formFixed(w, 64));
  if (rough.some((w) => w === null)) return 'spectrum-undefined';
  if (rough.every((w) => w !== null && w.re < 0n)) return turned(logGamma, shift, periods, multiplicity, bits, guard);
  const working = bits + guard;
  const factor = estimateOf(multiplicity, working);
  if (factor === null) return 'spectrum-undefined';
  const found = logGamma(shift, periods, working);
  if (isFailed(found)) return found;
  const total = scaleEstimate({ value: negative(found.value), error: found.error }, factor, working);
  const by = BigInt(guard);
  return { value: { re: total.value.re >> by, im: total.value.im >> by }, error: (total.error >> by) + 2n };
}

function turned(
  logGamma: LogGamma,
  shift: Form,
  periods: readonly Form[],
  multiplicity: Form,
  bits: number,
  guard: number,
): Estimate | SumFailure {
  const mirrored = periods.map((w) => w.neg());
  const rest = timesLogGamma(logGamma, shift.neg(), mirrored, multiplicity, bits, guard);
  const phase = estimateOf(Form.pi.mul(Form.i).mul(multiplicity).mul(barnesZetaAtZero(shift.neg(), mirrored)), bits);
  if (typeof rest === 'string' || phase === null) return typeof rest === 'string' ? rest : 'spectrum-undefined';
  return sumOf([rest, phase]);
}

function difference(a: FixedComplex, b: FixedComplex): FixedComplex {
  return { re: a.re - b.re, im: a.im - b.im };
}

function negative({ re, im }: FixedComplex): FixedComplex {
  return { re: -re, im: -im };
}
