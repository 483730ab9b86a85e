import type { Completion, CompletionContext } from '@codemirror/autocomplete';
import type { Card } from '../../engine/requests/result';
import type { EngineClient, RepresentationChoice } from '../../workers/types';

const OFFERED = 40;

type Options = (
  context: CompletionContext,
  before: string,
  cards: readonly Card[],
  symbols: readonly Completion[],
) => Promise<readonly Completion[]>;

/** The group of the column the cursor is in, by counting words; null outside a column of a non-abelian group. */
function groupAtCursor(context: CompletionContext, before: string, cards: readonly Card[]): string | null {
  const theory = cards.findLast((card) => card.kind === 'theory' && card.span.from <= context.pos);
  if (theory?.kind !== 'theory') return null;
  const words = before.trimStart().split(/\s+/).length;
  // Kind and name come first; the word being typed is the last one.
  const group = theory.columns[words - 3]?.group ?? null;
  return group === 'U(1)' ? null : group;
}

/** Representations for a cell of the charge table, with their dimensions. */
export function representationOptions(client: EngineClient): Options {
  const known = new Map<string, Promise<readonly RepresentationChoice[]>>();

  function choicesOf(group: string): Promise<readonly RepresentationChoice[]> {
    const asked = known.get(group) ?? client.representations(group, OFFERED);
    known.set(group, asked);
    asked.catch(() => known.delete(group));
    return asked;
  }

  return async (context, before, cards, symbols) => {
    const group = groupAtCursor(context, before, cards);
    if (group === null) return symbols;
    const choices = await choicesOf(group).catch(() => []);
    return choices.map(({ word, dimension, reality }, at) => ({
      label: word,
      detail: `dimension ${dimension}, ${reality}`,
      boost: -at,
    }));
  };
}
