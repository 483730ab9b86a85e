import { numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import { type FixedComplex, subtractComplex } from '../arithmetic/fixed-complex';
import { inverseParameter } from './inverse-parameter';
import { liftPoint } from './kernel-nodes';
import { logLatticeProduct } from './lattice-product';
import { latticeRadius, latticeTable, TOO_MANY_POINTS } from './lattice-table';
import { argumentShare, closestSquare } from './precise-log';
import type { ExactParameter, PreciseLog } from './special-function';
import { farUpsilon, isFarOut } from './upsilon-far';

/**
 * log Upsilon_b(x), Upsilon_b(Q/2) = 1, for complex b with Re b > 0: real on 0 < x < Q and analytic off the real axis for
 * b > 0; for complex b the sum of the principal logarithms of 1 - z^2/l^2 or, far out, a logarithm of the right number.
 *
 * Method, x = Q/2 + z: Upsilon is the product of 1 - z^2/l^2 over l = (m + 1/2) b + (n + 1/2)/b, regularised like the double
 * Gamma functions Gamma_2(Q/2)^2/(Gamma_2(x) Gamma_2(Q - x)): near points as factors, the others by power series
 * (`latticeTable`); far out by the expansion of Gamma_2 (`farUpsilon`). Rational b^2 is nothing special.
 * Error: what one unit in each part of x does; the rest is below a unit by guard bits, not by proof. 'indistinct' next to a
 * zero, 'unreachable' where too many points would be needed. A `stretch` other than 1 moves the far points of the table out,
 * and uses it far out too: another sum for the same value.
 * Source: Zamolodchikov and Zamolodchikov 1996, hep-th/9506136; Ruijsenaars 2000, Adv. Math. 156, 107.
 */
export function logUpsilon(x: FixedComplex, b: ExactParameter, bits: number, stretch = 1): PreciseLog {
  if (!(b.approx.re > 0)) return { kind: 'unreachable', says: 'the real part of b must be positive' };
  const periods = [b, inverseParameter(b)] as const;
  const total = { re: b.approx.re + periods[1].approx.re, im: b.approx.im + periods[1].approx.im };
  const right = 2 * numberFromFixed(x.re, bits) >= total.re;
  // Upsilon(Q - x) = Upsilon(x): to Re z >= 0, in doubles, since either side serves next to the middle.
  const size = Math.hypot(numberFromFixed(x.re, bits) - total.re / 2, numberFromFixed(x.im, bits) - total.im / 2);
  const center = (working: number): FixedComplex => {
    const [one, two] = [periods[0].value(working), periods[1].value(working)];
    return { re: (one.re + two.re) >> 1n, im: (one.im + two.im) >> 1n };
  };
  const offset = (working: number): FixedComplex => {
    const z = subtractComplex(liftPoint(x, bits, working), center(working));
    return right ? z : { re: -z.re, im: -z.im };
  };
  if (stretch === 1 && isFarOut(offset(bits), periods, bits)) return farUpsilon(offset, periods, bits);
  const table = latticeTable(periods, latticeRadius(size, Math.hypot(total.re, total.im)), bits, stretch);
  if (table === null) return { kind: 'unreachable', says: TOO_MANY_POINTS };
  const log = logLatticeProduct(table, offset(table.bits), closestSquare(size, table.bits - bits));
  if (log === null) return { kind: 'indistinct' };
  return {
    kind: 'value',
    re: shiftRounded(log.value.re, table.bits - bits),
    im: shiftRounded(log.value.im, table.bits - bits),
    error: argumentShare(log.slope),
  };
}
