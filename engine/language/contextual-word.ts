import type { Stack } from '@lezer/lr';
import {
  ClauseWord,
  GroupLineWord,
  InWord,
  MatterLineWord,
  OptionWord,
  QuantityWord,
  SpectrumLineWord,
  TheoryLineWord,
  TowerClauseWord,
  TowerLineWord,
} from './notebook.parser.gen.terms';
import {
  CLAUSES,
  GROUP_OPTIONS,
  MULTIPLETS,
  PARTS,
  PRESCRIPTIONS,
  ROLES,
  SPECTRUM_QUANTITIES,
  THEORY_LINE_WORDS,
  THEORY_QUANTITIES,
  TOWER_CLAUSES,
} from './words';

const MATTER_WORDS: readonly string[] = ['matter', ...MULTIPLETS];
const GROUP_WORDS: readonly string[] = ROLES;

/** Terms a word may stand for; the first that the place allows is taken, else it is a name. */
const TERMS: ReadonlyMap<string, readonly number[]> = collect([
  [['in'], InWord],
  [CLAUSES, ClauseWord],
  [GROUP_WORDS, GroupLineWord],
  [MATTER_WORDS, MatterLineWord],
  [THEORY_LINE_WORDS.filter((word) => !GROUP_WORDS.includes(word) && !MATTER_WORDS.includes(word)), TheoryLineWord],
  [GROUP_OPTIONS, OptionWord],
  [['index'], SpectrumLineWord],
  [['boson', 'complex', 'fermion', 'real', 'power'], TowerLineWord],
  [TOWER_CLAUSES, TowerClauseWord],
  [[...THEORY_QUANTITIES, ...SPECTRUM_QUANTITIES, ...PARTS, ...PRESCRIPTIONS], QuantityWord],
]);

function collect(table: readonly (readonly [readonly string[], number])[]): ReadonlyMap<string, readonly number[]> {
  const terms = new Map<string, number[]>();
  for (const [words, term] of table) {
    for (const word of words) terms.set(word, [...(terms.get(word) ?? []), term]);
  }
  return terms;
}

/** A word is reserved only where it means something: `level` is an option of a group, and elsewhere a name. */
export function contextualWord(word: string, stack: Stack): number {
  return TERMS.get(word)?.find((term) => stack.canShift(term)) ?? -1;
}
