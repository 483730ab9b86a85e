import { numberFromFixed } from '../arithmetic/fixed';
import type { FixedComplex } from '../arithmetic/fixed-complex';
import { Form } from '../exact/form';
import { logGammaKernel } from './log-gamma-double';
import { logGammaPrecise } from './log-gamma-precise';
import { logGammaBySpouge } from './log-gamma-spouge';
import { parenthesised, realFirst } from './notation';
import type { Complex, DoubleKernel, ExactParameter, PreciseLog, SpecialFunction } from './special-function';

const HALF = Form.ratio(1, 2);

/**
 * g(x; n) = Gamma(x + |n|/2) / Gamma(1 - x + |n|/2) for integer n: what a chiral multiplet gives on the two-sphere in
 * flux n. Even in n. Poles at -|n|/2 - k, zeros at 1 + |n|/2 + k, k >= 0; g(x; n) g(1 - x; n) = 1;
 * g(x + 1; n) = (|n|/2 + x)(|n|/2 - x) g(x; n). Written with |n| no zero of one Gamma meets a pole of the other.
 * Sources: F. Benini, S. Cremonesi, arXiv:1206.2356; N. Doroud, J. Gomis, B. Le Floch, S. Lee, arXiv:1206.2606.
 */
export const fluxGamma: SpecialFunction = {
  name: 'fluxGamma',
  spelling: '',
  parameters: ['n'],
  reflections: [{ center: () => HALF, power: -1, sign: 1 }],
  mirror: (x) => x.conjugate(),
  shifts: [
    {
      step: () => Form.one,
      quotient: (x, [n]) => [
        { name: 'linear', argument: halfSize(n as Form).add(x), parameters: [], power: 1 },
        { name: 'linear', argument: halfSize(n as Form).sub(x), parameters: [], power: 1 },
      ],
    },
  ],
  zeros: [
    { kind: 'pole', start: ([n]) => halfSize(n as Form).neg(), steps: () => [Form.one.neg()] },
    { kind: 'zero', start: ([n]) => Form.one.add(halfSize(n as Form)), steps: () => [Form.one] },
  ],
  growth: [],
  // Stirling, DLMF 5.11.1, for both; log(-z) = log z -+ i pi above and below the real axis.
  logarithmicGrowth: [Form.i.neg(), Form.i].map((direction) => ({
    direction,
    about: () => HALF,
    polynomial: (z, [n]) =>
      direction
        .mul(Form.pi)
        .mul(z.sub(halfSize(n as Form)))
        .sub(z.scale(2)),
    logarithm: (z) => z.scale(2),
  })),
  notations: [
    {
      label: '\\Gamma',
      latex: (x, [n], print) => {
        const above = realFirst(x.add(halfSize(n as Form)), print);
        const below = realFirst(Form.one.sub(x).add(halfSize(n as Form)), print);
        return `\\frac{\\Gamma${parenthesised(above)}}{\\Gamma${parenthesised(below)}}`;
      },
      definition: () => '\\Gamma(x)=\\int_0^\\infty t^{x-1}e^{-t}\\,dt',
    },
  ],
  modes: (x, [n], print) => {
    const above = realFirst(Form.one.sub(x).add(halfSize(n as Form)), print);
    const below = realFirst(x.add(halfSize(n as Form)), print);
    return `\\prod_{k\\ge0}\\frac{k+${above}}{k+${below}}`;
  },
  elementary: false,
  doubleError: () => 6e-15,
  double: ([n]) => kernel(n as Complex),
  precise: (x, [n], bits) => quotient(x, n as ExactParameter, bits, logGammaPrecise),
  crossCheck: (x, [n], bits) => ({
    route: "Spouge's approximation",
    log: quotient(x, n as ExactParameter, bits, logGammaBySpouge),
  }),
  sources: [
    { key: 'Benini-Cremonesi-2012', text: 'F. Benini, S. Cremonesi, arXiv:1206.2356 (2012)' },
    { key: 'DGLL-2012', text: 'N. Doroud, J. Gomis, B. Le Floch, S. Lee, arXiv:1206.2606 (2012)' },
  ],
};

/** |n|/2. */
function halfSize(n: Form): Form {
  return Form.call('abs', n).mul(HALF);
}

function kernel(n: Complex): DoubleKernel {
  const gamma = logGammaKernel();
  const half = Math.abs(n.re) / 2;
  return {
    addLog: (xRe, xIm, power, outRe, outIm) => {
      const shifted = xRe.map((re) => re + half);
      gamma.addLog(shifted, xIm, power, outRe, outIm);
      const mirrored = xRe.map((re) => 1 - re + half);
      gamma.addLog(mirrored, xIm?.map((im) => -im) ?? null, -power, outRe, outIm);
    },
  };
}

/** The difference of two log Gammas; x + |n|/2 is exact for integer n. */
function quotient(
  x: FixedComplex,
  n: ExactParameter,
  bits: number,
  logGamma: (z: FixedComplex, bits: number) => PreciseLog,
): PreciseLog {
  const size = BigInt(Math.round(Math.abs(numberFromFixed(n.value(4).re, 4))));
  const half = size << BigInt(bits - 1);
  const above = logGamma({ re: x.re + half, im: x.im }, bits);
  const below = logGamma({ re: (1n << BigInt(bits)) - x.re + half, im: -x.im }, bits);
  if (above.kind !== 'value') return above;
  if (below.kind === 'value') {
    return { kind: 'value', re: above.re - below.re, im: above.im - below.im, error: above.error + below.error };
  }
  if (below.kind === 'indistinct' || below.kind === 'unreachable') return below;
  return { kind: below.kind === 'pole' ? 'zero' : 'pole', order: below.order };
}
