import { proxy, type Remote, releaseProxy, wrap } from 'comlink';
import type { LatexOut } from '../engine/requests/document';
import type { FailureResult, PlotResult, Progress, Result } from '../engine/requests/result';
import type { WeightPage } from '../engine/requests/weight-page';
import type { EngineApi } from './api';
import { createStopToken, type StopToken } from './stop-token';
import type { EngineClient } from './types';

/** A worker and the way to it; `end` stops it at once, whatever it is doing. */
export interface EngineConnection {
  readonly remote: Remote<EngineApi>;
  readonly end: () => void;
  readonly newToken: () => StopToken;
  /** Called when the worker dies of itself. */
  readonly onCrash: (callback: () => void) => void;
}

/** A call that takes longer than this has the worker replaced: nothing that a keystroke asks for needs as long. */
const STUCK_AFTER_MILLISECONDS = 20_000;
/** What is stopped ends by itself, between two function values, and keeps its tables; after this long it is ended. */
const ENDED_AFTER_MILLISECONDS = 4_000;

/**
 * The page's way to the engine. Two workers: one answers keystrokes and sliders, the other computes requests, so that
 * long work never stands in the way of typing. Either is replaced when it is stuck, stopped or has crashed; the text
 * lives in the page and is not touched by that.
 */
export function createEngineClient(connect: () => EngineConnection = connectWorker): EngineClient {
  const restarts = new Set<() => void>();
  const quick = new Channel(connect, restarts);
  const slow = new Channel(connect, restarts);
  const latest = new Map<string, symbol>();
  /** Runs a call of which, among those about the same thing, only the latest counts; an overtaken one answers null. */
  const newest = async <T>(about: string, call: (api: Remote<EngineApi>) => Promise<T>): Promise<T | null> => {
    const own = Symbol(about);
    latest.set(about, own);
    try {
      const answer = await quick.call(call, STUCK_AFTER_MILLISECONDS);
      return latest.get(about) === own ? answer : null;
    } finally {
      if (latest.get(about) === own) latest.delete(about);
    }
  };
  // Requests run one after the other: a queue, so that stopping one never ends another's work unasked.
  let queue: Promise<unknown> = Promise.resolve();
  return {
    outline: (text, options) => newest('outline', (api) => api.outline(text, options.notation)),
    plotFast: (text, key, overrides) =>
      newest<PlotResult | FailureResult | null>(`plot ${key}`, async (api) => api.plotFast(text, key, overrides)),
    hover: (text, offset) => newest('hover', (api) => api.hover(text, offset)),
    run: (text, key, _revision, onProgress, signal) => {
      const stopped = new Promise<null>((resolve) => {
        signal.addEventListener('abort', () => resolve(null), { once: true });
      });
      const work = async () => (signal.aborted ? null : slow.run(text, key, onProgress, signal));
      const result: Promise<Result | null> = queue.then(work, work);
      queue = result.catch(() => undefined);
      return Promise.race([result, stopped]);
    },
    document: async (text, name, form, options) => {
      const out = await quick.ask<LatexOut>(async (api) => api.document(text, name, form, options.notation[name] ?? 0));
      if (out.kind === 'refused') return { snippet: '', document: '', refused: out.message };
      return { snippet: out.snippet, document: out.document };
    },
    weightPage: (text, name, latex, page, options) =>
      quick.ask<WeightPage>(async (api) => api.weightPage(text, name, latex, page, options.notation[name] ?? 0)),
    representations: (group, limit) => quick.ask((api) => api.representations(group, limit)),
    builtins: () => quick.ask((api) => api.builtins()),
    dispose: () => {
      quick.end();
      slow.end();
    },
    onRestart: (callback) => {
      restarts.add(callback);
    },
  };
}

/** One worker, replaced when needed. Calls that were waiting when it ended answer null. */
class Channel {
  readonly #connect: () => EngineConnection;
  readonly #restarts: ReadonlySet<() => void>;
  #connection: EngineConnection | null = null;
  #ended = new AbortController();

  constructor(connect: () => EngineConnection, restarts: ReadonlySet<() => void>) {
    this.#connect = connect;
    this.#restarts = restarts;
  }

  /** The answer, or null when the worker ended before it came. `limit` in milliseconds, null for none. */
  async call<T>(ask: (api: Remote<EngineApi>) => Promise<T>, limit: number | null): Promise<T | null> {
    const connection = this.#open();
    const { signal } = this.#ended;
    const ended = new Promise<null>((resolve) => {
      signal.addEventListener('abort', () => resolve(null), { once: true });
    });
    const timer = limit === null ? null : setTimeout(() => this.#connection === connection && this.restart(), limit);
    try {
      return await Promise.race([ask(connection.remote), ended]);
    } finally {
      if (timer !== null) clearTimeout(timer);
    }
  }

  /** The answer of a call that is asked again if the worker ends under it, once. */
  async ask<T>(call: (api: Remote<EngineApi>) => Promise<T>): Promise<T> {
    const first = await this.call(call, STUCK_AFTER_MILLISECONDS);
    if (first !== null) return first;
    const second = await this.call(call, STUCK_AFTER_MILLISECONDS);
    if (second === null) throw new Error('The engine ended twice under the same call.');
    return second;
  }

  /** One request. When the signal aborts, the work is asked to end, and ended if it does not. */
  async run(
    text: string,
    key: string,
    onProgress: (progress: Progress) => void,
    signal: AbortSignal,
  ): Promise<Result | null> {
    const { token, stop } = this.#open().newToken();
    let timer: ReturnType<typeof setTimeout> | null = null;
    const end = () => {
      stop();
      timer = setTimeout(() => this.restart(), ENDED_AFTER_MILLISECONDS);
    };
    signal.addEventListener('abort', end, { once: true });
    try {
      return await this.call<Result | null>(async (api) => api.run(text, key, token, proxy(onProgress)), null);
    } finally {
      signal.removeEventListener('abort', end);
      if (timer !== null) clearTimeout(timer);
      stop();
    }
  }

  restart(): void {
    this.end();
    for (const callback of this.#restarts) callback();
  }

  end(): void {
    const connection = this.#connection;
    this.#connection = null;
    this.#ended.abort();
    this.#ended = new AbortController();
    if (connection === null) return;
    connection.remote[releaseProxy]();
    connection.end();
  }

  #open(): EngineConnection {
    if (this.#connection) return this.#connection;
    const connection = this.#connect();
    connection.onCrash(() => {
      if (this.#connection === connection) this.restart();
    });
    this.#connection = connection;
    return connection;
  }
}

function connectWorker(): EngineConnection {
  const worker = new Worker(new URL('./engine.worker.ts', import.meta.url), { type: 'module' });
  return {
    remote: wrap<EngineApi>(worker),
    end: () => worker.terminate(),
    newToken: createStopToken,
    onCrash: (callback) => {
      worker.addEventListener('error', callback);
      worker.addEventListener('messageerror', callback);
    },
  };
}
