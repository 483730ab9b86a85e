import { Rational } from '../../exact/rational';
import type { Printer } from '../../functions/special-function';
import { gaugeGroups, type Theory } from '../theory';
import { type BranchRay, type CoulombBranch, coulombBranch } from './coulomb-branch';
import { fluxLatex } from './direction';
import { type Field, fTermOf } from './f-terms';
import { type Growth, growthOf } from './growth';
import { combinations, fieldsOf, type Operator, productLatex, totalR } from './operators';
import { addR, plainR, type RValue } from './r-values';

/** Monopole operators that are gauge-invariant, and in words where they were looked for. */
export interface MonopoleOperators {
  readonly found: readonly Operator[];
  readonly searched: string;
}

/**
 * The lightest bare monopole operator without effective level along its flux, and, where the gauge group is abelian, the
 * lightest one whose gauge charge -K_n is made up by chirals that feel no flux (Benini, Closset, Cremonesi 2011,
 * arXiv:1108.5373, section 2; Intriligator, Seiberg 2013, arXiv:1305.1633).
 */
export function monopoleOperators(theory: Theory, print: Printer): MonopoleOperators {
  const gauge = gaugeGroups(theory);
  if (gauge.length === 0) return { found: [], searched: '' };
  const branch = coulombBranch(theory);
  if (branch === null) return { found: [], searched: ', no monopole operators' };
  const growth = growthOf(theory, branch);
  const bare = branch.rays.flatMap((ray) =>
    growth.phase(ray.point, ray.sums).every((entry) => entry === 0)
      ? [operator(theory, branch, growth, ray, [], print)]
      : [],
  );
  const searched = ', bare monopole operators along the rays of the Coulomb branch';
  if (!gauge.every(({ group }) => group.group.isAbelian)) return { found: lightest(bare), searched };
  const fields = fieldsOf(theory, print);
  const dressed = branch.rays.flatMap((ray) =>
    dressings(branch, growth, ray, fields).map((product) => operator(theory, branch, growth, ray, product, print)),
  );
  return { found: [...lightest(bare), ...lightest(dressed)], searched: `${searched}, and dressed ones` };
}

function lightest(operators: readonly Operator[]): readonly Operator[] {
  const [first, ...others] = operators;
  if (first === undefined) return [];
  return [others.reduce((best, one) => (plainR(one.rCharge) < plainR(best.rCharge) ? one : best), first)];
}

function operator(
  theory: Theory,
  branch: CoulombBranch,
  growth: Growth,
  { point, sums }: BranchRay,
  fields: readonly Field[],
  print: Printer,
): Operator {
  const value = growth.monopole(point, sums);
  const own: RValue = growth.exactMonopoles ? Rational.of(value, growth.scale) : value / growth.scale;
  const name = `V_{${fluxLatex(theory, branch, point, print)}}`;
  return {
    latex: fields.length === 0 ? name : `${name}\\,${productLatex(fields)}`,
    fields,
    rCharge: addR(own, totalR(fields)),
    fTerm: fields.length === 0 ? 'none' : fTermOf(theory, fields, fieldsOf(theory, print)),
  };
}

/** Most chirals in a dressing. */
const LONGEST = 4;

/** Products of chirals whose charges vanish along the flux and add up to K_n; none where K_n vanishes. */
function dressings(
  branch: CoulombBranch,
  growth: Growth,
  { point, sums }: BranchRay,
  fields: readonly Field[],
): Field[][] {
  const charge = growth.phase(point, sums).map((entry) => Rational.of(entry, growth.phaseScale));
  if (charge.every((entry) => entry.isZero())) return [];
  const neutral = fields.filter((field) => {
    const own = chargesOf(field);
    const along = own?.reduce(
      (sum, q, k) => sum.add(q.mul(Rational.of(Math.round(point[k] as number)))),
      Rational.zero,
    );
    return own?.some((q) => !q.isZero()) && along?.isZero();
  });
  return Array.from({ length: LONGEST }, (_, k) => k + 1)
    .flatMap((count) => combinations(neutral, count))
    .filter((product) =>
      branch.groups.every((_, k) =>
        product
          .reduce((sum, field) => sum.add(chargesOf(field)?.[k] ?? Rational.zero), Rational.zero)
          .equals(charge[k] as Rational),
      ),
    );
}

/** The charges of a field under abelian groups; null for a sum of several. */
function chargesOf({ representations }: Field): readonly Rational[] | null {
  const charges = representations.flatMap(({ irreps }) =>
    irreps.length === 1 ? [irreps[0]?.charge ?? Rational.zero] : [],
  );
  return charges.length === representations.length ? charges : null;
}
