import { Rational } from '../../exact/rational';
import { gaugeGroups, type Theory } from '../theory';
import type { Condition, Finding } from './condition';
import { coulombBranch } from './coulomb-branch';
import { fluxLatex } from './direction';
import { growthOf } from './growth';
import { lowestMonopole } from './lowest-monopole';
import { levelValue } from './matter';
import { rationalLatex } from './words';

/**
 * Good, ugly and bad N = 4 theories: the dimension of the bare monopole operator of flux n, smallest over the
 * cocharacter lattice, is at least 1, is 1/2, or less.
 */
export const monopoles: Condition = {
  id: 'monopoles',
  title: 'Monopole operators of an N = 4 theory',
  examine: (theory, print) => {
    if (!applies(theory)) return [];
    const branch = coulombBranch(theory);
    const lowest = branch === null ? null : lowestMonopole(branch, growthOf(theory, branch));
    if (branch === null || lowest === null)
      return [finding('unknown', 'The Coulomb branch has too many cones to search for monopole operators.')];
    const delta = Rational.of(lowest.value, growthOf(theory, branch).scale);
    const where = `$\\Delta=${rationalLatex(delta)}$ at flux $${fluxLatex(theory, branch, lowest.flux, print)}$`;
    if (!lowest.complete && delta.compare(Rational.one) >= 0) {
      return [finding('unknown', `The smallest monopole operator found has ${where}; not every flux was tried.`)];
    }
    const half = Rational.of(1, 2);
    if (delta.compare(half) < 0) {
      return [
        finding(
          'fails',
          `The theory is bad: the bare monopole operator has ${where}, below the bound $\\frac{1}{2}$; the R-symmetry at ` +
            'low energy is another one.',
        ),
      ];
    }
    if (delta.equals(half)) {
      return [
        finding(
          'holds',
          `The theory is ugly: the smallest monopole operator has ${where} and is a free twisted hypermultiplet.`,
        ),
      ];
    }
    return [finding('holds', `The theory is good: the smallest monopole operator has ${where}.`)];
  },
};

function applies(theory: Theory): boolean {
  const gauge = gaugeGroups(theory);
  return (
    theory.supersymmetry === 4 &&
    gauge.length > 0 &&
    theory.mixed.length === 0 &&
    theory.multiplets.every(({ kind }) => kind !== 'chiral') &&
    gauge.every(({ group }) => [group.level, group.abelianLevel].every((level) => levelValue(theory, level).isZero()))
  );
}

function finding(verdict: Finding['verdict'], says: string): Finding {
  return {
    verdict,
    says,
    formula:
      '\\Delta(n)=\\tfrac{1}{2}\\sum_{\\text{hypers}}|w(n)|-\\sum_{\\alpha>0}|\\alpha(n)|\\geq\\tfrac{1}{2},' +
      '\\qquad\\text{good: }\\Delta\\geq1',
    source: 'D. Gaiotto, E. Witten, arXiv:0807.3720 (2008)',
  };
}
