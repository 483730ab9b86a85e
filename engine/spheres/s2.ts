import { Form } from '../exact/form';
import { type Factor, FLUX, WEIGHT } from '../product/factor';
import { twoSphereConditions } from '../theory/checks/two-sphere';
import { gaugeGroups, type Multiplet, type Theory } from '../theory/theory';
import { matterWeights, rootWeights, type TheoryWeights } from '../theory/weights';
import { exponential, fluxTrace, trace } from './classical';
import type { Sphere, TheoryProduct } from './sphere';

const w = Form.symbol(WEIGHT);
const f = Form.symbol(FLUX);
const half = Form.ratio(1, 2);

/**
 * The two-sphere, two-dimensional N = (2,2) theories, in flux n through the sphere.
 *
 * Conventions: a chiral of R-charge R and weight w gives
 * Gamma(R/2 - i w.(sigma, m) - w.n/2) / Gamma(1 - R/2 + i w.(sigma, m) - w.n/2), written with |w.n| and the sign that
 * this costs; the vector multiplet (-1)^{a.n} [(a.sigma)^2 + (a.n)^2/4] for each positive root; FI parameter and theta
 * angle exp(-4 pi i xi Tr sigma - i theta Tr n); a twisted chiral no determinant; measure d sigma/2 pi, 1/|W|.
 *
 * Sources: F. Benini, S. Cremonesi, arXiv:1206.2356; N. Doroud, J. Gomis, B. Le Floch, S. Lee, arXiv:1206.2606; the sign
 * of the vector multiplet: K. Hori, D. Tong, hep-th/0609032; K. Hori, J. Knapp, arXiv:1308.6265.
 */
export const s2: Sphere = {
  name: 'S2',
  multiplets: ['chiral', 'twisted'],
  squashing: [],
  options: { gauge: ['coulomb', 'fi', 'theta'], flavor: ['mass'] },
  refusals: {
    level: 'there is no Chern-Simons term in two dimensions; `theta` sets the theta angle',
    abelian: 'there is no Chern-Simons term in two dimensions; `theta` sets the theta angle',
    mixed: 'there is no Chern-Simons term in two dimensions',
    hyper: 'it would be two chirals, one in the conjugate representation; write them as such',
    halfhyper: 'with four supercharges matter comes in chirals',
    coupling: 'the gauge coupling drops out of the localised integral on the two-sphere',
  },
  halvesWeights: false,
  supersymmetries: [2],
  minimalSupersymmetry: 2,
  rCharge: () => ({ value: Form.zero, fixed: false }),
  latex: () => 'S^2',
  geometry: () => [],
  vector: (theory) =>
    gaugeGroups(theory).flatMap(({ index }) =>
      rootWeights(theory, index).flatMap(({ weights }) => vectorFactors(weights)),
    ),
  multiplet: (theory, multiplet) => (multiplet.kind === 'chiral' ? chiral(theory, multiplet) : []),
  classical: (theory) =>
    gaugeGroups(theory).flatMap(({ group }) => {
      const terms: Form[] = [];
      if (group.fi !== null) terms.push(Form.i.mul(Form.pi).scale(-4).mul(group.fi).mul(trace(group)));
      if (group.theta !== null) terms.push(Form.i.neg().mul(group.theta).mul(fluxTrace(group)));
      return terms.filter((term) => !term.isZero()).map(exponential);
    }),
  modes: () => ({
    kind: 'refused',
    message: 'Modes before pairing are listed on the round three-sphere only; choose the unpaired modes.',
  }),
  conventions: () => [
    '$n$ is the flux through the sphere; the partition function is $\\frac{1}{|W|}\\sum_n\\int\\prod\\frac{d\\sigma}{2\\pi}\\,' +
      'e^{-4\\pi i\\xi\\,\\mathrm{tr}\\,\\sigma-i\\theta\\,\\mathrm{tr}\\,n}\\,Z_{\\text{1-loop}}(\\sigma,n)$.',
    'With $k=w(n)$ the literature also writes $\\Gamma(x-\\frac{k}{2})/\\Gamma(1-x-\\frac{k}{2})$ for ' +
      '$(-1)^{(k+|k|)/2}\\,\\Gamma(x+\\frac{|k|}{2})/\\Gamma(1-x+\\frac{|k|}{2})$.',
    'Constants $1/|W|$, powers of $2\\pi$ and the radius are not included.',
  ],
  conditions: twoSphereConditions,
  fluxes: true,
  specialFunction: 'fluxGamma',
  sources: [
    { key: 'Benini-Cremonesi-2012', text: 'F. Benini, S. Cremonesi, arXiv:1206.2356 (2012)' },
    { key: 'DGLL-2012', text: 'N. Doroud, J. Gomis, B. Le Floch, S. Lee, arXiv:1206.2606 (2012)' },
  ],
};

/** (-1)^{a.n} (a.sigma + i a.n/2)(a.sigma - i a.n/2) over one root of each pair. */
function vectorFactors(weights: TheoryWeights): TheoryProduct {
  const shift = Form.i.mul(f).mul(half);
  const common = { parameters: [], power: 1, weights, half: true, from: ['vector'] };
  return [
    { ...common, name: 'sign', argument: f },
    { ...common, name: 'linear', argument: w.add(shift) },
    { ...common, name: 'linear', argument: w.sub(shift) },
  ];
}

/** g(R/2 - i w; w.n) and the sign (-1)^{(w.n + |w.n|)/2} that writing it with |w.n| costs. */
function chiral(theory: Theory, { representations, rCharge, name }: Multiplet): TheoryProduct {
  return matterWeights(theory.groups, representations).flatMap(({ weights, multiplicity }) => {
    const position = weights === null ? Form.zero : w;
    const flux = weights?.parts.some(({ group }) => theory.groups[group]?.role === 'gauge') ? f : Form.zero;
    const common = { power: multiplicity, weights, half: false, from: [name] };
    const gamma: Factor<TheoryWeights> = {
      ...common,
      name: 'fluxGamma',
      argument: rCharge.mul(half).sub(Form.i.mul(position)),
      parameters: [flux],
    };
    if (flux.isZero()) return [gamma];
    const positive = flux.add(Form.call('abs', flux)).mul(half);
    return [{ ...common, name: 'sign' as const, argument: positive, parameters: [] }, gamma];
  });
}
