import { createStore, type Readable } from './store';

export interface Notice {
  readonly id: number;
  readonly says: string;
  readonly action: { readonly label: string; readonly perform: () => void } | null;
}

export interface Notices {
  readonly state: Readable<readonly Notice[]>;
  /** Shown and read aloud; one with an action stays until answered, any other leaves by itself. */
  say(says: string, action?: Notice['action']): void;
  dismiss(id: number): void;
}

const SHOWN_MS = 6000;
const ACTION_SHOWN_MS = 30_000;

export function createNotices(): Notices {
  const state = createStore<readonly Notice[]>([]);
  let next = 1;
  const dismiss = (id: number) => state.set(state.get().filter((notice) => notice.id !== id));
  return {
    state,
    dismiss,
    say(says, action = null) {
      const id = next;
      next += 1;
      const others = state.get().filter((notice) => notice.says !== says);
      state.set([...others.slice(-2), { id, says, action }]);
      setTimeout(() => dismiss(id), action ? ACTION_SHOWN_MS : SHOWN_MS);
    },
  };
}
