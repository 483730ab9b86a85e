import { readFileSync } from 'node:fs';
import type { Series, SimpleType } from '../../engine/lie/simple-type';

/** Reference values computed with GAP; test/fixtures/lie/README.md tells their origin. */
interface Fixture {
  groups: GroupRow[];
  irreps: IrrepRow[];
  tensor: TensorRow[];
  powers: PowerRow[];
  consistency: ConsistencyRow[];
}

interface TypeRow {
  type: Series;
  rank: number;
}

export interface GroupRow extends TypeRow {
  dim: number;
  cartan: number[][];
  halfRootNorms: string[];
  highestRoot: number[];
  marks: number[];
  coxeter: number;
  dualCoxeter: number;
  weylOrder: number;
  exponents: number[];
  detCartan: number;
  positiveRoots: number;
  centre: number[];
  centreClass: [number, number[]][];
  unitMeasureFactorSimplyConnected: number;
  basicFormFactor: number;
}

export interface IrrepRow extends TypeRow {
  dynkin: number[];
  name?: string;
  dim: number;
  i2: number;
  c2: string;
  cubic: number | null;
  fs: 1 | 0 | -1;
  conjugate: number[];
  class: number[];
  q4: string;
  weights: number;
  dominant: [number[], number][];
}

export interface TensorRow extends TypeRow {
  a: number[];
  b: number[];
  dims: [number, number];
  result: [number[], number, number][];
}

export interface PowerRow extends TypeRow {
  dynkin: number[];
  kind: 'sym' | 'alt';
  power: number;
  result: [number[], number, number][];
}

/** Dynkin labels and how many multiplets carry them. */
export type Counted = readonly [number[], number];

export type ConsistencyRow =
  | (TypeRow & { kind: '3d-parity'; chirals: Counted[]; sumI2: number; level: 'Z' | 'Z+1/2' })
  | (TypeRow & { kind: '4d-N2'; hypers: Counted[]; halfHypers: Counted[]; b: number; wittenAnomaly: boolean })
  | (TypeRow & { kind: '4d-N1'; chirals: Counted[]; b: number; cubic?: number })
  | (TypeRow & { kind: '5d-level'; hypers: Counted[]; kappaTimes2: number; sumCubic: number; allowed: boolean })
  | {
      kind: '3d-parity-U';
      N: number;
      kTimes2: number;
      kPrimeTimes2: number;
      fund: number;
      antifund: number;
      detCharges: [number, number][];
      allowed: boolean;
    }
  | { kind: '2d-FI'; N: number; chirals: [number[], number, number][]; coefficient: number; calabiYau: boolean };

export const fixture: Fixture = JSON.parse(readFileSync(new URL('../fixtures/lie/lie.json', import.meta.url), 'utf8'));

export function typeOf(row: TypeRow): SimpleType {
  return { series: row.type, rank: row.rank };
}
