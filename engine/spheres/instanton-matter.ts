import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import type { Group } from '../lie/group';
import { Representation } from '../lie/representation';
import { gaugeGroups, type Multiplet, type Theory } from '../theory/theory';
import { matterWeights } from '../theory/weights';
import type { Bifundamental, InstantonNode } from './nekrasov';

/** What the hypers of a multiplet give the instantons: by node, in the order of the gauge groups, and between nodes. */
export interface InstantonMatter {
  readonly nodes: readonly Pick<InstantonNode, 'fundamental' | 'adjoint'>[];
  readonly bifundamental: readonly Bifundamental[];
}

export type MatterResult =
  | { readonly kind: 'matter'; readonly matter: InstantonMatter }
  | { readonly kind: 'refused'; readonly message: string };

/** What an irreducible representation of one gauge group is to instantons. */
type Kind = 'neutral' | 'fundamental' | 'antifundamental' | 'adjoint';

/** A component of a multiplet: its kinds by node, and how often it is there. */
interface Component {
  readonly kinds: readonly Kind[];
  readonly multiplicity: number;
}

const b = Form.symbol('@b');
const halfQ = b.add(b.inverse()).mul(Form.ratio(1, 2));

/**
 * Fundamentals, adjoints and bifundamentals of a multiplet. Masses enter as Q/2 + i m in a fundamental, Q/2 - i m in an
 * antifundamental; a bifundamental does to either node what its flavours would do.
 */
export function instantonMatter(theory: Theory, multiplet: Multiplet): MatterResult {
  const gauge = gaugeGroups(theory);
  const groups = gauge.map(({ group }) => group.group);
  const own = gauge.map(({ index }) => multiplet.representations[index] as Representation);
  const components = componentsOf(own);
  const { name } = multiplet;
  const none = refused(
    'Instantons are counted with fundamental, antifundamental, bifundamental and adjoint hypers; the multiplet ' +
      `\`${name}\` is none.`,
  );
  if (components === null) return none;
  const nodes = gauge.map((): { fundamental: Form[]; adjoint: Form[] } => ({ fundamental: [], adjoint: [] }));
  const bifundamental: Bifundamental[] = [];
  const all = flavourWeights(theory, multiplet);
  for (const { kinds, multiplicity } of components) {
    const charged = kinds.flatMap((kind, n) => (kind === 'neutral' ? [] : [{ kind, n, group: groups[n] as Group }]));
    const [one, other, ...more] = charged;
    if (one === undefined) continue;
    const half = multiplet.kind === 'halfhyper';
    if (more.length > 0 || (half && !charged.every(({ group }) => isDoublet(group)))) return none;
    const copies = Array.from({ length: multiplicity }, () => all).flat();
    const masses = half ? onePerPair(copies) : copies;
    if (masses === null) return none;
    if (other === undefined) {
      const sign = one.kind === 'antifundamental' ? -1 : 1;
      const entered = masses.map((mass) => halfQ.add(Form.i.scale(sign).mul(mass)));
      nodes[one.n]?.[one.kind === 'adjoint' ? 'adjoint' : 'fundamental'].push(...entered);
      continue;
    }
    if (one.kind === 'adjoint' || other.kind === 'adjoint') return none;
    const first = fundamentalOf(one, other);
    if (first === null) {
      return refused(
        `Instantons are counted with a fundamental of one group times an antifundamental of the other; \`${name}\` is ` +
          'neither way round. Conjugate all matter of one group: its Coulomb parameters change their sign.',
      );
    }
    const [from, to] = first === one ? [one.n, other.n] : [other.n, one.n];
    bifundamental.push(...masses.map((mass) => ({ from, to, mass: halfQ.sub(Form.i.mul(mass)) })));
  }
  return { kind: 'matter', matter: { nodes, bifundamental } };
}

function refused(message: string): MatterResult {
  return { kind: 'refused', message };
}

/** All ways to take an irreducible part for each group; null where one of them is of another kind. */
function componentsOf(representations: readonly Representation[]): readonly Component[] | null {
  let components: readonly Component[] = [{ kinds: [], multiplicity: 1 }];
  for (const { group, irreps } of representations) {
    const parts = irreps.map(({ labels, charge, multiplicity }) => ({
      kind: kindOf(group, labels, charge),
      multiplicity,
    }));
    const known = parts.flatMap(({ kind, multiplicity }) => (kind === null ? [] : [{ kind, multiplicity }]));
    if (known.length < parts.length) return null;
    components = components.flatMap(({ kinds, multiplicity }) =>
      known.map((part) => ({ kinds: [...kinds, part.kind], multiplicity: multiplicity * part.multiplicity })),
    );
  }
  return components;
}

/** The whole adjoint of U(n) is an adjoint and a neutral part: together they count like the first. */
function kindOf({ rank, isAbelian, system }: Group, labels: readonly number[], charge: Rational): Kind | null {
  const last = system.rank - 1;
  const unit = (place: number): boolean => labels.every((label, k) => label === (k === place ? 1 : 0));
  const of = (n: number): boolean => charge.isZero() || charge.equals(Rational.of(n));
  if (labels.every((label) => label === 0)) {
    if (charge.isZero()) return 'neutral';
    if (!isAbelian) return null;
    return charge.equals(Rational.one) ? 'fundamental' : charge.equals(Rational.of(-1)) ? 'antifundamental' : null;
  }
  if (unit(0) && of(1)) return 'fundamental';
  if (unit(last) && of(-1)) return 'antifundamental';
  const ends = labels.every((label, k) => label === (k === 0 ? 1 : 0) + (k === last ? 1 : 0));
  return ends && charge.isZero() && rank > 0 ? 'adjoint' : null;
}

/** SU(2), whose fundamental is its own conjugate. */
function isDoublet({ family, size }: Group): boolean {
  return (family === 'SU' || family === 'USp') && size === 2;
}

/** The one of two that is read as a fundamental, the other as an antifundamental; null where both are of one kind. */
function fundamentalOf<T extends { readonly kind: Kind; readonly group: Group }>(one: T, other: T): T | null {
  if (isDoublet(one.group)) return isDoublet(other.group) || other.kind === 'antifundamental' ? one : other;
  if (isDoublet(other.group)) return one.kind === 'fundamental' ? one : other;
  if (one.kind === other.kind) return null;
  return one.kind === 'fundamental' ? one : other;
}

/** The masses of the components under the flavour groups, with multiplicity. */
function flavourWeights({ groups }: Theory, { representations }: Multiplet): Form[] {
  const others = representations.map((one, k) => (groups[k]?.role === 'gauge' ? singletOf(one) : one));
  return matterWeights(groups, others).flatMap(({ weights, multiplicity }) => {
    const positions = weights === null ? [Form.zero] : weights.weights().map(({ position }) => position);
    return positions.flatMap((position) => new Array<Form>(multiplicity).fill(position));
  });
}

function singletOf({ group, irreps }: Representation): Representation {
  const labels = irreps[0]?.labels.map(() => 0) ?? [];
  return new Representation(group, [{ labels, charge: Rational.zero, multiplicity: 1 }]);
}

/** One of each pair m, -m; null where zero is left over. */
function onePerPair(masses: readonly Form[]): Form[] | null {
  const zeros = masses.filter((mass) => mass.isZero());
  if (zeros.length % 2 !== 0) return null;
  const chosen = masses.filter((mass) => mass.terms[0]?.coefficient.re.sign() === 1);
  return [...chosen, ...zeros.slice(0, zeros.length / 2)];
}
