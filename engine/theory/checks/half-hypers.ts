import type { Printer } from '../../functions/special-function';
import { realityOf } from '../../lie/invariants';
import type { Representation, RepresentationReality } from '../../lie/representation';
import type { Multiplet, Theory } from '../theory';
import type { Condition, Finding } from './condition';
import { groupLatex, listWords, nameLatex } from './words';

/**
 * A half-hyper needs a pseudoreal representation of all groups together, flavour included: Frobenius-Schur indicator
 * -1, or an even number of copies of what is not pseudoreal.
 */
export const halfHypers: Condition = {
  id: 'half-hyper',
  title: 'Half-hypermultiplets',
  examine: (theory, print) =>
    theory.multiplets
      .filter(({ kind }) => kind === 'halfhyper')
      .map((multiplet): Finding => {
        const reality = productReality(multiplet.representations);
        const holds = reality === 'pseudoreal' || reality === 'both';
        const name = nameLatex(multiplet.name, print);
        return {
          detail: multiplet.name,
          verdict: holds ? 'holds' : 'fails',
          says: `The representation of the half-hyper $${name}$ ${WORDS[reality]}${factors(theory, multiplet, print)}.`,
          formula: '\\prod_G \\mathrm{FS}(R_G)=-1',
          source:
            'E. Witten, Phys. Lett. B 117 (1982) 324; L. Bhardwaj, Y. Tachikawa, arXiv:1309.5160 (2013), section 2',
        };
      }),
};

type ProductReality = RepresentationReality | 'both';

const WORDS: Readonly<Record<ProductReality, string>> = {
  pseudoreal: 'is pseudoreal',
  both: 'occurs an even number of times, so that it has a pseudoreal structure',
  real: 'is real, not pseudoreal: take an even number of half-hypers, that is, hypers',
  complex: 'is complex, not pseudoreal: write it as a hyper',
  mixed: 'is neither real nor pseudoreal as a whole',
};

/** `, real under $G$ times pseudoreal under $H$`, where there are several factors. */
function factors(theory: Theory, { representations }: Multiplet, print: Printer): string {
  const acting = representations.flatMap((representation, index) => {
    const group = theory.groups[index];
    return group === undefined || representation.isTrivial ? [] : [{ representation, group }];
  });
  if (acting.length < 2) return '';
  const words = acting.map(
    ({ representation, group }) => `${representation.reality} under $${groupLatex(group, print)}$`,
  );
  return `: ${listWords(words)}`;
}

/** Reality of the product of representations of different groups; `both` where it has either structure. */
export function productReality(representations: readonly Representation[]): ProductReality {
  if (!representations.every((one) => one.isSelfConjugate)) return 'complex';
  // Self-conjugate irreducible parts that occur an odd number of times decide; of each group only parity and sign count.
  let signs = { real: true, pseudoreal: false };
  for (const { group, irreps } of representations) {
    const here = { real: false, pseudoreal: false };
    for (const { labels, charge, multiplicity } of irreps) {
      if (multiplicity % 2 === 0 || !charge.isZero()) continue;
      const reality = realityOf(group.system, labels);
      if (reality !== 'complex') here[reality] = true;
    }
    signs = {
      real: (signs.real && here.real) || (signs.pseudoreal && here.pseudoreal),
      pseudoreal: (signs.real && here.pseudoreal) || (signs.pseudoreal && here.real),
    };
  }
  if (signs.real) return signs.pseudoreal ? 'mixed' : 'real';
  return signs.pseudoreal ? 'pseudoreal' : 'both';
}
