import { Form } from '../exact/form';
import { memoiseByKey } from '../functions/kernel-memo';
import type { FunctionAt, FunctionName } from '../functions/special-function';
import { functions } from '../functions/table';
import { exactOrder } from './divisor';

/** Longest chain of shifts that is written out; longer ones stay special functions. */
const MAXIMAL_STEPS = 6;

/**
 * What is exactly known of the geometry symbols, as substitutions to be made one after the other: first definitions
 * (Q = b + 1/b), then values (b = 5/4).
 */
export type Geometry = readonly ((name: string) => Form | null)[];

/**
 * Integer combinations of a function's periods, to recognise arguments that differ by one. A difference counts if it
 * holds identically in all symbols, or once the geometry symbols are replaced.
 */
export class StepLattice {
  private readonly geometry: Geometry;
  private readonly combinations: ReadonlyMap<string, readonly number[]>;

  private constructor(combinations: ReadonlyMap<string, readonly number[]>, geometry: Geometry) {
    this.combinations = combinations;
    this.geometry = geometry;
  }

  private static of(name: FunctionName, parameters: readonly Form[], geometry: Geometry): StepLattice {
    const steps = functions[name].shifts.map((shift) => stages(shift.step(parameters), geometry));
    const key = steps.map((forms) => forms.map((form) => form.key).join(';')).join('|');
    return new StepLattice(
      combinationsOf(key, () => combine(steps)),
      geometry,
    );
  }

  /** The lattice of a function from those made before, or a new one. */
  static shared(
    known: Map<string, StepLattice>,
    name: FunctionName,
    parameters: readonly Form[],
    geometry: Geometry,
  ): StepLattice {
    const key = `${name}|${parameters.map((form) => form.key).join('|')}`;
    const lattice = known.get(key) ?? StepLattice.of(name, parameters, geometry);
    known.set(key, lattice);
    return lattice;
  }

  /** How many of each step make up the difference; null when it is no such combination. */
  decompose(difference: Form): readonly number[] | null {
    for (const form of stages(difference, this.geometry)) {
      const counts = this.combinations.get(form.key);
      if (counts) return counts;
    }
    return null;
  }

  /**
   * True unless a factor vanishes or diverges by itself, for every value of the symbols: the way between the two
   * arguments then leads over a zero or pole of the function, and the quotient is a limit that no product gives.
   */
  isRegular(chain: readonly FunctionAt[]): boolean {
    return chain.every(({ name, argument, parameters }) => {
      const constant = stages(argument, this.geometry).find((form) => form.symbols().length === 0);
      if (constant === undefined) return true;
      const known = parameters.map((form) => stages(form, this.geometry).at(-1) as Form);
      return exactOrder(name, constant, known) === 0;
    });
  }
}

/** By the steps before and after each substitution, which decide everything. */
const combinationsOf = memoiseByKey<ReadonlyMap<string, readonly number[]>>(64);

/** All short combinations of the steps, by what they are at each stage. */
function combine(steps: readonly (readonly Form[])[]): ReadonlyMap<string, readonly number[]> {
  const found = new Map<string, readonly number[]>();
  const count = steps[0]?.length ?? 0;
  for (const counts of countsUpTo(steps.length, MAXIMAL_STEPS)) {
    for (let stage = 0; stage < count; stage++) {
      const { key } = Form.sum(steps.map((forms, k) => (forms[stage] as Form).scale(counts[k] ?? 0)));
      if (!found.has(key)) found.set(key, counts);
    }
  }
  return found;
}

/** The form as it is and after each substitution. */
function stages(form: Form, geometry: Geometry): Form[] {
  const result = [form];
  for (const values of geometry) result.push((result.at(-1) as Form).substitute(values));
  return result;
}

/** All integer vectors of a length with sum of absolute values up to a bound, shortest first. */
function countsUpTo(length: number, bound: number): readonly number[][] {
  let vectors: number[][] = [[]];
  for (let k = 0; k < length; k++) {
    vectors = vectors.flatMap((v) => {
      const left = bound - v.reduce((sum, n) => sum + Math.abs(n), 0);
      return Array.from({ length: 2 * left + 1 }, (_, n) => [...v, n - left]);
    });
  }
  const size = (v: number[]): number => v.reduce((sum, n) => sum + Math.abs(n), 0);
  return vectors.sort((a, b) => size(a) - size(b));
}

/** f(x + sum of counts_k steps_k) / f(x) as elementary factors, by the function's declared shifts. */
export function expandChain(
  name: FunctionName,
  x: Form,
  parameters: readonly Form[],
  counts: readonly number[],
): FunctionAt[] {
  const result: FunctionAt[] = [];
  let at = x;
  functions[name].shifts.forEach((shift, k) => {
    const step = shift.step(parameters);
    const count = counts[k] ?? 0;
    for (let n = 0; n < Math.abs(count); n++) {
      if (count < 0) at = at.sub(step);
      for (const factor of shift.quotient(at, parameters)) {
        result.push(count < 0 ? { ...factor, power: -factor.power } : factor);
      }
      if (count > 0) at = at.add(step);
    }
  });
  return result;
}
