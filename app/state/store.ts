import { useSyncExternalStore } from 'react';

/** A value that tells when it changes. */
export interface Store<Value> {
  get(): Value;
  set(value: Value): void;
  subscribe(listener: () => void): () => void;
}

export type Readable<Value> = Omit<Store<Value>, 'set'>;

export function createStore<Value>(initial: Value): Store<Value> {
  let value = initial;
  const listeners = new Set<() => void>();
  return {
    get: () => value,
    set(next) {
      if (Object.is(value, next)) return;
      value = next;
      for (const listener of [...listeners]) listener();
    },
    subscribe(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}

export function useStore<Value>(store: Readable<Value>): Value {
  return useSyncExternalStore(store.subscribe, store.get);
}

/** Renders again only when what `select` picks changes; it must pick a stable or primitive value. */
export function useSelected<Value, Picked>(store: Readable<Value>, select: (value: Value) => Picked): Picked {
  return useSyncExternalStore(store.subscribe, () => select(store.get()));
}
