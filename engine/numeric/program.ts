import { type DoubleValue, formDouble } from '../arithmetic/form-double';
import type { Form } from '../exact/form';
import type { DoubleKernel, FunctionName } from '../functions/special-function';
import { functions } from '../functions/table';
import type { Product } from '../product/factor';
import { type AffineEntry, type AffineProduct, affineProduct } from './affine';
import type { Entry } from './precise';
import { withinReach } from './reach';

/**
 * A product compiled for doubles: everything but the variables has a value, equal factors are evaluated once, and
 * factors that do not depend on the variables are one constant.
 */
export interface Program {
  /** Names that have no value and are not variables; the program can then not be run. */
  readonly unset: readonly string[];
  /**
   * Adds log of the product at points x_k (one array a variable, all of one length) to re and im. Zeros give -Infinity
   * and poles +Infinity in re; where both meet, NaN.
   */
  readonly addLog: (points: readonly Float64Array[], re: Float64Array, im: Float64Array) => void;
}

/** Compiles a product. `values` gives all symbols but the variables. */
export function compile(
  product: Product,
  variables: readonly string[],
  values: (name: string) => Form | null,
): Program {
  return compileAffine(affineProduct(product, variables, values), variables);
}

/** The same from the entries, where they are needed for other things too. */
export function compileAffine({ affine, others, unset }: AffineProduct, variables: readonly string[]): Program {
  const kernels = new Kernels();
  const moves = ({ slopes }: AffineEntry): boolean => slopes.some(({ re, im }) => re !== 0 || im !== 0);
  const constant = constantLog(
    affine.filter((entry) => !moves(entry)),
    kernels,
  );
  const steps = [
    ...affine.filter(moves).map((entry) => affineStep(entry, kernels)),
    ...(unset.length > 0 ? [] : others.map((entry) => pointwise(entry, variables, kernels))),
  ];
  return {
    unset,
    addLog: (points, re, im) => {
      for (let k = 0; k < re.length; k++) {
        re[k] = (re[k] as number) + constant.re;
        im[k] = (im[k] as number) + constant.im;
      }
      const xRe = new Float64Array(re.length);
      const xIm = new Float64Array(re.length);
      for (const step of steps) step(points, xRe, xIm, re, im);
    },
  };
}

/** Kernels by function and parameters: each makes its tables once. */
class Kernels {
  readonly #known = new Map<string, DoubleKernel>();

  of(name: FunctionName, parameters: readonly Form[]): DoubleKernel {
    const key = `${name}|${parameters.map((form) => form.key).join('|')}`;
    const known = this.#known.get(key);
    if (known) return known;
    const periods = parameters.map((form) => formDouble(form, () => null) ?? NOT_A_NUMBER);
    const kernel = withinReach(functions[name].double(periods), name, parameters);
    this.#known.set(key, kernel);
    return kernel;
  }
}

const NOT_A_NUMBER: DoubleValue = { re: Number.NaN, im: Number.NaN };

/** All entries of one function are evaluated as one array. */
function constantLog(entries: readonly AffineEntry[], kernels: Kernels): DoubleValue {
  const re = new Float64Array(1);
  const im = new Float64Array(1);
  const x = new Float64Array(1);
  const y = new Float64Array(1);
  for (const { name, parameters, constant, power } of entries) {
    x[0] = constant.re;
    y[0] = constant.im;
    kernels.of(name, parameters).addLog(x, y, power, re, im);
  }
  return { re: re[0] as number, im: im[0] as number };
}

type Step = (
  points: readonly Float64Array[],
  xRe: Float64Array,
  xIm: Float64Array,
  re: Float64Array,
  im: Float64Array,
) => void;

function affineStep({ name, parameters, constant, slopes, power }: AffineEntry, kernels: Kernels): Step {
  const kernel = kernels.of(name, parameters);
  const real = constant.im === 0 && slopes.every(({ im }) => im === 0);
  return (points, xRe, xIm, re, im) => {
    xRe.fill(constant.re);
    xIm.fill(constant.im);
    slopes.forEach((slope, variable) => {
      const point = points[variable] as Float64Array;
      if (slope.re !== 0)
        for (let k = 0; k < xRe.length; k++) xRe[k] = (xRe[k] as number) + slope.re * (point[k] as number);
      if (slope.im !== 0)
        for (let k = 0; k < xIm.length; k++) xIm[k] = (xIm[k] as number) + slope.im * (point[k] as number);
    });
    kernel.addLog(xRe, real ? null : xIm, power, re, im);
  };
}

/** Arguments that are not affine, and periods that move with a variable: evaluated point by point from their forms. */
function pointwise({ name, argument, parameters, power }: Entry, variables: readonly string[], kernels: Kernels): Step {
  const still = parameters.every((form) => form.symbols().length === 0);
  return (points, xRe, xIm, re, im) => {
    for (let k = 0; k < re.length; k++) {
      const at = (symbol: string): DoubleValue | null => {
        const index = variables.indexOf(symbol);
        return index < 0 ? null : { re: (points[index] as Float64Array)[k] as number, im: 0 };
      };
      const x = formDouble(argument, at) ?? NOT_A_NUMBER;
      xRe[k] = x.re;
      xIm[k] = x.im;
      if (still) continue;
      const periods = parameters.map((form) => formDouble(form, at) ?? NOT_A_NUMBER);
      const kernel = withinReach(functions[name].double(periods), name, parameters, at);
      kernel.addLog(
        xRe.subarray(k, k + 1),
        xIm.subarray(k, k + 1),
        power,
        re.subarray(k, k + 1),
        im.subarray(k, k + 1),
      );
    }
    if (still) kernels.of(name, parameters).addLog(xRe, xIm, power, re, im);
  };
}
