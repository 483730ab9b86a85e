import { add, type DoubleComplex, divide, log, multiply, scale, subtract } from '../arithmetic/double-complex';
import { complexDoubleSineKernel } from './double-sine-complex-double';
import { oddComplexKernelSeries } from './hyperbolic-series';
import { inverseParameter } from './inverse-parameter';
import { latticeCenter, latticeLogarithm, parameterOfComplex, TABLE_BITS } from './lattice-kernel-double';
import { latticeReach, WIDEST } from './lattice-table';
import { outsideDomain } from './outside-domain';
import type { Complex, DoubleKernel } from './special-function';

/** Terms of the expansion of the double Gamma function far out. */
const FAR_TERMS = 16;

/**
 * log Upsilon_b(x) in doubles for complex b with Re b > 0, as in `logUpsilon`: the lattice product, and far out the
 * expansion of the double Gamma function with the double sine. A logarithm of the right number: the imaginary part may be
 * off by multiples of 2 pi. Error: below 2e-14 of max(1, |log Upsilon|, |x d log Upsilon/dx|).
 */
export function complexUpsilonKernel(b: Complex): DoubleKernel {
  const parameter = parameterOfComplex(b);
  const periods = [parameter, inverseParameter(parameter)] as const;
  const values = periods.map(({ approx }) => approx) as [Complex, Complex];
  const center = latticeCenter(periods);
  if (center === null) return outsideDomain;
  const product = latticeLogarithm(periods);
  const sine = complexDoubleSineKernel(b);
  const series = oddComplexKernelSeries(values, FAR_TERMS);
  const half = scale(add(values[0], values[1]), 0.5);
  const needed = latticeReach(TABLE_BITS);
  return {
    addLog: (xRe, xIm, power, outRe, outIm) => {
      for (let k = 0; k < xRe.length; k++) {
        let z = subtract({ re: xRe[k] as number, im: xIm === null ? 0 : (xIm[k] as number) }, half);
        if (z.re < 0) z = { re: -z.re, im: -z.im };
        const value = isFarOut(z, values, needed) ? far(z, center, series, sine) : product(z.re, z.im);
        outRe[k] = (outRe[k] as number) + power * value.re;
        outIm[k] = (outIm[k] as number) + power * value.im;
      }
    },
  };
}

/** 2 log Gamma_2(Q/2); NaN where it is out of reach. */
export function complexUpsilonConstant(b: Complex): Complex {
  const parameter = parameterOfComplex(b);
  const center = latticeCenter([parameter, inverseParameter(parameter)]);
  return center === null ? { re: Number.NaN, im: Number.NaN } : scale(center, 2);
}

function isFarOut(z: DoubleComplex, periods: readonly Complex[], needed: number): boolean {
  return periods.every((p) => {
    const ratio = divide(z, p);
    const size = Math.hypot(ratio.re, ratio.im);
    return ratio.re > -WIDEST * size && size * (size + ratio.re) >= 2 * needed * needed;
  });
}

/** 2 log Gamma_2(Q/2) - 2 log Gamma_2(Q/2 + z) - log s_b(iz), see `farUpsilon`; d_i of (t/2)^2/(sinh sinh) by 4^-i. */
function far(z: DoubleComplex, center: Complex, series: readonly DoubleComplex[], sine: DoubleKernel): Complex {
  const logarithm = log(z);
  const square = multiply(z, z);
  const inverse = divide({ re: 0.25, im: 0 }, square);
  let gamma = scale(multiply(square, subtract({ re: 1.5, im: 0 }, logarithm)), 0.5);
  gamma = subtract(gamma, scale(multiply(series[1] as DoubleComplex, logarithm), 0.25));
  // d_i (2i-3)! z^{2-2i} = series_i/4 (2i-3)! (1/(4 z^2))^{i-1}.
  let power: DoubleComplex = { re: 0.25, im: 0 };
  for (let i = 2; i < series.length; i++) {
    power = scale(multiply(power, inverse), i === 2 ? 1 : (2 * i - 4) * (2 * i - 3));
    gamma = add(gamma, multiply(series[i] as DoubleComplex, power));
  }
  const re = new Float64Array(1);
  const im = new Float64Array(1);
  sine.addLog(Float64Array.of(-z.im), Float64Array.of(z.re), 1, re, im);
  return {
    re: 2 * (center.re - gamma.re) - (re[0] as number),
    im: 2 * (center.im - gamma.im) - (im[0] as number),
  };
}
