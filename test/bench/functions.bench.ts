import { fixedFromNumber } from '../../engine/arithmetic/fixed';
import type { FixedComplex } from '../../engine/arithmetic/fixed-complex';
import { ARRAY, ARRAYS, GROWTH, PRECISE, PRELUDE } from './functions-cases';
import { EXTRA, mpmathPeer, type Peer, type PeerAnswer } from './peers';
import { type ComparisonRow, log10Difference, median, timeAround, timeOnce } from './timing';

const DIGITS = [50, 200] as const;

function bitsFor(digits: number): number {
  return Math.ceil(digits * Math.log2(10)) + 8;
}

function worst(a: FixedComplex, b: FixedComplex, bits: number): number {
  return Math.max(log10Difference(a.re, b.re, bits), log10Difference(a.im, b.im, bits));
}

/** Ours (value with EXTRA more bits) beside each peer; errors against the peer's finer value. */
export function compare(
  name: string,
  digits: number,
  bits: number,
  task: () => unknown,
  ours: FixedComplex,
  peers: readonly Peer[],
  calls = 1,
): ComparisonRow[] {
  const { microseconds, answers } = timeAround(
    task,
    peers.map(
      ({ ask }) =>
        () =>
          ask(digits, bits),
    ),
  );
  const own = microseconds / calls;
  if (peers.length === 0) return [{ ...ALONE, name, digits, microseconds: own }];
  return peers.map((peer, k): ComparisonRow => {
    const found = (answers[k] ?? []).filter((answer): answer is PeerAnswer => answer !== null);
    const first = found[0];
    const row = { ...ALONE, name, digits, microseconds: own, peer: peer.name };
    if (first === undefined) return row;
    const time = median(found.map((answer) => answer.microseconds));
    return {
      ...row,
      peerMicroseconds: time,
      ratio: time / own,
      log10Error: worst(ours, first.reference, bits + EXTRA),
      peerLog10Error: worst(first.value, first.reference, bits + EXTRA),
    };
  });
}

const ALONE = {
  peer: 'none',
  peerMicroseconds: null,
  ratio: null,
  log10Error: null,
  peerLog10Error: null,
} as const;

/** Every function in doubles on arrays of 10,000 (microseconds a value) and to 50 and 200 digits, against its peers. */
export function run(): ComparisonRow[] {
  const arrays = ARRAYS.flatMap(({ name, kernel, re, im, python }) => {
    const made = kernel();
    const xRe = Float64Array.from({ length: ARRAY }, (_, k) => re(k));
    const xIm = im === null ? null : Float64Array.from({ length: ARRAY }, (_, k) => im(k));
    const outRe = new Float64Array(ARRAY);
    const outIm = new Float64Array(ARRAY);
    const task = (): Float64Array => {
      outRe.fill(0);
      outIm.fill(0);
      made.addLog(xRe, xIm, 1, outRe, outIm);
      return outRe;
    };
    task();
    const bits = bitsFor(15);
    const ours = {
      re: fixedFromNumber(outRe[ARRAY - 1] as number, bits + EXTRA),
      im: fixedFromNumber(outIm[ARRAY - 1] as number, bits + EXTRA),
    };
    return compare(name, 15, bits, task, ours, [mpmathPeer('mpmath', PRELUDE, python)], ARRAY);
  });
  const precise = PRECISE.flatMap(({ name, compute, peers }) =>
    DIGITS.flatMap((digits) => {
      const bits = bitsFor(digits);
      const { re, im } = compute(bits);
      const ours = { re: re << BigInt(EXTRA), im: im << BigInt(EXTRA) };
      const asked = peers.filter(({ most }) => digits <= most).map(({ peer }) => peer);
      return compare(name, digits, bits, () => compute(bits), ours, asked);
    }),
  );
  return [...arrays, ...precise];
}

export const GROWTH_DIGITS = [15, 50, 100, 200, 500, 1000] as const;

/** Microseconds a call, tables warm, by digits. */
export function growth(): (readonly [string, readonly number[]])[] {
  return GROWTH.map(([name, compute]) => [
    name,
    GROWTH_DIGITS.map((digits) => timeOnce(() => compute(bitsFor(digits)))),
  ]);
}
