import { Rational } from '../../exact/rational';
import type { Printer } from '../../functions/special-function';
import type { SimpleType } from '../../lie/simple-type';
import { gaugeGroups, type Theory } from '../theory';
import type { Condition } from './condition';
import { indexSum } from './matter';
import { groupLatex, rationalLatex } from './words';

/**
 * The global anomaly of symplectic gauge groups in four dimensions: the second-order index, summed over all Weyl
 * fermions, is even. Hypers contribute twice theirs, so that only half-hypers can spoil it.
 */
export const globalAnomaly: Condition = {
  id: 'global-anomaly',
  title: 'Global anomaly',
  examine: (theory, print) =>
    symplecticParts(theory, print).map(({ detail, lead, sum, even }) => ({
      detail,
      verdict: even ? 'holds' : 'fails',
      says: even
        ? `${lead}: $\\sum I_2=${rationalLatex(sum)}$ over all Weyl fermions is even.`
        : `${lead}: $\\sum I_2=${rationalLatex(sum)}$ over all Weyl fermions is odd; half-hypers of odd index have to ` +
          'occur in even number.',
      formula: '\\sum_{\\text{Weyl}}I_2\\in2\\mathbb{Z}',
      source: 'E. Witten, Phys. Lett. B 117 (1982) 324; J. Wang, X.-G. Wen, E. Witten, arXiv:1810.00844 (2018)',
    })),
};

/**
 * In five dimensions an odd sum over half-hypers is expected to be anomalous in the same way, since the fifth homotopy
 * group of USp(2n) has order two, too; said only where it concerns a theory.
 */
export const globalAnomalyInFive: Condition = {
  id: 'global-anomaly',
  title: 'Global anomaly',
  examine: (theory, print) =>
    symplecticParts(theory, print).flatMap(({ detail, lead, sum, even }) =>
      even
        ? []
        : [
            {
              detail,
              verdict: 'unknown',
              says: `${lead}: $\\sum I_2=${rationalLatex(sum)}$ over the half-hypers is odd, which is expected to be anomalous.`,
              formula: '\\sum_{\\text{half-hypers}}I_2\\in2\\mathbb{Z}',
              source: 'K. Intriligator, D. R. Morrison, N. Seiberg, hep-th/9702198 (1997)',
            },
          ],
    ),
};

interface SymplecticPart {
  readonly detail: string;
  readonly lead: string;
  readonly sum: Rational;
  readonly even: boolean;
}

function symplecticParts(theory: Theory, print: Printer): SymplecticPart[] {
  return gaugeGroups(theory).flatMap(({ group, index }) =>
    group.group.simple.flatMap((type, part) => {
      if (!isSymplectic(type)) return [];
      const sum = indexSum(theory, index, part);
      const several = group.group.simple.length > 1;
      const name = groupLatex(group, print);
      return [
        {
          detail: several ? `${group.name} ${part + 1}` : group.name,
          lead: `Global anomaly of ${several ? `SU(2) number ${part + 1} of ` : ''}$${name}$`,
          sum,
          even: sum.div(Rational.of(2)).isInteger(),
        },
      ];
    }),
  );
}

/** Whether the simply connected group is USp(2n): SU(2) and Spin(5) are. */
function isSymplectic({ series, rank }: SimpleType): boolean {
  return series === 'C' || (series === 'A' && rank === 1) || (series === 'B' && rank === 2);
}
