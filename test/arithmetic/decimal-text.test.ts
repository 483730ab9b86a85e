import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Ball } from '../../engine/arithmetic/ball';
import { formatBall, LARGEST_DECIMAL_EXPONENT, parseDecimal } from '../../engine/arithmetic/decimal-text';

/** Exact fraction of printed text, read without the module under test. */
function fraction(text: string): { numerator: bigint; denominator: bigint } {
  const match = /^(-?)(\d+)(?:\.(\d+))?(?:e(-?\d+))?$/.exec(text);
  if (match === null) throw new Error(`not a decimal number: ${text}`);
  const [, sign, whole = '', places = '', exponent = '0'] = match;
  const digits = BigInt(whole + places) * (sign === '-' ? -1n : 1n);
  const power = Number(exponent) - places.length;
  return power >= 0
    ? { numerator: digits * 10n ** BigInt(power), denominator: 1n }
    : { numerator: digits, denominator: 10n ** BigInt(-power) };
}

/** |a/2^bits - text|^2 as an exact fraction compared through doubles would lose the point: compare integers. */
function withinBound(ball: Ball, printed: { re: string; im: string; error: string }): boolean {
  const re = fraction(printed.re);
  const im = fraction(printed.im);
  const bound = fraction(printed.error);
  const scale = re.denominator * im.denominator * bound.denominator;
  const one = 1n << BigInt(ball.bits);
  const size = (v: bigint) => (v < 0n ? -v : v);
  // Distance of the centre plus the error of the ball, at most the bound: checked with |x| + |y| >= hypot and exactly with squares.
  const dx = size(ball.re * scale - (re.numerator * scale * one) / re.denominator);
  const dy = size(ball.im * scale - (im.numerator * scale * one) / im.denominator);
  const left = (bound.numerator * scale * one) / bound.denominator - ball.error * scale;
  return left >= 0n && dx * dx + dy * dy <= left * left;
}

describe('decimal text to exact fractions', () => {
  test.each([
    ['0', 0n, 1n],
    ['-1.25e-3', -125n, 100000n],
    ['+.5', 5n, 10n],
    ['3.', 3n, 1n],
    ['1e3', 1000n, 1n],
    ['123456789012345678901234567890.5', 1234567890123456789012345678905n, 10n],
    ['12.50E+1', 125n, 1n],
  ])('%s', (text, numerator, denominator) => {
    expect(parseDecimal(text)).toEqual({ numerator, denominator });
  });

  test.each([
    '',
    '.',
    '1e',
    '0x10',
    'Infinity',
    'NaN',
    '1_0',
    '--1',
    '1e99999999',
    `1e${LARGEST_DECIMAL_EXPONENT + 1}`,
  ])('refuses %s', (text) => {
    expect(parseDecimal(text)).toBeNull();
  });
});

describe('balls as decimal text', () => {
  const one = 1n << 200n;

  test('digits end where the error starts', () => {
    const third: Ball = { re: one / 3n, im: 0n, bits: 200, error: 1n << 100n };
    expect(formatBall(third, 60)).toEqual({ re: '0.33333333333333333333333333333', im: '0', error: '5e-30' });
    expect(formatBall({ ...third, error: 1n }, 10)).toEqual({ re: '0.3333333333', im: '0', error: '4e-11' });
  });

  test('a part smaller than the error prints 0, and the error covers it', () => {
    const ball: Ball = { re: one, im: 1n << 90n, bits: 200, error: 1n << 100n };
    const printed = formatBall(ball, 60);
    expect(printed.im).toBe('0');
    expect(printed.re).toMatch(/^1\.0+$/);
    expect(withinBound(ball, printed)).toBe(true);
  });

  test('exact numbers print without trailing zeros', () => {
    expect(formatBall({ re: -5n, im: 3n, bits: 1, error: 0n }, 20)).toEqual({ re: '-2.5', im: '1.5', error: '0' });
    expect(formatBall({ re: 0n, im: 0n, bits: 7, error: 0n }, 20)).toEqual({ re: '0', im: '0', error: '0' });
  });

  test('tiny and huge values are in scientific notation', () => {
    expect(formatBall({ re: 1n, im: 0n, bits: 100, error: 0n }, 8)).toEqual({
      re: '7.8886091e-31',
      im: '0',
      error: '5e-39',
    });
    expect(formatBall({ re: 1n, im: 0n, bits: -100, error: 0n }, 8).re).toBe('1.2676506e30');
  });

  test('nothing known: only the error is printed', () => {
    expect(formatBall({ re: 0n, im: 0n, bits: 0, error: 7n }, 8)).toEqual({ re: '0', im: '0', error: '7' });
    expect(formatBall({ re: 1n, im: 0n, bits: 1, error: 9n }, 8)).toEqual({ re: '0', im: '0', error: '5' });
  });

  test('the printed error always covers the true distance, and digits are right to one unit', () => {
    const ball = fc
      .tuple(
        fc.bigInt(-(1n << 220n), 1n << 220n),
        fc.integer({ min: 0, max: 220 }),
        fc.bigInt(-(1n << 220n), 1n << 220n),
      )
      .chain(([re, drop, im]) =>
        fc.record({
          re: fc.constant(re),
          im: fc.constant(im >> BigInt(drop)),
          bits: fc.integer({ min: 0, max: 400 }),
          error: fc.oneof(fc.constant(0n), fc.bigInt(0n, 1n << 120n), fc.bigInt(0n, 1n << 225n)),
        }),
      );
    fc.assert(
      fc.property(ball, fc.integer({ min: 1, max: 70 }), (value, digits) => {
        const printed = formatBall(value, digits);
        expect(withinBound(value, printed)).toBe(true);
        const significant = (text: string) => text.replace(/e.*$/, '').replace(/[-.]/g, '').replace(/^0+/, '').length;
        expect(Math.max(significant(printed.re), significant(printed.im))).toBeLessThanOrEqual(digits + 1);
      }),
      { numRuns: 400 },
    );
  });
});

// Source: the decimal conversion of integers that the platform has.
test.each([20_000, -12_000])('2^%i, known to 150 bits', (power) => {
  const ball: Ball = { re: 1n << 150n, im: 0n, bits: 150 - power, error: 1n };
  const printed = formatBall(ball, 40);
  // 2^-n = 5^n 10^-n.
  const exact = (power > 0 ? 2n ** BigInt(power) : 5n ** BigInt(-power)).toString();
  const exponent = exact.length - 1 + Math.min(0, power);
  const [digits, shown] = printed.re.split('e');
  expect(Number(shown)).toBe(exponent);
  expect((digits as string).replace('.', '').slice(0, 38)).toBe(exact.slice(0, 38));
  expect(printed.error.endsWith(`e${exponent - 39}`) || printed.error.endsWith(`e${exponent - 40}`)).toBe(true);
});
