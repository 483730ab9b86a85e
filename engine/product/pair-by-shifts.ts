import { Form } from '../exact/form';
import type { FunctionAt } from '../functions/special-function';
import { functions } from '../functions/table';
import { expandChain, type Geometry, StepLattice } from './chain';
import { constantFactor, type Factor, flipped, type Product, type WeightSet } from './factor';
import { buckets, flippable, unfolded } from './gather';

/** Replaces quotients at arguments that differ by periods; what they leave is taken over the same weights. */
export function pairByShifts<W extends WeightSet>(
  product: Product<W>,
  geometry: Geometry,
  lattices: Map<string, StepLattice>,
): Product<W> {
  return buckets(product.map((factor) => unfolded(factor))).flatMap((bucket) => {
    const first = bucket[0] as Factor<W>;
    if (functions[first.name].elementary || functions[first.name].shifts.length === 0) return bucket;
    const lattice = StepLattice.shared(lattices, first.name, first.parameters, geometry);
    const open = [...bucket];
    const made: Factor<W>[] = [];
    for (let i = 0; i < open.length; i++) {
      for (let j = i + 1; j < open.length; j++) pairTwo(open, i, j, lattice, made);
      pairItself(open, i, lattice, made);
    }
    const define = geometry[0] ?? (() => null);
    const elementary = made.map((f) => ({ ...f, argument: f.argument.substitute(define) }));
    return [...open.filter(({ power }) => power !== 0), ...elementary];
  });
}

/** The ways to write f(y)^q as f(x)^power: as it stands, flipped, reflected. */
function variants(factor: Factor): { argument: Form; power: number }[] {
  const direct = [{ argument: factor.argument, power: factor.power }];
  for (const reflection of functions[factor.name].reflections) {
    if (reflection.sign !== 1) continue;
    const twice = reflection.center(factor.parameters).scale(2);
    direct.push({ argument: twice.sub(factor.argument), power: factor.power * reflection.power });
  }
  return flippable(factor) ? direct.flatMap((v) => [v, { ...v, argument: flipped(v.argument) }]) : direct;
}

function pairTwo<W extends WeightSet>(
  open: Factor<W>[],
  i: number,
  j: number,
  lattice: StepLattice,
  made: Factor<W>[],
): void {
  const a = open[i] as Factor<W>;
  const b = open[j] as Factor<W>;
  if (a.power === 0 || b.power === 0) return;
  for (const variant of variants(b)) {
    if (Math.sign(variant.power) === Math.sign(a.power)) continue;
    const steps = lattice.decompose(a.argument.sub(variant.argument));
    if (steps === null) continue;
    const chain = expandChain(a.name, variant.argument, a.parameters, steps);
    if (!lattice.isRegular(chain)) continue;
    const shared = Math.min(Math.abs(a.power), Math.abs(b.power));
    const from = [...new Set([...a.from, ...b.from])];
    made.push(...attach(chain, Math.sign(a.power) * shared, a, a.half, from));
    open[i] = { ...a, power: a.power - Math.sign(a.power) * shared };
    open[j] = { ...b, power: b.power - Math.sign(b.power) * shared };
    return;
  }
}

/**
 * Over a set that is its own opposite, f(x) and f(flipped x) make such a quotient by themselves; a single function
 * does so with its own square.
 */
function pairItself<W extends WeightSet>(open: Factor<W>[], i: number, lattice: StepLattice, made: Factor<W>[]): void {
  const a = open[i] as Factor<W>;
  const single = a.weights === null;
  if (a.power === 0 || !(single || flippable(a))) return;
  for (const reflection of functions[a.name].reflections) {
    if (reflection.power !== -1 || reflection.sign !== 1) continue;
    const partner = reflection.center(a.parameters).scale(2).sub(flipped(a.argument));
    const steps = lattice.decompose(a.argument.sub(partner));
    if (steps === null) continue;
    const chain = expandChain(a.name, partner, a.parameters, steps);
    if (!lattice.isRegular(chain)) continue;
    const left = single ? a.power % 2 : 0;
    made.push(...attach(chain, single ? (a.power - left) / 2 : a.power, a, !single, a.from));
    const root = left === 0 ? null : rootOf(chain);
    if (root !== null) made.push({ ...constantFactor(root, a.from), power: left });
    open[i] = { ...a, power: root === null ? left : 0 };
    return;
  }
}

/**
 * The positive root of a product of exact positive constants; null if it is not one. A special function whose square is
 * such a constant is positive there: between its zeros and poles on the axis of its reflection it has no sign to change.
 */
function rootOf(chain: readonly FunctionAt[]): Form | null {
  let square = Form.one;
  for (const { name, argument, parameters, power } of chain) {
    const value = functions[name].exactValue?.(argument, parameters)?.toRational() ?? null;
    if (value === null || value.sign() <= 0) return null;
    square = square.mul(Form.number(value).pow(power));
  }
  return Form.call('sqrt', square);
}

export function attach<W extends WeightSet>(
  chain: readonly FunctionAt[],
  power: number,
  over: Factor<W>,
  half: boolean,
  from: readonly string[],
): Factor<W>[] {
  return chain.map((f) => ({ ...f, power: f.power * power, weights: over.weights, half, from }));
}
