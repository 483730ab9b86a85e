import { type DoubleValue, formDouble } from '../arithmetic/form-double';
import { Form } from '../exact/form';
import type { FunctionName } from '../functions/special-function';
import { type Factor, FLUX, type Product, WEIGHT, type WeightRows } from '../product/factor';
import { collectEntries, type Entry } from './precise';

/** A function whose argument is constant + sum of slopes times variables, in doubles. */
export interface AffineEntry {
  readonly name: FunctionName;
  /** Closed forms. */
  readonly parameters: readonly Form[];
  readonly power: number;
  readonly constant: DoubleValue;
  /** One for each variable. */
  readonly slopes: readonly DoubleValue[];
}

export interface AffineProduct {
  readonly affine: readonly AffineEntry[];
  /** Entries that are not affine in the variables, or whose parameters depend on them. */
  readonly others: readonly Entry[];
  /** Names that have no value and are not variables. */
  readonly unset: readonly string[];
}

type Values = (name: string) => Form | null;

/**
 * A product with everything but the variables replaced by numbers, weight by weight in doubles; equal entries are
 * collected. Exact forms are made only once a factor, so that hundreds of weights cost little.
 */
export function affineProduct(product: Product, variables: readonly string[], values: Values): AffineProduct {
  const numbers = new Map<string, DoubleValue | null>();
  const number = (name: string): DoubleValue | null => {
    const known = numbers.get(name);
    if (known !== undefined) return known;
    const form = values(name);
    const value = form === null ? null : formDouble(form, () => null);
    numbers.set(name, value);
    return value;
  };
  const collected = new Map<string, AffineEntry>();
  const others: Factor[] = [];
  const unset = new Set<string>();
  const open: Values = (name) => (variables.includes(name) ? null : values(name));
  for (const factor of product) {
    for (const { argument: at, parameters: periods, rows } of casesOf(factor, number)) {
      const parameters = periods.map((form) => form.substitute(open));
      const template = readTemplate(at.substitute(open), variables);
      if (template === null || parameters.some((form) => form.symbols().length > 0)) {
        others.push(factor);
        break;
      }
      for (const argument of argumentsOf(factor, rows, template, variables, number, unset)) {
        const entry: AffineEntry = { name: factor.name, parameters, power: factor.power, ...argument };
        const key = entryKey(entry);
        const present = collected.get(key);
        collected.set(key, present ? { ...entry, power: entry.power + present.power } : entry);
      }
    }
  }
  const symbolic = collectEntries(others, open);
  for (const { argument, parameters } of symbolic) {
    for (const name of [argument, ...parameters].flatMap((form) => form.symbols())) {
      if (!variables.includes(name)) unset.add(name);
    }
  }
  return { affine: [...collected.values()].filter(({ power }) => power !== 0), others: symbolic, unset: [...unset] };
}

/** A factor over those rows of its weights that have one flux; all of them where the flux does not matter. */
interface Case {
  readonly argument: Form;
  readonly parameters: readonly Form[];
  readonly rows: readonly number[] | null;
}

/**
 * A factor that holds the flux other than linearly in its argument, as |w.n|, written once for each value that w.n
 * takes. One that cannot be written so, for want of a value, stays as it is.
 */
function casesOf(factor: Factor, number: (name: string) => DoubleValue | null): readonly Case[] {
  const { argument, parameters, weights, half } = factor;
  const whole: Case = { argument, parameters, rows: null };
  const mentions = (form: Form): boolean => form.symbols().includes(FLUX);
  if (weights === null || !(parameters.some(mentions) || mentions(argument.linearPart(FLUX).rest))) return [whole];
  const table = weights.rows(half);
  const width = table.names.length;
  const numbers = table.fluxes.map((name) => (name === null ? 0 : (number(name)?.re ?? Number.NaN)));
  const byFlux = new Map<number, number[]>();
  for (let row = 0; row < table.rows.length / width; row++) {
    // + 0 turns -0 into 0.
    const flux = numbers.reduce((sum, n, j) => sum + n * (table.rows[row * width + j] as number), 0) + 0;
    byFlux.set(flux, [...(byFlux.get(flux) ?? []), row]);
  }
  if (![...byFlux.keys()].every(Number.isSafeInteger)) return [whole];
  return [...byFlux].map(([flux, rows]) => {
    const at = (form: Form): Form => form.substitute((name) => (name === FLUX ? Form.number(flux) : null));
    return { argument: at(argument), parameters: parameters.map(at), rows };
  });
}

function entryKey({ name, parameters, constant, slopes }: AffineEntry): string {
  const numbers = [constant, ...slopes].flatMap(({ re, im }) => [re, im]);
  return `${name}|${parameters.map((form) => form.key).join(';')}|${numbers.join(',')}`;
}

/** Coefficients of the placeholders and of the variables in an argument, and what is left. */
interface Template {
  readonly weight: DoubleValue;
  readonly flux: DoubleValue;
  readonly constant: DoubleValue;
  readonly slopes: readonly DoubleValue[];
}

/** Null when the argument is not affine in placeholders and variables, or holds other names. */
function readTemplate(argument: Form, variables: readonly string[]): Template | null {
  const parts: DoubleValue[] = [];
  let rest = argument;
  for (const name of [WEIGHT, FLUX, ...variables]) {
    const split = rest.linearPart(name);
    const value = formDouble(split.coefficient, () => null);
    if (value === null) return null;
    parts.push(value);
    rest = split.rest;
  }
  const constant = formDouble(rest, () => null);
  const [weight, flux, ...slopes] = parts;
  return constant === null || !weight || !flux ? null : { weight, flux, constant, slopes };
}

type Argument = Pick<AffineEntry, 'constant' | 'slopes'>;

function argumentsOf(
  factor: Factor,
  rows: readonly number[] | null,
  template: Template,
  variables: readonly string[],
  number: (name: string) => DoubleValue | null,
  unset: Set<string>,
): readonly Argument[] {
  if (factor.weights === null) return [template];
  const table = factor.weights.rows(factor.half);
  const columns = readColumns(table, variables, number, template, unset);
  const width = table.names.length;
  return (rows ?? Array.from({ length: table.rows.length / width }, (_, row) => row)).map((row) => {
    let constant = template.constant;
    const slopes = [...template.slopes];
    for (let j = 0; j < width; j++) {
      const coefficient = table.rows[row * width + j] as number;
      if (coefficient === 0) continue;
      const column = columns[j] as Column;
      constant = plus(constant, column.constant, coefficient);
      if (column.variable >= 0)
        slopes[column.variable] = plus(slopes[column.variable] as DoubleValue, template.weight, coefficient);
    }
    return { constant, slopes };
  });
}

/** What a unit of one coordinate adds to the argument: a constant, or the weight's coefficient times a variable. */
interface Column {
  readonly constant: DoubleValue;
  readonly variable: number;
}

const ZERO: DoubleValue = { re: 0, im: 0 };

function readColumns(
  table: WeightRows,
  variables: readonly string[],
  number: (name: string) => DoubleValue | null,
  template: Template,
  unset: Set<string>,
): Column[] {
  const value = (name: string): DoubleValue => {
    const known = number(name);
    if (known === null) unset.add(name);
    return known ?? ZERO;
  };
  const withFlux = template.flux.re !== 0 || template.flux.im !== 0;
  return table.names.map((name, j) => {
    const variable = variables.indexOf(name);
    const flux = table.fluxes[j] ?? null;
    const position = variable >= 0 ? ZERO : times(template.weight, value(name));
    const constant = withFlux && flux !== null ? plus(position, times(template.flux, value(flux)), 1) : position;
    return { constant, variable };
  });
}

function plus(a: DoubleValue, b: DoubleValue, factor: number): DoubleValue {
  return { re: a.re + factor * b.re, im: a.im + factor * b.im };
}

function times(a: DoubleValue, b: DoubleValue): DoubleValue {
  return { re: a.re * b.re - a.im * b.im, im: a.re * b.im + a.im * b.re };
}

/** An entry by itself, for functions that take products. */
export function asFactor(entry: Entry): Factor {
  return { ...entry, weights: null, half: false, from: [] };
}

/** A form that stands for the argument in laws that are then evaluated in doubles. */
export const ARGUMENT = Form.symbol('@x');
