import type { Request, Span } from '../language/tree';
import { type Analysis, subjects } from './analysis';

/** A stretch of work as typed: comments dropped, blanks folded. */
export function requestText(text: string, span: Span): string {
  return text
    .slice(span.from, span.to)
    .replace(/%[^\r\n]*/g, '')
    .replace(/\s+/g, ' ')
    .trim();
}

/** Everything an answer depends on, as text: the request, the theory or spectrum it names, and all parameters. */
export function requestKey(analysis: Analysis, request: Request): string {
  const parts = [requestText(analysis.text, request.span)];
  for (const { name } of subjects(request)) {
    const block = analysis.theories.get(name)?.block ?? analysis.spectra.get(name)?.block;
    if (block) parts.push(requestText(analysis.text, block.span));
  }
  for (const { block } of analysis.parameters.values()) parts.push(requestText(analysis.text, block.span));
  return parts.join('\n');
}
