import fc from 'fast-check';

/**
 * Fixed point numbers between two bounds for any count of fraction bits: integers and what lies 2^-40 next to them, halves, 0,
 * and numbers with all digits.
 */
export function arbitraryFixed(from: number, to: number): fc.Arbitrary<(bits: number) => bigint> {
  const whole = fc.integer({ min: from, max: to });
  const digits = fc.bigInt({ min: 0n, max: (1n << 600n) - 1n });
  const cut = (value: bigint, bits: number): bigint =>
    bits >= 600 ? value << BigInt(bits - 600) : value >> BigInt(600 - bits);
  return fc.oneof(
    { weight: 1, arbitrary: whole.map((n) => (bits: number) => BigInt(n) << BigInt(bits)) },
    {
      weight: 1,
      arbitrary: whole.map((n) => (bits: number) => (BigInt(n) << BigInt(bits)) + (1n << BigInt(bits - 40))),
    },
    { weight: 1, arbitrary: whole.map((n) => (bits: number) => BigInt(2 * n + 1) << BigInt(bits - 1)) },
    {
      weight: 5,
      arbitrary: fc.tuple(fc.integer({ min: from, max: to - 1 }), digits).map(
        ([n, fraction]) =>
          (bits: number) =>
            (BigInt(n) << BigInt(bits)) + cut(fraction, bits),
      ),
    },
  );
}
