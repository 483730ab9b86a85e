import { Rational } from '../exact/rational';
import type { DominantCharacter } from './character';
import { type RootSystem, rootSystem } from './root-system';
import { conjugateLabels, scaledInnerProduct } from './weyl';

export type Reality = 'real' | 'pseudoreal' | 'complex';

/** Dimension by Weyl's formula, exact. */
export function dimension(system: RootSystem, labels: readonly number[]): bigint {
  let numerator = 1n;
  let denominator = 1n;
  for (const { coordinates } of system.positiveRoots) {
    let above = 0;
    let below = 0;
    coordinates.forEach((c, i) => {
      const scaled = c * (system.scaledHalfNorms[i] as number);
      above += scaled * ((labels[i] as number) + 1);
      below += scaled;
    });
    numerator *= BigInt(above);
    denominator *= BigInt(below);
  }
  return numerator / denominator;
}

/** The labels that belong to each simple part of a sum. */
export function splitLabels(system: RootSystem, labels: readonly number[]): number[][] {
  let start = 0;
  return system.types.map(({ rank }) => {
    start += rank;
    return labels.slice(start - rank, start);
  });
}

/** (lambda, lambda + 2 rho), twice the quadratic Casimir in the normalisation T(fundamental of SU(N)) = 1/2. */
export function doubledCasimir(system: RootSystem, labels: readonly number[]): Rational {
  const shifted = labels.map((label) => label + 2);
  return Rational.of(scaledInnerProduct(system, labels, shifted), system.gramDenominator);
}

/**
 * Second-order (Dynkin) index I2 for each simple part: trace of w(x)w(y) over the weights = I2 times the basic form;
 * 1 for the fundamental of SU(N), twice the dual Coxeter number for the adjoint.
 */
export function dynkinIndices(system: RootSystem, labels: readonly number[]): bigint[] {
  const parts = splitLabels(system, labels);
  const dimensions = system.types.map((type, k) => dimension(rootSystem(type), parts[k] as number[]));
  return system.types.map((type, k) => {
    const part = rootSystem(type);
    const others = dimensions.reduce((product, d, j) => (j === k ? product : product * d), 1n);
    const index = doubledCasimir(part, parts[k] as number[])
      .mul(Rational.of(dimensions[k] as bigint))
      .div(Rational.of(part.dimension));
    return index.numerator * others;
  });
}

/**
 * Cubic anomaly A, 1 for the fundamental of SU(N), N > 2: Tr_R F^3 = A Tr_fund F^3. With l = lambda + rho in traceless
 * coordinates, A = dim 2N / ((N^2-1)(N^2-4)) sum l_i^3. Zero for SU(2); null where no cubic invariant exists.
 */
export function cubicAnomaly(system: RootSystem, labels: readonly number[]): bigint | null {
  const type = system.types[0];
  if (system.types.length !== 1 || type?.series !== 'A') return null;
  if (type.rank === 1) return 0n;
  const n = BigInt(type.rank + 1);
  const rows: bigint[] = [0n];
  for (const label of [...labels].reverse()) rows.push((rows.at(-1) as bigint) + BigInt(label) + 1n);
  const total = rows.reduce((a, b) => a + b, 0n);
  // Coordinates times N are integers, so the sum carries N^3.
  const cubes = rows.reduce((a, row) => a + (n * row - total) ** 3n, 0n);
  return (dimension(system, labels) * 2n * cubes) / (n * n * (n * n - 1n) * (n * n - 4n));
}

/** Frobenius-Schur type: complex unless self-conjugate; then the sign (-1)^<lambda, 2 rho^vee>. */
export function realityOf(system: RootSystem, labels: readonly number[]): Reality {
  if (conjugateLabels(system, labels).some((label, i) => label !== labels[i])) return 'complex';
  // <lambda, 2 rho^vee> = sum over positive coroots; alpha^vee = sum c_i (alpha_i, alpha_i)/(alpha, alpha) alpha_i^vee.
  let sum = 0;
  for (const root of system.positiveRoots) {
    let norm = 0;
    let pairing = 0;
    root.coordinates.forEach((c, i) => {
      const scaled = c * (system.scaledHalfNorms[i] as number);
      norm += scaled * (root.labels[i] as number);
      pairing += scaled * (labels[i] as number);
    });
    sum += (2 * pairing) / norm;
  }
  return sum % 2 === 0 ? 'real' : 'pseudoreal';
}

/** Values of the centre characters, in the order of system.centre, each in 0..modulus-1. */
export function centreClass(system: RootSystem, labels: readonly number[]): number[] {
  return system.centre.map(({ modulus, coefficients }) => {
    const value = coefficients.reduce((sum, c, i) => sum + c * (labels[i] as number), 0) % modulus;
    return value < 0 ? value + modulus : value;
  });
}

/** Fourth moment q4 = sum over weights of (w,w)^2. */
export function fourthMoment(system: RootSystem, character: DominantCharacter): Rational {
  const rank = system.rank;
  let sum = 0n;
  for (let k = 0; k < character.count; k++) {
    const w = character.labels.subarray(k * rank, (k + 1) * rank);
    const norm = BigInt(scaledInnerProduct(system, w, w));
    const copies = BigInt(character.multiplicities[k] as number) * BigInt(character.orbitSizes[k] as number);
    sum += norm * norm * copies;
  }
  return Rational.of(sum, BigInt(system.gramDenominator) ** 2n);
}
