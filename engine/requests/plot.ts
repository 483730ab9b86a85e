import type { Part, PlotRequest, RangeClause } from '../language/tree';
import { symbolLatex } from '../latex/symbol';
import { type Analysis, realNumber } from './analysis';
import { type Answer, failure } from './answer';
import { type Curve, curveOf, type LogSamples } from './curve';
import type { PlotAxis, PlotMark, PlotResult, PlotSeries } from './result';
import { subjectName } from './subject';

/** Points of a curve, and of each side of a map. */
const CURVE_POINTS = 601;
const MAP_POINTS = 101;

/** `plot ...`: curves against one parameter, or a map over two. */
export function runPlot(analysis: Analysis, request: PlotRequest): Answer {
  const of = request.curves.map(({ quantity }) => subjectName(quantity)).join(', ');
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
  const drawn: Drawn[] = [];
  for (const { part, quantity } of request.curves) {
    const curve = curveOf(analysis, quantity, axes, request.at);
    if (typeof curve === 'string') return failure(of, curve);
    drawn.push({ curve, part: quantity.log ? 'log' : part });
  }
  const notes = [...new Set(drawn.flatMap(({ curve }) => curve.notes))];
  if (axes.length === 1) return { kind: 'plot', of, notes, axes, ...line(drawn, axes[0] as PlotAxis) };
  const map = mapSeries(drawn[0] as Drawn, axes);
  if (map === null) return failure(of, 'This quantity is drawn against one range; a map of it is not offered.');
  return { kind: 'plot', of, notes, axes, series: [map], marks: [], asymptotes: [] };
}

/** A curve, and the part of it that is drawn; null: the real part where it is real, else the modulus. */
interface Drawn {
  readonly curve: Curve;
  readonly part: Part | null;
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

function line(drawn: readonly Drawn[], axis: PlotAxis): Pick<PlotResult, 'series' | 'marks' | 'asymptotes'> {
  const x = grid(axis, CURVE_POINTS);
  const series: PlotSeries[] = [];
  const marks: PlotMark[] = [];
  const asymptotes: PlotSeries[] = [];
  drawn.forEach(({ curve, part: asked }, k) => {
    const sampled = curve.line(x, axis);
    const { y, part } = values(asked, sampled);
    const name = `${part} ${curve.name}`;
    series.push({ name, x: Array.from(x), y });
    for (const { at, order } of sampled.marks) {
      marks.push({ kind: order > 0 ? 'zero' : 'pole', x: at, order: Math.abs(order), series: k });
    }
    if (part !== 'abs' && part !== 'log') return;
    for (const end of [-1, 1] as const) {
      const log = sampled.growth(end);
      if (log === null) continue;
      const side = Array.from(x, (_, index) => index).filter((index) => end * (x[index] as number) > 0);
      asymptotes.push({
        name: `growth of ${name}`,
        x: side.map((index) => x[index] as number),
        y: side.map((index) => finite(part === 'abs' ? Math.exp(log[index] as number) : (log[index] as number))),
      });
    }
  });
  return { series, marks, asymptotes };
}

function mapSeries({ curve, part: asked }: Drawn, axes: readonly PlotAxis[]): PlotSeries | null {
  if (curve.map === null) return null;
  const [first, second] = axes as [PlotAxis, PlotAxis];
  const xs = grid(first, MAP_POINTS);
  const ys = grid(second, MAP_POINTS);
  const x = new Float64Array(MAP_POINTS * MAP_POINTS);
  const y = new Float64Array(MAP_POINTS * MAP_POINTS);
  for (let k = 0; k < x.length; k++) {
    x[k] = xs[k % MAP_POINTS] as number;
    y[k] = ys[Math.floor(k / MAP_POINTS)] as number;
  }
  const { y: flat, part } = values(asked, curve.map(x, y));
  const z = Array.from(ys, (_, row) => flat.slice(row * MAP_POINTS, (row + 1) * MAP_POINTS));
  return { name: `${part} ${curve.name}`, x: Array.from(xs), y: Array.from(ys), z };
}

function grid({ from, to }: PlotAxis, count: number): Float64Array {
  return Float64Array.from({ length: count }, (_, k) => from + ((to - from) * k) / (count - 1));
}

/** How far from real a quantity may be, relative to its size, to be plotted as real when no part is asked for. */
const NEARLY_REAL = 1e-9;

function values(part: Part | null, { re, im }: LogSamples): { y: (number | null)[]; part: Part } {
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
