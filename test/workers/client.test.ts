import { expose, wrap } from 'comlink';
import { afterEach, describe, expect, test, vi } from 'vitest';
import type { Progress } from '../../engine/requests/result';
import { createEngineApi, type EngineApi } from '../../workers/api';
import { createEngineClient, type EngineConnection } from '../../workers/client';
import type { EngineClient } from '../../workers/types';

/*
 * The page's client over real message channels, with the engine or a stand-in at the other end. What it promises stands
 * in workers/types.ts; there is no outside source.
 */
const open: (() => void)[] = [];

afterEach(() => {
  vi.useRealTimers();
  for (const close of open.splice(0)) close();
});

interface Bench {
  readonly client: EngineClient;
  /** Connections in the order they were made. */
  readonly connections: { ended: boolean; crash: () => void }[];
  readonly restarts: { count: number };
}

/** A client whose workers are message channels with `api` behind them; a new one for each connection. */
function bench(api: () => object): Bench {
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

const engine = () => createEngineApi(() => 0);
const TEXT =
  'theory t\n  sphere S3\n  gauge G = U(1)\n  matter G R\n  chiral q 1 1/3\n\nvalue q of t at sigma = 1, 10 digits\n';
const PLOT = 'let a = 1 in 0 .. 2\n\nplot gamma(x+a) over x = 1 .. 2\n';
const silent = () => {};
const options = { notation: {} };

/** An answer that comes when it is told to. */
function gate<T>(): { promise: Promise<T>; open: (value: T) => void } {
  let resolve: (value: T) => void = () => {};
  const promise = new Promise<T>((done) => {
    resolve = done;
  });
  return { promise, open: resolve };
}

/** Lets messages in flight arrive. */
const settle = () => new Promise((resolve) => setTimeout(resolve, 20));

async function keyOf(client: EngineClient, text: string): Promise<string> {
  const outline = await client.outline(text, options, 1);
  const key = outline?.cards.flatMap((card) => (card.kind === 'request' ? [card.key] : []))[0];
  if (key === undefined) throw new Error('No request.');
  return key;
}

describe('answers of the engine', () => {
  test('are the same with a channel between as without', async () => {
    const { client } = bench(engine);
    const direct = engine();
    const key = await keyOf(client, TEXT);
    expect(await client.outline(TEXT, options, 1)).toEqual(direct.outline(TEXT, {}));
    expect(await client.run(TEXT, key, 1, silent, new AbortController().signal)).toEqual(direct.run(TEXT, key, silent));
    expect(await client.hover(TEXT, TEXT.indexOf('U(1)'))).toEqual(direct.hover(TEXT, TEXT.indexOf('U(1)')));
    expect(await client.representations('SU(3)', 8)).toEqual(direct.representations('SU(3)', 8));
    expect((await client.document(TEXT, 't', 'functions', options)).snippet).toContain('s_{b=1}');
    const plotKey = await keyOf(client, PLOT);
    expect(await client.plotFast(PLOT, plotKey, { a: 2 }, 1)).toEqual(direct.plotFast(PLOT, plotKey, { a: 2 }));
  });

  test('a document that is refused is empty, with the reason', async () => {
    const { client } = bench(engine);
    const out = await client.document(TEXT, 'nowhere', 'functions', options);
    expect(out).toEqual({ snippet: '', document: '', refused: 'There is no theory `nowhere` in this notebook.' });
  });

  test('a key that the text does not hold has no answer', async () => {
    const { client } = bench(engine);
    expect(await client.run(TEXT, 'value nothing', 1, silent, new AbortController().signal)).toBeNull();
  });

  test('progress comes through', async () => {
    const steps: Progress[] = [];
    const { client } = bench(() => ({
      run: async (_text: string, _key: string, progress: (step: Progress) => void) => {
        progress({ done: 1, of: 2, says: 'half' });
        await settle();
        return null;
      },
    }));
    await client.run(TEXT, 'k', 1, (step) => steps.push(step), new AbortController().signal);
    expect(steps).toEqual([{ done: 1, of: 2, says: 'half' }]);
  });

  test('a defect of the engine rejects, and the next call is answered', async () => {
    let broken = true;
    const { client } = bench(() => ({
      outline: () => {
        if (broken) throw new Error('a defect');
        return 'well';
      },
    }));
    await expect(client.outline(TEXT, options, 1)).rejects.toThrow('a defect');
    broken = false;
    expect(await client.outline(TEXT, options, 2)).toBe('well');
  });
});

describe('late answers are dropped', () => {
  test('of each kind the latest counts, whatever the order of arrival', async () => {
    const gates = new Map<string, ReturnType<typeof gate<string>>>();
    const wait = (name: string) => {
      const made = gate<string>();
      gates.set(name, made);
      return made.promise;
    };
    const { client } = bench(() => ({
      outline: (text: string) => wait(text),
      hover: (text: string) => wait(`hover ${text}`),
    }));
    const first = client.outline('one', options, 1);
    const help = client.hover('one', 0);
    const second = client.outline('two', options, 2);
    await settle();
    gates.get('two')?.open('new');
    expect(await second).toBe('new');
    gates.get('one')?.open('old');
    expect(await first).toBeNull();
    gates.get('hover one')?.open('help');
    expect(await help).toBe('help');
  });

  test('an answer that came before the next call was made is kept', async () => {
    const { client } = bench(() => ({ outline: (text: string) => text }));
    expect(await client.outline('one', options, 1)).toBe('one');
    expect(await client.outline('two', options, 2)).toBe('two');
  });
});

describe('stopping', () => {
  const endless = () => ({ run: () => new Promise(() => {}), outline: (text: string) => text });

  test('ends a run with null, and its worker alone', async () => {
    const { client, connections, restarts } = bench(endless);
    expect(await client.outline('text', options, 1)).toBe('text');
    const stop = new AbortController();
    const run = client.run(TEXT, 'k', 1, silent, stop.signal);
    await settle();
    expect(connections.map(({ ended }) => ended)).toEqual([false, false]);
    stop.abort();
    expect(await run).toBeNull();
    expect(connections.map(({ ended }) => ended)).toEqual([false, true]);
    expect(restarts.count).toBe(1);
    expect(await client.outline('text', options, 2)).toBe('text');
    expect(connections.length).toBe(2);
  });

  test('the next run has a new worker', async () => {
    let made = 0;
    const { client } = bench(() => {
      const own = ++made;
      return { run: () => (own === 1 ? new Promise(() => {}) : `from worker ${own}`) };
    });
    const stop = new AbortController();
    const first = client.run(TEXT, 'k', 1, silent, stop.signal);
    const second = client.run(TEXT, 'l', 1, silent, new AbortController().signal);
    await settle();
    stop.abort();
    expect(await first).toBeNull();
    expect(await second).toBe('from worker 2');
  });

  test('a run that is stopped before its turn is never begun', async () => {
    const begun: string[] = [];
    const hold = gate<null>();
    const { client } = bench(() => ({
      run: (_text: string, key: string) => {
        begun.push(key);
        return hold.promise;
      },
    }));
    const stop = new AbortController();
    const first = client.run(TEXT, 'first', 1, silent, new AbortController().signal);
    const second = client.run(TEXT, 'second', 1, silent, stop.signal);
    await settle();
    stop.abort();
    await settle();
    expect(begun).toEqual(['first']);
    hold.open(null);
    expect(await second).toBeNull();
    await first;
    expect(begun).toEqual(['first']);
  });

  test('runs go one after the other', async () => {
    const gates = [gate<string>(), gate<string>()];
    let begun = 0;
    const { client } = bench(() => ({ run: () => gates[begun++]?.promise }));
    const runs = ['a', 'b'].map((key) => client.run(TEXT, key, 1, silent, new AbortController().signal));
    await settle();
    expect(begun).toBe(1);
    gates[0]?.open('one');
    expect(await runs[0]).toBe('one');
    await settle();
    expect(begun).toBe(2);
    gates[1]?.open('two');
    expect(await runs[1]).toBe('two');
  });

  test('a run that rejects does not hold up the next', async () => {
    let calls = 0;
    const { client } = bench(() => ({
      run: () => {
        if (++calls === 1) throw new Error('a defect');
        return 'well';
      },
    }));
    const first = client.run(TEXT, 'a', 1, silent, new AbortController().signal);
    const second = client.run(TEXT, 'b', 1, silent, new AbortController().signal);
    await expect(first).rejects.toThrow('a defect');
    expect(await second).toBe('well');
  });
});

describe('a worker that dies', () => {
  test('of itself: what waited answers null, the next call is answered, the page is told', async () => {
    let made = 0;
    const { client, connections, restarts } = bench(() => {
      const own = ++made;
      return { outline: (text: string) => (own === 1 ? new Promise(() => {}) : text) };
    });
    const lost = client.outline('text', options, 1);
    await settle();
    connections[0]?.crash();
    expect(await lost).toBeNull();
    expect(restarts.count).toBe(1);
    // The text is the page's: the same call with the same text has its answer now.
    expect(await client.outline('text', options, 2)).toBe('text');
    expect(connections.length).toBe(2);
  });

  test('a crash of an old worker does not end the new one', async () => {
    const { client, connections, restarts } = bench(() => ({ outline: (text: string) => text }));
    await client.outline('a', options, 1);
    connections[0]?.crash();
    await client.outline('b', options, 2);
    connections[0]?.crash();
    expect(restarts.count).toBe(1);
    expect(connections[1]?.ended).toBe(false);
    expect(await client.outline('c', options, 3)).toBe('c');
  });

  test('what must have an answer is asked again once, then rejects', async () => {
    let made = 0;
    const { client, connections } = bench(() => {
      const own = ++made;
      return { representations: () => (own === 2 ? ['found'] : new Promise(() => {})) };
    });
    const asked = client.representations('SU(3)', 8);
    await settle();
    connections[0]?.crash();
    expect(await asked).toEqual(['found']);

    const never = bench(() => ({ representations: () => new Promise(() => {}) }));
    const lost = never.client.representations('SU(3)', 8);
    const rejected = expect(lost).rejects.toThrow('ended twice');
    await settle();
    never.connections[0]?.crash();
    await settle();
    never.connections[1]?.crash();
    await rejected;
  });

  test('is replaced when it is stuck, but never while it computes a request', async () => {
    vi.useFakeTimers({ toFake: ['setTimeout', 'clearTimeout'] });
    const { client, connections, restarts } = bench(() => ({
      outline: () => new Promise(() => {}),
      run: () => new Promise(() => {}),
    }));
    const stop = new AbortController();
    const run = client.run(TEXT, 'k', 1, silent, stop.signal);
    const stuck = client.outline('text', options, 1);
    await vi.advanceTimersByTimeAsync(19_000);
    expect(restarts.count).toBe(0);
    await vi.advanceTimersByTimeAsync(2_000);
    expect(await stuck).toBeNull();
    expect(restarts.count).toBe(1);
    await vi.advanceTimersByTimeAsync(3_600_000);
    expect(restarts.count).toBe(1);
    expect(connections.filter(({ ended }) => ended).length).toBe(1);
    stop.abort();
    expect(await run).toBeNull();
  });

  test('disposing ends both', async () => {
    const { client, connections } = bench(() => ({ outline: (text: string) => text, run: () => 'done' }));
    await client.outline('a', options, 1);
    await client.run(TEXT, 'k', 1, silent, new AbortController().signal);
    client.dispose();
    expect(connections.map(({ ended }) => ended)).toEqual([true, true]);
  });
});
