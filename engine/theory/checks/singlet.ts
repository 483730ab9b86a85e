import { Rational } from '../../exact/rational';
import type { Group } from '../../lie/group';
import { dimension } from '../../lie/invariants';
import type { Representation } from '../../lie/representation';
import { tensorPower, tensorProduct } from '../../lie/tensor-product';
import { conjugateTerms, type Term } from '../../lie/terms';

/** Additions of weights one question may take: a fraction of a millisecond. */
const ADDITIONS = 20_000;
/** Powers above this are not expanded. */
const POWER_LIMIT = 8;

export type Answer = 'yes' | 'no' | 'too large';

/** A field of a monomial: its representations, one a group, and its power. */
export interface MonomialField {
  readonly representations: readonly Representation[];
  readonly power: number;
  /** A hyper's name stands for either of its two chirals. */
  readonly withDual: boolean;
}

export interface SingletAnswer {
  /** `symmetry unknown`: there are singlets, but perhaps not symmetric ones among equal fields. */
  readonly answer: Answer | 'symmetry unknown';
  /** Where the answer is no: the groups that have no singlet, for the choice that comes closest. */
  readonly missing: readonly number[];
}

/** Terms a group, for one way to combine the copies of a field; exact unless symmetries among the copies were dropped. */
interface Piece {
  readonly terms: readonly (readonly Term[])[];
  readonly exact: boolean;
}

/**
 * Whether a product of bosonic fields contains a singlet of all groups. The copies of one field are symmetrised; where
 * more than two copies transform under several non-abelian groups, that is not done, and a yes stays open.
 */
export function containsSinglet(groups: readonly Group[], fields: readonly MonomialField[]): SingletAnswer {
  const names = fields.map(
    ({ representations, power, withDual }) =>
      `${power}${withDual ? '+' : ''} ${representations.map(({ key }) => key).join(' | ')}`,
  );
  const key = `${groups.map(({ name }) => name).join()}: ${names.join(' ; ')}`;
  const known = singlets.get(key);
  if (known) return known;
  const found = findSinglets(groups, fields);
  if (singlets.size >= ANSWERS_KEPT) singlets.clear();
  singlets.set(key, found);
  return found;
}

// Pure memoisation, by groups and fields.
const singlets = new Map<string, SingletAnswer>();

function findSinglets(groups: readonly Group[], fields: readonly MonomialField[]): SingletAnswer {
  if (fields.some(({ power }) => power > POWER_LIMIT)) return { answer: 'too large', missing: [] };
  const choices = fields.map((field) => piecesOf(groups, field));
  if (choices.includes(null)) return { answer: 'too large', missing: [] };
  let closest: readonly number[] | null = null;
  let undecided: SingletAnswer['answer'] | null = null;
  for (const pieces of products(choices as (readonly Piece[])[])) {
    const answers = groups.map((group, index) =>
      productHasSinglet(
        group,
        pieces.map(({ terms }) => terms[index] as readonly Term[]),
      ),
    );
    const missing = answers.flatMap((answer, index) => (answer === 'no' ? [index] : []));
    if (missing.length > 0) {
      if (closest === null || missing.length < closest.length) closest = missing;
    } else if (answers.includes('too large')) undecided = 'too large';
    else if (pieces.some(({ exact }) => !exact)) undecided ??= 'symmetry unknown';
    else return { answer: 'yes', missing: [] };
  }
  return undecided ? { answer: undecided, missing: [] } : { answer: 'no', missing: closest ?? [] };
}

/** The ways to choose one piece of every field. */
function products(choices: readonly (readonly Piece[])[]): Piece[][] {
  return choices.reduce<Piece[][]>(
    (sofar, pieces) => sofar.flatMap((start) => pieces.map((piece) => [...start, piece])),
    [[]],
  );
}

/** Null when a power is too large to decompose. */
function piecesOf(groups: readonly Group[], field: MonomialField): readonly Piece[] | null {
  const { representations, power, withDual } = field;
  const terms = representations.map(({ irreps }) => irreps);
  if (!withDual) return powers(groups, terms, power);
  const dual = terms.map((irreps, index) => conjugateTerms(groups[index] as Group, irreps));
  const pieces: Piece[] = [];
  for (let k = 0; k <= power; k++) {
    const first = powers(groups, terms, k);
    const second = powers(groups, dual, power - k);
    if (first === null || second === null) return null;
    for (const a of first) {
      for (const b of second) {
        const joined = groups.map((group, index) => multiply(group, [a.terms[index] ?? [], b.terms[index] ?? []]));
        if (joined.includes(null)) return null;
        pieces.push({ terms: joined as (readonly Term[])[], exact: a.exact && b.exact });
      }
    }
  }
  return pieces;
}

/**
 * The symmetric power of a product of representations of different groups. Where one group alone acts on more than a
 * line it is the symmetric power there; the square of several is a sum over even numbers of antisymmetric squares.
 */
function powers(groups: readonly Group[], terms: readonly (readonly Term[])[], power: number): readonly Piece[] | null {
  if (power === 1) return [{ terms, exact: true }];
  const acting = terms.flatMap((irreps, index) => (size(groups[index] as Group, irreps) > 1n ? [index] : []));
  const symmetric = acting.length <= 1;
  const patterns = !symmetric && power === 2 ? evenPatterns(acting.length) : [0];
  const exact = symmetric || power <= 2;
  const pieces: Piece[] = [];
  for (const pattern of patterns) {
    const parts = groups.map((group, index) => {
      const irreps = terms[index] as readonly Term[];
      const place = acting.indexOf(index);
      if (place < 0 || exact) {
        const kind = place >= 0 && (pattern >> place) & 1 ? 'alt' : 'sym';
        const result = tensorPower(group, kind, power, irreps, { left: ADDITIONS });
        return 'kind' in result ? null : result;
      }
      return multiply(group, new Array<readonly Term[]>(power).fill(irreps));
    });
    if (parts.includes(null)) return null;
    pieces.push({ terms: parts as (readonly Term[])[], exact });
  }
  return pieces;
}

/** Bit patterns of a given length with an even number of ones. */
function evenPatterns(length: number): number[] {
  return Array.from({ length: 1 << length }, (_, pattern) => pattern).filter((pattern) => {
    let ones = 0;
    for (let rest = pattern; rest > 0; rest >>= 1) ones += rest & 1;
    return ones % 2 === 0;
  });
}

function size(group: Group, terms: readonly Term[]): bigint {
  return terms.reduce(
    (sum, { labels, multiplicity }) => sum + BigInt(multiplicity) * dimension(group.system, labels),
    0n,
  );
}

function multiply(group: Group, factors: readonly (readonly Term[])[]): readonly Term[] | null {
  let product: readonly Term[] | null = null;
  for (const factor of factors) {
    if (product === null) {
      product = factor;
      continue;
    }
    const result: ReturnType<typeof tensorProduct> = tensorProduct(group, product, factor, { left: ADDITIONS });
    if ('kind' in result) return null;
    product = result;
  }
  return product ?? [];
}

// Pure memoisation by group and factors.
const answers = new WeakMap<Group, Map<string, Answer>>();
const ANSWERS_KEPT = 2000;

/** The largest factor is compared with the dual of the product of the others, which saves the largest product. */
export function productHasSinglet(group: Group, factors: readonly (readonly Term[])[]): Answer {
  let kept = answers.get(group);
  if (!kept) {
    kept = new Map();
    answers.set(group, kept);
  }
  const key = factors.map(termsKey).sort().join(' x ');
  const known = kept.get(key);
  if (known !== undefined) return known;
  const answer = findSinglet(group, factors);
  if (kept.size >= ANSWERS_KEPT) kept.clear();
  kept.set(key, answer);
  return answer;
}

function termsKey(terms: readonly Term[]): string {
  return terms.map((term) => `${term.multiplicity}*${termKey(term)}`).join('+');
}

function termKey({ labels, charge }: Term): string {
  return `${labels.join()};${charge}`;
}

function findSinglet(group: Group, factors: readonly (readonly Term[])[]): Answer {
  const ordered = factors
    .map((terms) => ({ terms, size: size(group, terms) }))
    .filter(({ terms }) => !isTrivial(terms))
    .sort((a, b) => (a.size < b.size ? 1 : a.size > b.size ? -1 : 0))
    .map(({ terms }) => terms);
  const [largest, ...others] = ordered;
  if (largest === undefined) return 'yes';
  if (others.length === 0) return largest.some(isSinglet) ? 'yes' : 'no';
  if (!classesCancel(group, ordered)) return 'no';
  const rest = multiply(group, others);
  if (rest === null) return 'too large';
  const wanted = new Set(conjugateTerms(group, largest).map(termKey));
  return rest.some((term) => wanted.has(termKey(term))) ? 'yes' : 'no';
}

function isSinglet({ labels, charge }: Term): boolean {
  return charge.isZero() && labels.every((label) => label === 0);
}

/** One singlet and nothing else. */
function isTrivial(terms: readonly Term[]): boolean {
  return terms.length === 1 && isSinglet(terms[0] as Term);
}

/** For irreducible factors: charges and centre classes add up to zero, without which there is no singlet. */
function classesCancel(group: Group, factors: readonly (readonly Term[])[]): boolean {
  if (factors.some((terms) => terms.length > 1)) return true;
  const irreps = factors.map((terms) => terms[0] as Term);
  const charge = irreps.reduce((sum, term) => sum.add(term.charge), Rational.zero);
  if (!charge.isZero()) return false;
  return group.system.centre.every(({ modulus, coefficients }) => {
    const total = irreps.reduce(
      (sum, { labels }) => sum + labels.reduce((part, label, i) => part + label * (coefficients[i] as number), 0),
      0,
    );
    return total % modulus === 0;
  });
}
