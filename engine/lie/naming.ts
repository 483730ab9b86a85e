import { type IrrepName, irrepName } from './dimension-names';
import type { Group } from './group';
import { weightKey } from './orbit';
import { type Term, trivialTerm, unitaryTerm, unitaryWeight } from './terms';
import { wordTerms } from './words';

/** What an irreducible representation may be called; null where it has no such name. */
export interface NameOfIrrep {
  /** `1`, `fund`, `anti`, `vector`, `spinor`, `cospinor`, `adj`, `sym3`, `alt2`, `det`, or the charge of a U(1). */
  readonly word: string | null;
  /** Its dimension, where that tells it apart, with primes or v, s, c where the table has them; never for U(n). */
  readonly dimension: IrrepName | null;
  /** A cell of the charge table that reads back as this representation. */
  readonly cell: string;
}

/** Row and column tensors are looked for up to this many boxes. */
const BOXES_NAMED = 12;

// Pure memoisation: words of a group by key of the highest weight.
const words = new WeakMap<Group, ReadonlyMap<string, string>>();

function wordsOf(group: Group): ReadonlyMap<string, string> {
  const known = words.get(group);
  if (known) return known;
  const first = group.family === 'SO' || group.family === 'Spin' ? 'vector' : 'fund';
  const boxes = Array.from({ length: BOXES_NAMED - 1 }, (_, k) => k + 2);
  const candidates = [
    ...[first, 'anti', 'adj', 'spinor', 'cospinor', 'det'],
    ...boxes.flatMap((k) => [`alt${k}`, `sym${k}`]),
  ];
  const found = new Map<string, string>([[weightKey(trivialTerm(group).labels, trivialTerm(group).charge), '1']]);
  for (const word of candidates) {
    const terms = wordTerms(group, word);
    if ('kind' in terms || terms.length !== 1) continue;
    const [only] = terms as [Term];
    const key = weightKey(only.labels, only.charge);
    if (!found.has(key)) found.set(key, word);
  }
  words.set(group, found);
  return found;
}

export function nameOfIrrep(group: Group, irrep: Term): NameOfIrrep {
  if (group.isAbelian) {
    const charge = irrep.charge.toString();
    return { word: charge, dimension: null, cell: charge };
  }
  const word = wordsOf(group).get(weightKey(irrep.labels, irrep.charge)) ?? determinantWord(group, irrep);
  if (group.family === 'U') {
    return { word, dimension: null, cell: word ?? `(${unitaryWeight(irrep).join()})` };
  }
  return { word, dimension: irrepName(group, irrep.labels), cell: word ?? `[${irrep.labels.join()}]` };
}

function determinantWord(group: Group, irrep: Term): string | null {
  if (group.family !== 'U' || irrep.labels.some((label) => label !== 0)) return null;
  const [power] = unitaryWeight(irrep);
  const determinant = unitaryTerm(new Array<number>(group.size as number).fill(power as number));
  return determinant.charge.equals(irrep.charge) ? `det^${power}` : null;
}

/**
 * Rows of the Young diagram, without empty ones: of a polynomial representation of U(n), of SU(n), of the traceless
 * tensors of USp(2n), SO(n), Spin(n). Null for spinors, for tensors of SO(2n) with a negative last entry, for mixed
 * tensors of U(n), for exceptional groups and U(1).
 */
export function youngRows(group: Group, irrep: Term): number[] | null {
  if (group.isAbelian || group.size === null) return null;
  const entries = group.family === 'U' ? unitaryWeight(irrep) : highestWeightEntries(group, irrep.labels);
  if (entries.some((entry) => entry < 0 || !Number.isInteger(entry))) return null;
  return entries.filter((entry) => entry > 0);
}

/** The highest weight in printed coordinates, the last one of SU(n) zero. */
function highestWeightEntries(group: Group, labels: readonly number[]): number[] {
  const { denominator, rows } = group.weightMap;
  return Array.from(
    { length: group.coordinateCount },
    (_, i) =>
      labels.reduce((sum, label, k) => sum + label * ((rows[k] as readonly number[])[i] as number), 0) / denominator,
  );
}
