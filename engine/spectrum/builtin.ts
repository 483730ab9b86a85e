import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { LEVEL, levelTower } from './level-tower';
import type { Spectrum, WrittenTower } from './tower';

/** Representations of SU(2) x SU(2) on S^3, as functions of the level n. */
export interface SpinLabels {
  readonly left: Form;
  readonly right: Form;
}

/** A spectrum of a field on a unit sphere, with where it is from. */
export interface BuiltinSpectrum {
  readonly spectrum: Spectrum;
  /** One for each tower, on S^3; else empty. */
  readonly labels: readonly SpinLabels[];
  readonly source: string;
}

export type BuiltinRequest =
  /** -Laplacian + coupling; the conformal coupling is d(d-2)/4. */
  | {
      readonly field: 'scalar';
      readonly dimension: number;
      readonly coupling: Form | 'conformal';
      readonly complex: boolean;
    }
  /** The Dirac operator, both signs of its eigenvalues, with a mass m: (n + d/2)^2 + m^2; m = 0 as linear factors. */
  | { readonly field: 'spinor'; readonly dimension: number; readonly mass: Form }
  /** The Hodge Laplacian on coexact p-forms. */
  | { readonly field: 'form'; readonly dimension: number; readonly degree: number }
  /** On S^2 with q = |flux|/2: scalar j(j+1) - q^2 + coupling, and the Dirac operator without its zero modes. */
  | { readonly field: 'charged scalar'; readonly q: Form; readonly coupling: Form }
  | { readonly field: 'charged spinor'; readonly q: Form };

export const DIMENSIONS = [2, 3, 4, 5, 6, 7] as const;

const SPHERE_SOURCE =
  'Rubin and Ordonez 1984, J. Math. Phys. 25, 2888; Camporesi and Higuchi 1996, gr-qc/9505009; Ikeda and Taniguchi 1978, Osaka J. Math. 15, 515; Elizalde, Lygren and Vassilevich 1996, hep-th/9602113';
const MONOPOLE_SOURCE = 'Wu and Yang 1976, Nucl. Phys. B107, 365; index theorem for the zero modes';

const n = Form.symbol(LEVEL);

/** The spectrum asked for; null outside S^2 ... S^7 and for forms that have no coexact modes. */
export function builtinSpectrum(request: BuiltinRequest): BuiltinSpectrum | null {
  switch (request.field) {
    case 'scalar':
      return inRange(request.dimension) ? scalar(request.dimension, request.coupling, request.complex) : null;
    case 'spinor':
      return inRange(request.dimension) ? spinor(request.dimension, request.mass) : null;
    case 'form': {
      const { dimension, degree } = request;
      const sound = inRange(dimension) && Number.isInteger(degree) && degree >= 0 && degree < dimension;
      return sound ? coexactForm(dimension, degree) : null;
    }
    case 'charged scalar':
      return chargedScalar(request.q, request.coupling);
    case 'charged spinor':
      return chargedSpinor(request.q);
  }
}

function inRange(dimension: number): boolean {
  return DIMENSIONS.some((d) => d === dimension);
}

function scalar(d: number, coupling: Form | 'conformal', complex: boolean): BuiltinSpectrum {
  const degeneracy = scalarDegeneracy(d);
  const kind = complex ? 'complex boson' : 'boson';
  const half = Form.ratio(d, 2);
  const eigenvalue =
    coupling === 'conformal'
      ? [n.add(half).sub(Form.one), n.add(half)]
      : coupling.isZero()
        ? [n, n.add(Form.number(d - 1))]
        : [n.mul(n.add(Form.number(d - 1))).add(coupling)];
  // Without coupling the constant is a zero mode, left out; so it is for the conformal coupling on S^2.
  const from = (coupling !== 'conformal' && coupling.isZero()) || (coupling === 'conformal' && d === 2) ? 1 : 0;
  const towers = [levelTower(kind, eigenvalue, degeneracy, from, `scalar on S^${d}`)];
  const spin = n.scale(Rational.of(1, 2));
  return made(`scalar${d}`, towers, d === 3 ? [{ left: spin, right: spin }] : [], SPHERE_SOURCE);
}

/** (2n+d-1) (n+d-2)!/(n! (d-1)!). */
function scalarDegeneracy(d: number): Form {
  return rising(1, d - 2)
    .mul(n.scale(2).add(Form.number(d - 1)))
    .scale(inverseFactorial(d - 1));
}

function spinor(d: number, mass: Form): BuiltinSpectrum {
  // Each sign: 2^[d/2] binomial(n+d-1, n).
  const each = rising(1, d - 1)
    .scale(inverseFactorial(d - 1))
    .scale(2 ** Math.floor(d / 2));
  const level = n.add(Form.ratio(d, 2));
  if (mass.isZero()) {
    const spin = n.scale(Rational.of(1, 2));
    const labels =
      d === 3
        ? [
            { left: spin, right: spin.add(Form.ratio(1, 2)) },
            { left: spin.add(Form.ratio(1, 2)), right: spin },
          ]
        : [];
    const towers = ['+', '-'].map((sign) => levelTower('fermion', [level], each, 0, `spinor on S^${d}, sign ${sign}`));
    return made(`spinor${d}`, towers, labels, SPHERE_SOURCE);
  }
  const eigenvalue = [level.mul(level).add(mass.mul(mass))];
  return made(
    `spinor${d}`,
    [levelTower('fermion', eigenvalue, each, 0, `massive spinor on S^${d}`)],
    [],
    SPHERE_SOURCE,
  );
}

function coexactForm(d: number, p: number): BuiltinSpectrum {
  // (2n+d-1) (n+d-1)!/(n-1)! / (p! (d-p-1)! (n+p) (n+d-p-1)); p = 0 is the scalar without its constant.
  const low = Math.min(p, d - p - 1);
  const high = d - p - 1 + p - low;
  const factors = Array.from({ length: d }, (_, k) => k).filter((k) => k !== low && k !== high);
  const middle = low === high;
  const lead = middle ? Form.number(2) : n.scale(2).add(Form.number(d - 1));
  const degeneracy = factors
    .reduce((product, k) => product.mul(n.add(Form.number(k))), lead)
    .scale(inverseFactorial(p).mul(inverseFactorial(d - p - 1)));
  const eigenvalue = [n.add(Form.number(p)), n.add(Form.number(d - p - 1))];
  const half = n.sub(Form.one).scale(Rational.of(1, 2));
  const labels =
    d === 3 && p === 1
      ? [
          { left: half, right: half.add(Form.one) },
          { left: half.add(Form.one), right: half },
        ]
      : [];
  const towers = [levelTower('boson', eigenvalue, degeneracy, 1, `coexact ${p}-form on S^${d}`)];
  return made(`form${d}${p}`, towers, labels, SPHERE_SOURCE);
}

function chargedScalar(q: Form, coupling: Form): BuiltinSpectrum {
  const j = n.add(q);
  const eigenvalue = j.mul(j.add(Form.one)).sub(q.mul(q)).add(coupling);
  const degeneracy = j.scale(2).add(Form.one);
  const towers = [levelTower('complex boson', [eigenvalue], degeneracy, 0, 'charged scalar on S^2')];
  return made('chargedscalar', towers, [], MONOPOLE_SOURCE);
}

function chargedSpinor(q: Form): BuiltinSpectrum {
  const eigenvalue = [n.add(Form.one), n.add(Form.one).add(q.scale(2))];
  const degeneracy = n.add(Form.one).add(q).scale(2);
  // The product of both signs, (j + 1/2)^2 - q^2 at j = n + q + 1/2; 2q zero modes of one chirality are left out.
  const towers = [levelTower('fermion', eigenvalue, degeneracy, 0, 'charged spinor on S^2')];
  return made('chargedspinor', towers, [], MONOPOLE_SOURCE);
}

/** (n + from) (n + from + 1) ... (n + to). */
function rising(from: number, to: number): Form {
  let product = Form.one;
  for (let k = from; k <= to; k++) product = product.mul(n.add(Form.number(k)));
  return product;
}

function inverseFactorial(k: number): Rational {
  let product = 1n;
  for (let i = 2; i <= k; i++) product *= BigInt(i);
  return Rational.of(1n, product);
}

function made(
  name: string,
  towers: readonly WrittenTower[],
  labels: readonly SpinLabels[],
  source: string,
): BuiltinSpectrum {
  return { spectrum: { name, towers, parameters: new Map() }, labels, source };
}
