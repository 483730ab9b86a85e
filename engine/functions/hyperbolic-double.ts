import type { DoubleKernel } from './special-function';

/**
 * log of 2 sinh(pi x) (shift 0) or 2 cosh(pi x) (shift 1/2) in doubles on arrays.
 *
 * 2 sinh(pi x) = e^{pi x} (1 - e^{-2 pi x}) and 2 cosh(pi x) = e^{pi x} (1 + e^{-2 pi x}) with principal logarithms for
 * Re x >= 0; for Re x < 0 by oddness (+ i pi) or evenness. The phase pi Im x is reduced modulo 1 before it is
 * multiplied by pi, so zeros keep their relative distance: error 2e-16 max(1, |log|, |x| / distance to the next zero).
 * At a zero within 4 units of 2^-53 of |x| the real part is -Infinity.
 */
export function hyperbolicKernel(shift: 0 | 0.5): DoubleKernel {
  const negative = shift === 0 ? Math.PI : 0;
  return {
    addLog: (xRe, xIm, power, outRe, outIm) => {
      for (let k = 0; k < xRe.length; k++) {
        const re = xRe[k] as number;
        const a = Math.abs(re);
        const decay = Math.exp(-2 * Math.PI * a);
        const y = xIm === null ? 0 : (xIm[k] as number);
        if (y === 0) {
          const log = shift === 0 ? Math.log(-Math.expm1(-2 * Math.PI * a)) : Math.log1p(decay);
          outRe[k] = (outRe[k] as number) + power * (Math.PI * a + log);
          if (re < 0) outIm[k] = (outIm[k] as number) + power * negative;
          continue;
        }
        // For Re x < 0 the point is -x, with imaginary part -y.
        const height = re < 0 ? -y : y;
        const shifted = height - shift;
        const offset = shifted - Math.round(shifted);
        const half = Math.sin(Math.PI * offset);
        const lessOne = -Math.expm1(-2 * Math.PI * a);
        const factorRe = lessOne + 2 * decay * half * half;
        const factorIm = decay * Math.sin(2 * Math.PI * offset);
        const zero = a + Math.abs(offset) <= ZERO_WIDTH * (a + Math.abs(y));
        const size = factorRe * factorRe + factorIm * factorIm;
        const log = zero
          ? Number.NEGATIVE_INFINITY
          : 0.5 * (a > 1 ? log1pOfSquare(factorRe, factorIm) : Math.log(size));
        outRe[k] = (outRe[k] as number) + power * (Math.PI * a + log);
        const phase = Math.PI * height + Math.atan2(factorIm, factorRe) + (re < 0 ? negative : 0);
        outIm[k] = (outIm[k] as number) + power * phase;
      }
    },
  };
}

const ZERO_WIDTH = 4 * 2 ** -53;

/** log(re^2 + im^2) near 1. */
function log1pOfSquare(re: number, im: number): number {
  return Math.log1p((re - 1) * (re + 1) + im * im);
}
