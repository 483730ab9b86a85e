import { readFileSync } from 'node:fs';

/** A reference value: decimal digits, or an exact rational number. */
export interface Row {
  readonly id: string;
  readonly value?: readonly [string, string];
  readonly exact?: string;
  readonly digits?: number;
  readonly source: string;
  readonly how: string;
}

const file: { rows: readonly Row[] } = JSON.parse(
  readFileSync(new URL('../fixtures/spheres/spheres.json', import.meta.url), 'utf8'),
);

/** A row of the reference file; throws where there is none. */
export function row(id: string): Row {
  const found = file.rows.find((candidate) => candidate.id === id);
  if (!found) throw new Error(`No row ${id}.`);
  return found;
}

/** The value of a row in doubles. */
export function reference(id: string): { readonly re: number; readonly im: number } {
  const { value } = row(id);
  if (!value) throw new Error(`No digits in ${id}.`);
  return { re: Number(value[0]), im: Number(value[1]) };
}
