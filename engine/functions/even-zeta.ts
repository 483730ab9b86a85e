import { piFixed } from '../arithmetic/fixed-constants';
import { evenBernoulliNumbers } from './bernoulli';
import { memoiseByKey } from './kernel-memo';

const lists = memoiseByKey<readonly bigint[]>(16);

/**
 * 2 zeta(2k) = |B_{2k}| (2 pi)^{2k}/(2k)! (DLMF 25.6.2) for k = 1, ..., count, with `bits` fraction bits, off by at most
 * 2 units each. Index 0 is k = 1.
 */
export function twiceEvenZeta(count: number, bits: number): readonly bigint[] {
  return lists(`${count}|${bits}`, () => {
    const working = bits + 32;
    const square = (4n * piFixed(working) * piFixed(working)) >> BigInt(working);
    const numbers = evenBernoulliNumbers(count);
    let power = 1n << BigInt(working);
    let factorial = 1n;
    return numbers.slice(0, count).map(({ numerator, denominator }, index) => {
      const twice = BigInt(2 * index + 2);
      power = (power * square) >> BigInt(working);
      factorial *= twice * (twice - 1n);
      const size = numerator < 0n ? -numerator : numerator;
      return ((power * size) / (denominator * factorial)) >> 32n;
    });
  });
}
