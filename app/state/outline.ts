import type { Card, Outline, Problem } from '../../engine/requests/result';
import type { EngineClient, OutlineOptions } from '../../workers/types';
import type { NotebookText } from './notebook-text';
import { sameButForPlace, shareStructure } from './share-structure';
import { createStore, type Readable } from './store';

export interface OutlineState {
  readonly outline: Outline | null;
  /**
   * The outline's cards to draw, in the same order. One that only stands elsewhere than before is the same object as
   * before, places and all; who needs its place asks `cardNow`.
   */
  readonly cards: readonly Card[];
  /** The text the outline was made from. */
  readonly text: string;
  readonly revision: number;
  readonly opened: number;
  /** Each card as it last was without an error in it, by id. */
  readonly sound: ReadonlyMap<string, Card>;
  /** A defect of the engine; the last outline stays. */
  readonly trouble: string | null;
}

const nothing: OutlineState = {
  outline: null,
  cards: [],
  text: '',
  revision: -1,
  opened: 0,
  sound: new Map(),
  trouble: null,
};

/** A drawn card as it stands in the text now; null when it is gone. */
export function cardNow<C extends Card>({ outline }: OutlineState, card: C): C | null {
  const found = outline?.cards.find(({ id }) => id === card.id);
  // An id begins with the kind of its card.
  return found?.kind === card.kind ? (found as C) : null;
}

function drawnCards(outline: Outline, before: readonly Card[]): readonly Card[] {
  const byId = new Map(before.map((card) => [card.id, card]));
  const cards = outline.cards.map((card) => {
    const known = byId.get(card.id);
    if (known && sameButForPlace(known, card)) return known;
    return shareStructure(known ?? null, card);
  });
  return cards.length === before.length && cards.every((card, at) => card === before[at]) ? before : cards;
}

export function errorsIn(card: Card, problems: readonly Problem[]): readonly Problem[] {
  return problems.filter(({ span }) => span.from >= card.span.from && span.from <= card.span.to);
}

function isSound(card: Card, problems: readonly Problem[]): boolean {
  return errorsIn(card, problems).every(({ severity }) => severity !== 'error');
}

function soundCards(
  outline: Outline,
  drawn: readonly Card[],
  before: ReadonlyMap<string, Card>,
): ReadonlyMap<string, Card> {
  const sound = new Map<string, Card>();
  outline.cards.forEach((card, at) => {
    const kept = isSound(card, outline.problems) ? drawn[at] : before.get(card.id);
    if (kept) sound.set(card.id, kept);
  });
  return sound;
}

export interface FollowedOutline {
  readonly state: Readable<OutlineState>;
  /** Asks again for the text as it is, after the notation changed or the worker was started anew. */
  refresh(): void;
  stop(): void;
}

/**
 * Keeps the outline in step with the text. One question is out at a time and the next one asks about the newest
 * text, so that fast typing never fills a queue.
 */
export function followOutline(
  text: NotebookText,
  client: EngineClient,
  options: () => OutlineOptions,
): FollowedOutline {
  const state = createStore<OutlineState>(nothing);
  let asking = false;
  let askAgain = false;
  let stopped = false;

  function take(outline: Outline, asked: { text: string; revision: number; opened: number }): void {
    const before = state.get();
    const sameNotebook = before.opened === asked.opened;
    const cards = drawnCards(outline, sameNotebook ? before.cards : []);
    const sound = soundCards(outline, cards, sameNotebook ? before.sound : new Map());
    const problems = shareStructure(before.outline?.problems ?? null, outline.problems);
    state.set({ ...asked, outline: { ...outline, problems }, cards, sound, trouble: null });
  }

  async function ask(): Promise<void> {
    if (asking) {
      askAgain = true;
      return;
    }
    asking = true;
    do {
      askAgain = false;
      const { text: asked, revision, opened } = text.state.get();
      try {
        const outline = await client.outline(asked, options(), revision);
        if (outline && !stopped && opened === text.state.get().opened) take(outline, { text: asked, revision, opened });
      } catch (error) {
        if (!stopped) state.set({ ...state.get(), trouble: error instanceof Error ? error.message : String(error) });
      }
    } while (askAgain && !stopped);
    asking = false;
  }

  let seen = text.state.get().revision;
  const leave = text.state.subscribe(() => {
    const { revision } = text.state.get();
    if (revision === seen) return;
    seen = revision;
    void ask();
  });

  return {
    state,
    refresh: () => void ask(),
    stop() {
      stopped = true;
      leave();
    },
  };
}
