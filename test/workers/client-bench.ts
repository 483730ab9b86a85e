import { expose, wrap } from 'comlink';
import { afterEach, vi } from 'vitest';
import { createEngineApi, type EngineApi } from '../../workers/api';
import { createEngineClient, type EngineConnection } from '../../workers/client';
import type { EngineClient } from '../../workers/types';

const open: (() => void)[] = [];

afterEach(() => {
  vi.useRealTimers();
  for (const close of open.splice(0)) close();
});

export interface Bench {
  readonly client: EngineClient;
  /** Connections in the order they were made. */
  readonly connections: { ended: boolean; crash: () => void }[];
  readonly restarts: { count: number };
}

/** A client whose workers are message channels with `api` behind them; a new one for each connection. */
export function bench(api: () => object): Bench {
  const connections: Bench['connections'] = [];
  const restarts = { count: 0 };
  const client = createEngineClient((): EngineConnection => {
    const { port1, port2 } = new MessageChannel();
    expose(api(), port2);
    const close = () => {
      port1.close();
      port2.close();
    };
    open.push(close);
    const state = { ended: false, crash: () => {} };
    connections.push(state);
    return {
      remote: wrap<EngineApi>(port1),
      end: () => {
        state.ended = true;
        close();
      },
      newToken: () => {
        const token = `token ${wanted.size + 1}`;
        wanted.set(token, true);
        return { token, stop: () => wanted.set(token, false) };
      },
      onCrash: (callback) => {
        state.crash = () => {
          close();
          callback();
        };
      },
    };
  });
  client.onRestart(() => restarts.count++);
  open.push(() => client.dispose());
  return { client, connections, restarts };
}

/** Tokens of runs, and whether their work is still wanted. */
const wanted = new Map<string, boolean>();
export const isWanted = (token: string) => wanted.get(token) === true;
export const engine = () => createEngineApi(() => 0, isWanted);
export const TEXT =
  'theory t\n  sphere S3\n  gauge G = U(1)\n  matter G R\n  chiral q 1 1/3\n\nvalue q of t at sigma = 1, 10 digits\n';
export const PLOT = 'let a = 1 in 0 .. 2\n\nplot gamma(x+a) over x = 1 .. 2\n';
export const silent = () => {};
export const options = { notation: {} };

/** An answer that comes when it is told to. */
export function gate<T>(): { promise: Promise<T>; open: (value: T) => void } {
  let resolve: (value: T) => void = () => {};
  const promise = new Promise<T>((done) => {
    resolve = done;
  });
  return { promise, open: resolve };
}

/** Lets messages in flight arrive. */
export const settle = () => new Promise((resolve) => setTimeout(resolve, 20));

export async function keyOf(client: EngineClient, text: string): Promise<string> {
  const outline = await client.outline(text, options, 1);
  const key = outline?.cards.flatMap((card) => (card.kind === 'request' ? [card.key] : []))[0];
  if (key === undefined) throw new Error('No request.');
  return key;
}
