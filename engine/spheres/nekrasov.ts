import type { Form } from '../exact/form';
import type { CoefficientTerm, RegulatedFactor } from './sphere';
import { arm, boxesOf, countYoungTuples, leg, type YoungDiagram, youngTuples } from './young-diagrams';

/** One gauge group U(N) of a quiver. */
export interface InstantonNode {
  /** a_1 .. a_N. */
  readonly colours: readonly Form[];
  /** A fundamental hyper gives a_i + e1 (p - 1) + e2 (q - 1) + mass for every box (p, q). */
  readonly fundamental: readonly Form[];
  /** An adjoint hyper gives (E - mass)(e1 + e2 - E - mass) for every denominator E (e1 + e2 - E). */
  readonly adjoint: readonly Form[];
}

/** A hyper in the fundamental of the node `from` and the antifundamental of the node `to`. */
export interface Bifundamental {
  readonly from: number;
  readonly to: number;
  /** A box of `from` gives E - mass, a box of `to` gives E - (e1 + e2 - mass), E between the two nodes. */
  readonly mass: Form;
}

/** What the instantons of a product of U(N) know of a theory. */
export interface InstantonData {
  readonly nodes: readonly InstantonNode[];
  readonly bifundamental: readonly Bifundamental[];
  readonly epsilon1: Form;
  readonly epsilon2: Form;
}

/** Number of factors beyond which a coefficient is not worked out. */
const MAXIMAL_FACTORS = 60_000;

/**
 * The coefficient of q_1^k_1 q_2^k_2 .. of the instanton partition function of U(N_1) x U(N_2) x .., or the sum of several,
 * as a sum over one Young diagram a colour, k_n boxes at node n; null where it has too many factors. With arm A and leg L (p row, q column, A
 * along the row, L down the column)
 *   E_ij(s) = a_i - a_j - e1 L_{Y_j}(s) + e2 (A_{Y_i}(s) + 1), s in Y_i,
 * a vector multiplet gives 1/prod E_ij (e1 + e2 - E_ij) over the colours of its node. At special values (e1 = e2,
 * a_i = a_j) single terms diverge where the sum does not: e1 is therefore moved by d and a_i by a multiple of d.
 * Sources: N. Nekrasov, hep-th/0206161; F. Fucito, J. F. Morales, R. Poghossian, hep-th/0408090 (quivers); L. F. Alday,
 * D. Gaiotto, Y. Tachikawa, arXiv:0906.3219, appendix B.
 */
export function nekrasovTerms(
  data: InstantonData,
  orders: Iterable<readonly number[]>,
): readonly CoefficientTerm[] | null {
  const wanted: (readonly number[])[] = [];
  let size = 0;
  for (const one of orders) {
    wanted.push(one);
    size += factorCount(data, one);
    if (size > MAXIMAL_FACTORS) return null;
  }
  const terms = new TupleTerms(data);
  return wanted.flatMap((one) => tuplesOf(data, one).map((tuples) => terms.term(tuples)));
}

/** Diagrams for the colours of every node. */
function tuplesOf({ nodes }: InstantonData, order: readonly number[]): readonly (readonly YoungDiagram[])[][] {
  const choices = nodes.map(({ colours }, n) => youngTuples(colours.length, order[n] as number));
  return choices.reduce<(readonly YoungDiagram[])[][]>(
    (some, tuples) => some.flatMap((chosen) => tuples.map((tuple) => [...chosen, tuple])),
    [[]],
  );
}

function factorCount(data: InstantonData, order: readonly number[]): number {
  const tuples = data.nodes.map(({ colours }, n) => countYoungTuples(colours.length, order[n] as number));
  return tuples.reduce((product, count) => product * count, factorsPerTerm(data, order));
}

function factorsPerTerm({ nodes, bifundamental }: InstantonData, orders: readonly number[]): number {
  const own = nodes.map(
    ({ colours, fundamental, adjoint }, n) =>
      (orders[n] as number) * (2 * colours.length * (1 + adjoint.length) + fundamental.length),
  );
  const between = bifundamental.map(({ from, to }) => {
    const [a, b] = [from, to].map((n) => nodes[n]?.colours.length ?? 0) as [number, number];
    return (orders[from] as number) * b + (orders[to] as number) * a;
  });
  return [...own, ...between].reduce((sum, count) => sum + count, 0);
}

/** A colour with its diagram; `index` counts the colours of all nodes. */
interface Colour {
  readonly a: Form;
  readonly diagram: YoungDiagram;
  readonly index: number;
}

/** How far a_i moves with d: farther apart than any sum of arms and legs. */
const slopeOf = ({ index }: Colour): number => 1009 * index;

/** The terms of one sum; equal factors are one object, so that their values are worked out once. */
class TupleTerms {
  private readonly data: InstantonData;
  private readonly total: Form;
  private readonly known = new Map<string, RegulatedFactor>();

  constructor(data: InstantonData) {
    this.data = data;
    this.total = data.epsilon1.add(data.epsilon2);
  }

  term(tuples: readonly (readonly YoungDiagram[])[]): CoefficientTerm {
    let index = 0;
    const colours = this.data.nodes.map((node, n) =>
      node.colours.map((a, i): Colour => ({ a, diagram: tuples[n]?.[i] ?? [], index: index++ })),
    );
    return [
      ...this.data.nodes.flatMap((node, n) => this.nodeFactors(node, n, colours[n] ?? [])),
      ...this.data.bifundamental.flatMap(({ from, to, mass }, k) => {
        const [one, other] = [colours[from] ?? [], colours[to] ?? []];
        // The two belong together: where e1 moves, so does the sum of their masses.
        return [
          ...this.between(one, other, `B ${k}`, { value: mass, slope: 0 }),
          ...this.between(other, one, `C ${k}`, { value: this.total.sub(mass), slope: 1 }),
        ];
      }),
    ];
  }

  private nodeFactors(
    { fundamental, adjoint }: InstantonNode,
    n: number,
    colours: readonly Colour[],
  ): RegulatedFactor[] {
    const { epsilon1, epsilon2 } = this.data;
    const factors: RegulatedFactor[] = [];
    for (const { key, energy, slope } of this.energies(colours, colours)) {
      const rest = (): Form => this.total.sub(energy());
      factors.push(
        this.factor(`E ${key}`, energy, slope, -1),
        this.factor(`F ${key}`, rest, 1 - slope, -1),
        ...adjoint.flatMap((mass, k) => [
          this.factor(`E ${n} ${k} ${key}`, () => energy().sub(mass), slope, 1),
          this.factor(`F ${n} ${k} ${key}`, () => rest().sub(mass), 1 - slope, 1),
        ]),
      );
    }
    for (const colour of colours) {
      for (const { row, column } of boxesOf(colour.diagram)) {
        const content = (): Form => colour.a.add(epsilon1.scale(row - 1)).add(epsilon2.scale(column - 1));
        const slope = slopeOf(colour) + row - 1;
        fundamental.forEach((mass, k) => {
          const key = `M ${n} ${k} ${[colour.index, row, column].join()}`;
          factors.push(this.factor(key, () => content().add(mass), slope, 1));
        });
      }
    }
    return factors;
  }

  /** E_ij(s) - mass for the boxes of the first colours. */
  private between(
    from: readonly Colour[],
    to: readonly Colour[],
    name: string,
    mass: { readonly value: Form; readonly slope: number },
  ): RegulatedFactor[] {
    return [...this.energies(from, to)].map(({ key, energy, slope }) =>
      this.factor(`${name} ${key}`, () => energy().sub(mass.value), slope - mass.slope, 1),
    );
  }

  /** All E_ij(s), s in Y_i, i from the first colours, j from the second. */
  private *energies(
    from: readonly Colour[],
    to: readonly Colour[],
  ): Generator<{ readonly key: string; readonly energy: () => Form; readonly slope: number }> {
    const { epsilon1, epsilon2 } = this.data;
    for (const own of from) {
      for (const { row, column } of boxesOf(own.diagram)) {
        for (const other of to) {
          const [down, along] = [leg(other.diagram, row, column), arm(own.diagram, row, column) + 1];
          yield {
            key: [own.index, other.index, down, along].join(),
            energy: () => own.a.sub(other.a).sub(epsilon1.scale(down)).add(epsilon2.scale(along)),
            slope: slopeOf(own) - slopeOf(other) - down,
          };
        }
      }
    }
  }

  private factor(key: string, value: () => Form, slope: number, power: 1 | -1): RegulatedFactor {
    const factor = this.known.get(key) ?? { value: value(), slope, power };
    this.known.set(key, factor);
    return factor;
  }
}
