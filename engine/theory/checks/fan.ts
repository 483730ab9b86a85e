import { commonDivisor } from './integers';

/**
 * A fan of polyhedral cones known by its rays alone. It begins with simplicial cones and is refined by functions that
 * are linear on each of its cones (double description, T. S. Motzkin, H. Raiffa, G. L. Thompson, R. M. Thrall, Ann.
 * Math. Stud. 28 (1953) 51): where a function changes sign along a two-dimensional face, the face gets a new ray.
 * Of every ray only the signs of the functions used so far are kept, as bit sets; a cone is a set of rays whose signs
 * do not contradict each other.
 */
export class Fan {
  private rays: Ray[] = [];
  private functions = 0;
  private stepsLeft: number;
  private readonly rank: number;
  private readonly exact: boolean;

  /**
   * `rank` entries of each point are its coordinates; more may follow, linear on every cone. With `exact` all entries
   * are integers and stay so; else they are doubles and a value of a function counts as zero when `cut` is given zero.
   */
  constructor(rank: number, exact: boolean, steps = STEPS) {
    this.rank = rank;
    this.exact = exact;
    this.stepsLeft = steps;
  }

  /** A ray with the signs it has under the functions that bound the first cones, in the same order for all rays. */
  add(point: readonly number[], signs: readonly number[]): void {
    const ray: Ray = { point, above: [], below: [] };
    signs.forEach((sign, place) => {
      mark(ray, place, sign);
    });
    this.functions = signs.length;
    this.rays.push(ray);
  }

  get points(): readonly (readonly number[])[] {
    return this.rays.map(({ point }) => point);
  }

  /**
   * Refines the fan by the zeros of a function. False when that takes too long or the integers get too large; the fan
   * is then of no use.
   */
  cut(value: (point: readonly number[]) => number): boolean {
    const values = this.rays.map(({ point }) => value(point));
    const positive = this.rays.filter((_, k) => (values[k] as number) > 0);
    const negative = this.rays.filter((_, k) => (values[k] as number) < 0);
    if (positive.length === 0 || negative.length === 0) return true;
    const place = this.functions++;
    const size = new Map(this.rays.map((ray, k) => [ray, Math.abs(values[k] as number)]));
    const born: Ray[] = [];
    for (const up of positive) {
      for (const down of negative) {
        const common = this.faceOf(up, down);
        if (this.stepsLeft < 0) return false;
        if (common === null) continue;
        const point = this.between(up.point, size.get(down) as number, down.point, size.get(up) as number);
        if (point === null) return false;
        born.push({ point, ...common });
      }
    }
    for (const [k, ray] of this.rays.entries()) mark(ray, place, Math.sign(values[k] as number));
    this.rays.push(...born);
    return true;
  }

  /** Leaves out rays: what is kept has to be a union of cones. */
  keep(wanted: (point: readonly number[]) => boolean): void {
    this.rays = this.rays.filter(({ point }) => wanted(point));
  }

  /** The signs on the face of two rays, if they lie in one cone and no third ray lies in their face. */
  private faceOf(a: Ray, b: Ray): Pick<Ray, 'above' | 'below'> | null {
    const words = Math.max(a.above.length, b.above.length, a.below.length, b.below.length);
    const above: number[] = [];
    const below: number[] = [];
    for (let w = 0; w < words; w++) {
      above[w] = (a.above[w] ?? 0) | (b.above[w] ?? 0);
      below[w] = (a.below[w] ?? 0) | (b.below[w] ?? 0);
      if ((above[w] as number) & (below[w] as number)) return null;
    }
    for (const third of this.rays) {
      this.stepsLeft--;
      if (third !== a && third !== b && within(third.above, above) && within(third.below, below)) return null;
    }
    return { above, below };
  }

  /** a point + b other, divided by the largest common divisor (or the largest entry) of the coordinates. */
  private between(point: readonly number[], a: number, other: readonly number[], b: number): number[] | null {
    const sum = point.map((entry, k) => a * entry + b * (other[k] as number));
    if (!this.exact) {
      const largest = sum.slice(0, this.rank).reduce((most, entry) => Math.max(most, Math.abs(entry)), 0);
      return sum.map((entry) => entry / largest);
    }
    if (!sum.every(Number.isSafeInteger)) return null;
    const divisor = sum.slice(0, this.rank).reduce(commonDivisor, 0);
    return sum.map((entry) => entry / divisor);
  }
}

interface Ray {
  readonly point: readonly number[];
  /** Functions that are positive, and negative, on the ray. */
  readonly above: number[];
  readonly below: number[];
}

/** Comparisons of rays in one refinement: some tens of milliseconds. */
const STEPS = 4_000_000;
const BITS = 30;

function mark(ray: Ray, place: number, sign: number): void {
  if (sign === 0) return;
  const bits = sign > 0 ? ray.above : ray.below;
  const word = Math.floor(place / BITS);
  for (let w = bits.length; w <= word; w++) bits.push(0);
  bits[word] = (bits[word] as number) | (1 << (place % BITS));
}

function within(inner: readonly number[], outer: readonly number[]): boolean {
  for (let w = 0; w < inner.length; w++) if ((inner[w] as number) & ~(outer[w] ?? 0)) return false;
  return true;
}
