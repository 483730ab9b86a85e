import { numberFromFixed } from '../arithmetic/fixed';
import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { type ValueFunctionWord, valueFunctions } from '../functions/values';
import type { Assignment, Quantity } from '../language/tree';
import { affineProduct } from '../numeric/affine';
import { asymptote } from '../numeric/growth';
import { marksOnLine } from '../numeric/marks';
import { exactParameter } from '../numeric/precise';
import { compile, compileAffine } from '../numeric/program';
import type { DivisorPoint } from '../product/divisor';
import { isRemark } from '../spectrum/analyse';
import { logDeterminantCurve } from '../spectrum/curve';
import { elementary, namesIn } from '../spheres/quantity';
import type { TheoryProduct } from '../spheres/sphere';
import type { Analysis } from './analysis';
import { coefficientOrder } from './coefficient';
import { assigned } from './determinant';
import { functionProduct } from './function-value';
import { resolvePoint } from './point';
import type { PlotAxis } from './result';
import { sayRemark, unreadableSpectrum } from './spectrum-card';
import { askedText, theoryQuantity, unknownQuantity, unreadable } from './subject';
import { isValueFunction } from './value-function';

/** Logarithm of a quantity in doubles: -Infinity in re at zeros, +Infinity at poles, NaN where there is no value. */
export interface LogSamples {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** A quantity that can be drawn. */
export interface Curve {
  readonly name: string;
  readonly notes: readonly string[];
  readonly line: (
    x: Float64Array,
    axis: PlotAxis,
  ) => LogSamples & {
    readonly marks: readonly DivisorPoint[];
    /** Leading growth towards one end, where it is known. */
    readonly growth: (end: 1 | -1) => Float64Array | null;
  };
  /** Over two axes; null where only lines can be had. */
  readonly map: ((x: Float64Array, y: Float64Array) => LogSamples) | null;
}

/** The curve of a quantity; a string says why there is none. */
export function curveOf(
  analysis: Analysis,
  quantity: Quantity,
  axes: readonly PlotAxis[],
  at: readonly Assignment[],
): Curve | string {
  switch (quantity.kind) {
    case 'theory':
      return theoryCurve(analysis, quantity, axes, at);
    case 'determinant':
      return determinantCurve(analysis, quantity, axes, at);
    case 'function':
      return functionCurve(analysis, quantity, axes);
  }
}

type Of<K extends Quantity['kind']> = Extract<Quantity, { kind: K }>;

function theoryCurve(
  analysis: Analysis,
  { theory: { name }, ...asked }: Of<'theory'>,
  axes: readonly PlotAxis[],
  at: readonly Assignment[],
): Curve | string {
  const entry = analysis.theories.get(name);
  const problem = unreadable(entry, name);
  if (problem !== null || !entry?.built?.theory || !entry.sphere) return problem ?? '';
  const { sphere } = entry;
  const { theory } = entry.built;
  const { what } = asked;
  const raw = theoryQuantity(entry, asked);
  if (raw === null && coefficientOrder(entry.sphere, asked) !== null) {
    return `\`${askedText(asked)}\` is a coefficient, which has no curve here; ask for its \`value\` at points.`;
  }
  if (raw === null) return unknownQuantity(entry, asked);
  const free = axes.map((axis) => ({ name: axis.name, span: what.span }));
  const resolved = resolvePoint(analysis, sphere, theory, at, free, 'zero', namesIn(theory, raw));
  if (resolved.kind === 'failure') return resolved.message;
  const { values, notes } = resolved.point;
  return productCurve(what.name, elementary(sphere, theory, raw).product, axes, values, notes);
}

function productCurve(
  name: string,
  product: TheoryProduct,
  axes: readonly PlotAxis[],
  values: (name: string) => Form | null,
  notes: readonly string[],
): Curve {
  const variables = axes.map((axis) => axis.name);
  return {
    name,
    notes,
    line: (x, axis) => {
      const entries = affineProduct(product, variables, values);
      const re = new Float64Array(x.length);
      const im = new Float64Array(x.length);
      compileAffine(entries, variables).addLog([x], re, im);
      const growth = (end: 1 | -1): Float64Array | null => asymptote(entries, axis.name, end, x);
      return { re, im, marks: marksOnLine(entries, axis.from, axis.to), growth };
    },
    map: (x, y) => {
      const re = new Float64Array(x.length);
      const im = new Float64Array(x.length);
      compile(product, variables, values).addLog([x, y], re, im);
      return { re, im };
    },
  };
}

function determinantCurve(
  analysis: Analysis,
  { spectrum: { name }, prescription }: Of<'determinant'>,
  axes: readonly PlotAxis[],
  at: readonly Assignment[],
): Curve | string {
  const entry = analysis.spectra.get(name);
  if (!entry) return `There is no spectrum \`${name}\` in this notebook.`;
  const { spectrum } = entry;
  if (spectrum === null) return unreadableSpectrum(name);
  const values = assigned(analysis, at);
  if (typeof values === 'string') return values;
  const [axis] = axes as [PlotAxis];
  const probe = logDeterminantCurve(spectrum, prescription, axis.name, new Float64Array(0), values);
  if (isRemark(probe)) return sayRemark(probe);
  return {
    name: 'determinant',
    notes: [],
    line: (x) => {
      const found = logDeterminantCurve(spectrum, prescription, axis.name, x, values);
      const { re, im } = isRemark(found) ? probe : found;
      return { re, im, marks: [], growth: () => null };
    },
    map: null,
  };
}

function functionCurve(analysis: Analysis, quantity: Of<'function'>, axes: readonly PlotAxis[]): Curve | string {
  const word = quantity.function.name;
  const names = axes.map(({ name }) => name);
  const values = (name: string): Form | null => (names.includes(name) ? null : (analysis.values.get(name) ?? null));
  if (isValueFunction(word)) return valueFunctionCurve(word, quantity, axes, values);
  const product = functionProduct(quantity, values);
  return typeof product === 'string' ? product : productCurve(word, product, axes, values, []);
}

/** Fraction bits at which functions without a double tier are sampled for a curve. */
const CURVE_BITS = 60;

/** A function that has the precise tier only, sampled with few bits. */
function valueFunctionCurve(
  word: ValueFunctionWord,
  quantity: Of<'function'>,
  axes: readonly PlotAxis[],
  values: (name: string) => Form | null,
): Curve | string {
  const declared = valueFunctions[word];
  const forms = quantity.arguments.map(({ form }) => form.substitute(values));
  const [axis] = axes as [PlotAxis];
  const open = forms.flatMap((form) => form.symbols()).find((name) => name !== axis.name);
  if (open !== undefined) return `No value for \`${open}\`; give it with \`let\`.`;
  const sample = (x: number): { re: number; im: number } => {
    const at = Form.number(Rational.parse(`${x}`) ?? Rational.zero);
    const args = forms.map((form) => exactParameter(form.substitute((name) => (name === axis.name ? at : null))));
    const value = declared.evaluate(args, CURVE_BITS);
    if (value.kind === 'pole') return { re: Number.POSITIVE_INFINITY, im: 0 };
    if (value.kind !== 'value') return { re: Number.NaN, im: Number.NaN };
    const [re, im] = [numberFromFixed(value.re, CURVE_BITS), numberFromFixed(value.im, CURVE_BITS)];
    return value.of === 'logarithm' ? { re, im } : { re: Math.log(Math.hypot(re, im)), im: Math.atan2(im, re) };
  };
  return {
    name: word,
    notes: [],
    line: (x) => {
      const points = Array.from(x, sample);
      const re = Float64Array.from(points, (point) => point.re);
      const im = Float64Array.from(points, (point) => point.im);
      return { re, im, marks: [], growth: () => null };
    },
    map: null,
  };
}
