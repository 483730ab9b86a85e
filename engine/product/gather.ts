import { Form } from '../exact/form';
import { functions } from '../functions/table';
import {
  constantFactor,
  type Factor,
  flipped,
  isGeometry,
  mentionsWeight,
  overOpposite,
  type Product,
  type WeightSet,
} from './factor';
import { exactFactors } from './reduce-elementary';

/** Factors of one function with the same parameters over one set of weights or its opposite. */
export function buckets<W extends WeightSet>(product: Product<W>): Factor<W>[][] {
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
export function flippable(factor: Factor): boolean {
  return factor.weights !== null && !factor.half && factor.weights.key === factor.weights.oppositeKey;
}

/** Collects equal arguments and applies the reflections. */
export function gather<W extends WeightSet>(product: Product<W>): Product<W> {
  const result: Factor<W>[] = [];
  let sign = 1;
  const constants: Factor<W>[] = [];
  const others: Factor<W>[] = [];
  for (const factor of product.flatMap((f) => exactFactors(spread(f)))) {
    if (isConstant(factor)) constants.push(...monomials(factor));
    else others.push(factor);
  }
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

/**
 * Where f(x) f(y) = f(x + y): one factor for all weights if the argument does not depend on them, and over a set that is
 * its own opposite the even part alone, once for each pair.
 */
function spread<W extends WeightSet>(factor: Factor<W>): Factor<W> {
  if (factor.weights === null || functions[factor.name].additive === undefined) return factor;
  const even = flippable(factor);
  const argument = even ? factor.argument.add(flipped(factor.argument)) : factor.argument;
  if (mentionsWeight(argument)) return even ? { ...factor, argument, half: true } : factor;
  const count = even ? factor.weights.size / 2 : countOf(factor);
  return { ...factor, argument: argument.scale(count), weights: null, half: false };
}

/** True for a factor that is a number once the geometry is known. */
function isConstant({ name, argument }: Factor): boolean {
  return name === 'linear' && argument.symbols().every(isGeometry);
}

/** A product of numbers and powers of geometry symbols as one factor each: 2/b is 2 and b^-1. */
function monomials<W extends WeightSet>(factor: Factor<W>): Factor<W>[] {
  const [term, ...more] = factor.argument.terms;
  if (term === undefined || more.length > 0 || !term.factors.every(({ atom }) => atom.kind === 'symbol'))
    return [factor];
  if (term.factors.length === 0) return [factor];
  const coefficient = Form.gaussian(term.coefficient);
  const atoms = term.factors.map(({ atom, power }) => ({
    ...factor,
    argument: Form.atom(atom),
    power: factor.power * power,
  }));
  return coefficient.equals(Form.one) ? atoms : [{ ...factor, argument: coefficient }, ...atoms];
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

export function join<W extends WeightSet>(present: Factor<W>, other: Factor<W>, power: number): Factor<W> {
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

/** An even function over one of each pair, to an even power, written over both again; the converse of `settle`. */
export function unfolded<W extends WeightSet>(factor: Factor<W>): Factor<W> {
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
