import { execFileSync } from 'node:child_process';
import { existsSync, mkdirSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { FixedComplex } from '../../engine/arithmetic/fixed-complex';
import { runPython } from './timing';

/** Bits by which values of peers are printed finer than they are asked for. */
export const EXTRA = 40;

/** One answer of a peer. */
export interface PeerAnswer {
  /** Processor time a call. */
  readonly microseconds: number;
  /** The value as computed to the digits asked for, with EXTRA more bits. */
  readonly value: FixedComplex;
  /** The same computed with more digits. */
  readonly reference: FixedComplex;
}

/** A peer's way to a function: null where the program, its compiler or its headers are missing, or its time is up. */
export interface Peer {
  readonly name: string;
  readonly ask: (digits: number, bits: number) => PeerAnswer | null;
}

const PATIENCE = 60_000;

function run(command: string, words: readonly string[], input = ''): string | null {
  try {
    return execFileSync(command, words, {
      encoding: 'utf8',
      timeout: PATIENCE,
      input,
      stdio: ['pipe', 'pipe', 'ignore'],
    });
  } catch {
    return null;
  }
}

function answerOf(output: string | null): PeerAnswer | null {
  const words = (output ?? '').trim().split(/\s+/);
  if (words.length !== 5) return null;
  const [a, b, c, d] = words.slice(1).map(BigInt) as [bigint, bigint, bigint, bigint];
  return { microseconds: Number(words[0]), value: { re: a, im: b }, reference: { re: c, im: d } };
}

/**
 * An expression in the names of `prelude` and of `setup` (run once at each precision, outside the clock), evaluated by mpmath
 * to the digits asked for and to 20 more.
 */
export function mpmathPeer(name: string, prelude: string, expression: string, setup = ''): Peer {
  return {
    name,
    ask: (digits, bits) =>
      answerOf(
        runPython(
          `${prelude}
import time, mpmath as mp
def clock(f):
    count = 1
    while True:
        start = time.process_time()
        for _ in range(count): f()
        passed = time.process_time() - start
        if passed > 0.02: return passed / count * 1e6
        count *= 2
f = lambda: ${expression}
mp.mp.dps = ${digits}
${setup}
own = f()
passed = clock(f)
mp.mp.dps = ${digits + 20}
${setup}
reference = f()
mp.mp.prec += 100
print(passed, *[int(mp.nint(mp.ldexp(part(v), ${bits + EXTRA}))) for v in (own, reference) for part in (mp.re, mp.im)])
`,
          PATIENCE,
        ),
      ),
  };
}

/** An expression of PARI/GP after `prelude`, in a loop of its interpreter; printed like the others. */
export function pariPeer(name: string, prelude: string, expression: string): Peer {
  return {
    name,
    ask: (digits, bits) =>
      answerOf(
        run(
          'gp',
          ['-q', '-f'],
          `default(parisizemax, 1000000000);
scaled(x) = round(bitprecision(1. * x, ${2 * bits + 400}) * 2^${bits + EXTRA});
f() = ${expression};
setup() = { ${prelude === '' ? '0' : prelude}; };
default(realprecision, ${digits});
setup(); own = f(); calls = 1; passed = 0;
while(passed < 20, start = gettime(); for(i = 1, calls, f()); passed = gettime(); if(passed < 20, calls *= 2));
default(realprecision, ${digits + 20});
setup(); reference = f();
default(realprecision, ${2 * digits + 200});
print(strprintf("%.6f", 1000. * passed / calls), " ", scaled(real(own)), " ", scaled(imag(own)), " ", scaled(real(reference)), " ", scaled(imag(reference)));
`,
        ),
      ),
  };
}

/** The folder of the sources, found from the bundle in dist/bench. */
const SOURCES = join(dirname(fileURLToPath(import.meta.url)), '../../test/bench');
const BUILT = join(dirname(fileURLToPath(import.meta.url)), 'arb-peer');

/** Compiles test/bench/arb-peer.c once a run; null in words why not. */
export function compileArb(): string | null {
  const source = join(SOURCES, 'arb-peer.c');
  if (!existsSync(source)) return 'the source of the C program is not there';
  mkdirSync(dirname(BUILT), { recursive: true });
  if (run('cc', ['--version']) === null) return 'no C compiler (cc)';
  // Debian names the library flint-arb; since FLINT 3 it is part of flint.
  for (const libraries of [['-lflint-arb', '-lflint'], ['-lflint']]) {
    const words = ['-O2', '-o', BUILT, source, ...libraries, '-lgmp', '-lm'];
    if (run('cc', words) !== null) return null;
  }
  return 'headers or libraries of Arb are missing (libflint-arb-dev)';
}

/** A function of arb-peer.c at the fixed point argument that `argument` gives for a count of bits. */
export function arbPeer(name: string, word: string, argument: (bits: number) => FixedComplex): Peer {
  return {
    name,
    ask: (_, bits) => {
      const { re, im } = argument(bits);
      return existsSync(BUILT) ? answerOf(run(BUILT, [word, `${bits}`, `${re}`, `${im}`])) : null;
    },
  };
}
