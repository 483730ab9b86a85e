import { describe, expect, test } from 'vitest';
import { fixedFromRatio, numberFromFixed } from '../../engine/arithmetic/fixed';
import { logComplex } from '../../engine/arithmetic/fixed-complex';
import { Rational } from '../../engine/exact/rational';
import { farPoint } from '../../engine/functions/euler-maclaurin';
import { scaledHurwitz } from '../../engine/functions/hurwitz-derivative';

/** B_0, ..., B_16 (DLMF table 24.2.3). */
const BERNOULLI = [
  '1',
  '-1/2',
  '1/6',
  '0',
  '-1/30',
  '0',
  '1/42',
  '0',
  '-1/30',
  '0',
  '5/66',
  '0',
  '-691/2730',
  '0',
  '7/6',
]
  .concat(['0', '-3617/510'])
  .map((text) => Rational.parse(text) as Rational);

interface Exact {
  readonly re: Rational;
  readonly im: Rational;
}

const times = (a: Exact, b: Exact): Exact => ({
  re: a.re.mul(b.re).sub(a.im.mul(b.im)),
  im: a.re.mul(b.im).add(a.im.mul(b.re)),
});

/** W^{-k} zeta(-k, W) = -B_{k+1}(W)/((k + 1) W^k) (DLMF 25.11.14), exactly. */
function wanted(k: number, w: Exact): Exact {
  let value: Exact = { re: Rational.zero, im: Rational.zero };
  let binomial = Rational.one;
  for (let j = 0; j <= k + 1; j++) {
    value = times(value, w);
    value = { re: value.re.add(binomial.mul(BERNOULLI[j] as Rational)), im: value.im };
    binomial = binomial.mul(Rational.of(k + 1 - j, j + 1));
  }
  const norm = w.re.mul(w.re).add(w.im.mul(w.im));
  const inverse = { re: w.re.div(norm), im: w.im.div(norm).mul(Rational.of(-1)) };
  for (let j = 0; j < k; j++) value = times(value, inverse);
  const factor = Rational.of(-1, k + 1);
  return { re: value.re.mul(factor), im: value.im.mul(factor) };
}

describe('zeta(-k, W) where the expansion is a finite sum: the error stated is kept', () => {
  test.each([40, 90, 200])('%i bits', (bits) => {
    for (const [x, y] of [
      [40, 3],
      [9, 31],
      [-30, 28],
      [-48, 14],
      [3, 4],
    ] as const) {
      const w = { re: Rational.of(x), im: Rational.of(y) };
      const at = { re: BigInt(x) << BigInt(bits), im: BigInt(y) << BigInt(bits) };
      const point = farPoint(at, bits);
      for (let k = 1; k <= 15; k++) {
        for (const weight of [-60, 0, k * point.log2Size]) {
          const { value, error } = scaledHurwitz(point, -k, logComplex(at, bits), weight);
          const exact = wanted(k, w);
          const off = [
            value.re - fixedFromRatio(exact.re.numerator, exact.re.denominator, bits),
            value.im - fixedFromRatio(exact.im.numerator, exact.im.denominator, bits),
          ].map((part) => numberFromFixed(part, 0));
          expect(Math.hypot(...off), `k = ${k}, W = ${x} + ${y} i, weight ${weight}`).toBeLessThanOrEqual(
            Number(error) + 1,
          );
        }
      }
    }
  });
});
