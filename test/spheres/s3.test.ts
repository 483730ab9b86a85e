import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { analyse } from '../../engine/requests/analysis';
import { s3 } from '../../engine/spheres/s3';
import type { Theory } from '../../engine/theory/theory';
import { type Contour, partitionFunction } from './contour-integral';
import { ballAt, exact, numberOf, productBall, productOf, valuesAt } from './evaluate';

/** Reference values with their sources and methods: test/fixtures/s3/notebooks.py. */
interface Row {
  readonly id: string;
  /** `Z`, or `F` = -log|Z|. */
  readonly quantity: 'Z' | 'F';
  readonly text: string;
  readonly value: readonly [string, string];
  readonly digits: number;
}

const { rows }: { rows: readonly Row[] } = JSON.parse(
  readFileSync(new URL('../fixtures/s3/notebooks.json', import.meta.url), 'utf8'),
);

function theoryIn({ text }: Row): Theory {
  const theory = analyse(text).theories.get('row')?.built?.theory;
  if (!theory) throw new Error(`Not read:\n${text}`);
  return theory;
}

const isFree = ({ text }: Row) => !text.includes('gauge');

/** Masses are charges under one U(1), whose mass is 1. */
const point = { m: '1' };

const LINE: Contour = { angle: 0, reach: 8, step: 0.05 };
/** Levels make the integrand a Gaussian on a line turned into the lower half plane on the right. */
const TURNED: Contour = { angle: Math.PI / 7, reach: 6, step: 0.05 };
const PURE: Contour = { angle: Math.PI / 4, reach: 3.5, step: 0.05 };

/** Where the default does not do: slow decay, near poles, two or three dimensions. */
const CONTOURS: Readonly<Record<string, Contour>> = {};

function contourOf({ id, text }: Row): Contour {
  const own = CONTOURS[id];
  if (own) return own;
  if (!text.includes('matter')) return PURE;
  return text.includes('level') ? TURNED : LINE;
}


describe('partition functions', () => {
  test.each(rows.filter((row) => !isFree(row)).map((row) => [row.id, row] as const))('%s', (_id, row) => {
    const start = performance.now();
    const z = partitionFunction(theoryIn(row), point, contourOf(row));
    const ms = performance.now() - start;
    const [re, im] = row.value.map(Number) as [number, number];
    const found = row.quantity === 'Z' ? z : { re: -Math.log(Math.hypot(z.re, z.im)), im: 0 };
    const off = Math.hypot(found.re - re, found.im - im) / (Math.hypot(re, im) || 1);
    console.log(row.id, off.toExponential(1), ms.toFixed(0));
    expect(off).toBeLessThan(1e-10);
  });
});
