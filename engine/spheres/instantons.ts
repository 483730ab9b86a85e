import { Form } from '../exact/form';
import { gaugeGroups, type Theory, type TheoryGroup } from '../theory/theory';
import { type InstantonMatter, instantonMatter } from './instanton-matter';
import { type InstantonData, nekrasovTerms } from './nekrasov';
import type { CoefficientSum, SeriesOrder } from './sphere';

const b = Form.symbol('@b');
const inverseB = b.inverse();

/**
 * Coefficient of q_1^k_1 q_2^k_2 .. in the instanton factor at one pole of the four-sphere, a power for each gauge group
 * in the order of the text, or of q^k with one q for all of them. The groups are U(n) and SU(n), hypers fundamental,
 * antifundamental, bifundamental, adjoint and neutral: a = i sigma, e1 = b, e2 = 1/b, and a mass m enters as Q/2 + i m.
 * SU(n) is U(n) at traceless a, its U(1) factor kept.
 */
export function instantonCoefficient(theory: Theory, order: SeriesOrder, exchanged = false): CoefficientSum {
  const gauge = gaugeGroups(theory);
  if (gauge.length === 0) return refused('There are no instantons: this theory has no gauge group.');
  if (typeof order !== 'number' && order.length !== gauge.length) {
    const names = gauge.map(({ group }) => group.name).join(', ');
    return refused(
      `\`instanton\` takes one order for each gauge group, here ${gauge.length} (${names}); ${order.length} are given.`,
    );
  }
  const read = dataOf(theory, exchanged);
  if (typeof read === 'string') return refused(read);
  const terms = nekrasovTerms(read, typeof order === 'number' ? compositions(order, gauge.length) : [order]);
  if (terms !== null) return { kind: 'sum', terms };
  const boxes = typeof order === 'number' ? order : order.reduce((sum, k) => sum + k, 0);
  return refused(`There are too many Young diagrams with ${boxes} boxes; ask for a smaller instanton number.`);
}

/** Conventions beside a coefficient, and what is known of the U(1) factor in it. */
export function instantonNotes(theory: Theory): readonly string[] {
  const gauge = gaugeGroups(theory);
  const data = dataOf(theory, false);
  const traceless = gauge.filter(({ group }) => group.group.family !== 'U').map(({ group }) => group.name);
  return [
    `Coefficient of ${gauge.length < 2 ? '$q^k$' : '$q_1^{k_1}q_2^{k_2}\\cdots$'} at one pole, with $a=i\\sigma$, ` +
      '$\\epsilon_1=b$, $\\epsilon_2=b^{-1}$ and masses entering as $Q/2+im$; at the other pole it is the complex conjugate.',
    ...(typeof data !== 'string' && data.bifundamental.length > 0
      ? [
          'A bifundamental of mass $m$ gives $E-Q/2+im$ for each box of the group of its fundamental, $E-Q/2-im$ for each ' +
            'box of the other: to either group it is so many flavours, and no sign of $q$ changes.',
        ]
      : []),
    ...(traceless.length === 0
      ? []
      : [
          `It is that of $U(n)$ at traceless $a$${gauge.length < 2 ? '' : ` for ${traceless.join(', ')}`}: the factor of ` +
            `the $U(1)$ is not divided out.${typeof data === 'string' ? '' : unitaryFactor(theory, data)}`,
        ]),
  ];
}

/** What is known of the U(1) factor of SU(2): L. F. Alday, D. Gaiotto, Y. Tachikawa, arXiv:0906.3219, sections 3.3 and 5. */
function unitaryFactor(theory: Theory, { nodes }: InstantonData): string {
  const [node, ...more] = nodes;
  const hasUnitary = gaugeGroups(theory).some(({ group }) => group.group.family === 'U');
  if (!node || more.length > 0 || hasUnitary || node.colours.length !== 2) return '';
  if (node.fundamental.length === 4 && node.adjoint.length === 0) {
    return (
      ' With $M_f=Q/2+im_f$ it is $(1-q)^{(M_1+M_2)(M_3+M_4)/2}$ for any split of the four flavours into pairs, and what ' +
      'it leaves is the Virasoro block of that split.'
    );
  }
  if (node.fundamental.length > 0 || node.adjoint.length !== 1) return '';
  return (
    ' With $M=Q/2+im$ it is $\\prod_{n\\ge1}(1-q^n)^{2M(Q-M)-1}$, and what it leaves is the Virasoro block of one point on the ' +
    'torus.'
  );
}

function refused(message: string): CoefficientSum {
  return { kind: 'refused', message };
}

/** A string says in words why there is none. */
function dataOf(theory: Theory, exchanged: boolean): InstantonData | string {
  const colours: Form[][] = [];
  for (const { group } of gaugeGroups(theory)) {
    const own = coloursOf(group);
    if (own === null) return `Instantons are counted for U(n) and SU(n); ${group.group.name} needs other formulas.`;
    colours.push(own);
  }
  const matter: InstantonMatter[] = [];
  for (const multiplet of theory.multiplets) {
    const result = instantonMatter(theory, multiplet);
    if (result.kind === 'refused') return result.message;
    matter.push(result.matter);
  }
  const partner = theory.supersymmetry === 4 ? [inverseB] : [];
  const [epsilon1, epsilon2] = exchanged ? [inverseB, b] : [b, inverseB];
  return {
    nodes: colours.map((own, n) => ({
      colours: own,
      fundamental: matter.flatMap(({ nodes }) => nodes[n]?.fundamental ?? []),
      adjoint: [...partner, ...matter.flatMap(({ nodes }) => nodes[n]?.adjoint ?? [])],
    })),
    bifundamental: matter.flatMap(({ bifundamental }) => bifundamental),
    epsilon1,
    epsilon2,
  };
}

/** i sigma_1 .. i sigma_n; null for other groups. */
function coloursOf({ group, coordinates, dependent }: TheoryGroup): Form[] | null {
  const forms = coordinates.map((name) => Form.i.mul(dependent.get(name) ?? Form.symbol(name)));
  if (group.family === 'U' || (group.family === 'SU' && forms.length > 1)) return forms;
  const [only, ...more] = forms;
  const doublet = (group.family === 'SU' || group.family === 'USp') && group.size === 2;
  return doublet && only && more.length === 0 ? [only, only.neg()] : null;
}

/** All ways to write a number as an ordered sum of non-negative ones. */
function* compositions(total: number, parts: number): Generator<readonly number[]> {
  if (parts === 1) {
    yield [total];
    return;
  }
  for (let first = 0; first <= total; first++) {
    for (const rest of compositions(total - first, parts - 1)) yield [first, ...rest];
  }
}
