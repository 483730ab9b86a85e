import type { PlotMark, PlotSeries } from '../../engine/requests/result';

export type Scale = (value: number) => number;

/** From values to pixels. */
export function linearScale(from: number, to: number, start: number, end: number): Scale {
  const size = to - from;
  return (value) => start + ((value - from) / (size === 0 ? 1 : size)) * (end - start);
}

/** Far outside the frame a point's exact place does not matter, but its digits cost time. */
const FARTHEST = 20_000;

/** The `d` of a curve; it breaks where a value is not finite and across a pole. */
export function curvePath(series: PlotSeries, poles: readonly PlotMark[], x: Scale, y: Scale): string {
  const breaks = poles.map((pole) => pole.x).sort((left, right) => left - right);
  let path = '';
  let pen = false;
  let next = 0;
  series.x.forEach((at, index) => {
    const value = series.y[index];
    const passed = next;
    while (next < breaks.length && (breaks[next] ?? 0) < at) next += 1;
    if (next > passed) pen = false;
    if (value === null || value === undefined || !Number.isFinite(value)) {
      pen = false;
      return;
    }
    const height = Math.max(-FARTHEST, Math.min(FARTHEST, y(value)));
    path += `${pen ? 'L' : 'M'}${x(at).toFixed(1)} ${height.toFixed(1)}`;
    pen = true;
  });
  return path;
}
