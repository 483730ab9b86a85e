import { fixedFromNumber, numberFromFixed, shiftRounded } from '../arithmetic/fixed';
import { type FixedComplex, multiplyComplex } from '../arithmetic/fixed-complex';
import { liftPoint } from './kernel-nodes';
import { logLatticeProduct } from './lattice-product';
import { latticeRadius, latticeTable, TOO_MANY_POINTS } from './lattice-table';
import { argumentShare, closestSquare } from './precise-log';
import type { Complex, ExactParameter, PreciseLog } from './special-function';

/**
 * log S_3(|w|/2 + z | w) for complex periods in an open half plane: minus twice log Gamma_3(|w|/2) and the product of
 * 1 - z^2/l^2 over l = sum (n_i + 1/2) w_i, regularised (`latticeTable`); real on the line between 0 and |w| for positive
 * periods, elsewhere a logarithm of the right number. S_3 does not change when x and the periods are multiplied by one
 * number, which brings the periods to the right half plane.
 * Error: what one unit in each part of x does; the rest is below a unit by guard bits, not by proof. 'indistinct' next to a
 * zero, 'unreachable' outside the domain and where too many points would be needed.
 * Source: Kurokawa and Koyama 2003, Forum Math. 15, 839; Ruijsenaars 2000, Adv. Math. 156, 107.
 */
export function logTripleSineByLattice(
  x: FixedComplex,
  periods: readonly ExactParameter[],
  bits: number,
  stretch = 1,
): PreciseLog {
  const turn = turnToTheRight(periods.map(({ approx }) => approx));
  if (turn === null) return { kind: 'unreachable', says: NO_HALF_PLANE };
  const turned = turn.re === 1 && turn.im === 0 ? periods : periods.map((w) => multiplied(w, turn));
  const total = turned.reduce(({ re, im }, w) => ({ re: re + w.approx.re, im: im + w.approx.im }), { re: 0, im: 0 });
  const offset = (working: number): FixedComplex => {
    const point = multiplyComplex(liftPoint(x, bits, working), fixedTurn(turn, working), working);
    const sum = turned.map((w) => w.value(working)).reduce((a, b) => ({ re: a.re + b.re, im: a.im + b.im }));
    return { re: point.re - (sum.re >> 1n), im: point.im - (sum.im >> 1n) };
  };
  const rough = offset(bits);
  const size = Math.hypot(numberFromFixed(rough.re, bits), numberFromFixed(rough.im, bits));
  const table = latticeTable(turned, latticeRadius(size, Math.hypot(total.re, total.im)), bits, stretch);
  if (table === null) return { kind: 'unreachable', says: TOO_MANY_POINTS };
  const further = table.bits - bits;
  const log = logLatticeProduct(table, offset(table.bits), closestSquare(size, further));
  if (log === null) return { kind: 'indistinct' };
  const center = table.center();
  return {
    kind: 'value',
    re: shiftRounded(log.value.re - 2n * center.re, further),
    im: shiftRounded(log.value.im - 2n * center.im, further),
    error: argumentShare(log.slope * Math.hypot(turn.re, turn.im)),
  };
}

/** Why there is no triple sine, in words. */
export const NO_HALF_PLANE = 'the periods must lie in an open half plane';

/** Directions are rounded to multiples of this, exact in every arithmetic. */
const GRAIN = 1 / 64;
/** Cosine of the largest angle with the real axis after turning. */
const LEAST_COSINE = 0.02;

/** A number c with Re cw > 0 for all periods: 1 where that serves; null where there is none. */
export function turnToTheRight(periods: readonly Complex[]): Complex | null {
  const serves = (c: Complex): boolean =>
    periods.every((w) => {
      const size = Math.hypot(w.re, w.im) * Math.hypot(c.re, c.im);
      return Number.isFinite(size) && size > 0 && c.re * w.re - c.im * w.im > LEAST_COSINE * size;
    });
  if (serves({ re: 1, im: 0 })) return { re: 1, im: 0 };
  // Half way between the two outermost directions.
  for (const first of periods) {
    for (const second of periods) {
      const re = first.re / Math.hypot(first.re, first.im) + second.re / Math.hypot(second.re, second.im);
      const im = first.im / Math.hypot(first.re, first.im) + second.im / Math.hypot(second.re, second.im);
      const size = Math.hypot(re, im);
      if (!(size > LEAST_COSINE)) continue;
      const grain = (value: number): number => Math.round(value / size / GRAIN) * GRAIN;
      const c = { re: grain(re), im: -grain(im) };
      if (serves(c)) return c;
    }
  }
  return null;
}

function fixedTurn(turn: Complex, bits: number): FixedComplex {
  return { re: fixedFromNumber(turn.re, bits), im: fixedFromNumber(turn.im, bits) };
}

function multiplied(w: ExactParameter, c: Complex): ExactParameter {
  const { re, im } = w.approx;
  return {
    square: null,
    value: (bits) => {
      // One unit of w may become more than one.
      const wide = multiplyComplex(w.value(bits + 4), fixedTurn(c, bits + 4), bits + 4);
      return { re: shiftRounded(wide.re, 4), im: shiftRounded(wide.im, 4) };
    },
    approx: { re: re * c.re - im * c.im, im: re * c.im + im * c.re },
  };
}
