import { Form } from '../exact/form';
import { fourSphereConditions } from '../theory/checks/four-sphere';
import { gaugeGroups } from '../theory/theory';
import { exponential, quadratic } from './classical';
import { hyperFactors, type RoundFunction, vectorFactors } from './eight-supercharges';
import { instantonCoefficient, instantonNotes } from './instantons';
import type { Sphere } from './sphere';

const b = Form.symbol('@b');

const upsilon: RoundFunction = {
  name: 'upsilon',
  parameters: [b],
  center: Form.symbol('@Q').mul(Form.ratio(1, 2)),
  partner: b.inverse(),
  round: new Map([
    ['@b', Form.one],
    ['@Q', Form.number(2)],
  ]),
};

/**
 * The four-sphere, round or the ellipsoid with b > 0, four-dimensional N = 2 theories, without instantons.
 *
 * Conventions: the vector multiplet gives Upsilon_b(i a.sigma) for every root, a hyper in R gives
 * 1/Upsilon_b(Q/2 + i w.(sigma, m)) for every weight of R, a half-hyper for one of each pair of weights; classical factor
 * exp(-(8 pi^2/g^2) (sigma, sigma)), (sigma, sigma) being Tr sigma^2 for SU(n), U(n) and USp(n); Upsilon_b(Q/2) = 1, and the constant Upsilon_b'(0) for each Cartan direction is left out.
 * `supersymmetry 4` adds the adjoint hyper at the mass i(b - 1/b)/2 where all but the Vandermonde cancels.
 *
 * Sources: V. Pestun, arXiv:0712.2824; N. Hama, K. Hosomichi, arXiv:1206.6359; T. Okuda, V. Pestun, arXiv:1004.1222.
 */
export const s4: Sphere = {
  name: 'S4',
  multiplets: ['hyper', 'halfhyper'],
  squashing: [{ name: 'b', symbol: '@b', round: Form.one, mayBeComplex: true }],
  options: { gauge: ['coulomb', 'coupling'], flavor: ['mass'] },
  refusals: {
    mixed: 'there is no Chern-Simons term in four dimensions',
    chiral: 'with eight supercharges matter comes in hypers, a chiral and its conjugate in each',
    twisted: 'twisted multiplets are peculiar to two dimensions',
    fi:
      'a simple gauge group has no FI term, and the one of a U(1) breaks the R-symmetry that puts an N = 2 theory on ' +
      'the four-sphere',
    level: 'there is no Chern-Simons term in four dimensions',
    abelian: 'there is no Chern-Simons term in four dimensions',
    theta: 'the theta angle enters through the instantons only, which are not part of this product',
  },
  halvesWeights: true,
  supersymmetries: [2, 4],
  minimalSupersymmetry: 2,
  rCharge: () => ({ value: Form.zero, fixed: true }),
  latex: (theory) => (theory.round ? 'S^4' : 'S^4_b'),
  geometry: (theory) => [
    (name) => (name === '@Q' ? b.add(b.inverse()) : null),
    (name) => theory.geometry.get(name) ?? null,
  ],
  vector: (theory) => vectorFactors(theory, upsilon, theory.supersymmetry === 4),
  multiplet: (theory, multiplet) => hyperFactors(theory, upsilon, multiplet),
  classical: (theory) =>
    gaugeGroups(theory).flatMap(({ group }) => {
      if (group.coupling === null) return [];
      const strength = Form.pi.pow(2).scale(-8).div(group.coupling.pow(2));
      return [exponential(strength.mul(quadratic(group)))];
    }),
  modes: () => ({
    kind: 'refused',
    message: 'Modes before pairing are listed on the round three-sphere only; choose the unpaired modes.',
  }),
  conventions: (theory) => [
    ...(theory.round ? [] : ['$Q=b+b^{-1}$']),
    ...(theory.supersymmetry === 4 && !theory.round
      ? ['The adjoint hypermultiplet has the mass $\\frac{i}{2}(b-b^{-1})$.']
      : []),
    'The instanton factor $|Z_{\\text{inst}}|^2$ multiplies the integrand and is not included; for $U(n)$ and $SU(n)$ its ' +
      `coefficients can be asked for as values: ${
        gaugeGroups(theory).length < 2
          ? 'instanton1, instanton2, ...'
          : 'instanton(1, 0, ...) with one order for each gauge group, instanton1 for the sum of all at order 1, ...'
      }`,
    "$1/|W|$, the measure, and the constants $\\Upsilon(Q/2)$ and $\\Upsilon'(0)$ are not included.",
  ],
  conditions: fourSphereConditions,
  fluxes: false,
  specialFunction: 'upsilon',
  series: {
    name: 'instanton',
    coefficient: instantonCoefficient,
    notes: instantonNotes,
  },
  sources: [
    { key: 'Pestun-2007', text: 'V. Pestun, arXiv:0712.2824 (2007)' },
    { key: 'Hama-Hosomichi-2012', text: 'N. Hama, K. Hosomichi, arXiv:1206.6359 (2012)' },
  ],
};
