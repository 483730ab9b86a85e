import { gaugeGroups } from '../theory';
import type { Condition, Finding } from './condition';
import { groupLatex } from './words';

/**
 * What the W bosons do to the theta angle of U(n) in two dimensions: the sign (-1)^{a(n)} over the positive roots is
 * (-1)^{(n-1) Tr n}, a shift of theta by (n - 1) pi.
 */
export const thetaAngle: Condition = {
  id: 'theta',
  title: 'Theta angle',
  examine: (theory, print) =>
    gaugeGroups(theory).flatMap(({ group }): Finding[] => {
      const { family, size } = group.group;
      if (family !== 'U' || size === null || size < 2) return [];
      const name = groupLatex(group, print);
      const shift = size - 1 === 1 ? '\\pi' : `${size - 1}\\pi`;
      const moved = `they shift $\\theta$ by $${shift}$`;
      const words =
        size % 2 === 0
          ? `${moved}${size === 2 ? '' : ', that is by $\\pi$'}; formulas without this sign have another $\\theta$`
          : `${moved}, a whole number of its periods $2\\pi$`;
      return [
        {
          detail: group.name,
          verdict: 'holds',
          says: `The W bosons of $${name}$ give the sign $(-1)^{\\sum_{a<b}(n_a-n_b)}=(-1)^{${size === 2 ? '' : size - 1}\\operatorname{tr}n}$: ${words}.`,
          formula: '\\theta\\to\\theta+(N-1)\\pi',
          source: 'K. Hori, D. Tong, hep-th/0609032 (2006); K. Hori, arXiv:1104.2853 (2011)',
        },
      ];
    }),
};
