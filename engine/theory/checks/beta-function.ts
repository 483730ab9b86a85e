import { Rational } from '../../exact/rational';
import type { Printer } from '../../functions/special-function';
import type { Representation } from '../../lie/representation';
import { rootSystem } from '../../lie/root-system';
import { gaugeGroups, type Theory, type TheoryGroup } from '../theory';
import type { Condition, Finding } from './condition';
import { dimensionWithout, indexSum, sumOverMatter, tracesOf } from './matter';
import { groupLatex, half, rationalLatex } from './words';

/**
 * The beta function of a four-dimensional N = 2 theory, b = 2h - sum_hypers I2 with half-hypers counted half: its sign
 * is also that of the leading growth sum_a (a.sigma)^2 - sum_w (w.sigma)^2 of minus the logarithm of the integrand on
 * the four-sphere, so that the integral converges for b > 0, for b = 0 by the coupling, and not for b < 0.
 */
export const betaFunction: Condition = {
  id: 'beta',
  title: 'Beta function',
  examine: (theory, print) =>
    gaugeGroups(theory).flatMap(({ group, index }) => [
      ...group.group.simple.map((_, part) => simpleFinding(theory, group, index, part, print)),
      ...(group.group.abelianRank > 0 ? [abelianFinding(theory, group, index, print)] : []),
    ]),
};

const SOURCE =
  'V. A. Novikov, M. A. Shifman, A. I. Vainshtein, V. I. Zakharov, Nucl. Phys. B 229 (1983) 381; N. Seiberg, E. Witten, ' +
  'hep-th/9408099 (1994); V. Pestun, arXiv:0712.2824 (2007)';

/** Whether all couplings keep their value: b = 0 for every simple part and every U(1). */
export function isConformal(theory: Theory): boolean {
  return gaugeGroups(theory).every(
    ({ group, index }) =>
      group.group.simple.every((_, part) => {
        const { twice, matter } = simpleShares(theory, group, index, part);
        return matter.equals(Rational.of(twice));
      }) &&
      (group.group.abelianRank === 0 || chargeSquares(theory, group, index).isZero()),
  );
}

/** 2h and the sum of I2 over hypers, half-hypers counted half. */
function simpleShares(
  theory: Theory,
  owner: TheoryGroup,
  index: number,
  part: number,
): { readonly twice: number; readonly matter: Rational } {
  const type = owner.group.simple[part];
  const twice = type === undefined ? 0 : 2 * rootSystem(type).dualCoxeter;
  // sumOverMatter counts chirals: two for a hyper, one for a half-hyper. N = 4 adds a hyper in the adjoint.
  const extra = theory.supersymmetry === 4 ? Rational.of(twice) : Rational.zero;
  return { twice, matter: indexSum(theory, index, part).mul(half).add(extra) };
}

function simpleFinding(theory: Theory, owner: TheoryGroup, index: number, part: number, print: Printer): Finding {
  const { twice, matter } = simpleShares(theory, owner, index, part);
  const b = Rational.of(twice).sub(matter);
  const name = owner.group.simple.length > 1 ? `, SU(2) number ${part + 1}` : '';
  const lead = `${owner.group.abelianRank > 0 ? 'The simple part of ' : ''}$${groupLatex(owner, print)}$${name}`;
  return {
    detail: owner.group.simple.length > 1 ? `${owner.name} ${part + 1}` : owner.name,
    verdict: b.sign() < 0 ? 'fails' : 'holds',
    says: `${lead} has $b=2h-\\sum I_2=${twice}-${rationalLatex(matter)}=${rationalLatex(b)}$: ${behaviour(b, owner)}.`,
    formula: 'b=2h-\\sum_{\\text{hypers}}I_2-\\tfrac{1}{2}\\sum_{\\text{half-hypers}}I_2\\geq0',
    source: SOURCE,
  };
}

function behaviour(b: Rational, owner: TheoryGroup): string {
  if (b.sign() > 0) return 'asymptotically free, and the integral converges';
  if (b.sign() < 0) return 'not asymptotically free, and the integral diverges';
  return owner.coupling === null
    ? 'conformal; the integral needs the Gaussian of a coupling, and none is written'
    : 'conformal, and the Gaussian of the coupling makes the integral converge';
}

/** Sum of the squared charges of all hypers under the U(1) of unit trace. */
function chargeSquares(theory: Theory, owner: TheoryGroup, index: number): Rational {
  const n = Rational.of(owner.group.coordinateCount);
  return sumOverMatter(theory, ({ representations }) =>
    tracesOf(representations[index] as Representation).chargeSquared.mul(
      Rational.of(dimensionWithout(representations, index)),
    ),
  )
    .mul(half)
    .div(n.mul(n));
}

function abelianFinding(theory: Theory, owner: TheoryGroup, index: number, print: Printer): Finding {
  const sum = chargeSquares(theory, owner, index);
  const lead = owner.group.isAbelian
    ? `$${groupLatex(owner, print)}$`
    : `The $\\mathrm{U}(1)$ of $${groupLatex(owner, print)}$`;
  const words = sum.isZero()
    ? 'no matter is charged under it'
    : 'its coupling grows with the energy, and the integral diverges';
  return {
    detail: owner.group.isAbelian ? owner.name : `${owner.name} U(1)`,
    verdict: sum.isZero() ? 'holds' : 'fails',
    says: `${lead} has $b=-\\sum q^2=${rationalLatex(sum.neg())}$: ${words}.`,
    formula: 'b=-\\sum_{\\text{hypers}}q^2\\geq0',
    source: SOURCE,
  };
}
