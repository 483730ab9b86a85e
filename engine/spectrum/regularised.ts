import type { Ball } from '../arithmetic/ball';
import { formFixed } from '../arithmetic/form-fixed';
import type { Form } from '../exact/form';
import { gcd } from '../exact/rational';
import { isRemark } from './analyse';
import { type CheckRoute, checkValue } from './cross-check';
import { type ExactNumbers, exactNumbers } from './exact-numbers';
import { factorValue } from './factor-value';
import { formText } from './form-text';
import { guarded } from './guard';
import { inspectTowers } from './inspect';
import { isFailure } from './linear-sum';
import type { ModeClass } from './pairing';
import { type Prepared, prepare, type Values, withAllValues } from './prepare';
import { isRefusal } from './read';
import type { Prescription } from './rootless-sum';
import { agreedDigits, ballOf, estimateOf, gapBetween, sizeOf, sumOf } from './total';
import { type RefusalCode, type Remark, remark, type Spectrum } from './tower';
import { zeroModes } from './zero-modes';

/** Most digits of a value. */
export const MAXIMAL_DIGITS = 2000;

export interface SpectrumValue {
  readonly kind: 'value';
  /** Logarithm of the determinant; the imaginary part is meaningful up to 2 pi times the multiplicities. */
  readonly log: Ball;
  readonly zeta0: Ball;
  readonly scale: Ball;
  readonly anomaly: Ball;
  readonly exact: ExactNumbers;
  readonly crossCheck: { readonly route: CheckRoute; readonly agreedDigits: number } | null;
  /** What to know about the value: `square-root-sign` means that only the modulus is one. */
  readonly remarks: readonly Remark[];
}

export interface SpectrumRefusal {
  readonly kind: 'refusal';
  readonly remark: Remark;
}

/**
 * The zeta-regularised determinant of a spectrum at given values of its names, to `digits` digits of its logarithm
 * (absolute, or relative where that is larger). By factors the towers are paired first; by operator the exact anomaly
 * of each tower is added. The error of `log` covers truncation, rounding and, with a second way, the difference from it.
 */
export function determinant(
  spectrum: Spectrum,
  prescription: Prescription,
  values: Values,
  digits: number,
  confirm = true,
): SpectrumValue | SpectrumRefusal {
  if (digits < 1 || digits > MAXIMAL_DIGITS) {
    return refuse(remark('spectrum-digits', null, 'row', { limit: `${MAXIMAL_DIGITS}` }));
  }
  const found = guarded(() => defined(spectrum, prescription, values, digits, confirm), null);
  return isRemark(found) ? refuse(found) : found;
}

function defined(
  spectrum: Spectrum,
  prescription: Prescription,
  values: Values,
  digits: number,
  confirm: boolean,
): SpectrumValue | SpectrumRefusal {
  const written = withAllValues(spectrum, values);
  if (isRemark(written)) return refuse(written);
  const prepared = prepare(written);
  if (isRemark(prepared)) return refuse(prepared);
  const remarks = inspectTowers(prepared.towers, prepared.pairing);
  const refusal = remarks.find(isRefusal) ?? zeroRefusal(prepared);
  if (refusal) return refuse(refusal);
  const exact = exactNumbers(prepared.towers, prescription);
  if (exact === null) return refuse(remark('operator-periods', null, 'row'));
  const all = [...remarks, ...furtherRemarks(prepared, prescription, exact, digits)];
  return evaluate(prepared, prescription, digits, exact, all, confirm);
}

function refuse(found: Remark): SpectrumRefusal {
  return { kind: 'refusal', remark: found };
}

function zeroRefusal({ pairing }: Prepared): Remark | null {
  const modes = zeroModes(pairing);
  const first = modes[0];
  if (first === undefined) return null;
  const orders = modes.map(({ order }) => order.toRational()?.toNumber() ?? Number.NaN);
  const total = orders.reduce((sum, order) => sum + order, 0);
  const data = { order: `${Math.abs(total)}` };
  if (total > 0) return remark('determinant-zero', first.place, 'eigenvalue', data);
  if (total < 0) return remark('determinant-infinite', first.place, 'eigenvalue', data);
  return remark('spectrum-undefined', first.place, 'eigenvalue');
}

function evaluate(
  prepared: Prepared,
  prescription: Prescription,
  digits: number,
  exact: ExactNumbers,
  remarks: readonly Remark[],
  confirm: boolean,
): SpectrumValue | SpectrumRefusal {
  const bits = Math.ceil(digits * Math.log2(10)) + 16;
  const failed = (code: RefusalCode): SpectrumRefusal => refuse(remark(code, null, 'row'));
  const factors = factorValue(prepared.pairing, bits);
  if (isFailure(factors)) return failed(factors);
  const anomaly = prescription === 'operator' ? estimateOf(exact.anomaly, bits) : null;
  if (prescription === 'operator' && anomaly === null) return failed('spectrum-undefined');
  const log = anomaly === null ? factors : sumOf([factors, anomaly]);
  const zeta0 = estimateOf(exact.zeta0, bits);
  const scale = estimateOf(exact.scale, bits);
  const difference = estimateOf(exact.anomaly, bits);
  if (zeta0 === null || scale === null || difference === null) return failed('spectrum-undefined');
  const second = confirm ? checkValue(prepared, prescription, bits) : null;
  const check = typeof second === 'string' ? null : second;
  const gap = check === null ? 0n : gapBetween(log.value, check.estimate.value, bits, turnsOf(prepared, remarks));
  const modulus = remarks.some(({ code }) => code === 'square-root-sign');
  const shown = modulus ? { re: log.value.re, im: 0n } : log.value;
  return {
    kind: 'value',
    log: ballOf({ value: shown, error: log.error + gap }, bits),
    zeta0: ballOf(zeta0, bits),
    scale: ballOf(scale, bits),
    anomaly: ballOf(difference, bits),
    exact,
    crossCheck:
      check === null
        ? null
        : { route: check.route, agreedDigits: Math.min(digits, agreedDigits(log.value, gap, bits)) },
    remarks,
  };
}

/**
 * Common denominator of the multiplicities: logarithms of single factors are known up to 2 pi i, so the imaginary part of
 * log det up to 2 pi over that. Null where multiplicities are no rational numbers of one denominator.
 */
function turnsOf({ towers }: Prepared, remarks: readonly Remark[]): number | null {
  if (remarks.some(({ code }) => code === 'degeneracy-fraction')) return null;
  let common = 1n;
  for (const { exponent } of towers) common = (common * exponent.denominator) / gcd(common, exponent.denominator);
  return Number(common);
}

function furtherRemarks(prepared: Prepared, prescription: Prescription, exact: ExactNumbers, digits: number): Remark[] {
  const remarks: Remark[] = [];
  if (prescription === 'operator' && new Set(prepared.towers.map(({ order }) => order)).size > 1) {
    remarks.push(remark('mixed-order', null, 'row'));
  }
  if (!exact.scale.isZero()) remarks.push(remark('scale-dependent', null, 'row', { scale: formText(exact.scale) }));
  const near = prepared.pairing.classes.find((found) => isNearZero(found, digits));
  if (near) remarks.push(remark('near-zero-mode', near.rows[0]?.place ?? null, 'eigenvalue'));
  return remarks;
}

/** A linear factor that is smaller than 10^(-digits/3) somewhere. */
function isNearZero({ polynomial, left }: ModeClass, digits: number): boolean {
  if (polynomial.length !== 2) return false;
  const bits = Math.ceil((digits * Math.log2(10)) / 3) + 8;
  const a = formFixed(polynomial[0] as Form, bits);
  if (a === null) return false;
  const unit = BigInt(bits);
  const nearest = -((a.re + (1n << (unit - 1n))) >> unit);
  const gap = sizeOf({ re: a.re + (nearest << unit), im: a.im });
  const nu = Number(nearest);
  return gap < 1n << 8n && left.some(({ from, to }) => from <= nu && (to === null || nu <= to));
}
