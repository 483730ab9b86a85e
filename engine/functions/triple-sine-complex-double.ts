import { add, type DoubleComplex, divide, multiply, scale, subtract } from '../arithmetic/double-complex';
import { latticeCenter, latticeLogarithm, parameterOfComplex } from './lattice-kernel-double';
import { outsideDomain } from './outside-domain';
import type { Complex, DoubleKernel } from './special-function';
import { turnToTheRight } from './triple-sine-lattice';

/** log(1/eps) with a margin of 3. */
const DEPTH = 40;
/** The lattice product serves arguments up to so many largest periods; further out its points are too many. */
const LATTICE_REACH = 12;

/**
 * log S_3(x | w) in doubles for complex periods in an open half plane: the lattice product (`logTripleSineByLattice`), and
 * the limits -+(i pi/6) B_33(x | w) where Im(x/w_i) is large for all periods. Further out between the zeros there is no
 * value: NaN. A logarithm of the right number: the imaginary part may be off by multiples of 2 pi.
 * Error: below 2e-14 of max(1, |log S_3|, |x d log S_3/dx|).
 */
export function complexTripleSineKernel(given: readonly Complex[]): DoubleKernel {
  const turn = given.length === 3 ? turnToTheRight(given) : null;
  if (turn === null) return outsideDomain;
  const values = given.map((w) => multiply(w, turn));
  const periods = values.map(parameterOfComplex);
  const center = latticeCenter(periods);
  if (center === null) return outsideDomain;
  const product = latticeLogarithm(periods);
  const half = scale(values.reduce(add), 0.5);
  const volume = values.reduce(multiply);
  const squares = scale(values.map((w) => multiply(w, w)).reduce(add), 0.25);
  const reach = LATTICE_REACH * Math.max(...values.map((w) => Math.hypot(w.re, w.im)));
  const valueAt = (z: DoubleComplex): Complex => {
    const heights = values.map((w) => 2 * Math.PI * divide(z, w).im);
    const up = Math.min(...heights) > DEPTH;
    if (up || Math.max(...heights) < -DEPTH) {
      const cubic = divide(multiply(multiply(z, z), z), volume);
      const linear = divide(multiply(squares, z), volume);
      const limit = scale(subtract(cubic, linear), Math.PI / 6);
      // -i times the limit above, i times it below.
      return up ? { re: limit.im, im: -limit.re } : { re: -limit.im, im: limit.re };
    }
    if (!(Math.hypot(z.re, z.im) <= reach)) return { re: Number.NaN, im: Number.NaN };
    const log = product(z.re, z.im);
    return { re: log.re - 2 * center.re, im: log.im - 2 * center.im };
  };
  return {
    addLog: (xRe, xIm, power, outRe, outIm) => {
      for (let k = 0; k < xRe.length; k++) {
        const x = { re: xRe[k] as number, im: xIm === null ? 0 : (xIm[k] as number) };
        const value = valueAt(subtract(multiply(x, turn), half));
        outRe[k] = (outRe[k] as number) + power * value.re;
        outIm[k] = (outIm[k] as number) + power * value.im;
      }
    },
  };
}
