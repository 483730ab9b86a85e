import { addBalls, type Ball, exactBall, logBall, multiplyBalls, subtractBalls } from '../arithmetic/ball';
import { logBarnesGamma } from './barnes-gamma';
import { argumentBall, enclosed, exactZero, halfBall, piBall, wholeNumber, widened } from './enclosure';
import { logGammaPrecise } from './log-gamma-precise';
import type { ExactParameter } from './special-function';
import type { FunctionValue, ValueFunction } from './value-function';
import { derivativeBall } from './zeta-derivative';

const LARGEST = 10_000;

/**
 * The Barnes function G: G(z + 1) = Gamma(z) G(z), G(1) = 1 (DLMF 5.17), |z| <= 10^4, as its logarithm; entire, zeros at
 * 0, -1, -2, .... Method: log G(z) = (z - 1) log Gamma(z) + zeta'(-1) - zeta'(-1, z) (Adamchik 2003,
 * arXiv:math/0308086). Error: some units, that of z included. The imaginary part is right up to a multiple of 2 pi.
 */
export const barnesG: ValueFunction = {
  least: 1,
  most: 1,
  definition: 'G(z+1)=\\Gamma(z)\\,G(z),\\quad G(1)=1',
  evaluate: ([z], bits) => value(z as ExactParameter, bits, byZetaDerivative),
  crossCheck: ([z], bits) => ({
    route: 'double Gamma function',
    value: value(z as ExactParameter, bits, byDoubleGamma),
  }),
  sources: [
    { key: 'DLMF-5.17', text: 'NIST Digital Library of Mathematical Functions, 5.17' },
    { key: 'Adamchik-2003', text: 'V. S. Adamchik, arXiv:math/0308086' },
  ],
};

type Compute = (z: Ball, precision: number) => Ball | null;

function value(z: ExactParameter, bits: number, compute: Compute): FunctionValue {
  const whole = wholeNumber(z);
  if (whole !== null && whole <= 0) return exactZero;
  if (Math.hypot(z.approx.re, z.approx.im) > LARGEST) {
    return { kind: 'outside', says: `The argument must be at most ${LARGEST} in size.` };
  }
  const log = enclosed(bits, (precision) => compute(argumentBall(z, precision), precision));
  return log.kind === 'value' ? { ...log, of: 'logarithm' } : log;
}

function byZetaDerivative(z: Ball, precision: number): Ball | null {
  const up = BigInt(precision - z.bits);
  const gamma = logGammaPrecise({ re: z.re << up, im: z.im << up }, precision);
  const atOne = derivativeBall(1, exactBall(1n), precision);
  const derivative = derivativeBall(1, z, precision);
  if (gamma.kind !== 'value' || atOne === null || derivative === null) return null;
  // Two units instead of one for the argument.
  const logGamma: Ball = { re: gamma.re, im: gamma.im, bits: precision, error: 2n * gamma.error };
  const less = subtractBalls(z, exactBall(1n), precision + 32);
  const wide = precision + 64;
  return addBalls(multiplyBalls(less, logGamma, wide), subtractBalls(atOne, derivative, wide), wide);
}

/** log G(z) = zeta'(-1) + (z - 1) log(2 pi)/2 - log Gamma_2(z | 1, 1). */
function byDoubleGamma(z: Ball, precision: number): Ball | null {
  const up = BigInt(precision - z.bits);
  const one = { re: 1n << BigInt(precision), im: 0n };
  const point = { re: z.re << up, im: z.im << up };
  const gamma = logBarnesGamma(point, [one, one], precision);
  const atOne = derivativeBall(1, exactBall(1n), precision);
  const logTwoPi = logBall(addBalls(piBall(precision), piBall(precision), precision), precision);
  if (gamma === null || atOne === null || logTwoPi === null) return null;
  const wide = precision + 64;
  const less = multiplyBalls(subtractBalls(z, exactBall(1n), wide), halfBall, wide);
  const lead = addBalls(atOne, multiplyBalls(less, logTwoPi, wide), wide);
  const log: Ball = { ...gamma.value, bits: precision, error: gamma.error };
  // The argument's share: |d log Gamma_2/dz| is at most |z| log |z| and a pole of order |z| next to 0, -1, ....
  return widened(subtractBalls(lead, log, wide), z.error << 24n, precision);
}
