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
  /** log10 of the error relative to max(1, |value|), ours and the peer's; null where it was not measured. */
  readonly log10Error: number | null;
  readonly peerLog10Error: number | null;
}

const BATCH_MILLISECONDS = 8;

/**
 * Processor time spent on a task before it is measured: the runtime compiles arithmetic on big integers late. log Gamma at
 * 50 digits came out at 200 to 390 us after a warm-up of 16 ms, and at 64 us after 300 ms.
 */
const WARM_UP_MILLISECONDS = 250;

/** Processor time in microseconds: other work on the machine does not count; helper threads of the runtime do. */
function now(): number {
  const { user, system } = process.cpuUsage();
  return user + system;
}

/** What a batch computes goes here, so that no call is optimised away. */
const sink: { last: unknown } = { last: null };

function batchSize(task: () => unknown): number {
  const first = now();
  for (let count = 1; ; ) {
    const start = now();
    for (let i = 0; i < count; i++) sink.last = task();
    const end = now();
    if (end - start < BATCH_MILLISECONDS * 1e3) count *= 2;
    else if (end - first > WARM_UP_MILLISECONDS * 1e3) return count;
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
 * Median microseconds a call of a task, measured before, between and after the questions to other programs, whose answers
 * come beside it: a busy machine slows both sides.
 */
export function timeAround<Answer>(
  task: () => unknown,
  questions: readonly (() => Answer)[],
): {
  readonly microseconds: number;
  readonly answers: readonly (readonly Answer[])[];
} {
  const count = batchSize(task);
  const times: number[] = [];
  const batches = (): void => {
    for (let round = 0; round < 3; round++) {
      const start = now();
      for (let k = 0; k < count; k++) sink.last = task();
      times.push((now() - start) / count);
    }
  };
  const answers = questions.map((): Answer[] => []);
  batches();
  for (let turn = 0; turn < QUESTION_TURNS; turn++) {
    questions.forEach((ask, k) => {
      (answers[k] as Answer[]).push(ask());
      batches();
    });
  }
  return { microseconds: median(times), answers };
}

/** Calls longer than this are measured once, after one to make the tables. */
const LONG_MICROSECONDS = 300_000;

/** Microseconds a call with tables warm; the median of some batches unless one call is long. */
export function timeOnce(task: () => unknown): number {
  sink.last = task();
  const start = now();
  sink.last = task();
  const passed = now() - start;
  return passed > LONG_MICROSECONDS ? passed : (timeInTurns([task], 3)[0] as number);
}

/** How often another program is asked. */
const QUESTION_TURNS = 2;

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

const PYTHONS = ['python3', '/usr/bin/python3'];

interface Python {
  readonly command: string;
  readonly version: string;
}

/** The Python whose mpmath works on GMP, which is several times faster, else the first that has mpmath; null without one. */
function findPython(): Python | null {
  const found = PYTHONS.flatMap((command): Python[] => {
    const version = pythonOutput(command, 'import mpmath; print(mpmath.__version__, mpmath.libmp.BACKEND)', 20_000);
    return version === null ? [] : [{ command, version: version.trim() }];
  });
  return found.find(({ version }) => version.endsWith('gmpy')) ?? found[0] ?? null;
}

function pythonOutput(command: string, program: string, milliseconds: number): string | null {
  try {
    return execFileSync(command, ['-c', program], {
      encoding: 'utf8',
      timeout: milliseconds,
      stdio: ['ignore', 'pipe', 'ignore'],
    });
  } catch {
    return null;
  }
}

/** Found once a run. */
const python: { found?: Python | null } = {};

function thePython(): Python | null {
  if (python.found === undefined) python.found = findPython();
  return python.found;
}

/** Version and number type of mpmath, for the head of the report. */
export function mpmathVersion(): string {
  return thePython()?.version ?? 'absent';
}

/** Standard output of a Python program, or null where Python or a module it needs is missing, or the time is up. */
export function runPython(program: string, milliseconds: number): string | null {
  const found = thePython();
  return found === null ? null : pythonOutput(found.command, program, milliseconds);
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
