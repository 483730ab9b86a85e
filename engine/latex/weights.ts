import { Form } from '../exact/form';
import {
  expandPattern,
  type IndexPattern,
  type PatternRelation,
  type PatternTerm,
  type WeightVectors,
} from '../lie/index-pattern';
import type { Weight } from '../product/factor';
import type { TheoryGroup } from '../theory/theory';
import { type TheoryWeights, weightForms } from '../theory/weights';
import { EITHER_SIGN } from './form';
import { placedName, symbolLatex, TRACE } from './symbol';

/** A product over weights as it is printed: the product signs, and the weight they run over. */
export interface PrintedWeights {
  /** `\prod_{a=1}^{2}\prod_{j=1}^{3}`; empty where there is no index. */
  readonly indices: string;
  /** `\prod_{\pm}` where signs are chosen; it stands for all signs under it, whatever they belong to. */
  readonly choices: string;
  /** w.sigma + w.m with indexed coordinates, as a form in symbols made for printing. */
  readonly weight: Form;
  /** w.n with indexed fluxes. */
  readonly flux: Form;
  /** Number of weights, and the weights themselves in the coordinates. */
  readonly size: number;
  /** Those from the number `from` up to, without, `to`; all where nothing is said. */
  readonly weights: (from?: number, to?: number) => readonly Weight[];
}

/** The weight where there is none: one factor without product sign. */
export const NO_WEIGHT: PrintedWeights = {
  indices: '',
  choices: '',
  weight: Form.zero,
  flux: Form.zero,
  size: 1,
  weights: (from = 0, to = 1) => (from < 1 && to > 0 ? [{ position: Form.zero, flux: Form.zero }] : []),
};

/**
 * Index letters, a different run for each group: i is left to the imaginary unit, b to the squashing, e to exponentials,
 * r to R-charges, and letters that name masses and integers in these formulas (m, n, k) do not occur.
 */
const LETTERS: readonly string[] = ['acdfghxy', 'jlpqsuvw', 'ABCDEFGH', 'JKLMNPQR', 'STUVWXYZ'];

/** How each choice of index patterns of a set is printed; several for exceptional groups. */
export function printWeights(
  groups: readonly TheoryGroup[],
  weights: TheoryWeights,
  half: boolean,
): readonly PrintedWeights[] {
  let printed: PrintedWeights[] = [NO_WEIGHT];
  const parts = weights.parts.map(({ group, orbit }, k) => ({
    group,
    patterns: half && k === 0 ? orbit.halfPatterns() : orbit.patterns(),
  }));
  const signed = parts.map(({ patterns }) => patterns.some(({ signs }) => signs !== 'none'));
  const letters = freeLetters(groups);
  parts.forEach(({ group, patterns }, k) => {
    // Beside other signs those of which only some choices occur need names: `\pm` would not say which are bound.
    const beside = signed.some((other, j) => other && j !== k);
    printed = printed.flatMap((before) =>
      patterns.map((pattern) => {
        const bound = pattern.signs === 'even' || pattern.signs === 'odd';
        const part = printPattern(
          groups[group] as TheoryGroup,
          group,
          pattern,
          beside && bound ? (letters[k % letters.length] ?? null) : null,
        );
        return {
          indices: before.indices + part.indices,
          choices: joinChoices(before.choices, part.choices),
          weight: before.weight.add(part.weight),
          flux: before.flux.add(part.flux),
          size: before.size * part.size,
          weights: (from = 0, to = before.size * part.size) => sums(before, part, from, to),
        };
      }),
    );
  });
  return printed;
}

/** Letters for signs with names, those of coordinates left out. */
const SIGN_LETTERS: readonly string[] = ['epsilon', 'eta', 'kappa', 'iota', 'chi'];

function freeLetters(groups: readonly TheoryGroup[]): string[] {
  const taken = new Set(groups.flatMap((group) => [stemOf(group), fluxStem(group)]));
  return SIGN_LETTERS.filter((letter) => !taken.has(letter));
}

/** Sums of a weight of each part, those of the second part changing fastest. */
function sums(first: PrintedWeights, second: PrintedWeights, from: number, to: number): Weight[] {
  const found: Weight[] = [];
  const last = Math.min(to, first.size * second.size);
  for (let row = Math.floor(from / second.size); row * second.size < last; row++) {
    const [one] = first.weights(row, row + 1);
    const start = row * second.size;
    const others = second.weights(Math.max(0, from - start), Math.min(second.size, last - start));
    if (one !== undefined) found.push(...others.map((other) => sumOf(one, other)));
  }
  return found;
}

function sumOf(one: Weight, other: Weight): Weight {
  return { position: one.position.add(other.position), flux: one.flux.add(other.flux) };
}

function joinChoices(a: string, b: string): string {
  return a === b && a === PLUS_MINUS ? a : a + b;
}

const PLUS_MINUS = '\\prod_{\\pm}';

/** `sign`: the letter of its signs where they have names. */
function printPattern(group: TheoryGroup, place: number, pattern: IndexPattern, sign: string | null): PrintedWeights {
  const letters = LETTERS[place % LETTERS.length] as string;
  const letter = new Map(pattern.indices.map(({ name }, k) => [name, letters.charAt(k)]));
  // Listed when first asked for.
  let vectors: WeightVectors | null = null;
  const sum = (stem: string): Form =>
    Form.sum(
      pattern.terms.map((term, k) => {
        const symbol = termSymbol(group, place, term, letter, stem);
        const named = sign === null ? EITHER_SIGN : placedName(place, `${sign}${k + 1}`);
        const signed = term.sign === 'either' ? symbol.mul(Form.symbol(named)) : symbol;
        return signed.scale(term.coefficient);
      }),
    );
  return {
    indices: indexSigns(group, pattern, letter),
    choices: sign === null ? signChoices(pattern) : namedChoices(pattern, sign),
    weight: sum(stemOf(group)),
    flux: group.role === 'gauge' ? sum(fluxStem(group)) : Form.zero,
    size: pattern.size,
    weights: (from = 0, to = pattern.size) => {
      vectors ??= expandPattern(pattern, group.coordinates.length);
      const { width } = vectors;
      return weightForms(group, { ...vectors, vectors: vectors.vectors.subarray(from * width, to * width) });
    },
  };
}

/** sigma_a for an index, sigma_3 for a coordinate, tr sigma for the sum of all. */
function termSymbol(
  group: TheoryGroup,
  place: number,
  term: PatternTerm,
  letter: ReadonlyMap<string, string>,
  stem: string,
): Form {
  const symbol = (name: string): Form => Form.symbol(placedName(place, name));
  if (term.kind === 'index') return symbol(`${stem}_${letter.get(term.index) ?? term.index}`);
  const numbered = (k: number): string => (group.coordinates.length === 1 ? stem : `${stem}${k + 1}`);
  if (term.kind === 'coordinate') return symbol(numbered(term.coordinate));
  if (term.range === group.coordinates.length) return symbol(`${TRACE}${stem}`);
  return Form.sum(Array.from({ length: term.range }, (_, k) => symbol(numbered(term.offset + k))));
}

/** The name that all coordinates of a group share. */
export function stemOf(group: TheoryGroup): string {
  const first = group.coordinates[0] as string;
  return group.coordinates.length === 1 ? first : first.replace(/\d+$/, '');
}

/** Fluxes are printed as n, n', ..., with the primes of the group. */
export function fluxStem(group: TheoryGroup): string {
  return (group.fluxes[0] ?? 'flux').replace(/^flux('*)\d*$/, 'n$1');
}

/** Product signs for the indices: ranges where an index is free, relations where they are related. */
function indexSigns(group: TheoryGroup, pattern: IndexPattern, letter: ReadonlyMap<string, string>): string {
  const related = new Set(pattern.relations.flatMap(({ indices }) => indices));
  const free = pattern.indices
    .filter(({ name }) => !related.has(name))
    .map(({ name, offset, range }) => `\\prod_{${letter.get(name)}=${offset + 1}}^{${offset + range}}`);
  if (related.size === 0) return free.join('');
  const bound = pattern.indices.find(({ name }) => related.has(name));
  const whole = bound === undefined || bound.range === group.coordinates.length;
  const range = whole ? null : { from: bound.offset + 1, to: bound.offset + bound.range };
  return `\\prod_{${relationText(pattern.relations, letter, range)}}${free.join('')}`;
}

function relationText(
  relations: readonly PatternRelation[],
  letter: ReadonlyMap<string, string>,
  range: { readonly from: number; readonly to: number } | null,
): string {
  const name = (index: string): string => letter.get(index) ?? index;
  const chains = relations.filter(({ kind }) => kind === '<').map(({ indices }) => indices);
  const parts = chains.map((indices) => {
    const chain = indices.map(name).join('<');
    return range === null ? chain : `${range.from}\\le ${chain}\\le ${range.to}`;
  });
  for (const { kind, indices } of relations) {
    if (kind !== '≠') continue;
    const chained = chains.filter((chain) => chain.every((index) => indices.includes(index)));
    const inChain = new Set(chained.flat());
    const loose = indices.filter((index) => !inChain.has(index));
    if (loose.length === 0) parts.push(chained.map((chain) => chain.map(name).join(',')).join('\\neq '));
    else if (inChain.size === 0) parts.push(loose.map(name).join('\\neq '));
    else parts.push(`${loose.map(name).join('\\neq ')}\\neq ${[...inChain].map(name).join(',')}`);
    if (range !== null && chains.length === 0) parts.push(`${range.from}\\ldots ${range.to}`);
  }
  return parts.join(';\\,');
}

/** `\\prod_{\\epsilon_k=\\pm1,\\,\\epsilon_1\\epsilon_2=1}`. */
function namedChoices({ terms, signs }: IndexPattern, sign: string): string {
  const names = terms.flatMap((term, k) => (term.sign === 'either' ? [symbolLatex(`${sign}${k + 1}`)] : []));
  return `\\prod_{${symbolLatex(sign)}_k=\\pm1,\\,${names.join('')}=${signs === 'even' ? '1' : '-1'}}`;
}

function signChoices(pattern: IndexPattern): string {
  if (pattern.signs === 'even') return '\\prod_{\\pm,\\text{ even}}';
  if (pattern.signs === 'odd') return '\\prod_{\\pm,\\text{ odd}}';
  return pattern.signs === 'all' ? PLUS_MINUS : '';
}
