import type { PlotResult } from '../../engine/requests/result';

export interface Domain {
  readonly from: number;
  readonly to: number;
}

/** Beyond this ratio between the range of all points and that of nearly all, a pole is taken to be near. */
const OUTLYING = 8;
/** The part of the points that must stay in sight when poles are cut off. */
const KEPT = 0.94;
const MARGIN = 0.06;

function finiteValues(result: PlotResult): readonly number[] {
  return result.series.flatMap(({ y }) =>
    y.filter((value): value is number => value !== null && Number.isFinite(value)),
  );
}

/** What the vertical axis shows: all of the curves, or nearly all where they run off to infinity. */
export function verticalDomain(result: PlotResult): Domain {
  const values = [...finiteValues(result)].sort((left, right) => left - right);
  const lowest = values[0];
  const highest = values[values.length - 1];
  if (lowest === undefined || highest === undefined) return { from: 0, to: 1 };
  const cut = Math.floor((values.length * (1 - KEPT)) / 2);
  const low = values[cut] ?? lowest;
  const high = values[values.length - 1 - cut] ?? highest;
  const hasPole = result.marks.some(({ kind }) => kind === 'pole');
  const outlying = high > low && (highest - lowest) / (high - low) > OUTLYING;
  return withMargin(hasPole && outlying ? { from: low, to: high } : { from: lowest, to: highest });
}

function withMargin({ from, to }: Domain): Domain {
  // A curve near zero stands on the axis, so that its height can be judged.
  const low = from > 0 && from < 0.35 * to ? 0 : from;
  const high = to < 0 && to > 0.35 * from ? 0 : to;
  const size = high - low;
  if (!(size > 0)) {
    const half = Math.abs(high) > 0 ? Math.abs(high) * 0.1 : 1;
    return { from: low - half, to: high + half };
  }
  return { from: low === 0 ? 0 : low - size * MARGIN, to: high === 0 ? 0 : high + size * MARGIN };
}

export function union(left: Domain, right: Domain): Domain {
  return { from: Math.min(left.from, right.from), to: Math.max(left.to, right.to) };
}
