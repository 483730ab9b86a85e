import type { Printer } from '../../functions/special-function';
import type { Theory } from '../theory';
import type { Condition, Finding } from './condition';
import { type BranchRay, type CoulombBranch, coulombBranch } from './coulomb-branch';
import { directionLatex } from './direction';
import { Fan } from './fan';
import { type Growth, growthOf } from './growth';
import { scaledLatex } from './words';

/** Below this, relative to the largest term, a number in doubles counts as zero. */
const TOLERANCE = 1e-9;

const SOURCE =
  'B. Willett, I. Yaakov, arXiv:1104.0487 (2011); F. Benini, C. Closset, S. Cremonesi, arXiv:1108.5373 (2011)';

/**
 * Convergence of the integral over the Coulomb parameters on the three-sphere, masses real: absolute where every ray of
 * the Coulomb branch has E(n) > 0; by oscillation where the levels turn the phase in all other directions; else not.
 */
export const convergence: Condition = {
  id: 'convergence',
  title: 'Convergence of the integral',
  examine: (theory, print) => {
    if (!theory.groups.some(({ role }) => role === 'gauge')) return [];
    const branch = coulombBranch(theory);
    if (branch === null)
      return [finding('unknown', 'The Coulomb branch has too many cones to test convergence.', false)];
    return [examineBranch(theory, branch, print)];
  },
};

function finding(verdict: Finding['verdict'], says: string, imaginaryFi: boolean): Finding {
  const power = imaginaryFi ? 'R_V(n)+\\tfrac{2}{Q}\\operatorname{Im}\\zeta(n)' : 'R_V(n)';
  const formula =
    `${power}>0,\\quad R_V(n)=\\tfrac{1}{2}\\sum_{w}(1-R)|w(n)|-\\sum_{\\alpha>0}|\\alpha(n)|` +
    ',\\quad\\text{else}\\quad k(n,\\cdot)+\\tfrac{1}{2}\\sum_w|w(n)|\\,w\\neq0';
  return { verdict, says, formula, source: SOURCE };
}

function examineBranch(theory: Theory, branch: CoulombBranch, print: Printer): Finding {
  const growth = growthOf(theory, branch);
  const tolerance = growth.exact ? 0 : TOLERANCE;
  const exponents = branch.rays.map(({ point, sums }) => growth.exponent(point, sums));
  const lowest = exponents.reduce((best, value, k) => (value < (exponents[best] as number) ? k : best), 0);
  const value = exponents[lowest] as number;
  const ray = branch.rays[lowest] as BranchRay;
  const direction = directionLatex(theory, branch, ray.point, print);
  const name = growth.imaginaryFi ? 'R_V+\\frac{2}{Q}\\operatorname{Im}\\zeta' : 'R_V';
  const number = `$${name}=${scaledLatex(value, growth)}$`;
  const say = (verdict: Finding['verdict'], words: string): Finding => finding(verdict, words, growth.imaginaryFi);
  if (!Number.isFinite(value)) return say('unknown', 'An R-charge or FI parameter has no finite value.');
  const power = theory.round ? '2\\pi' : '\\pi Q';
  if (value > tolerance * growth.scale) {
    const exponent = growth.imaginaryFi ? `(${name})` : name;
    return say(
      'holds',
      `The integral over the Coulomb parameters converges absolutely; it falls slowest along $${direction}$, as ` +
        `$e^{-${power} ${exponent} r}$ with ${number}.`,
    );
  }
  const flat = stillDirection(branch, growth, exponents);
  if (flat === 'too long')
    return say(
      'unknown',
      `Not absolutely convergent along $${direction}$, where ${number}; whether it oscillates everywhere there was not worked out.`,
    );
  if (flat === null) {
    return say(
      'holds',
      `The integral over the Coulomb parameters converges by oscillation only: along $${direction}$, where ${number} is ` +
        'not positive, the phase turns quadratically, and the contour has to be tilted.',
    );
  }
  const still = directionLatex(theory, branch, flat.point, print);
  const there = `$${name}=${scaledLatex(flat.exponent, growth)}$`;
  if (!growth.exact && Math.abs(flat.exponent) <= tolerance * growth.scale) {
    return say(
      'unknown',
      `Along $${still}$ the exponent ${there} vanishes as far as doubles can tell: the border of convergence.`,
    );
  }
  return say(
    'fails',
    `The integral over the Coulomb parameters diverges along $${still}$: ${there} is not positive, and no level turns ` +
      'the phase there.',
  );
}

/**
 * A direction with E <= 0 and K = 0, if there is one: the cones are cut further by the zeros of E and of the components
 * of K, so that such directions, if any, appear among the rays.
 */
function stillDirection(
  branch: CoulombBranch,
  growth: Growth,
  exponents: readonly number[],
): { readonly point: readonly number[]; readonly exponent: number } | 'too long' | null {
  const { rank } = branch;
  const fan = new Fan(rank, growth.exact);
  for (const [k, { point, sums, signs }] of branch.rays.entries()) {
    fan.add([...point, exponents[k] as number, ...growth.phase(point, sums)], signs);
  }
  const tolerance = growth.exact ? 0 : TOLERANCE * growth.scale;
  const entry = (place: number) => (point: readonly number[]) => {
    const value = point[place] as number;
    return Math.abs(value) <= tolerance ? 0 : value;
  };
  if (!fan.cut(entry(rank))) return 'too long';
  fan.keep((point) => entry(rank)(point) <= 0);
  for (let k = 0; k < rank; k++) if (!fan.cut(entry(rank + 1 + k))) return 'too long';
  const still = fan.points.filter((point) => point.slice(rank + 1).every((value) => Math.abs(value) <= tolerance));
  const [first, ...others] = still;
  if (first === undefined) return null;
  const lowest = others.reduce(
    (best, point) => ((point[rank] as number) < (best[rank] as number) ? point : best),
    first,
  );
  return { point: lowest.slice(0, rank), exponent: lowest[rank] as number };
}
