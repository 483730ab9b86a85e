import { gaugeGroups } from '../theory';
import type { Condition } from './condition';
import { groupLatex, listWords, nameLatex, rationalLatex } from './words';

/** Charges under a gauged U(1) are integers: its fluxes are integers, and the Coulomb parameter is normalised to them. */
export const charges: Condition = {
  id: 'charges',
  title: 'Charges under gauged U(1)',
  examine: (theory, print) =>
    gaugeGroups(theory).flatMap(({ group, index }) => {
      const broken = theory.multiplets.flatMap(({ name, representations }) => {
        const charge = representations[index]?.irreps.find((irrep) => !irrep.charge.isInteger())?.charge;
        return charge === undefined ? [] : [`$${rationalLatex(charge)}$ of $${nameLatex(name, print)}$`];
      });
      if (broken.length === 0) return [];
      const noun = broken.length === 1 ? 'The charge' : 'The charges';
      const verb = broken.length === 1 ? 'is not an integer' : 'are not integers';
      return [
        {
          detail: group.name,
          verdict: 'fails' as const,
          says: `${noun} ${listWords(broken)} under $${groupLatex(group, print)}$ ${verb}; multiply all charges and divide the Coulomb parameter.`,
          formula: 'q\\in\\mathbb{Z}',
          source: 'P. A. M. Dirac, Proc. R. Soc. A 133 (1931) 60',
        },
      ];
    }),
};
