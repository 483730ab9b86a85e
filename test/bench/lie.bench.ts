import { execFileSync } from 'node:child_process';
import { freudenthal } from '../../engine/lie/character';
import { rootSystem } from '../../engine/lie/root-system';
import { type SimpleType, typeName } from '../../engine/lie/simple-type';

/** One irreducible representation, timed here and, where it is installed, by GAP 4 in the same run. */
export interface LieMeasurement {
  readonly name: string;
  /** Least milliseconds of one dominant character, root system already built: other work on the machine only adds. */
  readonly milliseconds: number;
  /** GAP's least time for DominantCharacter on the same weight; null without GAP. */
  readonly gapMilliseconds: number | null;
  /** GAP's time over ours. */
  readonly ratio: number | null;
  /** Whether both gave the same dominant weights and multiplicities. */
  readonly equal: boolean | null;
}

const CASES: readonly { readonly type: SimpleType; readonly labels: readonly number[] }[] = [
  { type: { series: 'E', rank: 8 }, labels: [1, 0, 0, 0, 0, 0, 0, 0] },
  { type: { series: 'E', rank: 8 }, labels: [0, 1, 0, 0, 0, 0, 0, 0] },
  { type: { series: 'E', rank: 8 }, labels: [1, 0, 0, 0, 0, 0, 0, 1] },
  { type: { series: 'A', rank: 7 }, labels: [2, 1, 0, 1, 0, 1, 2] },
  { type: { series: 'A', rank: 7 }, labels: [1, 1, 1, 1, 1, 1, 1] },
  { type: { series: 'C', rank: 8 }, labels: [0, 0, 0, 0, 0, 0, 0, 1] },
  { type: { series: 'C', rank: 8 }, labels: [1, 1, 1, 1, 0, 0, 0, 0] },
];

/** Rounds alternate between the two programs, so that a busy machine slows both. */
const ROUNDS = 3;
const REPETITIONS = 5;
/** Milliseconds after which GAP is given up; a round takes it two to five seconds. */
const GAP_PATIENCE = 60_000;

interface GapAnswer {
  readonly nanoseconds: number;
  readonly character: string;
}

/** Dominant weights with multiplicities in an order of their own: equal texts mean equal characters. */
function canonical(weights: readonly (readonly number[])[], multiplicities: readonly number[]): string {
  return weights
    .map((labels, i) => `${labels.join()}:${multiplicities[i]}`)
    .sort()
    .join(' ');
}

function askGap(): GapAnswer[] | null {
  // Each case is computed once before it is timed: reading library code is no part of the comparison.
  const program = CASES.map(
    ({ type, labels }) => `
      R := RootSystem(SimpleLieAlgebra("${type.series}", ${type.rank}, Rationals));;
      DominantCharacter(R, [${labels.join()}]);;
      best := infinity;;
      for k in [1 .. ${REPETITIONS}] do
        t := NanosecondsSinceEpoch(); d := DominantCharacter(R, [${labels.join()}]); t := NanosecondsSinceEpoch() - t;
        if t < best then best := t; fi;
      od;
      Print("CASE ", best, "\\n");
      for i in [1 .. Length(d[1])] do Print("ROW ", d[2][i], " ", d[1][i], "\\n"); od;`,
  ).join('\n');
  let output: string;
  try {
    const input = `SizeScreen([1000, 100]);;\n${program}\nquit;\n`;
    output = execFileSync('gap', ['-q', '-A'], { input, encoding: 'utf8', timeout: GAP_PATIENCE });
  } catch {
    // Not installed, or too slow: the comparison is left out, and the measurement says so by null.
    return null;
  }
  return output
    .split('CASE ')
    .slice(1)
    .map((text) => {
      const rows = [...text.matchAll(/ROW (\d+) \[([-\d, ]+)\]/g)];
      const weights = rows.map(([, , labels]) => (labels ?? '').split(',').map(Number));
      return {
        nanoseconds: Number.parseInt(text, 10),
        character: canonical(
          weights,
          rows.map(([, multiplicity]) => Number(multiplicity)),
        ),
      };
    });
}

function ours({ type, labels }: (typeof CASES)[number]): { milliseconds: number; character: string } {
  const system = rootSystem(type);
  const start = process.hrtime.bigint();
  const character = freudenthal(system, labels);
  const milliseconds = Number(process.hrtime.bigint() - start) / 1e6;
  if (!character) throw new Error('A character without a limit is never refused.');
  const rows = Array.from({ length: character.count }, (_, k) => [
    ...character.labels.subarray(k * type.rank, (k + 1) * type.rank),
  ]);
  return { milliseconds, character: canonical(rows, [...character.multiplicities]) };
}

/** Times every case in alternating rounds; takes some ten seconds where GAP is installed. */
export function measureLie(): LieMeasurement[] {
  const own = CASES.map((): number[] => []);
  const gap = CASES.map((): number[] => []);
  const equal: (boolean | null)[] = CASES.map(() => null);
  for (let round = 0; round < ROUNDS; round++) {
    const answers = askGap();
    CASES.forEach((one, i) => {
      for (let repetition = 0; repetition < REPETITIONS; repetition++) {
        const { milliseconds, character } = ours(one);
        (own[i] as number[]).push(milliseconds);
        const answer = answers?.[i];
        if (!answer) continue;
        equal[i] = equal[i] !== false && answer.character === character;
        if (repetition === 0) (gap[i] as number[]).push(answer.nanoseconds / 1e6);
      }
    });
  }
  return CASES.map(({ type, labels }, i) => {
    const milliseconds = Math.min(...(own[i] as number[]));
    const times = gap[i] as number[];
    const gapMilliseconds = times.length === 0 ? null : Math.min(...times);
    return {
      name: `dominant character of ${typeName(type)} [${labels.join()}]`,
      milliseconds,
      gapMilliseconds,
      ratio: gapMilliseconds === null ? null : gapMilliseconds / milliseconds,
      equal: equal[i] ?? null,
    };
  });
}
