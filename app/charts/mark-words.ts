import type { PlotMark } from '../../engine/requests/result';

/** Width of a letter of the small text beside a mark, in pixels, with some room. */
const LETTER = 6.5;

export function markWord({ kind, order }: Pick<PlotMark, 'kind' | 'order'>): string {
  return order > 1 ? `${kind} of order ${order}` : kind;
}

/**
 * The word beside each mark, empty where it would run into the one before it: zeros share one line, poles another. The
 * shapes and the list below remain.
 */
export function markWords(marks: readonly PlotMark[], x: (value: number) => number): readonly string[] {
  const words = marks.map(() => '');
  const free = { zero: Number.NEGATIVE_INFINITY, pole: Number.NEGATIVE_INFINITY };
  const leftToRight = marks.map((_, at) => at).sort((a, b) => (marks[a]?.x ?? 0) - (marks[b]?.x ?? 0));
  for (const at of leftToRight) {
    const mark = marks[at];
    if (mark === undefined || x(mark.x) < free[mark.kind]) continue;
    const word = markWord(mark);
    words[at] = word;
    free[mark.kind] = x(mark.x) + LETTER * (word.length + 1);
  }
  return words;
}
