import type { Span } from '../language/tree';
import { formLatex } from '../latex/form';
import { representationLatex } from '../latex/representation';
import { symbolLatex } from '../latex/symbol';
import type { Analysis, TheoryEntry } from './analysis';

/** Help on a word of the text; lines may hold `$...$`. */
export interface HoverText {
  readonly title: string;
  readonly lines: readonly string[];
}

/** What stands at an offset: a representation, a group, a parameter; null where there is nothing to say. */
export function hoverAt(analysis: Analysis, offset: number): HoverText | null {
  for (const entry of analysis.theories.values()) {
    if (!inside(entry.block.span, offset)) continue;
    const found = cellAt(entry, offset) ?? groupAt(entry, offset);
    if (found) return found;
  }
  for (const { block, value } of analysis.parameters.values()) {
    if (!inside(block.name.span, offset) || value === null) continue;
    return { title: block.name.name, lines: [`$${symbolLatex(block.name.name)}=${formLatex(value)}$`] };
  }
  return null;
}

function inside(span: Span, offset: number): boolean {
  return offset >= span.from && offset <= span.to;
}

function cellAt({ built }: TheoryEntry, offset: number): HoverText | null {
  for (const { row, cells } of built?.rows ?? []) {
    for (const [k, cell] of row.cells.entries()) {
      const read = cells[k];
      if (!inside(cell.span, offset) || !read) continue;
      if (read.kind === 'R') return { title: `R-charge ${cell.text}`, lines: [`$R=${formLatex(read.form)}$`] };
      const { representation } = read;
      const index = representation.index ?? representation.indices.join(', ');
      return {
        title: `${cell.text} of ${representation.group.name}`,
        lines: [
          `$${representationLatex(representation)}$, dimension ${representation.dimension}, ${representation.reality}`,
          `index $I_2=${index}$, ${representation.weightCount} distinct weights`,
          `highest weights ${representation.irreps.map(({ labels }) => `[${labels.join(',')}]`).join(' + ')}`,
        ],
      };
    }
  }
  return null;
}

function groupAt({ block, built }: TheoryEntry, offset: number): HoverText | null {
  for (const line of block.groups) {
    if (!inside(line.group.span, offset)) continue;
    const found = built?.groups.find(({ name }) => name === line.name.name);
    if (!found) return null;
    const { group } = found;
    const dual = group.system.positiveRoots.length;
    return {
      title: group.name,
      lines: [
        `dimension ${group.dimension}, rank ${group.rank}, ${dual} positive roots, Weyl group of order ${group.weylOrder}`,
        `coordinates $${found.coordinates.map(symbolLatex).join(',')}$`,
      ],
    };
  }
  return null;
}
