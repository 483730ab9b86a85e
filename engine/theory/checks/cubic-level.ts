import { Rational } from '../../exact/rational';
import type { Printer } from '../../functions/special-function';
import type { Representation } from '../../lie/representation';
import { gaugeGroups, type Theory, type TheoryGroup } from '../theory';
import type { Condition, Finding } from './condition';
import { dimensionWithout, levelValue, matterOf } from './matter';
import { groupLatex, rationalLatex, sumLatex } from './words';

/**
 * The level of the cubic Chern-Simons term in five dimensions: for SU(n), n > 2, the level and half of the cubic index
 * of all hypers add up to an integer. Self-conjugate representations, hence half-hypers, have none. With a U(1) there
 * are more conditions, to which gravity contributes: they are left open.
 */
export const cubicLevel: Condition = {
  id: 'cubic-level',
  title: 'Cubic level',
  examine: (theory, print) =>
    gaugeGroups(theory).flatMap(({ group, index }) => {
      const finding = groupFinding(theory, group, index, print);
      return finding === null ? [] : [finding];
    }),
};

const RULE = {
  formula: '\\kappa+\\tfrac{1}{2}\\sum_{\\text{hypers}}A(R)\\in\\mathbb{Z}',
  source: 'N. Seiberg, hep-th/9608111 (1996); K. Intriligator, D. R. Morrison, N. Seiberg, hep-th/9702198 (1997)',
};

function groupFinding(theory: Theory, owner: TheoryGroup, index: number, print: Printer): Finding | null {
  const { group } = owner;
  const level = levelValue(theory, owner.level);
  const name = groupLatex(owner, print);
  if (!hasCubicTrace(owner)) {
    if (level.isZero()) return null;
    const why =
      group.family === 'SU' || group.family === 'U'
        ? 'the trace of the cube vanishes'
        : 'no cubic invariant is written in its coordinates';
    const says = `$${name}$ takes no cubic level $\\kappa=${rationalLatex(level)}$: ${why}.`;
    return { detail: owner.name, verdict: 'fails', says, ...RULE };
  }
  // For U(1) and U(2) the unit cocharacter, for larger n the cubic invariant of SU(n).
  const small = group.family === 'U' && (group.size ?? 0) < 3;
  const matter = cubicSum(theory, index, small ? unitCubes : cubicIndex).mul(Rational.of(1, 2));
  const total = level.add(matter);
  const sum = small ? (group.isAbelian ? 'q^3' : 'w_1^3') : 'A';
  const equation = `\\kappa+\\frac{1}{2}\\sum ${sum}=${sumLatex([level, matter])}=${rationalLatex(total)}`;
  const lead = `Cubic level of $${name}$: $${equation}$`;
  if (total.isInteger()) return { detail: owner.name, verdict: 'holds', says: `${lead} is an integer.`, ...RULE };
  if (small) {
    const says = `${lead} is not an integer; for a $\\mathrm{U}(1)$ a mixed term with gravity also counts, which was not worked out.`;
    return { detail: owner.name, verdict: 'unknown', says, ...RULE };
  }
  const below = total.sub(Rational.of(total.floor()));
  const [down, up] = [level.sub(below), level.sub(below).add(Rational.one)].map(rationalLatex);
  const says = `${lead} is not an integer; $\\kappa=${down}$ or $${up}$ would do.`;
  return { detail: owner.name, verdict: 'fails', says, ...RULE };
}

/** U(n), and SU(n) with n > 2, where Tr sigma^3 is a sum over the coordinates. */
export function hasCubicTrace({ group }: TheoryGroup): boolean {
  return group.family === 'U' || (group.family === 'SU' && (group.size ?? 0) > 2);
}

/** A cubic number of the hypers times the dimensions under the other groups. */
function cubicSum(theory: Theory, index: number, value: (representation: Representation) => Rational): Rational {
  return matterOf(theory).reduce((sum, { representations, withDual }) => {
    if (!withDual) return sum;
    const own = value(representations[index] as Representation);
    return own.isZero() ? sum : sum.add(own.mul(Rational.of(dimensionWithout(representations, index))));
  }, Rational.zero);
}

function cubicIndex(representation: Representation): Rational {
  return Rational.of(representation.cubic ?? 0n);
}

/** Sum of the cubes of the first entries of the weights. */
function unitCubes(representation: Representation): Rational {
  return representation.orbits().reduce((sum, orbit) => {
    const { denominator, vectors, width } = orbit.vectors();
    let cubes = 0n;
    for (let row = 0; row < vectors.length; row += width) cubes += BigInt(vectors[row] as number) ** 3n;
    return sum.add(Rational.of(cubes * BigInt(orbit.multiplicity), BigInt(denominator) ** 3n));
  }, Rational.zero);
}
