import type { Form } from '../exact/form';
import type { Part, PlotRequest, RangeClause } from '../language/tree';
import { symbolLatex } from '../latex/symbol';
import { affineProduct } from '../numeric/affine';
import { asymptote } from '../numeric/growth';
import { marksOnLine } from '../numeric/marks';
import { compile, compileAffine, type Program } from '../numeric/program';
import { elementary, namesIn } from '../spheres/quantity';
import type { TheoryProduct } from '../spheres/sphere';
import { type Analysis, realNumber } from './analysis';
import { type Answer, failure } from './answer';
import { functionProduct } from './function-value';
import { type Point, resolvePoint } from './point';
import type { PlotAxis, PlotMark, PlotResult, PlotSeries } from './result';
import { theoryQuantity, unknownQuantity, unreadable } from './subject';

/** Points of a curve, and of each side of a map. */
const CURVE_POINTS = 601;
const MAP_POINTS = 101;

/** `plot ...`: curves against one parameter, or a map over two. */
export function runPlot(analysis: Analysis, request: PlotRequest): Answer {
  const of = request.curves
    .map(({ quantity }) => (quantity.kind === 'theory' ? quantity.theory.name : 'function'))
    .join(', ');
  const axes: PlotAxis[] = [];
  for (const clause of request.over) {
    const axis = readAxis(analysis, clause);
    if (typeof axis === 'string') return failure(of, axis);
    axes.push(axis);
  }
  if (axes.length < 1 || axes.length > 2) return failure(of, 'A plot runs over one range, or over two for a map.');
  if (axes.length === 2 && axes[0]?.name === axes[1]?.name)
    return failure(of, 'The two ranges of a map need different names.');
  if (axes.length === 2 && request.curves.length > 1)
    return failure(of, 'A map shows one quantity. Ask for each in a plot of its own.');
  const curves: Curve[] = [];
  for (const curve of request.curves) {
    const made = makeCurve(analysis, request, curve, axes);
    if (typeof made === 'string') return failure(of, made);
    curves.push(made);
  }
  const notes = [...new Set(curves.flatMap(({ point }) => point.notes))];
  return axes.length === 1
    ? { kind: 'plot', of, notes, axes, ...line(curves, axes[0] as PlotAxis) }
    : { kind: 'plot', of, notes, axes, series: [map(curves[0] as Curve, axes)], marks: [], asymptotes: [] };
}

interface Curve {
  readonly name: string;
  readonly part: Part | null;
  readonly product: TheoryProduct;
  readonly point: Point;
}

function readAxis(analysis: Analysis, clause: RangeClause): PlotAxis | string {
  const ends = [clause.from, clause.to].map(({ form }) =>
    realNumber(form.substitute((name) => analysis.values.get(name) ?? null)),
  );
  const [from, to] = ends as [number | null, number | null];
  if (from === null || to === null || !(from < to)) {
    return `The range of \`${clause.name.name}\` has to run from a real number to a larger one.`;
  }
  return { name: clause.name.name, latex: symbolLatex(clause.name.name), from, to };
}

function makeCurve(
  analysis: Analysis,
  request: PlotRequest,
  { part, quantity }: PlotRequest['curves'][number],
  axes: readonly PlotAxis[],
): Curve | string {
  if (quantity.kind === 'determinant') return 'Determinants of spectra are not offered yet.';
  if (quantity.kind === 'function') {
    const names = axes.map(({ name }) => name);
    const values = (name: string): Form | null => (names.includes(name) ? null : (analysis.values.get(name) ?? null));
    const product = functionProduct(quantity, values);
    if (typeof product === 'string') return product;
    const point: Point = { values, notes: [] };
    return { name: quantity.function.name, part: quantity.log ? 'log' : part, product, point };
  }
  const entry = analysis.theories.get(quantity.theory.name);
  const problem = unreadable(entry, quantity.theory.name);
  if (problem !== null || !entry?.built?.theory || !entry.sphere) return problem ?? '';
  const free = request.over.map(({ name }) => name);
  const raw = theoryQuantity(entry, quantity.what.name);
  if (raw === null) return unknownQuantity(entry, quantity.what.name);
  const used = namesIn(entry.built.theory, raw);
  const resolved = resolvePoint(analysis, entry.sphere, entry.built.theory, request.at, free, 'zero', used);
  if (resolved.kind === 'failure') return resolved.message;
  const { product } = elementary(entry.sphere, entry.built.theory, raw, new Map());
  return { name: quantity.what.name, part: quantity.log ? 'log' : part, product, point: resolved.point };
}

function line(curves: readonly Curve[], axis: PlotAxis): Pick<PlotResult, 'series' | 'marks' | 'asymptotes'> {
  const x = grid(axis, CURVE_POINTS);
  const series: PlotSeries[] = [];
  const marks: PlotMark[] = [];
  const asymptotes: PlotSeries[] = [];
  curves.forEach((curve, k) => {
    const entries = affineProduct(curve.product, [axis.name], curve.point.values);
    const { y, part } = values(curve, compileAffine(entries, [axis.name]), [x]);
    const name = `${part} ${curve.name}`;
    series.push({ name, x: Array.from(x), y });
    for (const { at, order } of marksOnLine(entries, axis.from, axis.to)) {
      marks.push({ kind: order > 0 ? 'zero' : 'pole', x: at, order: Math.abs(order), series: k });
    }
    if (part === 'abs' || part === 'log') {
      for (const end of [-1, 1] as const) {
        const log = asymptote(entries, axis.name, end, x);
        if (log === null) continue;
        const side = Array.from(x, (_, index) => index).filter((index) => end * (x[index] as number) > 0);
        asymptotes.push({
          name: `growth of ${name}`,
          x: side.map((index) => x[index] as number),
          y: side.map((index) => finite(part === 'abs' ? Math.exp(log[index] as number) : (log[index] as number))),
        });
      }
    }
  });
  return { series, marks, asymptotes };
}

function map(curve: Curve, axes: readonly PlotAxis[]): PlotSeries {
  const [first, second] = axes as [PlotAxis, PlotAxis];
  const xs = grid(first, MAP_POINTS);
  const ys = grid(second, MAP_POINTS);
  const x = new Float64Array(MAP_POINTS * MAP_POINTS);
  const y = new Float64Array(MAP_POINTS * MAP_POINTS);
  for (let k = 0; k < x.length; k++) {
    x[k] = xs[k % MAP_POINTS] as number;
    y[k] = ys[Math.floor(k / MAP_POINTS)] as number;
  }
  const program = compile(curve.product, [first.name, second.name], curve.point.values);
  const { y: flat, part } = values(curve, program, [x, y]);
  const z = Array.from(ys, (_, row) => flat.slice(row * MAP_POINTS, (row + 1) * MAP_POINTS));
  return { name: `${part} ${curve.name}`, x: Array.from(xs), y: Array.from(ys), z };
}

function grid({ from, to }: PlotAxis, count: number): Float64Array {
  return Float64Array.from({ length: count }, (_, k) => from + ((to - from) * k) / (count - 1));
}

/** How far from real a quantity may be, relative to its size, to be plotted as real when no part is asked for. */
const NEARLY_REAL = 1e-9;

function values(
  { part }: Curve,
  program: Program,
  points: readonly Float64Array[],
): { y: (number | null)[]; part: Part } {
  const length = (points[0] as Float64Array).length;
  const re = new Float64Array(length);
  const im = new Float64Array(length);
  program.addLog(points, re, im);
  const shown = part ?? (im.every((phase) => Math.abs(Math.sin(phase)) < NEARLY_REAL) ? 're' : 'abs');
  return { part: shown, y: Array.from(re, (log, k) => finite(show(shown, log, im[k] as number))) };
}

function show(part: Part, log: number, phase: number): number {
  switch (part) {
    case 'abs':
      return Math.exp(log);
    case 'log':
      return log;
    case 're':
      return log === -Infinity ? 0 : Math.exp(log) * Math.cos(phase);
    case 'im':
      return log === -Infinity ? 0 : Math.exp(log) * Math.sin(phase);
    case 'arg':
      return Math.atan2(Math.sin(phase), Math.cos(phase));
  }
}

function finite(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}
