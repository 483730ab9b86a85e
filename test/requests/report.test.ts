import { describe, expect, test } from 'vitest';
import { analyse } from '../../engine/requests/analysis';
import { report } from '../../engine/requests/report';
import type { Progress } from '../../engine/requests/result';
import { SURROUNDINGS } from './answers';

/** The JSON of the batch command, as its readers get it. */
function reported(text: string): { output: Record<string, Record<string, unknown>[]>; failed: boolean } {
  const { output, failed } = report(analyse(text), SURROUNDINGS);
  return { output: JSON.parse(JSON.stringify(output)), failed };
}

const THEORY = 'theory t\n  sphere S3\n  gauge G = U(2)\n  matter G R\n  chiral q fund 1/3\n\n';

const decimal = expect.stringMatching(/^-?\d+(\.\d+)?(e-?\d+)?$/);

describe('the shape of the report, as the language describes it', () => {
  test('four lists', () => {
    const { output, failed } = reported('# Only prose\n');
    expect(output).toEqual({ theories: [], spectra: [], results: [], problems: [] });
    expect(failed).toBe(false);
  });

  test('theories: name, line, four forms, checks', () => {
    const [theory] = reported(`Prose.\n\n${THEORY}`).output.theories ?? [];
    expect(theory).toMatchObject({ name: 't', line: 3 });
    expect(Object.keys(theory?.latex as object)).toEqual(['modes', 'unpaired', 'functions', 'elementary']);
    expect(Object.values(theory?.latex as object).every((latex) => typeof latex === 'string')).toBe(true);
    const checks = (theory?.checks ?? []) as unknown[];
    expect(checks.length).toBeGreaterThan(0);
    for (const check of checks) {
      expect(check).toMatchObject({
        id: expect.any(String),
        verdict: expect.stringMatching(/^(holds|fails|unknown)$/),
        says: expect.any(String),
      });
    }
  });

  test('spectra: name, line, three forms, checks', () => {
    const text = 'spectrum dirac\n  index n >= 0\n  fermion n + 3/2 times 2(n+1)(n+2)\n';
    const [spectrum] = reported(text).output.spectra ?? [];
    expect(spectrum).toMatchObject({ name: 'dirac', line: 1, checks: expect.any(Array) });
    expect(Object.keys(spectrum?.latex as object)).toEqual(['product', 'unpaired', 'closed']);
    // Both signs of the Dirac operator: (n/2, (n+1)/2) and ((n+1)/2, n/2), Camporesi and Higuchi, gr-qc/9505009.
    const [tower] = (spectrum?.towers ?? []) as { spins: string }[];
    expect(tower?.spins).toBe(
      '\\left(\\tfrac{n}{2},\\tfrac{n+1}{2}\\right)\\oplus\\left(\\tfrac{n+1}{2},\\tfrac{n}{2}\\right)',
    );
  });

  test('pairs of modes stand beside a theory on the round three-sphere, and nowhere else', () => {
    const [round] = reported(THEORY).output.theories ?? [];
    expect(round?.pairing).toMatchObject([
      { from: 'vector', rows: expect.any(Array), unpaired: expect.any(String) },
      { from: 'q', power: 1, rows: [{ left: 'n+1' }, { left: '-(n+1)' }] },
    ]);
    const [squashed] = reported(THEORY.replace('S3', 'S3, b = 5/4')).output.theories ?? [];
    expect(squashed).not.toHaveProperty('pairing');
  });

  test('a form that is refused is null, with the reason beside it', () => {
    const [theory] = reported(THEORY.replace('S3', 'S3, b = 5/4')).output.theories ?? [];
    expect(theory?.latex).toMatchObject({ modes: null, functions: expect.any(String) });
    expect(Object.keys(theory?.refused as object)).toEqual(['modes']);
  });

  test('values: digits as strings, the error, a second route', () => {
    const [result] =
      reported(`${THEORY}value one-loop of t at sigma1 = 0.3, sigma2 = -1, 15 digits\n`).output.results ?? [];
    expect(result).toMatchObject({
      line: 7,
      request: 'value one-loop of t at sigma1 = 0.3, sigma2 = -1, 15 digits',
      of: 't',
      value: { re: decimal, im: decimal, error: decimal },
      seconds: expect.any(Number),
      crossCheck: { route: expect.any(String), agrees: expect.stringMatching(/^\d+ digits$/) },
    });
    expect(result).not.toHaveProperty('kind');
  });

  test('plots: series of numbers, a map with rows', () => {
    const text = `${THEORY}plot abs q of t over sigma1 = 0 .. 1\n\nplot q of t over sigma1 = 0 .. 1, sigma2 = 0 .. 1\n`;
    const [line, map] = reported(text).output.results ?? [];
    expect(line).toMatchObject({ series: [{ name: 'abs q', x: expect.any(Array), y: expect.any(Array) }] });
    expect(map).toMatchObject({ series: [{ z: expect.any(Array) }] });
  });

  // 3 x 6 = 10 + 8 of SU(3), index of the product 3 + 6 times 5: Slansky, Phys. Rept. 79 (1981) 1, table 24.
  test('representations', () => {
    const text = 'representation SU(3): fund x sym2\n\nrepresentation SU(3): adj\n';
    const [product, adjoint] = reported(text).output.results ?? [];
    expect(product).toMatchObject({
      of: 'SU(3)',
      dimension: '18',
      index: '21',
      reality: 'complex',
      weights: expect.any(Number),
    });
    expect(product?.parts).toEqual(
      expect.arrayContaining([
        { labels: [3, 0], dimension: '10', multiplicity: 1 },
        { labels: [1, 1], dimension: '8', multiplicity: 1 },
      ]),
    );
    expect(product).not.toHaveProperty('dominant');
    expect(adjoint).toMatchObject({ dimension: '8', index: '6', cubic: '0', reality: 'real', weights: 7 });
    expect(adjoint?.dominant).toEqual([
      { labels: [1, 1], multiplicity: 1 },
      { labels: [0, 0], multiplicity: 2 },
    ]);
  });

  test('formulas', () => {
    const [result] = reported(`${THEORY}formula t as functions\n`).output.results ?? [];
    expect(result).toMatchObject({ of: 't', formula: { latex: expect.stringContaining('s_{b=1}') } });
  });

  test('failures carry a message, and the rest still runs', () => {
    const { output, failed } = reported(`${THEORY}value p of t\n\nvalue gamma(1/2), 5 digits\n`);
    expect(output.results?.map((result) => Object.keys(result).sort())).toEqual([
      ['failure', 'line', 'of', 'request', 'seconds'],
      ['crossCheck', 'digits', 'line', 'of', 'request', 'seconds', 'value'],
    ]);
    expect(output.results?.[0]?.failure).toEqual({ message: expect.stringContaining('`p` is no quantity') });
    expect(failed).toBe(true);
  });

  test('problems: line, column, severity, message', () => {
    const { output } = reported(THEORY.replace('fund', 'fond'));
    expect(output.problems).toEqual([
      { line: 5, column: 12, severity: 'error', message: expect.stringContaining('fond') },
    ]);
  });
});

test('progress is reported before each request, and time is taken from the clock given', () => {
  const steps: Progress[] = [];
  let clock = 0;
  const { output } = report(analyse('value gamma(1/2), 5 digits\n\nvalue gamma(1/3), 5 digits\n'), {
    now: () => clock++,
    progress: (step) => {
      steps.push(step);
      return true;
    },
    digits: 10,
  });
  expect(steps).toEqual([
    { done: 0, of: 2, says: 'value' },
    { done: 1, of: 2, says: 'value' },
  ]);
  expect(JSON.parse(JSON.stringify(output.results)).map((result: { seconds: number }) => result.seconds)).toEqual([
    1, 1,
  ]);
});
