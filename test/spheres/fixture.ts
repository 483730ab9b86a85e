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

const rows: readonly Row[] = ['spheres', 'quivers'].flatMap((name): readonly Row[] => {
  const text = readFileSync(new URL(`../fixtures/spheres/${name}.json`, import.meta.url), 'utf8');
  const file: { rows: readonly Row[] } = JSON.parse(text);
  return file.rows;
});

/** A row of the reference files; throws where there is none. */
export function row(id: string): Row {
  const found = rows.find((candidate) => candidate.id === id);
  if (!found) throw new Error(`No row ${id}.`);
  return found;
}

/** The value of a row in doubles. */
export function reference(id: string): { readonly re: number; readonly im: number } {
  const { value } = row(id);
  if (!value) throw new Error(`No digits in ${id}.`);
  return { re: Number(value[0]), im: Number(value[1]) };
}
