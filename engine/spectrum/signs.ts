import { formDouble } from '../arithmetic/form-double';
import { Form } from '../exact/form';
import { rootBound } from './complex-roots';
import { formText } from './form-text';
import type { ModeClass, Pairing } from './pairing';
import { evaluatePolynomial, type Polynomial } from './polynomial';
import { type Remark, remark, type Tower } from './tower';
import { covers, multiplicityAt } from './zero-modes';

/** What negative eigenvalues do to the sign of the determinant, after pairing, where all is real and has values. */
export function signRemarks(towers: readonly Tower[], pairing: Pairing): Remark[] {
  const remarks: Remark[] = [];
  const flipped = towers.find(
    ({ last, factors }) => last === null && factors.some(({ scale }) => scale.some(({ base }) => isMinusOne(base))),
  );
  const exponent = pairing.constants.find(({ base }) => isMinusOne(base))?.exponent;
  if (flipped && exponent) {
    remarks.push(remark('negative-axis', flipped.place, 'eigenvalue', { exponent: formText(exponent) }));
  }
  let total = Form.zero;
  for (const found of pairing.classes) total = total.add(negativeMultiplicity(found));
  const count = total.toRational();
  if (count === null || count.isZero()) return remarks;
  const code = count.isInteger() ? 'negative-modes' : 'square-root-sign';
  return [...remarks, remark(code, null, 'row', { multiplicity: count.toString() })];
}

function isMinusOne(base: Form): boolean {
  return base.equals(Form.number(-1));
}

/** Most places that are looked at for negative values. */
const LOOKED_AT = 10_000;

/** Net power with which negative values of a real class occur. */
export function negativeMultiplicity({ polynomial, left }: ModeClass): Form {
  const values = polynomial.map((c) => formDouble(c, () => null));
  if (!values.every((c) => c !== null) || values.some(({ re, im }) => Math.abs(im) > 1e-14 * Math.abs(re)))
    return Form.zero;
  const bound = Math.ceil(rootBound(values));
  let total = Form.zero;
  if (bound > LOOKED_AT) return total;
  for (let nu = -bound; nu <= bound; nu++) {
    if (left.some((stretch) => covers(stretch, nu)) && valueAt(polynomial, nu) < 0) {
      total = total.add(multiplicityAt(left, nu));
    }
  }
  return total;
}

function valueAt(polynomial: Polynomial, nu: number): number {
  return formDouble(evaluatePolynomial(polynomial, Form.number(nu)), () => null)?.re ?? 0;
}
