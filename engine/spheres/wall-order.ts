import { Form } from '../exact/form';
import { exactOrder } from '../product/divisor';
import { FLUX, WEIGHT } from '../product/factor';
import type { Condition, Finding } from '../theory/checks/condition';
import { cocharacterLattice, orbitOnLattice } from '../theory/checks/lattice';
import { groupLatex, nameLatex } from '../theory/checks/words';
import { gaugeGroups, type Theory } from '../theory/theory';
import { rootWeights, type TheoryWeights } from '../theory/weights';
import type { Sphere, TheoryProduct } from './sphere';

const SOURCE = 'Zeros and poles of the one-loop factors, counted here; common practice, no source.';

const FORMULA =
  '\\operatorname{ord}_{\\alpha(\\sigma)=0}Z_{\\text{1-loop}}=\\sum_{w\\parallel\\alpha}' +
  '\\operatorname{ord}_{x=0}Z_w(x)\\geq0';

/** More weights than this are not compared with the roots while somebody is typing. */
const WEIGHT_LIMIT = 20_000;

/**
 * The order of the one-loop factor on the walls of the Weyl chamber, where two charged gaugini become massless: the
 * zeros of the vector multiplet against the poles of matter with weights along the root, which lose their mass there,
 * too. Below 0 poles of w and -w pinch the contour. One line for each length of root; masses of flavour groups are
 * taken to be generic, fluxes to vanish. Silent where no matter has weights along a root.
 */
export function wallOrder(sphere: Sphere): Condition {
  return {
    id: 'wall',
    title: 'The integrand where the gauge group is restored in part',
    examine: (theory, print) =>
      gaugeGroups(theory).flatMap(({ group, index }) => {
        const roots = rootWeights(theory, index);
        const matter = theory.multiplets.map(({ name }, k) => ({
          name: nameLatex(name, print),
          product: sphere.multiplet(theory, theory.multiplets[k] as Theory['multiplets'][number]),
        }));
        return roots.flatMap(({ weights }, k): Finding[] => {
          const { rank } = cocharacterLattice(group.group);
          const root = rowsOf(theory, weights).subarray(0, rank);
          const lead = `On the walls $\\alpha(\\sigma)=0$ of $${groupLatex(group, print)}$`;
          const detail = roots.length === 1 ? group.name : `${group.name} ${k + 1}`;
          const common = { detail, formula: FORMULA, source: SOURCE };
          const counted = matter.map(({ name, product }) => ({
            name,
            ...orderAlong(sphere, theory, product, index, root),
          }));
          if (counted.some(({ weights: count }) => count === null)) {
            const says = `${lead} the order of the integrand was not counted: there are too many weights.`;
            return [{ ...common, verdict: 'unknown', says }];
          }
          if (counted.every(({ weights: count }) => count === 0)) return [];
          const own = orderAlong(sphere, theory, sphere.vector(theory), index, root).order;
          const total = counted.reduce((sum, { order }) => sum + order, own);
          const parts = counted
            .filter(({ order }) => order !== 0)
            .map(({ name, order }) => `$${name}$ ${signed(order)}`);
          const figures = `vector multiplet ${signed(own)}${parts.map((part) => `, ${part}`).join('')}`;
          const says =
            total < 0
              ? `${lead} the integrand has a pole of order ${-total} (${figures}): it pinches the contour of the Coulomb parameters.`
              : `${lead} the integrand ${total === 0 ? 'is finite' : `vanishes to order ${total}`} (${figures}).`;
          return [{ ...common, verdict: total < 0 ? 'fails' : 'holds', says }];
        });
      }),
  };
}

function signed(order: number): string {
  return order > 0 ? `+${order}` : `${order}`;
}

/**
 * Order of a product in x at w = x for the weights along a root of one gauge group, and the number of such weights; null
 * where there are too many to look at.
 */
function orderAlong(
  sphere: Sphere,
  theory: Theory,
  product: TheoryProduct,
  index: number,
  root: Int32Array,
): { readonly order: number; readonly weights: number | null } {
  let order = 0;
  let found = 0;
  for (const { name, argument, parameters, power, weights, half } of product) {
    const [part, ...others] = weights?.parts ?? [];
    // Weights with a part in another group are generic on the wall.
    if (weights === null || part?.group !== index || others.length > 0) continue;
    if (weights.size > WEIGHT_LIMIT) return { order: 0, weights: null };
    // Of one of each pair w, -w half as many lie along the root.
    const count = alongRoot(rowsOf(theory, weights), root) / (half ? 2 : 1);
    if (count === 0) continue;
    found += count;
    const at = [argument, ...parameters].map((form) => onWall(sphere, theory, form));
    const [here = Form.zero, ...fixed] = at;
    if (at.every((form) => form.symbols().length === 0)) order += count * power * exactOrder(name, here, fixed);
  }
  return { order, weights: found };
}

/** A form where weight and flux vanish, at the notebook's values and geometry. */
function onWall(sphere: Sphere, theory: Theory, form: Form): Form {
  const zero = form.substitute((name) => (name === WEIGHT || name === FLUX ? Form.zero : null));
  const valued = zero.substitute((name) => theory.parameters.get(name) ?? null);
  return sphere.geometry(theory).reduce((current, stage) => current.substitute(stage), valued);
}

/** Weights of a single group on its cocharacter lattice, integers row by row; kept by group and orbit. */
function rowsOf({ groups }: Theory, { parts }: TheoryWeights): Int32Array {
  const [part] = parts;
  const group = part && groups[part.group];
  return group ? orbitOnLattice(group.group, part.orbit, 1) : new Int32Array();
}

/** Rows that are multiples of the root; zero is no row of an orbit. */
function alongRoot(rows: Int32Array, root: Int32Array): number {
  const width = root.length;
  const pivot = root.findIndex((entry) => entry !== 0);
  const lead = root[pivot] as number;
  let count = 0;
  for (let start = 0; start < rows.length; start += width) {
    const own = rows[start + pivot] as number;
    let parallel = own !== 0;
    for (let k = 0; parallel && k < width; k++) {
      parallel = (rows[start + k] as number) * lead === (root[k] as number) * own;
    }
    if (parallel) count++;
  }
  return count;
}
