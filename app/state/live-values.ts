import type { OutlineState } from './outline';
import { createStore, type Readable } from './store';

/** A parameter's value while its slider moves, and after release until the outline knows the new text. */
interface LiveValue {
  readonly value: number;
  readonly until: number | null;
}

export interface LiveValues {
  readonly state: Readable<Readonly<Record<string, LiveValue>>>;
  move(name: string, value: number): void;
  /** The slider was let go and the text edited: the outline of this revision takes over. */
  release(name: string, revision: number): void;
  cancel(name: string): void;
}

export function createLiveValues(outline: Readable<OutlineState>): LiveValues {
  const state = createStore<Readonly<Record<string, LiveValue>>>({});

  function without(drop: (name: string, live: LiveValue) => boolean): void {
    const entries = Object.entries(state.get());
    const kept = entries.filter(([name, live]) => !drop(name, live));
    if (kept.length < entries.length) state.set(Object.fromEntries(kept));
  }

  outline.subscribe(() => {
    const { revision } = outline.get();
    without((_name, { until }) => until !== null && until <= revision);
  });

  return {
    state,
    move: (name, value) => state.set({ ...state.get(), [name]: { value, until: null } }),
    release(name, revision) {
      const live = state.get()[name];
      if (live) state.set({ ...state.get(), [name]: { ...live, until: revision } });
    },
    cancel: (name) => without((other) => other === name),
  };
}
