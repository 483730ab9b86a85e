import { Rational } from '../exact/rational';
import { integerDeterminant, type RootSystem, rootSystemSum } from './root-system';
import type { SimpleType } from './simple-type';

/**
 * Printed Cartan coordinates. They fall into blocks; the Weyl group of the printed subgroup permutes the entries of a
 * block, and in addition:
 * - `free`: nothing more (U(n));
 * - `traceless`: the sum of the entries vanishes, so weights are defined up to a multiple of (1,..,1);
 * - `signed`: changes any signs (B_n, C_n, and SU(2) with its single coordinate);
 * - `even-signed`: changes an even number of signs (D_n).
 */
export type BlockKind = 'free' | 'traceless' | 'signed' | 'even-signed';

export interface CoordinateBlock {
  readonly kind: BlockKind;
  readonly offset: number;
  readonly size: number;
}

/** Where the roots of a group lie: all that tells its coordinates from those of another group of the same type. */
export interface Layout {
  readonly types: readonly SimpleType[];
  readonly blocks: readonly CoordinateBlock[];
  /** Simple roots as linear functions of the printed coordinates, in Bourbaki order; entries are halves of integers. */
  readonly simpleRoots: readonly (readonly number[])[];
  /** The basic form (long roots of norm 2) is this multiple of the sum of the squared coordinates. */
  readonly basicScale: Rational;
}

const one = Rational.one;
const line = (length: number): number[] => Array.from({ length }, (_, i) => i);
const unit = (size: number, entries: Readonly<Record<number, number>>): number[] =>
  line(size).map((i) => entries[i] ?? 0);
const differences = (size: number, count = size - 1): number[][] =>
  line(count).map((i) => unit(size, { [i]: 1, [i + 1]: -1 }));

export function unitaryLayout(n: number): Layout {
  return {
    types: n > 1 ? [{ series: 'A', rank: n - 1 }] : [],
    blocks: [{ kind: 'free', offset: 0, size: n }],
    simpleRoots: differences(n),
    basicScale: one,
  };
}

export function specialUnitaryLayout(n: number): Layout {
  if (n === 2) return symplecticLayout(1);
  return { ...unitaryLayout(n), blocks: [{ kind: 'traceless', offset: 0, size: n }] };
}

/** USp(2n); n = 1 is SU(2) with weights sigma and -sigma. */
export function symplecticLayout(n: number): Layout {
  return {
    types: [n === 1 ? { series: 'A', rank: 1 } : { series: 'C', rank: n }],
    blocks: [{ kind: 'signed', offset: 0, size: n }],
    simpleRoots: [...differences(n), unit(n, { [n - 1]: 2 })],
    basicScale: Rational.of(2),
  };
}

/** SO(dimension) and Spin(dimension), dimension > 2, always in the coordinates of the vector's weights. */
export function orthogonalLayout(dimension: number): Layout {
  const n = Math.floor(dimension / 2);
  if (dimension % 2 === 1) {
    return {
      types: [n === 1 ? { series: 'A', rank: 1 } : { series: 'B', rank: n }],
      blocks: [{ kind: 'signed', offset: 0, size: n }],
      simpleRoots: [...differences(n), unit(n, { [n - 1]: 1 })],
      // The root of SO(3) is a single coordinate and must have norm 2.
      basicScale: n === 1 ? Rational.of(1, 2) : one,
    };
  }
  const fork = unit(n, { [n - 2]: 1, [n - 1]: 1 });
  const chain = differences(n);
  const blocks: CoordinateBlock[] = [{ kind: 'even-signed', offset: 0, size: n }];
  if (n === 2) {
    const a1: SimpleType = { series: 'A', rank: 1 };
    return { types: [a1, a1], blocks, simpleRoots: [...chain, fork], basicScale: one };
  }
  // A3 in the order that makes the spinor with an even number of minus signs the fundamental [1,0,0] of SU(4).
  if (n === 3) {
    const simpleRoots = [fork, ...chain];
    return { types: [{ series: 'A', rank: 3 }], blocks, simpleRoots, basicScale: one };
  }
  return { types: [{ series: 'D', rank: n }], blocks, simpleRoots: [...chain, fork], basicScale: one };
}

export type ExceptionalName = 'G2' | 'F4' | 'E6' | 'E7' | 'E8';

/**
 * Coordinates of a maximal classical subgroup: SU(3) in G2, Spin(9) in F4, SU(3)^3 in E6, SU(8) in E7, SU(9) in E8.
 * The smallest representations then have the weights +-s_i, 0 (G2); +-s_i, half sums, 0 (F4); s_i - u_j, u_i - t_j,
 * t_i - s_j for the triples s, t, u (E6); +-(s_i + s_j) (E7); s_i - s_j, +-(s_i + s_j + s_k), 0 (E8).
 */
export function exceptionalLayout(name: ExceptionalName): Layout {
  const traceless = (size: number, offset = 0): CoordinateBlock => ({ kind: 'traceless', offset, size });
  switch (name) {
    case 'G2':
      return {
        types: [{ series: 'G', rank: 2 }],
        blocks: [traceless(3)],
        simpleRoots: [unit(3, { 1: 1 }), unit(3, { 0: 1, 1: -1 })],
        basicScale: one,
      };
    case 'F4':
      return {
        types: [{ series: 'F', rank: 4 }],
        blocks: [{ kind: 'signed', offset: 0, size: 4 }],
        simpleRoots: [
          unit(4, { 1: 1, 2: -1 }),
          unit(4, { 2: 1, 3: -1 }),
          unit(4, { 3: 1 }),
          unit(4, { 0: 0.5, 1: -0.5, 2: -0.5, 3: -0.5 }),
        ],
        basicScale: one,
      };
    case 'E6':
      return {
        types: [{ series: 'E', rank: 6 }],
        blocks: [traceless(3), traceless(3, 3), traceless(3, 6)],
        simpleRoots: [
          unit(9, { 0: 1, 1: -1 }),
          unit(9, { 6: 1, 7: -1 }),
          unit(9, { 1: 1, 2: -1 }),
          unit(9, { 2: 1, 5: 1, 7: 1 }),
          unit(9, { 4: 1, 5: -1 }),
          unit(9, { 3: 1, 4: -1 }),
        ],
        basicScale: one,
      };
    case 'E7': {
      const [first, ...others] = differences(8, 6);
      return {
        types: [{ series: 'E', rank: 7 }],
        blocks: [traceless(8)],
        simpleRoots: [first as number[], unit(8, { 3: 1, 4: 1, 5: 1, 6: 1 }), ...others],
        basicScale: one,
      };
    }
    case 'E8': {
      const [seventh, ...others] = differences(9, 7).reverse();
      return {
        types: [{ series: 'E', rank: 8 }],
        blocks: [traceless(9)],
        simpleRoots: [seventh as number[], unit(9, { 5: 1, 6: 1, 7: 1 }), ...others],
        basicScale: one,
      };
    }
  }
}

/** Removes the part of a linear function that vanishes on the coordinates: its mean over every traceless block. */
function tracelessPart(vector: readonly number[], blocks: readonly CoordinateBlock[]): Rational[] {
  const result = vector.map((entry) => Rational.of(2 * entry, 2));
  for (const { kind, offset, size } of blocks) {
    if (kind !== 'traceless') continue;
    let sum = Rational.zero;
    for (let i = offset; i < offset + size; i++) sum = sum.add(result[i] as Rational);
    const mean = sum.div(Rational.of(size));
    for (let i = offset; i < offset + size; i++) result[i] = (result[i] as Rational).sub(mean);
  }
  return result;
}

export function dot(a: readonly Rational[], b: readonly Rational[]): Rational {
  return a.reduce((sum, entry, i) => sum.add(entry.mul(b[i] as Rational)), Rational.zero);
}

/** Simple coroots in printed coordinates: twice the root over its square, whatever the scale of the form. */
export function simpleCoroots(layout: Layout): Rational[][] {
  return layout.simpleRoots.map((root) => {
    const part = tracelessPart(root, layout.blocks);
    const factor = Rational.of(2).div(dot(part, part));
    return part.map((entry) => entry.mul(factor));
  });
}

/** The matrix that turns Dynkin labels into printed coordinates: weight = labels . rows / denominator. */
export interface WeightMap {
  readonly denominator: 1 | 2;
  readonly rows: readonly (readonly number[])[];
}

/** Rows are the fundamental weights; in a traceless (or free) block their last entry is zero. */
export function weightMap(layout: Layout): WeightMap {
  const system: RootSystem = rootSystemSum(layout.types);
  const determinant = integerDeterminant(system.cartan);
  const rows = system.gram.map((gramRow) => {
    // omega_i = sum_j (C^-1)_ij alpha_j, and gram_ij = adjugate_ij scaledHalfNorm_j.
    const adjugate = gramRow.map((entry, j) => entry / (system.scaledHalfNorms[j] as number));
    const size = layout.blocks.reduce((total, block) => total + block.size, 0);
    const sums = line(size).map((column) =>
      adjugate.reduce((total, c, j) => total + c * ((layout.simpleRoots[j] as readonly number[])[column] as number), 0),
    );
    const shifted = [...sums];
    for (const { kind, offset, size: width } of layout.blocks) {
      if (kind !== 'traceless' && kind !== 'free') continue;
      for (let i = offset; i < offset + width; i++) {
        shifted[i] = (sums[i] as number) - (sums[offset + width - 1] as number);
      }
    }
    return shifted.map((entry) => entry / determinant);
  });
  const denominator = rows.flat().every(Number.isInteger) ? 1 : 2;
  return { denominator, rows: rows.map((row) => row.map((entry) => entry * denominator)) };
}
