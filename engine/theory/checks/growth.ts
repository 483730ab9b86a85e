import { formDouble } from '../../arithmetic/form-double';
import { Form } from '../../exact/form';
import { Rational } from '../../exact/rational';
import type { Theory, TheoryGroup } from '../theory';
import type { CoulombBranch } from './coulomb-branch';
import type { WeightSums } from './gauge-weights';
import { leastMultiple } from './integers';
import { cocharacterLattice } from './lattice';
import { levelValue, rChargeValue } from './matter';

/**
 * How the integrand on the three-sphere grows along sigma = r n: its modulus as exp(-pi Q E(n) r) with
 * E(n) = R_V(n) + (2/Q) Im zeta(n), R_V(n) = (1/2) sum_w (1 - R) |w(n)| - sum_{a > 0} |a(n)| the R-charge of the bare
 * monopole of flux n; its phase turns as K_n, the form that the level and (1/2) sum_w |w(n)| w add up to.
 */
export interface Growth {
  /** True when E and K come as integers. */
  readonly exact: boolean;
  /** True when R_V comes as an integer. */
  readonly exactMonopoles: boolean;
  /** E and R_V times `scale`. */
  readonly scale: number;
  readonly exponent: (point: readonly number[], sums: readonly WeightSums[]) => number;
  readonly monopole: (point: readonly number[], sums: readonly WeightSums[]) => number;
  /** K_n on the lattice basis, times `phaseScale`. */
  readonly phaseScale: number;
  readonly phase: (point: readonly number[], sums: readonly WeightSums[]) => number[];
  /** Whether an imaginary FI parameter contributes. */
  readonly imaginaryFi: boolean;
}

/** Common denominators of R-charges up to this are worked with exactly. */
const DENOMINATOR_LIMIT = 1_000_000n;

export function growthOf(theory: Theory, branch: CoulombBranch): Growth {
  const charges = branch.matter.map(({ matter }) => rChargeValue(theory, matter.rCharge));
  const tilt = branch.groups.flatMap(({ group, index }) => {
    const { trace } = cocharacterLattice(group);
    const fi = (theory.groups[index] as TheoryGroup).fi;
    const size = fi === null ? Rational.zero : tiltOf(theory, fi);
    return trace.map((entry) => times(size, entry));
  });
  const { unit, matter, rootSum } = branch;
  const ofCharges = commonDenominator(charges, 1n);
  const ofAll = ofCharges === null ? null : commonDenominator(tilt, ofCharges);
  const factor = Number(ofAll ?? ofCharges ?? 1n);
  const scale = 2 * unit * factor;
  const scaled = (number: Rational | number, by: number): number =>
    typeof number === 'number' ? number * by : Number(number.numerator) * (by / Number(number.denominator));
  const weightOf = charges.map((charge, k) => (factor - scaled(charge, factor)) * (matter[k]?.copies ?? 0));
  const tilted = tilt.map((entry) => scaled(entry, scale));
  const monopole = (point: readonly number[], sums: readonly WeightSums[]): number => {
    let total = 0;
    for (const [k, one] of sums.entries()) total += (weightOf[k] as number) * one.spread;
    for (const [k, entry] of rootSum.entries()) total -= scale * entry * (point[k] as number);
    return total;
  };
  return {
    exact: ofAll !== null,
    exactMonopoles: ofCharges !== null,
    scale,
    monopole,
    exponent: (point, sums) =>
      monopole(point, sums) + tilted.reduce((sum, entry, k) => sum + entry * (point[k] as number), 0),
    ...phaseOf(theory, branch),
    imaginaryFi: tilted.some((entry) => entry !== 0),
  };
}

/** Null where a number is not rational, or the denominators get too large. */
function commonDenominator(numbers: readonly (Rational | number)[], start: bigint): bigint | null {
  let common = start;
  for (const number of numbers) {
    if (typeof number === 'number') return null;
    common = leastMultiple(common, number.denominator);
    if (common > DENOMINATOR_LIMIT) return null;
  }
  return common;
}

function times(size: Rational | number, entry: Rational): Rational | number {
  return typeof size === 'number' ? size * entry.toNumber() : size.mul(entry);
}

/** (2/Q) Im zeta; names without a value count as zero. */
function tiltOf(theory: Theory, fi: Form): Rational | number {
  const zeta = fi.substitute((name) => theory.parameters.get(name) ?? null).substitute(() => Form.zero);
  const exact = zeta.toGaussian()?.im;
  if (exact?.isZero()) return Rational.zero;
  const b = theory.geometry.get('@b') ?? Form.one;
  const q = b.add(b.inverse());
  const rational = q.toRational();
  if (exact !== undefined && rational !== null) return exact.add(exact).div(rational);
  const im = exact?.toNumber() ?? formDouble(zeta, () => null)?.im ?? Number.NaN;
  return (2 * im) / (formDouble(q, () => null)?.re ?? Number.NaN);
}

function phaseOf(theory: Theory, branch: CoulombBranch): Pick<Growth, 'phase' | 'phaseScale'> {
  const bare = levelMatrix(theory, branch);
  const denominator = bare.flat().reduce((least, { denominator: d }) => leastMultiple(least, d), 1n);
  const { unit, matter } = branch;
  const matrix = bare.map((row) =>
    row.map((entry) => 2 * unit * unit * Number((entry.numerator * denominator) / entry.denominator)),
  );
  const share = matter.map(({ matter: one, copies }) => (one.withDual ? 0 : copies * Number(denominator)));
  return {
    phaseScale: 2 * unit * unit * Number(denominator),
    phase: (point, sums) =>
      matrix.map((row, k) => {
        let total = 0;
        for (const [l, entry] of row.entries()) total += entry * (point[l] as number);
        for (const [m, one] of sums.entries()) total += (share[m] as number) * (one.moment[k] as number);
        return total;
      }),
  };
}

/** The form of all levels, mixed ones included, on the lattice bases. */
function levelMatrix(theory: Theory, branch: CoulombBranch): Rational[][] {
  const places = branch.groups.flatMap(({ group, index }, place) =>
    cocharacterLattice(group).trace.map((trace, k) => ({ group, index, place, trace, k })),
  );
  return places.map((x) =>
    places.map((y) => {
      let sum = Rational.zero;
      if (x.place === y.place) {
        const { level, abelianLevel } = theory.groups[x.index] as TheoryGroup;
        const k = levelValue(theory, level);
        if (!k.isZero()) sum = k.mul(cocharacterLattice(x.group).form[x.k]?.[y.k] as Rational);
        if (abelianLevel !== null) {
          const own = levelValue(theory, abelianLevel).sub(k).div(Rational.of(x.group.coordinateCount));
          sum = sum.add(own.mul(x.trace).mul(y.trace));
        }
      } else if (!x.trace.isZero() && !y.trace.isZero()) {
        for (const { groups, level } of theory.mixed) {
          if (groups.includes(x.index) && groups.includes(y.index)) {
            sum = sum.add(levelValue(theory, level).mul(x.trace).mul(y.trace));
          }
        }
      }
      return sum;
    }),
  );
}
