import { FormError } from '../exact/form';
import type { Request } from '../language/tree';
import { doubts } from './agreement';
import type { Analysis } from './analysis';
import { type Answer, failure, type Surroundings } from './answer';
import { runFormula } from './formula-request';
import { runPlot } from './plot';
import { runRepresentation } from './representation';
import { requestKey, requestText } from './request-text';
import type { Result } from './result';
import { runValue } from './value';

/**
 * Answers one request of a notebook. Never throws on what a user typed: what cannot be done is a failure in words.
 *
 * @throws Unwanted where `surroundings.progress` says that the work is no longer wanted.
 */
export function run(analysis: Analysis, request: Request, surroundings: Surroundings): Result {
  const start = surroundings.now();
  const answer = guarded(() => runByKind(analysis, request, surroundings), request.kind);
  return {
    ...answer,
    ...(answer.kind === 'value' ? { notes: [...doubts(answer.crossCheck, answer.digits), ...answer.notes] } : {}),
    line: analysis.lines.place(request.span.from).line,
    request: requestText(analysis.text, request.span),
    seconds: Math.max(0, surroundings.now() - start),
  } as Result;
}

/** Exact values may leave an expression undefined, a division by zero say; that is the user's to mend, and said. */
function guarded(work: () => Answer, of: string): Answer {
  try {
    return work();
  } catch (error) {
    if (error instanceof FormError) return failure(of, `${error.message} Change the values that lead to it.`);
    throw error;
  }
}

function runByKind(analysis: Analysis, request: Request, surroundings: Surroundings): Answer {
  switch (request.kind) {
    case 'formula':
      return runFormula(analysis, request);
    case 'value':
      return runValue(analysis, request, surroundings);
    case 'plot':
      return runPlot(analysis, request);
    case 'representation':
      return runRepresentation(request);
    case 'integrate':
      return failure(request.theory.name, notOffered('integrate', 'the integrand can be evaluated and plotted'));
    case 'extremize':
      return failure(
        request.theory.name,
        notOffered('extremize', 'the one-loop factor can be plotted over the parameter'),
      );
    case 'compare':
      return failure(
        request.theories.map(({ name }) => name).join(', '),
        notOffered('compare', 'both theories can be evaluated at points of your choice'),
      );
  }
}

function notOffered(word: string, instead: string): string {
  return `\`${word}\` is not offered yet; ${instead}.`;
}

/** The request whose card has a given key. */
export function findRequest(analysis: Analysis, key: string): Request | null {
  for (const block of analysis.notebook.blocks) {
    if (block.kind === 'prose' || block.kind === 'let' || block.kind === 'theory' || block.kind === 'spectrum')
      continue;
    if (requestKey(analysis, block) === key) return block;
  }
  return null;
}
