import { Form, FormError } from '../exact/form';
import { isGeometry } from '../product/factor';
import type { FixedValues } from '../spheres/quantity';
import type { Analysis, TheoryEntry } from './analysis';

/**
 * Values of the parameters without a range, for formulas of one theory: closed, and, where a parameter is an expression
 * in the one that squashes the sphere (`sphere S4, b = beta`, `let m = i(beta - 1/beta)/2`), in the symbol of the squashing.
 */
export function fixedValues({ parameters }: Analysis, { block, sphere }: TheoryEntry): FixedValues {
  const closed = new Map<string, Form>();
  const inGeometry = new Map<string, Form>();
  const squashing = squashingSymbols(block, sphere);
  /** Of parameters with a range, too: others are made from them. */
  const known = new Map<string, Form>();
  for (const [name, { block: typed, value, range }] of parameters) {
    if (value === null) continue;
    const form = squashing.get(name) ?? substituted(typed.value.form, known) ?? value;
    known.set(name, form);
    if (range !== null) continue;
    closed.set(name, value);
    if (!squashing.has(name) && form.symbols().some(isGeometry)) inGeometry.set(name, form);
  }
  return { closed, inGeometry };
}

/** Parameters that are a squashing by themselves; none where only some of the sphere's squashings are parameters. */
function squashingSymbols(block: TheoryEntry['block'], sphere: TheoryEntry['sphere']): Map<string, Form> {
  const symbols = new Map(
    (block.sphere?.options ?? []).flatMap(({ name, value }) => {
      const symbol = sphere?.squashing.find((one) => one.name === name.name)?.symbol;
      const [parameter, ...more] = value.form.symbols();
      const bare = parameter !== undefined && more.length === 0 && value.form.equals(Form.symbol(parameter));
      return symbol !== undefined && bare ? [[parameter, Form.symbol(symbol)] as const] : [];
    }),
  );
  return symbols.size === sphere?.squashing.length ? symbols : new Map();
}

/** Null where the values leave no form, as a division by zero does. */
function substituted(form: Form, values: ReadonlyMap<string, Form>): Form | null {
  try {
    return form.substitute((name) => values.get(name) ?? null);
  } catch (error) {
    if (error instanceof FormError) return null;
    throw error;
  }
}
