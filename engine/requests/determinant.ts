import { addBalls, type Ball, expBall, magnitudeAbove, negateBall } from '../arithmetic/ball';
import { formatBall } from '../arithmetic/decimal-text';
import type { Form } from '../exact/form';
import type { Assignment, Quantity, ValueRequest } from '../language/tree';
import { isRemark } from '../spectrum/analyse';
import { partialProducts } from '../spectrum/partial-product';
import { determinant } from '../spectrum/regularised';
import type { Spectrum } from '../spectrum/tower';
import { agreement } from './agreement';
import type { Analysis } from './analysis';
import { type Answer, failure } from './answer';
import type { ValueResult } from './result';
import { sayRemark, unreadableSpectrum } from './spectrum-card';

type DeterminantQuantity = Extract<Quantity, { kind: 'determinant' }>;

/** Second routes of a determinant, in words. */
const ROUTES = {
  rootless: 'the zeta function of each whole eigenvalue, without its roots',
  roots: 'each eigenvalue by its roots',
  closed: 'the closed form, each function by its own routine',
  contour: 'each multiple Gamma function by a contour integral',
  further: 'the same sums from further steps',
} as const;

/** `value log determinant of dirac by operator, 40 digits`. */
export function runDeterminant(
  analysis: Analysis,
  quantity: DeterminantQuantity,
  request: ValueRequest,
  digits: number,
): Answer {
  const of = quantity.spectrum.name;
  const entry = analysis.spectra.get(of);
  if (!entry) return failure(of, `There is no spectrum \`${of}\` in this notebook.`);
  if (entry.spectrum === null) return failure(of, unreadableSpectrum(of));
  const values = assigned(analysis, request.at);
  if (typeof values === 'string') return failure(of, values);
  const found = determinant(entry.spectrum, quantity.prescription, values, digits);
  if (found.kind === 'refusal') return failure(of, sayRemark(found.remark));
  const value = quantity.log ? found.log : expBall(found.log, Math.ceil(digits * Math.log2(10)) + 32);
  if (value === null)
    return failure(of, 'The determinant is too large or too small to be written down; ask for its `log`.');
  const { crossCheck } = found;
  return {
    kind: 'value',
    of,
    notes: found.remarks.map(sayRemark),
    value: formatBall(value, digits),
    digits,
    crossCheck:
      crossCheck === null ? null : agreement(ROUTES[crossCheck.route], Math.min(digits, crossCheck.agreedDigits)),
    zeta0: formatBall(found.zeta0, digits),
    scale: formatBall(found.scale, digits),
    anomaly: formatBall(found.anomaly, digits),
    ...convergence(entry.spectrum, quantity, values, found.log),
  } satisfies Answer<ValueResult>;
}

/** Cut-offs at which the product is shown, and the digits it is computed to. */
const CUTOFFS = [10, 30, 100, 300, 1000];
/** In several indices the number of factors grows with a power of the cut-off. */
const CUTOFFS_EACH = [5, 10, 20, 40, 80];
const CONVERGENCE_DIGITS = 16;

/** Regulated partial products beside their limit; nothing where they are not defined. */
function convergence(
  spectrum: Spectrum,
  { prescription }: DeterminantQuantity,
  values: ReadonlyMap<string, Form>,
  limit: Ball,
): Pick<ValueResult, 'convergence'> {
  const cutoffs = spectrum.towers.some(({ ranges }) => ranges.length > 1) ? CUTOFFS_EACH : CUTOFFS;
  const products = partialProducts(spectrum, prescription, values, cutoffs, CONVERGENCE_DIGITS);
  if (isRemark(products)) return {};
  return {
    convergence: products.map(({ cutoff, sum, counterterms, regulated }) => {
      const difference = addBalls(regulated, negateBall(limit), 64);
      const size: Ball = { re: magnitudeAbove(difference), im: 0n, bits: difference.bits, error: 0n };
      return {
        cutoff,
        product: formatBall(sum, CONVERGENCE_DIGITS),
        counterterms: formatBall(counterterms, CONVERGENCE_DIGITS),
        regulated: formatBall(regulated, CONVERGENCE_DIGITS),
        distance: formatBall(size, 2).re,
      };
    }),
  };
}

/** Values set with `at`, closed by the notebook's parameters; a string says what is wrong. */
export function assigned(analysis: Analysis, at: readonly Assignment[]): ReadonlyMap<string, Form> | string {
  const values = new Map<string, Form>(analysis.values);
  const set = new Set<string>();
  for (const { name, value } of at) {
    const closed = value.form.substitute((symbol) => analysis.values.get(symbol) ?? null);
    const [open] = closed.symbols();
    if (open !== undefined) return `\`${name.name}\` is set to \`${value.text}\`, but \`${open}\` has no value.`;
    if (set.has(name.name)) return `\`${name.name}\` is set twice.`;
    set.add(name.name);
    values.set(name.name, closed);
  }
  return values;
}
