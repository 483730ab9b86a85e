import { describe, expect, test, vi } from 'vitest';
import type { Progress } from '../../engine/requests/result';
import { bench, engine, gate, keyOf, options, PLOT, settle, silent, TEXT } from './client-bench';

/*
 * The page's client over real message channels, with the engine or a stand-in at the other end. What it promises stands
 * in workers/types.ts; there is no outside source.
 */
describe('answers of the engine', () => {
  test('are the same with a channel between as without', async () => {
    const { client } = bench(engine);
    const direct = engine();
    const key = await keyOf(client, TEXT);
    expect(await client.outline(TEXT, options, 1)).toEqual(direct.outline(TEXT, {}));
    expect(await client.run(TEXT, key, 1, silent, new AbortController().signal)).toEqual(
      direct.run(TEXT, key, 'token', silent),
    );
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
      run: async (_text: string, _key: string, _token: string, progress: (step: Progress) => void) => {
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

  test('two plots that follow one slider do not overtake each other', async () => {
    const { client } = bench(() => ({ plotFast: async (_text: string, key: string) => settle().then(() => key) }));
    const answers = ['one', 'two', 'one'].map((key) => client.plotFast(PLOT, key, { a: 2 }, 1));
    expect(await Promise.all(answers)).toEqual([null, 'two', 'one']);
  });

  test('an answer that came before the next call was made is kept', async () => {
    const { client } = bench(() => ({ outline: (text: string) => text }));
    expect(await client.outline('one', options, 1)).toBe('one');
    expect(await client.outline('two', options, 2)).toBe('two');
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
