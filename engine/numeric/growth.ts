import { formDouble } from '../arithmetic/form-double';
import { Form } from '../exact/form';
import { functions } from '../functions/table';
import type { Product } from '../product/factor';
import { collectEntries, type Entry } from './precise';
import { compile } from './program';

/**
 * Log of the modulus of the leading growth of a product as a variable goes to +infinity (`end` 1) or -infinity, at the
 * given points; null where some factor has no simple growth there. Differs from the product by terms that vanish at
 * that end.
 */
export function asymptote(
  product: Product,
  variable: string,
  values: (name: string) => Form | null,
  end: 1 | -1,
  points: Float64Array,
): Float64Array | null {
  const entries = collectEntries(product, (name) => (name === variable ? null : values(name)));
  const re = new Float64Array(points.length);
  const im = new Float64Array(points.length);
  const still = entries.filter(({ argument }) => !argument.symbols().includes(variable));
  compile(still.map(asFactor), [], () => null).addLog([], re, im);
  const growth: Form[] = [];
  for (const entry of entries) {
    if (still.includes(entry)) continue;
    const form = growthOf(entry, variable, end);
    if (form === null) return null;
    growth.push(form.scale(entry.power));
  }
  const total = Form.sum(growth);
  for (let k = 0; k < points.length; k++) {
    const value = formDouble(total, (name) => (name === variable ? { re: points[k] as number, im: 0 } : null));
    re[k] = (re[k] as number) + (value?.re ?? Number.NaN);
  }
  return re.every((x) => Number.isFinite(x)) ? re : null;
}

function asFactor(entry: Entry): Product[number] {
  return { ...entry, weights: null, half: false, from: [] };
}

function growthOf({ name, argument, parameters }: Entry, variable: string, end: 1 | -1): Form | null {
  if (name === 'exponential') return argument;
  const { coefficient } = argument.linearPart(variable);
  for (const { direction, logarithm } of functions[name].growth) {
    const along = formDouble(direction.mul(coefficient), () => null);
    if (along !== null && along.re * end > 0) return logarithm(argument, parameters);
  }
  return null;
}
