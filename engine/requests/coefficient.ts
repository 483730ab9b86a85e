import { formatBall } from '../arithmetic/decimal-text';
import { Form } from '../exact/form';
import type { Gaussian } from '../exact/gaussian';
import type { ValueRequest } from '../language/tree';
import { formLatex } from '../latex/form';
import { evaluateCoefficient } from '../numeric/coefficient';
import type { SeriesOrder, Sphere } from '../spheres/sphere';
import type { Theory } from '../theory/theory';
import { agreedDigits, agreement } from './agreement';
import type { Analysis } from './analysis';
import { type Answer, failure } from './answer';
import { resolvePoint } from './point';
import type { ValueResult } from './result';
import type { Asked } from './subject';

/** The order that a quantity such as `instanton2` or `instanton(1, 2)` asks for; null for other quantities. */
export function coefficientOrder({ series }: Sphere, { what, orders }: Asked): SeriesOrder | null {
  if (orders !== undefined) return what.name === series?.name ? orders : null;
  const found = /^([A-Za-z]+)([1-9]\d?)$/.exec(what.name);
  return series !== undefined && found?.[1] === series.name ? Number(found[2]) : null;
}

/** `value instanton1 of ...`, `value instanton(1, 2) of ...`: a coefficient of a series, exact where the point is. */
export function runCoefficient(
  analysis: Analysis,
  { sphere, theory }: { readonly sphere: Sphere; readonly theory: Theory },
  { at, log, order, digits }: Pick<ValueRequest, 'at'> & { log: boolean; order: SeriesOrder; digits: number },
): Answer {
  const of = theory.name;
  const { series } = sphere;
  if (series === undefined) return failure(of, `There is no such series on ${sphere.name}.`);
  if (log) return failure(of, 'A coefficient is given by itself; leave out `log`.');
  const sum = series.coefficient(theory, order, false);
  if (sum.kind === 'refused') return failure(of, sum.message);
  const used = new Set(sum.terms.flatMap((term) => term.flatMap(({ value }) => value.symbols())));
  const resolved = resolvePoint(analysis, sphere, theory, at, [], 'error', used);
  if (resolved.kind === 'failure') return failure(of, resolved.message);
  const { values, notes } = resolved.point;
  const found = evaluateCoefficient(sum.terms, values, digits);
  switch (found.kind) {
    case 'pole':
      return failure(of, 'The point is a pole of this coefficient. Move it off the pole.');
    case 'unset':
      return failure(of, `No value for ${found.names.join(', ')}. Set them with \`at\`.`);
    case 'unreachable':
      return failure(
        of,
        'The value is out of reach: the point is too close to a pole, or its terms cancel completely.',
      );
    case 'value': {
      const other = series.coefficient(theory, order, true);
      const second = other.kind === 'sum' ? evaluateCoefficient(other.terms, values, digits) : null;
      return {
        kind: 'value',
        of,
        notes: [...notes, ...exactNote(found.exact), ...series.notes(theory)],
        value: formatBall(found.value, digits),
        digits,
        crossCheck:
          second?.kind === 'value'
            ? agreement('the sum with b and 1/b exchanged', agreedDigits(found.value, second.value, digits))
            : null,
      } satisfies Answer<ValueResult>;
    }
  }
}

/** Longer fractions are not written out. */
const LONGEST = 60;

function exactNote(exact: Gaussian | null): string[] {
  if (exact === null || exact.toString().length > LONGEST) return [];
  return [`Exactly $${formLatex(Form.gaussian(exact))}$.`];
}
