export interface MapScale {
  readonly from: number;
  readonly to: number;
  readonly kind: 'linear' | 'logarithmic';
  /** Part of the ramp, 0 to 1, of a value. */
  readonly part: (value: number) => number;
  /** Value at a part of the ramp. */
  readonly valueAt: (part: number) => number;
}

export type MapValues = readonly (readonly (number | null)[])[];

/** Positive values that span more than this are told apart by their logarithms only. */
const WIDE = 1000;

/** Colour scale of a map: logarithmic where all values are positive and span many powers of ten. */
export function mapScale(values: MapValues): MapScale {
  let from = Number.POSITIVE_INFINITY;
  let to = Number.NEGATIVE_INFINITY;
  let smallest = Number.POSITIVE_INFINITY;
  for (const row of values) {
    for (const value of row) {
      if (value === null || !Number.isFinite(value)) continue;
      from = Math.min(from, value);
      to = Math.max(to, value);
      if (value > 0) smallest = Math.min(smallest, value);
    }
  }
  if (!(to >= from)) return linear(0, 1);
  if (from >= 0 && smallest < to && to / Math.max(from, smallest) > WIDE) return logarithmic(smallest, to);
  return linear(from, to);
}

function linear(from: number, to: number): MapScale {
  const size = to - from || 1;
  return { from, to, kind: 'linear', part: (value) => (value - from) / size, valueAt: (part) => from + part * size };
}

function logarithmic(from: number, to: number): MapScale {
  const start = Math.log(from);
  const size = Math.log(to) - start;
  return {
    from,
    to,
    kind: 'logarithmic',
    part: (value) => (value <= from ? 0 : (Math.log(value) - start) / size),
    valueAt: (part) => Math.exp(start + part * size),
  };
}
