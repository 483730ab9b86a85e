import type { DoubleComplex } from '../arithmetic/double-complex';
import { formDouble } from '../arithmetic/form-double';
import type { ClosedForm } from './closed-form';
import { closedValue } from './closed-value';
import { pairingDouble } from './curve';
import type { Pairing } from './pairing';
import type { Values } from './prepare';

/** Values of open names at which a closed form is compared: positive, without relations among them. */
const SAMPLES: readonly (readonly number[])[] = [
  [0.3719, 0.6143, 0.2287, 0.8331, 0.4513],
  [1.2719, 1.7143, 1.4287, 1.1331, 1.8513],
  [2.5719, 3.1143, 2.7287, 3.7331, 2.2513],
];

/** Largest difference of the logarithms that counts as agreement; both sides are in doubles. */
const TOLERANCE = 1e-8;

/** A closed form that agreed with the series at some point, and how well. */
export interface ClosedCheck {
  readonly points: number;
  readonly worst: number;
}

/**
 * Compares a closed form, evaluated by the routines of its functions, with the series of the paired spectrum, at the
 * values of the notebook and at further ones. Null where it disagrees somewhere, or could be compared nowhere: points
 * outside the domain of a polylogarithm, and poles, do not count.
 */
export function checkClosed(
  pairing: Pairing,
  closed: ClosedForm,
  names: readonly string[],
  values: Values,
): ClosedCheck | null {
  let points = 0;
  let worst = 0;
  for (const point of pointsFor(names, values)) {
    const lookup = (name: string): DoubleComplex | null => point.get(name) ?? null;
    if (!inDomain(closed, lookup)) continue;
    const series = pairingDouble(pairing, lookup);
    const value = closedValue(closed, lookup);
    if (!Number.isFinite(series.re) || !Number.isFinite(value.re)) continue;
    const gap = distance(series, value);
    if (!(gap < TOLERANCE)) return null;
    points++;
    worst = Math.max(worst, gap);
  }
  return points === 0 ? null : { points, worst };
}

function pointsFor(names: readonly string[], values: Values): ReadonlyMap<string, DoubleComplex>[] {
  const points = SAMPLES.map(
    (sample) => new Map(names.map((name, k) => [name, { re: sampleOf(sample, k), im: 0 }] as const)),
  );
  const own = new Map<string, DoubleComplex>();
  for (const name of names) {
    const value = values.get(name);
    const rough = value === undefined ? null : formDouble(value, () => null);
    if (rough !== null) own.set(name, rough);
  }
  if (names.length === 0) return [own];
  return own.size === names.length ? [own, ...points] : points;
}

function sampleOf(sample: readonly number[], k: number): number {
  return (sample[k % sample.length] as number) + Math.floor(k / sample.length) * 0.0377;
}

/** Arguments of polylogarithms in 0 <= Re x < 1, Im x >= 0, where the reflection formula holds. */
function inDomain(closed: ClosedForm, lookup: (name: string) => DoubleComplex | null): boolean {
  return closed.exponent.every(({ of }) => {
    if (of.name !== 'polylogarithm') return true;
    const x = formDouble(of.argument, lookup);
    return x !== null && x.re > -1e-12 && x.re < 1 && x.im >= 0;
  });
}

/** Imaginary parts are compared modulo pi: half-integer powers leave a sign of the value open. */
function distance(a: DoubleComplex, b: DoubleComplex): number {
  const turns = (a.im - b.im) / Math.PI;
  return Math.hypot(a.re - b.re, (turns - Math.round(turns)) * Math.PI) / (1 + Math.abs(a.re));
}
