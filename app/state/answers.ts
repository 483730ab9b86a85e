import type { Progress, Result } from '../../engine/requests/result';
import type { EngineClient } from '../../workers/types';
import type { OutlineState } from './outline';
import { createStore, type Readable } from './store';

export type Answer =
  | { readonly state: 'working'; readonly progress: Progress | null }
  | { readonly state: 'stopped'; readonly progress: Progress | null }
  | { readonly state: 'defect'; readonly message: string }
  | { readonly state: 'done'; readonly result: Result };

export interface AnswersState {
  readonly byKey: ReadonlyMap<string, Answer>;
  /** The last finished result of each card, shown as stale while a newer one is on its way. */
  readonly lastOf: ReadonlyMap<string, Result>;
}

export interface Answers {
  readonly state: Readable<AnswersState>;
  stop(key: string): void;
  start(key: string): void;
  dispose(): void;
}

/** A pause in typing, so that a number half typed starts no long work. */
const SETTLED_MS = 150;
/** Finished answers kept beyond those on the page, so that undo shows its answer at once. */
const KEPT = 60;
/** Work that ends without an answer, because the worker died under it, is asked for so many times. */
const TRIES = 3;

/** Asks for the answers the page needs, drops the work nobody waits for any more. */
export function createAnswers(outline: Readable<OutlineState>, client: EngineClient): Answers {
  const state = createStore<AnswersState>({ byKey: new Map(), lastOf: new Map() });
  const running = new Map<string, AbortController>();
  let timer: ReturnType<typeof setTimeout> | undefined;

  function cardsAsking() {
    return outline.get().outline?.cards.filter((card) => card.kind === 'request') ?? [];
  }

  const isWanted = (key: string) => cardsAsking().some((card) => card.key === key);

  function put(key: string, answer: Answer): void {
    const before = state.get();
    const byKey = new Map(before.byKey);
    byKey.delete(key);
    byKey.set(key, answer);
    const wanted = new Set(cardsAsking().map((card) => card.key));
    const spare = [...byKey.keys()].filter((other) => !wanted.has(other) && !running.has(other));
    for (const old of spare.slice(0, Math.max(0, spare.length - KEPT))) byKey.delete(old);
    const lastOf = new Map(before.lastOf);
    if (answer.state === 'done') {
      for (const card of cardsAsking()) if (card.key === key) lastOf.set(card.id, answer.result);
    }
    state.set({ byKey, lastOf });
  }

  function start(key: string, tries = 1): void {
    const { text, revision } = outline.get();
    const control = new AbortController();
    running.get(key)?.abort();
    running.set(key, control);
    put(key, { state: 'working', progress: null });
    const current = () => running.get(key) === control;
    const onProgress = (progress: Progress) => {
      if (current()) put(key, { state: 'working', progress });
    };
    client
      .run(text, key, revision, onProgress, control.signal)
      .then((result) => {
        if (!current()) return;
        running.delete(key);
        if (result) put(key, { state: 'done', result });
        else if (!isWanted(key)) forget(key);
        else if (tries < TRIES) start(key, tries + 1);
        else put(key, { state: 'defect', message: 'no answer came.' });
      })
      .catch((error: unknown) => {
        if (!current()) return;
        running.delete(key);
        put(key, { state: 'defect', message: error instanceof Error ? error.message : String(error) });
      });
  }

  function forget(key: string): void {
    const byKey = new Map(state.get().byKey);
    byKey.delete(key);
    state.set({ ...state.get(), byKey });
  }

  function dropUnwanted(wanted: ReadonlySet<string>): void {
    for (const [key, control] of running) {
      if (wanted.has(key)) continue;
      running.delete(key);
      control.abort();
      forget(key);
    }
  }

  function settle(): void {
    const cards = cardsAsking();
    dropUnwanted(new Set(cards.map((card) => card.key)));
    const { byKey, lastOf } = state.get();
    const last = new Map([...lastOf].filter(([id]) => cards.some((card) => card.id === id)));
    for (const card of cards) {
      const answer = byKey.get(card.key);
      if (answer?.state === 'done') last.set(card.id, answer.result);
    }
    state.set({ byKey, lastOf: last });
    for (const card of cards) if (!state.get().byKey.has(card.key)) start(card.key);
  }

  let opened = -1;
  const leave = outline.subscribe(() => {
    clearTimeout(timer);
    const first = outline.get().opened !== opened;
    opened = outline.get().opened;
    if (first) {
      state.set({ ...state.get(), lastOf: new Map() });
      settle();
    } else timer = setTimeout(settle, SETTLED_MS);
  });

  return {
    state,
    start: (key) => start(key),
    stop(key) {
      const answer = state.get().byKey.get(key);
      const control = running.get(key);
      running.delete(key);
      control?.abort();
      put(key, { state: 'stopped', progress: answer?.state === 'working' ? answer.progress : null });
    },
    dispose() {
      leave();
      clearTimeout(timer);
      for (const control of running.values()) control.abort();
      running.clear();
    },
  };
}
