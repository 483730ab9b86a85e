import type { Ball } from '../../engine/arithmetic/ball';
import { absolute, numberFromFixed } from '../../engine/arithmetic/fixed';
import { piFixed } from '../../engine/arithmetic/fixed-constants';
import { Form } from '../../engine/exact/form';
import type { Spectrum, WrittenTower } from '../../engine/spectrum/tower';
import fixture from '../fixtures/spectra/spectra.json';
import { decimalFixed } from '../functions/decimal-fixed';
import { parseForm } from './parse-form';

export type Row = (typeof fixture.rows)[number];
type RowTower = Row['towers'][number];

export const rows: readonly Row[] = fixture.rows;

const nowhere = { from: 0, to: 0 };

export function writtenTower(tower: RowTower): WrittenTower {
  const to = 'to' in tower && typeof tower.to === 'number' ? Form.number(tower.to) : null;
  const indices = Object.entries(tower.indices).filter((entry): entry is [string, number] => entry[1] !== undefined);
  return {
    kind: 'power',
    exponent: parseForm(tower.exponent),
    eigenvalue: tower.eigenvalue.map((factor) => ({ form: parseForm(factor), power: 1 })),
    degeneracy: parseForm(tower.degeneracy),
    ranges: indices.map(([name, from]) => ({ name, from: Form.number(from), to, span: nowhere })),
    spans: { row: nowhere, eigenvalue: nowhere, degeneracy: nowhere },
    label: '',
  };
}

export function spectrumOf(towers: readonly RowTower[]): Spectrum {
  return { name: 'row', towers: towers.map(writtenTower), parameters: new Map() };
}

export function valuesOf(row: Row): Map<string, Form> {
  const entries = Object.entries(row.params).filter((entry): entry is [string, string] => typeof entry[1] === 'string');
  return new Map(entries.map(([name, text]) => [name, parseForm(text)]));
}

/** Distance of a ball from the printed number of a row, imaginary parts modulo 2 pi/turns (0: not). */
export function distanceFrom(ball: Ball, value: { re?: string; im?: string }, turns: number): number {
  const re = ball.re - decimalFixed(value.re ?? '0', ball.bits);
  let im = ball.im - decimalFixed(value.im ?? '0', ball.bits);
  if (turns > 0) {
    const turn = (2n * piFixed(ball.bits)) / BigInt(turns);
    im %= turn;
    if (2n * absolute(im) > turn) im -= im > 0n ? turn : -turn;
  }
  return Math.hypot(numberFromFixed(re, ball.bits), numberFromFixed(im, ball.bits));
}
