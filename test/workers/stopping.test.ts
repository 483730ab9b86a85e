import { describe, expect, test, vi } from 'vitest';
import type { Progress } from '../../engine/requests/result';
import { createEngineApi } from '../../workers/api';
import { bench, engine, gate, isWanted, keyOf, options, settle, silent, TEXT } from './client-bench';

/* Stopping a request, over real message channels. What is promised stands in workers/types.ts; there is no outside source. */
describe('stopping', () => {
  const endless = () => ({ run: () => new Promise(() => {}), outline: (text: string) => text });

  test('answers null at once; what ends by itself keeps its worker', async () => {
    const { client, connections, restarts } = bench(() => ({
      run: async (_text: string, key: string, token: string) => {
        while (key === 'endless' && isWanted(token)) await settle();
        return `done ${key}`;
      },
    }));
    const stop = new AbortController();
    const first = client.run(TEXT, 'endless', 1, silent, stop.signal);
    const second = client.run(TEXT, 'next', 1, silent, new AbortController().signal);
    await settle();
    stop.abort();
    expect(await first).toBeNull();
    expect(await second).toBe('done next');
    expect(restarts.count).toBe(0);
    expect(connections.map(({ ended }) => ended)).toEqual([false]);
  });

  test('the engine leaves a request whose work is no longer wanted', async () => {
    let asked = 0;
    let time = 0;
    const api = createEngineApi(
      () => time++,
      () => ++asked < 2,
    );
    const key = await keyOf(bench(engine).client, TEXT);
    const steps: Progress[] = [];
    expect(api.run(TEXT, key, 'token', (step) => steps.push(step))).toBeNull();
    expect(steps.length).toBe(2);
  });

  test('what does not end has its worker ended, and its worker alone', async () => {
    vi.useFakeTimers({ toFake: ['setTimeout', 'clearTimeout'] });
    const { client, connections, restarts } = bench(endless);
    expect(await client.outline('text', options, 1)).toBe('text');
    const stop = new AbortController();
    const run = client.run(TEXT, 'k', 1, silent, stop.signal);
    await vi.advanceTimersByTimeAsync(20);
    stop.abort();
    expect(await run).toBeNull();
    await vi.advanceTimersByTimeAsync(3_900);
    expect(connections.map(({ ended }) => ended)).toEqual([false, false]);
    await vi.advanceTimersByTimeAsync(200);
    expect(connections.map(({ ended }) => ended)).toEqual([false, true]);
    expect(restarts.count).toBe(1);
    expect(await client.outline('text', options, 2)).toBe('text');
    expect(connections.length).toBe(2);
  });

  test('the next run has a new worker then', async () => {
    vi.useFakeTimers({ toFake: ['setTimeout', 'clearTimeout'] });
    let made = 0;
    const { client } = bench(() => {
      const own = ++made;
      return { run: () => (own === 1 ? new Promise(() => {}) : `from worker ${own}`) };
    });
    const stop = new AbortController();
    const first = client.run(TEXT, 'k', 1, silent, stop.signal);
    const second = client.run(TEXT, 'l', 1, silent, new AbortController().signal);
    await vi.advanceTimersByTimeAsync(20);
    stop.abort();
    expect(await first).toBeNull();
    await vi.advanceTimersByTimeAsync(5_000);
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
