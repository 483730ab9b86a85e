import type { Completion, CompletionContext, CompletionResult, CompletionSource } from '@codemirror/autocomplete';
import type { Line } from '@codemirror/state';
import {
  CONSTANTS,
  EXPRESSION_FUNCTIONS,
  FORMULA_FORMS,
  GROUP_OPTIONS,
  GROUPS,
  MULTIPLETS,
  PARTS,
  PRESCRIPTIONS,
  ROLES,
  SPECIAL_FUNCTIONS,
  SPECTRUM_LINE_WORDS,
  SPECTRUM_QUANTITIES,
  SPHERES,
  THEORY_LINE_WORDS,
  THEORY_QUANTITIES,
  TOWER_CLAUSES,
  WORK_WORDS,
} from '../../engine/language/words';
import type { Session } from '../state/session';
import { type KnownName, knownNames, symbolsIn } from './known-names';
import { representationOptions } from './representation-options';

const options = (words: readonly string[], detail: string): readonly Completion[] =>
  words.map((label) => ({ label, detail }));

const named = (names: readonly KnownName[]): readonly Completion[] =>
  names.map(({ name, what }) => ({ label: name, detail: what }));

/** First line of the block a line belongs to; the line itself where it begins at column 0. */
function blockStart(context: CompletionContext, line: Line): string {
  let at = line;
  while (/^[ \t]/.test(at.text) && at.number > 1) at = context.state.doc.line(at.number - 1);
  return at.text;
}

const firstWord = (text: string) => /^[ \t]*([\w-]*)/.exec(text)?.[1] ?? '';
const isOneOf = (word: string, words: readonly string[]) => words.includes(word);

const functions = [...options(EXPRESSION_FUNCTIONS, 'function'), ...options(CONSTANTS, 'number')] as const;

/** Words that may stand at the cursor, with what they are. */
export function completion(session: Session): CompletionSource {
  const representations = representationOptions(session.client);
  let blocks: readonly Completion[] | null = null;

  /** Whole blocks, asked for once. */
  async function builtins(): Promise<readonly Completion[]> {
    blocks ??= (await session.client.builtins()).map(({ label, text }) => ({
      label: `spectrum of a ${label}`,
      detail: 'block',
      apply: text,
    }));
    return blocks;
  }

  async function offered(context: CompletionContext): Promise<readonly Completion[]> {
    const line = context.state.doc.lineAt(context.pos);
    const before = line.text.slice(0, context.pos - line.from);
    const start = blockStart(context, line);
    const block = firstWord(start);
    const cards = session.outline.state.get().outline?.cards ?? [];
    const known = knownNames(cards);
    const symbols = [
      ...named(known.filter(({ what }) => what === 'parameter')),
      ...named(symbolsIn(context.state.doc.toString())),
    ];

    if (/^\w*$/.test(before)) return [...options(WORK_WORDS, 'begins work'), ...(await builtins())];
    if (block === 'theory' && line.text !== start) {
      if (/^[ \t]+\w*$/.test(before)) return options(THEORY_LINE_WORDS, 'line of a theory');
      const word = firstWord(before);
      if (word === 'sphere') return /sphere\s+\w*$/.test(before) ? options(SPHERES, 'sphere') : symbols;
      if (isOneOf(word, ROLES)) return groupLine(before, symbols);
      if (isOneOf(word, MULTIPLETS)) return representations(context, before, cards, symbols);
      return [...named(known), ...symbols];
    }
    if (block === 'spectrum' && line.text !== start) {
      if (/^[ \t]+\w*$/.test(before)) return options(SPECTRUM_LINE_WORDS, 'line of a spectrum');
      return [...options(TOWER_CLAUSES, 'clause'), ...symbols, ...functions];
    }
    if (isOneOf(block, WORK_WORDS)) return requestWords(block, before, known, symbols);
    return [];
  }

  return async (context): Promise<CompletionResult | null> => {
    const word = context.matchBefore(/[\p{L}[(][\w.,^*'()[\]-]*/u);
    if (!word && !context.explicit) return null;
    const found = await offered(context);
    if (found.length === 0) return null;
    return { from: word?.from ?? context.pos, options: [...found], validFor: /^[\w.,^*'()[\]-]*$/ };
  };
}

function groupLine(before: string, symbols: readonly Completion[]): readonly Completion[] {
  if (/=\s*\w*$/.test(before)) return options(GROUPS, 'group');
  if (/,\s*\w*$/.test(before)) return options(GROUP_OPTIONS, 'option');
  return symbols;
}

function requestWords(
  block: string,
  before: string,
  known: readonly KnownName[],
  symbols: readonly Completion[],
): readonly Completion[] {
  const subjects = named(known.filter(({ what }) => what === 'theory' || what === 'spectrum'));
  if (/\bas\s+\w*$/.test(before)) return options(FORMULA_FORMS, 'form');
  if (/\bby\s+\w*$/.test(before)) return options(PRESCRIPTIONS, 'regularisation');
  if (/\b(?:of|with|formula|integrate|extremize|compare)\s+\w*$/.test(before)) return subjects;
  if (/\b(?:at|over)\s+[\w']*$|,\s*[\w']*$/.test(before)) return [...symbols, ...options(['digits'], 'after a number')];
  if ((block === 'value' || block === 'plot') && !/\bof\b|\(/.test(before)) {
    return [
      ...options(THEORY_QUANTITIES, 'of a theory'),
      ...options(SPECTRUM_QUANTITIES, 'of a spectrum'),
      ...options(PARTS, 'part'),
      ...Object.entries(SPECIAL_FUNCTIONS).map(([label, { signature }]) => ({ label, detail: signature })),
      ...named(known.filter(({ what }) => what.includes(' of '))),
      ...options(['of'], 'whose'),
    ];
  }
  if (block === 'let') return [...options(['in'], 'range'), ...symbols, ...functions];
  return [...options(['of', 'at', 'over', 'as', 'by', 'with', 'digits'], 'clause'), ...symbols, ...functions];
}
