import { type Ball, subtractBalls } from '../../engine/arithmetic/ball';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import { evaluatePrecise } from '../../engine/numeric/precise';
import { compile } from '../../engine/numeric/program';
import { expand, type Product, substitute } from '../../engine/product/factor';
import { quantity } from '../../engine/spheres/quantity';
import type { Sphere, TheoryProduct } from '../../engine/spheres/sphere';
import type { Theory } from '../../engine/theory/theory';

/** Exact numbers: `3/10`, `-0.4`, `2i/7` typed as forms where they are not rational. */
export type Point = Readonly<Record<string, string | Form>>;

export function exact(text: string): Form {
  const value = Rational.parse(text);
  if (value === null) throw new Error(`No number: ${text}`);
  return Form.number(value);
}

/** Values of all names at a point, geometry included. */
export function valuesAt(sphere: Sphere, theory: Theory, point: Point): (name: string) => Form | null {
  const geometry = sphere.geometry(theory);
  return (name) => {
    const own = point[name];
    if (own !== undefined) return typeof own === 'string' ? exact(own) : own;
    if (!name.startsWith('@')) return theory.parameters.get(name) ?? null;
    return geometry.reduce((form, stage) => form.substitute(stage), Form.symbol(name));
  };
}

export function productOf(sphere: Sphere, theory: Theory, what: string): TheoryProduct {
  const product = quantity(sphere, theory, what);
  if (product === null) throw new Error(`No quantity ${what}.`);
  return product;
}

/** The value of a quantity as a ball; throws at zeros, poles and unset names. */
export function ballAt(sphere: Sphere, theory: Theory, what: string, point: Point, digits = 25): Ball {
  return productBall(productOf(sphere, theory, what), valuesAt(sphere, theory, point), digits);
}

/** The logarithm of a positive quantity, in doubles. */
export function logAt(sphere: Sphere, theory: Theory, what: string, point: Point, digits = 25): number {
  const result = evaluatePrecise(productOf(sphere, theory, what), valuesAt(sphere, theory, point), digits);
  if (result.kind !== 'value') throw new Error(`${result.kind}: ${JSON.stringify(result)}`);
  return numberOf(result.log).re;
}

export function productBall(product: Product, values: (name: string) => Form | null, digits: number): Ball {
  const result = evaluatePrecise(product, values, digits);
  if (result.kind !== 'value') throw new Error(`${result.kind}: ${JSON.stringify(result)}`);
  return result.value;
}

/** |a/b - 1| or so: the distance of two balls beyond their errors, relative to the second, in doubles. */
export function distance(a: Ball, b: Ball): number {
  const { re, im, error, bits } = subtractBalls(a, b, 600);
  const beyond = Math.max(0, Math.hypot(ratio(re, bits), ratio(im, bits)) - ratio(error, bits));
  return beyond / Math.hypot(ratio(b.re, b.bits), ratio(b.im, b.bits));
}

/** value 2^-bits, for bits of any size. */
export function ratio(value: bigint, bits: number): number {
  if (bits <= 900) return Number(value) * 2 ** -bits;
  return Number(value >> BigInt(bits - 900)) * 2 ** -900;
}

export function numberOf({ re, im, bits }: Ball): { readonly re: number; readonly im: number } {
  return { re: ratio(re, bits), im: ratio(im, bits) };
}

/** Values of a product at complex points of its variables, in doubles. */
export interface ComplexProgram {
  readonly at: (re: readonly Float64Array[], im: readonly Float64Array[]) => { re: Float64Array; im: Float64Array };
}

/** Compiles a product in complex variables; everything else has a value. */
export function complexProgram(
  product: Product,
  variables: readonly string[],
  values: (name: string) => Form | null,
): ComplexProgram {
  const parts = variables.flatMap((name) => [`${name}_re`, `${name}_im`]);
  const split = substitute(expand(product), (name) =>
    variables.includes(name) ? Form.symbol(`${name}_re`).add(Form.i.mul(Form.symbol(`${name}_im`))) : null,
  );
  const program = realProgram(split, parts, values);
  return { at: (re, im) => program(re.flatMap((part, k) => [part, im[k] as Float64Array])) };
}

/** Values of a product at real points of its variables, in doubles. */
export function realProgram(
  product: Product,
  variables: readonly string[],
  values: (name: string) => Form | null,
): (points: readonly Float64Array[]) => { re: Float64Array; im: Float64Array } {
  const program = compile(product, variables, (name) => (variables.includes(name) ? null : values(name)));
  if (program.unset.length > 0) throw new Error(`Unset: ${program.unset.join()}`);
  return (points) => {
    const { length } = points[0] as Float64Array;
    const re = new Float64Array(length);
    const im = new Float64Array(length);
    program.addLog(points, re, im);
    return exponentials(re, im);
  };
}

function exponentials(logRe: Float64Array, logIm: Float64Array): { re: Float64Array; im: Float64Array } {
  return {
    re: logRe.map((log, k) => Math.exp(log) * Math.cos(logIm[k] as number)),
    im: logRe.map((log, k) => Math.exp(log) * Math.sin(logIm[k] as number)),
  };
}

/** Points from -reach to reach in equal steps. */
export function grid(reach: number, step: number): Float64Array {
  const half = Math.ceil(reach / step);
  return Float64Array.from({ length: 2 * half + 1 }, (_, k) => (k - half) * step);
}
