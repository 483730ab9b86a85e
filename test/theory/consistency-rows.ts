import { readFileSync } from 'node:fs';
import type { Series } from '../../engine/lie/simple-type';
import { simplyConnected } from '../lie/named';

/** Dynkin labels and how many multiplets carry them. */
type Count = [number[], number];

/** Rows of the reference file about consistency, by their kind. */
export interface ConsistencyRow {
  kind: string;
  type?: Series;
  rank?: number;
  chirals?: (Count | [number[], number, number])[];
  hypers?: Count[];
  halfHypers?: Count[];
  level?: 'Z' | 'Z+1/2';
  N?: number;
  kTimes2?: number;
  kPrimeTimes2?: number;
  fund?: number;
  antifund?: number;
  detCharges?: [number, number][];
  allowed?: boolean;
  b?: number;
  conformal?: boolean;
  wittenAnomaly?: boolean;
  kappaTimes2?: number;
  sumCubic?: number;
  coefficient?: number;
  calabiYau?: boolean;
}

const file: { consistency: ConsistencyRow[] } = JSON.parse(
  readFileSync(new URL('../fixtures/lie/lie.json', import.meta.url), 'utf8'),
);

/** All rows of a kind, with the group's name and the cells of the charge table. Throws when there are none. */
export function consistencyRows(kind: string): { group: string; matter: string[]; row: ConsistencyRow }[] {
  const rows = file.consistency.filter((row) => row.kind === kind);
  if (rows.length === 0) throw new Error(`No row of kind ${kind}.`);
  return rows.map((row) => ({ group: groupName(row), matter: cells(row), row }));
}

function groupName({ type, rank, N }: ConsistencyRow): string {
  if (N !== undefined) return `U(${N})`;
  if (type === undefined || rank === undefined) throw new Error('A row without a group.');
  return simplyConnected({ series: type, rank });
}

const times = (count: number, cell: string): string[] => (count > 0 ? [`${count}*${cell}`] : []);

function cells(row: ConsistencyRow): string[] {
  if (row.N === undefined) return (row.chirals ?? []).flatMap(([labels, count]) => times(count, `[${labels.join()}]`));
  const power = (q: number): string => (row.N === 1 ? `${q}` : `(${new Array(row.N).fill(q).join()})`);
  return [
    ...times(row.fund ?? 0, row.N === 1 ? '1' : 'fund'),
    ...times(row.antifund ?? 0, row.N === 1 ? '-1' : 'anti'),
    ...(row.detCharges ?? []).flatMap(([q, count]) => times(count, power(q))),
  ];
}
