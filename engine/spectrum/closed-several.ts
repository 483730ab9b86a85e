import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { periodsKey } from './barnes-term';
import type { ClosedSum } from './closed-form';
import type { SeveralClass } from './pairing-several';

interface Piece {
  readonly shift: Form;
  readonly periods: readonly Form[];
  readonly multiplicity: Form;
}

/**
 * Towers in several indices: a pair x, |w| - x is a multiple sine where the powers have the sign for it, Upsilon_b for
 * two periods b, 1/b with equal powers; what is left are multiple Gamma functions.
 */
export function addSeveral(sum: ClosedSum, classes: readonly SeveralClass[]): void {
  const open: Piece[] = classes.flatMap(({ periods, left }) =>
    left.map(({ shift, multiplicity }) => ({ shift, periods, multiplicity })),
  );
  open.sort((a, b) => (b.multiplicity.toRational()?.sign() ?? 0) - (a.multiplicity.toRational()?.sign() ?? 0));
  for (let one = open.shift(); one !== undefined; one = open.shift()) {
    const piece = one;
    const place = open.findIndex((other) => complements(piece, other));
    const [partner] = place < 0 ? [] : open.splice(place, 1);
    if (partner !== undefined) addPaired(sum, piece, partner);
    else
      sum.function({ name: 'multipleGamma', argument: piece.shift, periods: piece.periods }, piece.multiplicity.neg());
  }
}

/** Equal periods, shifts that add up to them, and powers that make a sine or an Upsilon function. */
function complements(one: Piece, other: Piece): boolean {
  if (periodsKey(one.periods) !== periodsKey(other.periods)) return false;
  if (!one.shift.add(other.shift).equals(Form.sum(one.periods))) return false;
  const same = one.multiplicity.equals(other.multiplicity);
  const opposite = one.multiplicity.equals(other.multiplicity.neg());
  return one.periods.length % 2 === 1 ? same : opposite || (same && reciprocal(one.periods) !== null);
}

function addPaired(sum: ClosedSum, { shift, periods, multiplicity }: Piece, partner: Piece): void {
  const b = reciprocal(periods);
  const half = Form.sum(periods).scale(Rational.of(1, 2));
  const sine = periods.length % 2 === 1 || !multiplicity.equals(partner.multiplicity);
  if (sine && b !== null) {
    sum.function({ name: 'doubleSine', argument: Form.i.mul(shift.sub(half)), b }, multiplicity);
  } else if (sine) sum.function({ name: 'multipleSine', argument: shift, periods }, multiplicity);
  else if (b !== null) {
    sum.function({ name: 'upsilon', argument: shift, b }, multiplicity);
    sum.function({ name: 'multipleGamma', argument: half, periods }, multiplicity.scale(-2));
  }
}

/** b where the periods are b and 1/b. */
function reciprocal(periods: readonly Form[]): Form | null {
  const [one, other] = periods;
  if (periods.length !== 2 || one === undefined || other === undefined || !one.mul(other).equals(Form.one)) return null;
  // The one that is not written as a fraction.
  const inverse = one.terms.some(
    ({ factors, coefficient }) =>
      factors.some(({ power }) => power < 0) ||
      (factors.length === 0 && coefficient.re.abs().compare(Rational.one) < 0),
  );
  return inverse ? other : one;
}
