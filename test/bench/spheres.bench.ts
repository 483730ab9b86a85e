import { analyse, isRequest } from '../../engine/requests/analysis';
import { run as answer } from '../../engine/requests/run';
import { type JobRow, measureJobs } from './engine.bench';

const TWO = `
theory two
  sphere S2
  gauge G = U(1), fi xi, theta t
  flavor F = SU(2), mass m
  matter    G   F     R
  chiral a  1   fund  1/3
  chiral b  -1  fund  2/5
  chiral c  2   1     1/2
  chiral d  -2  1     1/4
  chiral e  3   1     2/3
  chiral f  0   adj   1
`;

const four = (sphere: string): string => `
theory four
  sphere ${sphere}
  gauge G = SU(2), coupling g
  flavor F = SU(2), mass m
  matter    G     F
  hyper a  fund  fund
  hyper b  fund  1
  hyper c  adj   1
  hyper d  fund  adj
  hyper e  sym3  1
  hyper f  1     fund
`;

/** Answers one request of a notebook; its theory is read once. */
function request(text: string, line: string): () => unknown {
  const analysis = analyse(`${text}\n${line}\n`);
  const [only] = analysis.notebook.blocks.filter(isRequest);
  if (!only) throw new Error(line);
  const surroundings = { now: () => 0, progress: () => true, digits: 30 };
  return () => {
    const result = answer(analysis, only, surroundings);
    if (result.kind === 'failure') throw new Error(result.failure.message);
    return result;
  };
}

const THEORIES: readonly (readonly [string, string, string])[] = [
  ['S2', TWO, 'flux = 1, '],
  ['S4 round', four('S4'), ''],
  ['S4, b = 5/4', four('S4, b = 5/4'), ''],
  ['S5 round', four('S5'), ''],
  ['S5, w = 1, 6/5, 9/10', four('S5, w1 = 1, w2 = 6/5, w3 = 9/10'), ''],
];

const CHAIN = `
theory chain
  sphere S4, b = 6/5
  gauge G = SU(2)
  gauge H = SU(2), coulomb tau
  flavor A = U(1)
  matter    G     H     A
  hyper x  2*fund 1     0
  hyper y  fund   fund  1
  hyper z  1      2*fund 0
`;

/** Curves and values on the spheres other than S^3: rank 1, six multiplets, tables warm. */
export function run(): JobRow[] {
  const jobs = THEORIES.flatMap(([name, text, flux]): (readonly [string, () => unknown, number])[] => {
    const theory = text.includes('two') ? 'two' : 'four';
    return [
      [
        `${name}: a 601-point curve`,
        request(text, `plot abs one-loop of ${theory} over sigma = -3 .. 3 at ${flux}m = 0.3`),
        10,
      ],
      [
        `${name}: 50 digits, confirmed`,
        request(text, `value one-loop of ${theory} at sigma = 0.37, ${flux}m = 0.3, 50 digits`),
        50,
      ],
    ];
  });
  const coefficient = request(CHAIN, 'value instanton(2, 2) of chain at sigma = 0.37, tau = 0.2, m = 0.3, 50 digits');
  return measureJobs([...jobs, ['S4, b = 6/5: orders 2 and 2 of two SU(2), twice', coefficient, 200]]);
}
