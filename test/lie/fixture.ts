import { readFileSync } from 'node:fs';
import type { Series, SimpleType } from '../../engine/lie/simple-type';

/** Reference values computed with GAP; test/fixtures/lie/README.md tells their origin. */
interface Fixture {
  groups: GroupRow[];
  irreps: IrrepRow[];
  tensor: TensorRow[];
  powers: PowerRow[];
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

export const fixture: Fixture = JSON.parse(readFileSync(new URL('../fixtures/lie/lie.json', import.meta.url), 'utf8'));

export function typeOf(row: TypeRow): SimpleType {
  return { series: row.type, rank: row.rank };
}
