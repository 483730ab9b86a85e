import { type DoubleValue, formDouble } from '../arithmetic/form-double';
import { Form } from '../exact/form';
import type { FunctionName } from '../functions/special-function';
import { functions } from '../functions/table';

/** Farthest lattice point, in steps of each kind, at which a zero or pole is looked for. */
const MAXIMAL_INDEX = 4096;
/** How near a lattice point has to be in doubles before the exact comparison is made. */
const NEAR = 1e-9;

/**
 * Order of a function at an exactly known argument: positive at a zero, negative at a pole, 0 elsewhere. Decided by
 * exact comparison of forms; argument and parameters must not hold symbols. Arguments that equal a lattice point by an
 * identity between unlike irrationals are not recognised; the precise tier then calls them indistinct.
 */
export function exactOrder(name: FunctionName, argument: Form, parameters: readonly Form[]): number {
  let order = 0;
  for (const lattice of functions[name].zeros) {
    const start = lattice.start(parameters);
    const steps = lattice.steps(parameters);
    const hits = latticeHits(argument.sub(start), steps);
    order += lattice.kind === 'zero' ? hits : -hits;
  }
  return order;
}

/** Number of ways to write the difference as a combination of the steps with non-negative integers. */
function latticeHits(difference: Form, steps: readonly Form[]): number {
  if (steps.length === 0) return difference.isZero() ? 1 : 0;
  const target = formDouble(difference, () => null);
  const sizes = steps.map((step) => formDouble(step, () => null));
  if (target === null || sizes.includes(null)) return 0;
  const numeric = sizes as { re: number; im: number }[];
  let hits = 0;
  const visit = (k: number, left: { re: number; im: number }, counts: number[]): void => {
    const step = numeric[k] as { re: number; im: number };
    const norm = step.re * step.re + step.im * step.im;
    const ratio = (left.re * step.re + left.im * step.im) / norm;
    if (k === numeric.length - 1) {
      const n = Math.round(ratio);
      if (n < 0 || n > MAXIMAL_INDEX) return;
      const scale = NEAR * (1 + Math.hypot(target.re, target.im));
      if (Math.hypot(left.re - n * step.re, left.im - n * step.im) > scale) return;
      const sum = Form.sum(steps.map((form, j) => form.scale(j === k ? n : (counts[j] as number))));
      if (difference.equals(sum)) hits++;
      return;
    }
    // Steps of one lattice lie in one half plane, so that counts are bounded by the distance still to go.
    const most = Math.min(MAXIMAL_INDEX, Math.floor(ratio + NEAR * (1 + Math.abs(ratio))));
    for (let n = 0; n <= most; n++) {
      visit(k + 1, { re: left.re - n * step.re, im: left.im - n * step.im }, [...counts, n]);
    }
  };
  visit(0, target, []);
  return hits;
}

/** A real point of a line at which a product vanishes (order > 0) or diverges (order < 0). */
export interface DivisorPoint {
  readonly at: number;
  readonly order: number;
}

/** Most lattice points looked at for one line; no plot can show as many. */
const MAXIMAL_POINTS = 300_000;

/**
 * Zeros and poles of f(c0 + c1 t)^power for real t in [from, to], in doubles: positions to about 1e-12 of the range.
 */
export function divisorOnLine(
  name: FunctionName,
  parameters: readonly Form[],
  c0: DoubleValue,
  c1: DoubleValue,
  from: number,
  to: number,
): DivisorPoint[] {
  const norm = c1.re * c1.re + c1.im * c1.im;
  if (norm === 0) return [];
  const found: DivisorPoint[] = [];
  for (const lattice of functions[name].zeros) {
    const start = formDouble(lattice.start(parameters), () => null);
    const steps = lattice.steps(parameters).flatMap((step) => formDouble(step, () => null) ?? []);
    if (start === null || steps.length < lattice.steps(parameters).length) continue;
    const order = lattice.kind === 'zero' ? 1 : -1;
    const toward = between(steps);
    const along = ({ re, im }: DoubleValue): number => re * toward.re + im * toward.im;
    const reach = Math.max(...[from, to].map((t) => along({ re: c0.re + c1.re * t, im: c0.im + c1.im * t })));
    const most = Math.floor(MAXIMAL_POINTS ** (1 / steps.length));
    const visit = (k: number, re: number, im: number): void => {
      const step = steps[k];
      if (!step) {
        const t = ((re - c0.re) * c1.re + (im - c0.im) * c1.im) / norm;
        const off = ((im - c0.im) * c1.re - (re - c0.re) * c1.im) / norm;
        if (Math.abs(off) <= NEAR && t >= from && t <= to) found.push({ at: t, order });
        return;
      }
      // Every step leads on in the direction `toward`, so that counts end where the line does.
      const left = (reach - along({ re, im })) / along(step);
      const last = Math.min(most, Math.floor(left + NEAR * (1 + Math.abs(left))));
      for (let n = 0; n <= last; n++) visit(k + 1, re + n * step.re, im + n * step.im);
    };
    visit(0, start.re, start.im);
  }
  return found;
}

/** A direction in which all steps lead: they lie in one half plane. */
function between(steps: readonly DoubleValue[]): DoubleValue {
  let re = 0;
  let im = 0;
  for (const step of steps) {
    const size = Math.hypot(step.re, step.im);
    re += step.re / size;
    im += step.im / size;
  }
  return { re, im };
}

/** Adds up orders at points that coincide; points of total order 0 are dropped. */
export function mergeDivisor(points: readonly DivisorPoint[]): DivisorPoint[] {
  const sorted = [...points].sort((a, b) => a.at - b.at);
  const merged: DivisorPoint[] = [];
  for (const point of sorted) {
    const last = merged.at(-1);
    if (last && Math.abs(point.at - last.at) <= NEAR * (1 + Math.abs(point.at))) {
      merged[merged.length - 1] = { at: last.at, order: last.order + point.order };
    } else merged.push(point);
  }
  return merged.filter(({ order }) => order !== 0);
}
