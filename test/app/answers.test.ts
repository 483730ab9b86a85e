// Which work is asked for, kept and stopped; rules of our own, there is no outside source.
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { createAnswers } from '../../app/state/answers';
import type { OutlineState } from '../../app/state/outline';
import { createStore } from '../../app/state/store';
import { heldClient, outlineOf, resultOf } from './follow';

beforeEach(() => {
  vi.useFakeTimers();
});
afterEach(() => {
  vi.useRealTimers();
});

function bench() {
  const held = heldClient();
  const first: OutlineState = {
    outline: null,
    cards: [],
    text: '',
    revision: 0,
    opened: 0,
    sound: new Map(),
    trouble: null,
  };
  const outline = createStore(first);
  const answers = createAnswers(outline, held.client);
  const show = (opened: number, ...keys: readonly string[]) => {
    const { revision } = outline.get();
    outline.set({ ...outline.get(), outline: outlineOf(...keys), text: keys.join(), revision: revision + 1, opened });
  };
  return { ...held, answers, show, stateOf: (key: string) => answers.state.get().byKey.get(key) };
}

const pass = (milliseconds: number) => vi.advanceTimersByTimeAsync(milliseconds);

test('a notebook just opened is answered at once, typing only after a pause', async () => {
  const { runs, show, stateOf } = bench();
  show(1, 'a');
  expect(runs.map(({ key }) => key)).toEqual(['a']);
  runs[0]?.answer(resultOf('1'));
  await pass(0);
  expect(stateOf('a')).toEqual({ state: 'done', result: resultOf('1') });
  show(1, 'ab');
  show(1, 'abc');
  await pass(100);
  expect(runs).toHaveLength(1);
  await pass(100);
  expect(runs.map(({ key }) => key)).toEqual(['a', 'abc']);
});

test('while a newer answer is on its way the last one stays, and an old key answers at once', async () => {
  const { runs, answers, show, stateOf } = bench();
  show(1, 'a');
  runs[0]?.answer(resultOf('1'));
  await pass(0);
  show(1, 'b');
  await pass(200);
  expect(answers.state.get().lastOf.get('value::1')).toEqual(resultOf('1'));
  expect(stateOf('b')?.state).toBe('working');
  show(1, 'a');
  await pass(200);
  expect(runs).toHaveLength(2);
  expect(runs[1]?.signal.aborted).toBe(true);
  expect(stateOf('a')?.state).toBe('done');
});

test('stopped work stays stopped, says how far it came, and starts again on the user’s word', async () => {
  const { runs, answers, show, stateOf } = bench();
  show(1, 'a');
  runs[0]?.progress({ done: 3, of: 9, says: 'three of nine' });
  expect(stateOf('a')).toEqual({ state: 'working', progress: { done: 3, of: 9, says: 'three of nine' } });
  answers.stop('a');
  expect(runs[0]?.signal.aborted).toBe(true);
  runs[0]?.answer(null);
  await pass(0);
  expect(stateOf('a')).toEqual({ state: 'stopped', progress: { done: 3, of: 9, says: 'three of nine' } });
  show(1, 'a');
  await pass(200);
  expect(runs).toHaveLength(1);
  answers.start('a');
  expect(runs).toHaveLength(2);
  runs[1]?.answer(resultOf('2'));
  await pass(0);
  expect(stateOf('a')).toEqual({ state: 'done', result: resultOf('2') });
});

test('work whose worker died is asked for again, a few times', async () => {
  const { runs, show, stateOf } = bench();
  show(1, 'a');
  for (let attempt = 0; attempt < 3; attempt += 1) {
    runs[attempt]?.answer(null);
    await pass(0);
  }
  expect(runs).toHaveLength(3);
  expect(stateOf('a')?.state).toBe('defect');
});

test('a defect is told, and another notebook begins afresh', async () => {
  const { runs, answers, show, stateOf } = bench();
  show(1, 'a', 'b');
  runs[0]?.answer(resultOf('1'));
  runs[1]?.fail(new Error('inside'));
  await pass(0);
  expect(stateOf('b')).toEqual({ state: 'defect', message: 'inside' });
  expect(answers.state.get().lastOf.size).toBe(1);
  show(2, 'c');
  expect(answers.state.get().lastOf.size).toBe(0);
});
