import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import type { Form } from '../../engine/exact/form';
import { analyse } from '../../engine/requests/analysis';
import { s3 } from '../../engine/spheres/s3';
import type { Theory } from '../../engine/theory/theory';
import { theoryOf } from '../theory/theory-text';
import { type Contour, integral, partitionFunction } from './contour-integral';
import { ballAt, complexProgram, logAt, productOf, ratio, valuesAt } from './evaluate';

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

function theoryIn({ text }: Pick<Row, 'text'>): Theory {
  const theory = analyse(text).theories.get('row')?.built?.theory;
  if (!theory) throw new Error(`Not read:\n${text}`);
  return theory;
}

const isFree = ({ text }: Row) => !text.includes('gauge');
const isAbjm = ({ id }: Row) => id.startsWith('abjm');
const named = (list: readonly Row[]) => list.map((row) => [row.id, row] as const);

/** Masses are charges under one U(1), whose mass is 1. */
const point = { m: '1' };

/** A decimal, also with an exponent, times 2^bits. */
function fixed(text: string, bits: number): bigint {
  const [digits = '', exponent = '0'] = text.split('e');
  const [whole = '', part = ''] = digits.split('.');
  const power = Number(exponent) - part.length;
  const size = BigInt(whole + part) << BigInt(bits);
  return power < 0 ? size / 10n ** BigInt(-power) : size * 10n ** BigInt(power);
}

describe('free theories, to all digits of the reference', () => {
  test.each(named(rows.filter(isFree)))('%s', (_id, row) => {
    const theory = theoryIn(row);
    if (row.quantity === 'F') {
      expect(logAt(s3, theory, 'one-loop', point, 25)).toBeCloseTo(-Number(row.value[0]), 14);
      return;
    }
    const { re, im, bits, error } = ballAt(s3, theory, 'one-loop', point, row.digits);
    const [x, y] = row.value.map((text) => fixed(text, bits)) as [bigint, bigint];
    const size = ratio(x < 0n ? -x : x, bits) + ratio(y < 0n ? -y : y, bits);
    const off = Math.hypot(ratio(re - x, bits), ratio(im - y, bits));
    expect(off).toBeLessThanOrEqual(2 * 10 ** -row.digits * size + 2 * ratio(error, bits));
  });
});

/** Slow decay, poles near the real line: rank 1 costs nothing, so that one line does for all. */
const LINE: Contour = { angle: 0, reach: 14, step: 0.02 };
/** Levels make the integrand a Gaussian on a line turned into the lower half plane on the right. */
const TURNED: Contour = { ...LINE, angle: Math.PI / 7 };
const PURE: Contour = { angle: Math.PI / 4, reach: 3.5, step: 0.05 };

/** Two dimensions, and one row with an effective level of either sign, for which no turned line will do. */
const CONTOURS: Readonly<Record<string, Contour>> = {
  'u2-adj-1flavour-wz': { angle: 0, reach: 8, step: 0.05 },
  'u2-nf2-confining': { angle: 0, reach: 14, step: 0.07 },
  'g2-4fund': { angle: 0, reach: 6, step: 0.025 },
  'n4-u2-nf4-fi0': { angle: 0, reach: 6, step: 0.08 },
  'n4-u2-nf3-fi1_5': { angle: 0, reach: 10, step: 0.08 },
  'n4-usp4-nf5': { angle: 0, reach: 5, step: 0.06 },
  'n4-so5-nf4': { angle: 0, reach: 5, step: 0.06 },
  'n4-g2-nf4': { angle: 0, reach: 4, step: 0.05 },
  'n4-su3-nf6': { angle: 0, reach: 5, step: 0.06 },
  'n4-mirror-sqed3-A': { angle: 0, reach: 9, step: 0.1 },
  'n8-u2-adj-1fund': { angle: 0, reach: 9, step: 0.1 },
  'fmax-u2-nf4': { angle: 0, reach: 6, step: 0.06 },
  'gk-u2k1-nf2-A': { angle: Math.PI / 7, reach: 5, step: 0.07 },
  'fmax-cp-n3-k1_2': LINE,
};

function contourOf({ id, text }: Row): Contour {
  const own = CONTOURS[id];
  if (own) return own;
  if (!text.includes('matter')) return PURE;
  return text.includes('level') ? TURNED : LINE;
}

/** Relative distance to the reference; absolute where that is zero. */
function distanceTo({ quantity, value }: Row, z: { re: number; im: number }): number {
  const [re, im] = value.map(Number) as [number, number];
  const found = quantity === 'Z' ? z : { re: -Math.log(Math.hypot(z.re, z.im)), im: 0 };
  return Math.hypot(found.re - re, found.im - im) / (Math.hypot(re, im) || 1);
}

// One-loop factors, levels, FI parameters, mixed levels, masses, squashing and measure together.
describe('partition functions, by the trapezoid rule', () => {
  test.each(named(rows.filter((row) => !isFree(row) && !isAbjm(row))))('%s', (_id, row) => {
    expect(distanceTo(row, partitionFunction(theoryIn(row), point, contourOf(row)))).toBeLessThan(5e-11);
  });

  // U(1)_k x U(1)_{-k}: with x = s - i e tanh t and y = t, where s + t and t are the Coulomb parameters up to a shift,
  // e^{-i pi k x (x + 2y)} decays as e^{-2 pi k e |t|}; no pole is crossed for e < 1/2.
  test.each(named(rows.filter(isAbjm)))('%s, on a bent contour', (_id, row) => {
    const theory = theoryIn(row);
    const program = complexProgram(productOf(s3, theory, 'integrand'), ['x', 'y'], valuesAt(s3, theory, point));
    const bend = 0.3;
    const z = integral(
      [
        { reach: 5, step: 0.04 },
        { reach: 18, step: 0.05 },
      ],
      ([s, t]) => {
        const down = t.map((v) => -bend * Math.tanh(v));
        return program.at([s.map((v, k) => v + (t[k] as number)), t], [down, t.map(() => 0)]);
      },
    );
    expect(distanceTo(row, z)).toBeLessThan(5e-11);
  });
});

describe('a wrong convention would be seen', () => {
  const text = (id: string) => rows.find((row) => row.id === id)?.text ?? '';
  const off = (id: string, changed: string, at: Record<string, string> = point) => {
    const row = rows.find((candidate) => candidate.id === id);
    return row ? distanceTo(row, partitionFunction(theoryIn({ text: changed }), at, TURNED)) : Number.NaN;
  };

  test.each([
    ['the sign of the level', 'gk-u1k1-nf1-A', 'level 1', 'level -1'],
    ['the sign of the FI parameter', 'u1-half-chiral', 'fi 1/7', 'fi -1/7'],
    ['the sign of a charge', 'u1-half-chiral', 'Phi 1', 'Phi -1'],
    ['the R-charge', 'gk-u1k1-nf1-A', '2/5', '8/5'],
    ['the squashing', 'gk-u1k1-nf1-A', '6/5', '7/5'],
  ])('%s', (_what, id, right, wrong) => {
    expect(text(id)).toContain(right);
    expect(off(id, text(id))).toBeLessThan(5e-11);
    expect(off(id, text(id).replaceAll(right, wrong))).toBeGreaterThan(1e-3);
  });

  test('the sign of the mass', () => {
    const id = 'gk-u1k1-nf1-A';
    expect(off(id, text(id), { m: '-1' })).toBeGreaterThan(1e-3);
  });
});

// Names of quantities and what they hold: our own arrangement; the factors are those of the sources in engine/spheres/s3.
describe('quantities', () => {
  const theory = theoryOf([
    'sphere S3, b = 5/4',
    'gauge G = U(2), level 1, fi 1/3',
    'flavor F = SU(2), mass m',
    'matter G F R',
    'chiral q fund fund 1/3',
    'chiral p anti fund 1/5',
  ]);
  const at = { sigma1: '3/10', sigma2: '-7/10', m: '1/4' };
  const log = (what: string) => {
    const ball = ballAt(s3, theory, what, at);
    return Math.log(Math.hypot(ratio(ball.re, ball.bits), ratio(ball.im, ball.bits)));
  };

  test('the one-loop factor is that of the vector and of all multiplets', () => {
    expect(log('one-loop')).toBeCloseTo(log('vector') + log('q') + log('p'), 13);
    expect(log('integrand')).toBeCloseTo(log('classical') + log('one-loop'), 13);
  });

  // e^{-i pi k sum sigma^2 + 2 pi i zeta sum sigma}: a phase at real points.
  test('the classical factor is a phase', () => {
    const ball = ballAt(s3, theory, 'classical', at);
    const phase = Math.atan2(ratio(ball.im, ball.bits), ratio(ball.re, ball.bits));
    const expected = -Math.PI * (0.09 + 0.49) + ((2 * Math.PI) / 3) * -0.4;
    expect(Math.cos(phase - expected)).toBeCloseTo(1, 13);
    expect(log('classical')).toBeCloseTo(0, 13);
  });

  // 4 sinh(pi b x) sinh(pi x/b) at x = sigma1 - sigma2 = 1.
  test('the vector multiplet', () => {
    const b = 5 / 4;
    expect(log('vector')).toBeCloseTo(Math.log(4 * Math.sinh(Math.PI * b) * Math.sinh(Math.PI / b)), 13);
  });

  // U(n)_{k,k'}: k sum s^2 + (k' - k)/n (sum s)^2: Hsin, Seiberg 2016, arXiv:1607.07457, section 1.
  test('the level of the U(1) part', () => {
    const split = theoryOf(['gauge G = U(2), level 2, abelian 5', 'matter G R', 'chiral q fund 1/2']);
    const { re, im, bits } = ballAt(s3, split, 'classical', { sigma1: '3/10', sigma2: '1/10' });
    const expected = -Math.PI * (2 * 0.1 + 1.5 * 0.16);
    expect(ratio(re, bits)).toBeCloseTo(Math.cos(expected), 13);
    expect(ratio(im, bits)).toBeCloseTo(Math.sin(expected), 13);
  });

  test('on the round sphere nothing speaks of b', () => {
    const round = theoryOf(['gauge G = SU(3)', 'matter G R', 'chiral q fund 1/3']);
    const symbols = productOf(s3, round, 'one-loop').flatMap(({ argument, parameters }) =>
      [argument, ...parameters].flatMap((form: Form) => form.symbols()),
    );
    expect(new Set(symbols)).toEqual(new Set(['@w']));
  });

  test('N = 4 adds an adjoint chiral of R = 1, which is 1', () => {
    const lines = ['gauge G = SU(3)', 'flavor F = U(1), mass m', 'matter G F', 'hyper q fund 1'];
    const four = theoryOf(['supersymmetry 4', ...lines]);
    const here = { sigma1: '1/5', sigma2: '2/7', m: '1/3' };
    expect(productOf(s3, four, 'vector').length).toBeGreaterThan(productOf(s3, theoryOf(lines), 'vector').length);
    expect(logAt(s3, four, 'one-loop', here)).toBeCloseTo(logAt(s3, theoryOf(lines), 'one-loop', here), 13);
  });

  test('a half-hyper is one chiral of R = 1/2', () => {
    const lines = (kind: string) => ['gauge G = USp(4)', 'matter G', `${kind} q fund`];
    const here = { sigma1: '1/5', sigma2: '2/7' };
    const [half, whole] = [lines('halfhyper'), lines('hyper')].map((text) => logAt(s3, theoryOf(text), 'q', here));
    expect(2 * (half as number)).toBeCloseTo(whole as number, 13);
  });
});
