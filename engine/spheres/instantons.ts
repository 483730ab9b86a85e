import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import type { Group } from '../lie/group';
import { Representation } from '../lie/representation';
import { gaugeGroups, type Multiplet, type Theory, type TheoryGroup } from '../theory/theory';
import { matterWeights } from '../theory/weights';
import { type InstantonData, nekrasovTerms } from './nekrasov';
import type { CoefficientSum } from './sphere';

const b = Form.symbol('@b');
const inverseB = b.inverse();
const halfQ = b.add(inverseB).mul(Form.ratio(1, 2));

/**
 * Coefficient of q^order in the instanton factor at one pole of the four-sphere, for one gauge group U(n) or SU(n) with
 * fundamental, antifundamental, adjoint and neutral hypers: a = i sigma, e1 = b, e2 = 1/b, and a mass m enters as
 * Q/2 + i m. SU(n) is U(n) at traceless a, its U(1) factor kept.
 */
export function instantonCoefficient(theory: Theory, order: number, exchanged = false): CoefficientSum {
  const [gauge, ...more] = gaugeGroups(theory);
  if (!gauge || more.length > 0) {
    return refused(`Instantons are counted for one gauge group; this theory has ${more.length + (gauge ? 1 : 0)}.`);
  }
  const colours = coloursOf(gauge.group);
  if (colours === null) {
    return refused(`Instantons are counted for U(n) and SU(n); ${gauge.group.group.name} needs other formulas.`);
  }
  const fundamental: Form[] = [];
  const adjoint: Form[] = theory.supersymmetry === 4 ? [inverseB] : [];
  for (const multiplet of theory.multiplets) {
    const found = massesOf(theory, multiplet, gauge.index);
    if (found === null) {
      const { name } = multiplet;
      return refused(
        `Instantons are counted with fundamental, antifundamental and adjoint hypers; the multiplet \`${name}\` is none.`,
      );
    }
    fundamental.push(...found.fundamental);
    adjoint.push(...found.adjoint);
  }
  const [epsilon1, epsilon2] = exchanged ? [inverseB, b] : [b, inverseB];
  const data: InstantonData = { colours, epsilon1, epsilon2, fundamental, adjoint };
  const terms = nekrasovTerms(data, order);
  return terms === null
    ? refused(`There are too many Young diagrams with ${order} boxes; ask for a smaller instanton number.`)
    : { kind: 'sum', terms };
}

function refused(message: string): CoefficientSum {
  return { kind: 'refused', message };
}

/** i sigma_1 .. i sigma_n; null for other groups. */
function coloursOf({ group, coordinates, dependent }: TheoryGroup): Form[] | null {
  const forms = coordinates.map((name) => Form.i.mul(dependent.get(name) ?? Form.symbol(name)));
  if (group.family === 'U' || (group.family === 'SU' && forms.length > 1)) return forms;
  const [only, ...more] = forms;
  const doublet = (group.family === 'SU' || group.family === 'USp') && group.size === 2;
  return doublet && only && more.length === 0 ? [only, only.neg()] : null;
}

type Masses = Pick<InstantonData, 'fundamental' | 'adjoint'>;

/** Null where the multiplet is in another representation. */
function massesOf(theory: Theory, multiplet: Multiplet, index: number): Masses | null {
  const own = multiplet.representations[index] as Representation;
  if (own.isTrivial) return { fundamental: [], adjoint: [] };
  const { group } = own;
  const masses = flavourWeights(theory, multiplet, index);
  const fundamental: Form[] = [];
  const adjoint: Form[] = [];
  for (const { labels, charge, multiplicity } of own.irreps) {
    const kind = kindOf(group, labels, charge);
    if (kind === null || (multiplet.kind === 'halfhyper' && !(kind === 'fundamental' && group.rank === 1))) return null;
    if (kind === 'neutral') continue;
    const copies = Array.from({ length: multiplicity }, () => masses).flat();
    const whole = multiplet.kind === 'halfhyper' ? onePerPair(copies) : copies;
    if (whole === null) return null;
    const entered = whole.map((mass) => halfQ.add(Form.i.mul(kind === 'antifundamental' ? mass.neg() : mass)));
    (kind === 'adjoint' ? adjoint : fundamental).push(...entered);
  }
  return { fundamental, adjoint };
}

/** The whole adjoint of U(n) is an adjoint and a neutral part: together they count like the first. */
function kindOf(
  { rank, isAbelian, system }: Group,
  labels: readonly number[],
  charge: Rational,
): 'neutral' | 'fundamental' | 'antifundamental' | 'adjoint' | null {
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

/** The masses of the components under the other groups, with multiplicity. */
function flavourWeights(theory: Theory, { representations }: Multiplet, index: number): Form[] {
  const others = representations.map((one, k) => (k === index ? singletOf(one) : one));
  return matterWeights(theory.groups, others).flatMap(({ weights, multiplicity }) => {
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
