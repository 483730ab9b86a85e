import { analyse } from '../../engine/requests/analysis';
import { outline } from '../../engine/requests/outline';
import { plotAt } from '../../engine/requests/plot-at';
import { waitInTurns } from './timing';

/** One job of the page: least and median milliseconds a call, beside what it may take. */
export interface JobRow {
  readonly name: string;
  readonly least: number;
  readonly median: number;
  readonly limit: number;
}

const RANK_FOUR = `
let r = 1/3 in 0 .. 1
theory large
  sphere S3, b = 5/4
  gauge G = U(4), level 1, fi zeta
  flavor F = SU(3), mass m
  flavor A = U(1), mass mu
  matter      G     F     A   R
  chiral q    fund  anti  1   r
  chiral p    anti  1     1   r
  chiral phi  adj   1    -2   2-2r
  chiral x    sym2  1     0   1/2
  chiral y    alt2  fund  0   1/2
  chiral z    1     adj   0   2/3

plot abs one-loop of large over sigma1 = -3 .. 3
`;

const EXCEPTIONAL = `
theory huge
  sphere S3
  gauge G = E8
  matter    G    R
  chiral q  adj  1/3
  chiral p  adj  1/4
`;

/** A keystroke is a text that was never seen before: blanks at the end make one. */
function keystroke(text: string): () => unknown {
  let count = 0;
  return () => {
    count = (count + 1) % 1000;
    return outline(analyse(text + ' '.repeat(count)), {});
  };
}

/** The curve under a moving slider: the text stays, the parameter is never the same twice. */
function slider(text: string): () => unknown {
  const analysis = analyse(text);
  const plot = outline(analysis, {}).cards.find((card) => card.kind === 'request');
  const key = plot?.kind === 'request' ? plot.key : '';
  let count = 0;
  return () => {
    count = (count + 1) % 997;
    return plotAt(analysis, key, { r: 0.3 + count / 10_000 });
  };
}

export function run(): JobRow[] {
  const jobs: readonly (readonly [string, () => unknown, number])[] = [
    ['a keystroke: rank 4, six multiplets', keystroke(RANK_FOUR), 16],
    ['a keystroke: E8 with adjoint matter', keystroke(EXCEPTIONAL), 50],
    ['a 601-point curve: rank 4, six multiplets', slider(RANK_FOUR), 5],
  ];
  return measureJobs(jobs);
}

/** Times jobs against their limits, in turns. */
export function measureJobs(jobs: readonly (readonly [string, () => unknown, number])[]): JobRow[] {
  const waits = waitInTurns(
    jobs.map(([, task]) => task),
    40,
  );
  return jobs.map(([name, , limit], k) => ({ name, limit, ...(waits[k] as { least: number; median: number }) }));
}
