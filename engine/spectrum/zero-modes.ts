import { Form } from '../exact/form';
import type { Rational } from '../exact/rational';
import type { ModeClass, Pairing, Stretch } from './pairing';
import type { SeveralClass } from './pairing-several';
import { latticeOffset } from './period-lattice';
import { evaluatePolynomial, type Polynomial } from './polynomial';

/** A factor that vanishes, with its net power: positive in the numerator. */
export interface ZeroMode {
  /** A tower it occurs in. */
  readonly place: number;
  readonly order: Form;
}

/** Vanishing factors that pairing leaves; exact, so it finds those that vanish identically in all open names. */
export function zeroModes(pairing: Pairing): ZeroMode[] {
  return [...pairing.classes.flatMap(inClass), ...pairing.several.flatMap(inSeveral)];
}

/** Place of the vanishing factor in a class of linear factors: the integer nu = -a. */
function inClass({ polynomial, left, rows }: ModeClass): ZeroMode[] {
  if (polynomial.length !== 2) return [];
  const a = (polynomial[0] as Form).toRational();
  if (a === null || !a.isInteger()) return [];
  const at = -Number(a.numerator);
  const order = multiplicityAt(left, at);
  if (order.isZero()) return [];
  const row = rows.find((r) => covers(r, at)) ?? rows[0];
  return [{ place: row?.place ?? 0, order }];
}

export function covers({ from, to }: Stretch, at: number): boolean {
  return from <= at && (to === null || at <= to);
}

export function multiplicityAt(left: readonly Stretch[], at: number): Form {
  const stretch = left.find((s) => covers(s, at));
  return stretch ? valueAt(stretch.multiplicity, at) : Form.zero;
}

function valueAt(p: Polynomial, at: number): Form {
  return evaluatePolynomial(p, Form.number(at));
}

function inSeveral({ periods, rows, left }: SeveralClass): ZeroMode[] {
  return left.flatMap(({ shift, multiplicity }) => {
    const count = vanishingPoints(shift, periods);
    return count === 0 ? [] : [{ place: rows[0]?.place ?? 0, order: multiplicity.scale(count) }];
  });
}

/** Points n >= 0 with w.n + shift = 0, each repeated period an index of its own. */
function vanishingPoints(shift: Form, periods: readonly Form[]): number {
  if (shift.isZero()) return 1;
  const rational = periods.map((w) => w.toRational());
  const start = shift.toRational();
  if (start !== null && rational.every((w) => w !== null)) {
    return rational.every((w) => w.sign() > 0) ? rationalPoints(start.neg(), rational) : 0;
  }
  const distinct = [...new Map(periods.map((w) => [w.key, w])).values()];
  const steps = latticeOffset(shift.neg(), distinct);
  if (steps === null || steps.some((k) => k < 0)) return 0;
  return steps.reduce((product, k, i) => {
    const repeats = periods.filter((w) => w.equals(distinct[i] as Form)).length;
    return product * binomial(k + repeats - 1, repeats - 1);
  }, 1);
}

/** Number of n >= 0 with w.n = total, for positive w. */
function rationalPoints(total: Rational, periods: readonly Rational[]): number {
  const [w, ...rest] = periods;
  if (w === undefined) return total.isZero() ? 1 : 0;
  let count = 0;
  for (let left = total; left.sign() >= 0; left = left.sub(w)) count += rationalPoints(left, rest);
  return count;
}

function binomial(n: number, k: number): number {
  let result = 1;
  for (let i = 1; i <= k; i++) result = (result * (n - k + i)) / i;
  return result;
}
