import { type Analysis, analyse, isRequest } from '../../engine/requests/analysis';
import { problems } from '../../engine/requests/outline';
import type { Result } from '../../engine/requests/result';
import { run } from '../../engine/requests/run';

/** A clock that stands still, no interest in progress, 30 digits where none are asked for. */
export const SURROUNDINGS = { now: () => 0, progress: () => true, digits: 30 };

/** Answers of all requests of a notebook, in order. */
export function answers(...lines: readonly string[]): Result[] {
  return answersOf(analyse(lines.join('\n')));
}

export function answersOf(analysis: Analysis): Result[] {
  return analysis.notebook.blocks.filter(isRequest).map((request) => run(analysis, request, SURROUNDINGS));
}

/** The only answer; throws when there are more or fewer. */
export function answer(...lines: readonly string[]): Result {
  const [only, ...more] = answers(...lines);
  if (!only || more.length > 0) throw new Error(`${more.length + (only ? 1 : 0)} answers.`);
  return only;
}

/** Problems of a notebook as `line:column severity: message`. */
export function problemsOf(...lines: readonly string[]): string[] {
  return problems(analyse(lines.join('\n'))).map(
    ({ line, column, severity, message }) => `${line}:${column} ${severity}: ${message}`,
  );
}

/** Why a request failed; its kind where it did not. */
export function failureOf(result: Result): string {
  return result.kind === 'failure' ? result.failure.message : result.kind;
}
