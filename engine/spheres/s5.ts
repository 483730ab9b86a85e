import { Form } from '../exact/form';
import { fiveSphereConditions } from '../theory/checks/five-sphere';
import { gaugeGroups, type TheoryGroup } from '../theory/theory';
import { cubicTrace, exponential, quadratic } from './classical';
import { hyperFactors, onRound, type RoundFunction, vectorFactors } from './eight-supercharges';
import type { Sphere } from './sphere';

const names = ['@w1', '@w2', '@w3'];
const periods = names.map((name) => Form.symbol(name));

const tripleSine: RoundFunction = {
  name: 'tripleSine',
  parameters: periods,
  // Half the sum of the periods, |omega|/2.
  center: Form.symbol('@W').mul(Form.ratio(1, 2)),
  partner: Form.symbol('@w3'),
  round: new Map([['@W', Form.number(3)], ...names.map((name) => [name, Form.one] as const)]),
};

/**
 * The five-sphere, round or squashed with periods w1, w2, w3, five-dimensional N = 1 theories, perturbative part.
 *
 * Conventions: the vector multiplet gives S_3(i a.sigma) for every root, a hyper in R gives
 * 1/S_3(|w|/2 + i w.(sigma, m)) for every weight of R, a half-hyper for one of each pair of weights; classical factor
 * exp(-[(4 pi^3/g^2) (sigma, sigma) + (pi k/3) Tr sigma^3]/(w1 w2 w3)); S_3 zeta-regularised, the constant S_3'(0)/2 pi for each
 * Cartan direction left out. `supersymmetry 2` adds the adjoint hyper of mass i (w1 + w2 - w3)/2, i/2 on the round sphere, for
 * which S_3(z)/S_3(z + w3) = S_2(z | w1, w2) leaves a Chern-Simons matrix model.
 *
 * Sources: K. Hosomichi, R.-K. Seong, S. Terashima, arXiv:1203.0371; J. Källén, J. Qiu, M. Zabzine, arXiv:1206.6008;
 * Y. Imamura, arXiv:1210.6308; G. Lockhart, C. Vafa, arXiv:1210.5909; for `supersymmetry 2` H.-C. Kim, S. Kim,
 * arXiv:1206.6339.
 */
export const s5: Sphere = {
  name: 'S5',
  multiplets: ['hyper', 'halfhyper'],
  squashing: [1, 2, 3].map((k) => ({ name: `w${k}`, symbol: `@w${k}`, round: Form.one, mayBeComplex: true })),
  options: { gauge: ['coulomb', 'level', 'coupling'], flavor: ['mass'] },
  refusals: {
    mixed: 'mixed cubic levels are not offered',
    chiral: 'with eight supercharges matter comes in hypers, a chiral and its conjugate in each',
    twisted: 'twisted multiplets are peculiar to two dimensions',
    fi: 'there is no FI term for vector multiplets on the five-sphere that the localised integral keeps',
    theta: 'the theta angle of USp(2n) is invisible in the perturbative part',
    abelian: 'the cubic level of U(n) is one number; write `level`',
  },
  halvesWeights: true,
  supersymmetries: [1, 2],
  minimalSupersymmetry: 1,
  rCharge: () => ({ value: Form.zero, fixed: true }),
  latex: (theory) => (theory.round ? 'S^5' : 'S^5_\\omega'),
  geometry: (theory) => [
    (name) => (name === '@W' ? Form.sum(periods) : null),
    (name) => theory.geometry.get(name) ?? null,
  ],
  vector: (theory) => vectorFactors(theory, tripleSine, theory.supersymmetry === 2),
  multiplet: (theory, multiplet) => hyperFactors(theory, tripleSine, multiplet),
  classical: (theory) =>
    gaugeGroups(theory).flatMap(({ group }) => {
      const exponent = classicalExponent(group);
      if (exponent.isZero()) return [];
      const volume = periods.reduce((product, period) => product.mul(period));
      return onRound(theory, tripleSine, [exponential(exponent.neg().div(volume))]);
    }),
  modes: () => ({
    kind: 'refused',
    message: 'Modes before pairing are listed on the round three-sphere only; choose the unpaired modes.',
  }),
  conventions: (theory) => [
    ...(theory.round ? [] : ['$|\\omega|=\\omega_1+\\omega_2+\\omega_3$']),
    ...(theory.supersymmetry === 2
      ? [
          `The adjoint hypermultiplet has the mass $${theory.round ? '\\frac{i}{2}' : '\\frac{i}{2}(\\omega_1+\\omega_2-\\omega_3)'}$.`,
        ]
      : []),
    'Perturbative part: instantons at the three fixed circles are not included.',
    "$1/|W|$, the measure, and the constant $S_3'(0)/2\\pi$ for each Cartan direction are not included.",
  ],
  conditions: fiveSphereConditions,
  fluxes: false,
  specialFunction: 'tripleSine',
  sources: [
    { key: 'HST-2012', text: 'K. Hosomichi, R.-K. Seong, S. Terashima, arXiv:1203.0371 (2012)' },
    { key: 'KQZ-2012', text: 'J. Kallen, J. Qiu, M. Zabzine, arXiv:1206.6008 (2012)' },
    { key: 'Imamura-2012', text: 'Y. Imamura, arXiv:1210.6308 (2012)' },
    { key: 'Lockhart-Vafa-2012', text: 'G. Lockhart, C. Vafa, arXiv:1210.5909 (2012)' },
  ],
};

/** (4 pi^3/g^2) (sigma, sigma) + (pi k/3) Tr sigma^3; (sigma, sigma) is Tr sigma^2 for SU(n), U(n) and USp(n). */
function classicalExponent(group: TheoryGroup): Form {
  const terms: Form[] = [];
  if (group.coupling !== null) terms.push(Form.pi.pow(3).scale(4).div(group.coupling.pow(2)).mul(quadratic(group)));
  if (group.level !== null) terms.push(Form.pi.mul(Form.ratio(1, 3)).mul(group.level).mul(cubicTrace(group)));
  return Form.sum(terms);
}
