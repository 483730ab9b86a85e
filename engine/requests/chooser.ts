import { irrepLatex, representationLatex } from '../latex/representation';
import { choices } from '../lie/chooser';
import { type Group, parseGroup } from '../lie/group';
import { youngRows } from '../lie/naming';
import { parseRepresentation, Representation } from '../lie/representation';

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

/** Cells of U(n) that are written most, in front of the others; determinant powers of their own come after them. */
const COMMON_UNITARY = ['1', 'fund', 'anti', 'adj', 'det', 'det^-1', 'alt2', 'alt2*', 'sym2', 'sym2*'];

/**
 * Representations of a group up to a dimension, irreducible ones but for the adjoint of U(n), the smallest first, for
 * U(n) the common ones first; empty for an unknown group or where there are too many.
 */
export function representationChoices(groupName: string, limit: number): readonly RepresentationChoice[] {
  const read = parseGroup(groupName);
  if (read.kind === 'refusal') return [];
  const { group } = read;
  const common = group.family === 'U' && !group.isAbelian ? commonChoices(group, limit) : [];
  const known = new Set(common.map(({ key }) => key));
  const others = (choices(group, limit) ?? []).flatMap((choice) => {
    const irrep = { labels: choice.labels, charge: choice.charge, multiplicity: 1 };
    if (known.has(new Representation(group, [irrep]).key)) return [];
    return {
      word: choice.cell,
      latex: irrepLatex(group, irrep),
      dimension: `${choice.dimension}`,
      index: choice.index?.toString() ?? '',
      reality: choice.reality,
      labels: choice.labels,
      young: choice.rows,
    };
  });
  return [...common.map(({ choice }) => choice), ...others];
}

function commonChoices(group: Group, limit: number): { key: string; choice: RepresentationChoice }[] {
  const found = new Map<string, RepresentationChoice>();
  for (const word of COMMON_UNITARY) {
    const read = parseRepresentation(group, word);
    if (read.kind === 'refusal') continue;
    const { representation } = read;
    const [first] = representation.irreps;
    if (first === undefined || representation.dimension > BigInt(limit) || found.has(representation.key)) continue;
    found.set(representation.key, {
      word,
      latex: representationLatex(representation),
      dimension: `${representation.dimension}`,
      index: representation.index?.toString() ?? '',
      reality: representation.reality,
      labels: first.labels,
      young: representation.isIrreducible ? youngRows(group, first) : null,
    });
  }
  return [...found].map(([key, choice]) => ({ key, choice }));
}
