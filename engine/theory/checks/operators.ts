import { Rational } from '../../exact/rational';
import type { Printer } from '../../functions/special-function';
import type { Group } from '../../lie/group';
import type { Representation } from '../../lie/representation';
import { gaugeGroups, type SuperpotentialTerm, type Theory } from '../theory';
import { type Field, type FTerm, fTermOf } from './f-terms';
import { dimensionWithout, matterOf, rChargeValue } from './matter';
import { addR, compareR, plainR, type RValue } from './r-values';
import { containsSinglet } from './singlet';
import { nameLatex } from './words';

/** A gauge-invariant product of chiral fields; `fields` with repetition. */
export interface Operator {
  readonly latex: string;
  readonly fields: readonly Field[];
  readonly rCharge: RValue;
  readonly fTerm: FTerm;
}

export const HALF = Rational.of(1, 2);

export function fieldsOf(theory: Theory, print: Printer): Field[] {
  const gauge = gaugeGroups(theory).map(({ index }) => index);
  return matterOf(theory).flatMap((matter) => {
    const representations = gauge.map((index) => matter.representations[index] as Representation);
    const field: Field = {
      name: matter.name,
      latex: nameLatex(matter.name, print),
      representations,
      copies: Number(dimensionWithout(matter.representations, ...gauge)),
      rCharge: rChargeValue(theory, matter.rCharge),
    };
    if (!matter.withDual) return [field];
    const dual = representations.map((one) => one.conjugate());
    return [field, { ...field, latex: `\\tilde{${field.latex}}`, representations: dual }];
  });
}

/**
 * Single fields and products of two that are gauge-invariant; of products of three, of traces of powers of adjoints
 * and of baryons only those with R <= 1/2.
 */
export function operatorsOf(theory: Theory, print: Printer): Operator[] {
  const fields = fieldsOf(theory, print);
  const charged = fields.filter((field) => !field.representations.every((one) => one.isTrivial));
  const products = [
    ...fields.map((field) => [field]),
    ...combinations(charged, 2),
    ...combinations(charged, 3).filter(isLight),
    ...traces(theory, charged).filter(isLight),
  ].filter((product) => isInvariant(theory, product));
  const found = new Map<string, Operator>();
  for (const product of [...products, ...baryons(theory, charged).filter(isLight)]) {
    const latex = productLatex(product);
    if (found.has(latex)) continue;
    found.set(latex, { latex, fields: product, rCharge: totalR(product), fTerm: fTermOf(theory, product, fields) });
  }
  return [...found.values()];
}

export function combinations(fields: readonly Field[], count: number, from = 0): Field[][] {
  if (count === 0) return [[]];
  return fields
    .slice(from)
    .flatMap((field, k) => combinations(fields, count - 1, from + k).map((rest) => [field, ...rest]));
}

export function totalR(product: readonly Field[]): RValue {
  return product.reduce<RValue>((sum, { rCharge }) => addR(sum, rCharge), Rational.zero);
}

function isLight(product: readonly Field[]): boolean {
  return compareR(totalR(product), HALF) <= 0;
}

/** Where a field has enough copies, any symmetry among its powers is possible. */
function isInvariant(theory: Theory, product: readonly Field[]): boolean {
  const groups = gaugeGroups(theory).map(({ group }) => group.group);
  const counts = countFields(product);
  const factors = [...counts].flatMap(([{ representations, copies }, power]) =>
    copies >= power
      ? Array.from({ length: power }, () => ({ representations, power: 1, withDual: false }))
      : [{ representations, power, withDual: false }],
  );
  return containsSinglet(groups, factors).answer === 'yes';
}

function countFields(product: readonly Field[]): Map<Field, number> {
  const counts = new Map<Field, number>();
  for (const field of product) counts.set(field, (counts.get(field) ?? 0) + 1);
  return counts;
}

export function productLatex(product: readonly Field[]): string {
  return [...countFields(product)]
    .map(([{ latex }, power]) => (power === 1 ? latex : `${latex}^{${power}}`))
    .join('\\,');
}

/** Powers k > 3 of a field in the adjoint of one gauge group, k the degree of one of its invariants. */
function traces(theory: Theory, fields: readonly Field[]): Field[][] {
  const groups = gaugeGroups(theory).map(({ group }) => group.group);
  return fields.flatMap((field) =>
    groups.flatMap((group, place) => {
      if (!isAdjoint(field, group, place) || group.simple.length > 1) return [];
      return group.system.exponents.filter((e) => e > 2).map((e) => new Array<Field>(e + 1).fill(field));
    }),
  );
}

/** A field in the adjoint of one gauge group, neutral under the others. */
function isAdjoint({ representations }: Field, group: Group, place: number): boolean {
  const alone = representations.every((one, k) => k === place || one.isTrivial);
  return alone && !group.isAbelian && Number((representations[place] as Representation).dimension) === group.dimension;
}

/**
 * The lightest product of n different copies of fundamentals, of antifundamentals (of vectors) that the totally
 * antisymmetric tensor of SU(n) (of SO(n)) contracts, n > 2. Copies dressed with powers of an adjoint count as different
 * (Kutasov, Schwimmer, Seiberg 1996, hep-th/9510222), of an adjoint that no superpotential constrains.
 */
function baryons(theory: Theory, fields: readonly Field[]): Field[][] {
  return gaugeGroups(theory).flatMap(({ group: { group } }, place) => {
    const size = group.size ?? 0;
    if (!['SU', 'SO', 'Spin'].includes(group.family) || size < 3) return [];
    const adjoints = fields.filter(
      (field) => isAdjoint(field, group, place) && !theory.superpotential.some((term) => mentions(term, field)),
    );
    const [adjoint] = adjoints.sort((a, b) => plainR(a.rCharge) - plainR(b.rCharge));
    const kinds = new Map<string, Field[]>();
    for (const field of fields) {
      const representation = field.representations[place] as Representation;
      const alone = field.representations.every((one, k) => k === place || one.isTrivial);
      const [irrep] = representation.irreps;
      if (!alone || representation.irreps.length !== 1 || irrep === undefined) continue;
      if (Number(representation.dimension) / irrep.multiplicity !== size) continue;
      const key = irrep.labels.join();
      const copies = Math.min(field.copies * irrep.multiplicity, size);
      kinds.set(key, [...(kinds.get(key) ?? []), ...new Array<Field>(copies).fill(field)]);
    }
    return [...kinds.values()].flatMap((copies) => {
      const dressed = copies.flatMap((field) =>
        Array.from({ length: adjoint === undefined ? 1 : size }, (_, power) => [
          field,
          ...new Array<Field>(power).fill(adjoint ?? field),
        ]),
      );
      if (dressed.length < size) return [];
      return [
        dressed
          .sort((a, b) => plainR(totalR(a)) - plainR(totalR(b)))
          .slice(0, size)
          .flat(),
      ];
    });
  });
}

function mentions({ fields }: SuperpotentialTerm, { name }: Field): boolean {
  return fields.some(({ field }) => field.name === name);
}
