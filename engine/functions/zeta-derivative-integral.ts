import {
  addBalls,
  type Ball,
  exactBall,
  integerPowerBall,
  logBall,
  multiplyBalls,
  subtractBalls,
} from '../arithmetic/ball';
import { numberFromFixed } from '../arithmetic/fixed';
import { integerPowerComplex, multiplyComplex } from '../arithmetic/fixed-complex';
import { piBall } from './enclosure';
import { sechIntegral, stepsToRight } from './sech-quadrature';

/**
 * zeta'(-k, a) without Euler-Maclaurin: steps to the right, and there, from zeta(s, a) = (pi/2) int w^{1-s}/(s - 1)/cosh^2(pi v) dv
 * with w = a - 1/2 + iv (see `sechIntegral`),
 *   zeta'(-k, a) = (pi/2) int w^{k+1} (log w - 1/(k+1))/(k+1)/cosh^2(pi v) dv.
 * Logarithms as in `derivativeBall`. Null where a step meets 0.
 */
export function derivativeByIntegral(k: number, a: Ball, precision: number): Ball | null {
  const steps = stepsToRight(a);
  const size = Math.hypot(numberFromFixed(a.re, a.bits), numberFromFixed(a.im, a.bits)) + 15;
  const growth = Math.ceil((k + 1) * Math.log2(size + precision / 8) + 8);
  const wide = precision + growth + 16;
  let sum = exactBall(0n);
  for (let n = 0; n < steps; n++) {
    const at = addBalls(a, exactBall(BigInt(n)), wide + 32);
    const log = logarithm(at, wide);
    if (log === null) return null;
    const power = k === 0 ? exactBall(1n) : integerPowerBall(at, k, wide);
    if (power === null) return null;
    sum = addBalls(sum, multiplyBalls(power, log, wide), wide);
  }
  const far = addBalls(a, exactBall(BigInt(steps)), wide + 32);
  const order = BigInt(k + 1);
  const slope = (k + 1) * size ** k * (Math.log(size) + 5) + Math.log(size) + 5;
  const integral = sechIntegral(
    far,
    {
      value: (w, log, bits) => {
        const bracket = { re: log.re - (1n << BigInt(bits)) / order, im: log.im };
        const value = multiplyComplex(integerPowerComplex(w, k + 1, bits), bracket, bits);
        return { re: value.re / order, im: value.im / order };
      },
      derivative: (w, log, bits) => multiplyComplex(integerPowerComplex(w, k, bits), log, bits),
    },
    growth,
    slope,
    precision,
  );
  return subtractBalls(integral, sum, wide);
}

/** Principal; +i pi for a ball on the negative real axis. */
function logarithm(a: Ball, precision: number): Ball | null {
  if (a.im !== 0n || a.re > 0n) return logBall(a, precision);
  const size = logBall({ ...a, re: -a.re }, precision);
  return size && addBalls(size, multiplyBalls(piBall(precision), exactBall(0n, 1n), precision), precision);
}
