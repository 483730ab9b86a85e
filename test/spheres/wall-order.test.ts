// The orders counted are compared with how values computed elsewhere grow towards the wall; rules of the zeros and poles:
// Hama, Hosomichi, Lee, arXiv:1102.4716 (s_b), Hama, Hosomichi, arXiv:1206.6359 (Upsilon), Lockhart, Vafa,
// arXiv:1210.5909 (S_3). Theories are our own.
import { describe, expect, test } from 'vitest';
import { numberFromFixed } from '../../engine/arithmetic/fixed';
import { evaluatePrecise } from '../../engine/numeric/precise';
import { analyse } from '../../engine/requests/analysis';
import { theoryChecks } from '../../engine/requests/theory-card';
import { quantity } from '../../engine/spheres/quantity';
import { valuesAt } from './evaluate';

interface Wall {
  readonly verdict: string;
  readonly says: string;
}

/** With a column of R-charges where the rows have chirals. */
function lines(sphere: string, group: string, rows: readonly string[]): string {
  const header = rows.some((row) => row.startsWith('chiral')) ? 'matter G R' : 'matter G';
  return [
    'theory lamp',
    `  sphere ${sphere}`,
    `  gauge G = ${group}`,
    `  ${header}`,
    ...rows.map((row) => `  ${row}`),
  ].join('\n');
}

function wallsIn(text: string): Wall[] {
  return theoryChecks(analyse(text).theories.get('lamp')).filter(({ id }) => id.startsWith('wall'));
}

/** The order from the values at two distances from the wall sigma = 0 of a rank 1 group; constant factors left out. */
function slope(text: string): number {
  const entry = analyse(text).theories.get('lamp');
  const theory = entry?.built?.theory;
  const sphere = entry?.sphere;
  if (!sphere || !theory) throw new Error('no theory');
  const product = (quantity(sphere, theory, 'one-loop') ?? []).filter(({ weights }) => weights !== null);
  const [near = 0, far = 0] = ['1/1000000', '1/1000'].map((sigma) => {
    const found = evaluatePrecise(product, valuesAt(sphere, theory, { sigma, flux: '0' }), 20);
    if (found.kind !== 'value') throw new Error(found.kind);
    return numberFromFixed(found.log.re, found.log.bits);
  });
  return (far - near) / Math.log(1000);
}

const CASES: readonly (readonly [string, readonly string[], number, string])[] = [
  ['S3', ['chiral x adj 1'], 2, 'holds'],
  ['S3', ['chiral x adj 0'], 0, 'holds'],
  ['S3', ['chiral x adj 0', 'chiral y adj 0'], -2, 'fails'],
  ['S3', ['chiral x adj -1'], -2, 'fails'],
  ['S3, b = 5/4', ['chiral x adj -1'], 2, 'holds'],
  ['S3', ['chiral x adj 2'], 4, 'holds'],
  ['S3', ['chiral x 2*fund 0'], -2, 'fails'],
  ['S3', ['hyper x adj'], 2, 'holds'],
  ['S4', ['hyper x adj'], 2, 'holds'],
  ['S5', ['hyper x adj'], 2, 'holds'],
  ['S2', ['chiral x adj 0'], 0, 'holds'],
];

describe('the order on the wall of SU(2)', () => {
  test.each(CASES)('%s with %s', (sphere, rows, order, verdict) => {
    const [wall, ...more] = wallsIn(lines(sphere, 'SU(2)', rows));
    expect(more).toEqual([]);
    expect(wall?.verdict).toBe(verdict);
    const words = order < 0 ? `pole of order ${-order}` : order === 0 ? 'is finite' : `vanishes to order ${order}`;
    expect(wall?.says).toContain(words);
    expect(slope(lines(sphere, 'SU(2)', rows))).toBeCloseTo(order, 2);
  });
});

describe('which walls are looked at', () => {
  test('one line for each length of root', () => {
    const walls = wallsIn(lines('S3', 'USp(4)', ['chiral x adj 0', 'chiral y fund 0']));
    expect(walls.map(({ says }) => /vector multiplet.*(?=\))/.exec(says)?.[0])).toEqual([
      'vector multiplet +2, $x$ -2, $y$ -2',
      'vector multiplet +2, $x$ -2',
    ]);
  });

  test('matter along no root, and matter with a mass of its own, are no matter for the walls', () => {
    expect(wallsIn(lines('S3', 'SU(3)', ['chiral x fund 1/2']))).toEqual([]);
    const text = lines('S3', 'SU(2)', ['chiral x adj 1 0']).replace(
      '  matter G R',
      '  flavor F = U(1)\n  matter G F R',
    );
    expect(wallsIn(text)).toEqual([]);
  });
});
