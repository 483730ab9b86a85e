import { Rational } from '../exact/rational';
import type { IrrepName } from './dimension-names';
import { catalogue } from './enumeration';
import { allowsLabels, type Group } from './group';
import { dimension } from './invariants';
import { nameOfIrrep, youngRows } from './naming';
import { Representation, type RepresentationReality } from './representation';
import { byDimension } from './tensor-product';
import { type Term, term, unitaryTerm } from './terms';

/** One row of the list from which a representation may be chosen. */
export interface Choice {
  /** The cell of the charge table that means it. */
  readonly cell: string;
  readonly word: string | null;
  readonly name: IrrepName | null;
  /** Dynkin labels; empty for U(1). */
  readonly labels: readonly number[];
  readonly charge: Rational;
  readonly dimension: bigint;
  /** Second-order index I2, null where the two parts of SO(4) differ; the squared charge for U(1). */
  readonly index: Rational | null;
  readonly reality: RepresentationReality;
  /** Rows of the Young diagram, where it has one. */
  readonly rows: readonly number[] | null;
}

/** Charges offered for U(1): from minus this to this. */
const CHARGES_OFFERED = 6;

/**
 * Irreducible representations up to a dimension, the smallest first. Those of U(n) are offered with the determinant
 * power that leaves the entries of the highest weight smallest, and for U(1) small integer charges. Null when the list
 * would be too long.
 */
export function choices(group: Group, largestDimension: number): readonly Choice[] | null {
  const terms = candidates(group, largestDimension);
  return (
    terms &&
    byDimension(group, terms)
      .reverse()
      .map((irrep) => choice(group, irrep))
  );
}

function candidates(group: Group, largestDimension: number): Term[] | null {
  if (group.isAbelian) {
    return Array.from({ length: 2 * CHARGES_OFFERED + 1 }, (_, i) => term([], Rational.of(i - CHARGES_OFFERED)));
  }
  const list = catalogue(group.system, largestDimension);
  if (!list) return null;
  const labels = [...list.bySize].flatMap(([size, same]) => (size <= largestDimension ? same : []));
  if (group.family === 'U') return labels.map((one) => centred(one));
  return labels.filter((one) => allowsLabels(group, one)).map((one) => term(one));
}

/** The highest weight of U(n) with given differences and the smallest absolute sum: its middle entry is zero. */
function centred(labels: readonly number[]): Term {
  const entries = [0];
  for (const label of labels.toReversed()) entries.unshift((entries[0] as number) + label);
  // Of two middle entries the larger index is taken, which makes columns polynomial: (1,0), (1,1,0,0).
  const middle = entries[Math.floor(entries.length / 2)] as number;
  return unitaryTerm(entries.map((entry) => entry - middle));
}

function choice(group: Group, irrep: Term): Choice {
  const representation = new Representation(group, [irrep]);
  const name = nameOfIrrep(group, irrep);
  return {
    cell: name.cell,
    word: name.word,
    name: name.dimension,
    labels: irrep.labels,
    charge: irrep.charge,
    dimension: dimension(group.system, irrep.labels),
    index: representation.index,
    reality: representation.reality,
    rows: youngRows(group, irrep),
  };
}
