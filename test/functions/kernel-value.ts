import type { Complex, DoubleKernel } from '../../engine/functions/special-function';

/** log f at one point. */
export function kernelValue(kernel: DoubleKernel, re: number, im: number): Complex {
  const outRe = new Float64Array(1);
  const outIm = new Float64Array(1);
  kernel.addLog(Float64Array.of(re), Float64Array.of(im), 1, outRe, outIm);
  return { re: outRe[0] as number, im: outIm[0] as number };
}
