import type { DoubleKernel } from './special-function';

/** The kernel of a function at parameters it is not defined for: every entry becomes NaN. */
export const outsideDomain: DoubleKernel = {
  addLog: (_xRe, _xIm, _power, outRe, outIm) => {
    outRe.fill(Number.NaN);
    outIm.fill(Number.NaN);
  },
};
