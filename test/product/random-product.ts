import fc from 'fast-check';
import type { Ball } from '../../engine/arithmetic/ball';
import { subtractBalls } from '../../engine/arithmetic/ball';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import type { FunctionName } from '../../engine/functions/special-function';
import { evaluatePrecise, type PreciseValue } from '../../engine/numeric/precise';
import type { Geometry } from '../../engine/product/chain';
import type { Factor, Product } from '../../engine/product/factor';
import { matterWeights, type TheoryWeights } from '../../engine/theory/weights';
import { representationNamed } from '../lie/named';
import { theoryOf } from '../theory/theory-text';

export type AnyFactor = Factor<TheoryWeights>;
export type AnyProduct = Product<TheoryWeights>;

const b = Form.symbol('@b');
const w = Form.symbol('@w');

/** Squashings at which values are compared: round, rational, irrational. */
export const SQUASHINGS: readonly Form[] = [
  Form.one,
  Form.ratio(5, 4),
  Form.ratio(13, 10),
  Form.call('sqrt', Form.number(2)),
];

/** Q = b + 1/b, then the value of b, as a sphere supplies them. */
export function geometryAt(value: Form): Geometry {
  return [(name) => (name === '@Q' ? b.add(b.inverse()) : null), (name) => (name === '@b' ? value : null)];
}

/** Groups of one theory; sets of weights are orbits of any of them, and sums of two. */
const theory = theoryOf([
  'gauge A = SU(2), coulomb x',
  'gauge B = SU(3), coulomb y',
  'gauge C = USp(4), coulomb z',
  'gauge D = U(2), coulomb u',
]);

function orbits(...cells: string[]): TheoryWeights[] {
  const representations = theory.groups.map(({ group }, k) => representationNamed(group.name, cells[k] ?? '1'));
  return matterWeights(theory.groups, representations).flatMap(({ weights }) => weights ?? []);
}

/** Orbits that are their own opposites, and orbits that are not, some of them each other's opposite. */
export const SETS: readonly TheoryWeights[] = [
  ...orbits('fund'),
  ...orbits('adj'),
  ...orbits('1', 'fund'),
  ...orbits('1', 'anti'),
  ...orbits('1', 'adj'),
  ...orbits('1', '1', 'adj'),
  ...orbits('1', '1', '1', 'fund'),
  ...orbits('1', '1', '1', 'anti'),
  ...orbits('fund', '1', '1', 'anti'),
  ...orbits('fund', 'fund'),
];

/** A point in general position: no weight of the sets above vanishes there, no two are equal up to a sign. */
const POINT: Readonly<Record<string, Rational>> = {
  x: Rational.of(31, 100),
  y1: Rational.of(-17, 90),
  y2: Rational.of(53, 110),
  z1: Rational.of(29, 130),
  z2: Rational.of(71, 105),
  u1: Rational.of(-41, 120),
  u2: Rational.of(13, 19),
  m: Rational.of(7, 60),
};

/** Values of all names at the point and a squashing. */
export function valuesAt(squashing: Form): (name: string) => Form | null {
  const geometry = geometryAt(squashing);
  return (name) => {
    const value = POINT[name];
    if (value) return Form.number(value);
    return name.startsWith('@') ? geometry.reduce((form, stage) => form.substitute(stage), Form.symbol(name)) : null;
  };
}

const fewRationals = fc.constantFrom(...['0', '1', '1/2', '-1/2', '2/3', '3/2', '-1', '2', '1/5'].map(exact));

function exact(text: string): Form {
  return Form.number(Rational.parse(text) as Rational);
}

const sign = fc.constantFrom(Form.one, Form.one.neg());

/** i Q/2 (1 - R), i (j b + k/b)/2, or i times a rational. */
const height: fc.Arbitrary<Form> = fc.oneof(
  fewRationals.map((r) => Form.i.mul(Form.symbol('@Q')).mul(Form.ratio(1, 2)).mul(Form.one.sub(r))),
  fc
    .tuple(fc.integer({ min: -3, max: 3 }), fc.integer({ min: -2, max: 2 }))
    .map(([j, k]) => Form.i.mul(b.scale(j).add(b.inverse().scale(k))).mul(Form.ratio(1, 2))),
  fewRationals.map((r) => Form.i.mul(r)),
);

const mass = fc.constantFrom(Form.zero, Form.symbol('m'), Form.symbol('m').neg());
const power = fc.constantFrom(1, 1, -1, 2, -2, 3);

/** Arguments of a function over a set of weights, or by itself. */
function argumentOf(name: FunctionName, weighted: boolean): fc.Arbitrary<Form> {
  const scale = name === 'doubleSine' ? fc.constant(Form.one) : fc.constantFrom(Form.one, b, b.inverse());
  return fc.tuple(height, mass, sign, scale).map(([top, m, s, factor]) => {
    const place = weighted ? s.mul(w).add(m) : m;
    return name === 'doubleSine' ? top.add(place) : factor.mul(place).add(imaginaryNumber(top));
  });
}

/** Heights of hyperbolic factors are numbers: i q, in quarters. */
function imaginaryNumber(top: Form): Form {
  return Form.i.scale(Rational.of(top.terms.length * 3 + top.key.length, 4));
}

const weights = fc.oneof(
  { weight: 1, arbitrary: fc.constant(null) },
  { weight: 4, arbitrary: fc.constantFrom(...SETS) },
);

export const anyFactor: fc.Arbitrary<AnyFactor> = fc
  .tuple(
    fc.constantFrom<FunctionName[]>(
      ...(['doubleSine', 'doubleSine', 'hyperbolicSine', 'hyperbolicCosine', 'linear', 'exponential'] as const),
    ),
    weights,
    power,
    fc.boolean(),
  )
  .chain(([name, set, exponent, half]) =>
    argumentOf(name, set !== null).map((argument) => ({
      name,
      argument,
      parameters: name === 'doubleSine' ? [b] : [],
      power: exponent,
      weights: set,
      half: half && set !== null && set.key === set.oppositeKey,
      from: [name],
    })),
  );

/** Products in which equal arguments, opposite ones and shifted ones are common. A failure prints them briefly. */
export const anyProduct: fc.Arbitrary<AnyProduct> = fc
  .array(anyFactor, { minLength: 1, maxLength: 5 })
  .map((product) => Object.assign(product, { [fc.toStringMethod]: () => briefly(product) }));

export function briefly(product: AnyProduct): string {
  return product
    .map(({ name, argument, power: n, weights: set, half }) => {
      return `${name}(${argument})^${n}${set === null ? '' : ` over ${half ? 'half of ' : ''}${set.key}`}`;
    })
    .join('; ');
}

export const DIGITS = 20;

/** The value at the point, every factor evaluated by itself. */
export function valueAt(product: AnyProduct, squashing: Form): PreciseValue {
  return evaluatePrecise(product, valuesAt(squashing), DIGITS);
}

/** True when two numbers agree within the errors that come with them. */
export function agree(a: Ball, c: Ball): boolean {
  const { re, im, error } = subtractBalls(a, c, 400);
  return re * re + im * im <= error * error;
}

/** One and the same outcome: equal numbers, or a zero or a pole of the same order. */
export function sameOutcome(a: PreciseValue, c: PreciseValue): boolean {
  if (a.kind === 'value' && c.kind === 'value') return agree(a.value, c.value);
  if ((a.kind === 'zero' || a.kind === 'pole') && a.kind === c.kind) return a.order === c.order;
  return false;
}
