import { formDouble } from '../../arithmetic/form-double';
import { Form } from '../../exact/form';
import { Rational } from '../../exact/rational';
import type { Printer } from '../../functions/special-function';
import type { Theory } from '../theory';
import type { Condition, Finding } from './condition';
import { type BranchRay, type CoulombBranch, coulombBranch } from './coulomb-branch';
import { directionLatex } from './direction';
import { form, hessian, isPositive } from './prepotential';
import { decimal, rationalLatex } from './words';

const PREPOTENTIAL =
  '6F(n)=\\kappa\\operatorname{Tr}n^3+\\tfrac{1}{2}\\sum_{\\alpha}|\\alpha(n)|^3-\\tfrac{1}{2}\\sum_{\\text{hypers}}\\sum_w|w(n)|^3';
const SOURCE =
  'N. Seiberg, hep-th/9608111 (1996); K. Intriligator, D. R. Morrison, N. Seiberg, hep-th/9702198 (1997); for weaker ' +
  'conditions P. Jefferson, H.-C. Kim, C. Vafa, G. Zafrir, arXiv:1705.04305 (2017)';

/** Rays up to this number are taken three at a time. */
const TRIPLE_LIMIT = 40;
const TOLERANCE = 1e-9;

interface Ray {
  readonly ray: BranchRay;
  readonly matrix: readonly (readonly number[])[];
  /** Six times the prepotential. */
  readonly value: number;
}

function raysOf(theory: Theory, branch: CoulombBranch): Ray[] {
  return branch.rays.map((ray) => {
    const matrix = hessian(theory, branch, ray);
    return { ray, matrix, value: form(matrix, ray.point, ray.point) };
  });
}

/** Convexity of the prepotential at infinite coupling, masses zero. */
export const convexity: Condition = {
  id: 'prepotential',
  title: 'Convexity of the prepotential',
  examine: (theory, print) =>
    onBranch(theory, (branch) => {
      const broken = raysOf(theory, branch).find(({ matrix }) => !isPositive(matrix));
      const common = { formula: `\\partial_i\\partial_jF\\geq0,\\quad ${PREPOTENTIAL}`, source: SOURCE };
      if (broken === undefined) {
        const says =
          'The prepotential at infinite coupling is convex on the whole Weyl chamber: a fixed point is possible there ($1/g^2=0$).';
        return { ...common, verdict: 'holds', says };
      }
      const direction = directionLatex(theory, branch, broken.ray.point, print);
      const says =
        `The prepotential at infinite coupling is not convex: along $${direction}$ its Hessian has a negative eigenvalue; ` +
        'a fixed point would have to leave out part of the Weyl chamber.';
      return { ...common, verdict: 'fails', says };
    }),
};

/**
 * Convergence of the perturbative integral on the five-sphere: the integrand falls as
 * exp(-2 pi F(n) r^3/(w1 w2 w3)), w1 w2 w3 with a positive real part, and as the Gaussian of the coupling where F vanishes.
 */
export const cubicConvergence: Condition = {
  id: 'convergence',
  title: 'Convergence of the integral',
  examine: (theory, print) => onBranch(theory, (branch) => convergenceFinding(theory, branch, print)),
};

function onBranch(theory: Theory, examine: (branch: CoulombBranch) => Finding): Finding[] {
  if (!theory.groups.some(({ role }) => role === 'gauge')) return [];
  const branch = coulombBranch(theory);
  if (branch !== null) return [examine(branch)];
  const says = 'The Coulomb branch has too many cones to follow the prepotential ($F$) on all of them.';
  return [{ verdict: 'unknown', says, formula: PREPOTENTIAL, source: SOURCE }];
}

function convergenceFinding(theory: Theory, branch: CoulombBranch, print: Printer): Finding {
  const rays = raysOf(theory, branch);
  const lowest = rays.reduce((best, one) => (one.value < best.value ? one : best));
  const where = `$${directionLatex(theory, branch, lowest.ray.point, print)}$`;
  const value = `$F=${prepotentialLatex(lowest.value)}$`;
  const common = {
    formula: `F(n)>0,\\quad ${PREPOTENTIAL}`,
    source: `${SOURCE}; J. Källén, J. Qiu, M. Zabzine, arXiv:1206.6008 (2012)`,
  };
  const say = (verdict: Finding['verdict'], says: string): Finding => ({ ...common, verdict, says });
  if (!(fallOff(theory) > 0)) {
    const volume = '\\operatorname{Re}\\frac{1}{\\omega_1\\omega_2\\omega_3}\\leq0';
    return rays.some(({ value: along }) => along > TOLERANCE)
      ? say(
          'fails',
          `At these periods $${volume}$: over real Coulomb parameters the perturbative integral diverges where $F>0$; the contour would have to be turned.`,
        )
      : say(
          'unknown',
          `At these periods $${volume}$; what this makes of the perturbative integral was not worked out.`,
        );
  }
  if (lowest.value < -TOLERANCE) {
    return say('fails', `The perturbative integral diverges along ${where}, where the cubic prepotential is ${value}.`);
  }
  if (lowest.value <= TOLERANCE) {
    const coupled = theory.groups.every(({ role, coupling }) => role !== 'gauge' || coupling !== null);
    return coupled
      ? say(
          'holds',
          `The cubic prepotential vanishes along ${where} (${value}); there the Gaussian of the coupling makes the perturbative integral converge.`,
        )
      : say(
          'fails',
          `The cubic prepotential vanishes along ${where} (${value}), and no coupling is written that would make the perturbative integral converge there.`,
        );
  }
  if (!positiveOnCones(rays)) {
    return say(
      'unknown',
      `The cubic prepotential is positive on all rays, at least ${value} along ${where}, but that it is positive between them was not shown.`,
    );
  }
  const volume = theory.round ? '' : '/(\\omega_1\\omega_2\\omega_3)';
  return say(
    'holds',
    `The perturbative integral converges; it falls slowest along ${where}, as $e^{-2\\pi F r^3${volume}}$ with ${value}.`,
  );
}

/** Re 1/(w1 w2 w3), with which the prepotential enters the exponent: growth of S_3, A. Narukawa, math/0306164. */
function fallOff({ geometry }: Theory): number {
  const volume = [...geometry.values()].reduce((product, period) => product.mul(period), Form.one);
  return formDouble(volume, () => null)?.re ?? Number.NaN;
}

function prepotentialLatex(value: number): string {
  const scaled = value * 12;
  return Math.abs(scaled - Math.round(scaled)) < TOLERANCE
    ? rationalLatex(Rational.of(Math.round(scaled), 72))
    : decimal(value / 6);
}

/** All coefficients of the cubic on every cone are non-negative, which with positive values on the rays suffices. */
function positiveOnCones(rays: readonly Ray[]): boolean {
  if (rays.every(({ matrix }) => isPositive(matrix))) return true;
  if (rays.length > TRIPLE_LIMIT) return false;
  return rays.every(({ matrix, ray: x }) =>
    rays.every(
      ({ ray: y }) =>
        !sameCone(x, y) ||
        rays.every(({ ray: z }) => !sameCone(x, z) || !sameCone(y, z) || form(matrix, y.point, z.point) >= -TOLERANCE),
    ),
  );
}

function sameCone(a: BranchRay, b: BranchRay): boolean {
  return a.signs.every((sign, k) => sign * (b.signs[k] as number) >= 0);
}
