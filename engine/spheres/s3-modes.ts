import { Form } from '../exact/form';
import { WEIGHT } from '../product/factor';
import { gaugeGroups, type Theory } from '../theory/theory';
import { matterWeights, rootWeights } from '../theory/weights';
import { chiralPairs, vectorPairs } from './s3-mode-pairs';
import type { ModeFactor, ModesView, ModeTower } from './sphere';

const n = Form.symbol('n');
const one = Form.one;
const two = Form.number(2);
const w = Form.symbol(WEIGHT);

/**
 * Every mode on the round three-sphere before pairing. On the squashed one the full spectrum is not known in closed
 * form, only what is left unpaired.
 */
export function s3Modes(theory: Theory): ModesView {
  if (!theory.round) {
    return {
      kind: 'refused',
      message:
        'On the squashed sphere the whole spectrum has no closed form; only the unpaired modes are known. ' +
        'Leave out `b` for the round sphere, or choose the unpaired modes.',
    };
  }
  const vectors = gaugeGroups(theory).flatMap(({ index }) => [
    ...rootWeights(theory, index).map(
      ({ weights }): ModeTower => ({
        weights,
        half: true,
        power: 1,
        start: 1,
        prefactor: w.mul(w),
        factors: vectorModes(w),
        pairs: vectorPairs(w),
        from: ['vector'],
      }),
    ),
    ...(theory.supersymmetry === 4 ? adjointTowers(theory, index) : []),
  ]);
  const matter = theory.multiplets.flatMap(({ kind, name, rCharge, representations }) =>
    matterWeights(theory.groups, representations).flatMap(({ weights, multiplicity }) =>
      (kind === 'hyper' ? [w, w.neg()] : [w]).map((weight): ModeTower => {
        const at = weights === null ? Form.zero : weight;
        const factors = chiralModes(rCharge, at);
        const pairs = chiralPairs(rCharge, at);
        return { weights, half: false, power: multiplicity, start: 0, prefactor: null, factors, pairs, from: [name] };
      }),
    ),
  );
  return { kind: 'modes', towers: [...vectors, ...matter] };
}

/** The chiral of R-charge 1 in the N = 4 vector multiplet: over the roots, and over the Cartan directions. */
function adjointTowers(theory: Theory, index: number): ModeTower[] {
  const rank = theory.groups[index]?.group.rank ?? 0;
  const common = { half: false, start: 0, prefactor: null, from: ['vector'] } as const;
  return [
    ...rootWeights(theory, index).map(({ weights }) => ({
      ...common,
      weights,
      power: 1,
      factors: chiralModes(one, w),
      pairs: chiralPairs(one, w),
    })),
    {
      ...common,
      weights: null,
      power: rank,
      factors: chiralModes(one, Form.zero),
      pairs: chiralPairs(one, Form.zero),
    },
  ];
}

/**
 * Modes of one chiral of R-charge R and weight w on the unit three-sphere, z = R - i w.sigma: scalars with
 * (n + z)(n + 2 - z), (n + 1)^2 of each n >= 0; spinors with n + 2 - z and n + 1 + z, (n + 1)(n + 2) of each.
 * Sources: Kapustin, Willett, Yaakov 2009, arXiv:0909.4559, section 4; Jafferis 2010, arXiv:1012.3210, section 4.
 */
export function chiralModes(rCharge: Form, weight: Form): readonly ModeFactor[] {
  const z = rCharge.sub(Form.i.mul(weight));
  const spinor = n.add(one).mul(n.add(two));
  const scalar = n.add(one).mul(n.add(one)).neg();
  return [
    { eigenvalue: n.add(two).sub(z), multiplicity: spinor },
    { eigenvalue: n.add(one).add(z), multiplicity: spinor },
    { eigenvalue: n.add(z), multiplicity: scalar },
    { eigenvalue: n.add(two).sub(z), multiplicity: scalar },
  ];
}

/**
 * Modes of the vector multiplet for one pair of roots +-a, x = a.sigma: transverse vectors with (n + 1)^2 + x^2,
 * 2n(n + 2) of each n >= 1; gaugini with n +- i x and n + 1 +- i x, n(n + 1) of each; and the Vandermonde factor x^2.
 * Source: Kapustin, Willett, Yaakov 2009, arXiv:0909.4559, section 3.
 */
export function vectorModes(weight: Form): readonly ModeFactor[] {
  const ix = Form.i.mul(weight);
  const gaugino = n.mul(n.add(one));
  const vector = n.mul(n.add(two)).scale(-2);
  return [
    ...[n.add(ix), n.sub(ix), n.add(one).add(ix), n.add(one).sub(ix)].map((eigenvalue) => ({
      eigenvalue,
      multiplicity: gaugino,
    })),
    ...[n.add(one).add(ix), n.add(one).sub(ix)].map((eigenvalue) => ({ eigenvalue, multiplicity: vector })),
  ];
}
