import type { TextState } from './notebook-text';
import type { OutlineState } from './outline';
import { createStore, type Readable } from './store';

/** A multiplet lit in its row, its line of text and its factors. */
export interface Multiplet {
  readonly theory: string;
  readonly row: string;
}

export interface Lit {
  readonly state: Readable<Multiplet | null>;
  /** What the pointer is on; null when it leaves. */
  point(multiplet: Multiplet | null): void;
  /** What has the focus; the pointer comes before it. */
  focus(multiplet: Multiplet | null): void;
}

function rowAtCursor({ outline, revision }: OutlineState, text: TextState): Multiplet | null {
  if (!outline || revision !== text.revision) return null;
  for (const card of outline.cards) {
    if (card.kind !== 'theory') continue;
    const row = card.rows.find(({ lineSpan }) => lineSpan.from <= text.cursor && text.cursor < lineSpan.to);
    if (row) return { theory: card.name, row: row.name };
  }
  return null;
}

/** The multiplet pointed at, or else the one in focus, or else the one on the cursor's line. */
export function createLit(outline: Readable<OutlineState>, text: Readable<TextState>): Lit {
  const state = createStore<Multiplet | null>(null);
  let pointed: Multiplet | null = null;
  let focused: Multiplet | null = null;

  function settle(): void {
    const next = pointed ?? focused ?? rowAtCursor(outline.get(), text.get());
    const before = state.get();
    if (next?.theory !== before?.theory || next?.row !== before?.row) state.set(next);
  }

  outline.subscribe(settle);
  text.subscribe(settle);
  return {
    state,
    point(multiplet) {
      pointed = multiplet;
      settle();
    },
    focus(multiplet) {
      focused = multiplet;
      settle();
    },
  };
}
