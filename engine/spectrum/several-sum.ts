import type { FixedComplex } from '../arithmetic/fixed-complex';
import { formFixed } from '../arithmetic/form-fixed';
import { Form } from '../exact/form';
import { logBarnesGamma } from '../functions/barnes-gamma';
import type { Estimate } from '../functions/euler-maclaurin';
import { barnesZetaAtZero } from './barnes-polynomial';
import type { SumFailure } from './linear-sum';
import { estimateOf, scaleEstimate, sizeOf, sumOf } from './total';

/** Bits beyond those asked for: errors of shift and periods grow with the number of lattice points used. */
const GUARD = 48;

/** Further steps of the second value that the error is taken from. */
const FURTHER_STEPS = 5;

interface Steps {
  readonly further: number;
  readonly twice: boolean;
}

/** One value with more steps, without the error that a second one would give; for cross-checks. */
export function severalSumOnce(
  shift: Form,
  periods: readonly Form[],
  multiplicity: Form,
  bits: number,
  further: number,
): Estimate | SumFailure {
  return severalSum(shift, periods, multiplicity, bits, { further, twice: false });
}

/**
 * multiplicity times the regularised sum of log(w.n + shift), that is -multiplicity log Gamma_N(shift|periods). When
 * all periods point to the left, log(-1) = i pi is taken out. The error is proved for positive periods; else it is the
 * difference of two values with different numbers of steps, besides rounding.
 */
export function severalSum(
  shift: Form,
  periods: readonly Form[],
  multiplicity: Form,
  bits: number,
  { further, twice }: Steps = { further: 0, twice: true },
): Estimate | SumFailure {
  const working = bits + GUARD;
  const rough = periods.map((w) => formFixed(w, 64));
  if (rough.some((w) => w === null)) return 'spectrum-undefined';
  if (rough.every((w) => w !== null && w.re < 0n)) {
    return turned(shift, periods, multiplicity, bits, { further, twice });
  }
  const x = formFixed(shift, working);
  const w = periods.map((p) => formFixed(p, working));
  const factor = estimateOf(multiplicity, working);
  if (x === null || factor === null || !w.every((p) => p !== null)) return 'spectrum-undefined';
  const first = logBarnesGamma(x, w, working, further);
  const second = twice && !first?.proved ? logBarnesGamma(x, w, working, further + FURTHER_STEPS) : first;
  if (first === null || second === null) return 'spectrum-too-far';
  const gap = sizeOf(difference(first.value, second.value));
  const value = { value: negative(second.value), error: first.error + second.error + gap };
  const total = scaleEstimate(value, factor, working);
  const by = BigInt(GUARD);
  return { value: { re: total.value.re >> by, im: total.value.im >> by }, error: (total.error >> by) + 2n };
}

function turned(
  shift: Form,
  periods: readonly Form[],
  multiplicity: Form,
  bits: number,
  steps: Steps,
): Estimate | SumFailure {
  const mirrored = periods.map((w) => w.neg());
  const rest = severalSum(shift.neg(), mirrored, multiplicity, bits, steps);
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
