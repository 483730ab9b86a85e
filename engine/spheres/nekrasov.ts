import type { Form } from '../exact/form';
import type { CoefficientTerm, RegulatedFactor } from './sphere';
import { arm, boxesOf, countYoungTuples, leg, type YoungDiagram, youngTuples } from './young-diagrams';

/** What the instantons of U(N) know of a theory. */
export interface InstantonData {
  /** a_1 .. a_N. */
  readonly colours: readonly Form[];
  readonly epsilon1: Form;
  readonly epsilon2: Form;
  /** A fundamental hyper gives a_i + e1 (p - 1) + e2 (q - 1) + mass for every box (p, q). */
  readonly fundamental: readonly Form[];
  /** An adjoint hyper gives (E - mass)(e1 + e2 - E - mass) for every denominator E (e1 + e2 - E). */
  readonly adjoint: readonly Form[];
}

/** Number of factors beyond which a coefficient is not worked out. */
const MAXIMAL_FACTORS = 60_000;

/**
 * The coefficient of q^order of the instanton partition function of U(N) as a sum over N Young diagrams; null where it has
 * too many factors. With arm A and leg L (p row, q column, A along the row, L down the column)
 *   E_ij(s) = a_i - a_j - e1 L_{Y_j}(s) + e2 (A_{Y_i}(s) + 1), s in Y_i,
 * the vector multiplet gives 1/prod E_ij (e1 + e2 - E_ij). At special values (e1 = e2, a_i = a_j) single terms diverge
 * where the sum does not: e1 is therefore moved by d and a_i by a multiple of d.
 * Sources: N. Nekrasov, hep-th/0206161; L. F. Alday, D. Gaiotto, Y. Tachikawa, arXiv:0906.3219, appendix B.
 */
export function nekrasovTerms(data: InstantonData, order: number): readonly CoefficientTerm[] | null {
  const { colours, fundamental, adjoint } = data;
  const perTuple = order * (2 * colours.length * (1 + adjoint.length) + fundamental.length);
  if (countYoungTuples(colours.length, order) * perTuple > MAXIMAL_FACTORS) return null;
  const known = new Map<string, RegulatedFactor>();
  return youngTuples(colours.length, order).map((tuple) => tupleTerm(data, tuple, known));
}

/** How far a_i moves with d: farther apart than any sum of arms and legs. */
const slopeOf = (i: number): number => 1009 * i;

function tupleTerm(
  { colours, epsilon1, epsilon2, fundamental, adjoint }: InstantonData,
  tuple: readonly YoungDiagram[],
  known: Map<string, RegulatedFactor>,
): CoefficientTerm {
  const factors: RegulatedFactor[] = [];
  const total = epsilon1.add(epsilon2);
  const push = (key: string, power: 1 | -1, make: () => { value: Form; slope: number }): void => {
    const factor = known.get(key) ?? { ...make(), power };
    known.set(key, factor);
    factors.push(factor);
  };
  tuple.forEach((own, i) => {
    const a = colours[i] as Form;
    for (const { row, column } of boxesOf(own)) {
      tuple.forEach((other, j) => {
        const [down, along] = [leg(other, row, column), arm(own, row, column) + 1];
        const energy = a
          .sub(colours[j] as Form)
          .sub(epsilon1.scale(down))
          .add(epsilon2.scale(along));
        const slope = slopeOf(i) - slopeOf(j) - down;
        const key = [i, j, down, along].join();
        push(`E ${key}`, -1, () => ({ value: energy, slope }));
        push(`F ${key}`, -1, () => ({ value: total.sub(energy), slope: 1 - slope }));
        adjoint.forEach((mass, k) => {
          push(`E ${k} ${key}`, 1, () => ({ value: energy.sub(mass), slope }));
          push(`F ${k} ${key}`, 1, () => ({ value: total.sub(energy).sub(mass), slope: 1 - slope }));
        });
      });
      const content = a.add(epsilon1.scale(row - 1)).add(epsilon2.scale(column - 1));
      fundamental.forEach((mass, k) => {
        const slope = slopeOf(i) + row - 1;
        push(`M ${k} ${[i, row, column].join()}`, 1, () => ({ value: content.add(mass), slope }));
      });
    }
  });
  return factors;
}
