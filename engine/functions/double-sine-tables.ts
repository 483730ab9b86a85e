import type { FarTable } from './double-sine-far-table';
import { buildFarTable } from './double-sine-far-table';
import type { DoubleSineFrame } from './double-sine-frame';
import { doubleSineFrame } from './double-sine-frame';
import type { NearTable } from './double-sine-near-table';
import { buildNearTable } from './double-sine-near-table';
import type { ExactPeriod } from './double-sine-period';
import { reducedSquare } from './double-sine-period';

/** All tables of one b at one precision, each built when first used. */
export interface DoubleSineTables {
  readonly frame: DoubleSineFrame;
  /** Midpoint rule for |Re x| <= reach; equal arguments give the same table. */
  readonly near: (reach: number, stretch: number) => NearTable;
  /** Residues alone for Re x >= Q/4. */
  readonly far: () => FarTable;
}

/** Tables kept; a table at 1000 digits holds about 1.5 MB. */
const TABLES_KEPT = 12;
const NEAR_TABLES_KEPT = 4;

function makeTables(frame: DoubleSineFrame): DoubleSineTables {
  const near = new Map<string, NearTable>();
  let far: FarTable | null = null;
  return {
    frame,
    near: (reach, stretch) => {
      const key = `${reach} ${stretch}`;
      let table = near.get(key);
      if (table === undefined) {
        table = buildNearTable(frame, reach, stretch);
        if (near.size >= NEAR_TABLES_KEPT) near.clear();
        near.set(key, table);
      }
      return table;
    },
    far: () => {
      far ??= buildFarTable(frame, frame.q / 4);
      return far;
    },
  };
}

/** Pure memoisation: by the period's value (rational squares exactly, others to 96 bits below the last one asked for). */
const known = new Map<string, DoubleSineTables | null>();
/** The same by the object, which spares making the key. */
const knownByPeriod = new WeakMap<ExactPeriod, Map<number, DoubleSineTables | null>>();

/** Tables of log s_b for `bits` fraction bits; null where b^2 is too close to a rational number (see doubleSineFrame). */
export function doubleSineTables(b: ExactPeriod, bits: number): DoubleSineTables | null {
  const own = knownByPeriod.get(b) ?? new Map<number, DoubleSineTables | null>();
  const remembered = own.get(bits);
  if (remembered !== undefined) return remembered;
  const tables = tablesByValue(b, bits);
  if (own.size >= TABLES_KEPT) own.clear();
  own.set(bits, tables);
  knownByPeriod.set(b, own);
  return tables;
}

function tablesByValue(b: ExactPeriod, bits: number): DoubleSineTables | null {
  const square = reducedSquare(b);
  const key = square === null ? `${bits} ${b.value(bits + 96).toString(36)}` : `${bits} ${square.p}/${square.q}`;
  const remembered = known.get(key);
  if (remembered !== undefined) return remembered;
  const frame = doubleSineFrame(b, bits);
  const tables = frame === null ? null : makeTables(frame);
  if (known.size >= TABLES_KEPT) known.delete(known.keys().next().value as string);
  known.set(key, tables);
  return tables;
}
