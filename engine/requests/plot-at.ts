import { Form } from '../exact/form';
import { Rational } from '../exact/rational';
import { type Analysis, analyse } from './analysis';
import type { FailureResult, PlotResult } from './result';
import { findRequest, run } from './run';

/**
 * A plot with parameters at other values than the text gives them, while a slider moves; null when the text has no
 * such plot.
 */
export function plotAt(
  analysis: Analysis,
  key: string,
  overrides: Readonly<Record<string, number>>,
): PlotResult | FailureResult | null {
  const request = findRequest(analysis, key);
  if (request?.kind !== 'plot') return null;
  const values = new Map<string, Form>();
  for (const [name, value] of Object.entries(overrides)) {
    const exact = Number.isFinite(value) ? Rational.parse(`${value}`) : null;
    if (exact !== null) values.set(name, Form.number(exact));
  }
  const moved = analyse(analysis.text, values);
  const result = run(moved, request, { now: () => 0, progress: () => true, digits: 15 });
  return result.kind === 'plot' || result.kind === 'failure' ? result : null;
}
