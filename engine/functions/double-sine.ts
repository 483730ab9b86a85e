import type { FixedComplex } from '../arithmetic/fixed-complex';
import { Form } from '../exact/form';
import { logDoubleSineClosed } from './double-sine-closed';
import { complexDoubleSineKernel } from './double-sine-complex-double';
import { doubleSineKernel } from './double-sine-double';
import { logDoubleSineByMidpoint } from './double-sine-midpoint';
import { doubleSineModes, doubleSineNotations } from './double-sine-notations';
import { periodOfParameter } from './double-sine-period';
import { logDoubleSine, logDoubleSineByOtherStep } from './double-sine-precise';
import { logDoubleSineByProduct } from './double-sine-product';
import { outsideDomain } from './outside-domain';
import { sharedParameter } from './shared-parameter';
import type {
  Complex,
  DoubleKernel,
  ExactParameter,
  FunctionAt,
  PreciseLog,
  SpecialFunction,
} from './special-function';

const HALF = Form.ratio(1, 2);

/**
 * The double sine s_b(x) = prod_{m,n>=0} (m b + n/b + Q/2 - i x)/(m b + n/b + Q/2 + i x), Q = b + 1/b, zeta-regularised:
 *   log s_b(x) = -i int_0^oo dt/t [ sin(2xt)/(2 sinh(bt) sinh(t/b)) - x/t ],  |Im x| < Q/2.
 * Poles i (Q/2 + m b + n/b), zeros at the opposite points; s_b(x) s_b(-x) = 1, s_b = s_{1/b},
 * s_b(x - i b/2) = 2 cosh(pi b x) s_b(x + i b/2), s_b(i Q/2 + e) = 1/(2 pi i e) + O(1).
 * Parameter: b > 0, or complex b with Re b > 0.
 */
export const doubleSine: SpecialFunction = {
  name: 'doubleSine',
  spelling: 'doublesine',
  parameters: ['b'],
  reflections: [{ center: () => Form.zero, power: -1, sign: 1 }],
  mirror: (x) => x.conjugate().neg(),
  shifts: [
    { step: ([b]) => Form.i.mul(b as Form), quotient: (x, [b]) => [inverseCosh(x, b as Form)] },
    { step: ([b]) => Form.i.div(b as Form), quotient: (x, [b]) => [inverseCosh(x, (b as Form).inverse())] },
  ],
  zeros: [
    {
      kind: 'zero',
      start: ([b]) => halfPeriod(b as Form).neg(),
      steps: ([b]) => [Form.i.mul(b as Form).neg(), Form.i.div(b as Form).neg()],
    },
    {
      kind: 'pole',
      start: ([b]) => halfPeriod(b as Form),
      steps: ([b]) => [Form.i.mul(b as Form), Form.i.div(b as Form)],
    },
  ],
  growth: [
    { direction: Form.one, logarithm: (x, [b]) => quadratic(x, b as Form) },
    { direction: Form.one.neg(), logarithm: (x, [b]) => quadratic(x, b as Form).neg() },
  ],
  notations: doubleSineNotations,
  modes: doubleSineModes,
  elementary: false,
  doubleError: ([b]) => (b?.im === 0 ? 4e-15 : 6e-14),
  double: ([b]) => doubleKernel(b as Complex),
  precise: (x, [b], bits) => preciseLog(x, sharedParameter(b as ExactParameter, bits), bits),
  crossCheck: (x, [b], bits) => secondRoute(x, sharedParameter(b as ExactParameter, bits), bits),
  sources: [
    {
      key: 'Kurokawa-Koyama-2003',
      text: 'N. Kurokawa, S. Koyama, Forum Math. 15 (2003) 839: multiple sine functions',
    },
    { key: 'Faddeev-Kashaev-Volkov-2001', text: 'L. Faddeev, R. Kashaev, A. Volkov, hep-th/0006156' },
    { key: 'HHL-2011', text: 'N. Hama, K. Hosomichi, S. Lee, arXiv:1102.4716 (2011)' },
  ],
};

function doubleKernel(b: Complex): DoubleKernel {
  if (!(b.re > 0) || !Number.isFinite(b.re) || !Number.isFinite(b.im)) return outsideDomain;
  return b.im === 0 ? doubleSineKernel(b.re) : complexDoubleSineKernel(b);
}

/** Real b > 0 by the midpoint rule with residues, complex b by the q-products. */
function preciseLog(x: FixedComplex, b: ExactParameter, bits: number): PreciseLog {
  const period = periodOfParameter(b);
  if (period !== null) return logDoubleSine(x, period, bits);
  if (!(b.approx.re > 0)) return { kind: 'unreachable', says: 'the real part of b must be positive' };
  return (
    logDoubleSineByProduct(x, b, bits) ?? {
      kind: 'unreachable',
      says: 'b squared is too nearly real for its q-products',
    }
  );
}

/** p + q up to which the closed form at b^2 = p/q is quick. */
const SIMPLE_RATIO = 12n;

function secondRoute(
  x: FixedComplex,
  b: ExactParameter,
  bits: number,
): { readonly route: string; readonly log: PreciseLog } | null {
  const period = periodOfParameter(b);
  if (period === null) return null;
  if (b.square !== null && b.square.numerator + b.square.denominator <= SIMPLE_RATIO) {
    const log = logDoubleSineClosed(x, period, bits);
    if (log !== null) return { route: 'closed form in dilogarithms at rational b squared', log };
  }
  const midpoint = logDoubleSineByMidpoint(x, b, bits);
  if (midpoint !== null) return { route: 'midpoint rule without residues', log: midpoint };
  const other = logDoubleSineByOtherStep(x, period, bits);
  return other && { route: 'midpoint rule with another step', log: other };
}

/** s_b(x + i p)/s_b(x) = 1/(2 cosh(pi p (x + i p/2))) for p = b and p = 1/b. */
function inverseCosh(x: Form, period: Form): FunctionAt {
  const argument = period.mul(x.add(Form.i.mul(period).mul(HALF)));
  return { name: 'hyperbolicCosine', argument, parameters: [], power: -1 };
}

/** i Q/2. */
function halfPeriod(b: Form): Form {
  return Form.i.mul(b.add(b.inverse())).mul(HALF);
}

/** (i pi/2)(x^2 + (b^2 + b^-2)/12): the limit of log s_b(x) for Re x -> +infinity, up to e^{-2 pi min(b, 1/b) Re x}. */
function quadratic(x: Form, b: Form): Form {
  const constant = b.pow(2).add(b.inverse().pow(2)).mul(Form.ratio(1, 12));
  return Form.i.mul(Form.pi).mul(HALF).mul(x.mul(x).add(constant));
}
