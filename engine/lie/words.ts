import { Rational } from '../exact/rational';
import { allowsLabels, type Group, labelsOf } from './group';
import { type Refusal, refusal } from './refusal';
import { rootSystem } from './root-system';
import { type Term, term, trivialTerm, unitaryTerm } from './terms';

const EXCEPTIONAL_FUNDAMENTAL: Readonly<Record<string, readonly number[]>> = {
  G2: [1, 0],
  F4: [0, 0, 0, 1],
  E6: [1, 0, 0, 0, 0, 0],
  E7: [0, 0, 0, 0, 0, 0, 1],
  E8: [0, 0, 0, 0, 0, 0, 0, 1],
};

/** Words that may stand in a cell, for messages. */
export function wordsFor(group: Group): readonly string[] {
  if (group.isAbelian) return [];
  switch (group.family) {
    case 'U':
      return ['fund', 'anti', 'adj', 'sym2', 'alt2', 'det'];
    case 'SU':
      return ['fund', 'anti', 'adj', 'sym2', 'alt2'];
    case 'USp':
      return group.size === 2 ? ['fund', 'adj', 'sym2'] : ['fund', 'adj', 'sym2', 'alt2'];
    case 'SO':
      return ['vector', 'adj', 'sym2', 'alt2'];
    case 'Spin':
      return (group.size as number) % 2 === 0 ? ['vector', 'spinor', 'cospinor', 'adj'] : ['vector', 'spinor', 'adj'];
    case 'E6':
      return ['fund', 'anti', 'adj'];
    default:
      return ['fund', 'adj'];
  }
}

/**
 * The representation a word stands for: fund, anti, adj, vector, spinor, cospinor, sym2, sym3, .., alt2, .., det.
 * Words mean irreducible representations (alt2 of USp(2n) and sym2 of SO(n) are traceless), except adj of U(n), which
 * is the whole adjoint, and adj of SO(4) and Spin(4), whose algebra has two simple parts. Powers count boxes of the
 * representation `fund`; a charge of U(1) stands for itself, and there fund, anti, adj are the charges 1, -1, 0.
 */
export function wordTerms(group: Group, word: string): readonly Term[] | Refusal {
  const power = /^(sym|alt)(\d{1,4})$/.exec(word);
  if (power) return powerTerms(group, word, power[1] as 'sym' | 'alt', Number(power[2]));
  switch (word) {
    case 'fund':
      return fundamental(group);
    case 'anti':
      return antifundamental(group);
    case 'adj':
      return adjoint(group);
    case 'det':
      if (group.family === 'U') return [unitaryTerm(new Array<number>(group.size as number).fill(1))];
      return absent(group, word, 'Only U(n) has a determinant that is not trivial.');
    case 'vector':
      if (group.family === 'SO' || group.family === 'Spin') return fundamental(group);
      return absent(group, word, 'The word belongs to SO(n) and Spin(n).');
    case 'spinor':
    case 'cospinor':
      return spinor(group, word);
    default: {
      const what = `'${word}' is not a representation of ${group.name}.`;
      return refusal('representation-unknown', what, 'The word is not known here.', remedyFor(group));
    }
  }
}

function remedyFor(group: Group): string {
  if (group.isAbelian) return 'Write a charge, an exact number.';
  const other = group.family === 'U' ? 'a highest weight such as (2,1,0)' : 'Dynkin labels in square brackets';
  return `Write ${wordsFor(group).join(', ')}, or ${other}.`;
}

function absent(group: Group, word: string, why: string, remedy = remedyFor(group)): Refusal {
  return refusal('representation-absent', `${group.name} has no representation '${word}'.`, why, remedy);
}

function fromVector(group: Group, entries: readonly Rational[]): Term {
  return term(labelsOf(group, entries).map((label) => Number(label.numerator)));
}

/** c (e_1 + .. + e_k) in the coordinates of SO(n), Spin(n), USp(2n). */
function coordinateTerm(group: Group, count: number, coefficient: number): Term {
  const entry = (i: number): Rational => (i < count ? Rational.of(coefficient) : Rational.zero);
  return fromVector(
    group,
    Array.from({ length: group.coordinateCount }, (_, i) => entry(i)),
  );
}

function fundamental(group: Group): readonly Term[] {
  if (group.isAbelian) return [term([], Rational.one)];
  const labels = EXCEPTIONAL_FUNDAMENTAL[group.family];
  if (labels) return [term(labels)];
  return boxes(group, 'sym', 1);
}

function antifundamental(group: Group): readonly Term[] | Refusal {
  if (group.isAbelian) return [term([], Rational.of(-1))];
  if (group.family === 'U') {
    return [
      unitaryTerm(Array.from({ length: group.coordinateCount }, (_, i) => (i === group.coordinateCount - 1 ? -1 : 0))),
    ];
  }
  if (group.family === 'SU') return [term(group.system.rho.map((_, i) => (i === group.system.rank - 1 ? 1 : 0)))];
  if (group.family === 'E6') return [term([0, 0, 0, 0, 0, 1])];
  const real = group.family === 'USp' || group.family === 'E7' ? 'pseudoreal' : 'real';
  return absent(group, 'anti', `Its fundamental is ${real}, equal to its own conjugate.`, 'Write fund.');
}

function adjoint(group: Group): readonly Term[] {
  if (group.isAbelian) return [term([])];
  let start = 0;
  const roots = group.simple.map((type) => {
    const highest = rootSystem(type).highestRoot;
    const labels = group.system.rho.map((_, i) => highest[i - start] ?? 0);
    start += type.rank;
    return term(labels);
  });
  return group.abelianRank === 1 ? [...roots, trivialTerm(group)] : roots;
}

function spinor(group: Group, word: 'spinor' | 'cospinor'): readonly Term[] | Refusal {
  if (group.isAbelian || (group.family !== 'SO' && group.family !== 'Spin')) {
    return absent(group, word, 'The word belongs to Spin(n).');
  }
  const dimension = group.size as number;
  if (group.family === 'SO') return notInGlobalForm(group, word);
  if (word === 'cospinor' && dimension % 2 === 1) {
    return absent(group, word, `Spin(${dimension}) has a single spinor representation.`, 'Write spinor.');
  }
  const half = Rational.of(1, 2);
  const last = group.coordinateCount - 1;
  const entries = Array.from({ length: last + 1 }, (_, i) => (i === last && word === 'cospinor' ? half.neg() : half));
  return [fromVector(group, entries)];
}

export function notInGlobalForm(group: Group, name: string): Refusal {
  const what = `'${name}' is not a representation of ${group.name}.`;
  if (group.quotient !== null) {
    const { order, cover } = group.quotient;
    const reason = `The subgroup Z${order} of the centre of ${cover} acts on it.`;
    return refusal('global-form', what, reason, `Take ${cover} instead, or a representation such as adj.`);
  }
  const why = 'It changes sign under a full rotation, so that only the simply connected cover represents it.';
  return refusal('global-form', what, why, `Take the group Spin(${group.size}) instead.`);
}

function powerTerms(group: Group, word: string, kind: 'sym' | 'alt', power: number): readonly Term[] | Refusal {
  if (group.isAbelian) return absent(group, word, 'Representations of U(1) are charges.');
  if (EXCEPTIONAL_FUNDAMENTAL[group.family]) {
    const instead = `Write ${kind}^${power}(fund) for the whole power, or Dynkin labels.`;
    return absent(group, word, 'Boxes do not name irreducible representations of an exceptional group.', instead);
  }
  if (power === 0) return [trivialTerm(group)];
  const size = group.size as number;
  if (kind === 'sym') return boxes(group, kind, power);
  if (group.family === 'USp') {
    if (power <= size / 2) return boxes(group, kind, power);
    return absent(group, word, `Traceless antisymmetric tensors of ${group.name} have at most ${size / 2} indices.`);
  }
  if (power > size) return absent(group, word, `An antisymmetric tensor of ${group.name} has at most ${size} indices.`);
  if (group.family === 'U' || group.family === 'SU') return boxes(group, kind, power);
  const fewest = Math.min(power, size - power);
  if (2 * fewest < size) return fewest === 0 ? [trivialTerm(group)] : boxes(group, kind, fewest);
  const dual = coordinateTerm(group, fewest, 1);
  const entries = Array.from({ length: fewest }, (_, i) => Rational.of(i === fewest - 1 ? -1 : 1));
  const other = fromVector(group, entries);
  const what = `'${word}' of ${group.name} is reducible.`;
  const why = 'It is the sum of self-dual and anti-self-dual tensors.';
  const remedy = `Write [${dual.labels.join()}] or [${other.labels.join()}], or their sum.`;
  return refusal('representation-reducible', what, why, remedy);
}

/** Irreducible tensors with `power` boxes in one row (sym) or one column (alt), where they are irreducible. */
function boxes(group: Group, kind: 'sym' | 'alt', power: number): readonly Term[] {
  const [rows, entry] = kind === 'sym' ? [1, power] : [power, 1];
  if (group.family === 'U') {
    return [unitaryTerm(Array.from({ length: group.coordinateCount }, (_, i) => (i < rows ? entry : 0)))];
  }
  if (group.family === 'SU') return [term(group.system.rho.map((_, i) => (i === rows - 1 ? entry : 0)))];
  return [coordinateTerm(group, rows, entry)];
}

/** Null when the group represents the labels, else why not. */
export function globalFormRefusal(group: Group, labels: readonly number[]): Refusal | null {
  return allowsLabels(group, labels) ? null : notInGlobalForm(group, `[${labels.join()}]`);
}
