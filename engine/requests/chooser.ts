import { irrepLatex } from '../latex/representation';
import { choices } from '../lie/chooser';
import { parseGroup } from '../lie/group';

/** One line of the list that a representation is chosen from. */
export interface RepresentationChoice {
  /** What is written into the cell. */
  readonly word: string;
  readonly latex: string;
  readonly dimension: string;
  readonly index: string;
  readonly reality: string;
  readonly labels: readonly number[];
  /** Rows of the Young diagram, longest first; null where there is none. */
  readonly young: readonly number[] | null;
}

/** Irreducible representations of a group up to a dimension; empty for an unknown group or where there are too many. */
export function representationChoices(groupName: string, limit: number): readonly RepresentationChoice[] {
  const read = parseGroup(groupName);
  if (read.kind === 'refusal') return [];
  const { group } = read;
  return (choices(group, limit) ?? []).map((choice) => ({
    word: choice.cell,
    latex: irrepLatex(group, { labels: choice.labels, charge: choice.charge, multiplicity: 1 }),
    dimension: `${choice.dimension}`,
    index: choice.index?.toString() ?? '',
    reality: choice.reality,
    labels: choice.labels,
    young: choice.rows,
  }));
}
