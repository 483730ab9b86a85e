import { Rational } from '../../exact/rational';
import { gaugeGroups, type Theory } from '../theory';
import { isConformal } from './beta-function';
import type { Condition } from './condition';
import { dimensionWithout, sumOverMatter } from './matter';
import { half, rationalLatex } from './words';

/**
 * The trace anomalies a and c of a conformal N = 2 theory in four dimensions, from its free fields: they do not depend on
 * the couplings. The partition function on a four-sphere of radius r goes as r^{-4a}.
 */
export const conformalAnomaly: Condition = {
  id: 'anomalies-a-c',
  title: 'Conformal anomalies',
  examine: (theory) => {
    if (!isConformal(theory)) return [];
    const { vectors, hypers } = multiplets(theory);
    const [v, h] = [Rational.of(vectors), hypers];
    const a = v.mul(Rational.of(5)).add(h).div(Rational.of(24));
    const c = v.add(v).add(h).div(Rational.of(12));
    return [
      {
        verdict: 'holds',
        says:
          `With $n_v=${vectors}$ vector multiplets and $n_h=${rationalLatex(h)}$ hypermultiplets ` +
          `$a=${rationalLatex(a)}$ and $c=${rationalLatex(c)}$; $Z$ goes as $r^{-4a}$ with the radius.`,
        formula: 'a=\\frac{5n_v+n_h}{24},\\qquad c=\\frac{2n_v+n_h}{12}',
        source:
          'D. Anselmi, D. Z. Freedman, M. T. Grisaru, A. A. Johansen, hep-th/9708042 (1997); A. D. Shapere, Y. Tachikawa, ' +
          'arXiv:0804.1957 (2008)',
      },
    ];
  },
};

function multiplets(theory: Theory): { readonly vectors: number; readonly hypers: Rational } {
  const vectors = gaugeGroups(theory).reduce((sum, { group }) => sum + group.group.dimension, 0);
  // Chirals: two a hyper, one a half-hyper.
  const chirals = sumOverMatter(theory, ({ representations }) => Rational.of(dimensionWithout(representations)));
  const adjoint = Rational.of(theory.supersymmetry === 4 ? vectors : 0);
  return { vectors, hypers: chirals.mul(half).add(adjoint) };
}
