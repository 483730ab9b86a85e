import type { Outline, Progress, Result } from '../../engine/requests/result';
import type { EngineClient } from '../../workers/types';

export interface Asked {
  readonly text: string;
  readonly key: string;
  readonly signal: AbortSignal;
  readonly progress: (progress: Progress) => void;
  readonly answer: (result: Result | null) => void;
  readonly fail: (error: Error) => void;
}

/** A client that answers when the test says so. */
export function heldClient() {
  const outlines: { readonly text: string; readonly answer: (outline: Outline | null) => void }[] = [];
  const runs: Asked[] = [];
  const unasked = () => Promise.reject(new Error('not asked for in this test'));
  const client: EngineClient = {
    outline: (text) => new Promise((answer) => outlines.push({ text, answer })),
    run: (text, key, _revision, progress, signal) =>
      new Promise((answer, fail) => runs.push({ text, key, signal, progress, answer, fail })),
    plotFast: unasked,
    document: unasked,
    weightPage: unasked,
    representations: unasked,
    hover: unasked,
    builtins: unasked,
    dispose: () => undefined,
    onRestart: () => undefined,
  };
  return { client, outlines, runs };
}

/** An outline with one request card a key. */
export function outlineOf(...keys: readonly string[]): Outline {
  return {
    title: '',
    problems: [],
    cards: keys.map((key, at) => ({
      kind: 'request',
      request: 'value',
      id: `value::${at + 1}`,
      span: { from: 10 * at, to: 10 * at + 9 },
      line: at + 1,
      caption: '',
      conditions: '',
      text: key,
      key,
      parameters: [],
    })),
  };
}

export const resultOf = (re: string): Result => ({
  kind: 'value',
  line: 1,
  request: '',
  of: '',
  seconds: 0,
  notes: [],
  value: { re, im: '0', error: '0' },
  digits: 1,
  crossCheck: null,
});

/** Lets promises that are due settle. */
export const settled = () => new Promise((done) => setTimeout(done, 0));
