/** A partition: row lengths, none smaller than the next, none zero. */
export type YoungDiagram = readonly number[];

/** All ways to share `boxes` among `count` Young diagrams. */
export function youngTuples(count: number, boxes: number): readonly (readonly YoungDiagram[])[] {
  if (count === 0) return boxes === 0 ? [[]] : [];
  return Array.from({ length: boxes + 1 }, (_, first) => {
    const rest = youngTuples(count - 1, boxes - first);
    return partitions(first, first).flatMap((diagram) => rest.map((others) => [diagram, ...others]));
  }).flat();
}

/** How many there are: the coefficient of q^boxes in prod_n (1 - q^n)^-count. */
export function countYoungTuples(count: number, boxes: number): number {
  const series = [1, ...new Array<number>(boxes).fill(0)];
  for (let factor = 0; factor < count; factor++) {
    for (let n = 1; n <= boxes; n++) {
      for (let k = n; k <= boxes; k++) series[k] = (series[k] as number) + (series[k - n] as number);
    }
  }
  return series[boxes] as number;
}

function partitions(boxes: number, largest: number): YoungDiagram[] {
  if (boxes === 0) return [[]];
  return Array.from({ length: Math.min(boxes, largest) }, (_, k) => {
    const first = Math.min(boxes, largest) - k;
    return partitions(boxes - first, first).map((rest) => [first, ...rest]);
  }).flat();
}

/** Boxes as row and column, both from 1. */
export function boxesOf(diagram: YoungDiagram): readonly { readonly row: number; readonly column: number }[] {
  return diagram.flatMap((length, k) => Array.from({ length }, (_, j) => ({ row: k + 1, column: j + 1 })));
}

/** Boxes of the row to the right of a column; negative outside the diagram. */
export function arm(diagram: YoungDiagram, row: number, column: number): number {
  return (diagram[row - 1] ?? 0) - column;
}

/** Boxes of the column below a row; negative outside the diagram. */
export function leg(diagram: YoungDiagram, row: number, column: number): number {
  return diagram.filter((length) => length >= column).length - row;
}
