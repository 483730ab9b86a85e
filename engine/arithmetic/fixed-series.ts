import type { FixedComplex } from './fixed-complex';

/**
 * sum_{n < count} a_n z^n for real a_n. Horner's scheme for real z; else the real recurrence b_n = a_n + 2 Re(z) b_{n+1} - |z|^2 b_{n+2}
 * (Knuth, The Art of Computer Programming 2, 4.6.4), two real products a term. With |z| <= rho < 1 an error d made in every step
 * ends as at most d/(1 - rho)^2.
 */
export function powerSum(coefficients: readonly bigint[], count: number, z: FixedComplex, bits: number): FixedComplex {
  const shift = BigInt(bits);
  const { re, im } = z;
  let sum = 0n;
  if (im === 0n) {
    for (let n = count - 1; n >= 0; n--) sum = (coefficients[n] as bigint) + ((re * sum) >> shift);
    return { re: sum, im: 0n };
  }
  const twice = re << 1n;
  const norm = (re * re + im * im) >> shift;
  let before = 0n;
  for (let n = count - 1; n > 0; n--) {
    const next = (coefficients[n] as bigint) + ((twice * sum - norm * before) >> shift);
    before = sum;
    sum = next;
  }
  if (count <= 0) return { re: 0n, im: 0n };
  return { re: (coefficients[0] as bigint) + ((re * sum - norm * before) >> shift), im: (im * sum) >> shift };
}
