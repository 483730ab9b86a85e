import type { Data, Layout } from 'plotly.js-dist-min';
import type { PlotResult } from '../../engine/requests/result';
import { rampSteps } from './colour-ramp';
import { asymptoteColour, lineStyle } from './line-styles';
import { mapScale } from './map-scale';
import { symbolText } from './symbol-text';

/** A token as the browser sees it on this element: the figure is drawn outside the style sheets. */
function resolver(style: CSSStyleDeclaration): (colour: string) => string {
  const dark =
    style.colorScheme === 'dark' ||
    (style.colorScheme !== 'light' && matchMedia('(prefers-color-scheme: dark)').matches);
  return (colour) => {
    const name = /^var\((--[\w-]+)\)$/.exec(colour)?.[1];
    const value = name === undefined ? colour : style.getPropertyValue(name).trim();
    const [, light, night] = /^light-dark\(\s*([^,]+),\s*([^)]+)\)$/.exec(value) ?? [];
    return (dark ? night : light)?.trim() ?? value;
  };
}

function curves(result: PlotResult, colour: (name: string) => string): Data[] {
  const lines = result.series.map((series, at): Data => {
    const style = lineStyle(at);
    return {
      type: 'scatter',
      mode: 'lines',
      name: series.name,
      x: [...series.x],
      y: [...series.y],
      line: { color: colour(style.colour), width: 2, dash: dashes[at % dashes.length] ?? 'solid' },
    };
  });
  const thin = result.asymptotes.map(
    (series, at): Data => ({
      type: 'scatter',
      mode: 'lines',
      name: series.name,
      x: [...series.x],
      y: [...series.y],
      line: { color: colour(asymptoteColour(result, at)), width: 1, dash: 'dot' },
    }),
  );
  const zeros = result.marks.filter(({ kind }) => kind === 'zero');
  const rings: Data = {
    type: 'scatter',
    mode: 'markers',
    name: 'zeros',
    x: zeros.map(({ x }) => x),
    y: zeros.map(() => 0),
    marker: { symbol: 'circle-open', size: 9, color: colour('var(--curve-2)') },
  };
  return zeros.length > 0 ? [...lines, ...thin, rings] : [...lines, ...thin];
}

/** Dashes of the exploring library, in the order of the curves. */
const dashes = ['solid', 'dash', 'dot', 'dashdot', 'longdash', 'longdashdot'] as const;

function map(result: PlotResult): Data[] {
  const [series] = result.series;
  if (!series?.z) return [];
  const scale = mapScale(series.z);
  const shown = scale.kind === 'linear' ? series.z : series.z.map((row) => row.map((value) => logarithm(value)));
  return [
    {
      type: 'heatmap',
      name: series.name,
      x: [...series.x],
      y: [...series.y],
      z: shown.map((row) => [...row]),
      colorscale: rampSteps(16).map(([part, colour]): [number, string] => [part, colour]),
      colorbar: { title: { text: scale.kind === 'linear' ? series.name : `log₁₀ ${series.name}` } },
    },
  ];
}

const logarithm = (value: number | null) => (value !== null && value > 0 ? Math.log10(value) : null);

/** Data and layout of the plot to explore, in the page's colours. */
export function exploreFigure(
  result: PlotResult,
  style: CSSStyleDeclaration,
): { data: Data[]; layout: Partial<Layout> } {
  const colour = resolver(style);
  const [across, up] = result.axes;
  const axis = {
    gridcolor: colour('var(--line)'),
    zerolinecolor: colour('var(--ink-soft)'),
    linecolor: colour('var(--ink-soft)'),
  };
  return {
    data: up ? map(result) : curves(result, colour),
    layout: {
      paper_bgcolor: colour('var(--paper)'),
      plot_bgcolor: colour('var(--paper)'),
      font: { color: colour('var(--ink)'), size: 13, family: 'system-ui, sans-serif' },
      margin: { l: 60, r: 20, t: 20, b: 50 },
      showlegend: result.series.length + result.asymptotes.length > 1 && !up,
      dragmode: 'zoom',
      height: 420,
      xaxis: { ...axis, title: { text: symbolText(across?.name ?? '') } },
      yaxis: { ...axis, title: { text: symbolText(up?.name ?? '') } },
    },
  };
}

export function downloadDataUrl(file: string, url: string): void {
  const link = document.createElement('a');
  link.href = url;
  link.download = file;
  link.click();
}
