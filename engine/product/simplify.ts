import { Form } from '../exact/form';
import type { FunctionAt } from '../functions/special-function';
import { functions } from '../functions/table';
import { expandChain, type Geometry, StepLattice } from './chain';
import { constantFactor, type Factor, flipped, overOpposite, type Product, type WeightSet } from './factor';
import { exactFactors, reduceElementary } from './reduce-elementary';

/**
 * How far to simplify. `functions`: equal factors are collected and what the reflection laws cancel is dropped, so
 * that only special functions remain that do not cancel. `elementary`: besides, quotients of one special function at
 * arguments that differ by its periods become elementary.
 */
export type Depth = 'functions' | 'elementary';

/**
 * Simplifies by the laws that each function declares, and by nothing else; the value is the same at every point.
 * `geometry` says what the geometry symbols are exactly, so that R = 1 - b/Q at b = 13/10 is recognised although the
 * R-charge was typed as a number; the result still shows the symbols.
 */
export function simplify<W extends WeightSet>(product: Product<W>, depth: Depth, geometry: Geometry = []): Product<W> {
  let current = gather(product);
  if (depth === 'functions') return current;
  // Within one call: the lattice of a function is the same for all its factors and in every round.
  const lattices = new Map<string, StepLattice>();
  for (let round = 0; round < MAXIMAL_ROUNDS; round++) {
    const next = gather(reduceElementary(pairByShifts(current, geometry, lattices)));
    if (next.length === current.length && next.every((f, k) => sameFactor(f, current[k]))) return next;
    current = next;
  }
  return current;
}

/**
 * Equal factors under one power, and factors that are 1 by themselves left out; nothing that stems from different
 * modes is paired.
 */
export function collectEqual<W extends WeightSet>(product: Product<W>): Product<W> {
  return buckets(product).flatMap((bucket) => {
    const collected = new Map<string, Factor<W>>();
    for (const factor of bucket) {
      const present = collected.get(factor.argument.key);
      collected.set(factor.argument.key, present ? join(present, factor, factor.power) : factor);
    }
    return [...collected.values()].filter((factor) => factor.power !== 0 && !isUnity(factor));
  });
}

/** True for a single function at the fixed point of a reflection f(x) f(2c - x) = 1. */
function isUnity(factor: Factor): boolean {
  return functions[factor.name].reflections.some(
    ({ center, power, sign }) =>
      power === -1 && sign === 1 && factor.weights === null && center(factor.parameters).equals(factor.argument),
  );
}

/** Each round removes special functions or leaves the product as it is; two suffice in practice. */
const MAXIMAL_ROUNDS = 6;

function sameFactor(a: Factor, b: Factor | undefined): boolean {
  return (
    b !== undefined &&
    a.name === b.name &&
    a.power === b.power &&
    a.argument.key === b.argument.key &&
    a.weights?.key === b.weights?.key &&
    a.half === b.half
  );
}

/** Factors of one function with the same parameters over one set of weights or its opposite. */
function buckets<W extends WeightSet>(product: Product<W>): Factor<W>[][] {
  const found = new Map<string, Factor<W>[]>();
  for (const factor of product) {
    const { key, oppositeKey } = factor.weights ?? { key: '', oppositeKey: '' };
    const [low, high] = key < oppositeKey ? [key, oppositeKey] : [oppositeKey, key];
    const bucketKey = [factor.name, factor.parameters.map((p) => p.key).join(';'), factor.half, low, high].join('|');
    const bucket = found.get(bucketKey);
    if (bucket) bucket.push(bucket[0]?.weights?.key === key ? factor : overOpposite(factor));
    else found.set(bucketKey, [factor]);
  }
  return [...found.values()];
}

/** True when a set is its own opposite and both signs are taken, so that the argument may be flipped. */
function flippable(factor: Factor): boolean {
  return factor.weights !== null && !factor.half && factor.weights.key === factor.weights.oppositeKey;
}

/** Collects equal arguments and applies the reflections. */
function gather<W extends WeightSet>(product: Product<W>): Product<W> {
  const result: Factor<W>[] = [];
  let sign = 1;
  const constants: Factor<W>[] = [];
  const others: Factor<W>[] = [];
  for (const factor of product.flatMap((f) => exactFactors(f))) (isConstant(factor) ? constants : others).push(factor);
  for (const bucket of buckets(others)) {
    const first = bucket[0] as Factor<W>;
    const { additive } = functions[first.name];
    if (additive) {
      const sum = additive(Form.sum(bucket.map(({ argument, power }) => argument.scale(power))));
      const from = [...new Set(bucket.flatMap((factor) => factor.from))];
      if (!sum.isZero()) result.push({ ...first, argument: sum, power: 1, from });
      continue;
    }
    const collected = new Map<string, Factor<W>>();
    for (const factor of bucket) sign *= insert(collected, factor);
    for (const factor of collected.values()) {
      const settled = settle(factor);
      sign *= settled.sign;
      if (settled.factor && settled.factor.power !== 0) result.push(settled.factor);
    }
  }
  return [...collectConstants(constants, sign), ...result];
}

/** True for a factor that is a number. */
function isConstant({ name, argument }: Factor): boolean {
  return name === 'linear' && argument.symbols().length === 0;
}

/** Adds a factor to those of its bucket; returns the sign that reflections have produced. */
function insert<W extends WeightSet>(collected: Map<string, Factor<W>>, factor: Factor<W>): number {
  const count = countOf(factor);
  const arguments_ = flippable(factor) ? [factor.argument, flipped(factor.argument)] : [factor.argument];
  for (const argument of arguments_) {
    const present = collected.get(argument.key);
    if (present) {
      collected.set(argument.key, join(present, factor, factor.power));
      return 1;
    }
  }
  for (const reflection of functions[factor.name].reflections) {
    const twice = reflection.center(factor.parameters).scale(2);
    for (const argument of arguments_) {
      const present = collected.get(twice.sub(argument).key);
      if (present) {
        collected.set(present.argument.key, join(present, factor, factor.power * reflection.power));
        return reflection.sign === -1 && (factor.power * count) % 2 !== 0 ? -1 : 1;
      }
    }
  }
  collected.set(factor.argument.key, factor);
  return 1;
}

function join<W extends WeightSet>(present: Factor<W>, other: Factor<W>, power: number): Factor<W> {
  const from = [...present.from, ...other.from.filter((name) => !present.from.includes(name))];
  return { ...present, power: present.power + power, from };
}

/** Number of weights that a factor runs over. */
export function countOf(factor: Factor): number {
  if (factor.weights === null) return 1;
  return factor.half ? factor.weights.size / 2 : factor.weights.size;
}

/**
 * A factor by itself: it is 1 when its reflection maps it into its own inverse, and over a set that is its own
 * opposite an even or odd function needs one of each pair only.
 */
function settle<W extends WeightSet>(factor: Factor<W>): { factor: Factor<W> | null; sign: number } {
  for (const reflection of functions[factor.name].reflections) {
    const mirrored = reflection.center(factor.parameters).scale(2).sub(factor.argument);
    if (reflection.power === -1) {
      const fixed = mirrored.equals(factor.argument);
      if (fixed && factor.weights === null) return { factor: null, sign: 1 };
      if (flippable(factor) && flipped(mirrored).equals(factor.argument)) {
        const odd = reflection.sign === -1 && (factor.power * countOf(factor)) % 4 === 2;
        return { factor: null, sign: odd ? -1 : 1 };
      }
    } else if (flippable(factor) && flipped(mirrored).equals(factor.argument)) {
      const odd = reflection.sign === -1 && ((factor.power * countOf(factor)) / 2) % 2 !== 0;
      return { factor: { ...factor, half: true, power: 2 * factor.power }, sign: odd ? -1 : 1 };
    }
  }
  return { factor, sign: 1 };
}

/** Numbers: units are multiplied out, other constants are kept apart with their powers. */
function collectConstants<W extends WeightSet>(constants: readonly Factor<W>[], sign: number): Product<W> {
  const powers = new Map<string, Factor<W>>();
  let unit = Form.number(sign);
  const from = new Set<string>();
  for (const factor of constants) {
    const power = factor.power * countOf(factor);
    if (UNITS.has(factor.argument.key)) {
      unit = unit.mul(factor.argument.pow(((power % 4) + 4) % 4));
      for (const name of factor.from) from.add(name);
      continue;
    }
    const present = powers.get(factor.argument.key);
    const single: Factor<W> = { ...factor, power, weights: null, half: false };
    powers.set(factor.argument.key, present ? join(present, single, power) : single);
  }
  const kept: Factor<W>[] = [...powers.values()].filter(({ power }) => power !== 0);
  return unit.equals(Form.one) ? kept : [constantFactor(unit, [...from]), ...kept];
}

const UNITS = new Set([Form.one, Form.one.neg(), Form.i, Form.i.neg()].map((form) => form.key));

/** Replaces quotients at arguments that differ by periods; what they leave is taken over the same weights. */
function pairByShifts<W extends WeightSet>(
  product: Product<W>,
  geometry: Geometry,
  lattices: Map<string, StepLattice>,
): Product<W> {
  return buckets(product.map((factor) => unfolded(factor))).flatMap((bucket) => {
    const first = bucket[0] as Factor<W>;
    if (functions[first.name].elementary || functions[first.name].shifts.length === 0) return bucket;
    const key = `${first.name}|${first.parameters.map((form) => form.key).join('|')}`;
    const lattice = lattices.get(key) ?? StepLattice.of(first.name, first.parameters, geometry);
    lattices.set(key, lattice);
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

/** An even function over one of each pair, to an even power, written over both again; the converse of `settle`. */
function unfolded<W extends WeightSet>(factor: Factor<W>): Factor<W> {
  const { weights, half, power, parameters, argument } = factor;
  if (!half || weights === null || weights.key !== weights.oppositeKey || power % 2 !== 0) return factor;
  const even = functions[factor.name].reflections.some(
    (reflection) =>
      reflection.power === 1 &&
      reflection.sign === 1 &&
      reflection.center(parameters).scale(2).sub(flipped(argument)).equals(argument),
  );
  return even ? { ...factor, half: false, power: power / 2 } : factor;
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

function attach<W extends WeightSet>(
  chain: readonly FunctionAt[],
  power: number,
  over: Factor<W>,
  half: boolean,
  from: readonly string[],
): Factor<W>[] {
  return chain.map((f) => ({ ...f, power: f.power * power, weights: over.weights, half, from }));
}
