import { formDouble } from '../../engine/arithmetic/form-double';
import { Form } from '../../engine/exact/form';
import { Rational } from '../../engine/exact/rational';
import type { Complex, DoubleKernel, FunctionAt, SpecialFunction } from '../../engine/functions/special-function';
import { functions } from '../../engine/functions/table';
import { kernelValue } from './kernel-value';

/** What every declared function must satisfy, each check as the distance from the law in absolute terms of the logarithm. */

function double(form: Form): Complex {
  const value = formDouble(form, () => null);
  if (value === null) throw new Error(`No value: ${form.key}`);
  return value;
}

/** Kernels are made once for equal functions and parameters. */
const kernels = new Map<string, DoubleKernel>();

/** log f at a form, in doubles. */
export function logOf(declared: SpecialFunction, argument: Form, parameters: readonly Form[]): Complex {
  const key = [declared.name, ...parameters.map((p) => p.key)].join('|');
  const kernel = kernels.get(key) ?? declared.double(parameters.map(double));
  kernels.set(key, kernel);
  const { re, im } = double(argument);
  return kernelValue(kernel, re, im);
}

function logOfFactor(factor: FunctionAt): Complex {
  const log = logOf(functions[factor.name], factor.argument, factor.parameters);
  return { re: factor.power * log.re, im: factor.power * log.im };
}

/** |e^a/e^b - 1| for small differences: imaginary parts modulo 2 pi. */
export function mismatch(a: Complex, b: Complex): number {
  const turns = Math.round((a.im - b.im) / (2 * Math.PI));
  return Math.hypot(a.re - b.re, a.im - b.im - 2 * Math.PI * turns);
}

/** f(2 center - x) = sign f(x)^power. */
export function reflectionMismatch(declared: SpecialFunction, x: Form, parameters: readonly Form[]): number {
  return Math.max(
    0,
    ...declared.reflections.map(({ center, power, sign }) => {
      const mirrored = logOf(declared, center(parameters).scale(2).sub(x), parameters);
      const log = logOf(declared, x, parameters);
      return mismatch(mirrored, { re: power * log.re, im: power * log.im + (sign < 0 ? Math.PI : 0) });
    }),
  );
}

/** f(x + step) = f(x) product of quotient(x). */
export function shiftMismatch(declared: SpecialFunction, x: Form, parameters: readonly Form[]): number {
  return Math.max(
    0,
    ...declared.shifts.map(({ step, quotient }) => {
      const moved = logOf(declared, x.add(step(parameters)), parameters);
      const start = logOf(declared, x, parameters);
      const sum = quotient(x, parameters)
        .map(logOfFactor)
        .reduce((total, log) => ({ re: total.re + log.re, im: total.im + log.im }), start);
      return mismatch(moved, sum);
    }),
  );
}

/** log f - its growth, at x = far/direction + offset. */
export function growthMismatch(
  declared: SpecialFunction,
  offset: Form,
  far: number,
  parameters: readonly Form[],
): number {
  return Math.max(
    0,
    ...declared.growth.map(({ direction, logarithm }) => {
      const x = direction.inverse().scale(Rational.of(far)).add(offset);
      return mismatch(logOf(declared, x, parameters), double(logarithm(x, parameters)));
    }),
  );
}

/** The declared lattice points with up to `count` steps of each kind. */
export function latticePoints(
  declared: SpecialFunction,
  parameters: readonly Form[],
  count: number,
): { readonly kind: 'zero' | 'pole'; readonly at: Form }[] {
  return declared.zeros.flatMap(({ kind, start, steps }) => {
    let points = [start(parameters)];
    for (const step of steps(parameters)) {
      points = points.flatMap((point) => Array.from({ length: count + 1 }, (_, n) => point.add(step.scale(n))));
    }
    return points.map((at) => ({ kind, at }));
  });
}

/** A number with few digits as a form. */
export function complexForm(re: number, im: number): Form {
  const part = (value: number): Form => Form.ratio(Math.round(value * 1024), 1024);
  return part(re).add(Form.i.mul(part(im)));
}
