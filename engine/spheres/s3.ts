import { Form } from '../exact/form';
import { type Factor, WEIGHT } from '../product/factor';
import { threeSphereConditions } from '../theory/checks/three-sphere';
import { gaugeGroups, type Multiplet, type Theory, type TheoryGroup } from '../theory/theory';
import { matterWeights, rootWeights, type TheoryWeights, type WeightedSet } from '../theory/weights';
import { exponential, quadratic, trace } from './classical';
import { s3Modes } from './s3-modes';
import type { Sphere, TheoryProduct } from './sphere';

const w = Form.symbol(WEIGHT);
const b = Form.symbol('@b');
const Q = Form.symbol('@Q');
const half = Form.ratio(1, 2);

/**
 * The three-sphere, round or squashed with b > 0, three-dimensional N = 2 theories.
 *
 * Conventions: sigma real and dimensionless, unit measure on the cocharacter lattice; a chiral of R-charge R and
 * weight w gives s_b(iQ/2 (1 - R) - w.sigma - w.m); the vector multiplet 4 sinh(pi b a.sigma) sinh(pi a.sigma / b) for
 * each positive root; level exp(-i pi k (sigma, sigma)), FI term exp(2 pi i zeta Tr sigma), mixed level
 * exp(-2 pi i k Tr sigma Tr sigma').
 *
 * Sources: Kapustin, Willett, Yaakov 2009, arXiv:0909.4559; Jafferis 2010, arXiv:1012.3210; Hama, Hosomichi, Lee 2011,
 * arXiv:1012.3512 and arXiv:1102.4716; Imamura, Yokoyama 2011, arXiv:1109.4734.
 */
export const s3: Sphere = {
  name: 'S3',
  multiplets: ['chiral', 'hyper', 'halfhyper'],
  squashing: [{ name: 'b', symbol: '@b', round: Form.one, mayBeComplex: false }],
  options: { gauge: ['coulomb', 'level', 'abelian', 'fi'], flavor: ['mass', 'level', 'abelian'] },
  refusals: {
    theta: 'there is no theta angle in three dimensions; a level takes its place',
    coupling: 'the Yang-Mills coupling drops out of the localised integral on the three-sphere',
  },
  halvesWeights: false,
  supersymmetries: [2, 4],
  minimalSupersymmetry: 2,
  rCharge: (kind) => ({ value: half, fixed: kind !== 'chiral' }),
  latex: (theory) => (theory.round ? 'S^3' : 'S^3_b'),
  geometry: (theory) => [
    (name) => (name === '@Q' ? b.add(b.inverse()) : null),
    (name) => theory.geometry.get(name) ?? null,
  ],
  vector: (theory) =>
    gaugeGroups(theory)
      .flatMap(({ index }) => [
        ...rootWeights(theory, index).map(({ weights }) => vectorFactors(weights, 'vector')),
        ...(theory.supersymmetry === 4 ? [chirals(adjointWeights(theory, index), Form.one, 'vector')] : []),
      ])
      .flatMap((product) => onRound(theory, product)),
  multiplet: (theory, multiplet) => onRound(theory, matter(theory, multiplet)),
  classical: (theory) => [
    ...theory.groups.flatMap((group) => groupClassical(group)),
    ...theory.mixed.map(({ groups: [i, j], level }) =>
      exponential(Form.i.mul(Form.pi).scale(-2).mul(level).mul(trace(theory.groups[i])).mul(trace(theory.groups[j]))),
    ),
  ],
  modes: s3Modes,
  conventions: (theory) => [
    ...(theory.round ? [] : ['$Q=b+b^{-1}$']),
    'The Coulomb parameters are real and dimensionless; $1/|W|$ and the measure are not included.',
  ],
  conditions: threeSphereConditions,
  fluxes: false,
  specialFunction: 'doubleSine',
  sources: [
    { key: 'KWY-2009', text: 'A. Kapustin, B. Willett, I. Yaakov, arXiv:0909.4559 (2009)' },
    { key: 'Jafferis-2010', text: 'D. L. Jafferis, arXiv:1012.3210 (2010)' },
    { key: 'HHL-2011', text: 'N. Hama, K. Hosomichi, S. Lee, arXiv:1102.4716 (2011)' },
    { key: 'Imamura-Yokoyama-2011', text: 'Y. Imamura, D. Yokoyama, arXiv:1109.4734 (2011)' },
  ],
};

/** 4 sinh(pi b a.sigma) sinh(pi a.sigma / b) over one root of each pair. */
function vectorFactors(weights: TheoryWeights, from: string): TheoryProduct {
  return [w.mul(b), w.div(b)].map((argument) => ({
    name: 'hyperbolicSine',
    argument,
    parameters: [],
    power: 1,
    weights,
    half: true,
    from: [from],
  }));
}

/** A chiral multiplet of R-charge R: s_b(iQ/2 (1 - R) - w) for each weight w on the Coulomb parameters and masses. */
function chirals(sets: readonly WeightedSet[], rCharge: Form, from: string): TheoryProduct {
  const shift = Form.i.mul(Q).mul(half).mul(Form.one.sub(rCharge));
  return sets.map(
    ({ weights, multiplicity }): Factor<TheoryWeights> => ({
      name: 'doubleSine',
      argument: weights === null ? shift : shift.sub(w),
      parameters: [b],
      power: multiplicity,
      weights,
      half: false,
      from: [from],
    }),
  );
}

/** A hyper stands for two chirals with R = 1/2, one in the representation and one in its dual; a half-hyper for one. */
function matter(theory: Theory, multiplet: Multiplet): TheoryProduct {
  const sets = matterWeights(theory.groups, multiplet.representations);
  const one = chirals(sets, multiplet.rCharge, multiplet.name);
  if (multiplet.kind !== 'hyper') return one;
  const dual = sets.map(({ weights, multiplicity }) => ({ weights: weights?.opposite() ?? null, multiplicity }));
  return [...one, ...chirals(dual, multiplet.rCharge, multiplet.name)];
}

function adjointWeights(theory: Theory, index: number): readonly WeightedSet[] {
  const rank = (theory.groups[index] as TheoryGroup).group.rank;
  return [
    ...rootWeights(theory, index).flatMap(({ weights }) => [{ weights, multiplicity: 1 }]),
    { weights: null, multiplicity: rank },
  ];
}

/** On the round sphere b = 1 and Q = 2 from the start, so that nothing prints a b. */
function onRound(theory: Theory, product: TheoryProduct): TheoryProduct {
  if (!theory.round) return product;
  const values = (name: string): Form | null => (name === '@b' ? Form.one : name === '@Q' ? Form.number(2) : null);
  return product.map((factor) => ({
    ...factor,
    argument: factor.argument.substitute(values),
    parameters: factor.parameters.map((p) => p.substitute(values)),
  }));
}

function groupClassical(group: TheoryGroup): TheoryProduct {
  const terms: Form[] = [];
  if (group.level !== null) terms.push(Form.i.mul(Form.pi).neg().mul(levelForm(group)));
  if (group.fi !== null) terms.push(Form.i.mul(Form.pi).scale(2).mul(group.fi).mul(trace(group)));
  return terms.filter((term) => !term.isZero()).map(exponential);
}

/** k (sigma, sigma), with the U(1) level k' of U(n) apart: k sum s^2 + (k' - k)/n (sum s)^2. */
function levelForm(group: TheoryGroup): Form {
  const level = group.level ?? Form.zero;
  const squares = quadratic(group);
  if (group.abelianLevel === null) return level.mul(squares);
  const sum = trace(group);
  const n = group.coordinates.length;
  return level.mul(squares).add(group.abelianLevel.sub(level).div(Form.number(n)).mul(sum).mul(sum));
}
