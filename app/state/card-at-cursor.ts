import type { TextState } from './notebook-text';
import type { OutlineState } from './outline';
import { createStore, type Readable } from './store';

/** Id of the card whose text the cursor is in. */
export function createCardAtCursor(
  outline: Readable<OutlineState>,
  text: Readable<TextState>,
): Readable<string | null> {
  const state = createStore<string | null>(null);
  const settle = () => {
    const { cursor } = text.get();
    const cards = outline.get().outline?.cards ?? [];
    state.set(cards.findLast(({ span }) => span.from <= cursor && cursor <= span.to)?.id ?? null);
  };
  outline.subscribe(settle);
  text.subscribe(settle);
  return state;
}
