import { gcd, Rational } from '../exact/rational';
import { type Refusal, refusal } from './refusal';
import type { RootSystem } from './root-system';

/** A group divided by a subgroup of its centre. */
export interface Quotient {
  /** Name of the group that is divided. */
  readonly cover: string;
  /** Order m of the subgroup Z_m. */
  readonly order: number;
  /** Least common denominator of (x, y), x the cocharacter that the quotient adds, y any other, in the level's form. */
  readonly levelDivisor: bigint;
}

/** What a quotient is made from. */
interface Cover {
  readonly name: string;
  readonly family: string;
  readonly size: number | null;
  readonly system: RootSystem;
  readonly simpleCoroots: readonly (readonly Rational[])[];
  readonly cocharacters: readonly (readonly Rational[])[];
  readonly levelScale: Rational;
}

/** Smallest n of SO(n) and Spin(n) whose quotients are read; the smaller ones go by the names of other groups. */
const SMALLEST_ORTHOGONAL = 5;

/**
 * The node k whose fundamental coweight (1 on the simple root alpha_k, 0 on the others) generates the subgroup Z_m of
 * the centre, or why there is no such subgroup. The centre is the coweight lattice over the cocharacter lattice, its
 * elements the coweights of nodes with mark 1 (Bourbaki, Lie, ch. VI, section 2.3).
 */
export function quotientNode(cover: Cover, order: number): number | Refusal {
  const { name, family, size, system } = cover;
  const n = size ?? 0;
  const { rank } = system;
  const centre = (text: string, remedy: string): Refusal =>
    refusal('group-unknown', `${name}/Z${order} does not exist.`, `The centre of ${name} is ${text}.`, remedy);
  switch (family) {
    case 'SU':
      if (order > 1 && n % order === 0) return n / order;
      return centre(`Z${n}`, `Write ${name}/Z${n}, with a divisor of ${n}.`);
    case 'USp':
      return order === 2 ? rank : centre('Z2', `Write ${name}/Z2.`);
    case 'E6':
      return order === 3 ? 1 : centre('Z3', 'Write E6/Z3.');
    case 'E7':
      return order === 2 ? 7 : centre('Z2', 'Write E7/Z2.');
    case 'SO':
    case 'Spin':
      return orthogonalNode(cover, order, n);
    case 'U':
      return refusal(
        'group-unknown',
        `${name}/Z${order} is not offered.`,
        'A quotient of U(n) by a finite group only changes the unit of its U(1) charges.',
        `Write ${name} and rescale the charges.`,
      );
    default:
      return centre('trivial', `Write ${name}.`);
  }
}

function orthogonalNode({ name, family, system }: Cover, order: number, n: number): number | Refusal {
  const odd = n % 2 === 1;
  const no = (what: string, why: string, remedy: string): Refusal => refusal('group-unknown', what, why, remedy);
  if (n < SMALLEST_ORTHOGONAL) {
    return no(
      `${name}/Z${order} is not read.`,
      'Quotients are taken of SO(n) and Spin(n) from n = 5 on.',
      `Write SO(${n}), or SU(2)/Z2.`,
    );
  }
  if (family === 'SO') {
    if (order === 2 && !odd) return system.rank;
    return no(
      `${name}/Z${order} does not exist.`,
      `The centre of ${name} is ${odd ? 'trivial' : 'Z2'}.`,
      odd ? `Write ${name}.` : `Write ${name}/Z2.`,
    );
  }
  if (order === 2 && (odd || n % 4 === 2)) return 1;
  if (order === 4 && n % 4 === 2) return system.rank;
  if (order === 2 && n % 4 === 0) {
    return no(
      `Which group is ${name}/Z2?`,
      `The centre of ${name} is Z2 x Z2; the subgroup that keeps vectors gives SO(${n}), the others half-spin groups, which are not offered.`,
      `Write SO(${n}), or SO(${n})/Z2 for the quotient by the whole centre.`,
    );
  }
  const centre = odd ? 'Z2' : n % 4 === 2 ? 'Z4' : 'Z2 x Z2';
  return no(`${name}/Z${order} does not exist.`, `The centre of ${name} is ${centre}.`, `Write SO(${n}).`);
}

/** The fundamental coweight of a node as a combination of the coroots: the column of the inverse Cartan matrix. */
function coweight({ system, simpleCoroots }: Cover, node: number): Rational[] {
  const { cartan, rank } = system;
  const rows = Array.from({ length: rank }, (_, i) => [
    ...Array.from({ length: rank }, (_unused, j) => Rational.of((cartan[i] as readonly number[])[j] as number)),
    i === node - 1 ? Rational.one : Rational.zero,
  ]);
  const y = solve(rows);
  const width = simpleCoroots[0]?.length ?? 0;
  return Array.from({ length: width }, (_, c) =>
    simpleCoroots.reduce((sum, coroot, j) => sum.add((coroot[c] as Rational).mul(y[j] as Rational)), Rational.zero),
  );
}

/** Solves a square system, or one with more rows than unknowns that has a solution; rows end in the right-hand side. */
function solve(rows: readonly (readonly Rational[])[]): Rational[] {
  const work = rows.map((row) => [...row]);
  const count = (work[0]?.length ?? 1) - 1;
  for (let k = 0; k < count; k++) {
    const place = work.findIndex((row, i) => i >= k && !(row[k] as Rational).isZero());
    [work[k], work[place]] = [work[place] as Rational[], work[k] as Rational[]];
    const pivot = (work[k] as Rational[])[k] as Rational;
    const top = (work[k] as Rational[]).map((entry) => entry.div(pivot));
    work[k] = top;
    for (const [i, row] of work.entries()) {
      const factor = row[k] as Rational;
      if (i !== k && !factor.isZero()) work[i] = row.map((entry, j) => entry.sub(factor.mul(top[j] as Rational)));
    }
  }
  return work.slice(0, count).map((row) => row[count] as Rational);
}

/**
 * The cocharacter lattice with a coweight x of order m added, as a basis: in the old basis x has an entry +-1/m up to an
 * integer, and x less that integer times the old vector takes its place.
 */
export function quotientLattice(
  cover: Cover,
  node: number,
  order: number,
): { readonly cocharacters: readonly (readonly Rational[])[]; readonly levelDivisor: bigint } {
  const x = coweight(cover, node);
  const { cocharacters, levelScale } = cover;
  const entries = solve(x.map((value, c) => [...cocharacters.map((basis) => basis[c] as Rational), value]));
  const unit = Rational.of(1, order);
  const place = entries.findIndex((entry) => [unit, unit.neg()].some((step) => entry.sub(step).isInteger()));
  const entry = entries[place] as Rational;
  const whole = entry.sub(unit).isInteger() ? entry.sub(unit) : entry.add(unit);
  const replaced = x.map((value, c) =>
    value.sub(whole.mul((cocharacters[place] as readonly Rational[])[c] as Rational)),
  );
  const all = cocharacters.map((basis, k) => (k === place ? replaced : basis));
  const products = all.map((y) =>
    replaced.reduce((sum, value, c) => sum.add(value.mul(y[c] as Rational)), Rational.zero).mul(levelScale),
  );
  const levelDivisor = products.reduce((m, { denominator: d }) => (m * d) / gcd(m, d), 1n);
  return { cocharacters: all, levelDivisor };
}
