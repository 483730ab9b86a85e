import fc from 'fast-check';
import { type Ball, subtractBalls } from '../../engine/arithmetic/ball';
import { type DoubleValue, formDouble } from '../../engine/arithmetic/form-double';
import { formFixed } from '../../engine/arithmetic/form-fixed';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import type { FunctionAt, FunctionName, PreciseLog, SpecialFunction } from '../../engine/functions/special-function';
import { functions } from '../../engine/functions/table';
import { exactParameter } from '../../engine/numeric/precise';

/*
 * What every function of the table declares, as checks that throw when it does not hold. Values come from the precise
 * tier with the errors it states, and every check takes exactly those errors as its tolerance.
 */

export const BITS = 90;

/** Periods that both tiers know exactly: doubles, and so resonant; the last two are irrational. */
export const PERIODS: readonly Form[] = [Form.one, Form.ratio(5, 4), Form.ratio(3, 4)];
export const IRRATIONAL_PERIODS: readonly Form[] = [
  Form.call('sqrt', Form.number(2)),
  Form.call('sqrt', Form.ratio(3, 5)),
];

const integers = fc.integer({ min: -700, max: 700 });

/** A point of a grid, exact in doubles and in fixed point. */
const gridPoint: fc.Arbitrary<Form> = fc
  .tuple(integers, integers)
  .map(([re, im]) => Form.number(Rational.of(re, 256)).add(Form.i.scale(Rational.of(im, 256))));

/** Where a function lives, if not on the whole plane with positive periods. */
interface Domain {
  readonly parameters?: readonly Form[];
  readonly points?: fc.Arbitrary<Form>;
}

const DOMAINS: Readonly<Record<string, Domain>> = {
  // Fluxes are integers.
  fluxGamma: { parameters: [0, 1, -1, 2, -3].map((n) => Form.number(n)) },
  sign: { points: integers.map((n) => Form.number(n)) },
};

/** Few choices, neighbours in the list, so that tables are made once; one or three parameters alike. */
export function parametersOf(declared: SpecialFunction, periods: readonly Form[]): fc.Arbitrary<readonly Form[]> {
  const choices = DOMAINS[declared.name]?.parameters ?? periods;
  return fc
    .nat({ max: choices.length - 1 })
    .map((first) => declared.parameters.map((_, k) => choices[(first + k) % choices.length] as Form));
}

export function pointOf(declared: SpecialFunction): fc.Arbitrary<Form> {
  return DOMAINS[declared.name]?.points ?? gridPoint;
}

/** True for a function of integers, which has no neighbourhoods to speak of zeros in. */
export function isDiscrete(declared: SpecialFunction): boolean {
  return DOMAINS[declared.name]?.points !== undefined;
}

export function logOf(declared: SpecialFunction, argument: Form, parameters: readonly Form[], bits = BITS): PreciseLog {
  const at = formFixed(argument, bits);
  if (at === null) throw new Error(`${argument} has no value.`);
  return declared.precise(at, parameters.map(exactParameter), bits);
}

/** log f as a ball; null at a zero, at a pole, or where the precision cannot tell. */
export function ballOf(
  declared: SpecialFunction,
  argument: Form,
  parameters: readonly Form[],
  bits = BITS,
): Ball | null {
  const log = logOf(declared, argument, parameters, bits);
  return log.kind === 'value' ? { re: log.re, im: log.im, bits, error: log.error } : null;
}

function scaled(ball: Ball, power: number): Ball {
  const factor = BigInt(power);
  return { ...ball, re: ball.re * factor, im: ball.im * factor, error: ball.error * BigInt(Math.abs(power)) };
}

/** Sum of power log f over the factors; null where one of them has no logarithm. */
function sumOf(factors: readonly { declared: SpecialFunction; at: Omit<FunctionAt, 'name'> }[]): Ball | null {
  let sum: Ball = { re: 0n, im: 0n, bits: BITS, error: 0n };
  for (const { declared, at } of factors) {
    const ball = ballOf(declared, at.argument, at.parameters);
    if (ball === null) return null;
    const term = scaled(ball, at.power);
    sum = { ...sum, re: sum.re + term.re, im: sum.im + term.im, error: sum.error + term.error };
  }
  return sum;
}

const entry = (declared: SpecialFunction, argument: Form, parameters: readonly Form[], power: number) => ({
  declared,
  at: { argument, parameters, power },
});

const named = ({ name, argument, parameters, power }: FunctionAt) =>
  entry(functions[name], argument, parameters, power);

/** i pi times an integer, as a ball. */
function halfTurns(count: number): Ball {
  const half = formFixed(Form.pi, BITS) ?? { re: 0n, im: 0n };
  return { re: 0n, im: half.re * BigInt(count), bits: BITS, error: BigInt(Math.abs(count)) };
}

/** True when a logarithm is 0 within its error, up to whole turns. */
export function vanishes(log: Ball): boolean {
  const pi = Number(formFixed(Form.pi, 60)?.re ?? 0n);
  const turns = Math.round(Number(log.im) / 2 ** (log.bits - 60) / (2 * pi));
  const { re, im, error } = subtractBalls(log, halfTurns(2 * turns), 4 * BITS);
  return re * re + im * im <= error * error;
}

function expectVanishing(log: Ball | null, what: string): void {
  if (log !== null && !vanishes(log)) {
    throw new Error(`${what}: off by (${log.re}, ${log.im}), error ${log.error}`);
  }
}

/** f(2c - x) = sign f(x)^power. */
export function checkReflections(declared: SpecialFunction, x: Form, parameters: readonly Form[]): void {
  for (const { center, power, sign } of declared.reflections) {
    const mirrored = center(parameters).scale(2).sub(x);
    const sum = sumOf([entry(declared, mirrored, parameters, 1), entry(declared, x, parameters, -power)]);
    const log = sum === null || sign === 1 ? sum : subtractBalls(sum, halfTurns(1), 4 * BITS);
    expectVanishing(log, `${declared.name}: reflection of ${x}`);
  }
}

/** log f at the mirrored point is the conjugate of log f(x); false where no such point is declared. */
export function checkMirror(declared: SpecialFunction, x: Form, parameters: readonly Form[]): boolean {
  const mirrored = declared.mirror?.(x);
  if (mirrored === undefined) return false;
  const [here, there] = [x, mirrored].map((point) => ballOf(declared, point, parameters)) as [Ball | null, Ball | null];
  if (here !== null && there !== null) {
    const { re, im, error } = subtractBalls(there, { ...here, im: -here.im }, 4 * BITS);
    if (re * re + im * im > error * error) throw new Error(`${declared.name}: mirrored ${x} is off by (${re}, ${im})`);
  }
  return true;
}

/** f(x + step) = f(x) times the quotient. */
export function checkShifts(declared: SpecialFunction, x: Form, parameters: readonly Form[]): void {
  for (const { step, quotient } of declared.shifts) {
    const sum = sumOf([
      entry(declared, x.add(step(parameters)), parameters, 1),
      entry(declared, x, parameters, -1),
      ...quotient(x, parameters).map((factor) => named({ ...factor, power: -factor.power })),
    ]);
    expectVanishing(sum, `${declared.name}: shift of ${x} by ${step(parameters)}`);
  }
}

/** f(x) f(y) = f(x + y), and the shortest form of the sum has the same value. */
export function checkAdditive(declared: SpecialFunction, x: Form, y: Form): void {
  const { additive } = declared;
  if (additive === undefined) return;
  for (const both of [x.add(y), additive(x.add(y))]) {
    const sum = sumOf([entry(declared, both, [], 1), entry(declared, x, [], -1), entry(declared, y, [], -1)]);
    expectVanishing(sum, `${declared.name}: sum of ${x} and ${y}`);
  }
}

/** f(x) is f of the rest times the powers taken out; answers how many there are. */
export function checkPowers(declared: SpecialFunction, x: Form): number {
  const taken = declared.powers?.(x);
  if (taken === undefined) return 0;
  const sum = sumOf([
    entry(declared, x, [], 1),
    entry(declared, taken.rest, [], -1),
    ...taken.bases.map(({ base, exponent }) => entry(functions.linear, base, [], -exponent)),
  ]);
  expectVanishing(sum, `${declared.name}: powers out of ${x}`);
  return taken.bases.length;
}

/** The exact value at a special argument, where there is one. */
export function checkExactValue(declared: SpecialFunction, x: Form, parameters: readonly Form[]): boolean {
  const exact = declared.exactValue?.(x, parameters) ?? null;
  if (exact === null) return false;
  const sum = sumOf([entry(declared, x, parameters, 1), entry(functions.linear, exact, [], -1)]);
  if (sum === null) throw new Error(`${declared.name}(${x}) is said to be ${exact}, but has no logarithm.`);
  expectVanishing(sum, `${declared.name}: exact value at ${x}`);
  return true;
}

/** A point of one of the declared lattices: start plus so many of each step. */
export function latticePoint(
  lattice: SpecialFunction['zeros'][number],
  parameters: readonly Form[],
  counts: readonly number[],
): Form {
  const steps = lattice.steps(parameters);
  return Form.sum([lattice.start(parameters), ...steps.map((step, k) => step.scale(counts[k] ?? 0))]);
}

/** Near a zero of order n, log |f| falls by n log 2 each time the distance is halved; at a pole it rises. */
export function checkOrder(declared: SpecialFunction, point: Form, parameters: readonly Form[], order: number): void {
  const size = (distance: Form): number => {
    const ball = ballOf(declared, point.add(distance), parameters, 160);
    if (ball === null) throw new Error(`${declared.name}: no logarithm beside ${point}`);
    return Number(ball.re) / 2 ** ball.bits;
  };
  for (const way of [Form.one, Form.one.sub(Form.i)]) {
    const far = way.scale(Rational.of(1n, 2n ** 40n));
    const slope = (size(far) - size(far.scale(Rational.of(1, 2)))) / Math.log(2);
    if (Math.abs(slope - order) > 1e-6) {
      throw new Error(`${declared.name} at ${point}: order ${slope}, declared ${order}`);
    }
  }
}

/** The precise logarithm in doubles. */
export function doubleOf(ball: Ball): DoubleValue {
  // Numbers of more than 53 bits lose only what a double cannot hold.
  return { re: Number(ball.re) / 2 ** ball.bits, im: Number(ball.im) / 2 ** ball.bits };
}

/** log f in the double tier at one point. */
export function logInDoubles(declared: SpecialFunction, x: DoubleValue, parameters: readonly Form[]): DoubleValue {
  const periods = parameters.map((form) => formDouble(form, () => null) ?? { re: Number.NaN, im: 0 });
  const re = new Float64Array(1);
  const im = new Float64Array(1);
  declared.double(periods).addLog(Float64Array.of(x.re), Float64Array.of(x.im), 1, re, im);
  return { re: re[0] as number, im: im[0] as number };
}

/** Distance of two logarithms, whole turns left out. */
export function logDistance(a: DoubleValue, b: DoubleValue): number {
  const turns = Math.round((a.im - b.im) / (2 * Math.PI));
  return Math.hypot(a.re - b.re, a.im - b.im - 2 * Math.PI * turns);
}

/** |x d log f/dx| by a symmetric difference of the precise tier; 0 where a neighbour has no logarithm. */
export function stiffness(declared: SpecialFunction, x: Form, parameters: readonly Form[]): number {
  const step = Form.number(Rational.of(1, 2 ** 20));
  const [above, below] = [x.add(step), x.sub(step)].map((at) => ballOf(declared, at, parameters));
  const at = formDouble(x, () => null);
  if (!above || !below || !at) return 0;
  return Math.hypot(at.re, at.im) * logDistance(doubleOf(above), doubleOf(below)) * 2 ** 19;
}

/** log f minus its declared growth at a point. */
export function beyondGrowth(
  declared: SpecialFunction,
  growth: SpecialFunction['growth'][number],
  x: Form,
  parameters: readonly Form[],
): number {
  const ball = ballOf(declared, x, parameters);
  const expected = formDouble(growth.logarithm(x, parameters), () => null);
  if (ball === null || expected === null) throw new Error(`${declared.name}: no growth at ${x}`);
  return logDistance(doubleOf(ball), expected);
}

export type { FunctionName };
