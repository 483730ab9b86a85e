import type { Ball } from '../arithmetic/ball';
import { formatBall } from '../arithmetic/decimal-text';
import type { ValueRequest } from '../language/tree';
import { evaluatePrecise, MAXIMAL_DIGITS, type PreciseValue, type Report } from '../numeric/precise';
import { elementary, namesIn } from '../spheres/quantity';
import type { TheoryProduct } from '../spheres/sphere';
import { agreedDigits, agreement } from './agreement';
import type { Analysis } from './analysis';
import { type Answer, failure, type Surroundings, Unwanted } from './answer';
import { coefficientOrder, runCoefficient } from './coefficient';
import { runDeterminant } from './determinant';
import { functionValue } from './function-value';
import { type Point, resolvePoint } from './point';
import type { ValueResult } from './result';
import { subjectName, theoryQuantity, unknownQuantity, unreadable } from './subject';

/** `value ...`: a number with its error, confirmed by a second route. */
export function runValue(analysis: Analysis, request: ValueRequest, surroundings: Surroundings): Answer {
  const digits = request.digits?.value ?? surroundings.digits;
  const of = subjectName(request.quantity);
  if (digits < 1 || digits > MAXIMAL_DIGITS) {
    return failure(of, `${digits} digits are out of reach: between 1 and ${MAXIMAL_DIGITS} can be had.`);
  }
  const { quantity } = request;
  if (quantity.kind === 'function') return functionValue(analysis, quantity, digits);
  if (quantity.kind === 'determinant') return runDeterminant(analysis, quantity, request, digits);
  const entry = analysis.theories.get(quantity.theory.name);
  const problem = unreadable(entry, quantity.theory.name);
  if (problem !== null || !entry?.built?.theory || !entry.sphere) return failure(of, problem ?? '');
  const { sphere } = entry;
  const { theory } = entry.built;
  const raw = theoryQuantity(entry, quantity);
  const order = raw === null ? coefficientOrder(sphere, quantity) : null;
  if (order !== null) {
    return runCoefficient(analysis, { sphere, theory }, { at: request.at, log: quantity.log, order, digits });
  }
  if (raw === null) return failure(of, unknownQuantity(entry, quantity));
  const resolved = resolvePoint(analysis, sphere, theory, request.at, [], 'error', namesIn(theory, raw));
  if (resolved.kind === 'failure') return failure(of, resolved.message);
  const simple = elementary(sphere, theory, raw).product;
  const report = (says: string) => (done: number, of: number) => {
    if (!surroundings.progress({ done, of, says })) throw new Unwanted();
  };
  const value = evaluatePrecise(simple, resolved.point.values, digits, 'main', report('function values'));
  if (value.kind !== 'value') return nonValue(of, value, quantity.log, resolved.point);
  return {
    kind: 'value',
    of,
    notes: resolved.point.notes,
    value: formatBall(quantity.log ? value.log : value.value, digits),
    digits,
    crossCheck: confirm(raw, simple, resolved.point, value.value, digits, report('second route')),
  } satisfies Answer<ValueResult>;
}

/** Zeros are values; everything else that is no number is said in words. */
function nonValue(of: string, value: Exclude<PreciseValue, { kind: 'value' }>, log: boolean, point: Point): Answer {
  switch (value.kind) {
    case 'zero':
      if (log) return failure(of, `The point is a zero of order ${value.order}: its logarithm is minus infinity.`);
      return {
        kind: 'value',
        of,
        notes: [...point.notes, `The point is a zero of order ${value.order}.`],
        value: { re: '0', im: '0', error: '0' },
        digits: 0,
        crossCheck: null,
      } satisfies Answer<ValueResult>;
    case 'pole':
      return failure(of, `The point is a pole of order ${value.order}: there is no value. Move it off the pole.`);
    case 'meeting':
      return failure(
        of,
        'At this point zeros of some factors meet poles of others. Move the point a little to see the limit.',
      );
    case 'indistinct':
      return failure(
        of,
        `The argument ${value.argument} cannot be told from a pole or a zero. Give the point exactly, or move it away.`,
      );
    case 'outside':
      return failure(of, `${value.why}. Change the charges, or the fluxes.`);
    case 'unset':
      return failure(of, `No value for ${value.names.join(', ')}. Set them with \`at\`.`);
    case 'unreachable':
      return failure(
        of,
        `The value is out of reach: ${value.why ?? 'too large or too small to be written down, or its argument is undefined'}.`,
      );
  }
}

/**
 * The same quantity by other formulas: the product before simplification, each function by its second algorithm. Where
 * a factor of the raw product is singular the simplified one is used.
 */
function confirm(
  raw: TheoryProduct,
  simple: TheoryProduct,
  point: Point,
  value: Ball,
  digits: number,
  report: Report,
): ValueResult['crossCheck'] {
  for (const [product, note] of [
    [raw, 'before simplification'],
    [simple, ''],
  ] as const) {
    const other = evaluatePrecise(product, point.values, digits, 'second', report);
    if (other.kind !== 'value') continue;
    if (other.route === null && product === simple) return null;
    const route = [other.route ?? 'the product of all factors', note].filter((part) => part !== '').join(', ');
    return agreement(route, agreedDigits(value, other.value, digits));
  }
  return null;
}
