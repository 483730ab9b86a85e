import type { FailureResult, Progress, Result } from './result';

/** What the engine needs from its surroundings: a clock in seconds, and a way to say how far it is. */
export interface Surroundings {
  readonly now: () => number;
  /** Answers false when the work is no longer wanted. */
  readonly progress: (progress: Progress) => boolean;
  /** Digits for values that do not say; 30 where nobody says. */
  readonly digits: number;
}

/** Thrown out of a request whose work is no longer wanted. */
export class Unwanted extends Error {}

/** What an answer consists of besides the fields that `run` adds. */
export type Answer<R extends Result = Result> = R extends Result ? Omit<R, 'line' | 'request' | 'seconds'> : never;

export function failure(of: string, message: string): Answer<FailureResult> {
  return { kind: 'failure', of, notes: [], failure: { message } };
}
