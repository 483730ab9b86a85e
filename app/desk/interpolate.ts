/** Two heights that belong together: of a piece of text, and of the card it makes. */
export interface Anchor {
  readonly text: number;
  readonly page: number;
}

type Side = keyof Anchor;

/** Where the other side stands when this one stands at `at`: straight lines between the anchors. */
export function interpolate(anchors: readonly Anchor[], from: Side, to: Side, at: number): number {
  let before = anchors[0];
  if (!before) return 0;
  for (const anchor of anchors) {
    if (anchor[from] >= at) {
      const size = anchor[from] - before[from];
      const part = size > 0 ? (at - before[from]) / size : 0;
      return before[to] + Math.max(0, Math.min(1, part)) * (anchor[to] - before[to]);
    }
    before = anchor;
  }
  return before[to];
}
