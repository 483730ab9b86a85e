import { expect, test } from 'vitest';
import { sinCosFixed } from '../../engine/arithmetic/fixed-trig';

// sin is odd and cos even (DLMF 4.21.2); a large negative argument once left the range of the tables, because BigInt
// division rounds towards zero.
test('sine and cosine of large arguments of either sign', () => {
  for (const bits of [80, 200, 700]) {
    for (const size of [10n ** 7n, 10n ** 20n + 3n, 10n ** 60n + 12345n]) {
      const plus = sinCosFixed(size << BigInt(bits), bits);
      const minus = sinCosFixed(-size << BigInt(bits), bits);
      expect(plus.cos - minus.cos).toSatisfy((d: bigint) => d >= -4n && d <= 4n);
      expect(plus.sin + minus.sin).toSatisfy((d: bigint) => d >= -4n && d <= 4n);
      const one = (plus.sin * plus.sin + plus.cos * plus.cos) >> BigInt(bits);
      expect(one - (1n << BigInt(bits))).toSatisfy((d: bigint) => d >= -16n && d <= 16n);
    }
  }
});

// mpmath 1.2.1 at 60 digits: sin(-10**20).
test('sin(-10^20) against mpmath', () => {
  const bits = 100;
  const { sin } = sinCosFixed(-(10n ** 20n) << BigInt(bits), bits);
  expect(Number(sin) / 2 ** bits).toBeCloseTo(0.6452512852657808, 14);
});
