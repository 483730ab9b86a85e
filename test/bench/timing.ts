import { execFileSync } from 'node:child_process';

/** One row of a comparison: ours, a peer, and the accuracy each reached. */
export interface ComparisonRow {
  readonly name: string;
  readonly digits: number;
  readonly microseconds: number;
  readonly peer: string;
  readonly peerMicroseconds: number | null;
  /** Peer's time over ours. */
  readonly ratio: number | null;
  /** Where the peer's time comes from: measured in this run, or recorded earlier and scaled by the calibration loop. */
  readonly peerTime: 'live' | 'recorded' | 'none';
  /** log10 of the error relative to max(1, |value|), ours and the peer's; null where it was not measured. */
  readonly log10Error: number | null;
  readonly peerLog10Error: number | null;
}

const BATCH_MILLISECONDS = 8;

/** Processor time in microseconds: other work on the machine does not count; helper threads of the runtime do. */
function now(): number {
  const { user, system } = process.cpuUsage();
  return user + system;
}

/** What a batch computes goes here, so that no call is optimised away. */
const sink: { last: unknown } = { last: null };

function batchSize(task: () => unknown): number {
  // Doubling also warms the code up.
  for (let count = 1; ; count *= 2) {
    const start = now();
    for (let i = 0; i < count; i++) sink.last = task();
    if (now() - start > BATCH_MILLISECONDS * 1e3) return count;
  }
}

/** Median microseconds of processor time a call of each task; batches of the tasks alternate, so that a busy machine slows all of them. */
export function timeInTurns(tasks: readonly (() => unknown)[], rounds: number): number[] {
  const counts = tasks.map(batchSize);
  const times = tasks.map((): number[] => []);
  for (let round = 0; round < rounds; round++) {
    tasks.forEach((task, i) => {
      const count = counts[i] as number;
      const start = now();
      for (let k = 0; k < count; k++) sink.last = task();
      (times[i] as number[]).push((now() - start) / count);
    });
  }
  return times.map(median);
}

/**
 * Least and median milliseconds on the clock of single calls, in turns, after a warm-up: what a person waits for. The
 * least is what the machine can do; the median holds what other work and the collector of garbage cost.
 */
export function waitInTurns(tasks: readonly (() => unknown)[], rounds: number): { least: number; median: number }[] {
  const times = tasks.map((): number[] => []);
  for (let round = -WARM_UP; round < rounds; round++) {
    tasks.forEach((task, k) => {
      const start = performance.now();
      sink.last = task();
      if (round >= 0) (times[k] as number[]).push(performance.now() - start);
    });
  }
  return times.map((list) => ({ least: Math.min(...list), median: median(list) }));
}

/** Calls before the counted ones, so that the compiler of the runtime has done its work. */
const WARM_UP = 25;

export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] as number;
}

/** Microseconds of a fixed loop of BigInt products: compares this machine with the one a recorded time comes from. */
export function calibration(): number {
  const a = 3n ** 400n;
  const b = 5n ** 270n;
  const loop = () => {
    let sum = 0n;
    for (let i = 0n; i < 1000n; i++) sum ^= (a + i) * b;
    return sum;
  };
  return timeInTurns([loop], 5)[0] as number;
}

/** Debian's own Python comes second: its modules are there where another Python is first in the search path. */
const PYTHONS = ['python3', '/usr/bin/python3'];

/** Standard output of a Python program, or null where Python or a module it needs is missing, or the time is up. */
export function runPython(program: string, milliseconds: number): string | null {
  for (const python of PYTHONS) {
    try {
      return execFileSync(python, ['-c', program], {
        encoding: 'utf8',
        timeout: milliseconds,
        stdio: ['ignore', 'pipe', 'ignore'],
      });
    } catch {
      // The next one may have what this one lacks.
    }
  }
  return null;
}

/** log10 of |a - b| / max(1, |b|) for fixed point numbers. */
export function log10Difference(a: bigint, b: bigint, bits: number): number {
  const size = (value: bigint) => {
    const text = (value < 0n ? -value : value).toString();
    return text === '0' ? Number.NEGATIVE_INFINITY : Math.log10(Number(`0.${text.slice(0, 17)}`)) + text.length;
  };
  const difference = size(a - b) - bits * Math.log10(2);
  return difference - Math.max(0, size(b) - bits * Math.log10(2));
}
