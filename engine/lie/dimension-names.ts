import { catalogue } from './enumeration';
import { allowsLabels, type Group } from './group';
import { dimension } from './invariants';
import { type Refusal, refusal } from './refusal';
import { typeName } from './simple-type';
import { conjugateLabels } from './weyl';
import { notInGlobalForm } from './words';

/**
 * Names that the dimension alone does not fix. Primes, and which member of a conjugate pair goes without bar, follow
 * Slansky, Phys. Rept. 79 (1981) 1, as far as such names are listed here; E6: Lambda^2 27 and the top part of Sym^2 27
 * are the unbarred 351 and 351'. Spin(8): 8s has an even number of minus signs.
 */
const TABLE: Readonly<Record<string, Readonly<Record<string, readonly number[]>>>> = {
  A2: { '3': [1, 0], '6': [2, 0], '10': [3, 0], '15': [2, 1], "15'": [4, 0] },
  A3: { '4': [1, 0, 0], '10': [2, 0, 0], '20': [0, 1, 1], "20'": [0, 2, 0], "20''": [0, 0, 3] },
  C3: { '14': [0, 1, 0], "14'": [0, 0, 1] },
  D4: { '8v': [1, 0, 0, 0], '8s': [0, 0, 0, 1], '8c': [0, 0, 1, 0] },
  D5: { '16': [0, 0, 0, 0, 1], '126': [0, 0, 0, 0, 2] },
  E6: { '27': [1, 0, 0, 0, 0, 0], '351': [0, 0, 1, 0, 0, 0], "351'": [2, 0, 0, 0, 0, 0] },
};

/** Dimension names above this are refused: such representations have too many neighbours to be told apart by size. */
const LARGEST_NAMED = 1_000_000;

export interface IrrepName {
  /** Dimension with primes and v, s, c where the table has them: `27`, `15'`, `8s`. */
  readonly base: string;
  readonly bar: boolean;
}

/** For SU(n), n > 2, the two-index tensors: unbarred when their indices are those of the fundamental. */
function tableOf(group: Group): ReadonlyMap<string, readonly number[]> {
  const table = new Map<string, readonly number[]>();
  if (group.simple.length !== 1) return table;
  const [type] = group.simple;
  if (!type) return table;
  if (type.series === 'A' && type.rank > 1) {
    const n = type.rank + 1;
    const at = (node: number, label: number): number[] =>
      Array.from({ length: type.rank }, (_, i) => (i === node ? label : 0));
    table.set(`${n}`, at(0, 1));
    table.set(`${(n * (n + 1)) / 2}`, at(0, 2));
    // Lambda^2 of SU(3) is 3bar; of SU(4) it is real.
    if (n > 4) table.set(`${(n * (n - 1)) / 2}`, at(1, 1));
  }
  for (const [name, labels] of Object.entries(TABLE[typeName(type)] ?? {})) table.set(name, labels);
  return table;
}

/** Reads `27`, `3bar`, `15'`, `8s`: a dimension that one representation alone has, or a name of the table. */
export function dimensionLabels(group: Group, name: string): readonly number[] | Refusal {
  const match = /^(\d+)('*)([vsc]?)(bar)?('*)$/.exec(name);
  const size = Number(match?.[1]);
  if (!match || size === 0 || (match[2] && match[5])) {
    return refusal(
      'representation-syntax',
      `'${name}' is not a dimension name.`,
      "Examples: 27, 3bar, 15', 8s.",
      'Write Dynkin labels.',
    );
  }
  const primes = `${match[2]}${match[5]}`;
  const base = `${size}${primes}${match[3]}`;
  const conjugate = match[4] !== undefined;
  const listed = tableOf(group).get(base);
  if (listed) return finish(group, name, listed, conjugate);
  if (primes !== '' || match[3] !== '') {
    const what = `'${name}' is not in the table of names of ${group.name}.`;
    return refusal(
      'representation-unknown',
      what,
      'Primes and v, s, c are read from a finite table only.',
      'Write Dynkin labels.',
    );
  }
  return searchDimension(group, name, size, conjugate);
}

function searchDimension(group: Group, name: string, size: number, conjugate: boolean): readonly number[] | Refusal {
  const candidates = size > LARGEST_NAMED ? null : withDimension(group, size);
  if (!candidates) {
    const why = `Dimension names are looked up to ${LARGEST_NAMED} only, in a limited list.`;
    return refusal(
      'representation-unknown',
      `'${name}' cannot be looked up for ${group.name}.`,
      why,
      'Write Dynkin labels.',
    );
  }
  const allowed = candidates.filter((labels) => allowsLabels(group, labels));
  const [first, second] = allowed;
  if (!first) {
    if (candidates.length > 0) return notInGlobalForm(group, name);
    const what = `${group.name} has no irreducible representation of dimension ${size}.`;
    return refusal(
      'representation-absent',
      what,
      'All its dimensions were compared.',
      'Write a word or Dynkin labels.',
    );
  }
  if (!second) return finish(group, name, first, conjugate);
  const list = allowed.map((labels) => `[${labels.join()}]`).join(', ');
  const what = `'${name}' does not say which representation of ${group.name} is meant.`;
  return refusal(
    'representation-ambiguous',
    what,
    `Dimension ${size} is shared by ${list}.`,
    'Write the Dynkin labels.',
  );
}

function finish(
  group: Group,
  name: string,
  labels: readonly number[],
  conjugate: boolean,
): readonly number[] | Refusal {
  if (!allowsLabels(group, labels)) return notInGlobalForm(group, name);
  const other = conjugateLabels(group.system, labels);
  if (!conjugate) return labels;
  if (other.join() !== labels.join()) return other;
  const what = `'${name}' is not used: the representation is its own conjugate.`;
  return refusal(
    'representation-absent',
    what,
    'Only complex representations have a barred partner.',
    'Leave the bar out.',
  );
}

/** Null when the list of smaller representations would be too long. */
function withDimension(group: Group, size: number): readonly (readonly number[])[] | null {
  if (group.system.rank === 1) return [[size - 1]];
  const list = catalogue(group.system, size);
  return list && (list.bySize.get(size) ?? []);
}

/** The name of an irreducible representation, where one exists that dimensionLabels would read back. */
export function irrepName(group: Group, labels: readonly number[]): IrrepName | null {
  const size = dimension(group.system, labels);
  const key = labels.join();
  const conjugateKey = conjugateLabels(group.system, labels).join();
  for (const [base, listed] of tableOf(group)) {
    if (listed.join() === key) return { base, bar: false };
    if (listed.join() === conjugateKey) return { base, bar: true };
  }
  if (size > BigInt(LARGEST_NAMED) || tableOf(group).has(`${size}`)) return null;
  const same = withDimension(group, Number(size));
  return same?.length === 1 ? { base: `${size}`, bar: false } : null;
}
