import { memoiseBounded } from './memo';

/** Extra bits against the rounding of at most 2^20 series terms. */
const GUARD = 24;

/** sum_k sign^k / ((2k+1) n^(2k+1)): atanh(1/n) for sign 1, atan(1/n) for sign -1, with the given fraction bits. */
function inverseTangentSeries(n: bigint, sign: 1n | -1n, bits: number): bigint {
  const square = n * n;
  let power = (1n << BigInt(bits)) / n;
  let sum = power;
  for (let odd = 3n; power !== 0n; odd += 2n) {
    power = (sign * power) / square;
    sum += power / odd;
  }
  return sum;
}

/** Constants are computed at multiples of 256 bits and cut from there, so that close precisions share one series. */
const MASTER_STEP = 256;

const masterPi = memoiseBounded(32, (bits: number) => {
  // Machin 1706: pi = 16 atan(1/5) - 4 atan(1/239).
  const w = bits + GUARD;
  return (16n * inverseTangentSeries(5n, -1n, w) - 4n * inverseTangentSeries(239n, -1n, w)) >> BigInt(GUARD);
});

const masterLn2 = memoiseBounded(32, (bits: number) => {
  // ln 2 = 18 atanh(1/26) - 2 atanh(1/4801) + 8 atanh(1/8749), a Machin-like identity in 2, 3, 5, 7.
  const w = bits + GUARD;
  const sum =
    18n * inverseTangentSeries(26n, 1n, w) -
    2n * inverseTangentSeries(4801n, 1n, w) +
    8n * inverseTangentSeries(8749n, 1n, w);
  return sum >> BigInt(GUARD);
});

function cutFrom(master: (bits: number) => bigint): (bits: number) => bigint {
  return memoiseBounded(128, (bits: number) => {
    const masterBits = MASTER_STEP * Math.ceil((bits + 8) / MASTER_STEP);
    return master(masterBits) >> BigInt(masterBits - bits);
  });
}

/** pi with `bits` fraction bits, |error| <= 1 ulp. */
export const piFixed: (bits: number) => bigint = cutFrom(masterPi);

/** ln 2 with `bits` fraction bits, |error| <= 1 ulp. */
export const ln2Fixed: (bits: number) => bigint = cutFrom(masterLn2);
