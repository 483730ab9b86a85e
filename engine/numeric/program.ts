import { type DoubleValue, formDouble } from '../arithmetic/form-double';
import { Form } from '../exact/form';
import type { DoubleKernel } from '../functions/special-function';
import { functions } from '../functions/table';
import type { Product } from '../product/factor';
import { collectEntries, type Entry } from './precise';

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
  const entries = collectEntries(product, (name) => (variables.includes(name) ? null : values(name)));
  const symbols = new Set(entries.flatMap((e) => [e.argument, ...e.parameters].flatMap((f) => f.symbols())));
  for (const variable of variables) symbols.delete(variable);
  const moving = entries.filter((entry) => dependsOn(entry, variables));
  const still = entries.filter((entry) => !moving.includes(entry));
  const unset = [...symbols];
  const constant = unset.length > 0 ? { re: 0, im: 0 } : constantLog(still);
  const kernels = new Map<string, DoubleKernel>();
  const steps = unset.length > 0 ? [] : moving.map((entry) => compileEntry(entry, variables, kernels));
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

function dependsOn(entry: Entry, variables: readonly string[]): boolean {
  return [entry.argument, ...entry.parameters].some((form) => form.symbols().some((name) => variables.includes(name)));
}

function constantLog(entries: readonly Entry[]): DoubleValue {
  const re = new Float64Array(1);
  const im = new Float64Array(1);
  for (const entry of entries) {
    const x = formDouble(entry.argument, () => null) ?? { re: Number.NaN, im: Number.NaN };
    kernelOf(entry, new Map()).addLog(Float64Array.of(x.re), Float64Array.of(x.im), entry.power, re, im);
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

function compileEntry(entry: Entry, variables: readonly string[], kernels: Map<string, DoubleKernel>): Step {
  if (entry.parameters.some((form) => form.symbols().length > 0)) return pointwise(entry, variables);
  const kernel = kernelOf(entry, kernels);
  const fill = compileArgument(entry.argument, variables);
  return (points, xRe, xIm, re, im) => {
    const real = fill(points, xRe, xIm);
    kernel.addLog(xRe, real ? null : xIm, entry.power, re, im);
  };
}

function kernelOf(entry: Entry, kernels: Map<string, DoubleKernel>): DoubleKernel {
  const key = [entry.name, ...entry.parameters.map((p) => p.key)].join('|');
  const known = kernels.get(key);
  if (known) return known;
  const parameters = entry.parameters.map((p) => formDouble(p, () => null) ?? { re: Number.NaN, im: Number.NaN });
  const kernel = functions[entry.name].double(parameters);
  kernels.set(key, kernel);
  return kernel;
}

/** A function whose periods move with a variable: its tables are made anew at every point. */
function pointwise(entry: Entry, variables: readonly string[]): Step {
  return (points, _xRe, _xIm, re, im) => {
    for (let k = 0; k < re.length; k++) {
      const at = (name: string): DoubleValue | null => {
        const index = variables.indexOf(name);
        return index < 0 ? null : { re: (points[index] as Float64Array)[k] as number, im: 0 };
      };
      const parameters = entry.parameters.map((p) => formDouble(p, at) ?? { re: Number.NaN, im: Number.NaN });
      const x = formDouble(entry.argument, at) ?? { re: Number.NaN, im: Number.NaN };
      functions[entry.name]
        .double(parameters)
        .addLog(
          Float64Array.of(x.re),
          Float64Array.of(x.im),
          entry.power,
          re.subarray(k, k + 1),
          im.subarray(k, k + 1),
        );
    }
  };
}

/** Fills the argument arrays; answers whether all arguments are real. */
type Fill = (points: readonly Float64Array[], xRe: Float64Array, xIm: Float64Array) => boolean;

interface NumericTerm {
  readonly re: number;
  readonly im: number;
  /** Powers of the variables, most often a single first power. */
  readonly powers: readonly { readonly variable: number; readonly power: number }[];
}

/** Polynomials in the variables run as such; anything else is evaluated point by point. */
function compileArgument(form: Form, variables: readonly string[]): Fill {
  const terms: NumericTerm[] = [];
  for (const term of form.split()) {
    const numeric = numericTerm(term, variables);
    if (numeric === null) return fillPointwise(form, variables);
    terms.push(numeric);
  }
  const real = terms.every(({ im }) => im === 0);
  return (points, xRe, xIm) => {
    xRe.fill(0);
    if (!real) xIm.fill(0);
    for (const { re, im, powers } of terms) {
      for (let k = 0; k < xRe.length; k++) {
        let x = 1;
        for (const { variable, power } of powers) {
          const value = (points[variable] as Float64Array)[k] as number;
          x *= power === 1 ? value : value ** power;
        }
        xRe[k] = (xRe[k] as number) + re * x;
        if (!real) xIm[k] = (xIm[k] as number) + im * x;
      }
    }
    return real;
  };
}

function numericTerm(form: Form, variables: readonly string[]): NumericTerm | null {
  const powers: { variable: number; power: number }[] = [];
  let rest = form;
  for (const { atom, power } of form.terms[0]?.factors ?? []) {
    if (atom.kind !== 'symbol') continue;
    const variable = variables.indexOf(atom.name);
    if (variable < 0) continue;
    powers.push({ variable, power });
    rest = rest.substitute((name) => (name === atom.name ? Form.one : null));
  }
  if (rest.symbols().length > 0) return null;
  const value = formDouble(rest, () => null);
  return value === null ? null : { ...value, powers };
}

function fillPointwise(form: Form, variables: readonly string[]): Fill {
  return (points, xRe, xIm) => {
    for (let k = 0; k < xRe.length; k++) {
      const value = formDouble(form, (name) => {
        const index = variables.indexOf(name);
        return index < 0 ? null : { re: (points[index] as Float64Array)[k] as number, im: 0 };
      });
      xRe[k] = value?.re ?? Number.NaN;
      xIm[k] = value?.im ?? Number.NaN;
    }
    return false;
  };
}
