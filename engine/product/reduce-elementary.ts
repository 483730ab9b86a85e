import { Form } from '../exact/form';
import type { Gaussian } from '../exact/gaussian';
import { Rational } from '../exact/rational';
import { functions } from '../functions/table';
import { expandChain } from './chain';
import { type Factor, FLUX, isGeometry, type Product, WEIGHT, type WeightSet } from './factor';

/**
 * Brings arguments of elementary functions to one form by their declared shifts and reflections: the constant part is
 * moved into the first period, the coefficient of the weight (or of the first symbol) is made positive. Afterwards
 * equal factors look equal.
 */
export function reduceElementary<W extends WeightSet>(product: Product<W>): Product<W> {
  return product.flatMap((factor) => reduceFactor(factor));
}

function reduceFactor<W extends WeightSet>(factor: Factor<W>): Factor<W>[] {
  const declared = functions[factor.name];
  if (!declared.elementary || (declared.shifts.length === 0 && declared.reflections.length === 0)) return [factor];
  const oriented = turned(factor).flatMap((f) => (isNumber(f) ? [f] : orient(f)));
  const shifted = oriented.flatMap((f) => reduceByShift(f));
  return shifted.flatMap((f) => (f.argument.key === factor.argument.key ? [f] : orient(f)));
}

/** Replaces a function at a special argument by its exact value, and takes powers of closed forms out of it. */
export function exactFactors<W extends WeightSet>(factor: Factor<W>): Factor<W>[] {
  const taken = functions[factor.name].powers?.(factor.argument);
  if (taken && taken.bases.length > 0) {
    const kept = taken.rest.isZero() ? [] : [{ ...factor, argument: taken.rest }];
    const powers = taken.bases.map(
      ({ base, exponent }): Factor<W> => ({
        ...factor,
        name: 'linear',
        argument: base,
        parameters: [],
        power: factor.power * exponent,
      }),
    );
    return [...kept, ...powers];
  }
  const value =
    factor.name === 'linear' ? null : (functions[factor.name].exactValue?.(factor.argument, factor.parameters) ?? null);
  if (value === null) return [factor];
  const parts = splitUnit(value);
  return parts.map((argument) => ({ ...factor, name: 'linear', argument, parameters: [] }));
}

/** A constant i c as the two factors i and c. */
function splitUnit(value: Form): Form[] {
  const turned = value.mul(Form.i.neg());
  const imaginary = turned.terms.every(({ coefficient }) => coefficient.isReal()) && !turned.isZero();
  const real = value.terms.every(({ coefficient }) => coefficient.isReal());
  return !real && imaginary ? [Form.i, turned] : [value];
}

function isNumber({ argument }: Factor): boolean {
  return argument.toGaussian() !== null;
}

/** i x and x/b as two factors each, where a function is the factor x itself. */
function turned<W extends WeightSet>(factor: Factor<W>): Factor<W>[] {
  if (factor.name !== 'linear' || factor.argument.symbols().every(isGeometry)) return [factor];
  const unit = leading(factor.argument)?.re.isZero() ? Form.i : Form.one;
  const content = unit.mul(commonGeometry(factor.argument));
  if (content.equals(Form.one)) return [factor];
  return [
    { ...factor, argument: content },
    { ...factor, argument: factor.argument.div(content) },
  ];
}

/** The powers of geometry symbols that all terms share. */
function commonGeometry(argument: Form): Form {
  const [first, ...more] = argument.terms;
  const shared = (first?.factors ?? []).filter(
    ({ atom, power }) =>
      atom.kind === 'symbol' &&
      isGeometry(atom.name) &&
      more.every(({ factors }) => factors.some((f) => f.atom.key === atom.key && f.power === power)),
  );
  return shared.reduce((product, { atom, power }) => product.mul(Form.atom(atom, power)), Form.one);
}

/** Makes the leading coefficient positive where f is even or odd. */
function orient<W extends WeightSet>(factor: Factor<W>): Factor<W>[] {
  if (!isNegative(leading(factor.argument))) return [factor];
  for (const reflection of functions[factor.name].reflections) {
    if (reflection.power !== 1) continue;
    const turned = reflection.center(factor.parameters).scale(2).sub(factor.argument);
    const result: Factor<W> = { ...factor, argument: turned };
    return reflection.sign === 1
      ? [result]
      : [result, { ...factor, name: 'linear', argument: Form.number(-1), parameters: [] }];
  }
  return [factor];
}

function leading(argument: Form): Gaussian | null {
  for (const name of [WEIGHT, FLUX]) {
    const { coefficient } = argument.linearPart(name);
    if (!coefficient.isZero()) return coefficient.terms[0]?.coefficient ?? null;
  }
  const symbolic = argument.terms.find((term) => term.factors.length > 0);
  return (symbolic ?? argument.terms[0])?.coefficient ?? null;
}

function isNegative(value: Gaussian | null): boolean {
  if (value === null) return false;
  return value.re.isZero() ? value.im.sign() < 0 : value.re.sign() < 0;
}

/** Moves the constant part of the argument into [0, step) along a purely imaginary step. */
function reduceByShift<W extends WeightSet>(factor: Factor<W>): Factor<W>[] {
  const constant = factor.argument.terms.find((term) => term.factors.length === 0)?.coefficient;
  if (!constant) return [factor];
  const shifts = functions[factor.name].shifts;
  for (let k = 0; k < shifts.length; k++) {
    const step = shifts[k]?.step(factor.parameters).toGaussian();
    if (!step?.re.isZero() || step.im.isZero()) continue;
    const count = Number(constant.im.div(step.im).floor());
    if (count === 0 || Math.abs(count) > MAXIMAL_COUNT) continue;
    const base = factor.argument.sub(Form.gaussian(step).scale(Rational.of(count)));
    const counts = shifts.map((_, index) => (index === k ? count : 0));
    const chain = expandChain(factor.name, base, factor.parameters, counts);
    return [
      { ...factor, argument: base },
      ...chain.map((f) => ({
        ...f,
        power: f.power * factor.power,
        weights: factor.weights,
        half: factor.half,
        from: factor.from,
      })),
    ];
  }
  return [factor];
}

/** Constants larger than this many periods are left alone: no theory has them, and the chain would be long. */
const MAXIMAL_COUNT = 64;
