import type { DoubleKernel } from './special-function';

/**
 * log Gamma(z) in doubles, Gamma(z) = int_0^oo t^{z-1} e^{-t} dt (DLMF 5.2.1).
 *
 * Branch: the one that is real on the positive axis and analytic off the negative one; on the negative axis the limit
 * from above. Poles 0, -1, -2, ... give +Infinity when z is one within 4 units of 2^-53.
 * Method: Re z < 1/2 by the reflection Gamma(z) Gamma(1-z) = pi/sin(pi z) (DLMF 5.5.3) with pi z reduced modulo pi;
 * else shifts to |z| >= 6, one logarithm for their product, and 13 terms of Stirling's series (DLMF 5.11.1; the first
 * one left out is below 1e-16).
 * Error: below 4e-15 of max(1, |log Gamma|, |z psi(z)|); measured against mpmath (test/fixtures/functions/gamma.py).
 */
export function logGammaKernel(): DoubleKernel {
  const value = new Float64Array(2);
  return {
    addLog: (xRe, xIm, power, outRe, outIm) => {
      for (let k = 0; k < xRe.length; k++) {
        logGammaDouble(xRe[k] as number, xIm === null ? 0 : (xIm[k] as number), value);
        outRe[k] = (outRe[k] as number) + power * (value[0] as number);
        outIm[k] = (outIm[k] as number) + power * (value[1] as number);
      }
    },
  };
}

/** log Gamma(a + i c), written to out[0] + i out[1]. */
export function logGammaDouble(a: number, c: number, out: Float64Array): void {
  if (a >= 0.5) {
    if (c === 0) {
      out[0] = realRight(a);
      out[1] = 0;
      return;
    }
    complexRight(a, c, out);
    return;
  }
  reflected(a, Math.abs(c), out);
  if (c < 0) out[1] = -(out[1] as number);
}

/** Re z < 1/2, Im z = c >= 0: log 2pi - log(2 sin pi z) - log Gamma(1 - z), 2 sin pi z = i e^{-i pi z} (1 - e^{2 pi i z}). */
function reflected(a: number, c: number, out: Float64Array): void {
  const nearest = Math.round(a);
  const offset = a - nearest;
  if (nearest <= 0 && Math.abs(offset) + c <= POLE_WIDTH * (Math.abs(a) + c)) {
    out[0] = Number.POSITIVE_INFINITY;
    out[1] = 0;
    return;
  }
  if (c === 0) {
    out[0] = Math.log(Math.PI / Math.abs(Math.sin(Math.PI * offset))) - realRight(1 - a);
    // Limit from above: the argument grows by -pi at each pole passed to the left.
    out[1] = Math.PI * Math.floor(a);
    return;
  }
  const decay = Math.exp(-2 * Math.PI * c);
  const half = Math.sin(Math.PI * offset);
  const factorRe = 2 * decay * half * half - Math.expm1(-2 * Math.PI * c);
  const factorIm = -decay * Math.sin(2 * Math.PI * offset);
  complexRight(1 - a, -c, out);
  const modulus =
    c > 0.25
      ? 0.5 * Math.log1p((factorRe - 1) * (factorRe + 1) + factorIm * factorIm)
      : Math.log(Math.hypot(factorRe, factorIm));
  out[0] = LOG_TWO_PI - Math.PI * c - modulus - (out[0] as number);
  out[1] = Math.PI * (a - 0.5) - Math.atan2(factorIm, factorRe) - (out[1] as number);
}

function realRight(a: number): number {
  let z = a;
  let product = 1;
  while (z < FAR) {
    product *= z;
    z += 1;
  }
  const inverse = 1 / z;
  const square = inverse * inverse;
  let tail = 0;
  for (let j = STIRLING.length - 1; j >= 0; j--) tail = tail * square + (STIRLING[j] as number);
  return (z - 0.5) * (Math.log(z) - 1) + (HALF_LOG_TWO_PI_LESS - Math.log(product) + tail * inverse);
}

function complexRight(a: number, c: number, out: Float64Array): void {
  let re = a;
  let productRe = 1;
  let productIm = 0;
  let winding = 0;
  const square = c * c;
  for (; re * re + square < FAR * FAR; re += 1) {
    const nextRe = productRe * re - productIm * c;
    const nextIm = productRe * c + productIm * re;
    // Each factor turns by less than pi/2 to the side of c.
    if (c > 0 && productIm >= 0 && nextIm < 0) winding++;
    else if (c < 0 && productIm <= 0 && nextIm > 0) winding--;
    productRe = nextRe;
    productIm = nextIm;
  }
  const norm = 1 / (re * re + square);
  const inverseRe = re * norm;
  const inverseIm = -c * norm;
  const stepRe = inverseRe * inverseRe - inverseIm * inverseIm;
  const stepIm = 2 * inverseRe * inverseIm;
  let tailRe = 0;
  let tailIm = 0;
  for (let j = STIRLING.length - 1; j >= 0; j--) {
    const nextRe = tailRe * stepRe - tailIm * stepIm + (STIRLING[j] as number);
    tailIm = tailRe * stepIm + tailIm * stepRe;
    tailRe = nextRe;
  }
  const logRe = 0.5 * Math.log(re * re + square) - 1;
  const logIm = Math.atan2(c, re);
  out[0] =
    (re - 0.5) * logRe -
    c * logIm +
    (HALF_LOG_TWO_PI_LESS -
      0.5 * Math.log(productRe * productRe + productIm * productIm) +
      (tailRe * inverseRe - tailIm * inverseIm));
  out[1] =
    (re - 0.5) * logIm +
    c * logRe +
    (tailRe * inverseIm + tailIm * inverseRe - Math.atan2(productIm, productRe) - 2 * Math.PI * winding);
}

const POLE_WIDTH = 4 * 2 ** -53;
/** Stirling's series starts from here. */
const FAR = 6;
const LOG_TWO_PI = Math.log(2 * Math.PI);
/** log(2 pi)/2 - 1/2: (z - 1/2) log z - z + log(2 pi)/2 = (z - 1/2)(log z - 1) + this. */
const HALF_LOG_TWO_PI_LESS = 0.5 * LOG_TWO_PI - 0.5;

/** B_{2j}/(2j (2j - 1)), j = 1 .. 13. */
const STIRLING: readonly number[] = [
  1 / 12,
  -1 / 360,
  1 / 1260,
  -1 / 1680,
  1 / 1188,
  -691 / 360360,
  1 / 156,
  -3617 / 122400,
  43867 / 244188,
  -174611 / 125400,
  77683 / 5796,
  -236364091 / 1506960,
  657931 / 300,
];
