import type { PlotResult } from '../../engine/requests/result';

/** Colour and dash of the curves in order: never colour alone. The colours are tokens, for light and dark. */
const colours = ['--curve-1', '--curve-2', '--curve-3', '--curve-4', '--curve-5', '--curve-6'] as const;
const dashes = ['', '7 4', '2 3', '10 3 2 3', '14 5', '5 2 1 2 1 2'] as const;

export interface LineStyle {
  readonly colour: string;
  readonly dash: string;
}

export function lineStyle(at: number): LineStyle {
  const round = Math.floor(at / colours.length);
  return {
    colour: `var(${colours[at % colours.length] ?? colours[0]})`,
    dash: dashes[(at + round) % dashes.length] ?? '',
  };
}

/** An asymptote has the colour of the curve it is named after, and none of them where that is not clear. */
export function asymptoteColour(result: PlotResult, at: number): string {
  const name = result.asymptotes[at]?.name ?? '';
  const curve = result.series.findIndex((series) => name.endsWith(series.name));
  return curve < 0 ? 'var(--ink-soft)' : lineStyle(curve).colour;
}
